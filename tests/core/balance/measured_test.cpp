// A measured heat and the mixing and evaporation that it may or may not hold.
#include "core/balance/measured.hpp"

#include <gtest/gtest.h>

#include "core/thermo/species_enthalpy.hpp"
#include "tests/core/balance/sheets.hpp"

namespace heatledger::balance {
namespace {

using test_sheets::kj;

/// Salt from strong acid: the acid comes out of its water.
constexpr const char* kFromStrongAcid = "2 NaOH(s) + H2SO4(aq, r=1) -> Na2SO4(s) + 2 H2O(l)";
/// Dehydration: what is measured with a condenser above keeps the water, else the water leaves as vapour.
constexpr const char* kDehydration = "ethanol(l) -> ethylene(g) + H2O(g)";

Ledger measured(const char* equation, double kilojoule, Includes includes, std::optional<double> at = {}) {
  LedgerOptions options;
  options.set = test_sheets::bond_set();
  MeasuredHeat heat;
  heat.value = 1000 * kilojoule;
  heat.u95 = 2000;
  heat.includes = includes;
  heat.at = at;
  heat.key = 1;
  options.measured = heat;
  Result<Ledger> made = make_ledger(test_sheets::reaction(equation), options);
  EXPECT_TRUE(made.ok()) << equation;
  return made.ok() ? std::move(made).value() : Ledger{};
}

double written(const Ledger& ledger, std::string_view route) {
  const Route* found = find_route(ledger, route);
  EXPECT_NE(found, nullptr) << route;
  return found != nullptr ? kj(found->as_written) : 0;
}

TEST(MeasuredHeat, NotHoldingMixingGetsTheLinesAdded) {
  const Ledger ledger = measured(kFromStrongAcid, -300, Includes::No);
  ASSERT_EQ(ledger.measured_lines.size(), 1U);
  EXPECT_EQ(ledger.measured_lines[0].what, "H₂SO₄, solution to liquid");
  // One mole of water per mole of acid: 28.07 kJ given off on dissolving (NBS tables), taken up on the way
  // out.
  EXPECT_NEAR(kj(ledger.measured_lines[0].value), 28.07, 0.005);
  EXPECT_NEAR(written(ledger, kMeasuredRoute), -300 + 28.07, 0.005);
  EXPECT_EQ(find_route(ledger, kOtherMeasuredRoute), nullptr);
  EXPECT_EQ(ledger.taken, kMeasuredRoute);
}

TEST(MeasuredHeat, HoldingMixingStandsAsTyped) {
  const Ledger ledger = measured(kFromStrongAcid, -300, Includes::Yes);
  EXPECT_DOUBLE_EQ(written(ledger, kMeasuredRoute), -300);
  EXPECT_EQ(ledger.measured_lines.size(), 1U);
  EXPECT_EQ(find_route(ledger, kOtherMeasuredRoute), nullptr);
  EXPECT_NE(find_route(ledger, kMeasuredRoute)->remark.find("in it"), std::string::npos);
}

TEST(MeasuredHeat, OfUnknownContentIsShownBothWaysAndTheLargerHeatIsUsed) {
  const Ledger released = measured(kFromStrongAcid, -300, Includes::Unknown);
  EXPECT_DOUBLE_EQ(written(released, kMeasuredRoute), -300);
  EXPECT_NEAR(written(released, kOtherMeasuredRoute), -271.93, 0.005);
  EXPECT_EQ(released.taken, kMeasuredRoute);
  bool said = false;
  for (const std::string& caution : released.cautions)
    said = said || caution.find("The larger heat is used") != std::string::npos;
  EXPECT_TRUE(said);

  // Heat taken up: with the water evaporated it is the larger one, 44.0 kJ/mol more (ATcT, 298.15 K).
  const Ledger absorbed = measured(kDehydration, 2, Includes::Unknown);
  EXPECT_NEAR(written(absorbed, kMeasuredRoute), 46.0, 0.05);
  EXPECT_DOUBLE_EQ(written(absorbed, kOtherMeasuredRoute), 2);
  // Of two signs the heat released is the one to be prepared for.
  const Ledger signs = measured(kDehydration, -2, Includes::Unknown);
  EXPECT_DOUBLE_EQ(written(signs, kMeasuredRoute), -2);
  EXPECT_NEAR(written(signs, kOtherMeasuredRoute), 42.0, 0.05);
}

TEST(MeasuredHeat, OfUnknownContentCanBePinnedToItsOtherReadingAndSharpensNothing) {
  LedgerOptions options;
  options.set = test_sheets::bond_set();
  options.measured = MeasuredHeat{};
  options.measured->value = -300000;
  options.measured->u95 = 2000;
  options.pinned_route = std::string(kOtherMeasuredRoute);
  const Result<Ledger> made = make_ledger(test_sheets::reaction(kFromStrongAcid), options);
  ASSERT_TRUE(made.ok());
  EXPECT_EQ(made->taken, kOtherMeasuredRoute);
  const Result<estimate::Measurement> said = observation_of(measured(kDehydration, 2, Includes::Unknown));
  ASSERT_FALSE(said.ok());
  EXPECT_EQ(said.error().code, "estimate.measurement");
}

TEST(MeasuredHeat, HasNoLinesWhereNothingIsMixedOrEvaporated) {
  for (const char* equation :
       {"nitrobenzene(l) + 3 H2(g) -> aniline(l) + 2 H2O(l)",
        "cyclohexene(g) + H2(g) -> cyclohexane(g)",                // all gas: nothing evaporates on the way
        "HCl(aq) + NaOH(aq) -> NaCl(aq) + H2O(l)",                 // dilute on both sides
        "CaCO3(s) + 2 HCl(aq) -> CaCl2(aq) + H2O(l) + CO2(g)"}) {  // a gas at 25 °C is no vapour
    const Ledger ledger = measured(equation, -50, Includes::Unknown);
    EXPECT_TRUE(ledger.measured_lines.empty()) << equation;
    EXPECT_EQ(find_route(ledger, kOtherMeasuredRoute), nullptr) << equation;
    EXPECT_DOUBLE_EQ(written(ledger, kMeasuredRoute), -50) << equation;
  }
  // Measured above the boiling point of water, its vapour is what was there.
  EXPECT_TRUE(measured(kDehydration, 2, Includes::Unknown, 450).measured_lines.empty());
}

}  // namespace
}  // namespace heatledger::balance
