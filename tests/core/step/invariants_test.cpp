// What must hold for every step: closure, independence of order and of how a feed is cut, the halves of a
// step.
#include <cmath>
#include <random>

#include "core/step/sought.hpp"
#include "tests/core/step/steps.hpp"

namespace heatledger::step {
namespace {

using namespace test_steps;
using molecule::Phase;

/// Sums of the same terms in another order: rounding only, relative to the heats that move.
constexpr double kSame = 1e-12;

double heat_moved(const StepResult& r) {
  double sum = 0;
  for (const HeatLine& line : r.heats) sum += std::fabs(line.in);
  return sum;
}

/// A gas reactor with two parallel reactions, an inert, a liquid feed that evaporates, and losses.
Writer reactor(double preheat, double conversion, double selectivity, double outlet) {
  Writer w;
  w.feed("hydrocarbon", preheat);
  w.part("ethene", Phase::Gas, 10);
  w.feed("air", preheat + 20);
  w.part("oxygen", Phase::Gas, 30).part("nitrogen", Phase::Gas, 113);
  w.feed("spray", 300);
  w.part("water", Phase::Liquid, 2);
  w.reaction("2 C2H4(g) + O2(g) -> 2 ethylene oxide(g)", ProgressKind::Selectivity, selectivity, "ethene",
             "ethylene oxide");
  w.reaction("C2H4(g) + 3 O2(g) -> 2 CO2(g) + 2 H2O(g)", ProgressKind::TotalConversion, conversion, "ethene");
  w.input.outlet.temperature = Typed{outlet, 0};
  w.input.loss = Typed{15e3, 0};
  w.input.shaft_work = Typed{4e3, 0};
  return w;
}

TEST(StepInvariants, HeatAndElementsCloseAtAnyState) {
  std::mt19937 random(7);
  std::uniform_real_distribution<double> share(0.01, 0.99), warm(300, 900);
  for (int i = 0; i < 200; ++i) {
    const StepResult r = solved(reactor(warm(random), share(random), share(random), warm(random)));
    // Double precision over some twenty lines.
    EXPECT_LE(r.closure.heat, 1e-12);
    EXPECT_TRUE(r.closure.heat_closes);
    ASSERT_EQ(r.closure.elements.size(), 4u);
    for (const ElementLine& line : r.closure.elements)
      EXPECT_NEAR(line.in, line.out, 1e-12 * line.in) << line.symbol;
    // The other route to the same duty: formation enthalpies of all that enters and leaves. Water's gas and
    // liquid stand in different tables to 1e-9 of the sum.
    ASSERT_TRUE(r.closure.duty_by_formation);
    EXPECT_NEAR(*r.closure.duty_by_formation, r.duty, 1e-9 * heat_moved(r));
  }
}

TEST(StepInvariants, SelectivityAndTotalConversionGiveTheAmountsTheyName) {
  const StepResult r = solved(reactor(400, 0.8, 0.7, 520));
  // 10 mol/s × 0.8 consumed, 70 % of it to the oxide.
  EXPECT_NEAR(2 * r.reactions[0].extent, 5.6, 1e-12);
  EXPECT_NEAR(r.reactions[1].extent, 2.4, 1e-12);
}

TEST(StepInvariants, OrderOfSpeciesFeedsAndReactionsDoesNotMatter) {
  const StepResult a = solved(reactor(400, 0.6, 0.8, 550));
  Writer w;
  w.feed("spray", 300);
  w.part("water", Phase::Liquid, 2);
  w.feed("air", 420);
  w.part("nitrogen", Phase::Gas, 113).part("oxygen", Phase::Gas, 30);
  w.feed("hydrocarbon", 400);
  w.part("ethene", Phase::Gas, 10);
  w.reaction("3 O2(g) + C2H4(g) -> 2 H2O(g) + 2 CO2(g)", ProgressKind::TotalConversion, 0.6, "ethene");
  w.reaction("O2(g) + 2 C2H4(g) -> 2 ethylene oxide(g)", ProgressKind::Selectivity, 0.8, "ethene",
             "ethylene oxide");
  w.input.outlet.temperature = Typed{550, 0};
  w.input.loss = Typed{15e3, 0};
  w.input.shaft_work = Typed{4e3, 0};
  const StepResult b = solved(w);
  EXPECT_NEAR(a.duty, b.duty, kSame * heat_moved(a));
  EXPECT_NEAR(a.answers[0].value.u95(), b.answers[0].value.u95(), 1e-6 * a.answers[0].value.u95());
}

TEST(StepInvariants, CuttingAFeedInTwoChangesNothing) {
  const StepResult a = solved(reactor(400, 0.6, 0.8, 550));
  Writer w = reactor(400, 0.6, 0.8, 550);
  Feed second = w.input.feeds[1];
  second.name = "more air";
  for (std::size_t p = 0; p < 2; ++p) {
    const double whole = w.input.feeds[1].parts[p].figure->value;
    w.input.feeds[1].parts[p].figure->value = 0.3 * whole;
    second.parts[p].figure->value = 0.7 * whole;
  }
  w.input.feeds.push_back(second);
  const StepResult b = solved(w);
  EXPECT_NEAR(a.duty, b.duty, kSame * heat_moved(a));
  EXPECT_NEAR(a.answers[0].value.u95(), b.answers[0].value.u95(), 1e-6 * a.answers[0].value.u95());
}

TEST(StepInvariants, TwoHalfStepsNeedWhatTheWholeNeeds) {
  // First half: all reaction at 500 K; second half: only heating of what left the first, no reaction.
  Writer whole = reactor(400, 0.6, 0.8, 700);
  whole.input.loss.reset();
  whole.input.shaft_work.reset();
  Writer first = reactor(400, 0.6, 0.8, 500);
  first.input.loss.reset();
  first.input.shaft_work.reset();
  const StepResult a = solved(whole), b = solved(first);
  Writer second;
  second.feed("from the first half", 500);
  for (const StreamLine& line : b.out)
    second.part(b.model->input().substances[line.substance].name, line.state.phase, line.amount);
  second.input.outlet.temperature = Typed{700, 0};
  const StepResult c = solved(second);
  EXPECT_NEAR(a.duty, b.duty + c.duty, kSame * heat_moved(a));
}

TEST(StepInvariants, HalfTheConversionTwiceIsTheWhole) {
  Writer whole, first;
  for (Writer* w : {&whole, &first}) {
    w->feed("feed", 500);
    w->part("CO", Phase::Gas, 4).part("water", Phase::Gas, 9);
    w->reaction("CO(g) + H2O(g) -> CO2(g) + H2(g)", ProgressKind::Conversion, w == &whole ? 0.75 : 0.5, "CO");
    w->input.outlet.temperature = Typed{620, 0};
  }
  const StepResult a = solved(whole), b = solved(first);
  Writer second;
  second.feed("from the first half", 620);
  for (const StreamLine& line : b.out)
    second.part(b.model->input().substances[line.substance].name, line.state.phase, line.amount);
  second.reaction("CO(g) + H2O(g) -> CO2(g) + H2(g)", ProgressKind::Conversion, 0.5, "CO");
  second.input.outlet.temperature = Typed{620, 0};
  EXPECT_NEAR(a.duty, b.duty + solved(second).duty, kSame * heat_moved(a));
}

TEST(StepInvariants, AmountsMassesAndVolumesOfTheSameFeedAgree) {
  // The same nitrogen by moles, by mass, by volume of gas and by shares.
  std::vector<double> duties;
  for (int way = 0; way < 4; ++way) {
    Writer w;
    w.feed("feed", 350);
    w.input.feeds[0].pressure = Typed{2e5, 0};
    const double moles = 5;
    const double molar_mass = w.input.substances.empty() ? 0.028014 : 0;
    if (way == 0) w.part("nitrogen", Phase::Gas, moles);
    if (way == 1) w.part("nitrogen", Phase::Gas, moles * molar_mass, Measure::Mass);
    if (way == 2) w.part("nitrogen", Phase::Gas, moles * 8.314462618 * 350 / 2e5, Measure::Volume);
    if (way == 3) {
      w.part("nitrogen", Phase::Gas, 1);
      w.input.feeds[0].shares = ShareKind::MassShare;
      w.input.feeds[0].measure = Measure::Mass;
      w.input.feeds[0].total = Typed{moles * molar_mass, 0};
    }
    w.input.outlet.temperature = Typed{500, 0};
    duties.push_back(solved(w).duty);
  }
  // The molar mass above has five figures.
  for (const double duty : duties) EXPECT_NEAR(duty, duties[0], 1e-4 * duties[0]);
  EXPECT_NEAR(duties[2], duties[0], kSame * duties[0]);
  EXPECT_NEAR(duties[3], duties[1], kSame * duties[0]);
}

TEST(StepInvariants, SeekingABlankFindsWhatWasTypedBefore) {
  // Whatever blank is sought, with the duty that the step gave: the same figure comes back.
  for (const char* id :
       {"outlet.temperature", "feed.0.temperature", "feed.1.temperature", "feed.0.part.0", "feed.1.part.1",
        "feed.2.part.0", "reaction.0.progress", "reaction.1.progress", "loss", "shaft"}) {
    Writer w = reactor(400, 0.6, 0.8, 550);
    const StepResult known = solved(w);
    const double typed = known.values[*known.model->slot(id)];
    w.input.duty = Typed{known.duty, 0};
    w.input.sought = id;
    const StepResult found = solved(w);
    // As close as the heats that move allow.
    EXPECT_NEAR(answer(found, FigureId::Sought), typed, 1e-8 * (1 + std::fabs(typed))) << id;
    EXPECT_TRUE(found.closure.heat_closes) << id;
  }
}

TEST(StepInvariants, SaturationSharesMatchRaoult) {
  Writer w;
  w.feed("humid gas", 400);
  w.part("nitrogen", Phase::Gas, 10).part("water", Phase::Gas, 3).part("toluene", Phase::Gas, 1);
  for (const char* name : {"water", "toluene"}) {
    Leaving leaving;
    leaving.substance = w.substance(name);
    leaving.by_saturation = true;
    w.input.outlet.leaving.push_back(leaving);
  }
  w.input.outlet.temperature = Typed{310, 0};
  w.input.outlet.pressure = Typed{1.2e5, 0};
  const StepResult r = solved(w);
  double gas = 0, liquid = 0;
  for (const StreamLine& line : r.out) (line.state.phase == Phase::Gas ? gas : liquid) += line.amount;
  EXPECT_NEAR(gas + liquid, 14, 1e-12);
  for (const char* name : {"water", "toluene"}) {
    double y = 0, x = 0;
    for (const StreamLine& line : r.out) {
      if (line.substance != w.substance(name)) continue;
      (line.state.phase == Phase::Gas ? y : x) =
          line.amount / (line.state.phase == Phase::Gas ? gas : liquid);
    }
    const Result<thermo::Saturation> over =
        thermo::vapour_pressure(*w.input.substances[w.substance(name)].species, 310);
    ASSERT_TRUE(over.ok());
    EXPECT_GT(x, 0);
    // The grid of the curve is good to 1e-6.
    EXPECT_NEAR(y * 1.2e5, x * over->value, 2e-6 * y * 1.2e5) << name;
  }
  EXPECT_TRUE(r.closure.heat_closes);
}

}  // namespace
}  // namespace heatledger::step
