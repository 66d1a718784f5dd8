#include "core/facts/ions.hpp"

#include <algorithm>

#include "core/base/check.hpp"
#include "core/facts/embedded_tables.hpp"
#include "core/facts/figure_cell.hpp"
#include "core/facts/key_index.hpp"
#include "core/facts/name_key.hpp"
#include "core/facts/structure_match.hpp"
#include "core/facts/table_reader.hpp"
#include "core/molecule/formula.hpp"
#include "core/molecule/smiles.hpp"

namespace heatledger::facts {

namespace {

struct AqueousTable {
  FigureCells cells;
  std::vector<AqueousSubstance> rows;
  KeyIndex names, formulas;

  AqueousTable() {
    // The kind is of no account here: these columns have no place in a Compound.
    constexpr FigureColumn kColumns[] = {{FigureKind::FormationLiquid, "hf_aq", "kJ/mol", 1000},
                                         {FigureKind::FormationLiquid, "gf_aq", "kJ/mol", 1000},
                                         {FigureKind::EntropyLiquid, "s_aq", "J/(mol K)", 1},
                                         {FigureKind::HeatCapacityLiquid, "cp_aq", "J/(mol K)", 1}};
    TableReader table(tables::ions);
    const std::size_t name = table.column("name"), formula = table.column("formula"),
                      synonyms = table.column("synonyms"), first = table.column(kColumns[0].column);
    const auto read = [&](std::size_t i) -> std::optional<Datum> {
      if (!table.has(first + i)) return std::nullopt;
      return cells.read(table.cell(first + i), kColumns[i]);
    };
    while (table.next()) {
      AqueousSubstance row;
      row.name = table.cell(name);
      row.formula = table.cell(formula);
      const std::optional<std::string> hill = hill_text(row.formula);
      CHECK(hill.has_value(), "ions.tsv holds formulas that can be read");
      row.hill = *hill;
      row.synonyms = split_bars(table.cell(synonyms));
      row.formation_enthalpy = read(0);
      row.gibbs_energy = read(1);
      row.entropy = read(2);
      row.heat_capacity = read(3);
      rows.push_back(std::move(row));
    }
    index();
  }

  void index() {
    names.reserve(rows.size() * 4);
    formulas.reserve(rows.size());
    for (std::uint32_t i = 0; i < rows.size(); ++i) {
      formulas.put(key_hash(rows[i].hill), i);
      const auto put = [&](std::string_view name) {
        const std::string key = name_key(name);
        names.put(key_hash(key), i);
        if (key.size() > 3 && key.substr(key.size() - 3) == "ion")
          names.put(key_hash(key.substr(0, key.size() - 3)), i);
      };
      put(rows[i].name);
      for (const std::string_view synonym : rows[i].synonyms) put(synonym);
    }
  }

  const AqueousSubstance* first(const KeyIndex& index, std::string_view key) const {
    const AqueousSubstance* found = nullptr;
    index.each(key_hash(key), [&](std::uint32_t row) {
      found = &rows[row];
      return false;
    });
    return found;
  }
};

const AqueousTable& table() {
  static const AqueousTable all;
  return all;
}

}  // namespace

const std::vector<AqueousSubstance>& aqueous_substances() {
  return table().rows;
}

const AqueousSubstance* find_aqueous_name(std::string_view name) {
  const std::string key = name_key(name);
  return key.empty() ? nullptr : table().first(table().names, key);
}

const AqueousSubstance* find_aqueous_formula(std::string_view hill) {
  return table().first(table().formulas, hill);
}

std::vector<std::pair<const AqueousSubstance*, int>> ions_of(const Compound& compound) {
  std::vector<std::pair<const AqueousSubstance*, int>> ions;
  if (compound.structure != Structure::Formal) return ions;
  std::string_view rest = compound.smiles;
  while (!rest.empty()) {
    const std::size_t end = std::min(rest.find('.'), rest.size());
    const Result<molecule::Graph> graph = molecule::parse_smiles(rest.substr(0, end));
    rest.remove_prefix(std::min(end + 1, rest.size()));
    if (!graph.ok()) return {};
    const molecule::Composition composition = molecule::composition(*graph);
    const AqueousSubstance* ion = find_aqueous_formula(molecule::hill_formula(composition));
    if (composition.charge == 0 || ion == nullptr) return {};
    const auto same =
        std::find_if(ions.begin(), ions.end(), [&](const auto& one) { return one.first == ion; });
    if (same != ions.end()) {
      ++same->second;
    } else {
      ions.emplace_back(ion, 1);
    }
  }
  return ions;
}

}  // namespace heatledger::facts
