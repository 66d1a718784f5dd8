#include "core/facts/double_bond_stereo.hpp"

#include <optional>
#include <vector>

namespace heatledger::facts {

namespace {

using molecule::Adjacency;
using molecule::Bond;
using molecule::BondMark;
using molecule::Graph;

/// Atoms reached from `start` without passing `barred`.
std::size_t branch_size(const Adjacency& around, std::uint32_t start, std::uint32_t barred) {
  std::vector<bool> seen(around.first.size() - 1, false);
  std::vector<std::uint32_t> open = {start};
  seen[start] = seen[barred] = true;
  std::size_t size = 0;
  while (!open.empty()) {
    const std::uint32_t atom = open.back();
    open.pop_back();
    ++size;
    for (std::uint32_t i = around.first[atom]; i < around.first[atom + 1]; ++i) {
      const std::uint32_t next = around.entries[i].atom;
      if (!seen[next]) {
        seen[next] = true;
        open.push_back(next);
      }
    }
  }
  return size;
}

/// Whether the larger group at `end` lies above the double bond to `partner`; empty when the marks do not
/// say.
std::optional<bool> larger_group_above(const Graph& graph, const Adjacency& around, std::uint32_t end,
                                       std::uint32_t partner) {
  std::optional<bool> above;  // of the group `marked`
  std::uint32_t marked = 0;
  std::vector<std::uint32_t> groups;
  for (std::uint32_t i = around.first[end]; i < around.first[end + 1]; ++i) {
    const std::uint32_t group = around.entries[i].atom;
    if (group == partner) continue;
    groups.push_back(group);
    const Bond& bond = graph.bonds[around.entries[i].bond];
    if (bond.mark == BondMark::None || above) continue;
    // '/' rises along the direction of writing: from the end to its group, the group is above.
    above = (bond.mark == BondMark::Up) == (bond.a == end);
    marked = group;
  }
  if (!above || groups.size() > 2) return std::nullopt;
  if (groups.size() == 1) return above;
  const std::size_t first = branch_size(around, groups[0], end), second = branch_size(around, groups[1], end);
  if (first == second) return std::nullopt;
  const std::uint32_t larger = first > second ? groups[0] : groups[1];
  return marked == larger ? *above : !*above;
}

}  // namespace

DoubleBondStereo double_bond_stereo(const Graph& graph) {
  DoubleBondStereo stereo;
  Adjacency around;
  molecule::build_adjacency(graph, around);
  for (const Bond& bond : graph.bonds) {
    if (bond.order != molecule::Order::Double) continue;
    const std::optional<bool> one = larger_group_above(graph, around, bond.a, bond.b);
    const std::optional<bool> other = larger_group_above(graph, around, bond.b, bond.a);
    if (!one || !other) continue;
    (*one == *other ? stereo.cis : stereo.trans) += 1;
  }
  return stereo;
}

}  // namespace heatledger::facts
