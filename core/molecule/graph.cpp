#include "core/molecule/graph.hpp"

namespace heatledger::molecule {

void build_adjacency(const Graph& graph, Adjacency& out) {
  out.first.assign(graph.atoms.size() + 1, 0);
  out.entries.resize(graph.bonds.size() * 2);
  for (const Bond& bond : graph.bonds) {
    ++out.first[bond.a];
    ++out.first[bond.b];
  }
  std::uint32_t total = 0;
  for (std::uint32_t& first : out.first) {
    const std::uint32_t degree = first;
    first = total;
    total += degree;
  }
  std::vector<std::uint32_t> next(out.first.begin(), out.first.end());
  for (std::uint32_t i = 0; i < graph.bonds.size(); ++i) {
    const Bond& bond = graph.bonds[i];
    out.entries[next[bond.a]++] = {bond.b, i};
    out.entries[next[bond.b]++] = {bond.a, i};
  }
}

}  // namespace heatledger::molecule
