#include "core/units/quantity_text.hpp"

#include <gtest/gtest.h>

#include "tests/core/support/test_files.hpp"

namespace heatledger::units {
namespace {

TypedValue read(std::string_view text) {
  const Result<TypedValue> typed = parse_quantity(text);
  EXPECT_TRUE(typed.ok()) << text << ": " << (typed.ok() ? "" : typed.error().message);
  return typed.ok() ? *typed : TypedValue{};
}

TEST(Quantities, ReadsWhatEngineersType) {
  EXPECT_NEAR(read("1.2 t/h").value, 1200.0 / 3600, 1e-15);
  EXPECT_EQ(read("85 kcal/mol").value, 85 * 4184.0);
  EXPECT_EQ(read("3 barg").value, 3e5);
  EXPECT_EQ(read("3barg").dimension(), dimension::kGaugePressure);
  EXPECT_EQ(read("25 \u00B0C").value, 298.15);
  EXPECT_EQ(read("25degC").value, 298.15);
  EXPECT_EQ(read("298 K").value, 298);
  EXPECT_EQ(read("\u22126\u2009225.4 kJ").value, -6225400);
  EXPECT_EQ(read("96 wt%").value, 0.96);
  EXPECT_EQ(read("12").dimension(), dimension::kNumber);
  EXPECT_EQ(read("12.50 m3").decimals, 2);
  EXPECT_EQ(read("1e-3 mol").value, 1e-3);
}

TEST(Quantities, ReadsTheirInterval) {
  for (const char* text : {"340 kJ/mol \u00B1 10", "340 \u00B1 10 kJ/mol", "(340 \u00B1 10) kJ/mol",
                           "340 kJ/mol +- 10", "340 kJ/mol +/- 10 kJ/mol", "340 kJ/mol \u00B1 10000 J/mol"}) {
    EXPECT_EQ(read(text).value, 340000) << text;
    ASSERT_TRUE(read(text).u95.has_value()) << text;
    EXPECT_NEAR(*read(text).u95, 10000, 1e-9) << text;
  }
  EXPECT_NEAR(*read("200 kJ/mol \u00B1 3 %").u95, 6000, 1e-9);
  EXPECT_NEAR(*read("-200 \u00B1 3% kJ/mol").u95, 6000, 1e-9);
  EXPECT_EQ(*read("25 \u00B1 1 \u00B0C").u95, 1);
  EXPECT_EQ(*read("25 \u00B0C \u00B1 1 K").u95, 1);
  EXPECT_NEAR(*read("77 \u00B1 1.8 \u00B0F").u95, 1, 1e-12);
  EXPECT_FALSE(read("340 kJ/mol").u95.has_value());
}

TEST(Quantities, SpellsOutBothDimensions) {
  const Result<TypedValue> energy = parse_quantity("85 kcal", dimension::kEnergyPerMole);
  ASSERT_FALSE(energy.ok());
  EXPECT_EQ(energy.error().code, "unit.dimension");
  EXPECT_EQ(energy.error().message, "\"kcal\" is an energy, but an energy per mole is expected.");
  EXPECT_NE(energy.error().hint.find("kJ/mol"), std::string::npos);
  EXPECT_EQ(parse_quantity("85", dimension::kEnergyPerMole).error().code, "unit.missing");
  EXPECT_EQ(parse_quantity("3 barg", dimension::kPressure).error().message,
            "\"barg\" is a gauge pressure, but an absolute pressure is expected.");
  EXPECT_EQ(parse_quantity("85 kJ/kg", dimension::kEnergyPerMole).error().message,
            "\"kJ/kg\" is an energy per mass, but an energy per mole is expected.");
}

TEST(Quantities, KeepsTemperatureAndDifferenceApart) {
  EXPECT_EQ(parse_quantity("10 K", dimension::kTemperatureDifference)->value, 10);
  EXPECT_EQ(parse_quantity("10 K", dimension::kTemperature)->value, 10);
  EXPECT_EQ(parse_quantity("10 \u00B0C", dimension::kTemperatureDifference).error().code, "unit.dimension");
  EXPECT_EQ(read("4.18 kJ/(kg \u00B0C)").value, 4180);
}

TEST(Quantities, KeepsGaugeAndAbsolutePressureApart) {
  EXPECT_EQ(*absolute_pressure(read("3 barg")), 401325);
  EXPECT_EQ(*absolute_pressure(read("3 barg"), 95000), 395000);
  EXPECT_EQ(*absolute_pressure(read("3 bar")), 300000);
  EXPECT_EQ(*absolute_pressure(read("-0.5 barg")), 51325);
  EXPECT_EQ(absolute_pressure(read("-2 barg")).error().code, "unit.below_absolute_zero");
  EXPECT_EQ(absolute_pressure(read("3 kJ")).error().code, "unit.dimension");
}

TEST(Quantities, TakesPercentForAnyFraction) {
  EXPECT_EQ(parse_quantity("5 %", dimension::kMassFraction)->value, 0.05);
  EXPECT_EQ(parse_quantity("5 wt%", dimension::kMoleFraction).error().code, "unit.dimension");
}

TEST(Quantities, PrintsForPeopleAndForFiles) {
  const Unit tonnes = *parse_unit("t/h");
  EXPECT_EQ(print(1200.0 / 3600, tonnes, 2), "1.20 t/h");
  EXPECT_EQ(machine_text(1200.0 / 3600, tonnes), "1.2 t/h");
  EXPECT_EQ(print(298.15, *parse_unit("degC"), 1), "25.0 \u00B0C");
  EXPECT_EQ(print(uncertainty::Figure{-552600, 3040}, *parse_unit("kJ/mol"), 1),
            "\u2212552.6 \u00B1 3.0 kJ/mol");
  EXPECT_EQ(print(4180, *parse_unit("kJ/kg K"), 2), "4.18 kJ/(kg\u00B7K)");
}

TEST(Quantities, EverySuggestedUnitHasTheDimensionThatSuggestsIt) {
  for (const Dimension& one : {dimension::kEnergy,
                               dimension::kEnergyPerMole,
                               dimension::kEnergyPerMass,
                               dimension::kPower,
                               dimension::kTemperature,
                               dimension::kPressure,
                               dimension::kGaugePressure,
                               dimension::kMass,
                               dimension::kAmount,
                               dimension::kMolarMass,
                               dimension::kMassFlow,
                               dimension::kMolarFlow,
                               dimension::kLength,
                               dimension::kArea,
                               dimension::kVolume,
                               dimension::kVolumeFlow,
                               dimension::kTime,
                               dimension::kRate,
                               dimension::kDensity,
                               dimension::kConcentration,
                               dimension::kMolality,
                               dimension::kHeatCapacity,
                               dimension::kMolarHeatCapacity,
                               dimension::kMassHeatCapacity,
                               dimension::kHeatTransferCoefficient,
                               dimension::kHeatTransferPerKelvin,
                               dimension::kMassFraction,
                               dimension::kMoleFraction,
                               dimension::kVolumeFraction,
                               dimension::kTemperatureDifference}) {
    EXPECT_FALSE(suggested_units(one).empty());
    for (const std::string_view text : suggested_units(one)) {
      const std::string typed = "7 " + std::string(text);
      const Result<TypedValue> value = parse_quantity(typed, one);
      ASSERT_TRUE(value.ok()) << typed << ": " << value.error().message;
      // Typed, printed for a file, and read again: the same to the ten digits that are written.
      const TypedValue again = read(machine_text(value->value, value->unit));
      EXPECT_NEAR(again.value, value->value, 1e-9 * std::abs(value->value)) << typed;
    }
  }
  EXPECT_EQ(describe(Dimension{1, 1, -2, 0, 0, Kind::Plain}), "a figure in kg m/s\u00B2");
}

TEST(Quantities, RefusesBadTextWithCodeAndOffset) {
  const std::string folder = "tests/data/quantity/bad";
  const std::vector<std::string> names = test::list_source_folder(folder);
  ASSERT_GE(names.size(), 12u);
  for (const std::string& name : names) {
    const test::BadCase bad = test::read_bad_case(folder + "/" + name);
    const Result<TypedValue> result = parse_quantity(bad.text);
    ASSERT_FALSE(result.ok()) << name;
    EXPECT_EQ(result.error().code, bad.code) << name;
    EXPECT_EQ(result.error().where, "offset " + bad.offset) << name;
    EXPECT_FALSE(result.error().hint.empty()) << name;
  }
}

}  // namespace
}  // namespace heatledger::units
