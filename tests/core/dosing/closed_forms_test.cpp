// Dosed charges whose course can be written down.
#include <cmath>

#include "core/dosing/failure.hpp"
#include "tests/core/dosing/systems.hpp"

namespace heatledger::dosing {
namespace {

using namespace test_systems;

// Tolerance of all comparisons with closed forms: the integration is asked for 1e-6 of what is left a step,
// and errors of some dozen steps add up.
constexpr double kIntegration = 2e-6;

// Second order, isothermal, no change of volume, equal feed: with a = A left and b = B in the vessel,
// a − b = N (1 − t/τ) on the way. From the end of feed on a = b, and 1/a grows by k/V a second.
TEST(DosedSecondOrder, AfterEqualFeedReciprocalsGrowInAStraightLine) {
  Charge charge;
  charge.volume_b = 0.5;
  charge.end = 30000;
  const Course course = followed(charge.system());
  const Moment at_end_of_feed = course.at(7200);
  EXPECT_NEAR(at_end_of_feed.amounts[0], at_end_of_feed.amounts[1], kIntegration * 5000);
  for (const double later : {1000.0, 5000.0, 20000.0}) {
    const double expected = 1 / (1 / at_end_of_feed.amounts[0] + charge.k / 1.5 * later);
    EXPECT_NEAR(course.at(7200 + later).amounts[0], expected, kIntegration * expected) << later;
  }
}

// In the limit of a fast reaction B is in a quasi-steady state: consumed as it comes, b = F V / (k a).
TEST(DosedSecondOrder, FastReactionConsumesWhatComes) {
  Charge charge;
  charge.k = 1;  // 1e7 times that of the case above: as stiff as they come
  const Course course = followed(charge.system());
  const Moment half = course.at(3600);
  const double a = 2500, feed = 5000 / 7200.0, volume = 1.25;
  // The next term of the expansion is smaller by b/a = 7e-8; read between two steps of an integration to 1e-6
  // of b.
  EXPECT_NEAR(half.amounts[1], feed * volume / (charge.k * a), 1e-5 * feed * volume / (charge.k * a));
  EXPECT_NEAR(half.rates[0], feed, 1e-5 * feed);
  EXPECT_LT(course.steps(), 1000);
}

// First order, adiabatic, constant heat capacity, no activation energy: A falls as exp(−kt), and the rise
// follows the conversion.
TEST(DosedFirstOrder, AdiabaticBatch) {
  Charge charge;
  charge.b = 0;
  charge.volume_b = 1e-9;
  charge.thermal = Thermal::Adiabatic;
  charge.end = 5000;
  const auto system = charge.system();
  system->reactions[0].terms = {{0, -1}, {3, 1}};
  system->reactions[0].law.factors = {{0, 1}};
  system->reactions[0].law.constant = 1e-3;
  const Course course = followed(system);
  const double rise = 5000 * 180e3 / (1000 * 2000);
  for (const double t : {100.0, 1000.0, 5000.0}) {
    const Moment moment = course.at(t);
    EXPECT_NEAR(moment.amounts[0], 5000 * std::exp(-1e-3 * t), kIntegration * 5000) << t;
    EXPECT_NEAR(moment.temperature, 333.15 + rise * -std::expm1(-1e-3 * t), kIntegration * rise) << t;
    // Wherever it stands, the end that it would come to is the same.
    EXPECT_NEAR(moment.mtsr, 333.15 + rise, 1e-6 * rise) << t;
  }
}

// First order, adiabatic, with an activation energy: separable, t = ∫ dX / (k(T(X)) (1 − X)), by Simpson's
// rule on a fine grid.
TEST(DosedFirstOrder, AdiabaticBatchWithActivationEnergy) {
  Charge charge;
  charge.b = 0;
  charge.volume_b = 1e-9;
  charge.thermal = Thermal::Adiabatic;
  charge.end = 3600;
  charge.heat = -60e3;
  charge.activation_energy = 80e3;
  const auto system = charge.system();
  system->reactions[0].terms = {{0, -1}, {3, 1}};
  system->reactions[0].law.factors = {{0, 1}};
  system->reactions[0].law.constant = 1e-5;
  system->end = 40000;
  const Course course = followed(system);
  const double rise = 5000 * 60e3 / (1000 * 2000);
  const auto slowness = [&](double x) {
    const double temperature = 333.15 + rise * x;
    const double k = 1e-5 * std::exp(-80e3 / 8.314462618 * (1 / temperature - 1 / 333.15));
    return 1 / (k * (1 - x));
  };
  for (const double x : {0.1, 0.5, 0.9, 0.99}) {
    constexpr int kParts = 20000;
    double time = slowness(0) + slowness(x);
    for (int i = 1; i < kParts; ++i) time += slowness(x * i / kParts) * (i % 2 == 1 ? 4 : 2);
    time *= x / kParts / 3;
    // Near the maximum rate the conversion moves fast: the comparison is one of times.
    double low = 0, high = 40000;
    for (int i = 0; i < 60; ++i) {
      const double middle = (low + high) / 2;
      (course.at(middle).conversion < x ? low : high) = middle;
    }
    EXPECT_NEAR(low, time, 1e-5 * time) << x;
  }
}

// As fast as dosed at a constant rate: heat rate and conversion are those of the feed.
TEST(DosedFast, HeatComesAtTheRateOfTheFeed) {
  Charge charge;
  charge.speed = Speed::AsFastAsDosed;
  charge.feed_temperature = 293.15;
  charge.end = 9000;
  const Course course = followed(charge.system());
  const Moment half = course.at(3600);
  const double feed = 5000 / 7200.0, cold = 500 * 2000 * 40 / 7200.0;
  EXPECT_NEAR(half.heat_rate, feed * 180e3, 1e-9 * feed * 180e3);
  EXPECT_NEAR(half.cold_feed, cold, 1e-9 * cold);
  EXPECT_NEAR(half.cooling, feed * 180e3 - cold, 1e-9 * feed * 180e3);
  EXPECT_NEAR(half.conversion, 0.5, 1e-12);
  EXPECT_EQ(half.open_heat, 0);
  EXPECT_EQ(half.mtsr, 333.15);
  EXPECT_EQ(course.at(8000).heat_rate, 0);
  EXPECT_NEAR(course.at(9000).wall_heat, -(5000 * 180e3 - 500 * 2000 * 40), 1);
}

// More is fed than the charge can take: heat stops when the charged reactant is used up.
TEST(DosedFast, HeatStopsAtEquivalence) {
  Charge charge;
  charge.speed = Speed::AsFastAsDosed;
  charge.b = 5000;
  charge.a = 2000;
  const Course course = followed(charge.system());
  const double equivalence = 7200 * 0.4;
  EXPECT_GT(course.at(equivalence - 0.01).heat_rate, 1e5);
  EXPECT_EQ(course.at(equivalence + 0.01).heat_rate, 0);
  EXPECT_NEAR(course.at(7200).amounts[1], 3000, 1e-6);
  const Course::Peak peak = course.highest([](const Moment& m) { return m.cooling; });
  EXPECT_NEAR(peak.value, 5000 / 7200.0 * 180e3, 1);
}

// As fast as dosed with a jacket: a linear equation whose solution is an exponential when the content does
// not grow. A feed without mass of its own brings the reactant.
TEST(DosedFast, JacketLagsBehind) {
  Charge charge;
  charge.speed = Speed::AsFastAsDosed;
  charge.thermal = Thermal::Jacket;
  charge.jacket = 313.15;
  charge.ua = charge.ua_end = 500;
  charge.b = 1e-3;
  charge.volume_b = 1e-7;
  charge.heat = -180e3 * 5e6;
  const Course course = followed(charge.system());
  const double heat_capacity = 1000 * 2000, power = 1e-3 / 7200 * 180e3 * 5e6;
  for (const double t : {600.0, 3600.0, 7200.0}) {
    const double steady = 313.15 + power / 500;
    const double expected = steady + (333.15 - steady) * std::exp(-500 * t / heat_capacity);
    // What is fed weighs 1e-7 of the content.
    EXPECT_NEAR(course.at(t).temperature, expected, 1e-4) << t;
  }
}

// What comes after the failure: the end of the adiabatic path is the temperature that was foretold.
TEST(DosedFailure, PathEndsAtTheTemperatureForetold) {
  Charge charge;
  charge.activation_energy = 70e3;
  const Course course = followed(charge.system());
  const Moment moment = course.at(5000);
  const Result<Failure> failure = fail(course, moment, false);
  ASSERT_TRUE(failure.ok());
  // The path stops when a thousandth of the heat is left.
  EXPECT_NEAR(failure->highest, moment.mtsr, 1.1e-3 * (moment.mtsr - moment.temperature));
  EXPECT_GT(failure->reached_after, 0);
  EXPECT_FALSE(failure->slow);
  const Result<Failure> feeding = fail(course, moment, true);
  ASSERT_TRUE(feeding.ok());
  EXPECT_GT(feeding->highest, failure->highest);
}

}  // namespace
}  // namespace heatledger::dosing
