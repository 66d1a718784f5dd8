// Formation enthalpies in the phase taken, from the tables.
#include <cmath>

#include "core/base/number_text.hpp"
#include "core/facts/atoms.hpp"
#include "core/facts/polynomials.hpp"
#include "core/molecule/formula.hpp"
#include "core/thermo/heating_path.hpp"
#include "core/thermo/solvent_heat.hpp"
#include "core/thermo/species_enthalpy.hpp"
#include "core/units/constants.hpp"

namespace heatledger::thermo {
namespace {

using facts::Compound;
using facts::Datum;
using facts::Species;
using molecule::Phase;
using uncertainty::Quantity;
using uncertainty::SourceKind;

constexpr double kJ = 1000.0;

const facts::PhaseFacts* facts_of(const Compound& compound, Phase phase) {
  switch (phase) {
    case Phase::Gas:
      return &compound.gas;
    case Phase::Liquid:
      return &compound.liquid;
    case Phase::Solid:
      return &compound.solid;
    default:
      return nullptr;
  }
}

bool is_reference(const Compound& compound, Phase phase) {
  return compound.reference_element &&
         molecule::phase_text(phase) == std::string_view(&compound.reference_phase, 1);
}

bool has_formation(const Compound& compound, Phase phase) {
  const facts::PhaseFacts* facts = facts_of(compound, phase);
  return is_reference(compound, phase) || (facts != nullptr && facts->formation_enthalpy.has_value());
}

/// FNV-1a, for species that the library does not hold.
std::uint64_t text_hash(std::string_view text) {
  std::uint64_t hash = 14695981039346656037ULL;
  for (const char c : text) hash = (hash ^ static_cast<unsigned char>(c)) * 1099511628211ULL;
  return hash;
}

Sourced from_datum(const Species& species, Phase phase, const Datum& datum) {
  Sourced result;
  result.value = Quantity(datum.value, datum.u95, figure_key(SourceKind::Compound, species, phase));
  result.route = datum.typed ? "typed" : "table";
  result.source = std::string(datum.source);
  std::string line = "ΔfH(" + std::string(molecule::phase_text(phase)) + ") " + species.name + " = " +
                     display_signed(datum.value / kJ, 2) +
                     (datum.u95 > 0 ? " ± " + display_number(datum.u95 / kJ, 2) : std::string()) +
                     " kJ/mol, " + (datum.typed ? "typed: " : "") + result.source;
  if (datum.typed && datum.u95 <= 0) line += ", taken as exact";
  if (datum.u95_is_default) line += " (± is the table's default)";
  result.working.push_back(std::move(line));
  if (!datum.remark.empty()) result.cautions.push_back(species.name + ": " + std::string(datum.remark));
  return result;
}

Error no_formation(const Species& species, Phase phase) {
  return Error{"thermo.no_formation_data",
               "No table here has a formation enthalpy of " + species.name + " as " +
                   std::string(phase_word(phase)) + ".",
               species.text, "Write another phase, or type a value with its source."};
}

/// A formula that no compound of the library has, small radicals mostly: the one gas of that composition
/// among the polynomials. Never for a structure, which may be another isomer.
Result<Sourced> radical_formation(const Species& species, Phase phase) {
  if (phase != Phase::Gas || species.graph || !species.composition || species.composition->charge != 0)
    return no_formation(species, phase);
  const std::vector<const facts::Polynomial*> found =
      facts::find_polynomials(molecule::hill_formula(*species.composition), 'g');
  if (found.size() != 1 || !found.front()->stable_at_298) return no_formation(species, phase);
  // OH, CH2 and NH2 of that report lie 2 to 3 kJ/mol from ATcT 1.112.
  constexpr double kU95 = 4 * kJ;
  Sourced result;
  result.value =
      Quantity(found.front()->formation_enthalpy, kU95, figure_key(SourceKind::Compound, species, phase));
  result.route = "table";
  result.source = "NASA TM-4513, 1993";
  result.working.push_back("ΔfH(g) " + std::string(found.front()->name) + " = " +
                           display_signed(found.front()->formation_enthalpy / kJ, 2) + " ± " +
                           display_number(kU95 / kJ, 0) + " kJ/mol, " + result.source);
  return result;
}

}  // namespace

std::string_view phase_word(Phase phase) {
  switch (phase) {
    case Phase::Unstated:
    case Phase::Gas:
      return "gas";
    case Phase::Liquid:
      return "liquid";
    case Phase::Solid:
      return "solid";
    case Phase::Aqueous:
      return "solution";
    case Phase::Dissolved:
      return "dissolved";
  }
  return "gas";
}

uncertainty::SourceKey figure_key(SourceKind kind, const Species& species, Phase phase) {
  // Library rows use the low half of the index; hashes of other species set the top bit so that they never
  // meet.
  constexpr std::uint64_t kHashed = 1ULL << 55;
  const std::uint64_t which =
      species.compound != nullptr
          ? std::uint64_t{species.compound->id}
          : (kHashed >> 3) | (text_hash(species.canonical.empty() ? species.text : species.canonical) >> 13);
  return uncertainty::source_key(kind, (which << 3) | static_cast<std::uint64_t>(phase));
}

PhaseChoice phase_taken(const Species& species, Phase written) {
  if (written != Phase::Unstated) return {written, false};
  const Compound* compound = species.compound;
  if (compound == nullptr) return {species.aqueous != nullptr ? Phase::Aqueous : Phase::Gas, true};
  if (compound->reference_element && compound->reference_phase == 's') return {Phase::Solid, true};
  if (has_formation(*compound, Phase::Gas) || (species.graph && has_formation(*compound, Phase::Liquid)))
    return {Phase::Gas, true};
  const bool liquid = has_formation(*compound, Phase::Liquid), solid = has_formation(*compound, Phase::Solid);
  if (liquid != solid) return {liquid ? Phase::Liquid : Phase::Solid, true};
  if (solid && !species.graph) return {Phase::Solid, true};
  return {Phase::Gas, true};
}

Result<Sourced> tabulated_formation(const Species& species, Phase phase,
                                    const std::optional<molecule::Strength>& strength) {
  if (phase == Phase::Unstated) phase = Phase::Gas;
  if (phase == Phase::Aqueous) return dissolved_formation(species, strength);
  if (phase == Phase::Dissolved) return formation_dissolved(species, tabulated_formation);
  const Compound* compound = species.compound;
  if (compound == nullptr) return radical_formation(species, phase);
  if (is_reference(*compound, phase)) {
    Sourced zero;
    zero.value = Quantity(0);
    zero.route = "table";
    zero.source = "element in its reference state, zero by definition";
    zero.working.push_back("ΔfH(" + std::string(molecule::phase_text(phase)) + ") " + species.name +
                           " = 0, element in its reference state");
    return zero;
  }
  const facts::PhaseFacts* facts = facts_of(*compound, phase);
  if (facts != nullptr && facts->formation_enthalpy)
    return from_datum(species, phase, *facts->formation_enthalpy);

  if (phase == Phase::Gas && compound->reference_element && species.composition &&
      species.composition->atoms.size() == 1 && species.composition->atoms.begin()->second == 1) {
    const std::optional<Datum> atom = facts::gas_atom_formation(species.composition->atoms.begin()->first);
    if (atom) return from_datum(species, phase, *atom);
  }

  // One of gas and liquid is tabulated, and what lies between them: the other follows.
  const bool to_gas = phase == Phase::Gas && has_formation(*compound, Phase::Liquid);
  const bool to_liquid = phase == Phase::Liquid && has_formation(*compound, Phase::Gas);
  if ((to_gas || to_liquid) && compound->vaporisation_enthalpy_298 && !compound->vapour_associates) {
    const Datum& evaporation = *compound->vaporisation_enthalpy_298;
    Result<Sourced> known = tabulated_formation(species, to_gas ? Phase::Liquid : Phase::Gas);
    if (!known.ok()) return known;
    Sourced result = std::move(known).value();
    result.value.add(
        Quantity(evaporation.value, evaporation.u95, figure_key(SourceKind::Phase, species, Phase::Liquid)),
        to_gas ? 1 : -1);
    result.source += "; vaporisation at 298.15 K " + std::string(evaporation.source);
    result.working.push_back(std::string(to_gas ? "plus" : "minus") + " vaporisation at 298.15 K " +
                             display_number(evaporation.value / kJ, 2) + " ± " +
                             display_number(evaporation.u95 / kJ, 2) + " kJ/mol, " +
                             std::string(evaporation.source));
    return result;
  }

  // One of solid and liquid, and the enthalpy of fusion between them.
  const bool to_solid = phase == Phase::Solid && has_formation(*compound, Phase::Liquid);
  const bool melted = phase == Phase::Liquid && has_formation(*compound, Phase::Solid);
  if (to_solid || melted) {
    const Result<Sourced> fusion = fusion_enthalpy(species, units::kReferenceTemperature);
    if (!fusion.ok()) return no_formation(species, phase);
    Result<Sourced> known = tabulated_formation(species, melted ? Phase::Solid : Phase::Liquid);
    if (!known.ok()) return known;
    Sourced result = std::move(known).value();
    result.value.add(fusion->value, melted ? 1 : -1);
    result.source += "; fusion " + fusion->source;
    result.working.insert(result.working.end(), fusion->working.begin(), fusion->working.end());
    return result;
  }
  return no_formation(species, phase);
}

}  // namespace heatledger::thermo
