#include "core/thermo/phase_enthalpy.hpp"

#include <algorithm>
#include <cmath>

#include "core/base/check.hpp"
#include "core/thermo/estimated.hpp"
#include "core/thermo/heat_capacity_curve.hpp"
#include "core/units/constants.hpp"

namespace heatledger::thermo {

using facts::Species;
using molecule::Phase;

struct PhaseEnthalpy::Data {
  Phase phase = Phase::Gas;
  HeatCapacityCurve curve;
  Result<Sourced> formation = Sourced{};
  double formation_value = 0;  ///< [J/mol]; only with formation.ok()
};

Result<PhaseEnthalpy> PhaseEnthalpy::of(const Species& species, Phase phase,
                                        const std::optional<molecule::Strength>& strength,
                                        const TypedCurve& typed) {
  if (phase == Phase::Unstated) phase = Phase::Gas;
  const std::string source = typed.source.empty() ? "typed" : typed.source;
  Result<HeatCapacityCurve> curve =
      heat_capacity_curve(species, phase, strength, typed.heat_capacity, source);
  if (!curve.ok()) return curve.error();
  const auto data = std::make_shared<Data>();
  data->phase = phase;
  data->curve = std::move(curve).value();
  if (typed.formation) {
    Sourced figure;
    figure.value = *typed.formation;
    figure.route = "typed";
    figure.source = source;
    data->formation = std::move(figure);
  } else {
    data->formation = best_formation(species, phase, strength);
  }
  if (data->formation.ok()) data->formation_value = data->formation->value.value();
  return PhaseEnthalpy(data);
}

Phase PhaseEnthalpy::phase() const {
  return data_->phase;
}

double PhaseEnthalpy::lowest() const {
  return data_->curve.lowest();
}

double PhaseEnthalpy::highest() const {
  return data_->curve.highest();
}

double PhaseEnthalpy::increment(double temperature) const {
  return data_->curve.increment(temperature);
}

double PhaseEnthalpy::heat_capacity(double temperature) const {
  return data_->curve.heat_capacity(temperature);
}

bool PhaseEnthalpy::has_formation() const {
  return data_->formation.ok();
}

double PhaseEnthalpy::enthalpy(double temperature) const {
  CHECK(has_formation(), "the enthalpy of a species without formation enthalpy is not asked");
  return data_->formation_value + increment(temperature);
}

double PhaseEnthalpy::temperature_at_increment(double increment) const {
  double t = units::kReferenceTemperature;
  constexpr int kMostSteps = 60;  // quadratic near the root; far ends are straight lines
  for (int i = 0; i < kMostSteps; ++i) {
    const double cp = heat_capacity(t);
    if (!(cp > 0)) break;  // partial molar figures may be negative: no temperature follows from them
    const double next = std::max(1.0, t + (increment - data_->curve.increment(t)) / cp);
    const double step = std::fabs(next - t);
    t = next;
    if (step < 1e-9 * t) break;
  }
  return t;
}

const Result<Sourced>& PhaseEnthalpy::formation() const {
  return data_->formation;
}

Result<Sourced> PhaseEnthalpy::increment_with_error(double temperature) const {
  return increment_of(data_->curve, temperature);
}

Result<Sourced> PhaseEnthalpy::enthalpy_with_error(double temperature) const {
  if (!data_->formation.ok()) return data_->formation.error();
  const Result<Sourced> increment = increment_with_error(temperature);
  if (!increment.ok()) return increment;
  Sourced result = data_->formation.value();
  result.value.add(increment->value);
  if (increment->route == "estimate") result.route = increment->route;
  result.source += "; " + increment->source;
  result.working.insert(result.working.end(), increment->working.begin(), increment->working.end());
  result.cautions.insert(result.cautions.end(), increment->cautions.begin(), increment->cautions.end());
  return result;
}

Result<Sourced> PhaseEnthalpy::heat_capacity_with_error(double temperature) const {
  return heat_capacity_of(data_->curve, temperature);
}

}  // namespace heatledger::thermo
