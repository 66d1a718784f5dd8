#include "core/base/number_text.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <cstdio>
#include <cstdlib>

#include "core/base/check.hpp"

namespace heatledger {
namespace {

constexpr std::string_view kMinus = "\u2212";
constexpr std::string_view kThinSpace = "\u2009";

bool is_digit(char c) { return c >= '0' && c <= '9'; }

/// printf and strtod follow the C locale only; a face that calls setlocale must not change a figure.
std::string c_locale(std::string text) {
  std::replace(text.begin(), text.end(), ',', '.');
  return text;
}

std::string fixed(double value, int decimals) {
  std::array<char, 400> buffer{};
  const int length = std::snprintf(buffer.data(), buffer.size(), "%.*f", decimals, value);
  CHECK(length > 0 && static_cast<std::size_t>(length) < buffer.size(), "a finite number fits its buffer");
  return c_locale(std::string(buffer.data(), static_cast<std::size_t>(length)));
}

}  // namespace

std::optional<double> parse_number_prefix(std::string_view text, std::size_t& length) {
  length = 0;
  std::string plain;
  std::size_t at = 0;
  if (text.substr(0, kMinus.size()) == kMinus) {
    plain += '-';
    at = kMinus.size();
  } else if (!text.empty() && (text[0] == '-' || text[0] == '+')) {
    if (text[0] == '-') plain += '-';
    at = 1;
  }
  std::size_t digits = 0;
  auto take_digits = [&] {
    while (at < text.size() && is_digit(text[at])) {
      plain += text[at++];
      ++digits;
    }
  };
  take_digits();
  if (at < text.size() && text[at] == '.') {
    plain += '.';
    ++at;
    take_digits();
  }
  if (digits == 0) return std::nullopt;
  if (at < text.size() && (text[at] == 'e' || text[at] == 'E')) {
    std::size_t exponent = at + 1;
    std::string sign;
    if (text.substr(exponent, kMinus.size()) == kMinus) {
      sign = "-";
      exponent += kMinus.size();
    } else if (exponent < text.size() && (text[exponent] == '-' || text[exponent] == '+')) {
      sign = text[exponent++];
    }
    if (exponent < text.size() && is_digit(text[exponent])) {
      plain += 'e' + sign;
      while (exponent < text.size() && is_digit(text[exponent])) plain += text[exponent++];
      at = exponent;
    }
  }
  char* end = nullptr;
  double value = std::strtod(plain.c_str(), &end);
  if (end != plain.c_str() + plain.size()) {
    // A face has set a locale whose decimal point is a comma.
    std::replace(plain.begin(), plain.end(), '.', ',');
    value = std::strtod(plain.c_str(), &end);
    if (end != plain.c_str() + plain.size()) return std::nullopt;
  }
  if (!std::isfinite(value)) return std::nullopt;
  length = at;
  return value;
}

std::optional<double> parse_number(std::string_view text) {
  std::size_t length = 0;
  const std::optional<double> value = parse_number_prefix(text, length);
  if (!value || length != text.size()) return std::nullopt;
  return value;
}

std::string machine_number(double value, int digits) {
  CHECK(std::isfinite(value), "a number that is written is finite");
  CHECK(digits >= 1 && digits <= 15, "1 to 15 significant digits");
  if (value == 0) return "0";
  std::array<char, 64> buffer{};
  std::snprintf(buffer.data(), buffer.size(), "%.*e", digits - 1, value);
  const std::string scientific = c_locale(buffer.data());
  const std::size_t e = scientific.find('e');
  const int exponent = std::atoi(scientific.c_str() + e + 1);
  if (exponent < -6 || exponent >= 15) {
    std::string mantissa = scientific.substr(0, e);
    if (mantissa.find('.') != std::string::npos) {
      mantissa.erase(mantissa.find_last_not_of('0') + 1);
      if (mantissa.back() == '.') mantissa.pop_back();
    }
    return mantissa + "e" + std::to_string(exponent);
  }
  std::string text = fixed(value, std::max(0, digits - 1 - exponent));
  if (digits - 1 - exponent < 0) text = fixed(std::strtod(buffer.data(), nullptr), 0);
  if (text.find('.') != std::string::npos) {
    text.erase(text.find_last_not_of('0') + 1);
    if (text.back() == '.') text.pop_back();
  }
  return text;
}

std::string display_number(double value, int decimals) {
  CHECK(std::isfinite(value), "a number that is shown is finite");
  CHECK(decimals >= 0 && decimals <= 12, "0 to 12 decimals");
  std::string digits = fixed(std::fabs(value), decimals);
  const bool zero = digits.find_first_not_of("0.") == std::string::npos;
  const std::size_t point = std::min(digits.find('.'), digits.size());
  std::string text;
  if (value < 0 && !zero) text += kMinus;
  for (std::size_t i = 0; i < point; ++i) {
    if (i > 0 && (point - i) % 3 == 0) text += kThinSpace;
    text += digits[i];
  }
  text.append(digits, point, std::string::npos);
  return text;
}

std::string display_signed(double value, int decimals) {
  std::string text = display_number(value, decimals);
  const bool zero = text.find_first_not_of("0.") == std::string::npos;
  return value > 0 && !zero ? "+" + text : text;
}

}  // namespace heatledger
