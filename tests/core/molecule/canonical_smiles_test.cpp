#include <gtest/gtest.h>

#include <algorithm>
#include <random>
#include <sstream>
#include <string>

#include "core/molecule/bonds.hpp"
#include "core/molecule/smiles.hpp"
#include "tests/core/support/test_files.hpp"

namespace heatledger::molecule {
namespace {

Graph read(const std::string& text) {
  Result<Graph> graph = parse_smiles(text);
  EXPECT_TRUE(graph.ok()) << text;
  return graph.ok() ? *graph : Graph{};
}

Graph renumbered(const Graph& graph, std::mt19937& random) {
  std::vector<std::uint32_t> place(graph.atoms.size());
  for (std::uint32_t i = 0; i < place.size(); ++i) place[i] = i;
  std::shuffle(place.begin(), place.end(), random);
  Graph out;
  out.atoms.resize(graph.atoms.size());
  for (std::size_t i = 0; i < place.size(); ++i) out.atoms[place[i]] = graph.atoms[i];
  for (Bond bond : graph.bonds) {
    bond.a = place[bond.a];
    bond.b = place[bond.b];
    if (random() & 1u) std::swap(bond.a, bond.b);
    out.bonds.push_back(bond);
  }
  std::shuffle(out.bonds.begin(), out.bonds.end(), random);
  return out;
}

TEST(CanonicalSmiles, IsTheSameForEveryNumbering) {
  const test::Table table = test::read_table("tests/data/smiles/molecules.tsv");
  constexpr unsigned seed = 20160513;
  std::mt19937 random(seed);
  for (const std::vector<std::string>& row : table.rows) {
    const Graph graph = read(row[table.column("smiles")]);
    const std::string text = canonical_smiles(graph);
    for (int turn = 0; turn < 3; ++turn) {
      const Graph other = renumbered(graph, random);
      ASSERT_EQ(canonical_smiles(other), text) << row[table.column("smiles")] << ", seed " << seed;
      ASSERT_EQ(count_bonds(other).size(), count_bonds(graph).size()) << row[0];
    }
  }
}

TEST(CanonicalSmiles, ReadsBackToItself) {
  const test::Table table = test::read_table("tests/data/smiles/molecules.tsv");
  for (const std::vector<std::string>& row : table.rows) {
    const Graph graph = read(row[table.column("smiles")]);
    const std::string text = canonical_smiles(graph);
    const Graph again = read(text);
    EXPECT_EQ(canonical_smiles(again), text) << row[0];
    const BondTally before = count_bonds(graph), after = count_bonds(again);
    EXPECT_TRUE(std::equal(
        before.begin(), before.end(), after.begin(), after.end(),
        [](const BondCount& a, const BondCount& b) { return a.type == b.type && a.count == b.count; }))
        << row[0];
  }
}

TEST(CanonicalSmiles, IsTheSameForEverySpelling) {
  const test::Table table = test::read_table("tests/data/smiles/same_structure.tsv");
  for (const std::vector<std::string>& row : table.rows) {
    std::istringstream spellings(row[table.column("spellings")]);
    std::string one;
    spellings >> one;
    // The two radical spellings of CO and NO2 state other electrons than the usual ones.
    for (std::string other; spellings >> other;) {
      if (other == "[C]=O" || other == "O=[N]=O" || other == "[O]N=O") continue;
      EXPECT_EQ(canonical_smiles(read(other)), canonical_smiles(read(one))) << other;
    }
  }
}

TEST(CanonicalSmiles, TellsApartWhatRefinementAloneCannot) {
  // Two cyclobutane rings joined, and a cycle of eight: every atom has the same surroundings at any distance.
  EXPECT_NE(canonical_smiles(read("C1CCC1.C1CCC1")), canonical_smiles(read("C1CCCCCCC1")));
  // Cuneane and cubane: (CH)8, three bonds each.
  EXPECT_NE(canonical_smiles(read("C12C3C1C1C4C2C4C31")), canonical_smiles(read("C12C3C4C1C5C2C3C45")));
  // Decalin and bicyclopentyl: same atoms, same degrees.
  EXPECT_NE(canonical_smiles(read("C1CCC2CCCCC2C1")), canonical_smiles(read("C1CCCC1C1CCCC1")));
}

TEST(CanonicalSmiles, KeepsIsotopesAndChargesLeavesStereoOut) {
  EXPECT_EQ(canonical_smiles(read("F/C=C/F")), canonical_smiles(read("F/C=C\\F")));
  EXPECT_EQ(canonical_smiles(read("C[C@H](N)O")), canonical_smiles(read("C[C@@H](N)O")));
  EXPECT_NE(canonical_smiles(read("[13CH4]")), canonical_smiles(read("C")));
  EXPECT_NE(canonical_smiles(read("[NH4+]")), canonical_smiles(read("N")));
  EXPECT_EQ(canonical_smiles(read("[H]C([H])([H])[H]")), "C");
  EXPECT_EQ(canonical_smiles(read("[HH]")), "[H][H]");
  EXPECT_EQ(canonical_smiles(read("[C-]#[O+]")), "[C-]#[O+]");
  EXPECT_EQ(canonical_smiles(read("OCC")), "CCO");
}

// Found by tests/fuzz/smiles_fuzz: texts that no chemist writes, whose canonical text was not its own
// canonical text.
TEST(CanonicalSmiles, StaysItselfForAtomsFarAboveTheirOctet) {
  for (const char* text :
       {"O#O#oO", "O$F=C", "[O------------][n+]1ccccc1", "n#1cc1", "CC[O-][n]1=c=ccbc\\C=1I"}) {
    const std::string once = canonical_smiles(read(text));
    EXPECT_EQ(canonical_smiles(read(once)), once) << text;
  }
}

}  // namespace
}  // namespace heatledger::molecule
