// Water and steam on the saturation line. "Steam" here is saturated steam; superheat goes by the ideal-gas
// polynomial.
#pragma once

#include "core/base/result.hpp"

namespace heatledger::facts {

struct SaturatedWater {
  double temperature = 0;      ///< [K]
  double pressure = 0;         ///< [Pa]
  double pressure_slope = 0;   ///< dp/dT along the line [Pa/K]
  double liquid_density = 0;   ///< [kg/m3]
  double vapour_density = 0;   ///< [kg/m3]
  double liquid_enthalpy = 0;  ///< [J/kg], zero of internal energy of the liquid at the triple point
  double vapour_enthalpy = 0;  ///< [J/kg]
};

/// @param temperature  [K], 273.16 to 647.096
/// @errors thermo.temperature_range
/// @source IAPWS SR1-86(1992); W. Wagner and A. Pruss, J. Phys. Chem. Ref. Data 22 (1993) 783
/// @validity densities and enthalpies lose accuracy in the last kelvin below the critical point
/// @example WaterSaturation.GivesThePublishedCheckValues
Result<SaturatedWater> saturated_water(double temperature);

/// Temperature at which water boils at a pressure [K].
/// @param pressure  [Pa], 611.657 to 22.064e6
/// @errors thermo.pressure_range
Result<double> boiling_temperature_of_water(double pressure);

}  // namespace heatledger::facts
