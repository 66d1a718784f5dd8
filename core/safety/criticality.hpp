// How bad a cooling failure is: the five classes built on process temperature, the maximum temperature of the
// synthesis reaction (MTSR), the maximum technical temperature (MTT) and the temperature at which the
// decomposition takes 24 h to its maximum rate (T_D24). Where those four come from stands elsewhere.
#pragma once

#include <array>
#include <cstdint>
#include <optional>
#include <string>
#include <vector>

#include "core/uncertainty/quantity.hpp"

namespace heatledger::safety {

/// From best to worst; the last two say that there is no class, and what is missing.
enum class Criticality : std::uint8_t {
  Class1 = 1,   ///< MTSR < MTT < T_D24
  Class2,       ///< MTSR < T_D24 < MTT
  Class3,       ///< MTT ≤ MTSR < T_D24
  Class4,       ///< MTT < T_D24 ≤ MTSR
  Class5,       ///< T_D24 ≤ MTSR and T_D24 ≤ MTT
  NotOperable,  ///< T_D24 ≤ process temperature: no class
  NeedsTd24,
  NeedsMtt,
};

/// The four temperatures of one scenario, exact [K].
struct CoolingFailure {
  double process = 0;
  double mtsr = 0;
  std::optional<double> mtt;   ///< empty: neither a boiling point nor a limit is known
  std::optional<double> td24;  ///< empty: not measured; it is never estimated
};

/// The class; a tie, to a millionth of a kelvin, goes to the worse one.
/// @source F. Stoessel, What is your thermal risk?, Chem. Eng. Prog. 89 (10) (1993) 68
/// @example Criticality.EveryOrderOfTheFourTemperatures
Criticality classify(const CoolingFailure& failure);

/// The same four with their ±, as independent sources: what two of them share stays shared.
struct UncertainFailure {
  uncertainty::Quantity process, mtsr;  ///< [K]
  std::optional<uncertainty::Quantity> mtt, td24;
};

struct Assessment {
  Criticality at_means = Criticality::NeedsTd24;  ///< of the figures without their ±
  /// The one that counts: the worst that holds at least 2.5 % of the draws.
  Criticality verdict = Criticality::NeedsTd24;
  std::array<double, 6> shares{};    ///< of the draws: class 1 to 5, then "not operable"; add up to one
  bool drawn = false;                ///< false: nothing has a ±, or there is no class
  std::string words;                 ///< "class 3", "not operable", "class needs T_D24"
  std::string meaning;               ///< what a failure of the cooling leads to, one sentence
  std::vector<std::string> working;  ///< the four figures in order, the rule, the shares
};

/// The class under the ± of the four, by seeded draws.
Assessment assess(const UncertainFailure& failure, std::size_t draws = 10000, std::uint64_t seed = 20250131);
/// The same where the caller has drawn the scenarios himself, as where MTSR bends with its inputs.
/// @param means  the scenario at the figures without their ±
Assessment assess(const CoolingFailure& means, const std::vector<CoolingFailure>& draws);

/// "class 3", "not operable: T_D24 is not above the process temperature", "class needs T_D24".
std::string criticality_words(Criticality criticality);
/// What the class means, one sentence; empty when there is none.
std::string criticality_meaning(Criticality criticality);

/// Low, medium, high. Ends of the middle band belong to it.
enum class Band : std::uint8_t { Low, Medium, High };
/// How bad the consequence is, by adiabatic rise: below 50, 50 to 200, above 200 K. @source as above
Band severity(double rise);
/// How likely it is that nobody is in time, by time to maximum rate: above 24, 8 to 24, below 8 h.
/// @param time  [s] @source as above
Band likelihood(double time);
/// "low", "medium", "high".
const char* band_word(Band band);

/// Source of classes and bands, as it is printed.
const char* criticality_source();

}  // namespace heatledger::safety
