#include "core/molecule/normalise.hpp"

#include <gtest/gtest.h>

#include <string>

#include "core/molecule/aromaticity.hpp"
#include "core/molecule/elements.hpp"
#include "core/molecule/smiles.hpp"

namespace heatledger::molecule {
namespace {

// Atoms with charge, bonds with order: "C N+ O- | 01:2 ...", enough to see what moved.
std::string picture(const Graph& graph) {
  std::string text;
  for (const Atom& atom : graph.atoms) {
    text += symbol(atom.element);
    if (atom.charge != 0) text += (atom.charge > 0 ? "+" : "") + std::to_string(atom.charge);
    text += ' ';
  }
  for (const Bond& bond : graph.bonds) {
    text += std::to_string(bond.a) + std::to_string(bond.b) + (bond.aromatic ? "a" : ":") +
            std::to_string(static_cast<int>(bond.order)) + " ";
  }
  return text;
}

std::string neutral(const std::string& smiles) {
  Result<Graph> graph = parse_smiles(smiles);
  EXPECT_TRUE(graph.ok()) << smiles;
  neutralise_charges(*graph);
  return picture(*graph);
}

std::string octet(const std::string& smiles) {
  Result<Graph> graph = parse_smiles(smiles);
  EXPECT_TRUE(graph.ok()) << smiles;
  take_octet_form(*graph);
  return picture(*graph);
}

TEST(Normalise, NeutralSpellingRaisesBondsBetweenOppositeCharges) {
  EXPECT_EQ(neutral("C[N+](=O)[O-]"), "C N O O 01:1 12:2 13:2 ");
  EXPECT_EQ(neutral("CN=[N+]=[N-]"), "C N N N 01:1 12:2 23:3 ");
  EXPECT_EQ(neutral("C=[N+]=[N-]"), "C N N 01:2 12:3 ");
  EXPECT_EQ(neutral("[N-]=[N+]=O"), "N N O 01:3 12:2 ");
  EXPECT_EQ(neutral("[O-][O+]=O"), "O O O 01:2 12:2 ");
  EXPECT_EQ(neutral("[C-]#[O+]"), "C O 01:3 ");  // the cap
  EXPECT_EQ(neutral("C[S+2]([O-])([O-])C"), "C S O O C 01:1 12:2 13:2 14:1 ");
  EXPECT_EQ(neutral("C[N+](C)(C)[O-]"), "C N C C O 01:1 12:1 13:1 14:2 ");
  EXPECT_EQ(neutral("[NH4+].[Cl-]"), "N+1 Cl-1 ");  // no bond, no change
  EXPECT_EQ(neutral("C[N+](C)(C)C"), "C N+1 C C C 01:1 12:1 13:1 14:1 ");
}

TEST(Normalise, AromaticBondsKeepTheirOrder) {
  Result<Graph> graph = parse_smiles("[n-]1[n+](C)ccc1");
  ASSERT_TRUE(graph.ok());
  perceive_aromaticity(*graph);
  const Graph before = *graph;
  neutralise_charges(*graph);
  for (std::size_t i = 0; i < graph->bonds.size(); ++i)
    EXPECT_EQ(graph->bonds[i].order, before.bonds[i].order);
  for (const Atom& atom : graph->atoms) EXPECT_EQ(atom.charge, 0);
}

TEST(Normalise, OctetSpellingIsOneForAllAndStable) {
  for (const char* text : {"C[N+](=O)[O-]", "CN(=O)=O", "C[N+]([O-])=O"}) {
    Result<Graph> graph = parse_smiles(text);
    ASSERT_TRUE(graph.ok());
    take_octet_form(*graph);
    const std::string once = picture(*graph);
    take_octet_form(*graph);
    EXPECT_EQ(picture(*graph), once) << text;
    EXPECT_NE(once.find("N+1"), std::string::npos);
    EXPECT_NE(once.find("O-1"), std::string::npos);
  }
  EXPECT_EQ(octet("[N-]=[N+]=O"), octet("N#N=O"));
  EXPECT_EQ(octet("[C-]#[O+]"), "C-1 O+1 01:3 ");
  EXPECT_EQ(octet("C[N+](C)(C)[BH3-]"), "C N+1 C C B-1 01:1 12:1 13:1 14:1 ");  // no octet to give back
  EXPECT_EQ(octet("C#[N+]C"), "C N+1 C 01:3 12:1 ");                            // a cation stays one
  EXPECT_EQ(octet("CS(=O)(=O)C"), "C S O O C 01:1 12:2 13:2 14:1 ");
}

}  // namespace
}  // namespace heatledger::molecule
