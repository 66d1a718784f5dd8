// Rows by bonds in context, the measured route, and figures printed so that they add up.
#include <gtest/gtest.h>

#include <cmath>

#include "core/balance/measured.hpp"

namespace heatledger::balance {
namespace {

std::shared_ptr<const Reaction> reaction_of(const char* text) {
  CachedSpecies source;
  Result<Reaction> read = read_reaction(text, source);
  EXPECT_TRUE(read.ok()) << text;
  return std::make_shared<const Reaction>(std::move(read).value());
}

LedgerOptions options_in_context() {
  LedgerOptions options;
  options.set = std::make_shared<const estimate::BondSet>(
      estimate::BondSet::published(estimate::BondSet::names().front()).value());
  options.context = ContextUse::Always;
  options.context_rows = true;
  return options;
}

TEST(ContextLedger, LinesRowsAndSumsAreOneFigure) {
  for (const char* equation :
       {"nitrobenzene(l) + 3 H2(g) -> aniline(l) + 2 H2O(l)", "cyclohexene + H2 -> cyclohexane",
        "2 acetone -> \"CC(=O)CC(C)(C)O\"", "CH4 + 2 O2 -> CO2 + 2 H2O",
        "\"OCC(=O)OC1CC1\" + H2O -> \"OCC(=O)O\" + \"OC1CC1\""}) {
    const Result<Ledger> ledger = make_ledger(reaction_of(equation), options_in_context());
    ASSERT_TRUE(ledger.ok()) << equation << ": " << ledger.error().message;
    double broken = 0, formed = 0;
    for (const LedgerRow& row : ledger->rows) {
      ASSERT_TRUE(row.per_mole.has_value()) << equation;
      const double coefficient = ledger->reaction->species[row.species].coefficient();
      (ledger->reaction->species[row.species].product ? formed : broken) +=
          coefficient * row.per_mole->value();
      if (row.context == nullptr) continue;
      double lines = 0;
      for (const estimate::ContextLine& line : row.context->lines) lines += line.total;
      EXPECT_NEAR(lines, row.per_mole->value(), 1e-3) << equation;  // [J]: far below any printed digit
    }
    EXPECT_NEAR(broken, ledger->broken->value(), 1e-3);
    EXPECT_NEAR(formed, ledger->formed->value(), 1e-3);
    // Atoms stand on both sides, so that the difference is the route by bonds in context.
    EXPECT_NEAR(broken - formed, ledger->gas_298->value(), 1e-2) << equation;
    EXPECT_EQ(ledger->gas_298->value(), find_route(*ledger, kContextRoute)->gas_298->value());
    EXPECT_EQ(ledger->as_written->u95(), find_route(*ledger, kContextRoute)->as_written->u95());
  }
}

TEST(ContextLedger, WhatBothSidesShareCancelsInTheHalfWidth) {
  const Result<Ledger> ledger =
      make_ledger(reaction_of("\"CCCCCC(=O)OC\" -> \"CCCCCC(=O)OC\""), options_in_context());
  ASSERT_TRUE(ledger.ok());
  EXPECT_EQ(ledger->gas_298->u95(), 0);
  EXPECT_GT(ledger->rows[0].per_mole->u95(), 0);
}

TEST(MeasuredRoute, IsBroughtToTheCoefficientsAndTo25Degrees) {
  LedgerOptions options = options_in_context();
  MeasuredHeat heat;
  heat.value = -100000;
  heat.u95 = 2000;
  heat.per = "H2";
  options.measured = heat;
  const auto reaction = reaction_of("cyclohexene(g) + H2(g) -> cyclohexane(g)");
  const Result<Ledger> cold = make_ledger(reaction, options);
  ASSERT_TRUE(cold.ok());
  EXPECT_EQ(cold->taken, kMeasuredRoute);
  EXPECT_EQ(find_route(*cold, kMeasuredRoute)->as_written->value(), -100000);
  EXPECT_NEAR(find_route(*cold, kMeasuredRoute)->as_written->u95(), 2000, 1e-9);
  // Run at the temperature of the measurement: the corrections there and back are the same and cancel.
  options.measured->at = 400;
  options.reactants_at = options.products_at = 400;
  const Result<Ledger> hot = make_ledger(reaction, options);
  ASSERT_TRUE(hot.ok());
  EXPECT_NE(find_route(*hot, kMeasuredRoute)->as_written->value(), -100000);
  EXPECT_NEAR(hot->as_run->value(), -100000, 1e-6);
  EXPECT_NEAR(hot->as_run->u95(), 2000, 1e-6);
}

TEST(MeasuredRoute, IsAnObservationOfItsSpecies) {
  LedgerOptions options = options_in_context();
  const auto reaction = reaction_of("\"CC(C)COC(=O)CCCl\"(g) + H2O(g) -> \"CC(C)CO\"(g) + \"OC(=O)CCCl\"(g)");
  MeasuredHeat heat;
  heat.value = 9000;
  heat.u95 = 500;
  options.measured = heat;
  const Result<Ledger> before = make_ledger(reaction, options);
  ASSERT_TRUE(before.ok());
  Result<estimate::Measurement> said = observation_of(*before);
  ASSERT_TRUE(said.ok()) << said.error().message;
  auto observations = std::make_shared<estimate::Observations>();
  ASSERT_TRUE(observations->add(std::move(said).value()).ok());
  options.observations = observations;
  const Result<Ledger> after = make_ledger(reaction, options);
  ASSERT_TRUE(after.ok());
  const Route *vague = find_route(*before, kContextRoute), *sharp = find_route(*after, kContextRoute);
  EXPECT_LT(sharp->gas_298->u95(), vague->gas_298->u95());
  EXPECT_LT(std::fabs(sharp->gas_298->value() - 9000), std::fabs(vague->gas_298->value() - 9000));
}

TEST(MeasuredRoute, RefusesASpeciesThatDoesNotReact) {
  LedgerOptions options = options_in_context();
  options.measured = MeasuredHeat();
  options.measured->per = "benzene";
  const Result<Ledger> ledger = make_ledger(reaction_of("CH4 + 2 O2 -> CO2 + 2 H2O"), options);
  ASSERT_FALSE(ledger.ok());
  EXPECT_EQ(ledger.error().code, "ledger.measured_per");
}

TEST(Disagreement, NamesTheSpeciesAndItsBonds) {
  LedgerOptions options = options_in_context();
  options.context_rows = false;
  const Result<Ledger> ledger =
      make_ledger(reaction_of("acetic acid(l) + ethanol(l) -> ethyl acetate(l) + H2O(l)"), options);
  ASSERT_TRUE(ledger.ok());
  bool located = false;
  for (const std::string& note : ledger->notes) {
    located = located || (note.find("beyond their ±") != std::string::npos &&
                          note.find("ethyl acetate") != std::string::npos &&
                          note.find("There it is") != std::string::npos);
  }
  EXPECT_TRUE(located);
}

}  // namespace
}  // namespace heatledger::balance
