#include "core/document/step_computation.hpp"

#include <algorithm>
#include <cmath>

#include "core/step/sought.hpp"

namespace heatledger::document {
namespace {

/// Steps in more points than a curve on paper can show.
constexpr int kCurvePoints = 25;

struct Key {
  std::shared_ptr<const StepSheet> sheet;
  std::vector<std::shared_ptr<const void>> stands_on;  ///< ledgers and steps above

  friend bool operator==(const Key& a, const Key& b) {
    return a.sheet == b.sheet && a.stands_on == b.stands_on;
  }
};

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

struct StepCalculator::Memory {
  step::Lookups lookups;
  struct Kept {
    Key key;
    std::shared_ptr<const StepOutcome> outcome;
  };
  std::map<std::string, std::vector<Kept>> kept;  ///< the last few of each step
};

StepCalculator::StepCalculator() : memory_(std::make_unique<Memory>()) {}
StepCalculator::~StepCalculator() = default;
StepCalculator::StepCalculator(StepCalculator&&) noexcept = default;
StepCalculator& StepCalculator::operator=(StepCalculator&&) noexcept = default;

std::vector<std::shared_ptr<const StepOutcome>> StepCalculator::compute(
    const std::vector<Shared<StepSheet>>& steps, const std::shared_ptr<balance::SpeciesSource>& species,
    const std::map<std::string, std::shared_ptr<const balance::Ledger>>& ledgers) {
  constexpr std::size_t kKept = 8;  // undo and redo over the last edits
  std::vector<std::shared_ptr<const StepOutcome>> outcomes;
  for (std::size_t s = 0; s < steps.size(); ++s) {
    const StepSheet& sheet = *steps[s];
    Key key{steps[s].handle(), {species}};
    for (const ProgressSheet& progress : sheet.reactions) {
      const auto found = ledgers.find(progress.reaction);
      key.stands_on.push_back(found == ledgers.end() ? nullptr : found->second);
    }
    for (const FeedSheet& feed : sheet.feeds) {
      for (std::size_t above = 0; above < s; ++above) {
        if (steps[above]->id == feed.from) key.stands_on.push_back(outcomes[above]);
      }
    }
    std::vector<Memory::Kept>& kept = memory_->kept[sheet.id];
    const auto known =
        std::find_if(kept.begin(), kept.end(), [&](const Memory::Kept& entry) { return entry.key == key; });
    if (known != kept.end()) {
      outcomes.push_back(known->outcome);
      continue;
    }
    StepContext context;
    context.species = species.get();
    context.ledger = [&](const std::string& id) -> std::shared_ptr<const balance::Ledger> {
      const auto found = ledgers.find(id);
      return found == ledgers.end() ? nullptr : found->second;
    };
    context.above = [&](const std::string& id) -> const step::StepResult* {
      for (std::size_t above = 0; above < s; ++above) {
        if (steps[above]->id == id) return outcomes[above]->result.get();
      }
      return nullptr;
    };
    StepReading reading = read_step(sheet, context);
    auto outcome = std::make_shared<StepOutcome>();
    outcome->library = species;
    outcome->errors = std::move(reading.errors);
    outcome->notes = std::move(reading.notes);
    if (outcome->errors.empty() && !sheet.feeds.empty()) {
      step::SolveOptions options;
      options.draws = reading.input.sought != "duty" || reading.input.kind == step::StepKind::Charge;
      Result<step::StepResult> solved = step::solve_step(std::move(reading.input), memory_->lookups, options);
      if (solved.ok()) {
        outcome->result = std::make_shared<const step::StepResult>(std::move(solved).value());
        if (!sheet.curve.empty()) add_curve(*outcome, sheet.curve);
        if (sheet.show_checker)
          outcome->review = std::make_shared<const step::StepReview>(
              step::review_step(*outcome->result, memory_->lookups, sheet.checker));
      } else {
        outcome->errors.push_back(solved.error());
      }
    }
    if (kept.size() >= kKept) kept.erase(kept.begin());
    kept.push_back({std::move(key), outcome});
    outcomes.push_back(std::move(outcome));
  }
  return outcomes;
}

}  // namespace heatledger::document
