// Through-flow and charge: read, solved, and drawn against a blank.
#pragma once

#include "core/document/step_computation.hpp"
#include "core/step/lookups.hpp"

namespace heatledger::document {

/// See KindOfStep::compute.
void compute_balance(const StepSheet& sheet, const StepContext& context, step::Lookups& lookups,
                     StepOutcome& outcome);

/// Curve against a blank and the checker's column of a balance that is solved.
void finish_balance(const StepSheet& sheet, step::Lookups& lookups, StepOutcome& outcome);

}  // namespace heatledger::document
