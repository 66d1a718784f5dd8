#include "core/facts/figure_cell.hpp"

#include <algorithm>
#include <cmath>

#include "core/base/check.hpp"
#include "core/base/number_text.hpp"
#include "core/facts/embedded_tables.hpp"
#include "core/facts/sources.hpp"
#include "core/facts/table_reader.hpp"

namespace heatledger::facts {

namespace {

/// Takes the number at the front of `text`. CHECKs that there is one.
double take_number(std::string_view& text) {
  std::size_t length = 0;
  const std::optional<double> value = parse_number_prefix(text, length);
  CHECK(value.has_value(), "a figure cell begins with a number");
  text.remove_prefix(length);
  return *value;
}

bool take(std::string_view& text, std::string_view mark) {
  if (text.substr(0, mark.size()) != mark) return false;
  text.remove_prefix(mark.size());
  return true;
}

/// "cl" is table c, its gas value from the liquid's.
std::string table_name(std::string_view key) {
  const Source* source = find_source(key.substr(0, 1));
  CHECK(source != nullptr, "every source key of a table stands in sources.tsv");
  std::string name(source->name);
  if (key.size() > 1) name += key[1] == 'l' ? " (from its liquid)" : " (from its solid)";
  return name;
}

}  // namespace

FigureCells::FigureCells() {
  TableReader table(tables::defaults);
  const std::size_t figure = table.column("figure"), source = table.column("source"),
                    value = table.column("u95");
  while (table.next()) {
    Default entry;
    entry.figure = table.cell(figure);
    entry.source = table.cell(source);
    std::string_view text = table.cell(value);
    const double number = take_number(text);
    (text == "%" ? entry.relative : entry.absolute) = text == "%" ? number / 100 : number;
    defaults_.push_back(entry);
  }
}

double FigureCells::default_u95(const FigureColumn& column, std::string_view source_keys,
                                double value) const {
  for (const Default& entry : defaults_) {
    if (entry.figure != column.column) continue;
    if (entry.source != "*" && entry.source != source_keys) continue;
    return entry.absolute + entry.relative * std::abs(value);
  }
  CHECK(false, "every figure has a default ± in defaults.tsv");
}

std::string_view FigureCells::source_name(std::string_view keys) {
  if (keys.size() == 1) {
    const Source* source = find_source(keys);
    CHECK(source != nullptr, "every source key of a table stands in sources.tsv");
    return source->name;
  }
  std::string& name = names_[keys];
  if (name.empty()) {
    CHECK(keys.substr(0, 2) == "e:", "a source of several tables is written e:a+b");
    std::string_view rest = keys.substr(2);
    name = "evaluated from ";
    for (;;) {
      const std::size_t plus = rest.find('+');
      name += table_name(rest.substr(0, plus));
      if (plus == std::string_view::npos) break;
      rest.remove_prefix(plus + 1);
      name += rest.find('+') == std::string_view::npos ? " and " : ", ";
    }
  }
  return name;
}

Datum FigureCells::read(std::string_view cell, const FigureColumn& column) {
  Datum datum;
  if (const std::size_t open = cell.find(" ("); open != std::string_view::npos) {
    CHECK(cell.back() == ')', "a remark in a figure cell ends with its bracket");
    datum.remark = cell.substr(open + 2, cell.size() - open - 3);
    cell = cell.substr(0, open);
  }
  const double value = take_number(cell);
  double u95 = 0;
  datum.u95_is_default = !take(cell, "±");
  if (!datum.u95_is_default) u95 = take_number(cell);
  if (take(cell, "~")) datum.spread = take_number(cell) * column.scale;
  CHECK(take(cell, " "), "a figure cell names its source");
  std::size_t end = cell.find("; ");
  const std::string_view keys = cell.substr(0, end);
  datum.source = source_name(keys);
  if (datum.u95_is_default) u95 = std::max(default_u95(column, keys, value), datum.spread / column.scale);
  datum.value = value * column.scale;
  datum.u95 = u95 * column.scale;

  std::vector<Rival> rivals;
  while (end != std::string_view::npos) {
    cell.remove_prefix(end + 2);
    const double other = take_number(cell);
    CHECK(take(cell, " "), "a figure that was not taken names its source");
    end = cell.find("; ");
    rivals.push_back({other * column.scale, source_name(cell.substr(0, end))});
  }
  if (!rivals.empty()) {
    rivals_.push_back(std::move(rivals));
    datum.rivals = rivals_.back();
    const Source* source = find_source(keys.substr(0, 1));
    datum.why_taken = source != nullptr ? source->standing : std::string_view();
  }
  return datum;
}

}  // namespace heatledger::facts
