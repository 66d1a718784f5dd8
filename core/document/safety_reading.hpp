// Safety figures and utilities of a step whose balance is known, from the blanks typed for them.
#pragma once

#include "core/document/step_reading.hpp"
#include "core/safety/charge_safety.hpp"

namespace heatledger::document {

/// Blanks "td24", "td24_source", "technical_limit", "permissible_pressure", "free_volume", "free_section",
/// "time_to_maximum". Of a kind that has no such blank they are empty.
safety::SafetyInput read_safety(const StepSheet& sheet, const StepContext& context,
                                std::vector<Error>& errors);

/// Everything that a safety file and the utilities ask of a through-flow or charge step.
step::Findings safety_findings(const StepSheet& sheet, const StepContext& context,
                               const step::StepResult& result, std::vector<Error>& errors);

}  // namespace heatledger::document
