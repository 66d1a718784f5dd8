#include "core/step/curve.hpp"

#include <algorithm>
#include <cmath>

#include "core/units/constants.hpp"

namespace heatledger::step {

Curve Curve::constant(double cp, double u95, std::string source) {
  Curve curve;
  curve.cp_ = cp;
  curve.cp_u95_ = u95;
  curve.source_ = std::move(source);
  return curve;
}

Result<Curve> Curve::of(const facts::Species& species, molecule::Phase phase,
                        const std::optional<molecule::Strength>& strength) {
  Result<thermo::HeatCapacityCurve> table = thermo::heat_capacity_curve(species, phase, strength);
  if (!table.ok()) return table.error();
  Curve curve;
  curve.from_ = table->lowest();
  curve.to_ = table->highest();
  curve.source_ = table->source;
  curve.table_ = std::make_shared<const thermo::HeatCapacityCurve>(std::move(table).value());
  return curve;
}

CurvePoint Curve::at(double temperature) const {
  if (table_ == nullptr) {
    const double span = temperature - units::kReferenceTemperature;
    return {cp_ * span, cp_u95_ * span};
  }
  return {table_->increment(temperature), table_->deviation(temperature)};
}

double Curve::heat_capacity(double temperature) const {
  return table_ == nullptr ? cp_ : table_->heat_capacity(temperature);
}

Result<SaturationCurve> SaturationCurve::of(const facts::Species& species) {
  const Result<thermo::Saturation> boiling = thermo::boiling_temperature(species, units::kStandardAtmosphere);
  if (!boiling.ok()) return boiling.error();
  // From half the boiling temperature to where the equations end, 240 even steps of 1/T.
  constexpr int kSteps = 240;
  const double hottest = 1.6 * boiling->value, coldest = 0.5 * boiling->value;
  SaturationCurve curve;
  curve.first_ = 1 / hottest;
  curve.step_ = (1 / coldest - 1 / hottest) / kSteps;
  std::optional<std::size_t> first_known;
  for (int i = 0; i <= kSteps; ++i) {
    const Result<thermo::Saturation> point =
        thermo::vapour_pressure(species, 1 / (curve.first_ + i * curve.step_));
    if (!point.ok()) {
      if (!first_known) continue;  // above the critical temperature
      break;                       // below the range: the last slope goes on
    }
    if (!first_known) {
      first_known = static_cast<std::size_t>(i);
    }
    curve.log_pressure_.push_back(std::log(point->value));
  }
  if (!first_known || curve.log_pressure_.size() < 4) {
    return Error{"thermo.no_vapour_pressure",
                 "Nothing here tells the vapour pressure of " + species.name + ".", species.text,
                 "Type its vapour pressure."};
  }
  curve.first_ += static_cast<double>(*first_known) * curve.step_;
  const Result<thermo::Saturation> there = thermo::vapour_pressure(species, boiling->value);
  curve.u95_share_ = there.ok() ? there->u95 / there->value : 0.05;
  curve.source_ = there.ok() ? there->source : boiling->source;
  return curve;
}

SaturationCurve SaturationCurve::typed(double pressure) {
  SaturationCurve curve;
  curve.log_pressure_.assign(1, std::log(pressure));
  curve.source_ = "typed";
  return curve;
}

double SaturationCurve::pressure(double temperature) const {
  const std::vector<double>& y = log_pressure_;
  if (y.size() == 1) return std::exp(y.front());
  const double at = (1 / temperature - first_) / step_;
  const double last = static_cast<double>(y.size() - 1);
  if (at <= 0) return std::exp(y[0] + at * (y[1] - y[0]));
  if (at >= last) return std::exp(y[y.size() - 1] + (at - last) * (y[y.size() - 1] - y[y.size() - 2]));
  // Lagrange's cubic through the four neighbours.
  const std::size_t i = std::min(std::max<std::size_t>(static_cast<std::size_t>(at), 1), y.size() - 3);
  const double t = at - static_cast<double>(i);
  const double a = t + 1, b = t, c = t - 1, d = t - 2;
  return std::exp(-b * c * d / 6 * y[i - 1] + a * c * d / 2 * y[i] - a * b * d / 2 * y[i + 1] +
                  a * b * c / 6 * y[i + 2]);
}

}  // namespace heatledger::step
