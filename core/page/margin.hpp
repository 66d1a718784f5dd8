// The margin of the sheet: value, working with the figures put in, sources, why routes differ, cautions, for
// one cell.
#pragma once

#include <string_view>

#include "core/base/result.hpp"
#include "core/document/computation.hpp"
#include "core/page/page.hpp"

namespace heatledger::page {

/// @errors edit.no_such_cell
Result<Margin> make_margin(const document::Worksheet& sheet, const document::Results& results,
                           const Cell& cell);

}  // namespace heatledger::page
