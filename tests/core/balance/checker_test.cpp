#include "core/balance/checker.hpp"

#include <gtest/gtest.h>

#include "tests/core/balance/sheets.hpp"

namespace heatledger::balance {
namespace {

using test_sheets::ledger;
using Entries = std::map<std::string, std::string>;

const char* const kMethane = "methane(g) + 2 O2(g) -> CO2(g) + 2 H2O(g)";  // 2642 broken, 3466 formed, −824
const char* const kNitro = "nitrobenzene(l) + 3 H2(g) -> aniline(l) + 2 H2O(l)";  // 7357, 7903, −546

SlipKind only_slip(const Review& review) {
  EXPECT_FALSE(review.agrees);
  EXPECT_FALSE(review.more_than_one) << review.summary;
  EXPECT_EQ(review.slips.size(), 1u) << review.summary;
  return review.slips.empty() ? SlipKind::OtherPrice : review.slips[0].kind;
}

TEST(Checker, AgreesWithACorrectSheetInAnySpelling) {
  for (const Entries& entries : {Entries{{"broken", "2 642"}, {"formed", "3,466"}, {"gas_298", "\u2212824"}},
                                 Entries{{"gas_298", "-8.24e2"}}, Entries{{"gas_298", "-824000 J"}},
                                 Entries{{"row.0.line.0.count", "4"}, {"row.0.line.0.price", "413"}}}) {
    const Review review = review_sheet(ledger(kMethane), entries);
    EXPECT_TRUE(review.agrees) << review.summary;
    EXPECT_TRUE(review.slips.empty());
  }
}

TEST(Checker, LeavesEmptyEntriesAsideAndNamesUnreadableOnes) {
  const Review review =
      review_sheet(ledger(kMethane), {{"broken", ""}, {"formed", "a lot"}, {"row.9.per_mole", "3"}});
  ASSERT_EQ(review.lines.size(), 2u);
  EXPECT_EQ(review.lines[0].verdict, Verdict::Unreadable);
  EXPECT_EQ(review.lines[1].verdict, Verdict::NotComparable);
  EXPECT_TRUE(review.agrees);
}

TEST(Checker, KnowsCarbonDioxideTakenAsAKetone) {
  // Published slip: −716 in place of −824 (C=O 745 instead of 799).
  const Review review = review_sheet(ledger(kMethane), {{"formed", "3358"}, {"gas_298", "-716"}});
  EXPECT_EQ(only_slip(review), SlipKind::CarbonDioxideAsKetone) << review.summary;
  ASSERT_EQ(review.lines.size(), 2u);
  EXPECT_EQ(review.lines[0].verdict, Verdict::Slip);
  EXPECT_EQ(review.lines[1].verdict, Verdict::Follows);
}

TEST(Checker, KnowsCarbonMonoxideTakenAsADoubleBond) {
  // Published slip: −351 in place of −24.
  const Review review =
      review_sheet(ledger("CO(g) + H2O(g) -> CO2(g) + H2(g)"), {{"broken", "1679"}, {"gas_298", "-351"}});
  EXPECT_EQ(only_slip(review), SlipKind::AverageForSpecific) << review.summary;
}

TEST(Checker, KnowsAForgottenCoefficient) {
  EXPECT_EQ(only_slip(review_sheet(ledger(kMethane), {{"row.1.in_equation", "495"}, {"broken", "2147"}})),
            SlipKind::CoefficientLeftOut);
}

TEST(Checker, KnowsAMissedAndADoubleBond) {
  EXPECT_EQ(only_slip(review_sheet(ledger(kMethane), {{"row.0.per_mole", "1239"}, {"gas_298", "-1237"}})),
            SlipKind::BondMissed);
  EXPECT_EQ(
      only_slip(review_sheet(ledger(kMethane), {{"row.0.line.0.count", "5"}, {"row.0.per_mole", "2065"}})),
      SlipKind::BondTwice);
}

TEST(Checker, KnowsANitroGroupAsTwoDoubleBonds) {
  EXPECT_EQ(only_slip(review_sheet(ledger(kNitro),
                                   {{"row.0.per_mole", "6467"}, {"broken", "7763"}, {"gas_298", "-140"}})),
            SlipKind::NitroAsTwoDouble);
}

TEST(Checker, KnowsTheGasValueForALiquid) {
  const Ledger sheet = ledger(kNitro);
  double figure = sheet.as_written->value() / 1000 - sheet.corrections[2].value->value() / 1000;
  EXPECT_EQ(only_slip(review_sheet(sheet, {{"gas_298", "-546"}, {"as_written", std::to_string(figure)}})),
            SlipKind::PhaseLeftOut);
}

TEST(Checker, KnowsAWrongBasis) {
  const Ledger sheet = ledger(kNitro, "nitrobenzene");
  EXPECT_EQ(only_slip(review_sheet(sheet, {{"gas_298", "-546"}, {"gas_298.on_basis", "-182"}})),
            SlipKind::WrongBasis);
}

TEST(Checker, KnowsSignUnitsAndExchange) {
  EXPECT_EQ(
      only_slip(review_sheet(ledger(kMethane), {{"broken", "2642"}, {"formed", "3466"}, {"gas_298", "824"}})),
      SlipKind::Sign);
  EXPECT_EQ(
      only_slip(review_sheet(ledger(kMethane), {{"broken", "3466"}, {"formed", "2642"}, {"gas_298", "824"}})),
      SlipKind::SidesExchanged);
  EXPECT_EQ(only_slip(review_sheet(ledger(kMethane), {{"broken", "2642"}, {"gas_298", "-824000"}})),
            SlipKind::JouleForKilojoule);
  EXPECT_EQ(only_slip(review_sheet(ledger(kMethane), {{"broken", "2642"}, {"gas_298", "-196.9"}})),
            SlipKind::CalorieForJoule);
}

TEST(Checker, KnowsTransposedDigits) {
  EXPECT_EQ(
      only_slip(review_sheet(ledger(kMethane), {{"row.0.line.0.price", "431"}, {"row.0.per_mole", "1724"}})),
      SlipKind::DigitsTransposed);
  const Review copied =
      review_sheet(ledger(kMethane), {{"broken", "2462"}, {"formed", "3466"}, {"gas_298", "-824"}});
  EXPECT_EQ(only_slip(copied), SlipKind::DigitsTransposed);  // wrong on paper, right in the sum
}

TEST(Checker, CallsAnotherTableADifferentTable) {
  const Ledger ours = ledger(kMethane), theirs = ledger(kMethane, "", "reusch");
  Entries entries;
  for (const char* cell : {"broken", "formed", "gas_298"}) {
    const auto& figure = std::string(cell) == "broken"   ? theirs.broken
                         : std::string(cell) == "formed" ? theirs.formed
                                                         : theirs.gas_298;
    entries[cell] = std::to_string(static_cast<int>(figure->value() / 1000));
  }
  const Review review = review_sheet(ours, entries);
  EXPECT_TRUE(review.different_table) << review.summary;
  EXPECT_EQ(review.table, "reusch");
  EXPECT_TRUE(review.slips.empty());
  for (const CheckedLine& line : review.lines) EXPECT_EQ(line.verdict, Verdict::DifferentTable);
}

TEST(Checker, CallsOnePriceOfAnotherTableMixed) {
  // C–H 412 of Atkins among Zumdahl's prices.
  const Review review =
      review_sheet(ledger(kMethane), {{"row.0.line.0.price", "412"}, {"row.0.per_mole", "1648"}});
  EXPECT_TRUE(review.different_table) << review.summary;
  EXPECT_NE(review.summary.find("mixed"), std::string::npos);
}

TEST(Checker, SaysWhenThereIsMoreThanOneSlip) {
  // CO2 as a ketone (formed 3358) and one C–H missed (broken 2229).
  const Review review =
      review_sheet(ledger(kMethane), {{"broken", "2229"}, {"formed", "3358"}, {"gas_298", "-1129"}});
  EXPECT_TRUE(review.more_than_one);
  ASSERT_EQ(review.slips.size(), 2u) << review.summary;
}

TEST(Checker, DoesNotExplainWhatNoSlipsExplain) {
  const Review review = review_sheet(
      ledger(kMethane), {{"row.0.per_mole", "77"}, {"row.1.per_mole", "88"}, {"row.2.per_mole", "99"}});
  EXPECT_TRUE(review.more_than_one);
  EXPECT_TRUE(review.slips.empty());
}

}  // namespace
}  // namespace heatledger::balance
