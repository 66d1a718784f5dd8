// Arithmetic over quantities. Expected figures are worked out by hand from the definitions of the units.
#include "core/units/expression.hpp"

#include <gtest/gtest.h>

#include <cmath>

namespace heatledger::units {
namespace {

namespace d = dimension;

NamedFigures names() {
  NamedFigures all;
  all["feed"] = {uncertainty::Quantity(1.5, 0.03, 7), d::kMassFlow};
  all["ratio"] = {uncertainty::Quantity(4), d::kNumber};
  all["jacket"] = {uncertainty::Quantity(353.15), d::kTemperature};
  all["zero_flow"] = {uncertainty::Quantity(0), d::kMassFlow};
  return all;
}

struct Case {
  const char* text;
  Dimension dimension;
  double si;
};

TEST(Expressions, ReadsArithmeticAsOnPaper) {
  const Case cases[] = {
      {"1.2 t/h", d::kMassFlow, 1.2 * 1000 / 3600},
      {"2*(1.05-0.03) kmol/h", d::kMolarFlow, 2 * 1.02 * 1000 / 3600},
      {"1.2 t/h / 3", d::kMassFlow, 0.4 * 1000 / 3600},
      {"feed / 3", d::kMassFlow, 0.5},
      {"feed*ratio", d::kMassFlow, 6},
      {"feed / ratio + 0.5 kg/s", d::kMassFlow, 0.875},
      {"3 kg / 2 min", d::kMassFlow, 0.025},
      {"1/4 * 8 kg", d::kMass, 2},
      {"2^3 kg*1", d::kMass, 8},
      {"(1+1)^2 h", d::kTime, 4 * 3600.0},
      {"12 kmol/h * 0.5 - 1 kmol/h", d::kMolarFlow, 5 * 1000 / 3600.0},
      {"4.184 J/(g K) * 2 t", d::kHeatCapacity, 4184.0 * 2000},
      {"\u22123 kW + 5 kW", d::kPower, 2000},
      {"2 \u00D7 3 kJ", d::kEnergy, 6000},
      {"5 * 20 %", d::kNumber, 1},
      {"-(2-5) kg", d::kMass, 3},
      {"7 - -2", d::kNumber, 9},
  };
  for (const Case& one : cases) {
    const Result<TypedValue> got = evaluate_quantity(one.text, one.dimension, names());
    ASSERT_TRUE(got.ok()) << one.text << ": " << got.error().message;
    EXPECT_NEAR(got->value, one.si, 1e-12 * std::abs(one.si)) << one.text;
    EXPECT_EQ(got->dimension(), one.dimension) << one.text;
  }
}

TEST(Expressions, KeepsTemperaturesAndDifferencesApart) {
  const Case good[] = {
      {"80 °C + 15 K", d::kTemperature, 368.15},
      {"15 K + 80 °C", d::kTemperature, 368.15},
      {"jacket - 10 K", d::kTemperature, 343.15},
      {"60 °C - 20 °C", d::kTemperatureDifference, 40},
      {"350 K - 298 K", d::kTemperatureDifference, 52},
      {"350 K - 298 K", d::kTemperature, 52},
      {"2 * (60 °C - 20 °C)", d::kTemperatureDifference, 80},
      {"-5 °C + 10 K", d::kTemperature, 278.15},
      {"4 kJ/K * (60 °C - 20 °C)", d::kEnergy, 160000},
  };
  for (const Case& one : good) {
    const Result<TypedValue> got = evaluate_quantity(one.text, one.dimension, names());
    ASSERT_TRUE(got.ok()) << one.text << ": " << got.error().message;
    EXPECT_NEAR(got->value, one.si, 1e-9) << one.text;
  }
  for (const char* bad : {"80 °C + 20 °C", "2 * 80 °C", "jacket / 2", "(20+5) °C"})
    EXPECT_FALSE(evaluate_quantity(bad, d::kTemperature, names()).ok()) << bad;
  EXPECT_FALSE(evaluate_quantity("60 °C - 20 °C", d::kTemperature, names()).ok());
}

TEST(Expressions, KeepsGaugeAndAbsolutePressureApart) {
  const Result<Evaluated> gauge = evaluate("3 barg + 0.5 bar", names());
  ASSERT_TRUE(gauge.ok());
  EXPECT_EQ(gauge->dimension, d::kGaugePressure);
  EXPECT_NEAR(gauge->value.value(), 3.5e5, 1e-6);
  const Result<Evaluated> drop = evaluate("3 barg - 1 barg", names());
  ASSERT_TRUE(drop.ok());
  EXPECT_EQ(drop->dimension, d::kPressure);
  EXPECT_FALSE(evaluate("3 barg + 1 barg", names()).ok());
  EXPECT_FALSE(evaluate("2 * 3 barg", names()).ok());
}

TEST(Expressions, SpellsOutBothDimensions) {
  const Result<Evaluated> sum = evaluate("3 kg + 2 kmol", names());
  ASSERT_FALSE(sum.ok());
  EXPECT_EQ(sum.error().code, "unit.no_sum");
  EXPECT_NE(sum.error().message.find("a mass"), std::string::npos);
  EXPECT_NE(sum.error().message.find("an amount of substance"), std::string::npos);
  const Result<TypedValue> whole = evaluate_quantity("feed * 2 h", d::kPower, names());
  ASSERT_FALSE(whole.ok());
  EXPECT_EQ(whole.error().code, "unit.dimension");
  EXPECT_NE(whole.error().message.find("a mass"), std::string::npos);
  EXPECT_NE(whole.error().message.find("a power"), std::string::npos);
}

TEST(Expressions, CarriesTheInterval) {
  const Result<TypedValue> product = evaluate_quantity("2 * feed", d::kMassFlow, names());
  ASSERT_TRUE(product.ok());
  EXPECT_NEAR(product->u95.value_or(0), 0.06, 1e-12);
  // One name is one error: what is taken away with itself has none.
  const Result<TypedValue> none = evaluate_quantity("feed - feed", d::kMassFlow, names());
  ASSERT_TRUE(none.ok());
  EXPECT_EQ(none->u95.value_or(0), 0);
  // Two typed figures are two errors: 3 and 4 make 5.
  const Result<TypedValue> two = evaluate_quantity("(10 ± 3 kg) + (20 ± 4 kg)", d::kMass, names());
  ASSERT_TRUE(two.ok());
  EXPECT_NEAR(two->u95.value_or(0), 5, 1e-12);
  const Result<TypedValue> quotient = evaluate_quantity("(100 ± 1 kg) / (10 ± 0.2)", d::kMass, names());
  ASSERT_TRUE(quotient.ok());
  EXPECT_NEAR(quotient->u95.value_or(0), std::hypot(0.1, 0.2), 1e-12);
}

TEST(Expressions, RefusesBadTextWithCodeAndOffset) {
  const struct {
    const char *text, *code, *where;
  } cases[] = {
      {"2 * (3 + 4", "unit.unclosed_bracket", "offset 4"},
      {"2 * 3)", "unit.unclosed_bracket", "offset 5"},
      {"2 * unknown_thing", "unit.unknown_name", "offset 4"},
      {"3 kg / zero_flow", "unit.division_by_zero", "offset 5"},
      {"3 kg / (2 - 2)", "unit.division_by_zero", "offset 5"},
      {"2 + ", "unit.no_number", "offset 4"},
      {"2^99 * 3", "unit.bad_exponent", "offset 1"},
      {"1e200 kg * 1e200", "unit.out_of_range", "offset 9"},
      {"1,5 kg", "unit.decimal_comma", "offset 1"},
  };
  for (const auto& one : cases) {
    const Result<Evaluated> got = evaluate(one.text, names());
    ASSERT_FALSE(got.ok()) << one.text;
    EXPECT_EQ(got.error().code, one.code) << one.text;
    EXPECT_EQ(got.error().where, one.where) << one.text;
    EXPECT_FALSE(got.error().message.empty());
  }
}

TEST(Expressions, NamesAreNoUnits) {
  EXPECT_TRUE(usable_name("feed_ratio").ok());
  for (const char* bad : {"kg", "h", "", "2a", "a b", "K", "a-b"}) EXPECT_FALSE(usable_name(bad).ok()) << bad;
  const auto known = [](std::string_view name) { return names().count(name) > 0; };
  EXPECT_EQ(names_called("ratio*(feed + 2 kg/s) - feed*2ratio", known),
            (std::vector<std::string>{"ratio", "feed"}));
}

TEST(Expressions, ASingleQuantityStaysOne) {
  const Result<Evaluated> one = evaluate("340 ± 10 kJ/mol", names());
  ASSERT_TRUE(one.ok());
  EXPECT_FALSE(one->calculated);
  EXPECT_EQ(one->unit.text, "kJ/mol");
  EXPECT_NEAR(one->value.u95(), 10000, 1e-9);
}

}  // namespace
}  // namespace heatledger::units
