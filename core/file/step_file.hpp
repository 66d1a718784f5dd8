// A process step in the worksheet file.
#pragma once

#include "core/document/step_sheet.hpp"
#include "core/file/json.hpp"

namespace heatledger::file {

/// Members in canonical order, empty ones left out, unknown ones at the end.
Json step_json(const document::StepSheet& step);

/// Reads one step. What is of another kind than expected is kept as unknown and reported.
/// @param path      of the object, "steps[0]"
/// @param problems  gets file.wrong_kind
document::StepSheet read_step_sheet(const Json& object, const std::string& path,
                                    std::vector<Error>& problems);

}  // namespace heatledger::file
