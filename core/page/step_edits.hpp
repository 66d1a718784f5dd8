// Edits of the cells of a step, and the commands that add, move and remove one.
#pragma once

#include "core/page/edits.hpp"

namespace heatledger::page {

/// @param step  index into Worksheet::steps
/// @param id    parts of the cell id, the step's own first
/// @errors edit.no_such_cell, edit.not_editable
Result<Edited> edit_step(const document::Worksheet& sheet, std::size_t step, const IdParts& id,
                         const std::string& text);

/// @param kind  name of a kind, see document/step_kinds.hpp
Edited add_step(const document::Worksheet& sheet, const std::string& kind);

/// add_step, remove_step, move_step. @errors command.argument, command.unknown
Result<Edited> step_command(const document::Worksheet& sheet, std::string_view name,
                            const std::map<std::string, std::string>& arguments);

}  // namespace heatledger::page
