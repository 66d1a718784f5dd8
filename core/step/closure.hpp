// Whether a step closes: heat summed line by line, elements in and out, and the duty once more from formation
// enthalpies.
#pragma once

#include "core/step/step.hpp"

namespace heatledger::step {

/// @param result  with its streams, heats and duty
Closure close(const StepResult& result, const Work& work);

}  // namespace heatledger::step
