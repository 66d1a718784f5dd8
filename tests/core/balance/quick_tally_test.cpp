#include "core/balance/quick_tally.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <array>
#include <string>

#include "tests/core/balance/sheets.hpp"

namespace heatledger::balance {
namespace {

using uncertainty::Figure;
using uncertainty::Quantity;

void expect_same(const std::optional<Figure>& quick, const std::optional<Quantity>& full,
                 const std::string& equation) {
  ASSERT_EQ(quick.has_value(), full.has_value()) << equation;
  if (!quick) return;
  EXPECT_EQ(quick->value, full->value()) << equation;  // the very digits: no tolerance
  EXPECT_EQ(quick->u95, full->u95()) << equation;
}

TEST(QuickTally, GivesTheDigitsOfTheLedger) {
  const std::string equations[] = {
      "nitrobenzene(l) + 3 H2(g) -> aniline(l) + 2 H2O(l)",
      "nitrobenzene(l) + 3 H2(g) = aniline(l) + 2 H2O(l)",
      "CO(g) + 0.5 O2(g) -> CO2(g)",
      "1/3 methane + 2/3 O2 -> 1/3 CO2 + 2/3 H2O",
      "\"CC(=O)O\"(l) + \"CCO\"(l) -> \"CCOC(C)=O\"(l) + water(l)",
      "graphite(s) + O2(g) -> CO2(g)",
      "\"CB(C)C\"(g) + 3 H2(g) -> \"B\"(g) + 3 methane(g)",
      "\"CCC(C)(Cl)CC(F)CC\"(l) -> \"CCC(C)=CC(F)CC\"(l) + HCl(g)",
      "2 NO + O2 -> 2 NO2",
  };
  QuickTally quick(test_sheets::bond_set());
  for (int pass = 0; pass < 2; ++pass) {  // the second pass runs on remembered terms
    for (const std::string& equation : equations) {
      const Ledger full = test_sheets::ledger(equation);
      const Result<QuickAnswer> answer = quick.tally(equation);
      ASSERT_TRUE(answer.ok()) << equation;
      expect_same(answer->broken, full.broken, equation);
      expect_same(answer->formed, full.formed, equation);
      expect_same(answer->gas_298, full.gas_298, equation);
      expect_same(answer->as_written, full.as_written, equation);
      expect_same(answer->formation, find_route(full, kFormationRoute)->as_written, equation);
      expect_same(answer->formation_gas_298, find_route(full, kFormationRoute)->gas_298, equation);
      EXPECT_EQ(answer->taken, full.taken) << equation;
    }
  }
}

TEST(QuickTally, RefusesWhatTheLedgerRefuses) {
  QuickTally quick(test_sheets::bond_set());
  ASSERT_TRUE(quick.tally("methane + 2 O2 -> CO2 + 2 H2O").ok());
  ASSERT_TRUE(quick.tally("CO + O2 -> CO + O2").ok());
  for (int pass = 0; pass < 2; ++pass) {
    const Result<QuickAnswer> unbalanced = quick.tally("methane + O2 -> CO2 + 2 H2O");
    ASSERT_FALSE(unbalanced.ok());
    EXPECT_EQ(unbalanced.error(), test_sheets::try_ledger("methane + O2 -> CO2 + 2 H2O").error());
  }
  for (const char* broken :
       {"", "methane", "methane + -> CO2", "methane + 2 O2 -> CO2 -> 2 H2O", "no such thing -> CO2"}) {
    EXPECT_FALSE(quick.tally(broken).ok()) << broken;
  }
}

TEST(QuickTally, KeepsItsMemoryBoundedAndItsAnswersRight) {
  QuickTally small(test_sheets::bond_set(), ContextUse::WhereNeeded, 2);
  const double expected = test_sheets::ledger("methane(g) + 2 O2(g) -> CO2(g) + 2 H2O(g)").gas_298->value();
  for (const char* name : {"ethane", "propane", "butane", "methane", "ethane"}) {
    ASSERT_TRUE(small.tally(std::string(name) + "(g) -> " + name + "(g)").ok());
    const Result<QuickAnswer> answer = small.tally("methane(g) + 2 O2(g) -> CO2(g) + 2 H2O(g)");
    ASSERT_TRUE(answer.ok());
    EXPECT_EQ(answer->gas_298->value, expected);
  }
}

TEST(QuickTally, KeepsItsMemoryBoundedWhereEveryTermIsAnEstimate) {
  // Each chain brings some thousands of parts, so that the memory is renewed several times over.
  QuickTally quick(test_sheets::bond_set(), ContextUse::Always);
  std::size_t most = 0;
  for (int i = 0; i < 800; ++i) {
    std::string chain = "C";
    for (int rest = i, k = 0; k < 5; ++k, rest /= 4)
      chain += std::array<const char*, 4>{"C", "C(C)", "C(CC)", "C(F)"}[static_cast<std::size_t>(rest % 4)];
    ASSERT_TRUE(quick.tally("\"" + chain + "Cl\"(g) -> \"" + chain + "Cl\"(g)").ok()) << chain;
    most = std::max(most, quick.remembered_parts());
  }
  EXPECT_GT(most, QuickTally::most_parts);  // or the bound was never met
  EXPECT_LE(most, 2 * QuickTally::most_parts + 20000);
}

}  // namespace
}  // namespace heatledger::balance
