// Chlorinated fuels through the whole step, a vent with support fuel, and what is refused.
#include "core/burning/calorific.hpp"
#include "tests/core/burning/cases.hpp"

namespace heatledger::burning {
namespace {

using namespace test_cases;
using molecule::Phase;

double share(const Numbers& n, std::string_view formula) {
  for (std::size_t j = 0; j < combustion_gases().size(); ++j) {
    if (combustion_gases()[j].formula == formula) return n.equilibrium->moles[j] / n.equilibrium->total;
  }
  return -1;
}

struct Chlorinated {
  const char* name;
  Phase phase;
  double carbon, hydrogen, chlorine, oxygen;
};

TEST(Chlorinated, FuelsBurnToHydrogenChlorideWhileHydrogenLasts) {
  const Chlorinated fuels[] = {{"dichloromethane", Phase::Liquid, 1, 2, 2, 1},
                               {"chlorobenzene", Phase::Liquid, 6, 5, 1, 7},
                               {"vinyl chloride", Phase::Gas, 2, 3, 1, 2.5},
                               {"tetrachloromethane", Phase::Liquid, 1, 0, 4, 1}};
  for (const Chlorinated& fuel : fuels) {
    SCOPED_TRACE(fuel.name);
    const Numbers n = burnt(flame_of(fuel.name, fuel.phase, 1.2));
    const double hcl = std::min(fuel.hydrogen, fuel.chlorine);
    EXPECT_NEAR(n.oxygen_needed, fuel.oxygen, 1e-12);
    EXPECT_NEAR(of(n.flue, Product::CO2), fuel.carbon + 0.00036 * n.air, 1e-12);  // 0.036 % of the air
    EXPECT_NEAR(of(n.flue, Product::HCl), hcl, 1e-12);
    EXPECT_NEAR(of(n.flue, Product::Cl2), (fuel.chlorine - hcl) / 2, 1e-12);
    EXPECT_NEAR(of(n.flue, Product::H2O), (fuel.hydrogen - hcl) / 2, 1e-12);
    EXPECT_LT(n.equilibrium->closure, 1e-9);
    ASSERT_TRUE(n.flame_temperature);
    // Energy: what goes in is what comes out at the flame temperature.
    double in = 0;
    const BurnInput input = flame_of(fuel.name, fuel.phase, 1.2);
    for (const Part& p : input.streams[0].parts) in += p.moles * p.enthalpy(298.15);
    in += n.air * enthalpy(dry_air().products(), 298.15, {});
    EXPECT_NEAR(enthalpy(n.flame, *n.flame_temperature, {}), in, 1e-9 * std::abs(n.net_heat) + 1e-6);
  }
}

TEST(Chlorinated, HotChlorineIsAtomsAndHydrogenChlorideIsSplit) {
  // Without hydrogen no HCl; at flame temperature chlorine is partly atoms.
  const Numbers carbon_tet = burnt(flame_of("tetrachloromethane", Phase::Gas, 1.05));
  EXPECT_EQ(share(carbon_tet, "HCl"), 0);
  EXPECT_GT(share(carbon_tet, "Cl2"), 0.05);
  EXPECT_GT(share(carbon_tet, "Cl"), 1e-5);
  // The Deacon equilibrium 4 HCl + O2 = 2 Cl2 + 2 H2O lies left when hot: HCl over Cl2 in a chlorobenzene
  // flame.
  const Numbers chlorobenzene = burnt(flame_of("chlorobenzene", Phase::Liquid, 1.2));
  EXPECT_GT(share(chlorobenzene, "HCl"), 10 * share(chlorobenzene, "Cl2"));
}

BurnInput oxidiser() {
  BurnInput in;
  in.streams.push_back(stream(
      "vent", Role::Vent,
      {part("dichloromethane", Phase::Gas, 0.08), part("toluene", Phase::Gas, 0.03),
       part("oxygen", Phase::Gas, 1.9), part("nitrogen", Phase::Gas, 8), part("water", Phase::Gas, 0.2)},
      313.15));
  in.streams.push_back(stream("gas", Role::SupportFuel, {part("methane", Phase::Gas, 1)}));
  in.rule = AirRule::BurnerRatio;
  in.air_figure = {1.1, 0};
  in.loss_share = step::Typed{0.03, 0};
  in.chamber_temperature = step::Typed{1373.15, 0};
  in.chamber_volume = step::Typed{4, 0};
  in.sought = Sought::Support;
  return in;
}

TEST(Oxidiser, SupportFuelHoldsTheChamberAtItsTemperature) {
  const BurnInput in = oxidiser();
  const Numbers n = burnt(in);
  ASSERT_TRUE(n.chamber_temperature);
  EXPECT_NEAR(*n.chamber_temperature, 1373.15, 1e-6);
  EXPECT_GT(n.support, 0);
  EXPECT_NEAR(*n.burner_ratio, 1.1, 1e-12);
  EXPECT_GT(n.ratio, 1);
  // Residence time of the ideal gas.
  EXPECT_NEAR(*n.residence, 4 / (total(n.chamber) * 8.314462618 * 1373.15 / 101325), 1e-9);
  // Typed with the amount found, the temperature follows.
  BurnInput typed = in;
  typed.sought = Sought::Temperature;
  typed.streams[1].scale = n.support;
  EXPECT_NEAR(*burnt(typed).chamber_temperature, 1373.15, 1e-6);
  // By hand: heat in the flue gas equals heat set free less the loss, plus what the feeds bring.
  const double out = enthalpy(n.chamber, 1373.15, {}) - enthalpy(n.chamber, 298.15, {});
  EXPECT_NEAR(out, 0.97 * n.net_heat + n.sensible_in, 1e-7 * n.net_heat);
}

TEST(Oxidiser, AirRatioForAChamberTemperature) {
  BurnInput in = flame_of("methane", Phase::Gas, 1);
  in.chamber_temperature = step::Typed{1473.15, 0};
  in.sought = Sought::Ratio;
  const Numbers n = burnt(in);
  EXPECT_NEAR(*n.chamber_temperature, 1473.15, 1e-6);
  EXPECT_GT(n.ratio, 1.5);
  in.chamber_temperature = step::Typed{2500, 0};
  EXPECT_EQ(burn(in).error().code, "burning.support_not_found");
}

TEST(Oxidiser, NamesWhatCannotBe) {
  BurnInput in = oxidiser();
  in.chamber_temperature = step::Typed{400, 0};
  EXPECT_EQ(burn(in).error().code, "burning.support_not_found");
  in.chamber_temperature = {};
  EXPECT_EQ(burn(in).error().code, "burning.no_chamber_temperature");
  in = oxidiser();
  in.streams.pop_back();
  EXPECT_EQ(burn(in).error().code, "burning.no_support");
  in = flame_of("nitrogen", Phase::Gas, 1);
  EXPECT_EQ(burn(in).error().code, "burning.nothing_burns");
  in = flame_of("methane", Phase::Gas, 1);
  in.rule = AirRule::FlueDry;
  in.air_figure = {0.21, 0};
  EXPECT_EQ(burn(in).error().code, "burning.no_oxygen_left");
  const auto refused = [](const char* name) {
    const auto species = facts::resolve_species(name, false);
    EXPECT_TRUE(species.ok()) << name;
    const Result<Part> made = make_part(name, *species, Phase::Gas, 1);
    return made.ok() ? std::string() : made.error().code;
  };
  EXPECT_EQ(refused("trifluoromethane"), "burning.not_covered");
  EXPECT_EQ(refused("silane"), "burning.not_covered");
  const auto coded = facts::make_coded_species("K-17", 0.2);
  ASSERT_TRUE(coded.ok());
  EXPECT_EQ(make_part("K-17", *coded, Phase::Liquid, 1).error().code, "burning.no_composition");
}

TEST(Oxidiser, ShortOfOxygenThereIsAnEquilibriumButNoCompleteBurning) {
  const Numbers n = burnt(flame_of("methane", Phase::Gas, 0.6));
  EXPECT_FALSE(n.complete);
  EXPECT_FALSE(n.flame_temperature);
  ASSERT_TRUE(n.equilibrium);
  EXPECT_GT(share(n, "CO"), 0.05);
  EXPECT_GT(share(n, "H2"), 0.05);
}

}  // namespace
}  // namespace heatledger::burning
