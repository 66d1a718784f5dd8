// A mixing step: feeds, what reacts between them, and what the mixture does.
#pragma once

#include "core/document/step_computation.hpp"
#include "core/step/lookups.hpp"

namespace heatledger::document {

/// See KindOfStep::compute.
void compute_mixing(const StepSheet& sheet, const StepContext& context, step::Lookups& lookups,
                    StepOutcome& outcome);

}  // namespace heatledger::document
