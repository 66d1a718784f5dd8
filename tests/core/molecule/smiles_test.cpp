#include "core/molecule/smiles.hpp"

#include <gtest/gtest.h>

#include <string>

#include "core/molecule/bonds.hpp"
#include "core/molecule/formula.hpp"
#include "tests/core/support/test_files.hpp"

namespace heatledger::molecule {
namespace {

Graph read(const std::string& text) {
  Result<Graph> graph = parse_smiles(text);
  EXPECT_TRUE(graph.ok()) << text << ": "
                          << (graph.ok() ? "" : graph.error().code + " " + graph.error().where);
  return graph.ok() ? *graph : Graph{};
}

int hydrogens(const std::string& text) {
  int sum = 0;
  for (const Atom& atom : read(text).atoms) sum += atom.hydrogens;
  return sum;
}

std::string words(const std::string& text) {
  std::string out;
  for (const BondCount& bond : count_bonds(read(text))) {
    out += (out.empty() ? "" : ", ") + spelling(bond.type) + " " + std::to_string(bond.count);
  }
  return out;
}

TEST(Smiles, BadTextsNameCodeAndOffset) {
  const std::string folder = "tests/data/smiles/bad";
  const std::vector<std::string> names = test::list_source_folder(folder);
  ASSERT_GE(names.size(), 50u);
  for (const std::string& name : names) {
    // First line: code and offset. The rest, without its last line end, is the text.
    const std::string file = test::read_source_file(folder + "/" + name);
    const std::size_t line = file.find('\n');
    const std::size_t blank = file.find(' ');
    ASSERT_LT(blank, line) << name;
    const Result<Graph> graph = parse_smiles(std::string_view(file).substr(line + 1, file.size() - line - 2));
    ASSERT_FALSE(graph.ok()) << name << " was read";
    EXPECT_EQ(graph.error().code, file.substr(0, blank)) << name;
    EXPECT_EQ(graph.error().where, "offset " + file.substr(blank + 1, line - blank - 1)) << name;
    EXPECT_FALSE(graph.error().hint.empty()) << name;
    EXPECT_EQ(graph.error().message.back(), '.') << name;
  }
}

TEST(Smiles, EveryPublishedFormulaIsMet) {
  const test::Table table = test::read_table("tests/data/smiles/molecules.tsv");
  ASSERT_GE(table.rows.size(), 2000u);
  for (const std::vector<std::string>& row : table.rows) {
    Graph graph = read(row[table.column("smiles")]);
    // D2O and its like state deuterium; the other formulas name natural elements only, whatever isotopes are
    // written.
    const std::string& text = row[table.column("formula")];
    const Result<Composition> formula = parse_formula(text);
    ASSERT_TRUE(formula.ok()) << row[0] << " " << text;
    const bool states_isotopes = formula->atoms.upper_bound(999) != formula->atoms.end();
    for (Atom& atom : graph.atoms) atom.isotope = states_isotopes ? atom.isotope : 0;
    EXPECT_TRUE(composition(graph) == *formula) << row[0] << " " << row[table.column("smiles")] << ": "
                                                << hill_formula(composition(graph)) << ", not " << text;
  }
}

// OpenSMILES 1.0, section 3.1.5: "the normal valences" table, one atom per valence and one above.
TEST(Smiles, FillsHydrogensByTheValenceTable) {
  EXPECT_EQ(hydrogens("B"), 3);
  EXPECT_EQ(hydrogens("C"), 4);
  EXPECT_EQ(hydrogens("N"), 3);
  EXPECT_EQ(hydrogens("O"), 2);
  EXPECT_EQ(hydrogens("P"), 3);
  EXPECT_EQ(hydrogens("S"), 2);
  EXPECT_EQ(hydrogens("F") + hydrogens("Cl") + hydrogens("Br") + hydrogens("I"), 4);
  EXPECT_EQ(hydrogens("FN(F)(F)F"), 1);     // five
  EXPECT_EQ(hydrogens("FP(F)(F)F"), 1);     // five
  EXPECT_EQ(hydrogens("FS(F)F"), 1);        // four
  EXPECT_EQ(hydrogens("FS(F)(F)(F)F"), 1);  // six
  EXPECT_EQ(hydrogens("FS(F)(F)(F)(F)(F)F"), 0);
  EXPECT_EQ(hydrogens("FC(F)(F)(F)F"), 0);  // above every valence: none
  EXPECT_EQ(hydrogens("*C"), 3);
  EXPECT_EQ(hydrogens("[C]"), 0);  // brackets state their hydrogens
}

// Molecules that the standard itself shows (OpenSMILES 1.0, sections 3.1 to 3.9).
TEST(Smiles, ReadsTheStandardsExamples) {
  EXPECT_EQ(words("[H]O[H]"), words("O"));
  EXPECT_EQ(words("C12C3C4C1C5C4C3C25"), "C-H 8, C-C 12");
  EXPECT_EQ(words("C1CCCCC1C1CCCCC1"), words("C1CCCCC1C2CCCCC2"));
  EXPECT_EQ(words("C0CCCCC0"), words("C1CCCCC1"));
  EXPECT_EQ(words("C%25CCCCC%25"), words("C1CCCCC1"));
  EXPECT_EQ(words("C1CCCCC%01"), words("C1CCCCC1"));
  EXPECT_EQ(words("C=1CCCCC=1"), words("C=1CCCCC1"));
  EXPECT_EQ(words("C=1CCCCC1"), words("C1CCCCC=1"));
  EXPECT_EQ(words("[Na+].[Cl-]"), "");
  EXPECT_EQ(words("c1c2c3c4cc1.Br2.Cl3.Cl4"), words("Brc1c(Cl)c(Cl)ccc1"));
  EXPECT_EQ(words("C1.C1"), words("CC"));
  EXPECT_EQ(words("[Ga+]$[As-]"), "As$Ga 1");
  EXPECT_EQ(words("c1ccccc1-c2ccccc2"), words("c1ccccc1c2ccccc2"));
  EXPECT_EQ(words("[nH]1cccc1"), words("N1C=CC=C1"));
  EXPECT_EQ(words("Oc1cccc[n+]1[O-]"), words("OC1=CC=CC=[N+]1[O-]"));
  EXPECT_EQ(words("c1ccc2cccc2cc1"), words("C1=CC=C2C=CC=C2C=C1"));
  EXPECT_EQ(words("[cH-]1cccc1"), "C-H 5, C-C 3, C=C 2");
  EXPECT_EQ(words("[2H]C"), "C-H 4");
}

TEST(Smiles, KeepsWhatTheTextSays) {
  const Graph graph = read("[13CH3-:7]/C=C\\[C@@H](F)[Pt@SP2+2]");
  EXPECT_EQ(graph.atoms[0].isotope, 13);
  EXPECT_EQ(graph.atoms[0].charge, -1);
  EXPECT_EQ(graph.atoms[0].hydrogens, 3);
  EXPECT_EQ(graph.atoms[0].atom_class, 7);
  EXPECT_EQ(graph.bonds[0].mark, BondMark::Up);
  EXPECT_EQ(graph.bonds[2].mark, BondMark::Down);
  EXPECT_EQ(graph.atoms[3].chirality, 2);
  EXPECT_EQ(graph.atoms[5].chirality, 8);
  EXPECT_EQ(graph.atoms[5].charge, 2);
  EXPECT_EQ(read("[Fe+++]").atoms[0].charge, 3);
}

TEST(Smiles, MarksUnpairedElectrons) {
  EXPECT_EQ(read("[CH3]").atoms[0].unpaired, 1);
  EXPECT_EQ(read("[N]=O").atoms[0].unpaired, 1);
  EXPECT_EQ(read("[O][O]").atoms[0].unpaired, 1);
  EXPECT_EQ(read("C[N+](=O)[O-]").atoms[1].unpaired, 0);
  EXPECT_EQ(read("[NH4+]").atoms[0].unpaired, 0);
  const Graph phenyl = read("[c]1ccccc1");
  EXPECT_EQ(phenyl.atoms[0].unpaired, 1);
  EXPECT_EQ(read("c1ccc[n]1").atoms[4].unpaired, 1);  // the pyrrolyl radical: four carbons pair up without it
}

TEST(Smiles, OddRingsAndBracketAtomsFindTheirDoubleBonds) {
  // Pairing along the text alone fails on each of these; the augmenting path mends it.
  EXPECT_EQ(words("c1cc[nH]c1"), words("C1=CNC=C1"));
  EXPECT_EQ(words("c1cc2cc3ccc(cc4ccc(cc5ccc(cc1n2)[nH]5)n4)[nH]3"),
            words("C1=CC2=CC3=CC=C(N3)C=C4C=CC(=N4)C=C5C=CC(=CC1=N2)N5"));
  EXPECT_EQ(words("c1ccc2c(c1)-c1ccccc1-2"), "C-H 8, C-C 8, C=C 6");
  EXPECT_EQ(words("c1c*ccc1"), words("C1=C*=CC=C1"));
}

TEST(Smiles, AMegabyteOfAnythingNeitherOverflowsNorTakesLong) {
  const std::size_t half = 500000;
  EXPECT_EQ(read(std::string(half * 2, 'C')).atoms.size(), half * 2);
  std::string nested;
  for (std::size_t i = 0; i < half / 2; ++i) nested += "C(";
  EXPECT_EQ(parse_smiles(nested + "C").error().code, "smiles.unclosed_branch");
  EXPECT_EQ(read(nested + "C" + std::string(half / 2, ')')).atoms.size(), half / 2 + 1);
  std::string benzenes = "c1ccccc1", pyrroles = "c1cc[nH]c1", ladder = "C1C2";
  while (benzenes.size() < half) benzenes += "-c1ccccc1";
  while (pyrroles.size() < half) pyrroles += "-c1cc[nH]c1";
  EXPECT_EQ(count_bonds(read(benzenes)).size(), 3u);
  EXPECT_EQ(count_bonds(read(pyrroles)).size(), 5u);
  while (ladder.size() < half) ladder += "C1C2C1C2";
  EXPECT_FALSE(parse_smiles(ladder + "1").ok());
  EXPECT_FALSE(parse_smiles(std::string(half, '[')).ok());
  EXPECT_FALSE(parse_smiles(std::string(half, 'c')).ok() && half % 2 == 1);
}

}  // namespace
}  // namespace heatledger::molecule
