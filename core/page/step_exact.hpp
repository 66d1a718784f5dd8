// Typed inputs of a step that stand without a ±, and one entry that gives all of them one.
#pragma once

#include <string>

#include "core/base/result.hpp"
#include "core/document/step_sheet.hpp"

namespace heatledger::page {

/// Gives a ± to every typed quantity of the step that has none: a share ("1 %") to all but temperatures, a
/// difference ("1 K") to temperatures. Texts that are no plain quantity stay as they are.
/// @return how many were given one
/// @errors edit.half_width: neither a percentage nor a temperature difference above zero
Result<int> give_half_width_to_step(document::StepSheet& step, const std::string& spread);

}  // namespace heatledger::page
