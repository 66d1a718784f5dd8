#include "core/molecule/rings.hpp"

#include <algorithm>
#include <cstddef>
#include <utility>

namespace heatledger::molecule {
namespace {

constexpr std::uint32_t none = 0xFFFFFFFF;
constexpr std::size_t most_system_atoms = 4000;
constexpr std::size_t most_family_rings = 1000;

// A ring system: the ring bonds of one connected piece, atoms renumbered from 0.
struct System {
  std::vector<std::uint32_t> atoms;  // in the graph
  std::vector<std::uint32_t> first;
  std::vector<Adjacency::Entry> entries;  // bond: number within the system
  std::size_t bonds = 0;
};

// One family of rings of Vismara's construction: two shortest paths from `root`, joined at p and q directly
// (odd) or over the atom `over` (even). Any member represents it in the test for independence.
struct Family {
  std::uint32_t size = 0;
  std::uint32_t root = 0, p = 0, q = 0, over = none;
};

using BondSet = std::vector<std::uint64_t>;

void toggle(BondSet& set, std::size_t bond) {
  set[bond >> 6] ^= std::uint64_t{1} << (bond & 63);
}

// Rows in echelon form over the field of two elements: which bond sets are sums of those seen before.
class Independence {
 public:
  // What is left of `set` after taking out the rows; empty sets are dependent.
  bool reduce(BondSet& set) const {
    for (const auto& row : rows_) {
      if ((set[row.first >> 6] >> (row.first & 63)) & 1) {
        for (std::size_t w = 0; w < set.size(); ++w) set[w] ^= row.second[w];
      }
    }
    return std::any_of(set.begin(), set.end(), [](std::uint64_t word) { return word != 0; });
  }
  void add(BondSet reduced) {
    std::size_t word = 0;
    while (reduced[word] == 0) ++word;
    std::size_t bit = 0;
    while (((reduced[word] >> bit) & 1) == 0) ++bit;
    rows_.emplace_back(word * 64 + bit, std::move(reduced));
  }
  std::size_t rank() const { return rows_.size(); }

 private:
  std::vector<std::pair<std::size_t, BondSet>> rows_;
};

class RelevantCycles {
 public:
  RelevantCycles(const System& system, std::vector<Ring>& out, bool& complete)
      : system_(system), out_(out), complete_(complete) {}

  void find() {
    const std::size_t rank = system_.bonds + 1 - system_.atoms.size();
    if (rank == 1) {
      walk_lone_ring();
      return;
    }
    order_atoms();
    for (std::uint32_t root = 0; root < system_.atoms.size(); ++root) collect_families(root);
    std::stable_sort(families_.begin(), families_.end(),
                     [](const Family& a, const Family& b) { return a.size < b.size; });
    keep_relevant(rank);
  }

 private:
  void walk_lone_ring() {
    Ring ring{system_.atoms[0]};
    std::uint32_t before = none, at = 0;
    do {
      std::uint32_t next = system_.entries[system_.first[at]].atom;
      if (next == before) next = system_.entries[system_.first[at] + 1].atom;
      before = at;
      at = next;
      if (at != 0) ring.push_back(system_.atoms[at]);
    } while (at != 0);
    out_.push_back(std::move(ring));
  }

  // Vismara's order: a ring belongs to its atom of highest place, so atoms of high degree come last.
  void order_atoms() {
    const std::size_t n = system_.atoms.size();
    std::vector<std::uint32_t> sorted(n);
    for (std::uint32_t i = 0; i < n; ++i) sorted[i] = i;
    const auto degree = [&](std::uint32_t atom) { return system_.first[atom + 1] - system_.first[atom]; };
    std::stable_sort(sorted.begin(), sorted.end(),
                     [&](std::uint32_t a, std::uint32_t b) { return degree(a) < degree(b); });
    place_.resize(n);
    for (std::uint32_t i = 0; i < n; ++i) place_[sorted[i]] = i;
  }

  // Shortest paths from `root` over atoms of lower place only; parents of every atom that has one.
  void search_from(std::uint32_t root) {
    const std::size_t n = system_.atoms.size();
    distance_.assign(n, none);
    parents_.assign(n, {});
    queue_.assign(1, root);
    distance_[root] = 0;
    for (std::size_t head = 0; head < queue_.size(); ++head) {
      const std::uint32_t at = queue_[head];
      for (std::uint32_t e = system_.first[at]; e < system_.first[at + 1]; ++e) {
        const Adjacency::Entry& to = system_.entries[e];
        if (place_[to.atom] >= place_[root]) continue;
        if (distance_[to.atom] == none) {
          distance_[to.atom] = distance_[at] + 1;
          queue_.push_back(to.atom);
        }
        if (distance_[to.atom] == distance_[at] + 1) parents_[to.atom].push_back({at, to.bond});
      }
    }
  }

  // One shortest path from `from` towards the root, root left out.
  void mark_path(std::uint32_t from, std::uint32_t root, std::vector<std::uint32_t>& path) const {
    path.clear();
    for (; from != root; from = parents_[from].front().atom) path.push_back(from);
  }

  // One pair of paths that meet in the root only makes the family a family of rings.
  bool disjoint(std::uint32_t p, std::uint32_t q, std::uint32_t root) {
    mark_path(p, root, path_p_);
    mark_path(q, root, path_q_);
    for (const std::uint32_t atom : path_p_) {
      if (std::find(path_q_.begin(), path_q_.end(), atom) != path_q_.end()) return false;
    }
    return true;
  }

  void collect_families(std::uint32_t root) {
    search_from(root);
    for (const std::uint32_t y : queue_) {
      if (y == root) continue;
      const std::vector<Adjacency::Entry>& below = parents_[y];
      for (std::size_t i = 0; i < below.size(); ++i) {
        for (std::size_t j = 0; j < i; ++j) {
          const std::uint32_t p = below[i].atom, q = below[j].atom;
          if (p != root && q != root && disjoint(p, q, root)) add_family(root, p, q, y);
        }
      }
      for (std::uint32_t e = system_.first[y]; e < system_.first[y + 1]; ++e) {
        const std::uint32_t z = system_.entries[e].atom;
        if (distance_[z] != distance_[y] || z >= y) continue;
        if (disjoint(y, z, root)) add_family(root, y, z, none);
      }
    }
  }

  void add_family(std::uint32_t root, std::uint32_t p, std::uint32_t q, std::uint32_t over) {
    Family family;
    family.root = root;
    family.p = p;
    family.q = q;
    family.over = over;
    family.size = distance_[p] + distance_[q] + (over == none ? 1 : 2);
    families_.push_back(family);
  }

  std::uint32_t bond_between(std::uint32_t a, std::uint32_t b) const {
    for (std::uint32_t e = system_.first[a]; e < system_.first[a + 1]; ++e) {
      if (system_.entries[e].atom == b) return system_.entries[e].bond;
    }
    return none;
  }

  BondSet bonds_of(const Ring& ring) const {
    BondSet set((system_.bonds + 63) / 64, 0);
    for (std::size_t i = 0; i < ring.size(); ++i)
      toggle(set, bond_between(ring[i], ring[(i + 1) % ring.size()]));
    return set;
  }

  // A ring is relevant if it is no sum of strictly smaller ones.
  void keep_relevant(std::size_t rank) {
    Independence smaller;
    std::vector<BondSet> same_size;
    std::size_t at = 0;
    while (at < families_.size() && smaller.rank() < rank) {
      const std::uint32_t size = families_[at].size;
      same_size.clear();
      for (; at < families_.size() && families_[at].size == size; ++at) {
        const Family& family = families_[at];
        search_from(family.root);
        const Ring representative = first_member(family);
        BondSet rest = bonds_of(representative);
        if (!smaller.reduce(rest)) continue;
        same_size.push_back(std::move(rest));
        list_members(family);
      }
      for (BondSet& set : same_size) {
        if (smaller.reduce(set)) smaller.add(std::move(set));
      }
    }
  }

  Ring first_member(const Family& family) {
    mark_path(family.p, family.root, path_p_);
    mark_path(family.q, family.root, path_q_);
    return join(family, path_p_, path_q_);
  }

  static Ring join(const Family& family, const std::vector<std::uint32_t>& p,
                   const std::vector<std::uint32_t>& q) {
    Ring ring(p.begin(), p.end());
    ring.push_back(family.root);
    ring.insert(ring.end(), q.rbegin(), q.rend());
    if (family.over != none) ring.push_back(family.over);
    return ring;
  }

  // Every pair of shortest paths to p and to q is a ring of the family.
  void list_members(const Family& family) {
    const std::vector<std::vector<std::uint32_t>> to_p = all_paths(family.p, family.root);
    const std::vector<std::vector<std::uint32_t>> to_q = all_paths(family.q, family.root);
    std::size_t listed = 0;
    for (const std::vector<std::uint32_t>& p : to_p) {
      for (const std::vector<std::uint32_t>& q : to_q) {
        if (++listed > most_family_rings) {
          complete_ = false;
          return;
        }
        Ring ring = join(family, p, q);
        for (std::uint32_t& atom : ring) atom = system_.atoms[atom];
        out_.push_back(std::move(ring));
      }
    }
  }

  std::vector<std::vector<std::uint32_t>> all_paths(std::uint32_t from, std::uint32_t root) {
    std::vector<std::vector<std::uint32_t>> done, open{{from}};
    while (!open.empty()) {
      std::vector<std::uint32_t> path = std::move(open.back());
      open.pop_back();
      for (const Adjacency::Entry& entry : parents_[path.back()]) {
        if (entry.atom == root) {
          done.push_back(path);
          break;
        }
        std::vector<std::uint32_t> longer = path;
        longer.push_back(entry.atom);
        open.push_back(std::move(longer));
      }
      if (done.size() + open.size() > most_family_rings) {
        complete_ = false;
        break;
      }
    }
    return done;
  }

  const System& system_;
  std::vector<Ring>& out_;
  bool& complete_;
  std::vector<Family> families_;
  std::vector<std::uint32_t> place_, distance_, queue_, path_p_, path_q_;
  std::vector<std::vector<Adjacency::Entry>> parents_;
};

// Blocks of ring bonds that share atoms (spiro) stay one system: rings never cross from one to the other
// anyway.
std::vector<System> ring_systems(const Graph& graph) {
  std::vector<std::uint8_t> in_ring;
  find_ring_bonds(graph, in_ring);
  std::vector<System> systems;
  if (std::none_of(in_ring.begin(), in_ring.end(), [](std::uint8_t flag) { return flag != 0; }))
    return systems;
  Adjacency adjacency;
  build_adjacency(graph, adjacency);
  std::vector<std::uint32_t> local(graph.atoms.size(), none), bond_local(graph.bonds.size(), none);
  for (std::uint32_t start = 0; start < graph.atoms.size(); ++start) {
    if (local[start] != none) continue;
    System system;
    const auto visit = [&](std::uint32_t atom) {
      local[atom] = static_cast<std::uint32_t>(system.atoms.size());
      system.atoms.push_back(atom);
    };
    visit(start);
    for (std::size_t head = 0; head < system.atoms.size(); ++head) {
      const std::uint32_t at = system.atoms[head];
      system.first.push_back(static_cast<std::uint32_t>(system.entries.size()));
      for (std::uint32_t e = adjacency.first[at]; e < adjacency.first[at + 1]; ++e) {
        const Adjacency::Entry& to = adjacency.entries[e];
        if (!in_ring[to.bond]) continue;
        if (local[to.atom] == none) visit(to.atom);
        if (bond_local[to.bond] == none) bond_local[to.bond] = static_cast<std::uint32_t>(system.bonds++);
        system.entries.push_back({local[to.atom], bond_local[to.bond]});
      }
    }
    system.first.push_back(static_cast<std::uint32_t>(system.entries.size()));
    if (system.bonds > 0) systems.push_back(std::move(system));
  }
  return systems;
}

void set_out(Ring& ring) {
  std::rotate(ring.begin(), std::min_element(ring.begin(), ring.end()), ring.end());
  if (ring.back() < ring[1]) std::reverse(ring.begin() + 1, ring.end());
}

void sort_rings(std::vector<Ring>& rings) {
  for (Ring& ring : rings) set_out(ring);
  std::sort(rings.begin(), rings.end(), [](const Ring& a, const Ring& b) {
    if (a.size() != b.size()) return a.size() < b.size();
    return a < b;
  });
}

}  // namespace

std::vector<Ring> relevant_cycles(const Graph& graph, bool* complete) {
  std::vector<Ring> rings;
  bool whole = true;
  for (const System& system : ring_systems(graph)) {
    if (system.atoms.size() > most_system_atoms) {
      whole = false;
      continue;
    }
    RelevantCycles(system, rings, whole).find();
  }
  sort_rings(rings);
  if (complete != nullptr) *complete = whole;
  return rings;
}

}  // namespace heatledger::molecule
