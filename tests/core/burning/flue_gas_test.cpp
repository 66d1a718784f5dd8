// Air demand and flue gas against hand balances (tests/data/checks/flue_gas.tsv), oxygen in the flue gas, dew
// points.
#include "core/burning/flue_gas.hpp"

#include <algorithm>

#include "core/molecule/formula.hpp"
#include "tests/core/burning/cases.hpp"

namespace heatledger::burning {
namespace {

using namespace test_cases;
using molecule::Phase;

TEST(FlueGas, AgreesWithHandBalances) {
  int seen = 0;
  for (const Case& c : cases("flue_gas.tsv")) {
    SCOPED_TRACE(c.text("fuel") + " " + c.text("lambda"));
    Part fuel;
    const Result<molecule::Composition> atoms = molecule::parse_formula(c.text("formula"));
    ASSERT_TRUE(atoms.ok());
    for (std::size_t e = 0; e < kElements; ++e) {
      const auto found = atoms->atoms.find(kElementNumbers[e]);
      if (found != atoms->atoms.end()) fuel.atoms[e] = found->second;
    }
    fuel.moles = 1;
    fuel.molar_mass = molecule::molar_mass(*atoms) / 1000;
    BurnInput in;
    in.streams.push_back(stream("fuel", Role::Fuel, {fuel}));
    in.air_figure = {c.value("lambda"), 0};
    const Result<Numbers> n = burn(in, false);
    // Fuels are burnt without their enthalpy here; the amounts do not ask for it.
    ASSERT_TRUE(n.ok()) << n.error().message;
    const double share = 0.001;  // of amounts, and 0.0005 of fractions: the table's own rounding
    EXPECT_NEAR(n->oxygen_needed, c.value("oxygen"), share * c.value("oxygen"));
    EXPECT_NEAR(n->stoichiometric, c.value("air"), share * c.value("air"));
    EXPECT_NEAR(n->stoichiometric * n->air_molar_mass / fuel.molar_mass, c.value("air_mass"),
                share * c.value("air_mass"));
    const double wet = total(n->flue), dry = total_dry(n->flue);
    EXPECT_NEAR(wet, c.value("wet"), share * wet);
    EXPECT_NEAR(dry, c.value("dry"), share * dry);
    const struct {
      const char* column;
      Product product;
      double of_all;
    } fractions[] = {{"wet_CO2", Product::CO2, wet}, {"wet_H2O", Product::H2O, wet},
                     {"wet_N2", Product::N2, wet},   {"wet_O2", Product::O2, wet},
                     {"wet_SO2", Product::SO2, wet}, {"wet_Ar", Product::Ar, wet},
                     {"dry_CO2", Product::CO2, dry}, {"dry_O2", Product::O2, dry}};
    for (const auto& f : fractions) EXPECT_NEAR(of(n->flue, f.product) / f.of_all, c.value(f.column), 0.0005);
    ++seen;
  }
  EXPECT_EQ(seen, 40);
}

TEST(FlueGas, OxygenContentAndAirRatioAreTwoWordsForOneThing) {
  // The share of oxygen that an air ratio gives, dry or wet, typed back gives that ratio.
  Result<Air> air = humid(dry_air(), 0.6, 298.15, 101325);
  ASSERT_TRUE(air.ok());
  BurnInput in;
  in.air = *air;
  in.streams.push_back(stream("gas", Role::Fuel,
                              {part("methane", Phase::Gas, 0.6), part("carbon dioxide", Phase::Gas, 0.38),
                               part("oxygen", Phase::Gas, 0.02)}));
  in.streams.push_back(stream("water", Role::QuenchWater, {part("water", Phase::Liquid, 0.5)}));
  in.dilution = step::Typed{1.5, 0};
  in.air_figure = {1.7, 0};
  const Numbers n = burnt(in);
  EXPECT_NEAR(n.ratio, 1.7, 1e-12);
  const double oxygen = of(n.flue, Product::O2);
  for (const bool dry : {true, false}) {
    BurnInput back = in;
    back.rule = dry ? AirRule::FlueDry : AirRule::FlueWet;
    back.air_figure = {oxygen / (dry ? total_dry(n.flue) : total(n.flue)), 0};
    const Numbers again = burnt(back);
    EXPECT_NEAR(again.ratio, 1.7, 1e-10);
    EXPECT_NEAR(again.air, n.air, 1e-9 * n.air);
  }
}

TEST(FlueGas, ElementsAndMassClose) {
  BurnInput in;
  in.streams.push_back(
      stream("vent", Role::Vent,
             {part("dichloromethane", Phase::Gas, 0.02), part("hydrogen sulfide", Phase::Gas, 0.01),
              part("nitrogen", Phase::Gas, 0.8), part("oxygen", Phase::Gas, 0.17)}));
  in.streams.push_back(stream("waste", Role::LiquidWaste, {part("pyridine", Phase::Liquid, 0.05)}));
  in.air_figure = {1.3, 0};
  const Numbers n = burnt(in);
  double in_mass = n.air * n.air_molar_mass;
  for (const Stream& s : in.streams) in_mass += s.mass();
  EXPECT_NEAR(mass(n.flue), in_mass, 1e-9 * in_mass);
  EXPECT_LT(n.equilibrium->closure, 1e-9);
}

TEST(FlueGas, ChlorineTakesTheHydrogenAndTheRestIsChlorine) {
  const auto of_formula = [](const char* text) {
    const Result<molecule::Composition> read = molecule::parse_formula(text);
    Atoms atoms{};
    for (std::size_t e = 0; e < kElements; ++e) {
      const auto found = read->atoms.find(kElementNumbers[e]);
      if (found != read->atoms.end()) atoms[e] = found->second;
    }
    return atoms;
  };
  EXPECT_DOUBLE_EQ(oxygen_demand(of_formula("CH2Cl2")), 1);    // CO2 + 2 HCl
  EXPECT_DOUBLE_EQ(oxygen_demand(of_formula("C6H5Cl")), 7);    // 6 CO2 + HCl + 2 H2O
  EXPECT_DOUBLE_EQ(oxygen_demand(of_formula("CCl4")), 1);      // CO2 + 2 Cl2, no oxygen set free
  EXPECT_DOUBLE_EQ(oxygen_demand(of_formula("CHCl3")), 1);     // CO2 + HCl + Cl2
  EXPECT_DOUBLE_EQ(oxygen_demand(of_formula("HNO3")), -1.25);  // brings oxygen
  Atoms chloroform = of_formula("CHCl3");
  of(chloroform, Element::O) += 2;
  const Amounts p = complete_products(chloroform);
  EXPECT_DOUBLE_EQ(of(p, Product::HCl), 1);
  EXPECT_DOUBLE_EQ(of(p, Product::Cl2), 1);
  EXPECT_DOUBLE_EQ(of(p, Product::H2O), 0);
  EXPECT_DOUBLE_EQ(of(p, Product::O2), 0);
}

TEST(FlueGas, DewPoints) {
  // 10 % of water at one atmosphere: 10.13 kPa, 46.1 °C in the steam tables (IAPWS), one unit of the last
  // digit.
  ASSERT_TRUE(water_dew_point(10132.5));
  EXPECT_NEAR(*water_dew_point(10132.5) - 273.15, 46.1, 0.1);
  EXPECT_FALSE(water_dew_point(500));
  // F. H. Verhoff, J. T. Banchero, Chem. Eng. Prog. 70 (1974) 71, as it is used: 10 % H2O and 10 ppm SO3 at
  // 760 mmHg give 137 °C; half a kelvin for the rounding of that figure.
  EXPECT_NEAR(sulfuric_dew_point(10132.5, 1.01325) - 273.15, 137, 0.6);
  // Hydrochloric acid condenses a little above the water dew point: between it and 30 K more for 1000 ppm.
  const double hcl = hydrochloric_dew_point(10132.5, 101.325) - 273.15;
  EXPECT_GT(hcl, 46.1);
  EXPECT_LT(hcl, 76.1);
}

}  // namespace
}  // namespace heatledger::burning
