// Heat of solution against strength, with the working point.
#pragma once

#include "core/step/findings.hpp"
#include "core/step/step.hpp"

namespace heatledger::mixing {

/// One chart for each solute that is dissolved or diluted here.
void add_charts(step::Findings& findings, const step::StepResult& result);

}  // namespace heatledger::mixing
