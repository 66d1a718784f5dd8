#include "core/facts/table_reader.hpp"

#include "core/base/check.hpp"
#include "core/base/number_text.hpp"

namespace heatledger::facts {

TableReader::TableReader(std::string_view text) : rest_(text) {
  std::string_view line;
  CHECK(next_line(line), "an embedded table has a line of column names");
  split_cells(line, names_);
}

bool TableReader::next_line(std::string_view& line) {
  while (!rest_.empty()) {
    const std::size_t end = rest_.find('\n');
    line = rest_.substr(0, end);
    rest_ = end == std::string_view::npos ? std::string_view() : rest_.substr(end + 1);
    if (!line.empty() && line.front() != '#') return true;
  }
  return false;
}

void split_cells(std::string_view line, std::vector<std::string_view>& cells) {
  cells.clear();
  for (std::size_t tab; (tab = line.find('\t')) != std::string_view::npos; line.remove_prefix(tab + 1)) {
    cells.push_back(line.substr(0, tab));
  }
  cells.push_back(line);
}

std::vector<std::string_view> split_bars(std::string_view cell) {
  std::vector<std::string_view> out;
  while (!cell.empty()) {
    const std::size_t bar = cell.find('|');
    out.push_back(cell.substr(0, bar));
    cell = bar == std::string_view::npos ? std::string_view() : cell.substr(bar + 1);
  }
  return out;
}

std::size_t TableReader::column(std::string_view name) const {
  for (std::size_t i = 0; i < names_.size(); ++i) {
    if (names_[i] == name) return i;
  }
  CHECK(false, "an embedded table has the columns its reader asks for");
}

bool TableReader::next() {
  if (!next_line(line_)) return false;
  split_cells(line_, cells_);
  return true;
}

double TableReader::number(std::size_t column) const {
  const std::optional<double> value = parse_number(cell(column));
  CHECK(value.has_value(), "a number cell of an embedded table holds one number");
  return *value;
}

}  // namespace heatledger::facts
