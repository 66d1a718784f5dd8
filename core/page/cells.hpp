// Cells as the builders of this room spell them.
#pragma once

#include <string>
#include <utility>

#include "core/page/page.hpp"

namespace heatledger::page {

inline Cell label_cell(std::string text, Tone tone = Tone::Plain, int span = 1) {
  Cell cell;
  cell.text = std::move(text);
  cell.tone = tone;
  cell.span = span;
  return cell;
}

/// A figure that can be pointed at; an empty text gives an empty cell that cannot.
inline Cell figure_cell(std::string id, std::string text, Tone tone = Tone::Plain,
                        Origin origin = Origin::Derived) {
  Cell cell;
  cell.kind = CellKind::Number;
  cell.tone = tone;
  if (text.empty()) return cell;
  cell.id = std::move(id);
  cell.text = std::move(text);
  cell.origin = origin;
  cell.has_working = true;
  return cell;
}

inline Cell typed_cell(std::string id, std::string text, std::string hint, CellKind kind = CellKind::Text) {
  Cell cell;
  cell.id = std::move(id);
  cell.edit_text = text;
  cell.text = std::move(text);
  cell.hint = std::move(hint);
  cell.kind = kind;
  cell.origin = Origin::Typed;
  cell.editable = true;
  return cell;
}

inline Cell button_cell(std::string id, std::string text, std::string hint = {}) {
  Cell cell;
  cell.id = std::move(id);
  cell.text = std::move(text);
  cell.hint = std::move(hint);
  cell.kind = CellKind::Button;
  cell.editable = true;
  return cell;
}

inline Column column(std::string id, std::string heading, Align align = Align::Left, double width = 0) {
  Column one;
  one.id = std::move(id);
  one.heading = std::move(heading);
  one.align = align;
  one.width = width;
  return one;
}

inline Row row_of(std::string id, RowRole role = RowRole::Body) {
  Row row;
  row.id = std::move(id);
  row.role = role;
  return row;
}

inline Note note_block(std::string id, NoteKind kind, std::string text, std::vector<std::string> cells = {}) {
  Note note;
  note.id = std::move(id);
  note.kind = kind;
  note.text = std::move(text);
  note.cells = std::move(cells);
  return note;
}

inline Heading heading_block(std::string id, std::string text, std::string aside = {}) {
  Heading heading;
  heading.id = std::move(id);
  heading.text = std::move(text);
  heading.aside = std::move(aside);
  return heading;
}

}  // namespace heatledger::page
