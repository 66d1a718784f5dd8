// h(T) − h(298.15 K) and vapour pressure of one species as plain arithmetic: looked up once, evaluated
// millions of times. Words and sources of the same figures stand in core/thermo.
#pragma once

#include <memory>
#include <optional>
#include <string>
#include <vector>

#include "core/base/result.hpp"
#include "core/thermo/heat_capacity_curve.hpp"
#include "core/thermo/saturation.hpp"

namespace heatledger::step {

/// What a curve gives at one temperature; all per mole.
struct CurvePoint {
  double h = 0;    ///< h(T) − h(298.15 K) [J/mol]
  double u95 = 0;  ///< 95 % half width of `h` with the sign of T − 298.15 K: one error of the heat capacity
};

/// Sensible heat of one phase. Beyond its range it goes on with the heat capacity at the end of the range, so
/// that a search finds its way back; who shows such a figure says so.
class Curve {
 public:
  /// A heat capacity that does not change. @param cp [J/(mol K)] > 0; @param u95 [J/(mol K)] >= 0
  static Curve constant(double cp, double u95, std::string source);
  /// The best that tables or estimate have for a phase.
  /// @errors thermo.no_heat_capacity
  static Result<Curve> of(const facts::Species& species, molecule::Phase phase,
                          const std::optional<molecule::Strength>& strength);

  /// @param temperature  [K] > 0
  CurvePoint at(double temperature) const;
  double heat_capacity(double temperature) const;  ///< [J/(mol K)]
  bool covers(double temperature) const { return temperature >= from_ && temperature <= to_; }
  double from() const { return from_; }  ///< [K]
  double to() const { return to_; }      ///< [K]
  const std::string& source() const { return source_; }

 private:
  Curve() = default;
  std::shared_ptr<const thermo::HeatCapacityCurve> table_;  ///< null: constant
  double cp_ = 0, cp_u95_ = 0;
  double from_ = 1, to_ = 1e4;
  std::string source_;
};

/// Vapour pressure of a pure liquid: ln p on a fine grid of 1/T, cubic in between (error below 1e-6 of p).
class SaturationCurve {
 public:
  /// @errors thermo.no_vapour_pressure
  static Result<SaturationCurve> of(const facts::Species& species);
  /// One typed pressure, taken at every temperature.
  static SaturationCurve typed(double pressure);

  /// [Pa]; above the grid (critical point) the last slope goes on. @param temperature [K] > 0
  double pressure(double temperature) const;
  double u95_share() const { return u95_share_; }  ///< ± as a share of the pressure, at the boiling point
  const std::string& source() const { return source_; }

 private:
  double first_ = 0, step_ = 0;  ///< of 1/T [1/K]
  std::vector<double> log_pressure_;
  double u95_share_ = 0;
  std::string source_;
};

}  // namespace heatledger::step
