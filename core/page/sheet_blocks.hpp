// The blocks of a sheet that belong to no single reaction: title, typed bond values, assumptions, notes,
// conventions.
#pragma once

#include <map>
#include <string>
#include <vector>

#include "core/document/computation.hpp"
#include "core/page/page.hpp"

namespace heatledger::page {

std::vector<Block> title_blocks(const document::Header& header);
/// @param errors  of the typed bonds, see document::Results
std::vector<Block> typed_bond_blocks(const document::TypedBonds& bonds, const std::vector<Error>& errors);
std::vector<Block> assumption_blocks(const document::Lines& assumptions);
std::vector<Block> note_blocks(const document::Lines& notes);
/// The conventions that two engineers must share, as printed on every sheet.
std::vector<Block> convention_blocks();
/// What was found on opening: parts not understood, figures that no longer read as when the sheet was saved.
std::vector<Block> opening_blocks(const std::vector<Error>& not_understood,
                                  const std::vector<std::string>& changed_figures);

}  // namespace heatledger::page
