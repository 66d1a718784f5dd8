#include "core/safety/functional_groups.hpp"

#include <gtest/gtest.h>

#include <map>
#include <string>

#include "core/facts/resolve.hpp"

namespace heatledger::safety {
namespace {

std::map<std::string, int> groups(const std::string& smiles) {
  const Result<std::shared_ptr<const facts::Species>> species = facts::resolve_species(smiles, true);
  EXPECT_TRUE(species.ok()) << smiles;
  std::map<std::string, int> found;
  if (!species.ok() || !(*species)->graph) return found;
  for (const GroupFound& group : functional_groups(*(*species)->graph)) found[group.name] = group.count;
  return found;
}

using Counts = std::map<std::string, int>;

TEST(FunctionalGroups, AreFoundInEitherSpelling) {
  const Counts nitro{{"nitro group", 3}};
  EXPECT_EQ(groups("Cc1c([N+](=O)[O-])cc([N+](=O)[O-])cc1[N+](=O)[O-]"), nitro);
  EXPECT_EQ(groups("Cc1c(N(=O)=O)cc(N(=O)=O)cc1N(=O)=O"), nitro);
  EXPECT_EQ(groups("c1ccccc1N=[N+]=[N-]"), (Counts{{"azide", 1}}));
  EXPECT_EQ(groups("c1ccccc1N=N#N"), (Counts{{"azide", 1}}));
  EXPECT_EQ(groups("C=[N+]=[N-]"), (Counts{{"azo, diazo or diazonium group", 1}}));
  EXPECT_EQ(groups("c1ccccc1[N+]#N"), (Counts{{"azo, diazo or diazonium group", 1}}));
  EXPECT_EQ(groups("c1cc[n+]([O-])cc1"), (Counts{{"N-oxide", 1}}));
}

TEST(FunctionalGroups, TellRelatedGroupsApart) {
  EXPECT_EQ(groups("CN(C)[N+](=O)[O-]"), (Counts{{"N-nitro group", 1}}));
  EXPECT_EQ(groups("O=[N+]([O-])OCC(CO[N+](=O)[O-])O[N+](=O)[O-]"),
            (Counts{{"nitrate of an alcohol or acid", 3}}));
  EXPECT_EQ(groups("O=Nc1ccccc1"), (Counts{{"nitroso group", 1}}));
  EXPECT_EQ(groups("CC(C)=NO"), (Counts{{"oxime", 1}}));
  EXPECT_EQ(groups("NN"), (Counts{{"nitrogen-nitrogen single bond", 1}}));
  EXPECT_EQ(groups("CC(C)(C#N)N=NC(C)(C)C#N"), (Counts{{"azo, diazo or diazonium group", 1}}));
  EXPECT_EQ(groups("CC(C)(C)OOC(C)(C)C"), (Counts{{"peroxide", 1}}));
  EXPECT_EQ(groups("OO"), (Counts{{"peroxide", 1}}));
  EXPECT_EQ(groups("C1CO1"), (Counts{{"epoxide", 1}}));
  EXPECT_EQ(groups("C=C"), (Counts{{"double bond of carbon", 1}}));
  EXPECT_EQ(groups("C#CC=C"), (Counts{{"double bond of carbon", 1}, {"triple bond of carbon", 1}}));
  EXPECT_EQ(groups("CS(C)=O"), (Counts{{"sulfoxide", 1}}));
  EXPECT_EQ(groups("CS(=O)(=O)Cl"), (Counts{{"sulfonyl chloride", 1}}));
  EXPECT_EQ(groups("CN=C=O"), (Counts{{"isocyanate", 1}}));
}

TEST(FunctionalGroups, HarmlessSubstancesHaveNone) {
  for (const char* smiles : {"c1ccccc1", "CCO", "O=O", "N#N", "C1CCCCC1", "CS(C)(=O)=O", "c1cn[nH]c1",
                             "c1ccnnc1", "CC#N", "C1COC1", "CC(=O)O", "[N-]=[N+]=O", "O=C=O", "CN(C)C=O"})
    EXPECT_TRUE(groups(smiles).empty()) << smiles << ": " << groups(smiles).begin()->first;
}

TEST(FunctionalGroups, CarryTheirPublishedRange) {
  const Result<std::shared_ptr<const facts::Species>> species = facts::resolve_species("nitrobenzene", false);
  ASSERT_TRUE(species.ok());
  const std::vector<GroupFound> found = functional_groups(*(*species)->graph);
  ASSERT_EQ(found.size(), 1u);
  EXPECT_EQ(found[0].low, 310e3);
  EXPECT_EQ(found[0].high, 360e3);
}

}  // namespace
}  // namespace heatledger::safety
