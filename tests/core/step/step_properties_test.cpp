// Properties of mixing, splitting and reacting streams over random figures (RapidCheck, native only).
#include <gtest/gtest.h>
// RapidCheck uses what GoogleTest declares.
#include <rapidcheck/gtest.h>

#include <cmath>

#include "tests/core/step/steps.hpp"

namespace heatledger::step {
namespace {

using namespace test_steps;
using molecule::Phase;

const char* const kNames[] = {"nitrogen", "oxygen", "carbon dioxide", "water", "methane", "hydrogen"};

double amount() {
  return 0.01 * *rc::gen::inRange(1, 10000);
}
double temperature() {
  return *rc::gen::inRange(300, 1400);
}

RC_GTEST_PROP(StepProperties, AdiabaticMixingLiesBetweenItsFeedsAndCloses, ()) {
  Writer w;
  double low = 1e9, high = 0;
  const int feeds = *rc::gen::inRange(1, 5);
  for (int f = 0; f < feeds; ++f) {
    const double t = temperature();
    low = std::min(low, t);
    high = std::max(high, t);
    w.feed("feed", t);
    w.part(kNames[*rc::gen::inRange(0, 6)], Phase::Gas, amount());
  }
  w.input.duty = Typed{0, 0};
  w.input.sought = "outlet.temperature";
  const StepResult r = solved(w);
  const double end = answer(r, FigureId::Sought);
  RC_ASSERT(end >= low - 1e-6 && end <= high + 1e-6);
  RC_ASSERT(r.closure.heat <= 1e-9);
}

RC_GTEST_PROP(StepProperties, ThereAndBackNeedsNothing, ()) {
  const double from = temperature(), to = temperature(), n = amount();
  const char* const name = kNames[*rc::gen::inRange(0, 6)];
  double sum = 0, size = 0;
  for (const bool back : {false, true}) {
    Writer w;
    w.feed("feed", back ? to : from);
    w.part(name, Phase::Gas, n);
    w.input.outlet.temperature = Typed{back ? from : to, 0};
    const double duty = solved(w).duty;
    sum += duty;
    size += std::fabs(duty);
  }
  RC_ASSERT(std::fabs(sum) <= 1e-12 * size + 1e-9);
}

RC_GTEST_PROP(StepProperties, TwiceTheFeedNeedsTwiceTheDuty, ()) {
  const double conversion = 0.01 * *rc::gen::inRange(1, 100), inlet = temperature(), outlet = temperature();
  const double co = amount(), water = co + amount();
  double duty[2];
  for (int times = 1; times <= 2; ++times) {
    Writer w;
    w.feed("feed", inlet);
    w.part("CO", Phase::Gas, times * co).part("H2O", Phase::Gas, times * water);
    w.reaction("CO(g) + H2O(g) -> CO2(g) + H2(g)", ProgressKind::Conversion, conversion, "CO");
    w.input.outlet.temperature = Typed{outlet, 0};
    const StepResult r = solved(w);
    RC_ASSERT(r.closure.elements_close);
    duty[times - 1] = r.duty;
  }
  RC_ASSERT(std::fabs(duty[1] - 2 * duty[0]) <= 1e-9 * (co + water) * 1e5);
}

RC_GTEST_PROP(StepProperties, ExtentsStayWithinWhatIsFed, ()) {
  const double selectivity = 0.01 * *rc::gen::inRange(0, 101), conversion = 0.01 * *rc::gen::inRange(0, 101);
  Writer w;
  w.feed("feed", 500);
  w.part("ethene", Phase::Gas, 10).part("oxygen", Phase::Gas, 40);
  w.reaction("2 C2H4(g) + O2(g) -> 2 ethylene oxide(g)", ProgressKind::Selectivity, selectivity, "ethene",
             "ethylene oxide");
  w.reaction("C2H4(g) + 3 O2(g) -> 2 CO2(g) + 2 H2O(g)", ProgressKind::TotalConversion, conversion, "ethene");
  w.input.outlet.temperature = Typed{500, 0};
  const StepResult r = solved(w);
  RC_ASSERT(std::fabs(2 * r.reactions[0].extent + r.reactions[1].extent - 10 * conversion) <= 1e-9);
  for (const StreamLine& line : r.out) RC_ASSERT(line.amount >= 0);
}

}  // namespace
}  // namespace heatledger::step
