#include "core/molecule/aromaticity.hpp"

#include <gtest/gtest.h>

#include <string>

#include "core/molecule/smiles.hpp"

namespace heatledger::molecule {
namespace {

int aromatic_bonds(const std::string& text) {
  Result<Graph> graph = parse_smiles(text);
  EXPECT_TRUE(graph.ok()) << text;
  if (!graph.ok()) return -1;
  perceive_aromaticity(*graph);
  int count = 0;
  for (const Bond& bond : graph->bonds) count += bond.aromatic ? 1 : 0;
  return count;
}

TEST(Aromaticity, FiveAndSixRingsWithSixElectronsAreAromaticInEitherSpelling) {
  EXPECT_EQ(aromatic_bonds("c1ccccc1"), 6);
  EXPECT_EQ(aromatic_bonds("C1=CC=CC=C1"), 6);
  EXPECT_EQ(aromatic_bonds("C1=CC=CO1"), 5);
  EXPECT_EQ(aromatic_bonds("C1=CC=CN1"), 5);
  EXPECT_EQ(aromatic_bonds("C1=CC=CS1"), 5);
  EXPECT_EQ(aromatic_bonds("N1=CC=CC=C1"), 6);
  EXPECT_EQ(aromatic_bonds("C1=CC2=CC=CC=C2C=C1"), 11);
  EXPECT_EQ(aromatic_bonds("[CH-]1C=CC=C1"), 5);
  EXPECT_EQ(aromatic_bonds("O=C1C=CC=CN1"), 6);  // 2-pyridone: C=O gives none, N two
  EXPECT_EQ(aromatic_bonds("O=C1C=CC=CO1"), 6);
  EXPECT_EQ(aromatic_bonds("C1=CC=[O+]C=C1"), 6);
}

TEST(Aromaticity, NOxidesAreAromaticInEitherSpelling) {
  EXPECT_EQ(aromatic_bonds("[O-][n+]1ccccc1"), 6);
  EXPECT_EQ(aromatic_bonds("O=N1=CC=CC=C1"), 6);
}

TEST(Aromaticity, OthersStayKekule) {
  EXPECT_EQ(aromatic_bonds("C1=CC=CC=CC=C1"), 0);  // eight electrons, eight atoms
  EXPECT_EQ(aromatic_bonds("c1ccc2cccc2cc1"), 0);  // azulene: five and seven
  EXPECT_EQ(aromatic_bonds("O=C1C=CC=CC=C1"), 0);  // tropone: seven
  EXPECT_EQ(aromatic_bonds("C1=CCC=C1"), 0);
  EXPECT_EQ(aromatic_bonds("O=C1C=CC(=O)C=C1"), 0);  // p-benzoquinone: four electrons
  EXPECT_EQ(aromatic_bonds("C1=COC=CO1"), 0);        // 1,4-dioxin: eight
  EXPECT_EQ(aromatic_bonds("O=S1(=O)C=CC=C1"), 0);   // sulfone: no lone pair left
  EXPECT_EQ(aromatic_bonds("C=C1C=CC=C1"), 0);       // fulvene: five
  EXPECT_EQ(aromatic_bonds("C1=CC1"), 0);
}

TEST(Aromaticity, OnlyTheRingsThatQualifyAreMarked) {
  EXPECT_EQ(aromatic_bonds("c1ccc2c(c1)CCCC2"), 6);             // tetralin
  EXPECT_EQ(aromatic_bonds("c1ccc2c(c1)-c1ccccc1-2"), 12);      // biphenylene: not the four-ring
  EXPECT_EQ(aromatic_bonds("c1ccc(cc1)-c1ccccc1"), 12);         // nor the bond between two rings
  EXPECT_EQ(aromatic_bonds("O=C1c2ccccc2C(=O)c2ccccc21"), 12);  // anthraquinone: not the middle ring
}

TEST(Aromaticity, TakesBackWhatWasWrittenButDoesNotHold) {
  Result<Graph> graph = parse_smiles("c1ccc2cccc2cc1");
  ASSERT_TRUE(graph.ok());
  EXPECT_TRUE(graph->atoms[0].aromatic);
  perceive_aromaticity(*graph);
  for (const Atom& atom : graph->atoms) EXPECT_FALSE(atom.aromatic);
}

}  // namespace
}  // namespace heatledger::molecule
