#include "core/estimate/repeat_unit.hpp"

#include <algorithm>
#include <vector>

#include "core/estimate/context_features.hpp"

namespace heatledger::estimate {
namespace {

/// The `*` of a unit and the atoms that they hang on.
struct Ends {
  std::uint32_t star[2] = {0, 0}, atom[2] = {0, 0};
};

Error wrong_unit(const char* message) {
  return Error{"estimate.repeat_unit", message, "",
               "Write the unit with * at both ends, for example *CC(*)c1ccccc1."};
}

Result<Ends> find_ends(const molecule::Graph& unit) {
  Ends ends;
  std::size_t count = 0;
  for (std::uint32_t i = 0; i < unit.atoms.size(); ++i) {
    if (unit.atoms[i].element != 0) continue;
    if (count < 2) ends.star[count] = i;
    ++count;
  }
  if (count != 2) return wrong_unit("A repeat unit has exactly two open ends.");
  for (int e = 0; e < 2; ++e) {
    std::size_t bonds = 0;
    for (const molecule::Bond& bond : unit.bonds) {
      if (bond.a != ends.star[e] && bond.b != ends.star[e]) continue;
      ++bonds;
      ends.atom[e] = bond.a == ends.star[e] ? bond.b : bond.a;
      if (bond.order != molecule::Order::Single)
        return wrong_unit("The open ends of a repeat unit are single bonds.");
    }
    if (bonds != 1) return wrong_unit("Each open end of a repeat unit hangs on one atom.");
    if (unit.atoms[ends.atom[e]].element == 0) return wrong_unit("There is no atom between the open ends.");
  }
  return ends;
}

void subtract(std::vector<FeatureCount>& from, const std::vector<FeatureCount>& what) {
  std::vector<FeatureCount> difference;
  std::size_t i = 0, j = 0;
  while (i < from.size() || j < what.size()) {
    FeatureCount count;
    if (j == what.size() || (i < from.size() && from[i].key < what[j].key)) {
      count = from[i++];
    } else {
      const bool both = i < from.size() && from[i].key == what[j].key;
      count = what[j];
      count.count = both ? from[i++].count - what[j].count : -what[j].count;
      ++j;
    }
    if (count.count != 0) difference.push_back(count);
  }
  from = std::move(difference);
}

}  // namespace

bool has_open_ends(const molecule::Graph& graph) {
  return std::any_of(graph.atoms.begin(), graph.atoms.end(),
                     [](const molecule::Atom& atom) { return atom.element == 0; });
}

bool has_crowded_chain(const molecule::Graph& graph) {
  const Result<Ends> ends = find_ends(graph);
  if (!ends) return false;
  // The way from one end to the other, breadth first: the shortest where rings lie in the chain.
  constexpr std::uint32_t kUnreached = 0xffffffffU;
  std::vector<std::uint32_t> from(graph.atoms.size(), kUnreached), queue = {ends->star[0]};
  from[ends->star[0]] = ends->star[0];
  for (std::size_t next = 0; next < queue.size(); ++next) {
    for (const molecule::Bond& bond : graph.bonds) {
      if (bond.a != queue[next] && bond.b != queue[next]) continue;
      const std::uint32_t other = bond.a == queue[next] ? bond.b : bond.a;
      if (from[other] != kUnreached) continue;
      from[other] = queue[next];
      queue.push_back(other);
    }
  }
  if (from[ends->star[1]] == kUnreached) return false;
  for (std::uint32_t i = from[ends->star[1]]; i != ends->star[0]; i = from[i]) {
    int neighbours = 0;
    for (const molecule::Bond& bond : graph.bonds) {
      if (bond.a != i && bond.b != i) continue;
      const int element = graph.atoms[bond.a == i ? bond.b : bond.a].element;
      neighbours += element != 1 && element != 9;
    }
    if (neighbours >= 4) return true;
  }
  return false;
}

Result<molecule::Graph> chain_of(const molecule::Graph& unit, unsigned units) {
  Result<Ends> found = find_ends(unit);
  if (!found) return found.error();
  const Ends ends = *found;
  molecule::Graph chain;
  std::vector<std::uint32_t> place(unit.atoms.size());
  std::uint32_t tail = 0;
  for (unsigned copy = 0; copy < units; ++copy) {
    for (std::uint32_t i = 0; i < unit.atoms.size(); ++i) {
      if (unit.atoms[i].element == 0) continue;
      place[i] = static_cast<std::uint32_t>(chain.atoms.size());
      chain.atoms.push_back(unit.atoms[i]);
      // Which way round a stereocentre faces along the chain is not part of a repeat unit.
      chain.atoms.back().chirality = 0;
    }
    for (const molecule::Bond& bond : unit.bonds) {
      if (unit.atoms[bond.a].element == 0 || unit.atoms[bond.b].element == 0) continue;
      molecule::Bond kept = bond;
      kept.a = place[bond.a];
      kept.b = place[bond.b];
      chain.bonds.push_back(kept);
    }
    if (copy != 0) {
      molecule::Bond link;
      link.a = tail;
      link.b = place[ends.atom[0]];
      chain.bonds.push_back(link);
    } else {
      ++chain.atoms[place[ends.atom[0]]].hydrogens;
    }
    tail = place[ends.atom[1]];
  }
  ++chain.atoms[tail].hydrogens;
  return chain;
}

Result<ContextMolecule> repeat_unit(const molecule::Graph& unit) {
  // The longest feature spans five bonds and a chain adds at least one per unit: from seven units on, one
  // more unit adds the same counts whatever the ends are. Refinement of atom identities plays no part in
  // counts.
  constexpr unsigned kUnits = 7;
  ContextMolecule chains[2];
  for (unsigned k = 0; k < 2; ++k) {
    Result<molecule::Graph> chain = chain_of(unit, kUnits + k);
    if (!chain) return chain.error();
    Result<ContextGraph> prepared = context_graph(*chain);
    if (!prepared) return prepared.error();
    FeatureSink sink;
    chains[k] = molecule_from(*prepared, sink);
  }
  ContextMolecule out = chains[1];
  subtract(out.features, chains[0].features);
  out.features.erase(std::remove_if(out.features.begin(), out.features.end(),
                                    [](const FeatureCount& f) { return f.family == FeatureClass::VX; }),
                     out.features.end());
  DeviationMeasures& m = out.measures;
  const DeviationMeasures& less = chains[0].measures;
  m.one = 0;
  m.heavy -= less.heavy;
  m.ring -= less.ring;
  m.polar -= less.polar;
  m.hetero -= less.hetero;
  m.halogen -= less.halogen;
  m.crowding -= less.crowding;
  m.inorganic -= less.inorganic;
  m.donors -= less.donors;
  out.atoms -= chains[0].atoms;
  out.heavy_atoms -= chains[0].heavy_atoms;
  out.gas_atoms -= chains[0].gas_atoms;
  out.base_bonds -= chains[0].base_bonds;
  out.repeat_unit = true;
  return out;
}

}  // namespace heatledger::estimate
