#include "core/units/quantity_text.hpp"

#include <algorithm>
#include <array>
#include <cmath>

#include "core/base/number_text.hpp"
#include "core/base/text_error.hpp"
#include "core/base/utf8.hpp"
#include "core/units/display.hpp"

namespace heatledger::units {
namespace {

constexpr std::size_t kLongestText = 400;
constexpr std::array<std::string_view, 3> kPlusMinus = {"\u00B1", "+/-", "+-"};

bool is_digit(char c) {
  return c >= '0' && c <= '9';
}

struct NumberRead {
  double value = 0;
  int decimals = 0;
};

class QuantityReader {
 public:
  explicit QuantityReader(std::string_view text) : text_(text) {}

  Result<TypedValue> read() {
    if (text_.size() > kLongestText)
      return error_at("unit.too_long", "This is too long for one quantity.", 0,
                      "Write a number and its unit.");
    skip();
    const bool bracket = at_ < text_.size() && text_[at_] == '(';
    if (bracket) ++at_, skip();
    const std::size_t number_at = at_;
    Result<NumberRead> number = read_number();
    if (!number) return number.error();

    std::optional<Uncertain> half;
    std::optional<Error> failed = read_uncertainty(half);
    if (failed) return *failed;
    if (bracket) {
      skip();
      if (at_ >= text_.size() || text_[at_] != ')') {
        return error_at("unit.unclosed_bracket", "The bracket before the number is never closed.", at_,
                        "Write (340 ± 10) kJ/mol.");
      }
      ++at_;
    }
    // The unit reaches to the end or to a ± behind it.
    skip();
    const std::size_t unit_at = at_;
    std::size_t unit_end = text_.size();
    for (const std::string_view sign : kPlusMinus) unit_end = std::min(unit_end, text_.find(sign, at_));
    Result<Unit> unit = parse_unit(text_.substr(unit_at, unit_end - unit_at));
    if (!unit) return moved(unit.error(), unit_at);
    at_ = unit_end;
    if (at_ < text_.size()) {
      if (half)
        return error_at("unit.bad_uncertainty", "There is a second ± here.", at_, "Keep one of them.");
      failed = read_uncertainty(half);
      if (failed) return *failed;
      skip();
      if (at_ < text_.size() && half) {
        if (half->percent)
          return error_at("unit.unexpected", "Nothing is expected after this.", at_,
                          "Write 340 kJ/mol ± 3 %.");
        // "± 10 kJ/mol": its unit must measure the same thing.
        const std::size_t second_at = at_;
        Result<Unit> second = parse_unit(text_.substr(at_));
        if (!second) return moved(second.error(), second_at);
        Dimension a = second->dimension, b = unit->dimension;
        if (a.kind == Kind::Temperature || a.kind == Kind::TemperatureDifference) a.kind = b.kind;
        if (a != b)
          return error_at("unit.bad_uncertainty", "The ± has another dimension than the value.", second_at,
                          "Give both the same unit.");
        half->value *= second->factor / unit->factor;
        at_ = text_.size();
      }
    }

    TypedValue typed;
    typed.value = unit->to_si(number->value);
    typed.decimals = number->decimals;
    if (!std::isfinite(typed.value))
      return error_at("unit.out_of_range", "This number is too large.", number_at, "Choose a larger unit.");
    if (half) {
      const double width =
          half->percent ? std::fabs(typed.value) * half->value / 100 : half->value * unit->factor;
      if (half->percent && unit->offset != 0) {
        return error_at("unit.bad_uncertainty", "A percentage has no meaning on a scale of temperature.",
                        half->at, "Write 25 ± 1 °C.");
      }
      if (!std::isfinite(width))
        return error_at("unit.out_of_range", "This ± is too large.", half->at, "Write a smaller one.");
      typed.u95 = width;
    }
    // Rounding may leave -273.15 °C or -459.67 °F a trifle below zero.
    if (unit->dimension.kind == Kind::Temperature && typed.value < 0) {
      if (typed.value < -1e-9)
        return error_at("unit.below_absolute_zero", "There is no temperature below absolute zero.", number_at,
                        "Check the sign and the unit.");
      typed.value = 0;
    }
    typed.unit = std::move(*unit);
    return typed;
  }

 private:
  struct Uncertain {
    double value = 0;
    bool percent = false;
    std::size_t at = 0;
  };

  void skip() { at_ = utf8::skip_blanks(text_, at_); }

  static Error moved(Error error, std::size_t by) {
    if (error.where.rfind("offset ", 0) == 0)
      error.where = "offset " + std::to_string(std::stoul(error.where.substr(7)) + by);
    return error;
  }

  /// A number, thin spaces between its thousands read over.
  Result<NumberRead> read_number() {
    const std::size_t begin = at_;
    std::string plain;
    std::vector<std::size_t> origin;  // byte in text_ after each byte of plain
    while (at_ < text_.size()) {
      const std::size_t thin = plain.empty() ? 0
                               : text_.compare(at_, 3, "\u2009") == 0 || text_.compare(at_, 3, "\u202F") == 0
                                   ? 3
                                   : 0;
      if (thin > 0 && is_digit(plain.back()) && at_ + 6 <= text_.size() && is_digit(text_[at_ + 3]) &&
          is_digit(text_[at_ + 4]) && is_digit(text_[at_ + 5])) {
        at_ += thin;
        continue;
      }
      plain += text_[at_++];
      origin.push_back(at_);
    }
    std::size_t length = 0;
    const std::optional<double> value = parse_number_prefix(plain, length);
    if (!value) {
      at_ = begin;
      return error_at("unit.no_number", "A number is expected here.", begin,
                      "Write a number and its unit, such as 1.2 t/h.");
    }
    at_ = length == 0 ? begin : origin[length - 1];
    if (length + 1 < plain.size() && plain[length] == ',' && is_digit(plain[length + 1])) {
      return error_at("unit.decimal_comma", "A comma is no decimal point here.", at_,
                      "Write the number with a point: 1.5.");
    }
    NumberRead number;
    number.value = *value;
    const std::string_view digits = std::string_view(plain).substr(0, length);
    const std::size_t point = digits.find('.');
    if (point != std::string_view::npos) {
      std::size_t end = point + 1;
      while (end < digits.size() && is_digit(digits[end])) ++end;
      number.decimals = static_cast<int>(end - point - 1);
    }
    return number;
  }

  std::optional<Error> read_uncertainty(std::optional<Uncertain>& half) {
    skip();
    for (const std::string_view sign : kPlusMinus) {
      if (text_.compare(at_, sign.size(), sign) != 0) continue;
      at_ += sign.size();
      skip();
      const std::size_t begin = at_;
      Result<NumberRead> number = read_number();
      if (!number) return number.error();
      if (number->value < 0)
        return error_at("unit.bad_uncertainty", "A ± cannot be negative.", begin,
                        "Write its half width as a positive number.");
      half = Uncertain{number->value, false, begin};
      const std::size_t percent = utf8::skip_blanks(text_, at_);
      if (percent < text_.size() && text_[percent] == '%') {
        half->percent = true;
        at_ = percent + 1;
      }
      return std::nullopt;
    }
    return std::nullopt;
  }

  std::string_view text_;
  std::size_t at_ = 0;
};

bool is_fraction(const Dimension& dimension) {
  return dimension.kg == 0 && dimension.m == 0 && dimension.s == 0 && dimension.K == 0 && dimension.mol == 0;
}

std::string unit_list(const Dimension& dimension) {
  std::string text;
  for (const std::string_view unit : suggested_units(dimension))
    text += (text.empty() ? "" : ", ") + std::string(unit);
  return text;
}

Error wrong_dimension(const TypedValue& typed, const Dimension& expected) {
  const std::string list = unit_list(expected);
  const std::string hint = list.empty() ? "Write the number alone." : "Use one of: " + list + ".";
  if (typed.unit.text.empty())
    return Error{"unit.missing", "This number has no unit; " + describe(expected) + " is expected.", "",
                 hint};
  if (typed.dimension().kind == Kind::GaugePressure && expected == dimension::kPressure) {
    return Error{"unit.dimension",
                 "\"" + typed.unit.text + "\" is a gauge pressure, but an absolute pressure is expected.", "",
                 "Add the pressure around, 1.01325 bar at sea level, and write bar."};
  }
  return Error{"unit.dimension",
               "\"" + typed.unit.text + "\" is " + describe(typed.dimension()) + ", but " +
                   describe(expected) + " is expected.",
               "", hint};
}

}  // namespace

Result<TypedValue> parse_quantity(std::string_view text) {
  return QuantityReader(text).read();
}

Result<TypedValue> parse_quantity(std::string_view text, const Dimension& expected) {
  Result<TypedValue> typed = parse_quantity(text);
  if (!typed || typed->dimension() == expected) return typed;
  const bool kelvin = typed->dimension() == dimension::kTemperature && typed->unit.offset == 0;
  if (expected == dimension::kTemperatureDifference && kelvin) {
    typed->unit.dimension = expected;
    return typed;
  }
  if (is_fraction(expected) && typed->unit.text == "%") {
    typed->unit.dimension = expected;
    return typed;
  }
  return wrong_dimension(*typed, expected);
}

Result<double> absolute_pressure(const TypedValue& typed, double ambient) {
  CHECK(ambient > 0 && std::isfinite(ambient), "the pressure around is positive");
  if (typed.dimension() != dimension::kPressure && typed.dimension() != dimension::kGaugePressure) {
    return wrong_dimension(typed, dimension::kPressure);
  }
  const double pressure =
      typed.dimension() == dimension::kGaugePressure ? typed.value + ambient : typed.value;
  if (!(pressure > 0)) {
    return Error{"unit.below_absolute_zero", "There is no pressure below zero absolute.", "",
                 "Check the sign, and whether it is a gauge pressure."};
  }
  return pressure;
}

std::string print(double in_si, const Unit& unit, int decimals) {
  std::string text = display_number(unit.from_si(in_si), decimals);
  if (!unit.display.empty()) text += (unit.display == "%" ? "\u00A0" : " ") + unit.display;
  return text;
}

std::string print(const uncertainty::Figure& figure_in_si, const Unit& unit, int most_decimals) {
  std::string text = figure_text(
      {unit.from_si(figure_in_si.value), std::fabs(figure_in_si.u95 / unit.factor)}, most_decimals);
  if (!unit.display.empty()) text += " " + unit.display;
  return text;
}

std::string machine_text(double in_si, const Unit& unit) {
  std::string text = machine_number(unit.from_si(in_si));
  if (!unit.text.empty()) text += " " + unit.text;
  return text;
}

}  // namespace heatledger::units
