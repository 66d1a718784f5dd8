// What an edit or a command does to a worksheet: one state in, the next state out. Nothing here computes
// chemistry; session.hpp keeps the history around it.
#pragma once

#include <map>
#include <string>
#include <string_view>

#include "core/base/result.hpp"
#include "core/document/computation.hpp"

namespace heatledger::page {

/// A sheet after an edit and what the edit is called: "Undo edit equation".
struct Edited {
  document::Worksheet sheet;
  std::string label;
};

/// A cell id cut at its dots.
using IdParts = std::vector<std::string>;
IdParts split_id(std::string_view id);
/// An index as ids spell it: digits only, at most 6; empty otherwise.
std::optional<std::size_t> id_index(const std::string& text);

/// The text typed into a cell. Texts that cannot be read stay in the sheet where it can hold them.
/// @errors edit.no_such_cell; edit.not_editable; edit.coefficient (a coefficient that is no number: the sheet
/// stays)
Result<Edited> apply_edit(const document::Worksheet& sheet, const document::Results& results,
                          std::string_view cell, std::string_view text);

/// A command that changes the sheet; undo, folds and files are the session's.
/// @errors command.unknown, command.argument
Result<Edited> apply_command(const document::Worksheet& sheet, const document::Results& results,
                             std::string_view name, const std::map<std::string, std::string>& arguments);

/// Equation text with the coefficient of one species replaced ("" or "1" takes it away).
/// @param species  index into Reaction::species
/// @errors edit.coefficient
Result<std::string> with_coefficient(const balance::Reaction& reaction, std::size_t species,
                                     std::string_view text);

}  // namespace heatledger::page
