// From the ideal gas to the phase written, at 298.15 K.
#include <algorithm>
#include <cmath>

#include "core/base/number_text.hpp"
#include "core/thermo/species_enthalpy.hpp"

namespace heatledger::thermo {
namespace {

using facts::Datum;
using facts::Species;
using molecule::Phase;
using uncertainty::Quantity;
using uncertainty::SourceKind;

constexpr double kJ = 1000.0;

/// Hydrogen fluoride and carboxylic acids form pairs and rings in the vapour (a figure of the library may say
/// so too).
bool vapour_associates(const Species& species) {
  if (species.compound != nullptr && species.compound->vapour_associates) return true;
  if (!species.graph) return false;
  const molecule::Graph& graph = *species.graph;
  if (graph.atoms.size() == 1) return graph.atoms[0].element == 9 && graph.atoms[0].hydrogens == 1;
  molecule::Adjacency around;
  molecule::build_adjacency(graph, around);
  for (std::uint32_t atom = 0; atom < graph.atoms.size(); ++atom) {
    if (graph.atoms[atom].element != 6) continue;
    bool carbonyl = false, hydroxyl = false;
    for (std::uint32_t i = around.first[atom]; i < around.first[atom + 1]; ++i) {
      const molecule::Atom& neighbour = graph.atoms[around.entries[i].atom];
      if (neighbour.element != 8) continue;
      carbonyl = carbonyl || graph.bonds[around.entries[i].bond].order == molecule::Order::Double;
      hydroxyl = hydroxyl || neighbour.hydrogens == 1;
    }
    if (carbonyl && hydroxyl) return true;
  }
  return false;
}

std::string kj(double value) {
  return display_number(value / kJ, 2);
}

bool has_own_figure(const Species& species, Phase phase) {
  const facts::Compound& c = *species.compound;
  const facts::PhaseFacts& facts = phase == Phase::Gas ? c.gas : phase == Phase::Liquid ? c.liquid : c.solid;
  return facts.formation_enthalpy.has_value() ||
         (c.reference_element && molecule::phase_text(phase) == std::string_view(&c.reference_phase, 1));
}

Sourced from_formation(const Species& species, Phase to, const Sourced& gas, const Sourced& condensed) {
  const double difference = condensed.value.value() - gas.value.value();
  double u95 = std::sqrt(gas.value.u95() * gas.value.u95() + condensed.value.u95() * condensed.value.u95());
  Sourced result;
  result.route = "table";
  result.source = "difference of formation enthalpies, " + gas.source +
                  (condensed.source == gas.source ? std::string() : " and " + condensed.source);
  result.working = gas.working;
  result.working.insert(result.working.end(), condensed.working.begin(), condensed.working.end());
  result.working.push_back("ΔfH(" + std::string(molecule::phase_text(to)) +
                           ") − ΔfH(g) = " + kj(condensed.value.value()) + " − (" + kj(gas.value.value()) +
                           ") = " + kj(difference) + " kJ/mol");
  const std::optional<Datum>& evaporation = species.compound->vaporisation_enthalpy_298;
  if (to == Phase::Liquid && evaporation) {
    const double gap = std::fabs(-difference - evaporation->value);
    if (gap > std::sqrt(u95 * u95 + evaporation->u95 * evaporation->u95)) {
      result.cautions.push_back(
          species.name + ": the formation enthalpies of gas and liquid differ by " + kj(-difference) +
          " kJ/mol, the tabulated vaporisation enthalpy is " + kj(evaporation->value) + " (" +
          std::string(evaporation->source) + "). The formation enthalpies are taken." +
          (vapour_associates(species)
               ? " The vapour associates, so its vaporisation enthalpy is not that of single molecules."
               : ""));
    } else {
      // Both say the same; the directly measured vaporisation enthalpy is often known better than either sum.
      u95 = std::min(u95, std::sqrt(evaporation->u95 * evaporation->u95 + gap * gap));
      result.working.push_back("agrees with the vaporisation enthalpy at 298.15 K " + kj(evaporation->value) +
                               " ± " + kj(evaporation->u95) + " kJ/mol, " + std::string(evaporation->source));
    }
  }
  if (vapour_associates(species) && result.cautions.empty()) {
    result.cautions.push_back(species.name +
                              ": the real vapour associates; the figure is that of single molecules.");
  }
  result.value = Quantity(difference, u95, figure_key(SourceKind::Phase, species, to));
  return result;
}

Sourced from_evaporation(const Species& species, const Datum& evaporation) {
  Sourced result;
  result.value =
      Quantity(-evaporation.value, evaporation.u95, figure_key(SourceKind::Phase, species, Phase::Liquid));
  result.route = "table";
  result.source = std::string(evaporation.source);
  result.working.push_back("vaporisation of " + species.name + " at 298.15 K: " + kj(evaporation.value) +
                           " ± " + kj(evaporation.u95) + " kJ/mol, " + result.source);
  if (vapour_associates(species)) {
    result.cautions.push_back(
        species.name +
        ": the vapour associates, so the tabulated vaporisation enthalpy is not that of single molecules.");
  }
  return result;
}

Error no_data(const Species& species, Phase to) {
  return Error{"thermo.no_phase_change_data",
               "No table here has the enthalpy of " + species.name + " from gas to " +
                   std::string(phase_word(to)) + ".",
               species.text, "Type it with its source, or write the species as gas."};
}

Result<Sourced> gas_to_solution(const Species& species, Phase to,
                                const std::optional<molecule::Strength>& strength) {
  const Result<Sourced> gas = tabulated_formation(species, Phase::Gas),
                        dissolved = tabulated_formation(species, to, strength);
  if (!dissolved.ok()) return dissolved.error();
  if (!gas.ok()) return no_data(species, to);
  // A curve that starts from the gas shares its formation enthalpy, which then cancels in value and ±.
  Sourced result = *dissolved;
  result.value.add(gas->value, -1);
  result.source = "formation enthalpies dissolved and as gas, " + dissolved->source;
  result.working.insert(result.working.end(), gas->working.begin(), gas->working.end());
  result.working.push_back("ΔfH(" + std::string(molecule::phase_text(to)) +
                           ") − ΔfH(g) = " + kj(result.value.value()) + " kJ/mol");
  return result;
}

}  // namespace

Result<Sourced> gas_to_phase(const Species& species, Phase to,
                             const std::optional<molecule::Strength>& strength) {
  if (to == Phase::Gas || to == Phase::Unstated) {
    Sourced none;
    none.value = Quantity(0);
    none.route = "table";
    none.source = "gas as written";
    return none;
  }
  if (to == Phase::Aqueous || to == Phase::Dissolved) return gas_to_solution(species, to, strength);
  if (species.compound == nullptr) return no_data(species, to);
  if (has_own_figure(species, Phase::Gas) && has_own_figure(species, to)) {
    const Result<Sourced> gas = tabulated_formation(species, Phase::Gas),
                          condensed = tabulated_formation(species, to);
    if (gas.ok() && condensed.ok()) return from_formation(species, to, *gas, *condensed);
  }
  if (to == Phase::Liquid && species.compound->vaporisation_enthalpy_298) {
    return from_evaporation(species, *species.compound->vaporisation_enthalpy_298);
  }
  // Through the enthalpy of fusion, when one of liquid and solid has a figure.
  const Result<Sourced> gas = tabulated_formation(species, Phase::Gas),
                        condensed = tabulated_formation(species, to);
  if (gas.ok() && condensed.ok()) return from_formation(species, to, *gas, *condensed);
  return no_data(species, to);
}

}  // namespace heatledger::thermo
