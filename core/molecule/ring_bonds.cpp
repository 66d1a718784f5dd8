#include "core/molecule/rings.hpp"

namespace heatledger::molecule {

// Bridges by lowest reachable discovery number; an explicit stack, since a chain may hold a million atoms.
void find_ring_bonds(const Graph& graph, std::vector<std::uint8_t>& in_ring) {
  in_ring.assign(graph.bonds.size(), 1);
  Adjacency adjacency;
  build_adjacency(graph, adjacency);
  const auto atoms = static_cast<std::uint32_t>(graph.atoms.size());
  constexpr std::uint32_t none = 0xFFFFFFFF;
  std::vector<std::uint32_t> found(atoms, none), lowest(atoms), by_bond(atoms, none), next(atoms), stack;
  std::uint32_t clock = 0;
  for (std::uint32_t root = 0; root < atoms; ++root) {
    if (found[root] != none) continue;
    found[root] = lowest[root] = clock++;
    next[root] = adjacency.first[root];
    stack.assign(1, root);
    while (!stack.empty()) {
      const std::uint32_t at = stack.back();
      if (next[at] < adjacency.first[at + 1]) {
        const Adjacency::Entry to = adjacency.entries[next[at]++];
        if (to.bond == by_bond[at]) continue;
        if (found[to.atom] == none) {
          found[to.atom] = lowest[to.atom] = clock++;
          by_bond[to.atom] = to.bond;
          next[to.atom] = adjacency.first[to.atom];
          stack.push_back(to.atom);
        } else if (found[to.atom] < lowest[at]) {
          lowest[at] = found[to.atom];
        }
        continue;
      }
      stack.pop_back();
      if (stack.empty()) continue;
      const std::uint32_t parent = stack.back();
      if (lowest[at] < lowest[parent]) lowest[parent] = lowest[at];
      if (lowest[at] > found[parent]) in_ring[by_bond[at]] = 0;
    }
  }
}

}  // namespace heatledger::molecule
