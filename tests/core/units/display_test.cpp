#include "core/units/display.hpp"

#include <gtest/gtest.h>

namespace heatledger::units {
namespace {

TEST(Display, KeepsTwoDigitsOfTheInterval) {
  EXPECT_EQ(decimals_for(3.0, 6), 1);
  EXPECT_EQ(decimals_for(0.25, 6), 2);
  EXPECT_EQ(decimals_for(25, 6), 0);
  EXPECT_EQ(decimals_for(1234, 6), 0);
  EXPECT_EQ(decimals_for(0.000012, 3), 3);
  EXPECT_EQ(decimals_for(0, 1), 1);
}

TEST(Display, CountsDigitsAfterRounding) {
  // 9.96 rounds to 10, which has its two digits without a decimal.
  EXPECT_EQ(decimals_for(9.96, 6), 0);
  EXPECT_EQ(decimals_for(9.94, 6), 1);
  EXPECT_EQ(decimals_for(0.996, 6), 1);
}

TEST(Display, WritesFiguresForRunningText) {
  EXPECT_EQ(figure_text({-552.6, 3.04}, 1), "\u2212552.6 \u00B1 3.0");
  EXPECT_EQ(figure_text({-552.64, 30.4}, 1), "\u2212553 \u00B1 30");
  EXPECT_EQ(figure_text({12, 0}, 1), "12.0");
}

}  // namespace
}  // namespace heatledger::units
