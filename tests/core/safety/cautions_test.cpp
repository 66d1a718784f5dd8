#include "core/safety/cautions.hpp"

#include <gtest/gtest.h>

namespace heatledger::safety {
namespace {

Presence present(const std::string& name, bool fed = true, bool formed = false, bool gas = false) {
  const Result<std::shared_ptr<const facts::Species>> species = facts::resolve_species(name, false);
  EXPECT_TRUE(species.ok()) << name;
  return {name, species.ok() ? *species : nullptr, fed, formed, gas};
}

bool says(const std::vector<std::string>& cautions, const std::string& words) {
  for (const std::string& caution : cautions) {
    if (caution.find(words) != std::string::npos) return true;
  }
  return false;
}

TEST(Cautions, NameWhatStandsTogether) {
  EXPECT_TRUE(
      says(customary_cautions({present("NaOH"), present("dichloromethane")}, {}), "Strong base (NaOH)"));
  EXPECT_TRUE(says(customary_cautions({present("KOH"), present("N,N-dimethylformamide")}, {}),
                   "N,N-dimethylformamide"));
  EXPECT_TRUE(says(customary_cautions({present("nitric acid"), present("toluene")}, {}), "Nitric acid with"));
  EXPECT_TRUE(
      says(customary_cautions({present("sulfuric acid"), present("water")}, {}), "acid to the water"));
  EXPECT_TRUE(says(customary_cautions({present("nitrobenzene")}, {}), "calorimetry"));
  EXPECT_TRUE(says(customary_cautions({present("HCl", false, true, true)}, {}), "Hydrogen chloride"));
  EXPECT_TRUE(says(customary_cautions({present("H2", false, true, true)}, {}), "Hydrogen is set free"));
  EXPECT_TRUE(says(customary_cautions({present("oxygen"), present("cyclohexane")}, {}), "Total oxidation"));
  Setting dosed;
  dosed.dosed = true;
  EXPECT_TRUE(says(customary_cautions({present("water")}, dosed), "Interlock"));
}

TEST(Cautions, StaySilentWhereNothingStandsTogether) {
  EXPECT_TRUE(
      customary_cautions({present("ethanol"), present("acetic acid"), present("water", false, true)}, {})
          .empty());
  EXPECT_TRUE(customary_cautions({present("NaOH"), present("water")}, {}).empty());
  EXPECT_FALSE(says(customary_cautions({present("H2")}, {}), "Hydrogen is set free"));
}

TEST(Cautions, DeferToMeasurement) {
  EXPECT_TRUE(says(customary_cautions({present("nitrobenzene")}, {}), "licensed practice"));
}

}  // namespace
}  // namespace heatledger::safety
