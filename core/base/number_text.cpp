#include "core/base/number_text.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <cstdint>
#include <cstdio>
#include <cstdlib>

#include "core/base/check.hpp"

namespace heatledger {
namespace {

constexpr std::string_view kMinus = "\u2212";
constexpr std::string_view kThinSpace = "\u2009";

bool is_digit(char c) {
  return c >= '0' && c <= '9';
}

/// printf and strtod follow the C locale only; a face that calls setlocale must not change a figure.
std::string c_locale(std::string text) {
  std::replace(text.begin(), text.end(), ',', '.');
  return text;
}

__extension__ typedef unsigned __int128 Wide;

constexpr std::array<std::uint64_t, 19> kPowers = {1,
                                                   10,
                                                   100,
                                                   1000,
                                                   10000,
                                                   100000,
                                                   1000000,
                                                   10000000,
                                                   100000000,
                                                   1000000000,
                                                   10000000000,
                                                   100000000000,
                                                   1000000000000,
                                                   10000000000000,
                                                   100000000000000,
                                                   1000000000000000,
                                                   10000000000000000,
                                                   100000000000000000,
                                                   1000000000000000000};

/// Where the number of digits before the point changes.
constexpr std::array<double, 20> kBorders = {1e-5, 1e-4, 1e-3, 1e-2, 1e-1, 1e0,  1e1,  1e2,  1e3,  1e4,
                                             1e5,  1e6,  1e7,  1e8,  1e9,  1e10, 1e11, 1e12, 1e13, 1e14};

/// |value| · 10^places rounded to the nearest whole number, ties to even, exactly as printf rounds: the
/// double is a whole number of at most 53 bits times a power of two, so the product is formed without error
/// in 128 bits.
/// @return empty when the answer would pass 10^18 or places lie outside 0 to 18; the caller then takes the
/// slow way
std::optional<std::uint64_t> scaled_exactly(double value, int places) {
  if (places < 0 || places > 18 || !(std::fabs(value) < 1e18)) return std::nullopt;
  int exponent = 0;
  const double fraction = std::frexp(std::fabs(value), &exponent);
  const auto mantissa = static_cast<std::uint64_t>(std::ldexp(fraction, 53));
  const int shift = 53 - exponent;  // |value| = mantissa / 2^shift
  if (shift <= 0) {
    if (places != 0) return std::nullopt;
    return mantissa << -shift;  // below 1e18, so it fits
  }
  // 53 bits times 10^18 (60 bits) stay below 2^113.
  const Wide product = static_cast<Wide>(mantissa) * kPowers[static_cast<std::size_t>(places)];
  if (shift >= 116) return 0;
  Wide whole = product >> shift;
  const Wide rest = product - (whole << shift);
  const Wide half = static_cast<Wide>(1) << (shift - 1);
  if (rest > half || (rest == half && (whole & 1) != 0)) ++whole;
  if (whole > kPowers[18]) return std::nullopt;
  return static_cast<std::uint64_t>(whole);
}

/// digits with a point before the last `places`.
void append_decimal(std::string& text, std::uint64_t digits, int places) {
  std::array<char, 24> buffer{};
  std::size_t at = buffer.size();
  int written = 0;
  while (digits > 0 || written <= places) {
    if (written == places && places > 0) buffer[--at] = '.';
    buffer[--at] = static_cast<char>('0' + digits % 10);
    digits /= 10;
    ++written;
  }
  text.append(buffer.data() + at, buffer.size() - at);
}

std::string fixed(double value, int decimals) {
  if (const std::optional<std::uint64_t> scaled = scaled_exactly(value, decimals)) {
    std::string text = std::signbit(value) ? "-" : "";
    append_decimal(text, *scaled, decimals);
    return text;
  }
  std::array<char, 400> buffer{};
  const int length = std::snprintf(buffer.data(), buffer.size(), "%.*f", decimals, value);
  CHECK(length > 0 && static_cast<std::size_t>(length) < buffer.size(), "a finite number fits its buffer");
  return c_locale(std::string(buffer.data(), static_cast<std::size_t>(length)));
}

/// Up to 15 digits and a power of ten up to 22: both are exact doubles, so one division or product rounds
/// correctly.
/// @source W. D. Clinger, How to read floating point numbers accurately (PLDI 1990), fast path
std::optional<double> short_number(const std::string& plain) {
  std::uint64_t digits = 0;
  int count = 0, places = 0;
  std::size_t at = plain[0] == '-' ? 1 : 0;
  bool after_point = false;
  for (; at < plain.size() && plain[at] != 'e'; ++at) {
    if (plain[at] == '.') {
      after_point = true;
      continue;
    }
    if (digits > 0 || plain[at] != '0') ++count;
    if (count > 15 || places > 21) return std::nullopt;
    digits = digits * 10 + static_cast<std::uint64_t>(plain[at] - '0');
    places += after_point;
  }
  if (at < plain.size()) return std::nullopt;  // exponents are rare
  double power = 1;
  for (int i = 0; i < places; ++i) power *= 10;  // exact up to 10^22
  const double value = static_cast<double>(digits) / power;
  return plain[0] == '-' ? -value : value;
}

/// Any size, through printf.
std::string machine_number_slowly(double value, int digits) {
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
  if (const std::optional<double> exact = short_number(plain)) {
    length = at;
    return exact;
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

void append_machine_number(std::string& text, double value, int digits) {
  CHECK(std::isfinite(value), "a number that is written is finite");
  CHECK(digits >= 1 && digits <= 15, "1 to 15 significant digits");
  if (value == 0) {
    text += '0';
    return;
  }
  const double size = std::fabs(value);
  if (size >= 1e-6 && size < 1e15) {
    // Decimals that leave `digits` significant ones. At a border rounding may give one digit more: then all
    // are zeros.
    int places = digits + 5;
    for (const double border : kBorders) {
      if (size < border) break;
      --places;
    }
    if (const std::optional<std::uint64_t> scaled = scaled_exactly(value, places)) {
      if (value < 0) text += '-';
      append_decimal(text, *scaled, places);
      if (places > 0) {
        text.erase(text.find_last_not_of('0') + 1);
        if (text.back() == '.') text.pop_back();
      }
      return;
    }
  }
  text += machine_number_slowly(value, digits);
}

std::string machine_number(double value, int digits) {
  std::string text;
  append_machine_number(text, value, digits);
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
