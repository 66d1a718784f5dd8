// A page as Markdown with pipe tables, for tickets, wikis and mail: the printed sheet without its drawings.
#include <algorithm>

#include "core/page/print_view.hpp"
#include "core/page/writers.hpp"

namespace heatledger::page {
namespace {

/// Text from a sheet stays text: what Markdown would take for a mark is escaped.
std::string escaped(const std::string& text) {
  constexpr std::string_view kMarks = "\\`*_[]<>|#";
  std::string out;
  for (const char c : text) {
    if (c == '\n' || c == '\r') {
      out += ' ';
      continue;
    }
    if (kMarks.find(c) != std::string_view::npos) out += '\\';
    out += c;
  }
  return out;
}

std::string shown(const Cell& cell, const Row& row) {
  const std::string text = escaped(cell.text);
  const bool strong = row.role == RowRole::Result || cell.tone == Tone::Strong;
  return strong && !text.empty() ? "**" + text + "**" : text;
}

void add_table(std::string& out, const Table& table) {
  if (table.look == TableLook::Banner) {
    for (const Row& row : table.rows) {
      for (const Cell& cell : row.cells) {
        if (cell.text.empty()) continue;
        out += (row.role == RowRole::Result ? "# " : "") + escaped(cell.text) + "\n\n";
      }
    }
    return;
  }
  const auto line = [&](const auto& text_of, std::size_t columns) {
    out += '|';
    for (std::size_t i = 0; i < columns; ++i) out += " " + text_of(i) + " |";
    out += '\n';
  };
  const std::size_t columns = table.columns.size();
  if (columns == 0) return;
  line([&](std::size_t i) { return escaped(table.columns[i].heading); }, columns);
  line(
      [&](std::size_t i) {
        const Align align = table.columns[i].align;
        return std::string(align == Align::Right ? "---:" : align == Align::Centre ? ":---:" : "---");
      },
      columns);
  for (const Row& row : table.rows) {
    std::vector<std::string> cells;
    for (const Cell& cell : row.cells) {
      cells.push_back(shown(cell, row));
      cells.resize(cells.size() + static_cast<std::size_t>(std::max(1, cell.span)) - 1);
    }
    cells.resize(columns);
    line([&](std::size_t i) { return cells[i]; }, columns);
  }
  out += '\n';
}

const char* word_of(NoteKind kind) {
  switch (kind) {
    case NoteKind::Caution:
      return "Caution: ";
    case NoteKind::Error:
      return "Error: ";
    case NoteKind::Disagreement:
      return "Disagreement: ";
    case NoteKind::Assumption:
      return "Assumption: ";
    case NoteKind::Info:
      return "";
  }
  return "";
}

}  // namespace

std::string write_markdown(const Page& page) {
  std::string out;
  const Page printed = print_view(page, false);
  for (const Block& block : printed.blocks) {
    if (const Heading* heading = std::get_if<Heading>(&block)) {
      out += (heading->level <= 1 ? "# " : "## ") + escaped(heading->text);
      if (!heading->aside.empty()) out += " (" + escaped(heading->aside) + ")";
      out += "\n\n";
    } else if (const Table* table = std::get_if<Table>(&block)) {
      add_table(out, *table);
    } else if (const Note* note = std::get_if<Note>(&block)) {
      out += "> " + std::string(word_of(note->kind)) + escaped(note->text) + "\n\n";
    }
  }
  while (out.size() > 1 && out[out.size() - 2] == '\n' && out.back() == '\n') out.pop_back();
  return out;
}

}  // namespace heatledger::page
