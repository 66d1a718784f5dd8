#include "core/molecule/matching.hpp"

#include "core/base/check.hpp"

namespace heatledger::molecule {

Matching::Matching(std::uint32_t vertices, const std::vector<std::pair<std::uint32_t, std::uint32_t>>& edges)
    : first_(vertices + 1, 0),
      neighbours_(edges.size() * 2),
      forbidden_(edges.size() * 2, 0),
      mate_(vertices, none),
      parent_(vertices, none),
      base_(vertices),
      visit_(vertices, 0),
      optional_(vertices, 0),
      removed_(vertices, 0),
      outer_(vertices, 0),
      in_blossom_(vertices, 0),
      touched_flag_(vertices, 0) {
  for (std::uint32_t v = 0; v < vertices; ++v) base_[v] = v;
  for (const auto& edge : edges) {
    CHECK(edge.first != edge.second, "no loops in a matching");
    ++first_[edge.first];
    ++first_[edge.second];
  }
  std::uint32_t total = 0;
  for (std::uint32_t& first : first_) {
    const std::uint32_t degree = first;
    first = total;
    total += degree;
  }
  std::vector<std::uint32_t> next(first_.begin(), first_.end());
  for (const auto& edge : edges) {
    neighbours_[next[edge.first]++] = edge.second;
    neighbours_[next[edge.second]++] = edge.first;
  }
}

void Matching::join(std::uint32_t a, std::uint32_t b) {
  CHECK(mate_[a] == none && mate_[b] == none, "two free vertices");
  mate_[a] = b;
  mate_[b] = a;
}

void Matching::part(std::uint32_t vertex) {
  if (mate_[vertex] == none) return;
  mate_[mate_[vertex]] = none;
  mate_[vertex] = none;
}

std::vector<std::uint32_t> Matching::allowed_neighbours(std::uint32_t vertex) const {
  std::vector<std::uint32_t> found;
  for (std::uint32_t e = first_[vertex]; e < first_[vertex + 1]; ++e) {
    if (!forbidden_[e]) found.push_back(neighbours_[e]);
  }
  return found;
}

void Matching::set_forbidden(std::uint32_t a, std::uint32_t b, bool forbidden) {
  for (std::uint32_t e = first_[a]; e < first_[a + 1]; ++e) {
    if (neighbours_[e] == b) forbidden_[e] = forbidden ? 1 : 0;
  }
  for (std::uint32_t e = first_[b]; e < first_[b + 1]; ++e) {
    if (neighbours_[e] == a) forbidden_[e] = forbidden ? 1 : 0;
  }
  if (forbidden && mate_[a] == b) part(a);
}

void Matching::touch(std::uint32_t vertex) {
  if (touched_flag_[vertex]) return;
  touched_flag_[vertex] = 1;
  touched_.push_back(vertex);
}

// Lowest common ancestor of two outer vertices in the alternating tree, blossoms taken as one vertex.
std::uint32_t Matching::common_base(std::uint32_t a, std::uint32_t b) {
  ++visit_count_;
  for (a = base_[a];; a = base_[parent_[mate_[a]]]) {
    visit_[a] = visit_count_;
    if (mate_[a] == none) break;
  }
  for (b = base_[b]; visit_[b] != visit_count_; b = base_[parent_[mate_[b]]]) {
  }
  return b;
}

void Matching::mark_blossom(std::uint32_t from, std::uint32_t base, std::uint32_t child) {
  while (base_[from] != base) {
    in_blossom_[base_[from]] = in_blossom_[base_[mate_[from]]] = 1;
    parent_[from] = child;
    child = mate_[from];
    from = parent_[child];
  }
}

// Swaps matched and free edges on the tree path from `end` (free, parent known) up to the root.
void Matching::flip(std::uint32_t end) {
  while (end != none) {
    const std::uint32_t partner = parent_[end];
    const std::uint32_t next = mate_[partner];
    mate_[end] = partner;
    mate_[partner] = end;
    end = next;
  }
}

bool Matching::augment(std::uint32_t root, bool displace_optional) {
  CHECK(mate_[root] == none && !removed_[root], "a free vertex to match");
  const bool found = search(root, displace_optional);
  for (const std::uint32_t v : touched_) {
    parent_[v] = none;
    base_[v] = v;
    outer_[v] = in_blossom_[v] = touched_flag_[v] = 0;
  }
  touched_.clear();
  return found;
}

bool Matching::search(std::uint32_t root, bool displace_optional) {
  queue_.assign(1, root);
  touch(root);
  outer_[root] = 1;
  // An outer vertex that need not be matched ends an even path: it becomes free, the root matched.
  const auto give_up = [&](std::uint32_t vertex) {
    const std::uint32_t partner = mate_[vertex];
    mate_[vertex] = none;
    flip(partner);
  };
  for (std::size_t head = 0; head < queue_.size(); ++head) {
    const std::uint32_t v = queue_[head];
    for (std::uint32_t e = first_[v]; e < first_[v + 1]; ++e) {
      const std::uint32_t to = neighbours_[e];
      if (forbidden_[e] || removed_[to] || base_[v] == base_[to] || mate_[v] == to) continue;
      if (to == root || (mate_[to] != none && parent_[mate_[to]] != none)) {
        const std::uint32_t base = common_base(v, to);
        mark_blossom(v, base, to);
        mark_blossom(to, base, v);
        std::uint32_t freed = none;
        for (const std::uint32_t u : touched_) {
          if (!in_blossom_[base_[u]]) continue;
          base_[u] = base;
          if (outer_[u]) continue;
          outer_[u] = 1;
          queue_.push_back(u);
          if (optional_[u]) freed = u;
        }
        for (const std::uint32_t u : touched_) in_blossom_[u] = 0;
        if (displace_optional && freed != none) {
          give_up(freed);
          return true;
        }
      } else if (parent_[to] == none) {
        touch(to);
        parent_[to] = v;
        const std::uint32_t partner = mate_[to];
        if (partner == none) {
          flip(to);
          return true;
        }
        touch(partner);
        outer_[partner] = 1;
        if (displace_optional && optional_[partner]) {
          give_up(partner);
          return true;
        }
        queue_.push_back(partner);
      }
    }
  }
  return false;
}

}  // namespace heatledger::molecule
