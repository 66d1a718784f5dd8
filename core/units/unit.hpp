// Units of measure: reading their text, converting to SI and back. Whole quantities ("1.2 t/h") stand in
// quantity_text.hpp, the table of units in unit_table.hpp.
#pragma once

#include <string>
#include <string_view>

#include "core/base/result.hpp"
#include "core/units/dimension.hpp"

namespace heatledger::units {

/// SI value = factor × value + offset; the offset is zero except on scales of temperature.
struct Unit {
  double factor = 1, offset = 0;
  Dimension dimension;
  std::string text;     ///< as typed, reads back to the same unit
  std::string display;  ///< set for people: "m³", "°C", "kJ/(kg·K)"

  double to_si(double value) const { return factor * value + offset; }
  double from_si(double value) const { return (value - offset) / factor; }
};

/// Reads a unit: names of the table with exponents, joined by blank, "·", "*" or "-", divided by "/". What
/// follows a slash up to the next one is below the line: "J/mol K" is "J/(mol K)". Exponents as "m2", "m^2",
/// "m²", "s-1". A scale of temperature within a product is the difference: "kJ/(kg °C)". The empty text is a
/// plain number.
/// @errors unit.unknown (hint: the nearest name), unit.ambiguous (standard m3, ton, gal, ppm, %: lists what
/// to write),
///         unit.bad_exponent, unit.unclosed_bracket, unit.unexpected, unit.too_long; `where` is "offset N"
/// @example Units.ReadsEverySpellingOfProducts
Result<Unit> parse_unit(std::string_view text);

}  // namespace heatledger::units
