#include "core/facts/ions.hpp"

#include <gtest/gtest.h>

#include <set>

#include "core/molecule/formula.hpp"

namespace heatledger::facts {
namespace {

TEST(Ions, HoldAtLeastOneHundredAndTwentyIonsEachOnce) {
  std::set<std::string> seen;
  std::size_t charged = 0;
  for (const AqueousSubstance& row : aqueous_substances()) {
    const Result<molecule::Composition> composition = molecule::parse_formula(row.formula);
    ASSERT_TRUE(composition.ok()) << row.name;
    if (composition->charge != 0) ++charged;
    EXPECT_TRUE(seen.insert(row.hill).second) << row.name << " " << row.hill;
    EXPECT_TRUE(row.formation_enthalpy.has_value()) << row.name;
    EXPECT_EQ(find_aqueous_formula(row.hill), &row) << row.name;
    EXPECT_EQ(find_aqueous_name(row.name), &row) << row.name;
  }
  EXPECT_GE(charged, 120u);
}

TEST(Ions, GibbsEnthalpyAndEntropyDifferByPlausibleEntropiesOfFormation) {
  // (ΔfH - ΔfG)/T is the entropy of formation: for ions in water it lies between -1100 (pyrophosphate) and
  // +250 J/(mol K).
  for (const AqueousSubstance& row : aqueous_substances()) {
    if (!row.gibbs_energy) continue;
    const double entropy = (row.formation_enthalpy->value - row.gibbs_energy->value) / 298.15;
    EXPECT_GT(entropy, -1250) << row.name;
    EXPECT_LT(entropy, 260) << row.name;
  }
}

TEST(Ions, AreFoundWithAndWithoutTheWordIon) {
  const AqueousSubstance* sulfate = find_aqueous_name("sulphate");
  ASSERT_NE(sulfate, nullptr);
  EXPECT_EQ(sulfate->formula, "SO4^2-");
  EXPECT_EQ(find_aqueous_name("Sulfate ion"), sulfate);
  EXPECT_EQ(find_aqueous_name("proton")->formula, "H+");
  EXPECT_EQ(find_aqueous_name("unobtainium"), nullptr);
  EXPECT_EQ(find_aqueous_name(""), nullptr);
  // NBS Tables 1982: SO4(2-) -909.27 kJ/mol.
  EXPECT_NEAR(sulfate->formation_enthalpy->value, -909300, 100);
}

TEST(Ions, TheProtonIsTheZeroOfTheScale) {
  const AqueousSubstance* proton = find_aqueous_formula("H^+");
  ASSERT_NE(proton, nullptr);
  EXPECT_EQ(proton->formation_enthalpy->value, 0);
  EXPECT_EQ(proton->formation_enthalpy->u95, 0);
  EXPECT_EQ(proton->entropy->value, 0);
}

TEST(Ions, KeepTheFigureOfTheOtherSetInSight) {
  const AqueousSubstance* fluoride = find_aqueous_name("fluoride");
  ASSERT_NE(fluoride, nullptr);
  ASSERT_EQ(fluoride->formation_enthalpy->rivals.size(),
            1u);  // CODATA 1989: -335.35, NBS 1982: -332.63 kJ/mol
  EXPECT_NEAR(fluoride->formation_enthalpy->rivals[0].value, -335350, 1);
}

}  // namespace
}  // namespace heatledger::facts
