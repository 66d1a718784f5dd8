#include "core/molecule/line_formula.hpp"

#include <gtest/gtest.h>

#include "core/molecule/bonds.hpp"
#include "core/molecule/formula.hpp"
#include "core/molecule/smiles.hpp"
#include "tests/core/support/test_files.hpp"

namespace heatledger::molecule {
namespace {

std::string bonds_text(const Graph& graph) {
  std::string text;
  for (const BondCount& bond : count_bonds(graph))
    text += std::to_string(bond.count) + " " + spelling(bond.type) + ", ";
  return text;
}

TEST(LineFormula, ReadsWhatEngineersWrite) {
  const test::Table table = test::read_table("tests/data/line_formulas.tsv");
  const std::size_t line = table.column("line"), smiles = table.column("smiles");
  ASSERT_GE(table.rows.size(), 100u);
  for (const std::vector<std::string>& row : table.rows) {
    const Result<Graph> condensed = parse_line_formula(row[line]);
    const Result<Graph> written = parse_smiles(row[smiles]);
    ASSERT_TRUE(written.ok()) << row[smiles];
    ASSERT_TRUE(condensed.ok()) << row[line] << ": " << condensed.error().message;
    EXPECT_EQ(bonds_text(*condensed), bonds_text(*written)) << row[line];
    EXPECT_EQ(canonical_smiles(*condensed), canonical_smiles(*written)) << row[line];
  }
}

TEST(LineFormula, HoldsTheAtomsOfItsText) {
  const test::Table table = test::read_table("tests/data/line_formulas.tsv");
  std::size_t compared = 0;
  for (const std::vector<std::string>& row : table.rows) {
    const Result<Composition> plain = parse_formula(row[table.column("line")]);
    if (!plain) continue;  // bond marks and prefixes are no part of a molecular formula
    const Result<Graph> graph = parse_line_formula(row[table.column("line")]);
    ASSERT_TRUE(graph.ok());
    EXPECT_EQ(hill_formula(composition(*graph)), hill_formula(*plain)) << row[table.column("line")];
    ++compared;
  }
  EXPECT_GE(compared, 90u);
}

TEST(LineFormula, RefusesBadTextWithCodeAndOffset) {
  const std::string folder = "tests/data/line_formula/bad";
  const std::vector<std::string> names = test::list_source_folder(folder);
  ASSERT_GE(names.size(), 25u);
  for (const std::string& name : names) {
    const test::BadCase bad = test::read_bad_case(folder + "/" + name);
    const Result<Graph> result = parse_line_formula(bad.text);
    ASSERT_FALSE(result.ok()) << name;
    EXPECT_EQ(result.error().code, bad.code) << name;
    EXPECT_EQ(result.error().where, "offset " + bad.offset) << name;
  }
  EXPECT_NE(parse_line_formula("C6H4(OH)2").error().message.find("ortho, meta or para"), std::string::npos);
}

TEST(LineFormula, StaysSmallOnHugeTexts) {
  std::string chain;
  for (int i = 0; i < 200000; ++i) chain += "CH2";
  EXPECT_FALSE(parse_line_formula(chain).ok());
  EXPECT_FALSE(parse_line_formula("CH3((((CH2)9999)9999)9999)9999CH3").ok());
  EXPECT_FALSE(parse_line_formula(std::string(300000, '(')).ok());
}

}  // namespace
}  // namespace heatledger::molecule
