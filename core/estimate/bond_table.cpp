#include "core/estimate/bond_table.hpp"

#include <algorithm>

#include "core/base/check.hpp"
#include "core/base/number_text.hpp"
#include "core/molecule/elements.hpp"

namespace heatledger::estimate {
namespace tables {
extern const std::string_view bond_averages;
extern const std::string_view bond_spread_factors;
}  // namespace tables

namespace {

using molecule::BondType;
using molecule::Order;
using molecule::Setting;

constexpr double kJ = 1000.0;

constexpr BondTableInfo kInfo[kBondColumns] = {
    {"zumdahl", "Zumdahl, average bond energies", "Zumdahl, Chemistry, average bond energies"},
    {"atkins", "Atkins, mean bond enthalpies", "Atkins, Physical Chemistry, mean bond enthalpies"},
    {"huheey", "Huheey, after Darwent and Cottrell",
     "Huheey, Inorganic Chemistry, after Darwent and Cottrell"},
    {"reusch", "Reusch, table in kcal/mol", "Reusch, average bond energies, kcal/mol × 4.184"},
    {"molecule", "one molecule", "atomisation of the molecule, ATcT 1.112 and CODATA"},
};

/// The cells of one line; the embedded tables are ours, so their shape is an invariant.
std::vector<std::string_view> cells_of(std::string_view line) {
  std::vector<std::string_view> cells;
  std::size_t start = 0;
  for (std::size_t tab = line.find('\t'); tab != std::string_view::npos; tab = line.find('\t', start)) {
    cells.push_back(line.substr(start, tab - start));
    start = tab + 1;
  }
  cells.push_back(line.substr(start));
  return cells;
}

template <typename Row>
void for_each_row(std::string_view text, std::size_t columns, Row row) {
  bool heading = true;
  while (!text.empty()) {
    const std::size_t end = text.find('\n');
    const std::string_view line = text.substr(0, end);
    text.remove_prefix(end == std::string_view::npos ? text.size() : end + 1);
    if (line.empty() || line[0] == '#') continue;
    if (heading) {
      heading = false;
      continue;
    }
    const std::vector<std::string_view> cells = cells_of(line);
    CHECK(cells.size() == columns, "a line of an embedded bond table has its columns");
    row(cells);
  }
}

int element(std::string_view symbol) {
  const std::optional<int> number = molecule::atomic_number(symbol);
  CHECK(number.has_value(), "an embedded bond table names elements");
  return *number;
}

Setting setting(std::string_view word) {
  if (word.empty()) return Setting::Plain;
  if (word == "co2") return Setting::CarbonDioxide;
  if (word == "co") return Setting::CarbonMonoxide;
  if (word == "no") return Setting::NitricOxide;
  if (word == "no2") return Setting::NitrogenDioxide;
  if (word == "o3") return Setting::Ozone;
  CHECK(word == "aromatic", "an embedded bond table names known settings");
  return Setting::AromaticRing;
}

BondType type_of(const std::vector<std::string_view>& cells) {
  const Order order = cells[1] == "-" ? Order::Single : cells[1] == "=" ? Order::Double : Order::Triple;
  return molecule::make_bond_type(element(cells[0]), element(cells[2]), order, setting(cells[3]));
}

bool names_table(std::string_view list, std::string_view id) {
  for (std::size_t at = list.find(id); at != std::string_view::npos; at = list.find(id, at + 1)) {
    const std::size_t end = at + id.size();
    if ((at == 0 || list[at - 1] == ',') && (end == list.size() || list[end] == ',')) return true;
  }
  return false;
}

std::vector<BondTableRow> read_tables() {
  std::vector<BondTableRow> rows;
  for_each_row(tables::bond_averages, 11, [&rows](const std::vector<std::string_view>& cells) {
    BondTableRow row;
    row.type = type_of(cells);
    for (std::size_t i = 0; i < kBondColumns; ++i) {
      if (cells[4 + i].empty()) continue;
      const std::optional<double> value = parse_number(cells[4 + i]);
      CHECK(value.has_value(), "an embedded bond table holds numbers");
      row.value[i] = *value * kJ;
      row.from_memory[i] = names_table(cells[9], kInfo[i].id);
    }
    row.remark = cells[10];
    row.spread_u95 = spread_half_width(row.value);
    rows.push_back(row);
  });
  std::sort(rows.begin(), rows.end(),
            [](const BondTableRow& a, const BondTableRow& b) { return a.type < b.type; });
  for_each_row(
      tables::bond_spread_factors, 4 + 2 * kBondTables, [&rows](const std::vector<std::string_view>& cells) {
        const BondType type = type_of(cells);
        const auto row =
            std::find_if(rows.begin(), rows.end(), [&type](const BondTableRow& r) { return r.type == type; });
        CHECK(row != rows.end(), "a spread factor belongs to a bond of the tables");
        for (std::size_t i = 0; i < kBondTables; ++i) {
          const std::optional<double> factor = parse_number(cells[4 + 2 * i]);
          CHECK(factor.has_value(), "a spread factor is a number");
          row->factor[i] = *factor;
        }
      });
  return rows;
}

}  // namespace

const BondTableInfo& bond_table_info(BondColumn column) {
  return kInfo[static_cast<std::size_t>(column)];
}

const std::vector<BondTableRow>& bond_table() {
  static const std::vector<BondTableRow> rows = read_tables();
  return rows;
}

double spread_half_width(const std::array<std::optional<double>, kBondColumns>& value) {
  constexpr double kExpectedRange[kBondColumns + 1] = {0, 0, 1.128, 1.693, 2.059, 2.326};
  constexpr double kFloor = 4 * kJ, kLoneFloor = 10 * kJ, kLoneShare = 0.03;
  std::size_t n = 0;
  double low = 0, high = 0;
  for (const std::optional<double>& v : value) {
    if (!v) continue;
    low = n == 0 ? *v : std::min(low, *v);
    high = n == 0 ? *v : std::max(high, *v);
    ++n;
  }
  if (n < 2) return std::max(kLoneFloor, kLoneShare * high);
  return std::max(kFloor, 1.96 * (high - low) / kExpectedRange[n]);
}

}  // namespace heatledger::estimate
