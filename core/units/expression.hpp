// Arithmetic over quantities as one would write it on paper: "2*(1.05-0.03) kmol/h", "feed / 3",
// "80 °C + 15 K". Single quantities stand in quantity_text.hpp.
#pragma once

#include <functional>
#include <map>
#include <string>
#include <string_view>
#include <vector>

#include "core/units/quantity_text.hpp"

namespace heatledger::units {

/// A figure that an expression may call by its name.
struct NamedFigure {
  uncertainty::Quantity value;  ///< SI
  Dimension dimension;
  bool kelvin = false;  ///< in K: a temperature or a difference, as it is used
};
using NamedFigures = std::map<std::string, NamedFigure, std::less<>>;

/// An expression worked out.
struct Evaluated {
  uncertainty::Quantity value;  ///< SI; a name used twice is one error, each ± typed in the text another
  Dimension dimension;
  Unit unit;         ///< as typed when the text is a single quantity, else one that suits the dimension
  int decimals = 0;  ///< of the number typed; of a calculation all that there are
  bool calculated = false;  ///< more than one quantity
  bool kelvin = false;      ///< see NamedFigure
};

/// Reads a quantity, or sums, differences, products, quotients, whole powers and brackets of quantities and
/// names. A bracket may carry a unit. Temperatures: a scale plus or minus a difference is a temperature, the
/// difference of two is a difference; K counts as a difference behind a sign and in products. Gauge
/// pressures: likewise with a pressure.
/// @errors those of parse_quantity; unit.unknown_name, unit.no_sum (both dimensions spelled out),
///         unit.no_product, unit.division_by_zero, unit.bad_exponent, unit.unclosed_bracket, unit.unexpected,
///         unit.out_of_range; `where` is "offset N"
/// @example Expressions.ReadsArithmeticAsOnPaper
/// @param cell  below 2^32: keeps the ± typed in one cell apart from those typed in others
Result<Evaluated> evaluate(std::string_view text, const NamedFigures& names, std::uint64_t cell = 0);

/// The same as parse_quantity gives it.
Result<TypedValue> evaluate_quantity(std::string_view text, const NamedFigures& names);
/// The same, and the dimension must be this one, with the leave that parse_quantity gives.
/// @errors also unit.dimension and unit.missing
Result<TypedValue> evaluate_quantity(std::string_view text, const Dimension& expected,
                                     const NamedFigures& names);

/// The names that an expression calls, each once, in the order of the text; units are none.
std::vector<std::string> names_called(std::string_view text,
                                      const std::function<bool(std::string_view)>& is_name);

/// Whether a figure may be called this: letters, digits and underscores, a letter first, and no unit.
/// @errors unit.bad_name
Status usable_name(std::string_view name);

}  // namespace heatledger::units
