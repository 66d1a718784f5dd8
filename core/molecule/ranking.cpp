#include "core/molecule/ranking.hpp"

#include <algorithm>
#include <array>
#include <cstddef>
#include <utility>

namespace heatledger::molecule {
namespace {

constexpr std::size_t most_searched_atoms = 1000;
constexpr std::size_t most_trials = 5000;

// Colours 0, 1, 2, ... with their atoms. A split gives the larger part the old colour, so that an atom is
// looked at again only a logarithmic number of times.
struct Partition {
  std::vector<std::uint32_t> colour;              // per atom
  std::vector<std::vector<std::uint32_t>> cells;  // per colour
  bool discrete() const { return cells.size() == colour.size(); }
};

// What an atom sees: label and colour of each neighbour, sorted.
using Signature = std::vector<std::pair<std::uint8_t, std::uint32_t>>;

class Ranking {
 public:
  Ranking(const Graph& graph, const std::vector<std::uint8_t>& labels) : graph_(graph), labels_(labels) {
    build_adjacency(graph, adjacency_);
  }

  std::vector<std::uint32_t> find() {
    Partition start = by_invariants();
    classes_ = start.colour;
    std::vector<std::uint32_t> all(graph_.atoms.size());
    for (std::uint32_t i = 0; i < all.size(); ++i) all[i] = i;
    refine(start, std::move(all));
    // Refinement finds the symmetry classes of trees exactly; only rings can hide a difference.
    const bool tree = graph_.bonds.size() < graph_.atoms.size() && connected_without_rings();
    if (start.discrete() || tree || graph_.atoms.size() > most_searched_atoms)
      return dive(std::move(start)).colour;
    Explored whole = explore(start);
    return whole.best.colour;
  }

 private:
  // A leaf written out: the class of the atom at each rank, then the bonds. Equal only for leaves that a
  // symmetry joins.
  using Picture = std::vector<std::array<std::uint32_t, 3>>;
  struct Explored {
    Partition first, best;
    Picture first_picture, best_picture;
    std::vector<std::vector<std::uint32_t>> symmetries;  // each maps atoms to atoms
  };

  bool connected_without_rings() const {
    // A forest has atoms minus fragments bonds; every bond beyond closes a ring.
    std::vector<std::uint8_t> seen(graph_.atoms.size(), 0);
    std::vector<std::uint32_t> stack;
    std::size_t fragments = 0;
    for (std::uint32_t start = 0; start < graph_.atoms.size(); ++start) {
      if (seen[start]) continue;
      ++fragments;
      seen[start] = 1;
      stack.assign(1, start);
      while (!stack.empty()) {
        const std::uint32_t at = stack.back();
        stack.pop_back();
        for (std::uint32_t e = adjacency_.first[at]; e < adjacency_.first[at + 1]; ++e) {
          const std::uint32_t to = adjacency_.entries[e].atom;
          if (seen[to]) continue;
          seen[to] = 1;
          stack.push_back(to);
        }
      }
    }
    return graph_.bonds.size() + fragments == graph_.atoms.size();
  }

  // Ends of chains first, carbon before hetero atoms: texts then begin the way a chemist writes them.
  Partition by_invariants() const {
    using Key = std::array<int, 6>;
    std::vector<std::pair<Key, std::uint32_t>> sorted;
    sorted.reserve(graph_.atoms.size());
    for (std::uint32_t i = 0; i < graph_.atoms.size(); ++i) {
      const Atom& atom = graph_.atoms[i];
      const int degree = static_cast<int>(adjacency_.first[i + 1] - adjacency_.first[i]);
      const int element = atom.element == 6 ? -1 : atom.element;
      sorted.push_back({{degree, element, -atom.hydrogens, atom.charge, atom.isotope, 0}, i});
    }
    std::sort(sorted.begin(), sorted.end());
    Partition partition;
    partition.colour.resize(graph_.atoms.size());
    for (std::size_t i = 0; i < sorted.size(); ++i) {
      if (i == 0 || sorted[i].first != sorted[i - 1].first) partition.cells.emplace_back();
      partition.cells.back().push_back(sorted[i].second);
      partition.colour[sorted[i].second] = static_cast<std::uint32_t>(partition.cells.size() - 1);
    }
    return partition;
  }

  Signature signature(const Partition& partition, std::uint32_t atom) const {
    Signature found;
    for (std::uint32_t e = adjacency_.first[atom]; e < adjacency_.first[atom + 1]; ++e) {
      const Adjacency::Entry& entry = adjacency_.entries[e];
      found.emplace_back(labels_[entry.bond], partition.colour[entry.atom]);
    }
    std::sort(found.begin(), found.end());
    return found;
  }

  // Splits colours until atoms of one colour see the same colours. `dirty`: atoms whose surroundings changed.
  void refine(Partition& partition, std::vector<std::uint32_t> dirty) const {
    std::vector<std::uint8_t> is_dirty(partition.colour.size(), 0);
    struct Change {
      std::uint32_t atom, colour;
    };
    std::vector<Change> changes;
    while (!dirty.empty() && !partition.discrete()) {
      std::vector<std::uint32_t> touched;
      for (const std::uint32_t atom : dirty) {
        if (is_dirty[atom]) continue;
        is_dirty[atom] = 1;
        if (partition.cells[partition.colour[atom]].size() > 1) touched.push_back(partition.colour[atom]);
      }
      std::sort(touched.begin(), touched.end());
      touched.erase(std::unique(touched.begin(), touched.end()), touched.end());
      // Signatures of one round all refer to the colours at its start.
      changes.clear();
      auto next_colour = static_cast<std::uint32_t>(partition.cells.size());
      for (const std::uint32_t colour : touched) split(partition, colour, is_dirty, next_colour, changes);
      for (const std::uint32_t atom : dirty) is_dirty[atom] = 0;
      dirty.clear();
      partition.cells.resize(next_colour);
      for (const Change& change : changes) {
        partition.cells[change.colour].push_back(change.atom);
        partition.colour[change.atom] = change.colour;
        for (std::uint32_t e = adjacency_.first[change.atom]; e < adjacency_.first[change.atom + 1]; ++e) {
          dirty.push_back(adjacency_.entries[e].atom);
        }
      }
      for (const std::uint32_t colour : touched) {
        std::vector<std::uint32_t>& cell = partition.cells[colour];
        cell.erase(std::remove_if(cell.begin(), cell.end(),
                                  [&](std::uint32_t atom) { return partition.colour[atom] != colour; }),
                   cell.end());
      }
    }
  }

  template <typename Changes>
  void split(const Partition& partition, std::uint32_t colour, const std::vector<std::uint8_t>& is_dirty,
             std::uint32_t& next_colour, Changes& changes) const {
    const std::vector<std::uint32_t>& cell = partition.cells[colour];
    // Atoms that saw no change see the same as one another: one signature stands for all of them.
    std::vector<std::pair<Signature, std::vector<std::uint32_t>>> parts;
    std::vector<std::uint32_t> unchanged;
    std::vector<std::pair<Signature, std::uint32_t>> seen;
    for (const std::uint32_t atom : cell) {
      if (is_dirty[atom]) {
        seen.emplace_back(signature(partition, atom), atom);
      } else {
        unchanged.push_back(atom);
      }
    }
    std::sort(seen.begin(), seen.end());
    for (std::pair<Signature, std::uint32_t>& entry : seen) {
      if (parts.empty() || parts.back().first != entry.first) parts.push_back({std::move(entry.first), {}});
      parts.back().second.push_back(entry.second);
    }
    if (!unchanged.empty()) {
      const Signature common = signature(partition, unchanged.front());
      const auto at =
          std::lower_bound(parts.begin(), parts.end(), common,
                           [](const auto& part, const Signature& wanted) { return part.first < wanted; });
      if (at != parts.end() && at->first == common) {
        at->second.insert(at->second.end(), unchanged.begin(), unchanged.end());
      } else {
        parts.insert(at, {common, unchanged});
      }
    }
    if (parts.size() == 1) return;
    std::size_t largest = 0;
    for (std::size_t p = 1; p < parts.size(); ++p) {
      if (parts[p].second.size() > parts[largest].second.size()) largest = p;
    }
    for (std::size_t p = 0; p < parts.size(); ++p) {
      if (p == largest) continue;
      for (const std::uint32_t atom : parts[p].second) changes.push_back({atom, next_colour});
      ++next_colour;
    }
  }

  void single_out(Partition& partition, std::uint32_t atom) const {
    std::vector<std::uint32_t>& cell = partition.cells[partition.colour[atom]];
    cell.erase(std::find(cell.begin(), cell.end(), atom));
    partition.colour[atom] = static_cast<std::uint32_t>(partition.cells.size());
    partition.cells.push_back({atom});
    std::vector<std::uint32_t> dirty;
    for (std::uint32_t e = adjacency_.first[atom]; e < adjacency_.first[atom + 1]; ++e) {
      dirty.push_back(adjacency_.entries[e].atom);
    }
    refine(partition, std::move(dirty));
  }

  static std::size_t first_tie(const Partition& partition, std::size_t from) {
    while (partition.cells[from].size() == 1) ++from;
    return from;
  }

  // Breaks every tie in favour of the first atom at hand.
  Partition dive(Partition partition) const {
    // Cells below a discrete one can only shrink, so the search for the next tie goes on from there.
    for (std::size_t tie = 0; !partition.discrete();) {
      tie = first_tie(partition, tie);
      single_out(partition, partition.cells[tie].front());
    }
    return partition;
  }

  Picture picture_of(const Partition& leaf) const {
    Picture picture;
    picture.reserve(graph_.atoms.size() + graph_.bonds.size());
    for (const std::vector<std::uint32_t>& cell : leaf.cells)
      picture.push_back({classes_[cell.front()], 0, 0});
    for (std::size_t i = 0; i < graph_.bonds.size(); ++i) {
      const std::uint32_t a = leaf.colour[graph_.bonds[i].a];
      const std::uint32_t b = leaf.colour[graph_.bonds[i].b];
      picture.push_back({std::min(a, b), std::max(a, b), labels_[i]});
    }
    std::sort(picture.begin() + static_cast<std::ptrdiff_t>(leaf.cells.size()), picture.end());
    return picture;
  }

  // The symmetry that carries one leaf into another with the same bonds.
  static std::vector<std::uint32_t> symmetry(const Partition& from, const Partition& to) {
    std::vector<std::uint32_t> map(from.colour.size());
    for (std::size_t i = 0; i < map.size(); ++i) map[i] = to.cells[from.colour[i]].front();
    return map;
  }

  // Leaves below a node: the first, the best, and the symmetries met. Depth is the number of ties to break,
  // at most the number of atoms searched.
  Explored explore(const Partition& node) {
    Explored found;
    if (node.discrete()) {
      found.first = found.best = node;
      found.first_picture = found.best_picture = picture_of(node);
      return found;
    }
    const std::vector<std::uint32_t> candidates = node.cells[first_tie(node, 0)];
    std::vector<std::uint32_t> orbit(graph_.atoms.size());
    for (std::uint32_t i = 0; i < orbit.size(); ++i) orbit[i] = i;
    std::vector<std::uint32_t> tried;
    for (const std::uint32_t atom : candidates) {
      const bool known = std::any_of(tried.begin(), tried.end(), [&](std::uint32_t other) {
        return root_of(orbit, other) == root_of(orbit, atom);
      });
      if (known) continue;
      tried.push_back(atom);
      Partition child = node;
      single_out(child, atom);
      if (tried.size() == 1) {
        found = explore(child);
        for (const std::vector<std::uint32_t>& map : found.symmetries) join_orbits(orbit, map);
        continue;
      }
      if (++trials_ > most_trials) break;
      const Partition leaf = dive(child);
      const Picture picture = picture_of(leaf);
      if (picture == found.first_picture || picture == found.best_picture) {
        found.symmetries.push_back(symmetry(picture == found.first_picture ? found.first : found.best, leaf));
        join_orbits(orbit, found.symmetries.back());
        continue;
      }
      Explored other = explore(child);
      if (other.best_picture == found.best_picture) {
        found.symmetries.push_back(symmetry(found.best, other.best));
        join_orbits(orbit, found.symmetries.back());
      } else if (other.best_picture < found.best_picture) {
        found.best = std::move(other.best);
        found.best_picture = std::move(other.best_picture);
      }
    }
    return found;
  }

  static std::uint32_t root_of(std::vector<std::uint32_t>& parent, std::uint32_t atom) {
    while (parent[atom] != atom) {
      parent[atom] = parent[parent[atom]];
      atom = parent[atom];
    }
    return atom;
  }

  static void join_orbits(std::vector<std::uint32_t>& orbit, const std::vector<std::uint32_t>& map) {
    for (std::uint32_t i = 0; i < map.size(); ++i) orbit[root_of(orbit, i)] = root_of(orbit, map[i]);
  }

  const Graph& graph_;
  const std::vector<std::uint8_t>& labels_;
  Adjacency adjacency_;
  std::vector<std::uint32_t> classes_;  // colour by invariants alone
  std::size_t trials_ = 0;
};

}  // namespace

std::vector<std::uint32_t> canonical_ranks(const Graph& graph, const std::vector<std::uint8_t>& labels) {
  if (graph.atoms.empty()) return {};
  return Ranking(graph, labels).find();
}

}  // namespace heatledger::molecule
