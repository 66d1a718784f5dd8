#include "core/estimate/context_settings.hpp"

#include <cstring>
#include <string_view>
#include <vector>

#include "core/base/check.hpp"
#include "core/base/number_text.hpp"

namespace heatledger::estimate {
namespace tables {
extern const std::string_view context_settings;
extern const std::string_view context_prior;
}  // namespace tables

namespace {

/// Calls `use` with the cells of every row below the heading; lines that begin with '#' are comments.
template <typename Use>
void for_each_row(std::string_view table, const Use& use) {
  bool heading = true;
  while (!table.empty()) {
    const std::size_t end = std::min(table.find('\n'), table.size());
    std::string_view line = table.substr(0, end);
    table.remove_prefix(std::min(end + 1, table.size()));
    if (line.empty() || line[0] == '#') continue;
    if (heading) {
      heading = false;
      continue;
    }
    std::vector<std::string_view> cells;
    for (std::size_t tab; (tab = line.find('\t')) != std::string_view::npos; line.remove_prefix(tab + 1)) {
      cells.push_back(line.substr(0, tab));
    }
    cells.push_back(line);
    use(cells);
  }
}

double number(std::string_view cell) {
  if (cell.empty()) return 0;
  const std::optional<double> value = parse_number(cell);
  CHECK(value.has_value(), "a number in an embedded settings table");
  return *value;
}

using Settings = std::array<ContextSettings, fit_kind_count>;

double* place_for(ContextSettings& settings, std::string_view what) {
  for (std::size_t c = 0; c < feature_class_count; ++c) {
    if (what == class_name(static_cast<FeatureClass>(c))) return &settings.spread[c];
  }
  if (what == "own_one") return &settings.own.one;
  if (what == "own_heavy") return &settings.own.heavy;
  if (what == "own_ring") return &settings.own.ring;
  if (what == "own_polar") return &settings.own.polar;
  if (what == "own_hetero") return &settings.own.hetero;
  if (what == "own_halogen") return &settings.own.halogen;
  if (what == "own_crowding") return &settings.own.crowding;
  if (what == "own_inorganic") return &settings.own.inorganic;
  if (what == "own_donors") return &settings.own.donors;
  if (what == "single_source") return &settings.single_source;
  if (what == "k68") return &settings.k68;
  if (what == "k95") return &settings.k95;
  return nullptr;
}

Settings read_settings() {
  Settings all;
  for (ContextSettings& settings : all) settings.own.one = 0;
  for_each_row(tables::context_settings, [&](const std::vector<std::string_view>& cells) {
    CHECK(cells.size() == fit_kind_count + 1, "one cell for each fit in a settings row");
    for (std::size_t k = 0; k < fit_kind_count; ++k) {
      double* place = place_for(all[k], cells[0]);
      CHECK(place != nullptr, "a known name in the settings table");
      *place = number(cells[k + 1]);
    }
  });
  return all;
}

struct Prior {
  double bond[kind_count][kind_count][5] = {};  ///< by kinds and order; 0: by the rule
  double single[kind_count] = {};
  double electronegativity[kind_count] = {};
  double gas_atom[kind_count] = {};
};

std::size_t take_element(std::string_view& text) {
  std::size_t best = kind_count;
  for (std::size_t k = 0; k < kind_count; ++k) {
    const std::string_view symbol = kind_symbol(static_cast<Kind>(k));
    if (text.substr(0, symbol.size()) != symbol) continue;
    if (best == kind_count || symbol.size() > std::strlen(kind_symbol(static_cast<Kind>(best)))) best = k;
  }
  CHECK(best < kind_count, "an element of the model in the table of priors");
  text.remove_prefix(std::strlen(kind_symbol(static_cast<Kind>(best))));
  return best;
}

Prior read_prior() {
  Prior prior;
  for_each_row(tables::context_prior, [&](const std::vector<std::string_view>& cells) {
    CHECK(cells.size() == 3, "three cells in a row of priors");
    std::string_view name = cells[1];
    const double value = number(cells[2]);
    const std::size_t a = take_element(name);
    if (cells[0] == "bond") {
      const unsigned order = name[0] == 'a' ? aromatic_order : static_cast<unsigned>(name[0] - '0');
      name.remove_prefix(1);
      const std::size_t b = take_element(name);
      CHECK(order >= 1 && order <= 4 && name.empty(), "a bond spelled like C2O in the table of priors");
      prior.bond[a][b][order] = prior.bond[b][a][order] = value;
    } else if (cells[0] == "single") {
      prior.single[a] = value;
    } else if (cells[0] == "electronegativity") {
      prior.electronegativity[a] = value;
    } else {
      prior.gas_atom[a] = value;
    }
  });
  return prior;
}

const Prior& prior() {
  static const Prior read = read_prior();
  return read;
}

}  // namespace

const ContextSettings& context_settings(FitKind kind) {
  static const Settings read = read_settings();
  return read[static_cast<std::size_t>(kind)];
}

double own_variance(const ContextSettings& settings, const DeviationMeasures& m) {
  const DeviationMeasures& own = settings.own;
  return own.one * own.one * m.one + own.heavy * own.heavy * m.heavy + own.ring * own.ring * m.ring +
         own.polar * own.polar * m.polar + own.hetero * own.hetero * m.hetero +
         own.halogen * own.halogen * m.halogen + own.crowding * own.crowding * m.crowding +
         own.inorganic * own.inorganic * m.inorganic + own.donors * own.donors * m.donors;
}

double prior_bond(Kind a, Kind b, unsigned order) {
  const std::size_t x = static_cast<std::size_t>(a), y = static_cast<std::size_t>(b);
  const Prior& p = prior();
  if (p.bond[x][y][order] != 0) return p.bond[x][y][order];
  constexpr double kOrderFactor[5] = {0, 1, 1.75, 2.4, 1.4};
  const double difference = p.electronegativity[x] - p.electronegativity[y];
  return (0.5 * (p.single[x] + p.single[y]) + 96.5 * difference * difference) * kOrderFactor[order];
}

double model_gas_atom(Kind kind) {
  return prior().gas_atom[static_cast<std::size_t>(kind)];
}

std::optional<double> model_gas_atom_of(int atomic_number) {
  const std::optional<Kind> kind = kind_of(atomic_number);
  if (!kind) return std::nullopt;
  return 1000 * model_gas_atom(*kind);
}

double offset(FitKind kind, const ContextMolecule& molecule, double temperature) {
  switch (kind) {
    case FitKind::Formation:
      return (molecule.base_bonds - molecule.gas_atoms) / 1000;
    case FitKind::Vaporisation:
      return 5.0 * molecule.measures.one + 4.2 * molecule.heavy_atoms;
    case FitKind::Liquid:
      return 30.0 * molecule.measures.one + 28.0 * molecule.heavy_atoms;
    case FitKind::Gas298:
    case FitKind::GasAbove:
      break;
  }
  return 8.0 * molecule.measures.one + 0.5 * (8 + 0.022 * temperature) * molecule.atoms +
         3.0 * molecule.heavy_atoms;
}

}  // namespace heatledger::estimate
