// What a burning step answers: every figure with its ± and working, notes, cautions and drawings.
#pragma once

#include "core/burning/burn.hpp"
#include "core/step/findings.hpp"

namespace heatledger::burning {

/// ± by moving one source of error at a time to the end of its interval and working the step out anew: typed
/// figures, formation enthalpies of feeds and products, heat capacities of the products. Errors that two
/// figures share keep one source.
/// @errors as burn()
Result<step::Findings> answer(const BurnInput& input);

/// Flame temperature and flue gas against the air ratio, the point of the step marked.
std::vector<step::Chart> charts(const BurnInput& input, const Numbers& numbers);

/// Plain sentences where they apply.
std::vector<std::string> cautions(const BurnInput& input, const Numbers& numbers);

}  // namespace heatledger::burning
