// The checker's column of a step: figures of the sheet under review beside ours, and its own data.
#pragma once

#include "core/page/step_blocks.hpp"

namespace heatledger::page {

/// Empty unless the column is shown.
std::vector<Block> step_checker_blocks(const StepView& view);

/// "ethene(g)" of one line of a stream.
std::string stream_species(const step::StepResult& result, const step::StreamLine& line);

}  // namespace heatledger::page
