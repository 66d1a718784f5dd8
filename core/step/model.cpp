// The arithmetic of a step: numbers to amounts, amounts to heats.
#include "core/step/model.hpp"

#include <algorithm>
#include <cmath>

#include "core/base/number_text.hpp"
#include "core/step/flash.hpp"
#include "core/step/linear.hpp"
#include "core/step/words.hpp"
#include "core/units/constants.hpp"

namespace heatledger::step {
namespace {

/// What rounding leaves of an amount that is all gone, as a share of what was there.
constexpr double kRounding = 1e-12;
/// A substance may come out below zero by this share of what was there before it counts as exhausted: typed
/// shares and conversions carry no more digits than this.
constexpr double kShort = 1e-9;

}  // namespace

std::optional<std::size_t> Model::slot(std::string_view id) const {
  for (std::size_t i = 0; i < slots_.size(); ++i) {
    if (slots_[i].id == id) return i;
  }
  return std::nullopt;
}

std::vector<double> Model::values() const {
  std::vector<double> v(slots_.size());
  for (std::size_t i = 0; i < v.size(); ++i) v[i] = slots_[i].value;
  return v;
}

double Model::enthalpy(const std::vector<double>& v, std::size_t state, double temperature) const {
  const StateCurve& of = states_[state];
  double e = of.shift ? v[*of.shift] : 0;
  if (of.curve && temperature != units::kReferenceTemperature) {
    const CurvePoint point = of.curve->at(temperature);
    e += point.h + v[*of.deviation] * point.u95;
  }
  return e;
}

double Model::heat_capacity(const std::vector<double>& v, std::size_t state, double temperature) const {
  const StateCurve& of = states_[state];
  if (!of.curve) return 0;
  const double cp = of.curve->heat_capacity(temperature);
  const double deviation = v[*of.deviation];
  if (deviation == 0) return cp;
  // Slope of the increment's ± over one kelvin around the temperature.
  return cp + deviation * (of.curve->at(temperature + 0.5).u95 - of.curve->at(temperature - 0.5).u95);
}

bool Model::is_liquid(std::size_t substance) const {
  const molecule::Phase phase = states_[leaving_[substance].state].state.phase;
  return phase == molecule::Phase::Liquid || phase == molecule::Phase::Dissolved;
}

double Model::vapour_pressure(const std::vector<double>& v, std::size_t substance, double temperature) const {
  const LeavingPlan& plan = leaving_[substance];
  return plan.saturation ? plan.saturation->pressure(temperature) * (1 + v[*plan.saturation_slot]) : 0;
}

double Model::reaction_heat(const std::vector<double>& v, std::size_t reaction) const {
  const ReactionPlan& plan = reactions_[reaction];
  double heat = v[plan.heat];
  for (std::size_t i = 0; i < plan.terms.size(); ++i) {
    const Term& term = plan.terms[i];
    const StateCurve& state = states_[term.state];
    double e = state.shift ? v[*state.shift] : 0;
    if (!plan.at_heat.empty()) e += plan.at_heat[i].h + v[*state.deviation] * plan.at_heat[i].u95;
    heat -= term.coefficient * e;
  }
  return heat;
}

double Model::reaction_heat_at(const std::vector<double>& v, std::size_t reaction, double temperature) const {
  double heat = reaction_heat(v, reaction);
  for (const Term& term : reactions_[reaction].terms)
    heat += term.coefficient * enthalpy(v, term.state, temperature);
  return heat;
}

double Model::leaving_enthalpy(const std::vector<double>& v, const Work& work, std::size_t substance,
                               double temperature) const {
  const std::size_t state = leaving_[substance].state;
  const Dissolving& solution = work.dissolving;
  if (solution.ratio.empty() || solution.ratio[substance] < 0) return enthalpy(v, state, temperature);
  const double above = solution.above_leaving[substance];
  for (const std::size_t i : solution.active) {
    const SolutePlan& plan = solution_.solutes[i];
    if (plan.substance != substance) continue;
    const std::optional<thermo::ApparentHeatCapacity> cp =
        plan.heat_capacities != nullptr
            ? thermo::apparent_heat_capacity(*plan.heat_capacities, solution.ratio[substance],
                                             molar_mass_[substance])
            : std::nullopt;
    if (!cp) break;
    const StateCurve& of = states_[state];
    const double error = plan.heat_capacity_error ? v[*plan.heat_capacity_error] : 0;
    return (of.shift ? v[*of.shift] : 0) + above +
           (cp->cp + error * cp->u95) * (temperature - units::kReferenceTemperature);
  }
  return enthalpy(v, state, temperature) + above;
}

void Model::dissolve(const std::vector<double>& v, Work& work) const {
  Dissolving& solution = work.dissolving;
  const std::size_t n = input_.substances.size();
  solution.active.clear();
  solution.pool.clear();
  solution.ratio.assign(n, -1);
  solution.above_leaving.assign(n, 0);
  solution.set_free.assign(solution_.solutes.size(), 0);
  solution.tables = solution.taken = 0;
  if (solution_.solutes.empty()) return;
  const auto liquid = [&](std::size_t i) {
    return work.leaving[i] - (leaving_[i].vapour ? work.vapour[i] : 0);
  };
  const double water = liquid(*solution_.water);
  for (std::size_t i = 0; i < solution_.solutes.size() && water > 0; ++i) {
    const double amount = liquid(solution_.solutes[i].substance);
    if (!(amount > 0)) continue;
    solution.active.push_back(i);
    solution.pool.push_back({&solution_.solutes[i].curve, amount});
  }
  thermo::share_water(solution.pool, water, solution.share);
  for (std::size_t a = 0; a < solution.active.size(); ++a) {
    const SolutePlan& plan = solution_.solutes[solution.active[a]];
    const double change = solution.share.heat[a] - plan.from_pure;
    const double u = thermo::dilution_u95(change, solution.share.u95[a],
                                          solution.share.bridge[a] - plan.bridge, plan.curve.span());
    solution.ratio[plan.substance] = solution.share.ratio[a];
    solution.above_leaving[plan.substance] = change + v[plan.error] * u;
  }
  // Set free: what came in as solution less what goes out as solution, both above the reference state.
  for (std::size_t i = 0; i < solution_.solutes.size(); ++i) {
    const std::size_t substance = solution_.solutes[i].substance;
    double heat = 0;
    for (std::size_t p = 0; p < part_states_.size(); ++p) {
      const StateCurve& state = states_[part_states_[p]];
      if (state.substance == substance && state.dissolves) heat += work.parts[p] * v[*state.shift];
    }
    const StateCurve& leaving = states_[leaving_[substance].state];
    heat -=
        liquid(substance) * ((leaving.dissolves ? v[*leaving.shift] : 0) + solution.above_leaving[substance]);
    solution.set_free[i] = heat;
    solution.tables += heat;
  }
  solution.taken = solution.tables;
  if (solution_.typed) {
    solution.taken = -v[*solution_.typed];
  } else if (solution_.in_measured == Includes::Yes) {
    solution.taken = 0;
  } else if (solution_.in_measured == Includes::Unknown) {
    solution.taken = std::max(0.0, solution.tables);  // the larger heat of both readings
  }
}

Status Model::solutions_present(const Work& work) const {
  const Dissolving& solution = work.dissolving;
  if (!solution.share.without || solution.active.empty() || solution_.typed) return success();
  const SolutePlan& plan = solution_.solutes[solution.active[*solution.share.without]];
  const double ratio = solution.share.ratio[*solution.share.without];
  const double mass = molar_mass_[plan.substance], least = plan.curve.least(), most = plan.curve.most();
  const auto strength = [&](double r) {
    return digits(r) + " mol of water per mole, " + display_number(100 * thermo::mass_fraction(r, mass), 1) +
           " wt%";
  };
  return Error{"step.solution_range",
               input_.substances[plan.substance].name + " leaves with " + strength(ratio) +
                   "; its table of heats of solution " +
                   (ratio < least ? "begins at " + strength(least) : "ends at " + strength(most)) + ".",
               "outlet", "Change the amounts, or type the heat of mixing."};
}

Trouble Model::amounts(const std::vector<double>& v, Work& work) const {
  const Trouble fed = feed_amounts(v, work);
  if (fed != Trouble::None) return fed;
  return react(v, work);
}

Trouble Model::feed_amounts(const std::vector<double>& v, Work& work) const {
  work.parts.assign(figures_.size(), 0);
  work.fed.assign(input_.substances.size(), 0);
  for (const bool excess : {false, true}) {  // what is fed in excess looks at what the other feeds bring
    for (std::size_t f = 0; f < feeds_.size(); ++f) {
      const Feed& feed = input_.feeds[f];
      if (feed.excess.has_value() != excess) continue;
      const FeedPlan& plan = feeds_[f];
      const Trouble trouble =
          feed.shares == ShareKind::None ? parts_by_amount(v, f, work) : parts_by_share(v, f, work);
      if (trouble != Trouble::None) return trouble;
      for (std::size_t p = 0; p < plan.parts; ++p)
        work.fed[feed.parts[p].substance] += work.parts[plan.first_part + p];
    }
  }
  return Trouble::None;
}

double Model::moles(const std::vector<double>& v, std::size_t feed, std::size_t part, Measure measure,
                    double amount) const {
  const FeedPlan& plan = feeds_[feed];
  const FigurePlan& figure = figures_[plan.first_part + part];
  switch (measure) {
    case Measure::Mole:
      return amount;
    case Measure::Mass:
      return amount / figure.mole_mass;
    case Measure::Volume:
      if (figure.gas) return amount * v[*plan.pressure] / (units::kGasConstant * v[plan.temperature]);
      return amount * figure.density / figure.mole_mass;
  }
  return amount;
}

Trouble Model::parts_by_amount(const std::vector<double>& v, std::size_t f, Work& work) const {
  const FeedPlan& plan = feeds_[f];
  for (std::size_t p = 0; p < plan.parts; ++p) {
    const FeedPart& part = input_.feeds[f].parts[p];
    if (part.carried) {
      work.parts[plan.first_part + p] =
          part.carried->ratio * work.parts[plan.first_part + part.carried->part];
      continue;
    }
    work.parts[plan.first_part + p] = moles(v, f, p, part.measure, v[*figures_[plan.first_part + p].figure]);
  }
  return Trouble::None;
}

Trouble Model::parts_by_share(const std::vector<double>& v, std::size_t f, Work& work) const {
  const FeedPlan& plan = feeds_[f];
  const Feed& feed = input_.feeds[f];
  double* share = work.parts.data() + plan.first_part;
  double sum = 0;
  for (std::size_t p = 0; p < plan.parts; ++p) {
    if (plan.rest == p || feed.parts[p].carried) continue;
    share[p] = v[*figures_[plan.first_part + p].figure];
    sum += share[p];
  }
  if (plan.rest) {
    if (sum > 1 + kShort) return Trouble::BadShare;
    share[*plan.rest] = std::max(0.0, 1 - sum);
    sum = 1;
  }
  if (!(sum > 0)) return Trouble::BadShare;
  // From here on `share` is mol per unit of shares: mole shares as they are, mass shares over molar mass.
  if (feed.shares == ShareKind::MassShare) {
    for (std::size_t p = 0; p < plan.parts; ++p) {
      const FeedPart& part = feed.parts[p];
      share[p] = part.carried ? part.carried->ratio * share[part.carried->part]
                              : share[p] / figures_[plan.first_part + p].mole_mass;
    }
  }
  double measured = 0, brought = 0;
  for (std::size_t p = 0; p < plan.parts; ++p) {
    const std::size_t substance = feed.parts[p].substance;
    const FigurePlan& figure = figures_[plan.first_part + p];
    if (feed.excess) {
      if (substance == feed.excess->substance) brought += share[p];
    } else if (feed.measure == Measure::Mass) {
      measured += share[p] * molar_mass_[substance];
    } else if (feed.measure == Measure::Volume && feed.parts[p].carried) {
      continue;  // in the volume of its solution
    } else if (feed.measure == Measure::Volume) {
      measured += figure.gas ? share[p] * units::kGasConstant * v[plan.temperature] / v[*plan.pressure]
                             : share[p] * figure.mole_mass / figure.density;
    } else {
      measured += share[p];
    }
  }
  double scale = 0;
  if (feed.excess) {
    if (!(brought > 0)) return Trouble::BadShare;
    double key_per = 0, per = 0;
    for (const Term& term : reactions_[feed.excess->reaction].terms) {
      if (term.substance == feed.excess->key) key_per -= term.coefficient;
      if (term.substance == feed.excess->substance) per -= term.coefficient;
    }
    const double demand = work.fed[feed.excess->key] * per / key_per * (1 + v[*plan.total]);
    scale = std::max(0.0, demand - work.fed[feed.excess->substance]) / brought;
  } else {
    scale = v[*plan.total] / measured;
  }
  for (std::size_t p = 0; p < plan.parts; ++p) share[p] *= scale;
  return Trouble::None;
}

Trouble Model::react(const std::vector<double>& v, Work& work) const {
  const std::size_t n = reactions_.size();
  work.leaving = work.fed;
  work.extents.assign(n, 0);
  if (n != 0) {
    progress_equations(v, work);
    if (!solve_linear(work.matrix, n, work.extents)) return Trouble::Undetermined;
  }
  for (std::size_t j = 0; j < n; ++j) {
    const Progress& progress = input_.reactions[j].progress;
    if (progress.kind == ProgressKind::Extent || !(work.extents[j] < 0)) continue;
    if (work.extents[j] < -kShort * work.fed[progress.of]) {
      work.culprit = progress.of;
      return Trouble::Backwards;
    }
    work.extents[j] = 0;
  }
  work.gross = work.fed;
  for (std::size_t j = 0; j < n; ++j) {
    for (const Term& term : reactions_[j].terms) {
      const double change = term.coefficient * work.extents[j];
      work.leaving[term.substance] += change;
      if (change > 0) work.gross[term.substance] += change;
    }
  }
  for (std::size_t i = 0; i < work.leaving.size(); ++i) {
    double& left = work.leaving[i];
    if (left < -kShort * work.gross[i]) {
      work.culprit = i;
      return Trouble::Exhausted;
    }
    if (std::fabs(left) <= kRounding * work.gross[i] || left < 0) left = 0;
  }
  return Trouble::None;
}

void Model::progress_equations(const std::vector<double>& v, Work& work) const {
  const std::size_t n = reactions_.size(), width = n + 1;
  work.matrix.assign(n * width, 0);
  for (std::size_t j = 0; j < n; ++j) {
    double* row = work.matrix.data() + j * width;
    const Progress& progress = input_.reactions[j].progress;
    const double figure = v[reactions_[j].progress];
    const double fed = work.fed[progress.of];
    const double consumed = -coefficient_of(j, progress.of);
    switch (progress.kind) {
      case ProgressKind::Extent:
        row[j] = 1;
        row[n] = figure;
        break;
      case ProgressKind::Conversion:
      case ProgressKind::Yield:
        row[j] = consumed;
        row[n] = figure * fed;
        break;
      case ProgressKind::ConversionOfArriving:
        row[j] = consumed;
        for (std::size_t k = 0; k < j; ++k) row[k] -= figure * coefficient_of(k, progress.of);
        row[n] = figure * fed;
        break;
      case ProgressKind::TotalConversion:
        for (std::size_t k = 0; k < n; ++k) row[k] -= coefficient_of(k, progress.of);
        row[n] = figure * fed;
        break;
      case ProgressKind::Selectivity:
        row[j] = consumed;
        for (std::size_t k = 0; k < n; ++k) row[k] -= figure * std::max(0.0, -coefficient_of(k, progress.of));
        break;
    }
  }
}

double Model::coefficient_of(std::size_t reaction, std::size_t substance) const {
  double sum = 0;
  for (const Term& term : reactions_[reaction].terms) {
    if (term.substance == substance) sum += term.coefficient;
  }
  return sum;
}

void Model::upstream(const std::vector<double>& v, Work& work) const {
  work.inlet_heat = 0;
  for (std::size_t f = 0; f < feeds_.size(); ++f) {
    const double temperature = v[feeds_[f].temperature];
    for (std::size_t p = 0; p < feeds_[f].parts; ++p) {
      const std::size_t part = feeds_[f].first_part + p;
      work.inlet_heat += work.parts[part] * enthalpy(v, part_states_[part], temperature);
    }
  }
  work.reaction_heat = 0;
  for (std::size_t j = 0; j < reactions_.size(); ++j)
    work.reaction_heat += work.extents[j] * reaction_heat(v, j);
}

void Model::split(const std::vector<double>& v, double temperature, Work& work) const {
  work.vapour.assign(work.leaving.size(), 0);
  if (!splits_) return;
  for (std::size_t i = 0; i < leaving_.size(); ++i) {
    if (leaving_[i].share) work.vapour[i] = work.leaving[i] * v[*leaving_[i].share];
  }
  if (!saturates_) return;
  const double pressure = v[*outlet_pressure_];
  Flash flash;
  work.saturation.assign(leaving_.size(), 0);
  for (std::size_t i = 0; i < leaving_.size(); ++i) {
    const LeavingPlan& plan = leaving_[i];
    if (plan.by_saturation) {
      work.saturation[i] = plan.saturation->pressure(temperature) * (1 + v[*plan.saturation_slot]) / pressure;
    } else {
      // Gases stay gas, all else stays liquid; solids stand apart from both.
      const molecule::Phase phase = states_[plan.state].state.phase;
      const double gas = phase == molecule::Phase::Gas ? work.leaving[i] : work.vapour[i];
      flash.gas += gas;
      if (phase == molecule::Phase::Liquid || phase == molecule::Phase::Dissolved)
        flash.liquid += work.leaving[i] - work.vapour[i];
    }
  }
  const double vapour = vapour_moles(flash, work.leaving, work.saturation);
  const double total = flash_total(flash, work.leaving, work.saturation);
  for (std::size_t i = 0; i < leaving_.size(); ++i) {
    if (leaving_[i].by_saturation)
      work.vapour[i] = vapour_part(work.leaving[i], work.saturation[i], vapour, total - vapour);
  }
}

void Model::downstream(const std::vector<double>& v, Work& work) const {
  const double temperature = v[outlet_temperature_];
  split(v, temperature, work);
  dissolve(v, work);
  work.outlet_heat = 0;
  double gases = 0;
  for (std::size_t i = 0; i < leaving_.size(); ++i) {
    if (work.leaving[i] == 0) continue;
    const LeavingPlan& plan = leaving_[i];
    const double vapour = plan.vapour ? work.vapour[i] : 0;
    if (vapour != 0) {
      const double heat = vapour * enthalpy(v, *plan.vapour, temperature);
      work.outlet_heat += heat;
      gases += heat;
    }
    if (vapour != work.leaving[i]) {
      const double heat = (work.leaving[i] - vapour) * leaving_enthalpy(v, work, i, temperature);
      work.outlet_heat += heat;
      if (states_[plan.state].state.phase == molecule::Phase::Gas) gases += heat;
    }
  }
  work.departure = departure_ ? v[*departure_] : departure_share_ ? v[*departure_share_] * gases : 0;
  work.vessel_heat = vessel_ ? v[*vessel_] * (temperature - v[*vessel_temperature_]) : 0;
  work.needed = work.outlet_heat - work.inlet_heat + work.reaction_heat + work.vessel_heat + work.departure +
                v[loss_] - v[shaft_] + work.dissolving.tables - work.dissolving.taken;
}

Status Model::curves_present(const std::vector<double>& v, const Work& work) const {
  const auto missing = [&](std::size_t state, double amount, double temperature) {
    return amount != 0 && temperature != units::kReferenceTemperature && !states_[state].curve;
  };
  std::optional<std::size_t> without;
  for (std::size_t f = 0; f < feeds_.size(); ++f) {
    for (std::size_t p = feeds_[f].first_part; p < feeds_[f].first_part + feeds_[f].parts; ++p) {
      if (missing(part_states_[p], work.parts[p], v[feeds_[f].temperature])) without = part_states_[p];
    }
  }
  const double temperature = v[outlet_temperature_];
  for (std::size_t i = 0; i < leaving_.size(); ++i) {
    const LeavingPlan& plan = leaving_[i];
    const double vapour = plan.vapour ? work.vapour[i] : 0;
    if (plan.vapour && missing(*plan.vapour, vapour, temperature)) without = *plan.vapour;
    const bool own =
        !work.dissolving.ratio.empty() && work.dissolving.ratio[i] >= 0 && solution_.has_heat_capacity(i);
    if (!own && missing(plan.state, work.leaving[i] - vapour, temperature)) without = plan.state;
  }
  if (!without) return success();
  const StateCurve& state = states_[*without];
  return Error{"step.no_heat_capacity", state.why_no_curve, "substance." + std::to_string(state.substance),
               "Type its heat capacity, or the cp of the whole mass."};
}

Trouble Model::evaluate(const std::vector<double>& v, Work& work) const {
  const Trouble trouble = amounts(v, work);
  if (trouble != Trouble::None) return trouble;
  upstream(v, work);
  downstream(v, work);
  return Trouble::None;
}

}  // namespace heatledger::step
