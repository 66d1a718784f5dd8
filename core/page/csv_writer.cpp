// Tables as CSV (RFC 4180): figures a spreadsheet can read, one table after the other with a blank line
// between.
#include "core/page/print_view.hpp"
#include "core/page/writers.hpp"

namespace heatledger::page {
namespace {

void replace_all(std::string& text, std::string_view from, std::string_view to) {
  for (std::size_t at = 0; (at = text.find(from, at)) != std::string::npos; at += to.size()) {
    text.replace(at, from.size(), to);
  }
}

bool is_figure(const std::string& text) {
  return !text.empty() && text.find_first_not_of("+-0123456789.") == std::string::npos;
}

std::string field(const Cell& cell) {
  std::string text = cell.text;
  if (cell.kind == CellKind::Number) {
    std::string plain = text;
    replace_all(plain, "\u2212", "-");
    replace_all(plain, "\u2009", "");
    if (is_figure(plain)) return plain;
  }
  // A text that begins like a formula would be run by a spreadsheet: it gets an apostrophe before it.
  if (!text.empty() && std::string_view("=+-@\t\r").find(text[0]) != std::string_view::npos)
    text.insert(0, "'");
  if (text.find_first_of(",\"\r\n") == std::string::npos) return text;
  replace_all(text, "\"", "\"\"");
  return "\"" + text + "\"";
}

void add_table(std::string& out, const Table& table) {
  bool headed = false;
  for (const Column& column : table.columns) headed = headed || !column.heading.empty();
  if (headed) {
    for (std::size_t i = 0; i < table.columns.size(); ++i) {
      Cell cell;
      cell.text = table.columns[i].heading;
      out += (i > 0 ? "," : "") + field(cell);
    }
    out += "\r\n";
  }
  for (const Row& row : table.rows) {
    bool first = true;
    for (const Cell& cell : row.cells) {
      if (!first) out += ',';
      first = false;
      out += field(cell);
      // A cell over several columns is followed by empty ones, so that columns stay under their headings.
      if (cell.span > 1) out.append(static_cast<std::size_t>(cell.span - 1), ',');
    }
    out += "\r\n";
  }
}

}  // namespace

std::string write_csv(const Page& page) {
  std::string out;
  for (const Block& block : print_view(page).blocks) {
    const Table* table = std::get_if<Table>(&block);
    if (table == nullptr) continue;
    if (!out.empty()) out += "\r\n";
    add_table(out, *table);
  }
  return out;
}

}  // namespace heatledger::page
