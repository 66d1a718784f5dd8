// The table that the model is fitted to: published figures of some 4,500 compounds, read from
// tables/training.tsv.
#pragma once

#include <cstdint>
#include <functional>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "core/estimate/context_fit.hpp"
#include "core/estimate/context_molecule.hpp"
#include "core/estimate/context_settings.hpp"

namespace heatledger::estimate {

/// Temperatures of the gas heat capacities in the table [K]; the first belongs to FitKind::Gas298.
constexpr double gas_nodes[] = {298.15, 400, 500, 600, 800, 1000};
constexpr std::size_t gas_node_count = 6;

/// One figure of one compound, kJ/mol or J/(mol K). Text views point into the embedded table.
struct TrainingFigure {
  std::size_t compound = 0;   ///< index into training_compounds()
  std::vector<double> value;  ///< one, or one per temperature of the fit
  double u95 = 0;
  double weight = 1;
  bool trusted = false;      ///< at least two sources share the value
  bool set_aside = false;    ///< contradicts its own homologues; no part of the fit
  std::string_view sources;  ///< one letter each
};

struct TrainingCompound {
  std::string_view name, smiles;
  std::string_view
      cells[4];  ///< formation, vaporisation, liquid, gas as they stand in the table; empty: no figure
};

const std::vector<TrainingCompound>& training_compounds();

/// Features of a compound of the table, counted once and kept. The embedded table holds only structures that
/// the model covers (a test sees to that).
const ContextMolecule& training_molecule(std::size_t compound);

/// Which rows of the table: those of the shipped fit, those set aside from it, or the table that the
/// independent implementation was fitted to (without the later marks and rows).
enum class TrainingRows : std::uint8_t { Shipped, SetAside, Original };

/// Figures of one fit in the order of the table. Rows that lack a temperature of GasAbove are left out of it.
std::vector<TrainingFigure> training_figures(FitKind kind, TrainingRows which = TrainingRows::Shipped);
/// Heat capacities at one of the higher temperatures alone, with every row that has it; for the reference
/// settings.
std::vector<TrainingFigure> training_figures_at(std::size_t node);

/// The sources of a figure in words: "ATcT 1.112, CRC 95".
std::string source_text(std::string_view letters);

/// Where the features of a row's compound come from.
using MoleculeSource = std::function<const ContextMolecule&(std::size_t compound)>;

/// Rows to fit: offset taken off, variances from settings. One right-hand side per value.
/// @param temperatures  one per value; [K], used by the gas heat capacity only
std::vector<FitRow> fit_rows(FitKind kind, const std::vector<TrainingFigure>& figures,
                             const std::vector<double>& temperatures,
                             const MoleculeSource& molecule = training_molecule);

/// Variance of a figure's error: (u95 / 2)² and the extra spread of a single source.
double error_variance(const ContextSettings& settings, const TrainingFigure& figure);

/// Formation enthalpies enter as atomisation: minus the value. Others as they are.
constexpr double sign_of(FitKind kind) {
  return kind == FitKind::Formation ? -1.0 : 1.0;
}

}  // namespace heatledger::estimate
