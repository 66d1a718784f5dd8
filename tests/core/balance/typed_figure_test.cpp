#include "core/balance/typed_figure.hpp"

#include <gtest/gtest.h>

namespace heatledger::balance {
namespace {

TEST(TypedFigure, ReadsWhatStandsOnPaper) {
  const struct {
    const char* text;
    double kilojoules, last_digit;
  } cases[] = {{"-518", -518, 1},
               {"\u2212518.3", -518.3, 0.1},
               {"6 225", 6225, 1},
               {"6\u2009225", 6225, 1},
               {"6,225 kJ", 6225, 1},
               {"1'234'567", 1234567, 1},
               {"-552.56 kJ/mol", -552.56, 0.01},
               {"-518000 J", -518, 0.001},
               {"-123.8 kcal", -517.9792, 0.4184},
               {"-4.49 MJ/kg", -4490, 10},
               {" 12 ", 12, 1},
               {"5e2", 500, 100}};
  for (const auto& c : cases) {
    const auto figure = read_typed_figure(c.text);
    ASSERT_TRUE(figure.has_value()) << c.text;
    EXPECT_NEAR(figure->kilojoules, c.kilojoules, 1e-9) << c.text;
    EXPECT_NEAR(figure->last_digit, c.last_digit, 1e-9) << c.text;
  }
}

TEST(TypedFigure, RefusesWhatIsNoFigure) {
  for (const char* text : {"", "about 5", "12 apples", "5 kW", "--3", "1,5"})
    EXPECT_FALSE(read_typed_figure(text).has_value()) << text;
}

}  // namespace
}  // namespace heatledger::balance
