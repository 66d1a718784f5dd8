#include "core/document/step_balance.hpp"

#include <algorithm>

#include "core/document/safety_reading.hpp"
#include "core/step/sought.hpp"
#include "core/units/quantity_text.hpp"

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
  const std::optional<std::string> name = slot_of_row(model.input(), id);
  const std::optional<std::size_t> slot = name ? model.slot(*name) : std::nullopt;
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
  const std::vector<step::FigureId> sought{step::headline(model)};
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

constexpr char kOwnHeat[] = "own.heat.", kOwnCapacity[] = "own.cp.";

std::optional<std::string> after(const std::string& text, const std::string& start) {
  return text.compare(0, start.size(), start) == 0 ? std::optional<std::string>(text.substr(start.size()))
                                                   : std::nullopt;
}

/// What the sheet under review was reckoned with, typed into "own.heat.N" by reaction and "own.cp.NAME" by
/// species.
step::OwnData own_data(const StepSheet& sheet, StepOutcome& outcome) {
  const step::StepInput& input = outcome.result->model->input();
  step::OwnData own;
  for (const auto& [cell, text] : sheet.checker) {
    const std::optional<std::string> heat = after(cell, kOwnHeat), capacity = after(cell, kOwnCapacity);
    if (!heat && !capacity) continue;
    const Result<units::TypedValue> read =
        heat ? units::parse_quantity(text, units::dimension::kEnergyPerMole) : units::parse_quantity(text);
    if (!read.ok()) {
      Error error = read.error();
      error.where = "checker." + cell;
      outcome.errors.push_back(std::move(error));
      continue;
    }
    for (std::size_t j = 0; heat && j < input.reactions.size(); ++j) {
      if (*heat == std::to_string(j)) own.reaction_heats[j] = read->value;
    }
    for (std::size_t i = 0; capacity && i < input.substances.size(); ++i) {
      if (*capacity != input.substances[i].name) continue;
      const bool by_mass = read->dimension() == units::dimension::kMassHeatCapacity;
      if (!(read->value > 0) || (!by_mass && read->dimension() != units::dimension::kMolarHeatCapacity)) {
        outcome.errors.push_back(Error{"step.figure",
                                       "A heat capacity is positive, per mole or per kilogram and kelvin.",
                                       "checker." + cell, "Type such as 75 J/(mol K)."});
        continue;
      }
      own.heat_capacities[i] = read->value * (by_mass ? outcome.result->model->molar_mass(i) : 1);
    }
  }
  return own;
}

/// The figures under review against ours, or where the sheet's own data are typed, against the same method
/// with those.
void review(const StepSheet& sheet, step::Lookups& lookups, StepOutcome& outcome) {
  std::map<std::string, std::string> figures;
  for (const auto& entry : sheet.checker) {
    if (!after(entry.first, "own.")) figures.insert(entry);
  }
  const step::OwnData own = own_data(sheet, outcome);
  if (!own.reaction_heats.empty() || !own.heat_capacities.empty()) {
    Result<step::StepResult> theirs = step::with_own_data(*outcome.result, lookups, own);
    if (theirs.ok()) {
      outcome.own = std::make_shared<const step::StepResult>(std::move(theirs).value());
    } else {
      Error error = theirs.error();
      error.message = "With the sheet's own data: " + error.message;
      outcome.errors.push_back(std::move(error));
    }
  }
  outcome.review = std::make_shared<const step::StepReview>(
      step::review_step(outcome.own != nullptr ? *outcome.own : *outcome.result, lookups, figures));
}

}  // namespace

void finish_balance(const StepSheet& sheet, step::Lookups& lookups, StepOutcome& outcome) {
  if (!sheet.curve.empty()) add_curve(outcome, sheet.curve);
  if (sheet.show_checker) review(sheet, lookups, outcome);
}

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
  finish_balance(sheet, lookups, outcome);
  outcome.findings = std::make_shared<const step::Findings>(
      safety_findings(sheet, context, *outcome.result, outcome.errors));
}

}  // namespace heatledger::document
