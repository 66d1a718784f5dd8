// A figure as it stands on a sheet under review, with what its digits leave open.
#pragma once

#include <optional>
#include <string_view>

namespace heatledger::balance {

struct TypedFigure {
  double kilojoules = 0;  ///< kJ (or the bare number: a count)
  double last_digit = 1;  ///< value of one unit of the last digit typed, same unit
};

/// Reads a number with thin spaces, blanks or commas between thousands, true minus, then nothing, J, kJ, MJ,
/// cal or kcal, optionally per mol or kg. @return empty when the text is no such figure
std::optional<TypedFigure> read_typed_figure(std::string_view text);

}  // namespace heatledger::balance
