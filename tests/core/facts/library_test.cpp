#include "core/facts/library.hpp"

#include <gtest/gtest.h>

#include <algorithm>

#include "core/facts/completion.hpp"
#include "core/facts/name_key.hpp"

namespace heatledger::facts {
namespace {

std::string name_of(const Compound* compound) {
  return compound == nullptr ? "(none)" : std::string(compound->name);
}

TEST(NameKey, ForgivesWritingAndKeepsLetters) {
  EXPECT_EQ(name_key("Ethyl Acetate"), "ethylacetate");
  EXPECT_EQ(name_key("n-Butanol"), name_key("N butanol"));
  EXPECT_EQ(name_key("α-Pinene"), name_key("alpha pinene"));
  EXPECT_EQ(name_key("sulphuric acid"), name_key("Sulfuric  Acid"));
  EXPECT_EQ(name_key("aluminium chloride"), name_key("Aluminum-chloride"));
  EXPECT_EQ(name_key("iron(III) oxide"), name_key("iron iii oxide"));
  EXPECT_EQ(name_key("Zoë’s acid"), "zoesacid");
  EXPECT_EQ(name_key(" - , "), "");
  EXPECT_NE(name_key("1-propanol"), name_key("2-propanol"));
}

TEST(Library, FindsNamesHoweverTheyAreWritten) {
  const Library& library = Library::embedded();
  for (const char* text : {"ethyl acetate", "Ethyl Acetate", "ETHYL-ACETATE", "ethylacetate", "141-78-6",
                           "EtOAc", "ethyl ethanoate"}) {
    EXPECT_EQ(name_of(library.find_name(text)), "ethyl acetate") << text;
  }
  EXPECT_EQ(library.find_name("ethyl acetat"), nullptr);
  EXPECT_EQ(library.find_name(""), nullptr);
  EXPECT_EQ(library.find_name("--"), nullptr);
}

TEST(Library, FindsFormulasCommonestFirst) {
  const std::vector<const Compound*> found = Library::embedded().find_formula("C2H6O");
  ASSERT_EQ(found.size(), 2u);
  EXPECT_EQ(found[0]->name, "ethanol");
  EXPECT_EQ(found[1]->name, "dimethyl ether");
}

TEST(Library, CarriesFiguresWithSource) {
  const Compound* water = Library::embedded().find_name("water");
  ASSERT_NE(water, nullptr);
  ASSERT_TRUE(water->liquid.formation_enthalpy.has_value());
  EXPECT_NEAR(water->liquid.formation_enthalpy->value, -285825, 1);  // ATcT 1.112: -285.825 ± 0.027 kJ/mol
  EXPECT_NEAR(water->liquid.formation_enthalpy->u95, 27, 0.5);
  EXPECT_EQ(water->liquid.formation_enthalpy->source, "ATcT 1.112");
  EXPECT_EQ(water->formula, "H2O");
}

TEST(Completion, PutsBeginningsBeforeWordsBeforeSlips) {
  const Library& library = Library::embedded();
  std::vector<Library::Completion> hits = library.complete("nitrob", 5);
  ASSERT_FALSE(hits.empty());
  EXPECT_EQ(hits[0].compound->name, "nitrobenzene");
  hits = library.complete("acetate", 20);
  EXPECT_TRUE(std::any_of(hits.begin(), hits.end(),
                          [](const auto& h) { return h.compound->name == "ethyl acetate"; }));
  hits = library.complete("nitrotolune", 3);  // a slip in a word after its locant
  ASSERT_FALSE(hits.empty());
  EXPECT_EQ(hits[0].compound->name, "2-nitrotoluene");
  hits = library.complete("tolunee", 3);  // two letters swapped
  ASSERT_FALSE(hits.empty());
  EXPECT_EQ(hits[0].compound->name, "toluene");
  EXPECT_TRUE(library.complete("", 5).empty());
  EXPECT_TRUE(library.complete("water", 0).empty());
}

TEST(Completion, EditDistanceToTheNearestBeginning) {
  EXPECT_EQ(EditPattern("ethanol").distance_to_beginning("ethanol"), 0);
  EXPECT_EQ(EditPattern("ethan").distance_to_beginning("ethanol"), 0);
  EXPECT_EQ(EditPattern("etanol").distance_to_beginning("ethanol"), 1);
  EXPECT_EQ(EditPattern("ethaanol").distance_to_beginning("ethanol"), 1);
  EXPECT_EQ(EditPattern("kitten").distance_to_beginning("sitting"),
            2);  // "sitti" or "sitte": two changes, one deletion saved by the prefix
  EXPECT_EQ(EditPattern("abc").distance_to_beginning(""), 3);
}

}  // namespace
}  // namespace heatledger::facts
