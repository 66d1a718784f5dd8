#include "core/molecule/bonds.hpp"

#include <gtest/gtest.h>

#include <map>
#include <sstream>
#include <string>

#include "core/molecule/aromaticity.hpp"
#include "core/molecule/elements.hpp"
#include "core/molecule/smiles.hpp"
#include "tests/core/support/test_files.hpp"

namespace heatledger::molecule {
namespace {

Graph read(const std::string& text) {
  Result<Graph> graph = parse_smiles(text);
  EXPECT_TRUE(graph.ok()) << text << ": " << (graph.ok() ? "" : graph.error().code);
  return graph.ok() ? *graph : Graph{};
}

std::string words(const BondTally& tally) {
  std::string text;
  for (const BondCount& bond : tally) text += spelling(bond.type) + " " + std::to_string(bond.count) + ", ";
  return text;
}

std::string tally_of(const std::string& smiles) {
  return words(count_bonds(read(smiles)));
}

TEST(Bonds, HandCountedStructuresAgree) {
  const test::Table table = test::read_table("tests/data/smiles/bond_counts.tsv");
  ASSERT_GE(table.rows.size(), 37u);
  for (const std::vector<std::string>& row : table.rows) {
    const std::string& smiles = row[table.column("smiles")];
    std::map<BondType, int> expected, found;
    std::istringstream bonds(row[table.column("bonds")]);
    int count = 0;
    for (std::string bond; bonds >> bond >> count;) {
      const Result<BondType> type = parse_bond_type(bond);
      ASSERT_TRUE(type.ok()) << bond;
      expected[*type] = count;
    }
    Graph graph = read(smiles);
    for (const BondCount& entry : plain_tally(count_bonds(graph))) found[entry.type] = entry.count;
    EXPECT_EQ(found, expected) << row[0] << ": " << words(count_bonds(graph));
    perceive_aromaticity(graph);
    int aromatic = 0;
    for (const Bond& bond : graph.bonds) aromatic += bond.aromatic ? 1 : 0;
    EXPECT_EQ(std::to_string(aromatic), row[table.column("aromatic")]) << row[0];
  }
}

TEST(Bonds, EverySpellingOfAStructureGivesOneTally) {
  const test::Table table = test::read_table("tests/data/smiles/same_structure.tsv");
  ASSERT_GE(table.rows.size(), 30u);
  for (const std::vector<std::string>& row : table.rows) {
    std::istringstream spellings(row[table.column("spellings")]);
    std::string one;
    spellings >> one;
    EXPECT_EQ(tally_of(one), row[table.column("tally")] + ", ") << one;
    for (std::string other; spellings >> other;) EXPECT_EQ(tally_of(other), tally_of(one)) << other;
  }
}

TEST(Bonds, PlainTallyMergesSettings) {
  const BondTally marked = count_bonds(read("CO[N+](=O)[O-]"));
  EXPECT_EQ(words(marked), "C-H 3, C-O 1, N-O 1, N-O (nitro) 1, N=O (nitro) 1, ");
  EXPECT_EQ(words(plain_tally(marked)), "C-H 3, C-O 1, N-O 2, N=O 1, ");
}

TEST(Bonds, SpellingsReadBack) {
  for (const char* text :
       {"C-H", "C=C", "C#N", "N-O (nitro)", "C=O (CO2)", "O=O (O3)", "C-C (aromatic ring)"}) {
    const Result<BondType> type = parse_bond_type(text);
    ASSERT_TRUE(type.ok()) << text;
    EXPECT_EQ(spelling(*type), text);
  }
  for (const char* text : {"", "C", "CH", "C-", "-H", "C-Xx", "C=O (ketone)", "C=O (CO2", "c-H"}) {
    const Result<BondType> type = parse_bond_type(text);
    ASSERT_FALSE(type.ok()) << text;
    EXPECT_EQ(type.error().code, "bond.unknown_spelling");
  }
}

TEST(Bonds, RingBondsAreMarkedOnlyOnRequest) {
  EXPECT_EQ(tally_of("Cc1ccncc1"), "C-H 7, C-C 3, C=C 2, C-N 1, C=N 1, ");
  const BondTally marked = count_bonds_with_rings(read("Cc1ccncc1"));
  EXPECT_EQ(words(marked),
            "C-H 7, C-C 1, C-C (aromatic ring) 2, C=C (aromatic ring) 2, C-N (aromatic ring) 1, C=N "
            "(aromatic ring) 1, ");
  EXPECT_EQ(words(plain_tally(marked)), tally_of("Cc1ccncc1"));
}

}  // namespace
}  // namespace heatledger::molecule
