// h(T, phase) of a species: one formation enthalpy, heat capacities per phase, phase changes at their temperature,
// Kirchhoff between them.
#pragma once

#include <string>
#include <vector>

#include "core/base/result.hpp"
#include "core/facts/resolve.hpp"
#include "core/molecule/equation.hpp"
#include "core/uncertainty/quantity.hpp"

namespace heatledger::thermo {

/// A quantity with how it was come by: one line of working and the notes that belong to it.
struct Sourced {
  uncertainty::Quantity value;      ///< SI
  std::string route;                ///< "table", "estimate", "typed"
  std::string source;
  std::vector<std::string> working; ///< lines with the figures put in
  std::vector<std::string> cautions;
};

/// Enthalpy of one mole in `to` minus one mole as ideal gas, both at 298.15 K [J/mol]: minus the vaporisation or
/// sublimation enthalpy. Difference of formation enthalpies first, else a tabulated vaporisation enthalpy at 298 K.
/// @errors thermo.no_phase_change_data
Result<Sourced> gas_to_phase(const facts::Species& species, molecule::Phase to);

/// Formation enthalpy in a phase at 298.15 K [J/mol] from the tables (elements in their reference state: zero).
/// @errors thermo.no_formation_data
Result<Sourced> tabulated_formation(const facts::Species& species, molecule::Phase phase);

/// h(T) - h(298.15 K) of a phase that is kept [J/mol]. @errors thermo.no_heat_capacity, thermo.temperature_range
Result<Sourced> enthalpy_increment(const facts::Species& species, molecule::Phase phase, double temperature);

}  // namespace heatledger::thermo
