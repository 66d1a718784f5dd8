// What the figures of a sheet read now, to be kept in its file: a reader sees when a recomputation differs.
#pragma once

#include <string>
#include <vector>

#include "core/document/computation.hpp"
#include "core/file/worksheet_file.hpp"

namespace heatledger::page {

/// The digest covers rounded text only, so that it is the same natively and in WebAssembly.
file::SavedResults results_to_save(const document::Worksheet& sheet, const document::Results& results);

/// One sentence for each figure that does not read as it did when the sheet was saved; empty when all agree
/// or the file holds no results.
std::vector<std::string> changed_figures(const document::Worksheet& sheet, const file::SavedResults& saved,
                                         const file::SavedResults& now);

}  // namespace heatledger::page
