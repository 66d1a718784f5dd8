// Walks an embedded table: tab-separated cells, '#' lines are comments, the first other line names the
// columns. The tables are part of the program, so a malformed one is a bug and stops it; the suites read
// every row.
#pragma once

#include <cstddef>
#include <string_view>
#include <vector>

namespace heatledger::facts {

/// Cells of one line; `cells` is emptied first.
void split_cells(std::string_view line, std::vector<std::string_view>& cells);

/// Entries of a cell that holds a list, "a|b|c".
std::vector<std::string_view> split_bars(std::string_view cell);

class TableReader {
 public:
  explicit TableReader(std::string_view text);

  /// Index of a column. CHECKs that the table has it.
  std::size_t column(std::string_view name) const;
  /// Next row; cells that stand empty at its end may be left out of the text. False after the last one.
  bool next();
  /// Cell of the present row; empty when the row ends before it.
  std::string_view cell(std::size_t column) const {
    return column < cells_.size() ? cells_[column] : std::string_view();
  }
  /// A cell that holds one number. CHECKs that it does.
  double number(std::size_t column) const;
  bool has(std::size_t column) const { return !cell(column).empty(); }
  /// Text of the present row, for reading its cells later.
  std::string_view line() const { return line_; }

 private:
  bool next_line(std::string_view& line);

  std::string_view rest_, line_;
  std::vector<std::string_view> names_, cells_;
};

}  // namespace heatledger::facts
