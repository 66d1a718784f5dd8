// Where the parts of a formula text stand, for setting it in type.
#pragma once

#include <cstddef>
#include <optional>
#include <string_view>
#include <utility>
#include <vector>

namespace heatledger::molecule {

struct FormulaMarks {
  static constexpr std::size_t kNone = static_cast<std::size_t>(-1);
  std::vector<std::pair<std::size_t, std::size_t>>
      counts;                     ///< byte ranges of counts and multipliers, ascending
  std::vector<std::size_t> dots;  ///< where hydrate dots stand, ascending
  std::size_t charge = kNone;     ///< where the charge begins; the size of the text without one
};

/// @param charge  receives the charge
/// @return empty when the text is no formula
std::optional<FormulaMarks> formula_marks(std::string_view text, int& charge);

}  // namespace heatledger::molecule
