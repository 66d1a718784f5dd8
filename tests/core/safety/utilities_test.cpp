#include "core/safety/utilities.hpp"

#include <gtest/gtest.h>

namespace heatledger::safety {
namespace {

using step::Finding;
using step::Typed;
using uncertainty::Quantity;

const Finding& find(const step::FindingGroup& group, const std::string& id) {
  for (const Finding& finding : group.findings) {
    if (finding.id == "utility." + id) return finding;
  }
  ADD_FAILURE() << "no " << id;
  static const Finding none;
  return none;
}

TEST(Utilities, SteamThatCondensesAtOneAtmosphere) {
  UtilityInput input;
  input.heat = Quantity(1e6);
  input.heat_words = "duty";
  input.steam_pressure = Typed{101325, 0};
  const step::FindingGroup group = utilities(input);
  // Verification values of IAPWS SR1-86 at 373.1243 K: h' 419.05, h'' 2675.7 kJ/kg, as many digits as
  // printed.
  EXPECT_NEAR(find(group, "steam_temperature").value.value(), 373.1243, 1e-3);
  EXPECT_NEAR(find(group, "steam").value.value(), 1e6 / (2675.7e3 - 419.05e3), 5e-5);
}

TEST(Utilities, CoolingWaterForAnAllowedRise) {
  UtilityInput input;
  input.heat = Quantity(-500e3, 20e3, 7);
  input.medium_in = Typed{293.15, 0};
  input.medium_out = Typed{303.15, 0};
  // 4.18 kJ/(kg K) between 20 and 30 °C (IAPWS); 1 % for the table's slope.
  const step::FindingGroup group = utilities(input);
  const Finding& flow = find(group, "flow");
  EXPECT_NEAR(flow.value.value(), 500 / (4.18 * 10), 0.01 * 12);
  ASSERT_TRUE(flow.unfavourable);
  EXPECT_NEAR(*flow.unfavourable, flow.value.value() * 520 / 500, 1e-9);
  input.medium = "brine";
  EXPECT_FALSE(find(utilities(input), "flow").why_missing.empty());
  input.medium_heat_capacity = Typed{3000, 0};
  EXPECT_NEAR(find(utilities(input), "flow").value.value(), 500.0 / 30, 1e-9);
  std::swap(input.medium_in, input.medium_out);
  EXPECT_FALSE(find(utilities(input), "flow").why_missing.empty());
}

TEST(Utilities, CoolantThatEvaporates) {
  UtilityInput input;
  input.heat = Quantity(-1e6);
  input.coolant = *facts::resolve_species("water", false);
  const step::FindingGroup group = utilities(input);
  // 2675.7 − 419.05 kJ/kg at one atmosphere, verification values of IAPWS SR1-86, as many digits as printed.
  EXPECT_NEAR(find(group, "coolant").value.value(), 1000 / (2675.7 - 419.05), 5e-5);
  input.coolant = *facts::resolve_species("ammonia", false);
  // 1370 kJ/kg at −33 °C (R. H. Perry, Chemical Engineers' Handbook, 7th ed., table 2-217); 1 % between
  // tables.
  EXPECT_NEAR(find(utilities(input), "coolant").value.value(), 1e6 / 1.370e6, 0.01 * 0.73);
  input.heat = Quantity(1e6);
  EXPECT_FALSE(find(utilities(input), "coolant").why_missing.empty());
}

TEST(Utilities, SurfaceFromConductanceAndCoefficient) {
  UtilityInput input;
  input.heat = Quantity(-1e6);
  input.heat_transfer_coefficient = Typed{400, 0};
  EXPECT_FALSE(find(utilities(input), "area").why_missing.empty());
  input.conductance = Quantity(12e3, 600, 3);
  EXPECT_NEAR(find(utilities(input), "area").value.value(), 30, 1e-12);
  EXPECT_NEAR(*find(utilities(input), "area").unfavourable, 31.5, 1e-12);
}

}  // namespace
}  // namespace heatledger::safety
