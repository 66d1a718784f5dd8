#include "core/molecule/kekule_choice.hpp"

#include <algorithm>
#include <bit>
#include <utility>
#include <vector>

#include "core/molecule/matching.hpp"
#include "core/molecule/rings.hpp"

namespace heatledger::molecule {
namespace {

using Edge = std::pair<std::uint32_t, std::uint32_t>;

// The double bonds that could lie elsewhere: ring bonds between atoms that have one double bond each.
struct MobileSystem {
  std::vector<Edge> edges;
  std::vector<std::uint32_t> bonds;   // of each edge
  std::vector<std::uint32_t> system;  // per atom: a root atom of its connected system
};

std::uint32_t root_of(std::vector<std::uint32_t>& parent, std::uint32_t atom) {
  while (parent[atom] != atom) {
    parent[atom] = parent[parent[atom]];
    atom = parent[atom];
  }
  return atom;
}

MobileSystem find_mobile(const Graph& graph) {
  std::vector<std::uint8_t> in_ring;
  find_ring_bonds(graph, in_ring);
  std::vector<std::uint8_t> doubles(graph.atoms.size(), 0);
  for (std::size_t i = 0; i < graph.bonds.size(); ++i) {
    const Bond& bond = graph.bonds[i];
    if (bond.order < Order::Double) continue;
    // A double bond beside the ring, or a triple one, fixes the atom.
    const std::uint8_t weight = bond.order == Order::Double && in_ring[i] ? 1 : 2;
    for (const std::uint32_t end : {bond.a, bond.b}) {
      doubles[end] = static_cast<std::uint8_t>(std::min(2, doubles[end] + weight));
    }
  }
  MobileSystem mobile;
  mobile.system.resize(graph.atoms.size());
  for (std::uint32_t i = 0; i < graph.atoms.size(); ++i) mobile.system[i] = i;
  for (std::uint32_t i = 0; i < graph.bonds.size(); ++i) {
    const Bond& bond = graph.bonds[i];
    if (!in_ring[i] || doubles[bond.a] != 1 || doubles[bond.b] != 1 || bond.order < Order::Single) continue;
    mobile.edges.emplace_back(bond.a, bond.b);
    mobile.bonds.push_back(i);
    mobile.system[root_of(mobile.system, bond.a)] = root_of(mobile.system, bond.b);
  }
  for (std::uint32_t i = 0; i < graph.atoms.size(); ++i) mobile.system[i] = root_of(mobile.system, i);
  return mobile;
}

bool hetero_pair(const Graph& graph, const Bond& bond) {
  return graph.atoms[bond.a].element != 6 && graph.atoms[bond.b].element != 6;
}

// Matches every free atom of the list again; false when some stay free.
bool rematch(Matching& matching, const std::vector<std::uint32_t>& atoms) {
  for (const std::uint32_t atom : atoms) {
    if (matching.mate(atom) == Matching::none && !matching.augment(atom, false)) return false;
  }
  return true;
}

// Leaves as few hetero pairs joined as any Kekulé structure of this system needs.
void thin_out(Matching& matching, const std::vector<Edge>& pairs, const std::vector<std::uint32_t>& atoms) {
  constexpr std::size_t exhaustive = 12;
  if (pairs.size() > exhaustive) {
    for (const Edge& pair : pairs) {
      matching.set_forbidden(pair.first, pair.second, true);
      if (rematch(matching, atoms)) continue;
      matching.set_forbidden(pair.first, pair.second, false);
      rematch(matching, atoms);
    }
    return;
  }
  const unsigned sets = 1u << pairs.size();
  for (int allowed = 0; allowed <= static_cast<int>(pairs.size()); ++allowed) {
    for (unsigned set = 0; set < sets; ++set) {
      if (std::popcount(set) != allowed) continue;
      for (std::size_t p = 0; p < pairs.size(); ++p) {
        matching.set_forbidden(pairs[p].first, pairs[p].second, ((set >> p) & 1u) == 0);
      }
      if (rematch(matching, atoms)) return;
    }
  }
}

}  // namespace

void choose_kekule_bonds(Graph& graph) {
  bool any = false;
  for (const Bond& bond : graph.bonds) any |= bond.order == Order::Double && hetero_pair(graph, bond);
  if (!any) return;
  const MobileSystem mobile = find_mobile(graph);
  Matching matching(static_cast<std::uint32_t>(graph.atoms.size()), mobile.edges);
  std::vector<std::uint8_t> thin(graph.atoms.size(), 0);  // by root: the system holds a joined hetero pair
  for (const std::uint32_t at : mobile.bonds) {
    const Bond& bond = graph.bonds[at];
    if (bond.order != Order::Double) continue;
    matching.join(bond.a, bond.b);
    if (hetero_pair(graph, bond)) thin[mobile.system[bond.a]] = 1;
  }
  std::vector<std::pair<std::uint32_t, std::uint32_t>> members, pair_bonds;  // root first, so that sorting groups them
  for (std::uint32_t i = 0; i < graph.atoms.size(); ++i) {
    if (thin[mobile.system[i]]) members.emplace_back(mobile.system[i], i);
  }
  for (const std::uint32_t at : mobile.bonds) {
    const std::uint32_t system = mobile.system[graph.bonds[at].a];
    if (thin[system] && hetero_pair(graph, graph.bonds[at])) pair_bonds.emplace_back(system, at);
  }
  std::sort(members.begin(), members.end());
  std::sort(pair_bonds.begin(), pair_bonds.end());
  std::vector<Edge> pairs;
  std::vector<std::uint32_t> atoms;
  for (std::size_t m = 0, p = 0; m < members.size();) {
    const std::uint32_t system = members[m].first;
    pairs.clear();
    atoms.clear();
    for (; m < members.size() && members[m].first == system; ++m) atoms.push_back(members[m].second);
    for (; p < pair_bonds.size() && pair_bonds[p].first == system; ++p) {
      const Bond& bond = graph.bonds[pair_bonds[p].second];
      pairs.emplace_back(bond.a, bond.b);
    }
    thin_out(matching, pairs, atoms);
  }
  for (const std::uint32_t at : mobile.bonds) {
    Bond& bond = graph.bonds[at];
    bond.order = matching.mate(bond.a) == bond.b ? Order::Double : Order::Single;
  }
}

}  // namespace heatledger::molecule
