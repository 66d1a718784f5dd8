// How far the model can be trusted: every row of the table predicted without itself, by family. For
// development and for the figures that the documentation quotes; the shipped text stands in accuracy.txt.
#pragma once

#include <string>
#include <vector>

#include "core/estimate/context_store.hpp"

namespace heatledger::estimate {

/// Families of molecules; each belongs to one of the first nine, the rest overlap.
enum class Family : std::uint8_t {
  Hydrocarbon,
  AlcoholEther,
  Carbonyl,
  Nitrogen,
  Nitro,
  Sulfur,
  Halogen,
  SiliconPhosphorusBoron,
  Inorganic,
  Strained  ///< a ring of up to four atoms, or bridged rings, in an organic molecule
};
constexpr std::size_t exclusive_families = 9;

/// One row predicted without itself and its stereoisomers, in the unit of the fit.
struct LeftOutRow {
  std::size_t figure = 0;  ///< index into FittedProperty::figures
  double error = 0;        ///< tabulated − predicted
  double s = 0;            ///< standard deviation of that difference, the row's own ± included
};

/// Exact, by small updates of the fit; weights stay as they are.
/// @param right_hand_side  which temperature
std::vector<LeftOutRow> leave_each_out(const FittedProperty& fitted, FitKind kind,
                                       std::size_t right_hand_side);

/// By refitting without one fold at a time; molecules of one constitution fall into one fold.
std::vector<LeftOutRow> leave_folds_out(FitKind kind, std::size_t right_hand_side, unsigned folds);

/// Rows set aside from the fit, predicted by it; `figure` counts them alone.
std::vector<LeftOutRow> rows_set_aside(const FittedProperty& fitted, FitKind kind);

/// Which families a compound of the table belongs to: bit i is Family i.
unsigned families_of(std::size_t compound);

struct AccuracyLine {
  std::string set;
  std::size_t n = 0;
  double mean = 0, median = 0, rms = 0, p90 = 0;  ///< of the absolute error
  double cover68 = 0, cover95 = 0;                ///< share of errors within the stated interval
  double median_s = 0;
};

/// Statistics of rows for which `take` holds.
AccuracyLine accuracy_of(const std::string& set, const std::vector<LeftOutRow>& rows,
                         const ContextSettings& settings, const std::vector<bool>& take);

/// The whole table of one fit: all, trusted, organic, families, the half of the compounds that no first
/// choice of a setting was made on (the last ones saw all rows), rows set aside, and organic ones with those.
std::vector<AccuracyLine> accuracy_table(const FittedProperty& fitted, FitKind kind,
                                         const std::vector<LeftOutRow>& rows);
/// As printed: one line a set.
std::string accuracy_text(const std::vector<AccuracyLine>& lines);

/// True for the half of the compounds that settings are first chosen on; the second half is to confirm them.
bool in_choosing_half(const ContextMolecule& molecule);

}  // namespace heatledger::estimate
