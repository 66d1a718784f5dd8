#include "core/base/number_text.hpp"

#include <gtest/gtest.h>

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

}  // namespace
}  // namespace heatledger
