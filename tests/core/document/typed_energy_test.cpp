#include "core/document/typed_energy.hpp"

#include <gtest/gtest.h>

namespace heatledger::document {
namespace {

/// Value in J/mol, or NaN-free failure of the test.
uncertainty::Figure read(const char* text) {
  const Result<uncertainty::Figure> figure = parse_molar_energy(text);
  EXPECT_TRUE(figure.ok()) << text << ": " << (figure.ok() ? "" : figure.error().message);
  return figure.ok() ? *figure : uncertainty::Figure{};
}

TEST(TypedEnergy, ReadsUnitsOfEnergyPerMole) {
  EXPECT_DOUBLE_EQ(read("340 kJ/mol").value, 340000);
  EXPECT_DOUBLE_EQ(read("340").value, 340000);
  EXPECT_DOUBLE_EQ(read("340000 J/mol").value, 340000);
  EXPECT_DOUBLE_EQ(read("81 kcal/mol").value, 81 * 4184.0);   // thermochemical calorie, exactly 4.184 J
  EXPECT_DOUBLE_EQ(read("4.5 eV").value, 4.5 * 96485.33212);  // e N_A, CODATA 2018, exact
}

TEST(TypedEnergy, ReadsAHalfWidthInTheSameUnit) {
  EXPECT_DOUBLE_EQ(read("81 \u00b1 2 kcal/mol").value, 81 * 4184.0);
  EXPECT_DOUBLE_EQ(read("81 \u00b1 2 kcal/mol").u95, 2 * 4184.0);
  EXPECT_DOUBLE_EQ(read("340 +/- 8").u95, 8000);
}

TEST(TypedEnergy, ReadsBackWhatTheSheetPrints) {
  EXPECT_DOUBLE_EQ(read("\u22121\u2009518.5 kJ/mol").value, -1518500);
  EXPECT_DOUBLE_EQ(read("6 225").value, 6225000);
}

TEST(TypedEnergy, DoesNotJoinTwoNumbers) {
  const auto figure = parse_molar_energy("12 34 kJ/mol");
  ASSERT_FALSE(figure.ok());
  EXPECT_EQ(figure.error().where, "offset 3");
}

TEST(TypedEnergy, NamesWhatItCannotRead) {
  EXPECT_EQ(parse_molar_energy("").error().code, "typed_energy.not_a_number");
  EXPECT_EQ(parse_molar_energy("about 340").error().code, "typed_energy.not_a_number");
  EXPECT_EQ(parse_molar_energy("340 kJ/kg").error().code, "typed_energy.unit");
  EXPECT_EQ(parse_molar_energy("340 kJ/kg").error().where, "offset 4");
  EXPECT_EQ(parse_molar_energy("340 \u00b1 -2").error().code, "typed_energy.not_a_number");
  EXPECT_EQ(parse_molar_energy("3,5").error().code, "typed_energy.unit");
  EXPECT_EQ(parse_molar_energy("-1e308 kJ").error().code, "typed_energy.out_of_range");
  EXPECT_EQ(parse_molar_energy("1 \u00b1 1e300 kJ").error().code, "typed_energy.out_of_range");
}

}  // namespace
}  // namespace heatledger::document
