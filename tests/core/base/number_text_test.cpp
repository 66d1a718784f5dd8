#include "core/base/number_text.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <cstdint>
#include <cstdio>
#include <cstdlib>
#include <cstring>

namespace heatledger {
namespace {

TEST(NumberText, ReadsPlainNumbersInEverySpelling) {
  EXPECT_EQ(parse_number("12.5"), 12.5);
  EXPECT_EQ(parse_number("-1e-3"), -1e-3);
  EXPECT_EQ(parse_number("\u2212552.6"), -552.6);
  EXPECT_EQ(parse_number("1e\u22123"), 1e-3);
  EXPECT_EQ(parse_number("+4."), 4.0);
  EXPECT_EQ(parse_number(".5"), 0.5);
}

TEST(NumberText, RefusesWhatIsNotOneFiniteNumber) {
  for (const char* text : {"", "-", ".", "1,5", "1e", "nan", "inf", "1e999", "0x10", "12 ", " 12", "1.2.3"}) {
    EXPECT_FALSE(parse_number(text).has_value()) << text;
  }
}

TEST(NumberText, PrefixStopsWhereTheNumberEnds) {
  std::size_t length = 0;
  EXPECT_EQ(parse_number_prefix("1.2t/h", length), 1.2);
  EXPECT_EQ(length, 3u);
  EXPECT_EQ(parse_number_prefix("3e bar", length), 3.0);
  EXPECT_EQ(length, 1u);
}

TEST(NumberText, MachineNumbersAreShortAndRoundToTenDigits) {
  EXPECT_EQ(machine_number(0.1 + 0.2), "0.3");
  EXPECT_EQ(machine_number(-552.6), "-552.6");
  EXPECT_EQ(machine_number(1234567890123.0), "1234567890000");
  EXPECT_EQ(machine_number(9.99999999999), "10");
  EXPECT_EQ(machine_number(1.5e-9), "1.5e-9");
  EXPECT_EQ(machine_number(-0.0), "0");
  EXPECT_EQ(machine_number(1e20), "1e20");
  EXPECT_EQ(machine_number(0.001234), "0.001234");
}

TEST(NumberText, DisplayUsesTrueMinusAndThinSpaces) {
  EXPECT_EQ(display_number(-6225.4, 0), "\u22126\u2009225");
  EXPECT_EQ(display_number(1234567.891, 1), "1\u2009234\u2009567.9");
  EXPECT_EQ(display_number(-0.04, 1), "0.0");
  EXPECT_EQ(display_signed(55, 1), "+55.0");
  EXPECT_EQ(display_signed(0.01, 1), "0.0");
}

/// Splitmix64: the same numbers on every platform.
struct Random {
  std::uint64_t state;
  std::uint64_t next() {
    state += 0x9e3779b97f4a7c15ULL;
    std::uint64_t z = state;
    z = (z ^ (z >> 30)) * 0xbf58476d1ce4e5b9ULL;
    z = (z ^ (z >> 27)) * 0x94d049bb133111ebULL;
    return z ^ (z >> 31);
  }
  double between(double low, double high) {
    return low + (high - low) * static_cast<double>(next() >> 11) * 0x1p-53;
  }
};

/// What machine_number promises, spelled with printf alone.
std::string by_printf(double value, int digits) {
  char text[64];
  std::snprintf(text, sizeof text, "%.*e", digits - 1, value);
  const int exponent = std::atoi(std::strchr(text, 'e') + 1);
  std::snprintf(text, sizeof text, "%.*f", std::max(0, digits - 1 - exponent), value);
  std::string result = text;
  if (result.find('.') != std::string::npos) {
    result.erase(result.find_last_not_of('0') + 1);
    if (result.back() == '.') result.pop_back();
  }
  return result;
}

TEST(NumberText, MachineNumbersEqualPrintfOnAMillionValues) {
  Random random{20240229};
  std::size_t differing = 0;
  std::string text;
  for (int i = 0; i < 1000000; ++i) {
    // Every size from 1e-6 to 1e9, and among them short decimals, whose halves are the hard cases.
    double value = std::exp2(random.between(-19.9, 29.8));
    if (i % 2 == 0) value = std::round(value * 1000) / 1000;
    if (i % 3 == 0) value = static_cast<double>(random.next() % 2000000001) / 1024.0;
    if (i % 5 == 0) value = -value;
    if (value == 0 || std::fabs(value) < 1e-6 || std::fabs(value) >= 1e9) continue;
    text.clear();
    append_machine_number(text, value);
    if (text != by_printf(value, 10)) {
      ++differing;
      EXPECT_EQ(text, by_printf(value, 10)) << "value " << i;
      if (differing > 5) return;
    }
  }
}

TEST(NumberText, RoundsTiesAndBordersAsPrintf) {
  for (const int digits : {1, 2, 3, 10, 15}) {
    for (const double value : {0.5,
                               1.5,
                               2.5,
                               0.125,
                               0.375,
                               9.5,
                               99.5,
                               0.95,
                               9.99999999995,
                               99999.99999995,
                               999999999.95,
                               1e-6,
                               1e-5,
                               0.001,
                               0.1,
                               1.0,
                               10.0,
                               1000000.0,
                               123456789.5,
                               4294967296.5,
                               8.5,
                               2.25,
                               1e-6 * (1 - 1e-15) + 1e-20}) {
      if (value < 1e-6 || (value >= 10 && digits < 10)) continue;
      EXPECT_EQ(machine_number(value, digits), by_printf(value, digits)) << value << " at " << digits;
    }
  }
}

TEST(NumberText, DisplayRoundsAsPrintf) {
  Random random{7};
  for (int i = 0; i < 100000; ++i) {
    const double value = std::exp2(random.between(-30, 9.9));
    char expected[64];
    const int decimals = static_cast<int>(random.next() % 13);
    std::snprintf(expected, sizeof expected, "%.*f", decimals, value);
    ASSERT_EQ(display_number(value, decimals), expected) << i;
  }
}

TEST(NumberText, ReadsAsStrtodDoes) {
  Random random{11};
  for (int i = 0; i < 200000; ++i) {
    char text[64];
    const int decimals = static_cast<int>(random.next() % 18);
    std::snprintf(text, sizeof text, "%.*f", decimals,
                  random.between(-1e6, 1e6) * std::exp2(random.between(-40, 20)));
    const std::optional<double> value = parse_number(text);
    ASSERT_TRUE(value.has_value()) << text;
    ASSERT_EQ(*value, std::strtod(text, nullptr)) << text;
  }
}

}  // namespace
}  // namespace heatledger
