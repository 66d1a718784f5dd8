// Composition of combustion air.
#pragma once

#include <array>
#include <string_view>

#include "core/base/result.hpp"

namespace heatledger::facts {

struct AirComponent {
  std::string_view name;  ///< library name
  std::string_view formula;
  double mole_fraction = 0;
};

/// Dry air of the sheet: 78.084 % N2, 20.946 % O2, 0.934 % Ar, 0.036 % CO2; the fractions sum to one.
const std::array<AirComponent, 4>& dry_air();
/// Oxygen with 3.76 parts of nitrogen, the air of many textbooks; a choice by name.
const std::array<AirComponent, 2>& textbook_air();

/// Molar mass of dry_air() [kg/mol].
double dry_air_molar_mass();

constexpr double kDefaultRelativeHumidity = 0.60;  ///< at the two figures that follow, printed on the sheet
constexpr double kDefaultAirTemperature = 298.15;  ///< [K]
constexpr double kDefaultAirPressure = 101325.0;   ///< [Pa]

/// Moles of water per mole of dry air, ideal gas, saturation pressure over liquid water.
/// @param relative_humidity  0 .. 1
/// @param temperature        [K] 273.16 to 647.096
/// @param pressure           [Pa]
/// @errors thermo.temperature_range; air.humidity (not between 0 and 1); air.no_dry_air: the water alone
/// fills the pressure
Result<double> moles_water_per_mole_dry_air(double relative_humidity, double temperature, double pressure);

}  // namespace heatledger::facts
