// Steps whose answer can be written down: mixing, one reaction at constant heat capacities, reflux, surfaces,
// ±.
#include <cmath>

#include "core/step/sought.hpp"
#include "core/thermo/heat_capacity_curve.hpp"
#include "core/thermo/heating_path.hpp"
#include "tests/core/step/steps.hpp"

namespace heatledger::step {
namespace {

using namespace test_steps;
using molecule::Phase;

TEST(ClosedForms, EqualHeatCapacitiesMixToTheMean) {
  Writer w;
  w.source.add("liquor", 0.05);
  w.feed("hot", 370);
  w.part("liquor", Phase::Liquid, 3);
  w.feed("cold", 290);
  w.part("liquor", Phase::Liquid, 1);
  w.input.substances[0].heat_capacity = Typed{120, 0};
  w.input.duty = Typed{0, 0};
  w.input.sought = "outlet.temperature";
  EXPECT_NEAR(answer(solved(w), FigureId::Sought), (3 * 370 + 290) / 4.0, 1e-9);
}

/// n (−ΔH) X / (n cp) at one heat capacity for both species.
Writer one_reaction(double heat, double cp, double conversion) {
  Writer w;
  w.source.add("A", 0.08);
  w.source.add("B", 0.08);
  w.feed("feed", 320);
  w.part("A", Phase::Liquid, 7);
  w.reaction("A(l) -> B(l)", ProgressKind::Conversion, conversion, "A");
  w.typed_heat(heat, 2e3);
  w.input.substances[0].heat_capacity = Typed{cp, 0};
  w.input.substances[1].heat_capacity = Typed{cp, 0};
  return w;
}

TEST(ClosedForms, OneReactionAtConstantHeatCapacity) {
  Writer w = one_reaction(-30e3, 150, 0.4);
  w.input.duty = Typed{0, 0};
  w.input.sought = "outlet.temperature";
  const StepResult r = solved(w);
  EXPECT_NEAR(r.answers[0].value.value(), 320 + 0.4 * 30e3 / 150, 1e-9);
  // ± of the heat alone: 0.4 × 2 kJ/mol / cp; the only input with a ± carries all of it.
  EXPECT_NEAR(r.answers[0].value.u95(), 0.4 * 2e3 / 150, 1e-6);
  ASSERT_FALSE(r.answers[0].shares.empty());
  EXPECT_NEAR(r.answers[0].shares[0].share, 1, 1e-9);
  EXPECT_EQ(r.model->slots()[r.answers[0].shares[0].slot].label, "heat of reaction 1");
}

TEST(ClosedForms, TypedHeatAtAnotherTemperatureIsCarriedBack) {
  Writer w = one_reaction(-30e3, 150, 1);
  w.input.substances[1].heat_capacity = Typed{170, 0};
  w.typed_heat(-30e3, 0, 358.15);
  w.input.outlet.temperature = Typed{358.15, 0};
  const StepResult r = solved(w);
  EXPECT_NEAR(r.reactions[0].heat_at_end, -30e3, 1e-9);
  EXPECT_NEAR(r.reactions[0].heat_25.value(), -30e3 - 20 * 60, 1e-9);
  EXPECT_NEAR(r.duty, 7 * (-30e3 + 150 * (358.15 - 320)), 1e-6);
}

TEST(ClosedForms, ChargeWithTypedFiguresGivesTheTextbookRise) {
  Writer w = one_reaction(-30e3, 150, 1);
  w.input.kind = StepKind::Charge;
  w.input.vessel.heat_capacity = Typed{350, 0};
  w.input.outlet.temperature = Typed{320, 0};
  w.input.time = Typed{1000, 0};
  w.input.charge.rate_constant = Typed{2e-3, 0};
  const StepResult r = solved(w);
  EXPECT_NEAR(answer(r, FigureId::HeatSetFree), 210e3, 1e-6);
  EXPECT_NEAR(answer(r, FigureId::AdiabaticRise), 200, 1e-9);
  EXPECT_NEAR(answer(r, FigureId::EndByEnthalpy), 520, 1e-7);
  EXPECT_NEAR(answer(r, FigureId::ThermalInertia), 1 + 350 / 1050.0, 1e-12);
  EXPECT_NEAR(answer(r, FigureId::EndWithVessel), 320 + 210e3 / 1400, 1e-7);
  EXPECT_NEAR(answer(r, FigureId::MeanDuty), 210, 1e-9);
  EXPECT_NEAR(answer(r, FigureId::PeakDuty), 420, 1e-9);
}

TEST(ClosedForms, RefluxBoilsOffWhatTheRiseAboveTheBoilingPointSupplies) {
  // A trace of reactant in toluene, heat typed: above the boiling point the heat goes into vapour.
  Writer w;
  w.source.add("A", 0.1);
  w.source.add("B", 0.1);
  w.input.kind = StepKind::Charge;
  w.feed("charge", 350);
  w.part("toluene", Phase::Liquid, 1000).part("A", Phase::Liquid, 1e-6);
  w.reaction("A(l) -> B(l)", ProgressKind::Conversion, 1, "A");
  w.typed_heat(-2e7 / 1e-6);
  for (const char* name : {"A", "B"}) w.input.substances[w.substance(name)].heat_capacity = Typed{200, 0};
  w.input.outlet.temperature = Typed{350, 0};
  w.input.charge.solvent = w.substance("toluene");
  const StepResult r = solved(w);
  const double boiling = answer(r, FigureId::BoilingPoint);
  EXPECT_NEAR(boiling, 383.78, 0.3);  // CRC Handbook, 95th edition: 110.63 °C
  const facts::Species& toluene = *w.input.substances[0].species;
  const Result<thermo::HeatCapacityCurve> liquid = thermo::heat_capacity_curve(toluene, Phase::Liquid);
  ASSERT_TRUE(liquid.ok());
  const Result<thermo::Sourced> change = thermo::vaporisation_enthalpy(toluene, boiling);
  ASSERT_TRUE(change.ok());
  const double warming = 1000 * (liquid->increment(boiling) - liquid->increment(350));
  EXPECT_NEAR(answer(r, FigureId::BoiledOff), (2e7 - warming) / change->value.value() * toluene.molar_mass,
              1e-3);
}

TEST(ClosedForms, SurfaceAgainstOneMediumTemperatureAndByLogMean) {
  Writer w = one_reaction(-90e3 / 7, 150, 1);
  w.input.outlet.temperature = Typed{320, 0};
  w.input.surface.medium_in = Typed{282.5, 0};
  // 90 kW over 37.5 K
  EXPECT_NEAR(answer(solved(w), FigureId::Conductance), 2400, 1e-6);
  w.input.surface.medium_out = Typed{300, 0};
  EXPECT_NEAR(answer(solved(w), FigureId::Conductance), 90e3 / ((37.5 - 20) / std::log(37.5 / 20)), 1e-6);
  w.input.surface.medium_out = Typed{330, 0};  // warmer than the process: cannot be
  const StepResult r = solved(w);
  EXPECT_EQ(r.answers.size(), 3u);
  ASSERT_FALSE(r.notes.empty());
}

TEST(ClosedForms, ExcessFeedBringsWhatTheKeyNeedsAndMore) {
  Writer w;
  w.feed("gas", 300);
  w.part("methane", Phase::Gas, 1);
  w.feed("air", 300);
  w.part("oxygen", Phase::Gas, 0.21).part("nitrogen", Phase::Gas, 0.79);
  const std::size_t burning =
      w.reaction("CH4(g) + 2 O2(g) -> CO2(g) + 2 H2O(g)", ProgressKind::Conversion, 1, "methane");
  w.input.feeds[1].shares = ShareKind::MoleShare;
  w.input.feeds[1].total = Typed{0.2, 0};
  w.input.feeds[1].excess = ExcessOver{burning, w.substance("oxygen"), w.substance("methane")};
  w.input.outlet.temperature = Typed{400, 0};
  const StepResult r = solved(w);
  EXPECT_NEAR(r.in[1].amount, 2.4, 1e-12);
  EXPECT_NEAR(r.in[2].amount, 2.4 * 0.79 / 0.21, 1e-12);
  // The excess that a flue temperature needs without any duty.
  w.input.outlet.temperature = Typed{1500, 0};
  w.input.duty = Typed{0, 0};
  w.input.sought = "feed.1.total";
  const StepResult hot = solved(w);
  Writer back = w;
  back.input.feeds[1].total = Typed{answer(hot, FigureId::Sought), 0};
  back.input.sought = "outlet.temperature";
  EXPECT_NEAR(answer(solved(back), FigureId::Sought), 1500, 1e-5);
}

TEST(ClosedForms, SeriesReactionsTakeWhatArrives) {
  Writer w;
  w.source.add("A", 0.1);
  w.source.add("B", 0.1);
  w.source.add("C", 0.1);
  w.feed("feed", 298.15);
  w.part("A", Phase::Liquid, 10);
  w.reaction("A(l) -> B(l)", ProgressKind::Conversion, 0.8, "A");
  w.reaction("B(l) -> C(l)", ProgressKind::ConversionOfArriving, 0.25, "B");
  w.typed_heat(-50e3);
  w.input.outlet.temperature = Typed{298.15, 0};
  const StepResult r = solved(w);
  EXPECT_NEAR(r.reactions[1].extent, 2, 1e-12);
  EXPECT_NEAR(r.duty, -2 * 50e3,
              1e-6);  // the first heat is none, all at 25 °C, where no heat capacity is asked
}

TEST(SoughtBlank, SaysWhyThereIsNoneOrMoreThanOne) {
  Writer w = one_reaction(-30e3, 150, 0.4);
  w.input.outlet.temperature = Typed{330, 0};
  w.input.duty = Typed{-1e6, 0};
  w.input.sought = "reaction.0.progress";
  Result<StepResult> none = w.solve();
  ASSERT_FALSE(none.ok());
  EXPECT_EQ(none.error().code, "step.no_solution");
  EXPECT_NE(none.error().message.find("from 0.000 % to 100.0 %"), std::string::npos) << none.error().message;
  w.input.sought = "outlet.pressure";
  Result<StepResult> idle = w.solve();
  ASSERT_FALSE(idle.ok());
  EXPECT_EQ(idle.error().code, "step.no_influence");
}

TEST(SoughtBlank, RefusesWhatCannotBe) {
  Writer w = one_reaction(-30e3, 150, 0.4);
  Result<StepResult> blank = w.solve();
  ASSERT_FALSE(blank.ok());
  EXPECT_EQ(blank.error().code, "step.blank");
  EXPECT_EQ(blank.error().where, "outlet.temperature");
  w.input.outlet.temperature = Typed{330, 0};
  w.input.reactions[0].progress.figure = Typed{1.2, 0};
  EXPECT_EQ(w.solve().error().code, "step.out_of_range");
  w.input.reactions[0].progress.figure = Typed{8, 0};
  w.input.reactions[0].progress.kind = ProgressKind::Extent;
  const Result<StepResult> exhausted = w.solve();
  ASSERT_FALSE(exhausted.ok());
  EXPECT_EQ(exhausted.error().code, "step.exhausted");
  EXPECT_EQ(exhausted.error().message,
            "The reactions take more A than there is: 8.000 mol/s of 7.000 mol/s.");
  w.input.reactions[0].progress.kind = ProgressKind::Selectivity;
  w.input.reactions[0].progress.figure = Typed{0.5, 0};
  w.input.reactions[0].progress.product = 1;
  EXPECT_EQ(w.solve().error().code, "step.progress");
  w.input.reactions[0].progress.of = 1;
  EXPECT_EQ(w.solve().error().code, "step.key_not_consumed");
}

TEST(SoughtBlank, ConductanceFollowsFromDutyOrOutlet) {
  // 90 kW over 37.5 K, as in SurfaceAgainstOneMediumTemperatureAndByLogMean.
  Writer w = one_reaction(-90e3 / 7, 150, 1);
  w.input.surface.medium_in = Typed{282.5, 0};
  w.input.sought = "conductance";
  w.input.outlet.temperature = Typed{320, 0};
  const StepResult by_outlet = solved(w);
  EXPECT_EQ(by_outlet.answers.front().id, FigureId::Conductance);
  EXPECT_NEAR(by_outlet.answers.front().value.value(), 2400, 1e-6);
  w.input.duty = Typed{by_outlet.duty, 0};
  EXPECT_EQ(w.solve().error().code, "step.over_specified");
  w.input.outlet.temperature.reset();
  const StepResult by_duty = solved(w);
  EXPECT_EQ(by_duty.answers.front().id, FigureId::Conductance);
  // The outlet is found to 1e-9 of the heat: 1e-6 K in 37.5 K.
  EXPECT_NEAR(by_duty.answers.front().value.value(), 2400, 1e-3);
  w.input.surface.medium_in.reset();
  EXPECT_EQ(w.solve().error().where, "medium_in");
}

TEST(SoughtBlank, TimeFollowsFromTheCoolingCapacity) {
  Writer w = one_reaction(-30e3, 150, 1);  // 7 mol
  w.input.kind = StepKind::Charge;
  w.input.outlet.temperature = Typed{320, 0};
  w.input.sought = "time";
  EXPECT_EQ(w.solve().error().where, "cooling");
  w.input.charge.cooling = Typed{50, 0};
  const StepResult r = solved(w);
  EXPECT_EQ(r.answers.front().id, FigureId::Time);
  EXPECT_NEAR(r.answers.front().value.value(), 210e3 / 50, 1e-6);
}

TEST(ClosedForms, DepartureFromIdealGasIsALineOfItsOwn) {
  Writer w;
  w.feed("gas", 300);
  w.part("nitrogen", Phase::Gas, 3);
  w.input.substances[0].heat_capacity = Typed{30, 0};
  w.input.outlet.temperature = Typed{400, 0};
  EXPECT_NEAR(solved(w).duty, 9000, 1e-9);
  w.input.departure = Typed{-250, 20};
  const StepResult typed = solved(w);
  EXPECT_NEAR(typed.duty, 8750, 1e-9);
  EXPECT_NEAR(typed.answers.front().value.u95(), 20, 1e-6);
  EXPECT_TRUE(typed.closure.heat_closes);
  w.input.departure.reset();
  w.input.departure_share = Typed{-0.02, 0};  // of 3 × 30 × (400 − 298.15)
  const StepResult share = solved(w);
  EXPECT_NEAR(share.duty, 9000 - 0.02 * 3 * 30 * 101.85, 1e-9);
  EXPECT_TRUE(share.closure.heat_closes);
}

/// A step cut in two with the stream handed on: what is typed above moves the answer below as if it stood
/// there.
TEST(CarriedStream, KeepsTheSourcesOfItsSpread) {
  Writer whole = one_reaction(-30e3, 150, 0.4);
  whole.input.feeds[0].parts[0].figure = Typed{7, 0.5};
  whole.input.reactions[0].progress.figure = Typed{0.4, 0.05};
  whole.input.outlet.temperature = Typed{350, 0};
  const StepResult above = solved(whole);
  const LeavingSpread leaving = leaving_spread(*above.model, above.values);
  ASSERT_EQ(leaving.total.size(), 2u);
  // B leaves as 7 X: 7 × 0.05 and 0.4 × 0.5 together; A as 7 (1 − X).
  EXPECT_NEAR(leaving.total[1].u95(), std::sqrt(0.35 * 0.35 + 0.2 * 0.2), 1e-9);
  EXPECT_NEAR(leaving.total[0].u95(), std::sqrt(0.35 * 0.35 + 0.3 * 0.3), 1e-9);
  uncertainty::Quantity both = leaving.total[0];
  both.add(leaving.total[1]);
  EXPECT_NEAR(both.u95(), 0.5, 1e-9);  // what has reacted is lost on one side and won on the other

  Writer below = whole;
  below.input.title = "below";
  below.input.reactions.clear();
  below.input.feeds[0].temperature = Typed{350, 0};
  below.input.feeds[0].parts.resize(1);
  below.input.feeds[0].parts.push_back(below.input.feeds[0].parts[0]);
  for (std::size_t i = 0; i < 2; ++i) {
    FeedPart& part = below.input.feeds[0].parts[i];
    part.substance = i;
    part.figure = Typed{leaving.total[i].value(), 0};
    part.shared = leaving.total[i];
    part.derived = true;
  }
  below.input.outlet.temperature = Typed{360, 0};
  const StepResult on = solved(below);
  // Both have the same heat capacity of 150: 10 K × 150 × 0.5 mol.
  EXPECT_NEAR(on.answers.front().value.u95(), 750, 1e-6);
  EXPECT_EQ(on.exact_inputs, 2);  // the two temperatures
}

TEST(Draws, AgreeWithFirstOrderWhereTheAnswerIsLinear) {
  Writer w = one_reaction(-30e3, 150, 0.4);
  w.input.duty = Typed{0, 0};
  w.input.sought = "outlet.temperature";
  SolveOptions options;
  options.draws = true;
  const StepResult r = solved(w, options);
  const Answer& end = r.answers[0];
  ASSERT_TRUE(end.drawn);
  // 10,000 draws put the 2.5 and 97.5 % points within about 0.06 standard deviations (three standard errors
  // of a quantile, sqrt(p q / n) / density), that is 3 % of the half width.
  EXPECT_NEAR(end.drawn->high - end.value.value(), end.value.u95(), 0.04 * end.value.u95());
  EXPECT_NEAR(end.value.value() - end.drawn->low, end.value.u95(), 0.04 * end.value.u95());
  EXPECT_EQ(end.drawn->without, 0);
  const StepResult again = solved(w, options);
  EXPECT_EQ(again.answers[0].drawn->low, end.drawn->low);  // same seed, same draws
}

TEST(Draws, KeepConversionsWithinTheirLimits) {
  Writer w = one_reaction(-30e3, 150, 0.98);
  w.input.reactions[0].progress.figure = Typed{0.98, 0.06};
  w.input.duty = Typed{0, 0};
  w.input.sought = "outlet.temperature";
  w.typed_heat(-30e3, 0);
  SolveOptions options;
  options.draws = true;
  const StepResult r = solved(w, options);
  ASSERT_TRUE(r.answers[0].drawn);
  EXPECT_NEAR(r.answers[0].drawn->high, 320 + 200, 1e-6);  // never beyond full conversion
  EXPECT_EQ(r.answers[0].drawn->without, 0);
}

}  // namespace
}  // namespace heatledger::step
