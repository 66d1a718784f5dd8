#include "core/balance/reaction.hpp"

#include <gtest/gtest.h>

#include "tests/core/balance/sheets.hpp"

namespace heatledger::balance {
namespace {

using test_sheets::reaction;

TEST(Equation, IsSetInTypeWithSubscriptsAndArrow) {
  EXPECT_EQ(display_equation(*reaction("nitrobenzene(l) + 3 H2 -> aniline(l) + 2 H2O(l)")),
            "nitrobenzene(l) + 3 H₂ → aniline(l) + 2 H₂O(l)");
  EXPECT_EQ(display_equation(*reaction("1/2 N2(g) + 1.5 H2(g) <=> NH3(g)")),
            "1/2 N₂(g) + 1.5 H₂(g) ⇌ NH₃(g)");
}

TEST(Equation, KeepsNamesThatBeginWithADigitAsTheyAre) {
  EXPECT_EQ(display_equation(*reaction("2-propanol(l) -> acetone(l) + H2(g)")),
            "2-propanol(l) → acetone(l) + H₂(g)");
}

TEST(Equation, PlainTextReadsBackToTheSameReaction) {
  for (const char* text :
       {"nitrobenzene(l) + 3 H2 -> aniline(l) + 2 H2O(l)",
        "\"CC(=O)O\"(l) + \"CCO\"(l) -> \"CCOC(C)=O\"(l) + water(l)", "CO(g) + 0.5 O2(g) -> CO2(g)"}) {
    const std::string plain = plain_equation(*reaction(text));
    EXPECT_EQ(plain, text);
    EXPECT_EQ(plain_equation(*reaction(plain)), plain);
  }
}

// Balanced by hand: CH4 + 2 O2 -> CO2 + 2 H2O.
TEST(Reaction, ProposesTheOneWayToBalance) {
  const auto read = reaction("CH4 + O2 -> CO2 + H2O");
  EXPECT_FALSE(read->balance.balanced);
  ASSERT_EQ(read->proposals.size(), 1u);
  EXPECT_EQ(read->proposals[0], "CH4 + 2 O2 -> CO2 + 2 H2O");
  EXPECT_NE(read->why_unbalanced.find("H 4 on the left, 2 on the right"), std::string::npos)
      << read->why_unbalanced;
}

TEST(Reaction, ListsIndependentWaysInsteadOfGuessing) {
  const auto read = reaction("CH4 + O2 -> CO + CO2 + H2O");
  EXPECT_GE(read->proposals.size(), 2u);
}

TEST(Reaction, NamesTheForgottenProduct) {
  const auto read = reaction("C6H6 + HNO3 -> nitrobenzene");
  EXPECT_TRUE(read->proposals.empty());
  EXPECT_NE(read->why_unbalanced.find("H₂O is missing on the right"), std::string::npos)
      << read->why_unbalanced;
}

TEST(Reaction, PlacesASpeciesErrorInTheEquation) {
  CachedSpecies species;
  const Result<Reaction> read = read_reaction("methane + 2 \"O=(O\" -> CO2", species);
  ASSERT_FALSE(read.ok());
  // The quoted SMILES begins at byte 13; the error lies inside it.
  const std::string& where = read.error().where;
  ASSERT_EQ(where.compare(0, 7, "offset "), 0) << where;
  EXPECT_GE(std::stoi(where.substr(7)), 13);
  EXPECT_LT(std::stoi(where.substr(7)), 18);
}

TEST(CachedSpecies, GivesTheSameObjectUntilItIsPushedOut) {
  CachedSpecies cache(2);
  const auto first = *cache.species("methane", false);
  EXPECT_EQ(*cache.species("methane", false), first);
  for (const char* name : {"ethane", "propane", "butane", "pentane", "hexane"})
    ASSERT_TRUE(cache.species(name, false).ok());
  EXPECT_NE(*cache.species("methane", false), first);  // read anew: the memory is bounded
}

TEST(CachedSpecies, TellsQuotedFromUnquoted) {
  CachedSpecies cache;
  const auto formula = *cache.species("CO", false), smiles = *cache.species("CO", true);
  EXPECT_NE(formula->molar_mass, smiles->molar_mass);  // carbon monoxide, methanol
}

}  // namespace
}  // namespace heatledger::balance
