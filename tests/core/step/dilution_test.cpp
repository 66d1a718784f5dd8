// Heat of dissolving and diluting inside a balance.
#include <cmath>

#include "core/facts/solution_heats.hpp"
#include "tests/core/step/steps.hpp"

namespace heatledger::step {
namespace {

using namespace test_steps;
using molecule::Phase;
using molecule::Strength;

constexpr double kAcid = 0.098079, kWater = 0.018015;  ///< [kg/mol]

/// One more part of the last feed: a solution by mass.
void solution(Writer& w, const std::string& name, double fraction, double kilograms) {
  w.part(name, Phase::Aqueous, kilograms, Measure::Mass);
  w.input.feeds.back().parts.back().state.strength = Strength{Strength::Kind::MassFraction, fraction};
}

void end_at(Writer& w, double kelvin) {
  w.input.outlet.temperature = Typed{kelvin, 0};
}

double sulfuric_heat(double fraction) {
  const double ratio = (1 - fraction) / fraction * kAcid / kWater;
  return facts::solution_heat_at(*facts::find_solution_heats("H2SO4", 'l'), ratio)->heat;
}

/// 100 kg of acid of 96 wt% and so much water that it leaves with 30 wt%, all at 25 °C.
Writer dilution() {
  Writer w;
  w.input.kind = StepKind::Charge;
  w.feed("acid", 298.15);
  solution(w, "sulfuric acid", 0.96, 100);
  w.feed("water", 298.15);
  w.part("water", Phase::Liquid, 220, Measure::Mass);
  end_at(w, 298.15);
  return w;
}

TEST(Dilution, GivesOffWhatTheTableSays) {
  const StepResult r = solved(dilution());
  // 96 kg of acid in 320 kg: 30 wt%. Both strengths come from one table, so only the difference counts.
  const double expected = 96 / 0.098072 * (sulfuric_heat(0.96) - sulfuric_heat(0.30));
  EXPECT_NEAR(answer(r, FigureId::Sought), -expected, 1e-3 * expected);  // molar mass by the fourth digit
  EXPECT_NEAR(answer(r, FigureId::HeatOfDilution), expected, 1e-3 * expected);
  ASSERT_EQ(r.dilutions.size(), 1u);
  EXPECT_NEAR(r.dilutions[0].before, 0.96, 1e-9);
  EXPECT_NEAR(r.dilutions[0].after, 0.30, 1e-4);
  EXPECT_NE(r.dilutions[0].words.find("96 to 30 wt%"), std::string::npos) << r.dilutions[0].words;
  EXPECT_TRUE(r.closure.heat_closes);
  EXPECT_TRUE(r.closure.elements_close);
  ASSERT_TRUE(r.closure.duty_by_formation.has_value());
  EXPECT_NEAR(*r.closure.duty_by_formation, r.duty, 1e-9 * std::fabs(r.duty));
  double mass = 0;
  for (const StreamLine& line : r.out) mass += line.mass;
  EXPECT_NEAR(mass, 320, 1e-9);
  // The ± is some of the table's 0.5 kJ/mol and of the bridge to the pure acid, not none and not more.
  for (const Answer& one : r.answers) {
    if (one.id != FigureId::HeatOfDilution) continue;
    EXPECT_GT(one.value.u95(), 96 / kAcid * 300);
    EXPECT_LT(one.value.u95(), 96 / kAcid * 1000);
  }
}

TEST(Dilution, OfNothingGivesNothing) {
  Writer w;
  w.input.kind = StepKind::Charge;
  w.feed("acid", 298.15);
  solution(w, "sulfuric acid", 0.5, 100);
  end_at(w, 298.15);
  const StepResult r = solved(w);
  EXPECT_NEAR(r.duty, 0, 1);  // J, of 15 MJ that were set free in making it
  for (const Answer& one : r.answers) EXPECT_LT(one.value.u95(), 1e3) << one.label;
}

TEST(Dilution, InTwoStepsIsTheWhole) {
  const StepResult whole = solved(dilution());
  Writer first = dilution();
  first.input.feeds[1].parts[0].figure = Typed{90, 0};
  const StepResult half = solved(first);
  Writer second;
  second.input.kind = StepKind::Charge;
  second.feed("acid", 298.15);
  for (const StreamLine& line : half.out) {
    second.part(line.state.phase == Phase::Aqueous ? "sulfuric acid" : "water", line.state.phase,
                line.amount);
    second.input.feeds.back().parts.back().state = line.state;
    second.input.feeds.back().parts.back().without_water = true;
  }
  second.feed("water", 298.15);
  second.part("water", Phase::Liquid, 130, Measure::Mass);
  end_at(second, 298.15);
  EXPECT_NEAR(half.duty + solved(second).duty, whole.duty, 1e-9 * std::fabs(whole.duty));
}

TEST(Dilution, DoesNotMindTheOrderOfFeeds) {
  Writer w = dilution();
  const double one = solved(w).duty;
  std::swap(w.input.feeds[0], w.input.feeds[1]);
  EXPECT_NEAR(solved(w).duty, one, 1e-9 * std::fabs(one));
}

TEST(Dilution, WarmsAdiabatically) {
  Writer w = dilution();
  w.input.outlet.temperature.reset();
  w.input.duty = Typed{0, 0};
  w.input.sought = "outlet.temperature";
  const StepResult r = solved(w);
  // 320 kg of 30 % acid, 3.21 kJ/(kg K) by the table of specific heats.
  const double expected = 298.15 + 96 / kAcid * (sulfuric_heat(0.96) - sulfuric_heat(0.30)) / (320 * 3210);
  EXPECT_NEAR(answer(r, FigureId::Sought), expected, 0.5);  // cp between two points of the table, water's own
  EXPECT_TRUE(r.closure.heat_closes);
}

TEST(Dilution, HoldsTheWaterOfReaction) {
  // Esters, nitrations: 10 kmol of water formed in 96 % acid take it to a strength of its own.
  Writer w;
  w.input.kind = StepKind::Charge;
  w.feed("acid", 298.15);
  solution(w, "sulfuric acid", 0.96, 1000);
  w.feed("organic", 298.15);
  w.part("benzene", Phase::Liquid, 5000).part("nitric acid", Phase::Liquid, 5000);
  w.reaction("benzene(l) + nitric acid(l) -> nitrobenzene(l) + water(l)", ProgressKind::Conversion, 1,
             "benzene");
  end_at(w, 298.15);
  const StepResult r = solved(w);
  ASSERT_EQ(r.dilutions.size(), 1u);
  const double after = 960 / (1000 + 5000 * kWater);
  EXPECT_NEAR(r.dilutions[0].after, after, 1e-3);
  EXPECT_NEAR(r.dilutions[0].set_free, 960 / kAcid * (sulfuric_heat(0.96) - sulfuric_heat(after)),
              2e-3 * r.dilutions[0].set_free);
  EXPECT_TRUE(r.closure.heat_closes);
  ASSERT_TRUE(r.closure.duty_by_formation.has_value());
  EXPECT_NEAR(*r.closure.duty_by_formation, r.duty, 1e-6 * std::fabs(r.duty));

  // In the measured figure: none of it is added; unknown: the larger heat.
  const double reaction = answer(r, FigureId::HeatSetFree);
  w.typed_heat(-117e3);
  w.input.reactions[0].heat.includes_mixing = Includes::Yes;
  const StepResult measured = solved(w);
  EXPECT_NEAR(measured.duty, -117e3 * 5000, 1);
  EXPECT_NE(measured.dilutions[0].words.find("in the measured figure"), std::string::npos);
  EXPECT_TRUE(measured.closure.heat_closes);
  w.input.reactions[0].heat.includes_mixing = Includes::Unknown;
  const StepResult unknown = solved(w);
  EXPECT_NEAR(unknown.duty, -117e3 * 5000 - r.dilutions[0].set_free, 1);
  w.input.reactions[0].heat.includes_mixing = Includes::No;
  EXPECT_NEAR(solved(w).duty, unknown.duty, 1);
  EXPECT_GT(reaction, 117e3 * 5000);  // pure acids give more than mixed acid
}

TEST(Dilution, TurnsBackWhenWaterEvaporates) {
  Writer w;
  w.feed("acid", 298.15);
  solution(w, "sulfuric acid", 0.6, 1);
  Leaving leaving;
  leaving.substance = w.substance("water");
  leaving.vapour_share = Typed{0.5, 0};
  w.input.outlet.leaving.push_back(leaving);
  end_at(w, 298.15);
  const StepResult r = solved(w);
  ASSERT_EQ(r.dilutions.size(), 1u);
  EXPECT_NEAR(r.dilutions[0].after, 0.75, 1e-6);
  EXPECT_LT(r.dilutions[0].set_free, 0);
  EXPECT_NE(r.dilutions[0].words.find("concentration"), std::string::npos);
  // 0.2 kg/s of water evaporate at 25 °C, 44.0 kJ/mol, and the acid gives its water up.
  EXPECT_NEAR(r.duty, 0.2 / kWater * 44.0e3 - r.dilutions[0].set_free, 2e3);
}

TEST(Dilution, OfTwoAcidsTakesTheLargerOfTwoLimits) {
  Writer w;
  w.input.kind = StepKind::Charge;
  w.feed("mixed acid", 298.15);
  w.part("sulfuric acid", Phase::Liquid, 1000).part("nitric acid", Phase::Liquid, 1000);
  w.feed("water", 298.15);
  w.part("water", Phase::Liquid, 2000);
  end_at(w, 298.15);
  const StepResult r = solved(w);
  const auto heat = [](const char* formula, double ratio) {
    return facts::solution_heat_at(*facts::find_solution_heats(formula, 'l'), ratio)->heat;
  };
  const double to_one = 1000 * heat("H2SO4", 2), by_mole = 1000 * (heat("H2SO4", 1) + heat("HNO3", 1));
  EXPECT_NEAR(r.duty, std::min(to_one, by_mole), 1);
  EXPECT_TRUE(r.closure.heat_closes);
  // A typed heat of the mixture replaces both.
  w.input.mixing_heat = Typed{-30e6, 1e6};
  const StepResult typed = solved(w);
  EXPECT_NEAR(typed.duty, -30e6, 1);
  EXPECT_TRUE(typed.closure.heat_closes);
}

TEST(Dilution, SaysItsRangeOutsideTheTable) {
  Writer w;
  w.input.kind = StepKind::Charge;
  w.feed("caustic", 298.15);
  solution(w, "sodium hydroxide", 0.5, 100);
  Leaving leaving;
  leaving.substance = w.substance("water");
  leaving.vapour_share = Typed{0.6, 0};
  w.input.outlet.leaving.push_back(leaving);
  end_at(w, 298.15);
  const Result<StepResult> r = w.solve();
  ASSERT_FALSE(r.ok());
  EXPECT_EQ(r.error().code, "step.solution_range");
  EXPECT_NE(r.error().message.find("51"), std::string::npos) << r.error().message;
}

TEST(Dilution, RefusesMoleSharesOfASolution) {
  Writer w = dilution();
  Feed& feed = w.input.feeds[0];
  feed.shares = ShareKind::MoleShare;
  feed.total = Typed{100, 0};
  feed.parts[0].figure = Typed{1, 0};
  const Result<StepResult> r = w.solve();
  ASSERT_FALSE(r.ok());
  EXPECT_EQ(r.error().code, "step.solution_share");
}

}  // namespace
}  // namespace heatledger::step
