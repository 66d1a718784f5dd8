#include "core/thermo/dissolved.hpp"

#include <algorithm>
#include <map>

#include "core/base/number_text.hpp"
#include "core/facts/ions.hpp"
#include "core/facts/solution_heats.hpp"
#include "core/facts/structure_match.hpp"
#include "core/molecule/smiles.hpp"

namespace heatledger::thermo {
namespace {

using facts::SolutionHeatPoint;
using facts::SolutionHeats;
using facts::Species;
using molecule::Phase;
using molecule::Strength;
using uncertainty::Quantity;
using uncertainty::SourceKind;

constexpr double kJ = 1000.0;
constexpr double kWaterMolarMass = 0.018015;  ///< [kg/mol] IUPAC 2021, abridged

Error no_solution(const Species& species, const std::string& what) {
  return Error{"thermo.no_solution_data", "No table here has " + species.name + " in water" + what + ".",
               species.text, "Write another strength or phase, or type a measured heat."};
}

Sourced from_table_of_ions(const facts::AqueousSubstance& row, const Species& species) {
  const facts::Datum& datum = *row.formation_enthalpy;
  Sourced result;
  result.value = Quantity(datum.value, datum.u95, figure_key(SourceKind::Compound, species, Phase::Aqueous));
  result.route = "table";
  result.source = std::string(datum.source);
  result.working.push_back("ΔfH(aq) " + species.name + " = " + display_signed(datum.value / kJ, 2) + " ± " +
                           display_number(datum.u95 / kJ, 2) + " kJ/mol at infinite dilution, " +
                           result.source);
  return result;
}

/// Where the curve ends, as a sentence: in moles of water and in per cent.
std::string reach_of(const SolutionHeats& curve, double molar_mass) {
  if (curve.points.empty()) return " Its table has infinite dilution only.";
  const auto percent = [&](double ratio) {
    return display_number(100 * molar_mass / (molar_mass + ratio * kWaterMolarMass), 1) + " wt%";
  };
  const double least = facts::least_ratio(curve), most = curve.points.back().ratio;
  return " Its table begins at " + machine_number(least, 4) + " mol of water (" + percent(least) + ")" +
         (curve.infinite ? " and runs to infinite dilution."
                         : " and ends at " + machine_number(most, 4) + " (" + percent(most) + ").");
}

/// The pure solute that a curve starts from, and the heat of dissolving it.
Result<Sourced> from_curve(const Species& species, const SolutionHeats& curve, std::optional<double> ratio) {
  const std::optional<SolutionHeatPoint> heat =
      ratio ? facts::solution_heat_at(curve, *ratio) : curve.infinite;
  if (!heat) {
    Error error = no_solution(species, ratio ? " with " + machine_number(*ratio, 4) + " mol of water per mole"
                                             : " at infinite dilution");
    error.message += reach_of(curve, species.molar_mass);
    error.hint = "Write a strength within the table, the pure phase instead, or type a measured heat.";
    return error;
  }
  const Phase pure = curve.phase == 'g' ? Phase::Gas : curve.phase == 'l' ? Phase::Liquid : Phase::Solid;
  Result<Sourced> solute = tabulated_formation(species, pure);
  if (!solute.ok()) return solute;
  Sourced result = std::move(solute).value();
  result.value.add(Quantity(heat->heat, heat->u95, figure_key(SourceKind::Phase, species, Phase::Aqueous)));
  // Errors of one table are shared by all its strengths; that of the bridge to the pure liquid is its own.
  if (heat->bridge > 0)
    result.value.add(Quantity(0, heat->bridge, figure_key(SourceKind::Phase, species, Phase::Unstated)));
  result.source += "; heat of solution " + std::string(curve.source);
  result.working.push_back("plus heat of solution " + display_signed(heat->heat / kJ, 2) + " ± " +
                           display_number((heat->u95 + heat->bridge) / kJ, 2) + " kJ/mol " +
                           (ratio ? "with " + machine_number(*ratio, 4) + " mol of water per mole, "
                                  : std::string("at infinite dilution, ")) +
                           std::string(curve.source) + (curve.from_memory ? " (from memory)" : ""));
  return result;
}

/// Strong acids, drawn as molecules and ions all the same in water.
std::string_view ions_of_acid(std::string_view formula) {
  constexpr std::pair<std::string_view, std::string_view> kAcids[] = {
      {"HCl", "[H+].[Cl-]"},
      {"HBr", "[H+].[Br-]"},
      {"HI", "[H+].[I-]"},
      {"HNO3", "[H+].[O-][N+](=O)[O-]"},
      {"HClO4", "[H+].[O-]Cl(=O)(=O)=O"},
      {"H2SO4", "[H+].[H+].[O-]S(=O)(=O)[O-]"}};
  const std::optional<std::string> hill = facts::hill_text(formula);
  for (const auto& acid : kAcids) {
    if (hill && hill == facts::hill_text(acid.first)) return acid.second;
  }
  return {};
}

/// A salt at infinite dilution is its ions: the sum of their formation enthalpies, all from one table.
std::optional<Sourced> from_ions(const Species& species) {
  if (species.compound == nullptr) return std::nullopt;
  std::map<std::string, int> ions;  // formula of the table, how many
  std::string_view rest = ions_of_acid(species.compound->formula);
  if (rest.empty()) {
    if (species.compound->structure != facts::Structure::Formal) return std::nullopt;
    rest = species.compound->smiles;
  }
  while (!rest.empty()) {
    const std::size_t end = std::min(rest.find('.'), rest.size());
    const Result<molecule::Graph> graph = molecule::parse_smiles(rest.substr(0, end));
    rest.remove_prefix(std::min(end + 1, rest.size()));
    if (!graph.ok()) return std::nullopt;
    const molecule::Composition composition = molecule::composition(*graph);
    const facts::AqueousSubstance* ion = facts::find_aqueous_formula(molecule::hill_formula(composition));
    if (composition.charge == 0 || ion == nullptr) return std::nullopt;
    ++ions[std::string(ion->formula)];
  }
  Sourced result;
  result.route = "table";
  for (const auto& ion : ions) {
    const Result<std::shared_ptr<const Species>> read = facts::resolve_species(ion.first, false);
    if (!read.ok()) return std::nullopt;
    const Result<Sourced> one = dissolved_formation(**read, std::nullopt);
    if (!one.ok()) return std::nullopt;
    result.value.add(one->value, ion.second);
    result.source = one->source;
    result.working.insert(result.working.end(), one->working.begin(), one->working.end());
    if (ion.second > 1) result.working.back() += ", " + std::to_string(ion.second) + " ×";
  }
  result.source = "sum of the ions at infinite dilution, " + result.source;
  return result;
}

const SolutionHeats* curve_of(const Species& species, bool infinite) {
  if (species.compound == nullptr) return nullptr;
  for (const char phase : {'s', 'l', 'g'}) {
    const SolutionHeats* curve = facts::find_solution_heats(species.compound->formula, phase);
    if (curve != nullptr &&
        (infinite ? curve->infinite.has_value() : !curve->points.empty() || curve->symmetrical))
      return curve;
  }
  return nullptr;
}

}  // namespace

std::optional<double> water_ratio(const Strength& strength, double molar_mass) {
  switch (strength.kind) {
    case Strength::Kind::InfiniteDilution:
      return std::nullopt;
    case Strength::Kind::WaterRatio:
      return strength.value;
    case Strength::Kind::MassFraction:
      if (!(strength.value > 0) || !(molar_mass > 0)) return std::nullopt;
      return (1 - strength.value) / strength.value * molar_mass / kWaterMolarMass;
    case Strength::Kind::Molality:
      if (!(strength.value > 0)) return std::nullopt;
      return 1 / (strength.value * kWaterMolarMass);
  }
  return std::nullopt;
}

Result<Sourced> dissolved_formation(const Species& species, const std::optional<Strength>& strength) {
  const std::optional<double> ratio = strength ? water_ratio(*strength, species.molar_mass) : std::nullopt;
  if (!ratio && species.aqueous != nullptr && species.aqueous->formation_enthalpy)
    return from_table_of_ions(*species.aqueous, species);
  if (!ratio) {
    if (std::optional<Sourced> ions = from_ions(species)) return *std::move(ions);
  }
  const SolutionHeats* curve = curve_of(species, !ratio);
  if (curve == nullptr) return no_solution(species, ratio ? " at that strength" : "");
  return from_curve(species, *curve, ratio);
}

Result<Sourced> formation_in_solvent(const Species& species, FormationOf formation) {
  Result<Sourced> liquid = formation(species, Phase::Liquid, {});
  if (!liquid.ok()) return liquid;
  const facts::Compound* c = species.compound;
  constexpr double kRoom = 298.15;
  const bool solid = c != nullptr && ((c->melting_point && c->melting_point->value > kRoom) ||
                                      (c->solid.formation_enthalpy && !c->liquid.formation_enthalpy));
  const bool boils_below = c != nullptr && c->boiling_point && c->boiling_point->value < kRoom;
  const bool gas = boils_below || (c != nullptr && !c->boiling_point && !solid && c->gas.formation_enthalpy &&
                                   !c->liquid.formation_enthalpy);
  const double mixing = (solid ? 8.0 : gas ? 5.0 : 3.0) * kJ;
  Sourced result = std::move(liquid).value();
  result.value.add(Quantity(0, mixing, figure_key(SourceKind::Phase, species, Phase::Dissolved)));
  result.route = "estimate";
  result.source += "; dissolved taken as liquid";
  result.working.push_back(species.name + " dissolved in the solvent is reckoned as liquid; mixing 0 ± " +
                           display_number(mixing / kJ, 0) + " kJ/mol");
  result.cautions.push_back(
      species.name + ": its heat of solution is not known here; the liquid stands for it, ± " +
      display_number(mixing / kJ, 0) + " kJ/mol. Type a measured one where it matters.");
  return result;
}

}  // namespace heatledger::thermo
