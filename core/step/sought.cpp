#include "core/step/sought.hpp"

#include <algorithm>
#include <cmath>

#include "core/base/number_text.hpp"
#include "core/step/words.hpp"
#include "core/units/constants.hpp"

namespace heatledger::step {
namespace {

bool is_temperature(const Slot& slot) {
  return slot.dimension.kind == units::Kind::Temperature;
}

bool is_duty(const Model& model) {
  return model.sought() == model.duty_slot();
}

/// How much heat moves in the step, to tell what counts as closed.
double heat_scale(const Work& work) {
  return std::fabs(work.inlet_heat) + std::fabs(work.outlet_heat) + std::fabs(work.reaction_heat) +
         std::fabs(work.vessel_heat);
}

/// Where to look: evenly for temperatures and shares, in decades for what has no natural limit.
std::vector<double> points(const Model& model) {
  const Slot& slot = model.slots()[model.sought()];
  std::vector<double> x;
  if (is_temperature(slot) || slot.high <= 1) {
    constexpr int kSteps = 100;
    for (int i = 0; i <= kSteps; ++i) x.push_back(slot.low + (slot.high - slot.low) * i / kSteps);
    return x;
  }
  const bool both_ways = slot.low < 0;
  const double least = slot.low > 0 ? slot.low : 1e-9, most = slot.high;
  // Four points a decade; multiples of the fourth root of ten by multiplication, so that they are the same
  // everywhere.
  constexpr double kFourthRoot = 1.7782794100389228;
  for (double at = least; at < most; at *= kFourthRoot) x.push_back(at);
  x.push_back(most);
  if (!(slot.low > 0)) x.insert(x.begin(), 0.0);
  if (both_ways) {
    std::vector<double> mirrored;
    for (std::size_t i = x.size(); i-- > 1;) mirrored.push_back(-x[i]);
    x.insert(x.begin(), mirrored.begin(), mirrored.end());
  }
  return x;
}

Error no_solution(const Model& model, const Search& search) {
  const Slot& slot = model.slots()[model.sought()];
  const bool flow = model.input().kind == StepKind::ThroughFlow;
  if (!search.lowest) {
    return Error{"step.no_solution",
                 "No value of the " + slot.label +
                     " leaves amounts that can be: a reaction always takes more than there is.",
                 slot.id, "Look at the conversions and the amounts fed."};
  }
  const std::string near = value_text(search.nearest_x, slot.dimension, flow);
  return Error{"step.no_solution",
               "No " + slot.label + " from " + value_text(search.first_x, slot.dimension, flow) + " to " +
                   value_text(search.last_x, slot.dimension, flow) + " closes the balance; nearest, at " +
                   near + ", " + heat_text(std::fabs(search.nearest), flow) +
                   (search.nearest > 0 ? " of heat are still missing." : " of heat are left over."),
               slot.id, "Look at the duty, the amounts and the temperatures that are typed."};
}

Error several(const Model& model, const Search& search) {
  const Slot& slot = model.slots()[model.sought()];
  const bool flow = model.input().kind == StepKind::ThroughFlow;
  std::string list;
  for (std::size_t i = 0; i < search.roots.size(); ++i) {
    if (i != 0) list += i + 1 == search.roots.size() ? " and " : ", ";
    list += value_text(search.roots[i], slot.dimension, flow);
  }
  return Error{"step.several_solutions",
               "More than one value of the " + slot.label + " closes the balance: " + list + ".", slot.id,
               "Type the one that is meant and seek another blank."};
}

}  // namespace

Error trouble_error(const Model& model, Trouble trouble, const Work& work) {
  switch (trouble) {
    case Trouble::Exhausted: {
      const std::string& name = model.input().substances[work.culprit].name;
      return Error{"step.exhausted",
                   "The reactions take more " + name + " than there is: " +
                       amount_text(work.gross[work.culprit] - work.leaving[work.culprit],
                                   model.input().kind == StepKind::ThroughFlow) +
                       " of " +
                       amount_text(work.gross[work.culprit], model.input().kind == StepKind::ThroughFlow) +
                       ".",
                   "reactions", "Lower a conversion, or feed more " + name + "."};
    }
    case Trouble::Undetermined:
      return Error{
          "step.progress",
          "The progress figures do not settle how far each reaction goes: two of them say the same, or one "
          "refers to a species that is not there.",
          "reactions", "Give one figure for each reaction; with selectivities, one total conversion."};
    case Trouble::Backwards:
      return Error{"step.above_whole",
                   "The conversions and selectivities of " + model.input().substances[work.culprit].name +
                       " add up to more than 100 %.",
                   "reactions", "Lower one of them."};
    case Trouble::BadShare:
      return Error{"step.shares", "The shares of a feed add up to more than 100 %, or to nothing.", "feeds",
                   "Correct the shares; one blank share is the rest."};
    case Trouble::None:
      break;
  }
  return Error{"step.progress", "The step cannot be computed.", "reactions", "Look at its figures."};
}

std::optional<double> heat_missing(const Model& model, std::vector<double>& v, Work& work, double x) {
  v[model.sought()] = x;
  if (model.outlet_sought()) {
    // Amounts do not depend on how warm they leave: only the outlet changes.
    model.downstream(v, work);
  } else if (model.evaluate(v, work) != Trouble::None) {
    return std::nullopt;
  }
  return work.needed - v[model.duty_slot()];
}

Status solve_sought(const Model& model, std::vector<double>& v, Work& work) {
  if (is_duty(model)) {
    if (const Trouble trouble = model.evaluate(v, work); trouble != Trouble::None)
      return trouble_error(model, trouble, work);
    v[model.duty_slot()] = work.needed;
    return success();
  }
  if (model.outlet_sought()) {
    if (const Trouble trouble = model.amounts(v, work); trouble != Trouble::None)
      return trouble_error(model, trouble, work);
    model.upstream(v, work);
  }
  double scale = 0;
  const Function f = [&](double x) {
    const std::optional<double> missing = heat_missing(model, v, work, x);
    if (missing) scale = std::max(scale, heat_scale(work));
    return missing;
  };
  const Search search = find_roots(f, points(model), 0);
  // A balance that never moves by more than rounding has nothing to do with this blank.
  if (search.lowest &&
      *search.highest - *search.lowest <= 1e-13 * (scale + std::fabs(v[model.duty_slot()]))) {
    const Slot& slot = model.slots()[model.sought()];
    return Error{"step.no_influence", "The " + slot.label + " does not change the balance.", slot.id,
                 "Seek a blank that does."};
  }
  if (search.roots.empty()) {
    if (!search.lowest) {  // say what is wrong with the numbers themselves, if it is not the sought blank
      std::vector<double> start = v;
      start[model.sought()] = model.slots()[model.sought()].low;
      const Trouble trouble = model.evaluate(start, work);
      if (trouble != Trouble::None && trouble != Trouble::Exhausted)
        return trouble_error(model, trouble, work);
    }
    return no_solution(model, search);
  }
  if (search.roots.size() > 1) return several(model, search);
  const std::optional<double> closed = heat_missing(model, v, work, search.roots.front());
  CHECK(closed.has_value(), "the balance has a value at its root");
  return success();
}

bool solve_near(const Model& model, std::vector<double>& v, Work& work, double known_slope) {
  const std::size_t s = model.sought();
  const Slot& slot = model.slots()[s];
  if (is_duty(model) || model.outlet_sought()) {
    if (model.amounts(v, work) != Trouble::None) return false;
    model.upstream(v, work);
    if (is_duty(model)) {
      model.downstream(v, work);
      v[s] = work.needed;
      return true;
    }
  }
  double a = v[s];
  std::optional<double> fa = heat_missing(model, v, work, a);
  if (!fa) return false;
  const double tolerance = 1e-11 * (heat_scale(work) + std::fabs(v[model.duty_slot()]));
  if (std::fabs(*fa) <= tolerance) return true;
  double step = is_temperature(slot) ? 1.0 : (a != 0 ? 1e-3 * a : 1e-6);
  if (known_slope != 0) step = -*fa / known_slope;
  if (!(a + step <= slot.high && a + step >= slot.low)) step = -1e-3 * step;
  double b = a + step;
  std::optional<double> fb = heat_missing(model, v, work, b);
  for (int turn = 0; turn < 40 && fb; ++turn) {
    if (std::fabs(*fb) <= tolerance) return true;
    const double slope = (*fb - *fa) / (b - a);
    if (slope == 0) return false;
    const double next = std::min(slot.high, std::max(slot.low, b - *fb / slope));
    if (next == b) return false;  // held at a limit: no answer within
    a = b, fa = fb;
    b = next;
    fb = heat_missing(model, v, work, b);
  }
  return false;
}

}  // namespace heatledger::step
