#include "core/facts/atoms.hpp"

#include <array>

#include "core/base/check.hpp"
#include "core/facts/embedded_tables.hpp"
#include "core/facts/figure_cell.hpp"
#include "core/facts/table_reader.hpp"

namespace heatledger::facts {

namespace {

struct AtomTable {
  FigureCells cells;
  std::array<std::optional<Datum>, 119> by_number;

  AtomTable() {
    constexpr FigureColumn column{FigureKind::FormationGas, "hf_atom", "kJ/mol", 1000};
    TableReader table(tables::atoms);
    const std::size_t number = table.column("number"), value = table.column("hf_g");
    while (table.next()) {
      const std::size_t z = static_cast<std::size_t>(table.number(number));
      CHECK(z >= 1 && z < by_number.size(), "atoms.tsv holds atomic numbers");
      by_number[z] = cells.read(table.cell(value), column);
    }
  }
};

}  // namespace

std::optional<Datum> gas_atom_formation(int atomic_number) {
  static const AtomTable table;
  if (atomic_number < 1 || atomic_number > 118) return std::nullopt;
  return table.by_number[static_cast<std::size_t>(atomic_number)];
}

}  // namespace heatledger::facts
