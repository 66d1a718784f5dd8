// Entries that worksheets and site tables have in common: typed bonds, figures of species, measured heats.
// What is of the wrong kind goes to `problems` with its field path and is kept in `unknown`.
#pragma once

#include "core/document/worksheet.hpp"
#include "core/file/json.hpp"

namespace heatledger::file {

document::TypedHeat read_heat(const Json& object, const std::string& path, std::vector<Error>& problems);
document::TypedBond read_typed_bond(const Json& object, const std::string& path,
                                    std::vector<Error>& problems);
document::TypedFigure read_typed_figure(const Json& object, const std::string& path,
                                        std::vector<Error>& problems);

}  // namespace heatledger::file
