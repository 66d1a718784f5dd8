// Where a liquid boils, what stands over it, and whether a gas may still be reckoned as ideal.
#pragma once

#include <optional>
#include <string>

#include "core/facts/resolve.hpp"
#include "core/uncertainty/quantity.hpp"

namespace heatledger::thermo {

/// A pressure or temperature on the saturation line.
struct Saturation {
  double value = 0;  ///< [Pa] or [K]
  double u95 = 0;
  std::string
      source;  ///< "Antoine equation, 280 to 410 K, …", "from the boiling point and the critical point"
  bool estimated = false;
};

/// Vapour pressure over the pure liquid [Pa]: water by its saturation line, else the published equation
/// inside its range, else a straight line of ln p against 1/T through the boiling point and the critical
/// point, or through the boiling point with the enthalpy of vaporisation.
/// @param temperature  [K] > 0
/// @errors thermo.no_vapour_pressure; thermo.temperature_range: above the critical temperature
Result<Saturation> vapour_pressure(const facts::Species& species, double temperature);

/// Temperature at which the pure liquid boils [K]; the inverse of vapour_pressure.
/// @param pressure  [Pa] > 0
/// @errors thermo.no_vapour_pressure; thermo.pressure_range: above the critical pressure or far below the
/// data
Result<Saturation> boiling_temperature(const facts::Species& species, double pressure);

/// Critical temperature [K] and pressure [Pa], tabulated or estimated.
struct CriticalPoint {
  double temperature = 0, pressure = 0;
  bool estimated = false;
};
/// @source tables; else temperature = 1.5 × boiling point (Guldberg 1890) and pressure = (0.113 + 0.0032 n)⁻²
///         bar with n atoms (K. G. Joback, R. C. Reid, Chem. Eng. Commun. 57 (1987) 233, without the group
///         terms, ± 30 %)
/// @return empty without boiling point or composition
std::optional<CriticalPoint> critical_point(const facts::Species& species);

/// A caution where the gas is no longer ideal, by the second virial coefficient: compression
/// factor more than 5 % from one. "" when it may be taken as ideal or nothing is known of it.
/// @param temperature  [K] > 0
/// @param pressure     [Pa] > 0, of the species in the mixture (partial pressure)
/// @source K. S. Pitzer, R. F. Curl, J. Am. Chem. Soc. 79 (1957) 2369: B pc/(R Tc) = 0.083 − 0.422/Tr^1.6
///         + ω (0.139 − 0.172/Tr^4.2) in the form of Abbott; ω from the boiling point after W. C. Edmister,
///         Petroleum Refiner 37 (1958) 173
std::string ideal_gas_caution(const facts::Species& species, double temperature, double pressure);

}  // namespace heatledger::thermo
