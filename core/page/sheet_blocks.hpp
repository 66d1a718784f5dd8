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
/// @param errors  of the sheet, see document::Results; those of typed bonds are shown
std::vector<Block> typed_bond_blocks(const document::TypedBonds& bonds, const std::vector<Error>& errors);
/// The table of named quantities, each with what it comes to.
std::vector<Block> quantity_blocks(const document::NamedQuantities& typed,
                                   const document::ReadQuantities& read, const std::vector<Error>& errors);
/// Figures of species typed on the sheet, each with the published figure that it covers.
std::vector<Block> typed_species_blocks(const document::TypedFigures& figures,
                                        const document::SheetLibrary& library);
/// One note that counts the typed figures without a ±, with a blank that gives them one; nothing when there
/// are none.
/// @param exact     see document::Results
/// @param rejected  error of the last ± typed there; null: none
std::vector<Block> exact_blocks(const std::vector<std::string>& exact, const document::Worksheet& sheet,
                                const Error* rejected);
/// The cell that a field path of document::Results belongs to: "fact.2.value" for "species[2].value, offset
/// 3". Empty for any other text.
std::string cell_of_path(const std::string& path, const document::Worksheet& sheet);
std::vector<Block> assumption_blocks(const document::Lines& assumptions);
std::vector<Block> note_blocks(const document::Lines& notes);
/// The conventions that two engineers must share, as printed on every sheet.
std::vector<Block> convention_blocks();
/// What was found on opening: parts not understood, figures that no longer read as when the sheet was saved.
std::vector<Block> opening_blocks(const std::vector<Error>& not_understood,
                                  const std::vector<std::string>& changed_figures);

}  // namespace heatledger::page
