#include "core/document/step_computation.hpp"

#include <algorithm>

#include "core/document/step_kinds.hpp"

namespace heatledger::document {
namespace {

struct Key {
  std::shared_ptr<const StepSheet> sheet;
  std::vector<std::shared_ptr<const void>> stands_on;  ///< ledgers and steps above

  friend bool operator==(const Key& a, const Key& b) {
    return a.sheet == b.sheet && a.stands_on == b.stands_on;
  }
};

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
    const std::map<std::string, std::shared_ptr<const balance::Ledger>>& ledgers,
    const std::shared_ptr<const ReadQuantities>& quantities) {
  constexpr std::size_t kKept = 8;  // undo and redo over the last edits
  std::vector<std::shared_ptr<const StepOutcome>> outcomes;
  for (std::size_t s = 0; s < steps.size(); ++s) {
    const StepSheet& sheet = *steps[s];
    Key key{steps[s].handle(), {species, quantities}};
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
    context.names = &quantities->names;
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
    auto outcome = std::make_shared<StepOutcome>();
    outcome->library = species;
    kind_of(sheet).compute(sheet, context, memory_->lookups, *outcome);
    if (kept.size() >= kKept) kept.erase(kept.begin());
    kept.push_back({std::move(key), outcome});
    outcomes.push_back(std::move(outcome));
  }
  return outcomes;
}

}  // namespace heatledger::document
