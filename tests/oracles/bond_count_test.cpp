// Bond counts of every structure of tests/data/smiles/molecules.tsv against two independent toolkits.
// Their conventions, translated here:
//  - all hydrogens are made atoms, aromatic rings are given Kekulé orders;
//  - halogen oxoacids written with charges are counted with the double bonds that they stand for (see the
//  oracles).
// What then still differs stands in tests/data/smiles/oracle_differences.tsv with its reason. A line there
// that does not occur any more fails as well.
#include <gtest/gtest.h>

#include <functional>
#include <map>
#include <set>
#include <string>

#include "core/molecule/bonds.hpp"
#include "core/molecule/smiles.hpp"
#include "tests/core/support/test_files.hpp"
#include "tests/oracles/oracle.hpp"

namespace heatledger::test {
namespace {

OracleTally our_tally(const std::string& smiles) {
  const Result<molecule::Graph> graph = molecule::parse_smiles(smiles);
  EXPECT_TRUE(graph.ok()) << smiles;
  OracleTally tally;
  if (!graph.ok()) return tally;
  for (const molecule::BondCount& entry : molecule::plain_tally(molecule::count_bonds(*graph))) {
    tally[molecule::plain_spelling(entry.type)] += entry.count;
  }
  return tally;
}

std::string words(const OracleTally& tally) {
  std::string text;
  for (const auto& entry : tally)
    text += (text.empty() ? "" : " ") + entry.first + " " + std::to_string(entry.second);
  return text;
}

using Oracle = std::function<std::optional<OracleTally>(const std::string&)>;

void compare(const std::string& name, const Oracle& oracle) {
  const Table molecules = read_table("tests/data/smiles/molecules.tsv");
  const Table listed = read_table("tests/data/smiles/oracle_differences.tsv");
  std::map<std::string, std::string> expected;  // SMILES to their tally
  for (const std::vector<std::string>& row : listed.rows) {
    if (row[listed.column("oracle")] != name) continue;
    EXPECT_FALSE(row[listed.column("reason")].empty()) << "every difference has its reason";
    expected[row[listed.column("smiles")]] = row[listed.column("theirs")];
  }
  ASSERT_GE(molecules.rows.size(), 1500u);
  std::size_t agreed = 0;
  std::set<std::string> met;
  for (const std::vector<std::string>& row : molecules.rows) {
    const std::string& smiles = row[molecules.column("smiles")];
    const std::optional<OracleTally> theirs = oracle(smiles);
    const std::string their_words = theirs ? words(*theirs) : "refused";
    const std::string our_words = words(our_tally(smiles));
    const auto entry = expected.find(smiles);
    if (our_words == their_words) {
      ++agreed;
      continue;
    }
    met.insert(smiles);
    if (entry == expected.end()) {
      ADD_FAILURE() << smiles << "\t" << name << "\t" << our_words << "\t" << their_words;
    } else {
      EXPECT_EQ(their_words, entry->second) << smiles << ": the listed difference is another one";
    }
  }
  for (const auto& entry : expected)
    EXPECT_TRUE(met.count(entry.first)) << entry.first << ": listed, but agrees now";
  EXPECT_GE(agreed, 1500u);
  testing::Test::RecordProperty("agreed", static_cast<int>(agreed));
}

TEST(Oracles, RdkitCountsTheSameBonds) {
  silence_rdkit();
  compare("rdkit", rdkit_tally);
}

TEST(Oracles, OpenBabelCountsTheSameBonds) {
  silence_open_babel();
  compare("openbabel", open_babel_tally);
}

}  // namespace
}  // namespace heatledger::test
