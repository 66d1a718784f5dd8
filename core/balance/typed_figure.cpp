#include "core/balance/typed_figure.hpp"

#include <string>

#include "core/base/number_text.hpp"

namespace heatledger::balance {
namespace {

bool is_digit(char c) {
  return c >= '0' && c <= '9';
}

/// Length of a blank that may stand between thousands: blank, comma, thin or narrow or no-break space,
/// apostrophe.
std::size_t separator_at(std::string_view text, std::size_t at) {
  for (const std::string_view mark :
       {std::string_view(" "), std::string_view(","), std::string_view("'"), std::string_view("\u2009"),
        std::string_view("\u202f"), std::string_view("\u00a0")}) {
    if (text.substr(at, mark.size()) == mark) return mark.size();
  }
  return 0;
}

std::string without_separators(std::string_view text) {
  std::string plain;
  for (std::size_t i = 0; i < text.size();) {
    const std::size_t length = separator_at(text, i);
    const bool between = length > 0 && i > 0 && is_digit(text[i - 1]) && i + length + 2 < text.size() &&
                         is_digit(text[i + length]) && is_digit(text[i + length + 1]) &&
                         is_digit(text[i + length + 2]);
    if (between) {
      i += length;
    } else {
      plain += text[i++];
    }
  }
  return plain;
}

std::optional<double> kilojoules_per_unit(std::string_view unit) {
  while (!unit.empty() && unit.front() == ' ') unit.remove_prefix(1);
  while (!unit.empty() && unit.back() == ' ') unit.remove_suffix(1);
  for (const std::string_view per : {"/mol", "/kg"}) {
    if (unit.size() > per.size() && unit.substr(unit.size() - per.size()) == per)
      unit.remove_suffix(per.size());
  }
  if (unit.empty() || unit == "kJ") return 1.0;
  if (unit == "J") return 0.001;
  if (unit == "MJ") return 1000.0;
  if (unit == "cal") return 0.004184;
  if (unit == "kcal") return 4.184;
  return std::nullopt;
}

}  // namespace

std::optional<TypedFigure> read_typed_figure(std::string_view text) {
  while (!text.empty() && text.front() == ' ') text.remove_prefix(1);
  const std::string plain = without_separators(text);
  std::size_t length = 0;
  const std::optional<double> number = parse_number_prefix(plain, length);
  if (!number) return std::nullopt;
  const std::optional<double> unit = kilojoules_per_unit(std::string_view(plain).substr(length));
  if (!unit) return std::nullopt;
  TypedFigure figure;
  const std::string_view digits = std::string_view(plain).substr(0, length);
  const std::size_t point = digits.find('.'), exponent = digits.find_first_of("eE");
  if (point != std::string_view::npos) {
    const std::size_t end = exponent == std::string_view::npos ? digits.size() : exponent;
    for (std::size_t i = point + 1; i < end; ++i) figure.last_digit /= 10;
  }
  if (exponent != std::string_view::npos) {
    if (const std::optional<double> power = parse_number(digits.substr(exponent + 1))) {
      for (int i = 0; i < *power && i < 300; ++i) figure.last_digit *= 10;
      for (int i = 0; i > *power && i > -300; --i) figure.last_digit /= 10;
    }
  }
  figure.kilojoules = *number * *unit;
  figure.last_digit *= *unit;
  return figure;
}

}  // namespace heatledger::balance
