// Bonds in context: four properties of a molecule, or of a whole reaction, from counts of its bonds in their
// surroundings, with the ± that follows from one joint covariance. Counting stands in context_molecule.hpp,
// the lines of a ledger in context_explain.hpp.
#pragma once

#include <cstdint>
#include <span>

#include "core/base/result.hpp"
#include "core/estimate/context_molecule.hpp"
#include "core/uncertainty/quantity.hpp"

namespace heatledger::estimate {

class Observations;

enum class Property : std::uint8_t {
  GasFormation,          ///< formation enthalpy of the ideal gas at 298.15 K [J/mol]
  Vaporisation298,       ///< enthalpy of vaporisation at 298.15 K [J/mol]
  GasHeatCapacity,       ///< ideal gas [J/(mol K)]
  LiquidHeatCapacity298  ///< liquid near 298.15 K [J/(mol K)]
};

/// coefficient × property of one molecule; negative on the left side of a reaction.
struct ContextTerm {
  double coefficient = 1;
  const ContextMolecule* molecule = nullptr;
};

struct ContextOptions {
  double temperature = 298.15;  ///< [K] GasHeatCapacity only: 298.15 to 1000
  /// Molecules whose rows in the table, and those of their stereoisomers, are ignored (exactly).
  std::span<const ContextMolecule* const> leave_out = {};
  /// Ignores the rows of the molecules asked for, so that an estimate can be judged fairly.
  bool estimate_only = false;
  /// Measurements of the user that sharpen the estimate; null: none.
  const Observations* observations = nullptr;
};

/// How far an estimate carries (by its standard deviation, in the formation and vaporisation enthalpy).
enum class Reading : std::uint8_t {
  Good,   ///< up to 8 kJ/mol
  Rough,  ///< 8 to 15 kJ/mol
  None    ///< above: structure alone gives no reliable figure; measure or compute it
};

struct Prediction {
  double value = 0;
  double s = 0;    ///< standard deviation of the fit's normal distribution
  double u68 = 0;  ///< half widths of the 68 and 95 % intervals, calibrated on compounds left out
  double u95 = 0;
  Reading reading = Reading::Good;
  int unseen = 0;  ///< features that no row of the table has; they widen the ± and add nothing to the value
  bool in_table = false;  ///< a molecule's own row takes part
};

/// An estimate with the independent parts of its ±.
struct ContextFigure {
  Prediction prediction;
  /// Parts are u95 times the sensitivity to one independent direction of the fit, so that two figures of one
  /// sheet keep their correlation.
  uncertainty::Quantity quantity;
};

/// The fitted model. Each property is fitted when it is first asked for.
class ContextModel {
 public:
  static const ContextModel& embedded();

  ContextModel(const ContextModel&) = delete;
  ContextModel& operator=(const ContextModel&) = delete;

  /// Σ coefficient × property over the terms; what stands on both sides cancels in value and ±.
  /// @param terms  any number; the same molecule may occur more than once
  /// @errors estimate.temperature: GasHeatCapacity outside 298.15 to 1000 K
  /// @validity structures that context_molecule accepts
  Result<Prediction> predict(Property property, std::span<const ContextTerm> terms,
                             const ContextOptions& options = {}) const;
  Result<Prediction> predict(Property property, const ContextMolecule& molecule,
                             const ContextOptions& options = {}) const;

  /// The same with the parts of its ±. @errors as predict
  Result<ContextFigure> figure(Property property, std::span<const ContextTerm> terms,
                               const ContextOptions& options = {}) const;
  /// The quantity of figure() alone. @errors as predict
  Result<uncertainty::Quantity> quantity(Property property, std::span<const ContextTerm> terms,
                                         const ContextOptions& options = {}) const;

 private:
  ContextModel() = default;
};

}  // namespace heatledger::estimate
