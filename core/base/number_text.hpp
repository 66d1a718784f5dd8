// Number text that never depends on the locale and gives the same digits natively and in WebAssembly.
// Units and quantities stand in core/units; here are plain numbers only.
#pragma once

#include <optional>
#include <string>
#include <string_view>

namespace heatledger {

/// Reads one plain decimal number ("-12.5", "1e-3", "+4", "−3,5" is refused: comma is no decimal point).
/// Accepts the true minus sign U+2212. Correctly rounded to the nearest double.
/// @return empty when the whole text is not one finite number
std::optional<double> parse_number(std::string_view text);

/// As parse_number, but reads a prefix; `length` receives the bytes taken.
std::optional<double> parse_number_prefix(std::string_view text, std::size_t& length);

/// `value` rounded to at most `digits` significant digits (1 to 15), shortest form, '.' as point, '-' as
/// minus: the text for files and JSON. Exponent form outside 1e-6 .. 1e15. Zero is "0", never "-0".
/// @validity finite values; CHECKs otherwise (a value that cannot be computed is never a number)
/// Exact: from 1e-6 to 1e9 in whole numbers of 128 bits, elsewhere by printf; both give the same text.
std::string machine_number(double value, int digits = 10);
/// The same at the end of a text; takes no memory of its own.
void append_machine_number(std::string& text, double value, int digits = 10);

/// `value` with exactly `decimals` decimals (0 to 12) for people: true minus sign U+2212, thin-space (U+2009)
/// thousands from 1 000 on, '.' as point. A value that rounds to zero shows no sign.
std::string display_number(double value, int decimals);

/// As display_number with an explicit + before positive values.
std::string display_signed(double value, int decimals);

}  // namespace heatledger
