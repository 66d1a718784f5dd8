#include "core/facts/air.hpp"

#include <gtest/gtest.h>

#include "core/facts/library.hpp"

namespace heatledger::facts {
namespace {

TEST(Air, FractionsSumToOneAndComponentsAreInTheLibrary) {
  double sum = 0;
  for (const AirComponent& part : dry_air()) {
    sum += part.mole_fraction;
    const Compound* compound = Library::embedded().find_name(part.name);
    ASSERT_NE(compound, nullptr) << part.name;
    EXPECT_EQ(compound->name, part.name);
  }
  EXPECT_NEAR(sum, 1, 1e-15);
  EXPECT_NEAR(textbook_air()[0].mole_fraction / textbook_air()[1].mole_fraction, 3.76, 1e-12);
}

TEST(Air, WeighsWhatPublishedAirWeighs) {
  // CIPM-2007 (Picard and others, Metrologia 45 (2008) 149): 28.96546 g/mol with 400 ppm CO2. 40 ppm of CO2
  // in place of oxygen are 0.0005 g/mol, rounding of the fractions another 0.0005.
  EXPECT_NEAR(dry_air_molar_mass() * 1e3, 28.9655, 0.001);
}

TEST(Air, TakesUpWater) {
  // Saturation pressure at 25 degC: 3169.9 Pa (IAPWS SR1-86); 60 %: 1901.9 Pa of 101325.
  EXPECT_NEAR(*moles_water_per_mole_dry_air(0.6, 298.15, 101325), 1901.9 / (101325 - 1901.9), 1e-6);
  EXPECT_EQ(*moles_water_per_mole_dry_air(0, 298.15, 101325), 0);
  EXPECT_EQ(moles_water_per_mole_dry_air(1.2, 298.15, 101325).error().code, "air.humidity");
  EXPECT_EQ(moles_water_per_mole_dry_air(1, 400, 101325).error().code, "air.no_dry_air");
  EXPECT_EQ(moles_water_per_mole_dry_air(0.5, 200, 101325).error().code, "thermo.temperature_range");
}

}  // namespace
}  // namespace heatledger::facts
