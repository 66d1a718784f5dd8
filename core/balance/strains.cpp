#include "core/balance/strains.hpp"

#include <algorithm>

#include "core/molecule/rings.hpp"

namespace heatledger::balance {
namespace {

using molecule::Adjacency;
using molecule::Graph;
using molecule::Order;

/// A carbon with =O and a further single-bonded O or N: acid, ester, amide, urea, carbonate.
bool has_carboxyl(const Graph& graph, const Adjacency& around) {
  for (std::uint32_t atom = 0; atom < graph.atoms.size(); ++atom) {
    if (graph.atoms[atom].element != 6) continue;
    bool carbonyl = false, partner = false;
    for (std::uint32_t i = around.first[atom]; i < around.first[atom + 1]; ++i) {
      const int element = graph.atoms[around.entries[i].atom].element;
      const Order order = graph.bonds[around.entries[i].bond].order;
      carbonyl = carbonyl || (element == 8 && order == Order::Double);
      partner = partner || ((element == 8 || element == 7) && order == Order::Single);
    }
    if (carbonyl && partner) return true;
  }
  return false;
}

}  // namespace

std::vector<std::string> strains_of(const facts::Species& species) {
  std::vector<std::string> found;
  if (!species.graph) return found;
  const Graph& graph = *species.graph;
  if (std::any_of(graph.bonds.begin(), graph.bonds.end(),
                  [](const molecule::Bond& bond) { return bond.aromatic; })) {
    found.emplace_back("aromatic ring: its resonance is not in average bonds, so the bond sum is too small");
  }
  for (const molecule::Ring& ring : molecule::relevant_cycles(graph)) {
    if (ring.size() > 4) continue;
    found.emplace_back("ring of " + std::string(ring.size() == 3 ? "three" : "four") +
                       ": its strain is not in average bonds, so the bond sum is too large");
    break;
  }
  if (std::any_of(species.bonds.begin(), species.bonds.end(), [](const molecule::BondCount& bond) {
        return bond.type.setting == molecule::Setting::Nitro;
      })) {
    found.emplace_back(
        "nitro group: its two N–O bonds are equal, and together stronger than one single plus one double "
        "bond");
  }
  Adjacency around;
  molecule::build_adjacency(graph, around);
  if (has_carboxyl(graph, around)) {
    found.emplace_back("carboxyl, ester or amide group: C=O beside O or N is stronger than a ketone's");
  }
  return found;
}

}  // namespace heatledger::balance
