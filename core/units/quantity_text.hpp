// Quantities as people type and read them: "25 °C", "1.2 t/h", "340 kJ/mol ± 10". One number and one unit;
// sums and products of quantities belong to a reader of expressions on top of this.
#pragma once

#include <optional>
#include <string>
#include <string_view>

#include "core/base/result.hpp"
#include "core/uncertainty/quantity.hpp"
#include "core/units/constants.hpp"
#include "core/units/unit.hpp"

namespace heatledger::units {

/// A quantity that a person typed.
struct TypedValue {
  double value = 0;           ///< SI; absolute scale for temperatures, above ambient for gauge pressures
  std::optional<double> u95;  ///< SI, half width of the 95 % interval; empty when none was typed
  Unit unit;                  ///< as typed, for printing back
  int decimals = 0;           ///< decimals of the typed number: what rounding its writer allowed himself
  const Dimension& dimension() const { return unit.dimension; }
};

/// Reads a number with its unit and, if there, its ±: "340 kJ/mol ± 10", "340 ± 10 kJ/mol", "(340 ± 10)
/// kJ/mol", "340 kJ/mol ± 3 %", "±" also as "+-" and "+/-". Thin spaces between thousands are read over.
/// @errors unit.no_number, unit.decimal_comma, unit.bad_uncertainty, unit.below_absolute_zero,
/// unit.out_of_range, and those
///         of parse_unit; `where` is "offset N"
/// @example Quantities.ReadsWhatEngineersType
Result<TypedValue> parse_quantity(std::string_view text);

/// The same, and the dimension must be this one. A temperature in K serves where a difference is expected,
/// the scales of °C and °F do not; % serves for any fraction and ratio.
/// @errors unit.dimension: message spells out what was typed and what is expected; unit.missing: a bare
/// number
Result<TypedValue> parse_quantity(std::string_view text, const Dimension& expected);

/// Absolute pressure from an absolute or a gauge one [Pa]. @param ambient [Pa] pressure around, above 0
/// @errors unit.dimension, unit.below_absolute_zero (a vacuum deeper than the ambient pressure)
Result<double> absolute_pressure(const TypedValue& typed, double ambient = kStandardAtmosphere);

/// "1.20 t/h" for people: true minus, thin spaces, `decimals` decimals, the unit set.
std::string print(double in_si, const Unit& unit, int decimals);
/// "340 ± 10 kJ/mol", decimals as the ± justifies, at most `most_decimals`; the ± is left out when it is
/// zero.
std::string print(const uncertainty::Figure& figure_in_si, const Unit& unit, int most_decimals);
/// "1.2 t/h" for files: reads back through parse_quantity to the same figure (10 digits).
std::string machine_text(double in_si, const Unit& unit);

}  // namespace heatledger::units
