// Heat capacity of one species in one phase against temperature, in pieces that join: polynomial, estimate or
// tabulated value. Formation enthalpies are added in phase_enthalpy.hpp.
#pragma once

#include <array>
#include <optional>
#include <string>
#include <vector>

#include "core/thermo/species_enthalpy.hpp"

namespace heatledger::thermo {

/// One stretch of temperature: cp = Σ c[i] T^i [J/(mol K)], T in K.
struct HeatCapacityPiece {
  double from = 0, to = 0;    ///< [K]
  std::array<double, 5> c{};  ///< [J/(mol K^(i+1))]
  double u95 = 0;             ///< half width of the 95 % interval of cp [J/(mol K)]
  double offset = 0;          ///< h(T) − h(298.15 K) = offset + Σ c[i] T^(i+1) / (i + 1)
  double deviation = 0;       ///< ± of h(from) − h(298.15 K), with its sign [J/mol]
};

/// How a curve was come by.
enum class CurveKind : unsigned char {
  Typed,       ///< one figure of the sheet, constant
  Polynomial,  ///< published, within its ranges
  Estimate,    ///< gas, bonds in context
  Constant,    ///< a tabulated or estimated heat capacity near 298.15 K
  Rising       ///< the same for a liquid, rising with temperature
};

struct HeatCapacityCurve {
  CurveKind kind = CurveKind::Constant;
  molecule::Phase phase = molecule::Phase::Gas;
  std::vector<HeatCapacityPiece> pieces;  ///< rising, joined; at least one
  double drift = 0;   ///< [1/K] share by which the ± of an increment grows with the distance from 298.15 K
  double at_298 = 0;  ///< [J/(mol K)]
  double slope = 0;   ///< [J/(mol K²)] of a rising one
  std::string name;   ///< of the species
  std::string route, source;
  std::optional<double> caution_above;  ///< [K] the melting point of a solid
  uncertainty::SourceKey key = 0;       ///< of its errors: one for a species and phase

  double lowest() const { return pieces.front().from; }
  double highest() const { return pieces.back().to; }
  /// [J/(mol K)]; outside the range as at its end.
  double heat_capacity(double temperature) const;
  /// h(T) − h(298.15 K) [J/mol]; outside the range with the heat capacity at its end.
  double increment(double temperature) const;
  /// ± of the increment, with the sign of T − 298.15 K [J/mol].
  double deviation(double temperature) const;
};

/// Typed figure first, then the polynomial; for gases the estimate, then the tabulated figure at 298.15 K;
/// for liquids the tabulated figure, then the estimate, both rising by 0.18 ± 0.2 % a kelvin, a slope that is
/// sharpened where the vaporisation enthalpy is known at 298.15 K and at the boiling point; for solids the
/// tabulated figure as constant. Dissolved is read as liquid. Aqueous with a strength: what the solute adds
/// to its water (apparent_heat_capacity), without one the partial molar figure at infinite dilution.
/// @param typed  constant heat capacity of the sheet [J/(mol K)]
/// @errors thermo.no_heat_capacity
/// @validity polynomials in their ranges; estimates of gases from 200 to 1000 K; constants to 300 K either
///           side of 298.15 K, liquids up to the critical temperature
Result<HeatCapacityCurve> heat_capacity_curve(const facts::Species& species, molecule::Phase phase,
                                              const std::optional<molecule::Strength>& strength = {},
                                              const std::optional<uncertainty::Quantity>& typed = {},
                                              const std::string& typed_source = "typed");

/// h(T) − h(298.15 K) of a curve with its ± and working. @errors thermo.temperature_range
Result<Sourced> increment_of(const HeatCapacityCurve& curve, double temperature);
/// cp(T) with its ± and working. @errors thermo.temperature_range
Result<Sourced> heat_capacity_of(const HeatCapacityCurve& curve, double temperature);

}  // namespace heatledger::thermo
