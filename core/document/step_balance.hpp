// Through-flow and charge: read, solved, and drawn against a blank.
#pragma once

#include "core/document/step_computation.hpp"
#include "core/step/lookups.hpp"

namespace heatledger::document {

/// See KindOfStep::compute.
void compute_balance(const StepSheet& sheet, const StepContext& context, step::Lookups& lookups,
                     StepOutcome& outcome);

}  // namespace heatledger::document
