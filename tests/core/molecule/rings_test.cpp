#include "core/molecule/rings.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <numeric>
#include <random>
#include <set>
#include <sstream>
#include <string>

#include "core/molecule/smiles.hpp"
#include "tests/core/support/test_files.hpp"

namespace heatledger::molecule {
namespace {

Graph read(const std::string& text) {
  Result<Graph> graph = parse_smiles(text);
  EXPECT_TRUE(graph.ok()) << text;
  return graph.ok() ? *graph : Graph{};
}

std::string sizes(const std::string& text) {
  std::string out;
  for (const Ring& ring : relevant_cycles(read(text))) out += std::to_string(ring.size()) + " ";
  return out;
}

// Counts that geometry gives: faces of polyhedra, rings of polycyclic skeletons as their names state them.
TEST(Rings, PolyhedraAndSkeletonsHaveTheRingsOfTheirGeometry) {
  EXPECT_EQ(sizes("CCCC"), "");
  EXPECT_EQ(sizes("C1CC1"), "3 ");
  EXPECT_EQ(sizes("C1CCCCC1.C1CC1"), "3 6 ");
  EXPECT_EQ(sizes("C1CCC2(C1)CCCCC2"), "5 6 ");            // spiro
  EXPECT_EQ(sizes("c1ccc2ccccc2c1"), "6 6 ");              // fused: the rim of ten is their sum
  EXPECT_EQ(sizes("C1CC2CCC1C2"), "5 5 ");                 // norbornane: the six-ring is their sum
  EXPECT_EQ(sizes("C1CC2CCC1CC2"), "6 6 6 ");              // bicyclo[2.2.2]octane: any two make the third
  EXPECT_EQ(sizes("C1C2CC3CC1CC(C2)C3"), "6 6 6 6 ");      // adamantane
  EXPECT_EQ(sizes("C12C3C4C1C5C2C3C45"), "4 4 4 4 4 4 ");  // cubane: six faces
  EXPECT_EQ(sizes("C12C3C1C1C4C2C4C31"), "3 3 4 4 5 5 ");  // cuneane: six faces
  EXPECT_EQ(sizes("C12C3C1C23"), "3 3 3 3 ");              // tetrahedrane: four faces
  EXPECT_EQ(sizes("C12C3C4C5C1C6C7C2C8C3C9C4C1C5C6C2C7C8C9C12"),
            "5 5 5 5 5 5 5 5 5 5 5 5 ");                             // dodecahedrane
  EXPECT_EQ(sizes("C1Cc2ccc(cc2)CCc2ccc1cc2"), "6 6 12 12 12 12 ");  // either way round each benzene ring
}

TEST(Rings, BuckminsterfullereneHasTwelveFivesAndTwentySixes) {
  const test::Table table = test::read_table("tests/data/smiles/molecules.tsv");
  for (const std::vector<std::string>& row : table.rows) {
    if (row[0] != "buckminsterfullerene") continue;
    std::string expected;
    for (int i = 0; i < 12; ++i) expected += "5 ";
    for (int i = 0; i < 20; ++i) expected += "6 ";
    EXPECT_EQ(sizes(row[table.column("smiles")]), expected);
    return;
  }
  FAIL() << "the structure is missing from the table";
}

// Identities for every molecule: each ring is a cycle of bonds, listed once; there are at least bonds - atoms
// + fragments of them, and together they cover exactly the bonds that are no bridges.
TEST(Rings, IdentitiesHoldForEveryMolecule) {
  const test::Table table = test::read_table("tests/data/smiles/molecules.tsv");
  for (const std::vector<std::string>& row : table.rows) {
    const Graph graph = read(row[table.column("smiles")]);
    bool complete = false;
    const std::vector<Ring> rings = relevant_cycles(graph, &complete);
    EXPECT_TRUE(complete) << row[0];
    std::vector<std::uint8_t> in_ring;
    find_ring_bonds(graph, in_ring);
    std::set<std::pair<std::uint32_t, std::uint32_t>> bonds, covered;
    for (const Bond& bond : graph.bonds) bonds.insert({std::min(bond.a, bond.b), std::max(bond.a, bond.b)});
    for (const Ring& ring : rings) {
      EXPECT_EQ(std::set<std::uint32_t>(ring.begin(), ring.end()).size(), ring.size());
      for (std::size_t i = 0; i < ring.size(); ++i) {
        const std::uint32_t a = ring[i], b = ring[(i + 1) % ring.size()];
        const std::pair<std::uint32_t, std::uint32_t> edge{std::min(a, b), std::max(a, b)};
        EXPECT_TRUE(bonds.count(edge)) << row[0];
        covered.insert(edge);
      }
    }
    EXPECT_TRUE(std::adjacent_find(rings.begin(), rings.end()) == rings.end()) << row[0];
    EXPECT_EQ(covered.size(), static_cast<std::size_t>(std::count(in_ring.begin(), in_ring.end(), 1)))
        << row[0];
    std::vector<std::uint32_t> piece(graph.atoms.size());
    std::iota(piece.begin(), piece.end(), 0u);
    std::size_t fragments = piece.size();
    for (const Bond& bond : graph.bonds) {
      const std::uint32_t from = piece[bond.a], to = piece[bond.b];
      if (from == to) continue;
      --fragments;
      for (std::uint32_t& p : piece) p = p == from ? to : p;
    }
    EXPECT_GE(rings.size(), graph.bonds.size() + fragments - graph.atoms.size()) << row[0];
  }
}

TEST(Rings, AFamilyTooLargeIsCutAndSaysSo) {
  // Twelve benzene rings joined para in one macrocycle: 2^12 shortest ways round.
  std::string text = "C1";
  for (int i = 0; i < 12; ++i) text += "c2ccc(cc2)";
  text += "C1";
  bool complete = true;
  EXPECT_GE(relevant_cycles(read(text), &complete).size(), 13u);
  EXPECT_FALSE(complete);
}

}  // namespace
}  // namespace heatledger::molecule
