#include "core/document/step_balance.hpp"

#include <algorithm>

#include "core/step/sought.hpp"

namespace heatledger::document {
namespace {

/// Steps in more points than a curve on paper can show.
constexpr int kCurvePoints = 25;

/// From half to one and a half times the figure typed; shares over their whole range, temperatures 100 K
/// around.
std::pair<double, double> curve_range(const step::Slot& slot) {
  if (slot.dimension.kind == units::Kind::Temperature)
    return {std::max(slot.low, slot.value - 100), std::min(slot.high, slot.value + 100)};
  if (slot.high <= 1) return {slot.low, slot.high};
  const double a = 0.5 * slot.value, b = 1.5 * slot.value;
  return {std::max(slot.low, std::min(a, b)), std::min(slot.high, std::max(a, b))};
}

void add_curve(StepOutcome& outcome, const std::string& id) {
  const step::Model& model = *outcome.result->model;
  const std::optional<std::size_t> slot = model.slot(id);
  if (!slot || !model.slots()[*slot].blank || *slot == model.sought()) {
    outcome.errors.push_back(Error{"step.not_a_blank",
                                   "The curve is drawn against a blank of the step that is typed.", "curve",
                                   "Choose another one."});
    return;
  }
  outcome.curve_label = model.slots()[*slot].label;
  outcome.curve_dimension = model.slots()[*slot].dimension;
  const auto [from, to] = curve_range(model.slots()[*slot]);
  if (!(to > from)) return;
  const std::vector<step::FigureId> sought{step::FigureId::Sought};
  for (int i = 0; i <= kCurvePoints; ++i) {
    std::vector<double> v = outcome.result->values;
    step::Work work;
    const double x = from + (to - from) * i / kCurvePoints;
    v[*slot] = x;
    if (!step::solve_near(model, v, work)) continue;
    const auto spread = step::first_order(model, sought, v);
    if (!spread[0]) continue;
    outcome.curve.push_back({x, spread[0]->value.value(), spread[0]->value.u95()});
  }
}

}  // namespace

void compute_balance(const StepSheet& sheet, const StepContext& context, step::Lookups& lookups,
                     StepOutcome& outcome) {
  StepReading reading = read_step(sheet, context);
  outcome.errors = std::move(reading.errors);
  outcome.notes = std::move(reading.notes);
  if (!outcome.errors.empty() || sheet.feeds.empty()) return;
  step::SolveOptions options;
  options.draws = reading.input.sought != "duty" || reading.input.kind == step::StepKind::Charge;
  Result<step::StepResult> solved = step::solve_step(std::move(reading.input), lookups, options);
  if (!solved.ok()) {
    outcome.errors.push_back(solved.error());
    return;
  }
  outcome.result = std::make_shared<const step::StepResult>(std::move(solved).value());
  if (!sheet.curve.empty()) add_curve(outcome, sheet.curve);
  if (sheet.show_checker)
    outcome.review =
        std::make_shared<const step::StepReview>(step::review_step(*outcome.result, lookups, sheet.checker));
}

}  // namespace heatledger::document
