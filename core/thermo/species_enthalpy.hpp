// h(T, phase) of a species: one formation enthalpy, heat capacities per phase, phase changes at their
// temperature, Kirchhoff between them.
#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "core/base/result.hpp"
#include "core/facts/resolve.hpp"
#include "core/molecule/equation.hpp"
#include "core/uncertainty/quantity.hpp"

namespace heatledger::thermo {

/// A quantity with how it was come by: one line of working and the notes that belong to it.
struct Sourced {
  uncertainty::Quantity value;  ///< SI
  std::string route;            ///< "table", "estimate", "typed"
  std::string source;
  std::vector<std::string> working;  ///< lines with the figures put in
  std::vector<std::string> cautions;
};

/// The phase to reckon with. A phase that is written is never changed; one that is not written is taken as
/// gas, for elements as the reference state where that is solid, and as the only tabulated phase where there
/// is just one.
struct PhaseChoice {
  molecule::Phase phase = molecule::Phase::Gas;
  bool assumed = false;  ///< not written on the sheet: a note says so
};
PhaseChoice phase_taken(const facts::Species& species, molecule::Phase written);

/// Key of the error that a compound's figure in a phase carries; the same compound under two spellings has
/// one key.
uncertainty::SourceKey figure_key(uncertainty::SourceKind kind, const facts::Species& species,
                                  molecule::Phase phase);

/// "gas", "liquid", "solid", "solution", "dissolved".
std::string_view phase_word(molecule::Phase phase);

/// Enthalpy of one mole in `to` minus one mole as ideal gas, both at 298.15 K [J/mol]: minus the vaporisation
/// or sublimation enthalpy. Difference of formation enthalpies first, else a tabulated vaporisation enthalpy
/// at 298 K. Where both exist and disagree beyond their ±, the formation enthalpies stand and a caution says
/// so. Into water: formation enthalpy dissolved minus formation enthalpy of the gas.
/// @param strength  of a solution; empty: infinite dilution
/// @errors thermo.no_phase_change_data
Result<Sourced> gas_to_phase(const facts::Species& species, molecule::Phase to,
                             const std::optional<molecule::Strength>& strength = {});

/// Formation enthalpy in a phase at 298.15 K [J/mol] from the tables (elements in their reference state:
/// zero). Gas from liquid, or liquid from gas, through the tabulated vaporisation enthalpy where only one is
/// tabulated. In water: the table of dissolved substances at infinite dilution, else pure solute plus its
/// integral heat of solution.
/// @param strength  of a solution; empty: infinite dilution. Water of the solution is not part of the figure
/// @errors thermo.no_formation_data, thermo.no_solution_data (a strength outside the measured curve, or no
/// curve)
Result<Sourced> tabulated_formation(const facts::Species& species, molecule::Phase phase,
                                    const std::optional<molecule::Strength>& strength = {});

/// Moles of water per mole of solute; empty for infinite dilution.
/// @param molar_mass  of the solute [kg/mol]
std::optional<double> water_ratio(const molecule::Strength& strength, double molar_mass);

/// h(T) - h(298.15 K) of a phase that is kept [J/mol]: polynomial, estimate for gases above 25 °C, else the
/// heat capacity at 298.15 K as constant, with a caution beyond 75 K from there.
/// @param temperature  [K] > 0
/// @errors thermo.no_heat_capacity, thermo.temperature_range
Result<Sourced> enthalpy_increment(const facts::Species& species, molecule::Phase phase, double temperature);

}  // namespace heatledger::thermo
