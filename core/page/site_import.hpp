// Copies rows of a site table into a worksheet.
#pragma once

#include "core/page/edits.hpp"

namespace heatledger::page {

/// The sheet with the rows of a site table that its equations use, each with the name of the table; rows that
/// an earlier copy of the same table left are taken out first. What is typed on the sheet stays and goes
/// before them.
/// @param text      of the site table file
/// @param all_rows  also those that no equation of the sheet uses
/// @errors those of read_site_table; site_table.nothing_used
Result<Edited> import_site_table(const document::Worksheet& sheet, std::string_view text, bool all_rows);

}  // namespace heatledger::page
