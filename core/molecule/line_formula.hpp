// Condensed line formulas (CH3CH2OH, (CH3)2CO, C6H5CH3, CH3COOH) to graphs, only where they are unambiguous.
#pragma once

#include <string_view>

#include "core/base/result.hpp"
#include "core/molecule/graph.hpp"

namespace heatledger::molecule {

/// @errors line_formula.ambiguous, line_formula.not_condensed: the text has no single reading as a structure
Result<Graph> parse_line_formula(std::string_view text);

}  // namespace heatledger::molecule
