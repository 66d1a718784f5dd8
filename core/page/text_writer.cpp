// A page for a terminal: columns lined up by what a character takes on screen, the spine drawn between broken
// and formed, long texts wrapped.
#include <algorithm>

#include "core/base/utf8.hpp"
#include "core/page/print_view.hpp"
#include "core/page/writers.hpp"

namespace heatledger::page {
namespace {

constexpr std::string_view kRule = "\u2500";
constexpr std::string_view kSpine = "\u2502";

std::string repeat(std::string_view piece, std::size_t times) {
  std::string out;
  for (std::size_t i = 0; i < times; ++i) out += piece;
  return out;
}

std::size_t width_of(std::string_view text) {
  return utf8::display_width(text);
}

std::string padded(const std::string& text, std::size_t width, Align align) {
  const std::size_t taken = width_of(text);
  if (taken >= width) return text;
  const std::size_t left = align == Align::Right    ? width - taken
                           : align == Align::Centre ? (width - taken) / 2
                                                    : 0;
  return std::string(left, ' ') + text + std::string(width - taken - left, ' ');
}

/// Lines of at most `width` columns, broken at blanks; a word that is longer stands alone.
std::vector<std::string> wrapped(const std::string& text, std::size_t width) {
  std::vector<std::string> lines;
  std::string line;
  std::size_t taken = 0, at = 0;
  while (at < text.size()) {
    const std::size_t end = std::min(text.find(' ', at), text.size());
    const std::string word = text.substr(at, end - at);
    at = end + 1;
    if (word.empty()) continue;
    const std::size_t needed = width_of(word);
    if (!line.empty() && taken + 1 + needed > width) {
      lines.push_back(std::move(line));
      line.clear();
      taken = 0;
    }
    if (!line.empty()) {
      line += ' ';
      ++taken;
    }
    line += word;
    taken += needed;
  }
  lines.push_back(std::move(line));
  return lines;
}

void add_line(std::string& out, std::string line) {
  line.erase(line.find_last_not_of(' ') + 1);
  out += line;
  out += '\n';
}

class TextWriter {
 public:
  explicit TextWriter(std::size_t width) : width_(width) {}

  std::string write(const Page& page) {
    const Block* above = nullptr;
    for (const Block& block : page.blocks) {
      if (above != nullptr && stands_apart(*above) && stands_apart(block)) blank_line();
      std::visit([this](const auto& any) { add(any); }, block);
      above = &block;
    }
    return std::move(out_);
  }

 private:
  /// Tables of their own that would run together; the ledger belongs to the form above it.
  static bool stands_apart(const Block& block) {
    const Table* table = std::get_if<Table>(&block);
    return table != nullptr && table->look != TableLook::Banner && table->look != TableLook::Ledger;
  }

  void blank_line() {
    if (!out_.empty() && (out_.size() < 2 || out_[out_.size() - 2] != '\n')) out_ += '\n';
  }

  void add(const Heading& heading) {
    blank_line();
    const std::size_t taken =
        width_of(heading.text) + (heading.aside.empty() ? 0 : width_of(heading.aside) + 1);
    const std::size_t rule = taken + 3 < width_ ? width_ - taken - 1 : 2;
    add_line(out_,
             heading.text + " " + repeat(kRule, rule) + (heading.aside.empty() ? "" : " " + heading.aside));
  }

  void add(const Drawing&) {}  // its figures stand in the tables beside it

  void add(const Note& note) {
    std::string lead;
    switch (note.kind) {
      case NoteKind::Info:
        break;
      case NoteKind::Assumption:
        lead = "Assumed: ";
        break;
      case NoteKind::Caution:
        lead = "Caution: ";
        break;
      case NoteKind::Disagreement:
        lead = "Differs: ";
        break;
      case NoteKind::Error:
        lead = "Error: ";
        break;
    }
    for (const std::string& line : wrapped(lead + note.text, width_)) add_line(out_, line);
  }

  void add(const Table& table) {
    if (table.look == TableLook::Banner) return add_banner(table);
    if (table.columns.size() == 1 || (table.look == TableLook::List && table.columns.size() == 2))
      return add_lines(table);
    add_grid(table);
  }

  /// Cells left and right of a line; a right one that does not fit stands on a line of its own.
  void add_banner(const Table& table) {
    for (const Row& row : table.rows) {
      std::string left, right;
      std::size_t at = 0;
      for (const Cell& cell : row.cells) {
        const bool to_right = at < table.columns.size() && table.columns[at].align == Align::Right;
        at += static_cast<std::size_t>(std::max(cell.span, 1));
        (to_right ? right : left) += cell.text;
      }
      const std::size_t taken = width_of(left) + width_of(right);
      if (right.empty()) {
        for (const std::string& line : wrapped(left, width_)) add_line(out_, line);
      } else if (taken + 2 <= width_) {
        add_line(out_, left + std::string(width_ - taken, ' ') + right);
      } else {
        for (const std::string& line : wrapped(left, width_)) add_line(out_, line);
        add_line(out_, padded(right, width_, Align::Right));
      }
    }
  }

  /// Running texts, the first column (if there are two) as a mark before them.
  void add_lines(const Table& table) {
    std::size_t mark = 0;
    for (const Row& row : table.rows) {
      if (row.cells.size() > 1) mark = std::max(mark, width_of(row.cells[0].text) + 1);
    }
    for (const Row& row : table.rows) {
      const std::string lead = row.cells.size() > 1 ? padded(row.cells[0].text, mark, Align::Left) : "";
      bool first = true;
      for (const std::string& line :
           wrapped(row.cells.back().text, width_ > mark + 20 ? width_ - mark : 20)) {
        add_line(out_, (first ? lead : std::string(mark, ' ')) + line);
        first = false;
      }
    }
  }

  /// Widest text of each column among the cells that take one column; wide ones push the last column they
  /// take.
  static std::vector<std::size_t> column_widths(const Table& table) {
    std::vector<std::size_t> widths;
    for (const Column& column : table.columns) widths.push_back(width_of(column.heading));
    for (const Row& row : table.rows) {
      std::size_t at = 0;
      for (const Cell& cell : row.cells) {
        const auto span = static_cast<std::size_t>(std::max(cell.span, 1));
        if (span == 1 && at < widths.size()) {
          const std::size_t lead = at == 0 ? indent(row) : 0;
          widths[at] = std::max(widths[at], width_of(cell.text) + lead);
        }
        at += span;
      }
    }
    for (const Row& row : table.rows) {
      std::size_t at = 0;
      for (const Cell& cell : row.cells) {
        const auto span = static_cast<std::size_t>(std::max(cell.span, 1));
        if (span > 1 && at + span <= widths.size()) {
          std::size_t room = kGap * (span - 1);
          for (std::size_t i = at; i < at + span; ++i) room += widths[i];
          const std::size_t needed = width_of(cell.text) + (at == 0 ? indent(row) : 0);
          if (needed > room) widths[at] += std::min(needed - room, kMostPush);
        }
        at += span;
      }
    }
    return widths;
  }

  static std::size_t indent(const Row& row) {
    return row.role == RowRole::Detail || row.role == RowRole::Correction ? 2 : 0;
  }

  /// A last column of texts gives way: it is wrapped into what the line has left for it.
  void narrow_last(const Table& table, std::vector<std::size_t>& widths) const {
    if (table.columns.back().align != Align::Left) return;
    std::size_t before = 0;
    for (std::size_t i = 0; i + 1 < widths.size(); ++i) before += widths[i] + kGap;
    const std::size_t room = width_ > before + kLeastLast ? width_ - before : kLeastLast;
    widths.back() = std::min(widths.back(), room);
  }

  void add_grid(const Table& table) {
    std::vector<std::size_t> widths = column_widths(table);
    narrow_last(table, widths);
    const bool headed = std::any_of(table.columns.begin(), table.columns.end(),
                                    [](const Column& column) { return !column.heading.empty(); });
    std::size_t total = 0;
    for (const std::size_t width : widths) total += width + kGap;
    if (headed) {
      std::string line;
      for (std::size_t i = 0; i < table.columns.size(); ++i) {
        line += padded(table.columns[i].heading, widths[i], table.columns[i].align) + gap(table, i);
      }
      add_line(out_, line);
      add_line(out_, repeat(kRule, total - kGap));
    }
    for (const Row& row : table.rows) {
      if (row.role == RowRole::Subtotal) add_line(out_, repeat(kRule, total - kGap));
      add_row(table, row, widths);
    }
  }

  /// What stands between a column and the next: blanks, or the spine.
  static std::string gap(const Table& table, std::size_t column) {
    if (column + 1 >= table.columns.size()) return {};
    return table.columns[column].spine_after ? " " + std::string(kSpine) + " " : std::string(kGap, ' ');
  }

  void add_row(const Table& table, const Row& row, const std::vector<std::size_t>& widths) {
    std::string line;
    std::vector<std::string> rest;  // further lines of a last cell that was wrapped
    std::size_t at = 0, indent_of_rest = 0;
    for (const Cell& cell : row.cells) {
      const auto span = static_cast<std::size_t>(std::max(cell.span, 1));
      const std::size_t last = std::min(at + span, widths.size()) - 1;
      std::size_t room = kGap * (last - at);
      for (std::size_t i = at; i <= last; ++i) room += widths[i];
      std::string text = (at == 0 ? std::string(indent(row), ' ') : "") + cell.text;
      if (at > 0 && last + 1 == widths.size() && width_of(text) > room) {
        rest = wrapped(text, room);
        text = rest.front();
        rest.erase(rest.begin());
        indent_of_rest = width_of(line);
      }
      line += padded(text, room, span > 1 ? Align::Left : table.columns[last].align);
      line += gap(table, last);
      at = last + 1;
      if (at >= widths.size()) break;
    }
    add_line(out_, line);
    for (const std::string& more : rest) add_line(out_, std::string(indent_of_rest, ' ') + more);
  }

  static constexpr std::size_t kGap = 3, kMostPush = 60, kLeastLast = 24;
  std::size_t width_;
  std::string out_;
};

}  // namespace

std::string write_text(const Page& page, int width) {
  return TextWriter(static_cast<std::size_t>(std::clamp(width, 40, 400))).write(print_view(page, false));
}

}  // namespace heatledger::page
