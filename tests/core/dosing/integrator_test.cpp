// The integrator against solutions that are known, and dosed charges against an integrator of another kind.
#include <array>
#include <cmath>

#include "tests/core/dosing/systems.hpp"

namespace heatledger::dosing {
namespace {

using namespace test_systems;

/// y0' = −λ (y0 − cos t) − sin t, y1' = y0 y1: y0 = cos t, y1 = exp(sin t) from (1, 1).
class Stiff : public Equations {
 public:
  Stiff(double stiffness, double tolerance) : stiffness_(stiffness), tolerance_(tolerance) {}
  std::size_t size() const override { return 2; }
  void rates(double t, const double* y, double* dydt) const override {
    dydt[0] = -stiffness_ * (y[0] - std::cos(t)) - std::sin(t);
    dydt[1] = y[0] * y[1];
  }
  void tolerances(double, const double* y, double* allowed) const override {
    for (int i = 0; i < 2; ++i) allowed[i] = tolerance_ * (1 + std::fabs(y[i]));
  }

 private:
  double stiffness_, tolerance_;
};

struct Ran {
  double error = 0, inside = 0;
  long steps = 0;
};

Ran run(double stiffness, double tolerance) {
  std::vector<double> y = {1, 1};
  Progress progress;
  Ran ran;
  const Ending ending = integrate(Stiff(stiffness, tolerance), 0, 10, y, 10, progress, [&](DenseStep& step) {
    double at[2];
    const double t = step.from + 0.4 * step.length;
    step.at(t, at);
    ran.inside = std::max(ran.inside, std::fabs(at[1] - std::exp(std::sin(t))));
    return true;
  });
  EXPECT_EQ(ending, Ending::Reached);
  ran.error = std::fabs(y[1] - std::exp(std::sin(10.0)));
  ran.steps = progress.steps;
  return ran;
}

TEST(Integrator, FollowsAStiffSystemWithinItsTolerance) {
  for (const double tolerance : {1e-4, 1e-6, 1e-8}) {
    const Ran ran = run(1000, tolerance);
    // The tolerance holds for a step; over ten time constants errors add up to some tens of it.
    EXPECT_LT(ran.error, 50 * tolerance) << tolerance;
    EXPECT_LT(ran.inside, 200 * tolerance) << tolerance;
  }
}

TEST(Integrator, IsOfFourthOrder) {
  // With an error of order h^4 a step, a tolerance smaller by 10^4 costs ten times the steps; a wrong
  // coefficient lowers the order to two, which costs a hundred times.
  const double more = static_cast<double>(run(1, 1e-9).steps) / static_cast<double>(run(1, 1e-5).steps);
  EXPECT_GT(more, 4);
  EXPECT_LT(more, 16);
}

TEST(Integrator, RefusesABlowUp) {
  class Bursts : public Equations {
   public:
    std::size_t size() const override { return 1; }
    void rates(double, const double* y, double* dydt) const override { dydt[0] = y[0] * y[0]; }
    void tolerances(double, const double* y, double* allowed) const override {
      allowed[0] = 1e-6 * std::fabs(y[0]);
    }
  };
  std::vector<double> y = {1};
  Progress progress;
  EXPECT_EQ(integrate(Bursts(), 0, 2, y, 2, progress, [](DenseStep&) { return true; }), Ending::TooSteep);
}

/// The same charge in amounts and temperature, written anew, by the classical Runge–Kutta formula with
/// 400,000 equal steps: nothing is shared with the integrator, the enthalpies or the accumulation.
struct Plain {
  double a, b, temperature, open_peak = 0, hottest = 0;
};
Plain runge_kutta(const Charge& c) {
  constexpr int kSteps = 400000;
  const double h = c.end / kSteps;
  using State = std::array<double, 3>;
  const auto slope = [&](double t, const State& y) {
    const bool feeding = t < c.dosing;
    const double share = std::min(1.0, t / c.dosing), volume = c.volume_a + share * c.volume_b;
    const double k = c.k * std::exp(-c.activation_energy / 8.314462618 * (1 / y[2] - 1 / c.temperature));
    const double rate = k * y[0] * y[1] / volume, fed_mass = feeding ? c.volume_b * 1000 / c.dosing : 0;
    const double ua = c.ua + share * (c.ua_end - c.ua), heat_capacity = volume * 1000 * c.cp;
    const double warm = fed_mass * c.cp * (c.feed_temperature - y[2]);
    return State{-rate, (feeding ? c.b / c.dosing : 0) - rate,
                 (-rate * c.heat + warm + ua * (c.jacket - y[2])) / heat_capacity};
  };
  State y = {c.a, 0, c.temperature};
  Plain plain{};
  const auto moved = [](const State& y0, double by, const State& s) {
    return State{y0[0] + by * s[0], y0[1] + by * s[1], y0[2] + by * s[2]};
  };
  for (int i = 0; i < kSteps; ++i) {
    // The end of feed falls on the border of two steps; inside a step the slopes are smooth.
    const double t = h * i, inside = t + 1e-9 * h, before_end = t + (1 - 1e-9) * h;
    const State k1 = slope(inside, y), k2 = slope(t + h / 2, moved(y, h / 2, k1)),
                k3 = slope(t + h / 2, moved(y, h / 2, k2)), k4 = slope(before_end, moved(y, h, k3));
    for (std::size_t j = 0; j < 3; ++j) y[j] += h / 6 * (k1[j] + 2 * k2[j] + 2 * k3[j] + k4[j]);
    const double volume = c.volume_a + std::min(1.0, (t + h) / c.dosing) * c.volume_b;
    const double mtsr = y[2] + std::min(y[0], y[1]) * -c.heat / (volume * 1000 * c.cp);
    plain.open_peak = std::max(plain.open_peak, mtsr);
    plain.hottest = std::max(plain.hottest, y[2]);
  }
  plain.a = y[0];
  plain.b = y[1];
  plain.temperature = y[2];
  return plain;
}

class AgainstRungeKutta : public ::testing::TestWithParam<int> {};

TEST_P(AgainstRungeKutta, JacketedChargeWithRateLaw) {
  Charge charge;
  charge.thermal = Thermal::Jacket;
  charge.activation_energy = 75e3;
  charge.jacket = 323.15;
  charge.feed_temperature = 293.15;
  charge.ua = 1500;
  charge.ua_end = 2200;
  charge.end = 10800;
  charge.heat = -120e3;
  switch (GetParam()) {
    case 0:
      break;
    case 1:  // accumulates, then runs away
      charge.k = 2e-8;
      charge.jacket = 318.15;
      break;
    case 2:  // fast
      charge.k = 2e-5;
      break;
    case 3:  // charged reactant used up on the way
      charge.a = 3000;
      break;
    default:
      charge.ua = charge.ua_end = 0;
  }
  const Plain plain = runge_kutta(charge);
  const Course course = followed(charge.system());
  const Moment end = course.at(charge.end);
  // 1e-5 of a span of 5 kmol and 100 K: an integration to 1e-7 a step whose errors a runaway stretches.
  EXPECT_NEAR(end.amounts[0], plain.a, 0.05);
  EXPECT_NEAR(end.amounts[1], plain.b, 0.05);
  EXPECT_NEAR(end.temperature, plain.temperature, 1e-3);
  EXPECT_NEAR(course.highest([](const Moment& m) { return m.temperature; }).value, plain.hottest, 2e-3);
  EXPECT_NEAR(course.highest([](const Moment& m) { return m.mtsr; }).value, plain.open_peak, 2e-3);
}

INSTANTIATE_TEST_SUITE_P(Cases, AgainstRungeKutta, ::testing::Range(0, 5));

}  // namespace
}  // namespace heatledger::dosing
