#include "core/estimate/context_table.hpp"

#include <array>
#include <memory>
#include <string>

#include "core/base/check.hpp"
#include "core/base/number_text.hpp"
#include "core/molecule/smiles.hpp"

namespace heatledger::estimate {
namespace tables {
extern const std::string_view training;
}

namespace {

std::string_view take(std::string_view& text, char until) {
  const std::size_t end = std::min(text.find(until), text.size());
  const std::string_view taken = text.substr(0, end);
  text.remove_prefix(std::min(end + 1, text.size()));
  return taken;
}

double number(std::string_view text) {
  const std::optional<double> value = parse_number(text);
  CHECK(value.has_value(), "a number in the training table");
  return *value;
}

/// Marks in front of the letters: '!' set aside, '=' settled at full weight, '+' shared by two sources.
void take_sources(std::string_view letters, TrainingFigure& figure, TrainingRows which) {
  const char mark = letters.empty() ? ' ' : letters[0];
  if (mark == '!' || mark == '=') letters.remove_prefix(1);
  figure.set_aside = mark == '!';
  if (mark == '=' && which != TrainingRows::Original) figure.weight = 1;
  figure.trusted = !letters.empty() && letters[0] == '+';
  if (figure.trusted) letters.remove_prefix(1);
  figure.sources = letters;
}

constexpr char kLaterSource = 'L';  ///< rows that were added to the table since

bool takes_part(const TrainingFigure& figure, TrainingRows which) {
  if (which == TrainingRows::Original) return figure.sources.find(kLaterSource) == std::string_view::npos;
  return figure.set_aside == (which == TrainingRows::SetAside);
}

TrainingFigure single_figure(std::size_t compound, std::string_view cell, TrainingRows which) {
  TrainingFigure figure;
  figure.compound = compound;
  figure.value.assign(1, number(take(cell, ' ')));
  figure.u95 = number(take(cell, ' '));
  figure.weight = number(take(cell, ' '));
  take_sources(cell, figure, which);
  return figure;
}

/// A gas cell: six values, u95 in per cent, two weights, sources.
struct GasCell {
  std::array<std::optional<double>, gas_node_count> value;
  double percent = 0, weight_298 = 1, weight_above = 1;
  std::string_view sources;
};

GasCell gas_cell(std::string_view cell) {
  GasCell gas;
  for (std::optional<double>& value : gas.value) {
    const std::string_view text = take(cell, ' ');
    if (text != "-") value = number(text);
  }
  gas.percent = number(take(cell, ' '));
  gas.weight_298 = number(take(cell, ' '));
  gas.weight_above = number(take(cell, ' '));
  gas.sources = cell;
  return gas;
}

TrainingFigure gas_figure(std::size_t compound, const GasCell& gas, std::size_t node, double weight) {
  TrainingFigure figure;
  figure.compound = compound;
  figure.value.assign(1, *gas.value[node]);
  figure.u95 = *gas.value[node] * gas.percent / 100;
  figure.weight = weight;
  take_sources(gas.sources, figure, TrainingRows::Shipped);
  return figure;
}

}  // namespace

const std::vector<TrainingCompound>& training_compounds() {
  static const std::vector<TrainingCompound> compounds = [] {
    std::vector<TrainingCompound> read;
    std::string_view table = tables::training;
    bool heading = true;
    while (!table.empty()) {
      std::string_view line = take(table, '\n');
      if (line.empty() || line[0] == '#') continue;
      if (heading) {
        heading = false;
        continue;
      }
      TrainingCompound compound;
      compound.name = take(line, '\t');
      compound.smiles = take(line, '\t');
      for (std::string_view& cell : compound.cells) cell = take(line, '\t');
      read.push_back(compound);
    }
    return read;
  }();
  return compounds;
}

const ContextMolecule& training_molecule(std::size_t compound) {
  static std::vector<std::unique_ptr<ContextMolecule>> molecules(training_compounds().size());
  std::unique_ptr<ContextMolecule>& molecule = molecules[compound];
  if (molecule == nullptr) {
    Result<molecule::Graph> graph = molecule::parse_smiles(training_compounds()[compound].smiles);
    CHECK(graph.ok(), "a readable structure in the training table");
    Result<ContextMolecule> counted = context_molecule(*graph);
    CHECK(counted.ok(), "a structure that the model covers in the training table");
    molecule = std::make_unique<ContextMolecule>(std::move(counted).value());
  }
  return *molecule;
}

std::vector<TrainingFigure> training_figures(FitKind kind, TrainingRows which) {
  const std::vector<TrainingCompound>& compounds = training_compounds();
  std::vector<TrainingFigure> figures;
  if (kind == FitKind::Gas298) return training_figures_at(0);
  for (std::size_t c = 0; c < compounds.size(); ++c) {
    const std::size_t column = kind == FitKind::Formation      ? 0
                               : kind == FitKind::Vaporisation ? 1
                               : kind == FitKind::Liquid       ? 2
                                                               : 3;
    const std::string_view cell = compounds[c].cells[column];
    if (cell.empty()) continue;
    if (column < 3) {
      TrainingFigure figure = single_figure(c, cell, which);
      if (takes_part(figure, which)) figures.push_back(std::move(figure));
      continue;
    }
    const GasCell gas = gas_cell(cell);
    bool complete = true;
    for (std::size_t node = 1; node < gas_node_count; ++node)
      complete = complete && gas.value[node].has_value();
    if (!complete) continue;
    // One error for all temperatures, that of the middle one: the rows state it in per cent.
    TrainingFigure figure = gas_figure(c, gas, 3, gas.weight_above);
    figure.value.clear();
    for (std::size_t node = 1; node < gas_node_count; ++node) figure.value.push_back(*gas.value[node]);
    figures.push_back(figure);
  }
  return figures;
}

std::vector<TrainingFigure> training_figures_at(std::size_t node) {
  const std::vector<TrainingCompound>& compounds = training_compounds();
  std::vector<TrainingFigure> figures;
  for (std::size_t c = 0; c < compounds.size(); ++c) {
    if (compounds[c].cells[3].empty()) continue;
    const GasCell gas = gas_cell(compounds[c].cells[3]);
    if (gas.value[node])
      figures.push_back(gas_figure(c, gas, node, node == 0 ? gas.weight_298 : gas.weight_above));
  }
  return figures;
}

std::string source_text(std::string_view letters) {
  struct Source {
    char letter;
    const char* text;
  };
  static constexpr Source kSources[] = {{'A', "ATcT 1.112"},
                                        {'a', "ATcT 1.112 (from the condensed phase)"},
                                        {'C', "CRC 95"},
                                        {'c', "CRC 95 (from the liquid)"},
                                        {'k', "CRC 95 (from the solid)"},
                                        {'T', "TRC 1994"},
                                        {'J', "JANAF 1998"},
                                        {'j', "JANAF 1998 (from the liquid)"},
                                        {'P', "API data book"},
                                        {'D', "open pure-component database"},
                                        {'Y', "Yaws"},
                                        {'W', "NIST WebBook"},
                                        {'w', "NIST WebBook (from the liquid)"},
                                        {'s', "NIST WebBook (from the solid)"},
                                        {'G', "Poling 2001"},
                                        {'Z', "Zabransky"},
                                        {'E', "Perry 8"},
                                        {'V', "VDI"},
                                        {'H', "compilation of vaporisation enthalpies"},
                                        {'L', "literature on strained molecules"}};
  std::string text;
  for (const char letter : letters) {
    for (const Source& source : kSources) {
      if (source.letter != letter) continue;
      if (!text.empty()) text += ", ";
      text += source.text;
    }
  }
  return text;
}

double error_variance(const ContextSettings& settings, const TrainingFigure& figure) {
  const double s = figure.u95 / 2, extra = figure.trusted ? 0 : settings.single_source;
  return s * s + extra * extra;
}

std::vector<FitRow> fit_rows(FitKind kind, const std::vector<TrainingFigure>& figures,
                             const std::vector<double>& temperatures, const MoleculeSource& molecule) {
  const ContextSettings& settings = context_settings(kind);
  std::vector<FitRow> rows;
  rows.reserve(figures.size());
  for (const TrainingFigure& figure : figures) {
    FitRow row;
    row.molecule = &molecule(figure.compound);
    row.own = own_variance(settings, row.molecule->measures);
    row.noise = (row.own + error_variance(settings, figure)) / std::min(figure.weight, 1.0);
    for (std::size_t k = 0; k < figure.value.size(); ++k) {
      row.y.push_back(sign_of(kind) * figure.value[k] - offset(kind, *row.molecule, temperatures[k]));
    }
    rows.push_back(std::move(row));
  }
  return rows;
}

}  // namespace heatledger::estimate
