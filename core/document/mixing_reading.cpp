#include "core/document/mixing_reading.hpp"

#include "core/document/step_balance.hpp"
#include "core/mixing/mixing.hpp"

namespace heatledger::document {

void compute_mixing(const StepSheet& sheet, const StepContext& context, step::Lookups& lookups,
                    StepOutcome& outcome) {
  StepReading reading = read_step(sheet, context);
  outcome.errors = std::move(reading.errors);
  outcome.notes = std::move(reading.notes);
  if (!outcome.errors.empty() || sheet.feeds.empty()) return;
  Result<mixing::Mixed> mixed = mixing::mix(std::move(reading.input), lookups);
  if (!mixed.ok()) {
    outcome.errors.push_back(mixed.error());
    return;
  }
  outcome.result = std::make_shared<const step::StepResult>(std::move(mixed->result));
  outcome.findings = std::make_shared<const step::Findings>(std::move(mixed->findings));
  finish_balance(sheet, lookups, outcome);
}

}  // namespace heatledger::document
