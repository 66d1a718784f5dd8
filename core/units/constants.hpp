// Physical constants and the reference state.
#pragma once

namespace heatledger::units {

constexpr double kGasConstant = 8.314462618;      ///< [J/(mol K)], CODATA 2018, exact
constexpr double kReferenceTemperature = 298.15;  ///< [K]
constexpr double kReferencePressure = 100000.0;   ///< [Pa]
constexpr double kStandardAtmosphere = 101325.0;  ///< [Pa]
constexpr double kCalorie = 4.184;                ///< [J], thermochemical
constexpr double kNormalMolarVolume = 22.414e-3;  ///< [m3/mol] at 0 degC and 101.325 kPa, ideal

}  // namespace heatledger::units
