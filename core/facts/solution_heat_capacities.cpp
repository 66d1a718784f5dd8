#include "core/facts/solution_heat_capacities.hpp"

#include <string>

#include "core/base/check.hpp"
#include "core/facts/embedded_tables.hpp"
#include "core/facts/structure_match.hpp"
#include "core/facts/table_reader.hpp"

namespace heatledger::facts {

namespace {

std::string_view source_text(std::string_view key) {
  if (key == "y") return "Perry's Chemical Engineers' Handbook, specific heats of aqueous solutions";
  if (key == "o") return "slope of the enthalpy by Olsson, Jernqvist, Aly, Int. J. Thermophys. 18 (1997) 779";
  CHECK(key == "g", "solution_heat_capacities.tsv uses the sources named at its head");
  return "Giguère and others, Can. J. Chem. 33 (1955) 804, between water and peroxide by mass";
}

struct Table {
  std::vector<SolutionHeatCapacities> all;
  std::vector<std::string> hills;  ///< of each solute

  Table() {
    TableReader table(tables::solution_heat_capacities);
    const std::size_t solute = table.column("solute"), fraction = table.column("fraction"),
                      cp = table.column("cp"), u95 = table.column("u95"), source = table.column("source"),
                      note = table.column("note");
    std::vector<double> y;
    const auto finish = [&] {
      if (!all.empty()) all.back().cp = MonotoneCurve(all.back().fraction, std::move(y));
      y.clear();
    };
    while (table.next()) {
      if (all.empty() || all.back().solute != table.cell(solute)) {
        finish();
        all.emplace_back();
        all.back().solute = table.cell(solute);
        const std::optional<std::string> hill = hill_text(all.back().solute);
        CHECK(hill.has_value(), "solution_heat_capacities.tsv holds formulas that can be read");
        hills.push_back(*hill);
      }
      SolutionHeatCapacities& of = all.back();
      if (table.cell(source) != "w") of.source = source_text(table.cell(source));
      of.from_memory = of.from_memory || table.cell(note) == "m";
      of.strongest = table.number(fraction);
      of.fraction.push_back(of.strongest);
      of.u95.push_back(table.number(u95));
      y.push_back(table.number(cp));
    }
    finish();
  }
};

const Table& table() {
  static const Table all;
  return all;
}

}  // namespace

const SolutionHeatCapacities* find_solution_heat_capacities(std::string_view formula) {
  const std::optional<std::string> hill = hill_text(formula);
  if (!hill) return nullptr;
  for (std::size_t i = 0; i < table().all.size(); ++i) {
    if (table().hills[i] == *hill) return &table().all[i];
  }
  return nullptr;
}

std::optional<SolutionHeatCapacity> solution_heat_capacity_at(const SolutionHeatCapacities& table,
                                                              double fraction) {
  if (!(fraction >= 0 && fraction <= table.strongest)) return std::nullopt;
  std::size_t i = 0;
  while (i + 2 < table.fraction.size() && fraction > table.fraction[i + 1]) ++i;
  const double share = (fraction - table.fraction[i]) / (table.fraction[i + 1] - table.fraction[i]);
  return SolutionHeatCapacity{table.cp.at(fraction),
                              table.u95[i] + share * (table.u95[i + 1] - table.u95[i])};
}

}  // namespace heatledger::facts
