// From one phase and temperature to another: warming, melting, boiling, warming, each a line of its own whose
// sum is the difference of the two enthalpies.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "core/thermo/species_enthalpy.hpp"

namespace heatledger::thermo {

/// One leg of the way.
struct PathLeg {
  enum class Kind { Heating, Fusion, Vaporisation, Sublimation } kind = Kind::Heating;
  molecule::Phase phase = molecule::Phase::Gas;  ///< that is heated; after a change, the phase reached
  double from = 0, to = 0;                       ///< [K]; equal at a change of phase
  std::string what;  ///< "toluene (l), 25 °C to 110.6 °C", "toluene boils at 110.6 °C"
  Sourced change;    ///< [J/mol], > 0: takes up heat
};

/// The legs from `from` at `start` to `to` at `end`, in order. Melting at the melting point and boiling at
/// the boiling point of `pressure` where they are known, else at 298.15 K (the leg says so). Going down, the
/// same legs with changed sign. Phase changes are h(T, new) − h(T, old) of the two curves, so the sum is the
/// difference of the ends; where a tabulated enthalpy of the change disagrees beyond its ±, a caution names
/// both.
/// @param start, end  [K] > 0
/// @param pressure    [Pa]; empty: 101.325 kPa
/// @errors thermo.no_heat_capacity, thermo.no_formation_data, thermo.temperature_range, those of gas_to_phase
Result<std::vector<PathLeg>> heating_path(const facts::Species& species, molecule::Phase from, double start,
                                          molecule::Phase to, double end,
                                          std::optional<double> pressure = {});

/// Enthalpy of fusion at a temperature [J/mol], by Kirchhoff from the melting point. Where a heat capacity is
/// missing, halfway between a constant enthalpy and a constant entropy of fusion, the ± reaching both.
/// @param temperature  [K] > 0
/// @errors thermo.no_phase_change_data
Result<Sourced> fusion_enthalpy(const facts::Species& species, double temperature);

/// Enthalpy of vaporisation at a temperature [J/mol], gas minus liquid of one consistent set.
/// @param temperature  [K] > 0, below the critical temperature
/// @errors thermo.no_phase_change_data, thermo.no_heat_capacity, thermo.temperature_range
Result<Sourced> vaporisation_enthalpy(const facts::Species& species, double temperature);

}  // namespace heatledger::thermo
