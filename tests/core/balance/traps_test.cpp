// Traps that home-made sheets fall into, each caught or explained by the ledger. Where a bond sum misses:
// tests/data/checks/traps.tsv. Unbalanced equations and the slips of a typed sheet are in reaction_test.cpp
// and checker_test.cpp, ledgers with their stated table in bond_ledgers_test.cpp, a catalyst on both sides in
// invariants_test.cpp, a polymer's link in published_heats_test.cpp.
#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>

#include "core/base/number_text.hpp"
#include "core/thermo/estimated.hpp"
#include "tests/core/balance/sheets.hpp"
#include "tests/core/support/test_files.hpp"

namespace heatledger::balance {
namespace {

using test_sheets::kj;
using test_sheets::ledger;

bool says(const std::vector<std::string>& sentences, const std::string& words) {
  return std::any_of(sentences.begin(), sentences.end(),
                     [&](const std::string& sentence) { return sentence.find(words) != std::string::npos; });
}

double formation(const Ledger& sheet) {
  const Route* route = find_route(sheet, kFormationRoute);
  EXPECT_TRUE(route != nullptr && route->as_written);
  return route != nullptr && route->as_written ? route->as_written->value() / 1000 : 0;
}

/// The price of the only bond line of a species [kJ/mol].
double price(const std::string& equation) {
  const Ledger sheet = ledger(equation);
  EXPECT_FALSE(sheet.rows.empty() || sheet.rows[0].lines.empty()) << equation;
  if (sheet.rows.empty() || sheet.rows[0].lines.empty()) return 0;
  const BondLine& line = sheet.rows[0].lines[0];
  return line.per_mole / line.count / 1000;
}

TEST(Traps, BondSumsSayWhatTheyMiss) {
  const test::Table table = test::read_table("tests/data/checks/traps.tsv");
  ASSERT_EQ(table.rows.size(), 8u);
  for (const auto& row : table.rows) {
    const Ledger sheet = ledger(row[1] + "(g) -> " + row[1] + "(g)");
    ASSERT_FALSE(sheet.rows.empty()) << row[0];
    const LedgerRow& species = sheet.rows[0];
    ASSERT_TRUE(species.per_mole && species.table) << row[0];
    EXPECT_NEAR((species.per_mole->value() - species.table->value()) / 1000, *parse_number(row[2]),
                *parse_number(row[3]))
        << row[0] << ", " << row[5];
    if (row[4] == "-") {
      EXPECT_TRUE(species.strains.empty()) << row[0] << ": " << species.strains.front();
    } else {
      EXPECT_TRUE(says(species.strains, row[4]))
          << row[0] << ": " << (species.strains.empty() ? "nothing" : species.strains.front());
    }
  }
}

// ATcT 1.112 atomisation: CO2 804.4 a bond, CO 1076.6, NO 630.6, O2 498.5; ranges as four published tables
// span.
TEST(Traps, SmallMoleculesHaveTheirOwnBonds) {
  EXPECT_NEAR(price("CO2(g) -> CO2(g)"), 802, 4);  // 799 to 804, not the 745 of a ketone
  EXPECT_NEAR(price("CO(g) -> CO(g)"), 1076, 4);   // 1072 to 1080
  EXPECT_NEAR(price("\"C=O\"(g) -> \"C=O\"(g)"), 413, 30);
  EXPECT_NEAR(price("NO(g) -> NO(g)"), 630.6, 1);  // not the mean N=O of 607
  EXPECT_NEAR(price("O2(g) -> O2(g)"), 497, 3);    // not twice an O–O
  // Resonance in NO2 (936.9) and O3 (605.9): the bonds as drawn give 808 and 641.
  EXPECT_NEAR(ledger("NO2(g) -> NO2(g)").rows[0].per_mole->value() / 1000, 936.9, 1);
  EXPECT_NEAR(ledger("O3(g) -> O3(g)").rows[0].per_mole->value() / 1000, 605.9, 1);
}

// Water: first O–H 497.3, second 429.7, mean 463.5; methane: first C–H 439.0, mean 415.8 (ATcT 1.112).
TEST(Traps, MeanBondsAreNotFirstBonds) {
  EXPECT_NEAR(price("water(g) -> water(g)"), 463.5, 5);
  EXPECT_NEAR(price("methane(g) -> methane(g)"), 415.8, 5);
}

// CRC Handbook 95th ed.: −552.56 with liquid water, −464.55 with vapour.
TEST(Traps, ThePhaseOfEachProductIsReckonedWith) {
  EXPECT_NEAR(formation(ledger("nitrobenzene(l) + 3 H2(g) -> aniline(l) + 2 water(l)")), -552.56, 8);
  EXPECT_NEAR(formation(ledger("nitrobenzene(l) + 3 H2(g) -> aniline(l) + 2 water(g)")), -464.55, 8);
  // CODATA 1989: bromine gas 30.91 above the liquid.
  EXPECT_NEAR(formation(ledger("Br2(l) -> Br2(g)")), 30.91, 0.2);
}

// NBS: −814.0 as liquid, −909.27 at infinite dilution.
TEST(Traps, SulfuricAcidAsLiquidIsNotInSolution) {
  EXPECT_NEAR(formation(ledger("H2SO4(l) -> H2SO4(aq)")), -909.27 + 814.0, 1.5);
  // 96 wt% is 0.23 mol of water a mole: most of the heat of dilution is still to come.
  const double strong = formation(ledger("H2SO4(aq, 96 wt%) -> H2SO4(aq)"));
  EXPECT_LT(strong, -86);
  EXPECT_GT(strong, -90);
}

// What the tables do not reach is refused with the reach of the table and what to do.
TEST(Traps, StrengthsBeyondTheTableAreRefusedWithItsReach) {
  const Ledger sheet = ledger("NaOH(aq, 60 wt%) -> NaOH(aq)");
  const Route* route = find_route(sheet, kFormationRoute);
  ASSERT_TRUE(route != nullptr && !route->as_written);
  EXPECT_NE(route->why_not.find("begins at 2.1 mol of water (51.4 wt%)"), std::string::npos)
      << route->why_not;
}

TEST(Traps, AssociatedVapoursAreNamed) {
  EXPECT_TRUE(says(ledger("HF(g) -> HF(l)").cautions, "associates"));
  EXPECT_TRUE(says(ledger("acetic acid(g) -> acetic acid(l)").cautions, "associates"));
}

// CRC: pure acids −148.3. Ullmann (from memory): −117 in mixed acid, the heat of mixing of the nitric acid
// being given off already. In much water that heat is 33 kJ/mol (CRC Handbook), in mixed acid 31.
TEST(Traps, NitrationInPureAndInMixedAcid) {
  constexpr const char* kPure = "benzene(l) + nitric acid(l) -> nitrobenzene(l) + water(l)";
  EXPECT_NEAR(formation(ledger(kPure)), -148.3, 3);
  EXPECT_NEAR(formation(ledger("benzene(l) + nitric acid(aq) -> nitrobenzene(l) + water(l)")), -117.0, 4);
  // A heat measured in mixed acid beside the equation of pure acids: the routes part and the note says where
  // to look.
  LedgerOptions options;
  options.set = test_sheets::bond_set();
  options.measured = MeasuredHeat{};
  options.measured->value = -117000;
  options.measured->u95 = 3000;
  const Result<Ledger> mixed = make_ledger(test_sheets::reaction(kPure), options);
  ASSERT_TRUE(mixed.ok());
  EXPECT_TRUE(says(mixed->notes, "includes (mixing"));
}

// ISO 6976:2016: net over gross of methane is 0.9011.
TEST(Traps, GrossAndNetOfMethane) {
  const double gross = formation(ledger("methane(g) + 2 O2(g) -> CO2(g) + 2 water(l)")),
               net = formation(ledger("methane(g) + 2 O2(g) -> CO2(g) + 2 water(g)"));
  EXPECT_NEAR(net / gross, 0.9011, 0.0002);
}

TEST(Traps, DisputedFormationEnthalpiesShowBoth) {
  EXPECT_TRUE(says(ledger("formaldehyde(g) + H2(g) -> methanol(g)").notes, "\u2212115.9 (JANAF 1998)"));
  EXPECT_TRUE(says(ledger("vinyl chloride(g) + HCl(g) -> 1,2-dichloroethane(g)").notes, "37.2 (CRC"));
  EXPECT_TRUE(says(ledger("methane(g) + ammonia(g) -> HCN(g) + 3 H2(g)").notes, "135.1 ("));
  // Tables that agree are no news.
  EXPECT_FALSE(says(ledger("methane(g) + 2 O2(g) -> CO2(g) + 2 water(l)").notes, "Tables part"));
}

TEST(Traps, MixingConcentratedSolutionsIsALowerBound) {
  EXPECT_TRUE(says(ledger("HCl(aq, r=5) + NaOH(aq, r=5) -> NaCl(aq) + H2O(l)").cautions, "lower bound"));
  EXPECT_FALSE(says(ledger("HCl(aq) + NaOH(aq) -> NaCl(aq) + H2O(l)").cautions, "lower bound"));
}

TEST(Traps, UnbalancedEquationsGetNoFigure) {
  const struct {
    const char *equation, *says;
  } cases[] = {{"CH4(g) + O2(g) -> CO2(g) + H2O(g)", "2 O2"},
               {"C6H6(l) + HNO3(l) -> nitrobenzene(l)", "H₂O"},
               {"CH4 + O2 -> CO + CO2 + H2O", "independent"}};
  for (const auto& one : cases) {
    const Result<Ledger> made = test_sheets::try_ledger(one.equation);
    ASSERT_FALSE(made.ok()) << one.equation;
    EXPECT_EQ(made.error().code, "ledger.not_balanced");
    EXPECT_NE((made.error().message + made.error().hint).find(one.says), std::string::npos)
        << made.error().message << " / " << made.error().hint;
  }
}

}  // namespace
}  // namespace heatledger::balance
