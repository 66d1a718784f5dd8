// Finds things on a page for the suites of this folder.
#pragma once

#include <string>

#include "core/page/session.hpp"

namespace heatledger::page::test {

/// The cell of that id; nullptr when the page has none.
inline const Cell* find_cell(const Page& page, const std::string& id) {
  for (const Block& block : page.blocks) {
    const Table* table = std::get_if<Table>(&block);
    if (table == nullptr) continue;
    for (const Row& row : table->rows) {
      for (const Cell& cell : row.cells) {
        if (cell.id == id) return &cell;
      }
    }
  }
  return nullptr;
}

/// Text of a cell; "(no such cell)" when there is none.
inline std::string text_of(Session& session, const std::string& id) {
  const Cell* cell = find_cell(session.page(), id);
  return cell == nullptr ? "(no such cell)" : cell->text;
}

inline const Note* find_note(const Page& page, const std::string& id) {
  for (const Block& block : page.blocks) {
    const Note* note = std::get_if<Note>(&block);
    if (note != nullptr && note->id == id) return note;
  }
  return nullptr;
}

inline const Block* find_block(const Page& page, const std::string& id) {
  for (const Block& block : page.blocks) {
    if (block_id(block) == id) return &block;
  }
  return nullptr;
}

}  // namespace heatledger::page::test
