// Integral heats of solution in water at 25 degC against dilution. Each curve is of one source; curves are
// never joined.
#pragma once

#include <optional>
#include <string_view>
#include <vector>

#include "core/facts/monotone_curve.hpp"

namespace heatledger::facts {

struct SolutionHeatPoint {
  double ratio = 0;  ///< moles of water per mole of solute
  double heat = 0;   ///< [J per mole of solute]; < 0 gives off heat
  double u95 = 0;    ///< [J/mol]
  double bridge =
      0;  ///< [J/mol] further half width where no table is: between a pure liquid and the first point
};

struct SolutionHeats {
  std::string_view solute;  ///< formula as typed: "H2SO4"
  char phase = 's';         ///< before dissolving
  std::string_view source;
  bool from_memory = false;                   ///< not compared with a copy of the source
  bool symmetrical = false;                   ///< infinite dilution alone; in between heat(∞) r/(r + 1)
  std::vector<SolutionHeatPoint> points;      ///< rising ratio; empty for salts with infinite dilution only
  std::optional<SolutionHeatPoint> infinite;  ///< infinite dilution; its ratio is not used
};

/// All curves; for a solute with several, the one with the most points first.
const std::vector<SolutionHeats>& solution_heats();
/// The first curve of a solute in a phase; nullptr when there is none.
/// @param formula  as typed; compared by composition, so that "NaOH" and "HNaO" are one
const SolutionHeats* find_solution_heats(std::string_view formula, char phase);

/// Least water that the curve has a figure for [moles per mole]; a liquid whose table begins at one mole or
/// less is followed down to the pure liquid, whose heat is zero. Infinite when the curve has no points.
double least_ratio(const SolutionHeats& curve);

/// A curve made ready: evaluated millions of times in a step.
class SolutionHeatCurve {
 public:
  SolutionHeatCurve() = default;
  explicit SolutionHeatCurve(const SolutionHeats& curve);

  /// Heat of dissolving one mole in `ratio` moles of water [J/mol], interpolated between the points, monotone
  /// where they are, in x = ratio / (ratio + c): c is 2 for liquids, whose heats fall slowly from the pure
  /// liquid on, else 1. A curve with its infinite dilution reaches x = 1.
  /// @param ratio  moles of water per mole of solute
  /// @return empty below least_ratio, and beyond the last when the curve has no figure for infinite dilution
  std::optional<SolutionHeatPoint> at(double ratio) const;
  double least() const { return least_; }  ///< as least_ratio
  double most() const { return most_; }    ///< infinite where infinite dilution is known
  double span() const { return span_; }    ///< largest heat in size [J/mol]

 private:
  SolutionHeatPoint strong(double ratio) const;

  MonotoneCurve heat_;
  std::vector<SolutionHeatPoint> points_;  ///< those at infinite dilution last
  double constant_ = 1, least_ = 0, most_ = 0, span_ = 0;
  bool symmetrical_ = false;
};

/// The same for one point of a curve that is not kept.
std::optional<SolutionHeatPoint> solution_heat_at(const SolutionHeats& curve, double ratio);

}  // namespace heatledger::facts
