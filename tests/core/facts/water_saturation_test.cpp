#include "core/facts/water_saturation.hpp"

#include <gtest/gtest.h>

#include <cmath>

namespace heatledger::facts {
namespace {

TEST(WaterSaturation, GivesThePublishedCheckValues) {
  // IAPWS SR1-86(1992), table of check values; tolerances are half a unit of the last digit printed there.
  const SaturatedWater triple = *saturated_water(273.16);
  EXPECT_NEAR(triple.pressure, 611.657, 0.0005);
  EXPECT_NEAR(triple.liquid_density, 999.789, 0.0005);
  EXPECT_NEAR(triple.vapour_density, 0.00485426, 5e-9);
  EXPECT_NEAR(triple.liquid_enthalpy, 0.611786, 5e-6);
  EXPECT_NEAR(triple.vapour_enthalpy, 2500.5e3, 50);
  const SaturatedWater boiling = *saturated_water(373.1243);
  EXPECT_NEAR(boiling.pressure, 101325, 0.5);
  EXPECT_NEAR(boiling.pressure_slope, 3616, 0.5);
  EXPECT_NEAR(boiling.liquid_density, 958.365, 0.0005);
  EXPECT_NEAR(boiling.vapour_density, 0.597586, 5e-7);
  EXPECT_NEAR(boiling.liquid_enthalpy, 419.05e3, 5);
  EXPECT_NEAR(boiling.vapour_enthalpy, 2675.7e3, 50);
}

TEST(WaterSaturation, ObeysClapeyronAtEveryTemperature) {
  // Independent route to the slope: difference of the pressures a hundredth of a kelvin to either side.
  for (double t = 280; t < 640; t += 20) {
    const double slope = (saturated_water(t + 0.01)->pressure - saturated_water(t - 0.01)->pressure) / 0.02;
    EXPECT_NEAR(saturated_water(t)->pressure_slope / slope, 1, 1e-6) << t;
  }
}

TEST(WaterSaturation, BoilingTemperatureTurnsThePressureRound) {
  for (const double p : {612.0, 1e4, 101325.0, 1e6, 2.2e7}) {
    EXPECT_NEAR(saturated_water(*boiling_temperature_of_water(p))->pressure / p, 1, 1e-9) << p;
  }
  EXPECT_NEAR(*boiling_temperature_of_water(101325), 373.1243, 1e-4);
}

TEST(WaterSaturation, RefusesWhatLiesOffTheLine) {
  for (const double t : {273.0, 647.2, -5.0, std::nan("")}) {
    ASSERT_FALSE(saturated_water(t).ok());
    EXPECT_EQ(saturated_water(t).error().code, "thermo.temperature_range");
  }
  for (const double p : {0.0, 611.0, 2.3e7, std::nan("")}) {
    ASSERT_FALSE(boiling_temperature_of_water(p).ok());
    EXPECT_EQ(boiling_temperature_of_water(p).error().code, "thermo.pressure_range");
  }
}

}  // namespace
}  // namespace heatledger::facts
