// How long a ten-hour dosed step takes, the same source natively and as WebAssembly. A build without
// optimisation or under sanitizers is not timed.
#include <algorithm>
#include <cstdio>
#include <ctime>

#include "tests/core/dosing/systems.hpp"

namespace heatledger::dosing {
namespace {

using namespace test_systems;

/// Fast against the dosing by a factor of some 100,000, with a jacket and an activation energy: integrated,
/// and its peaks of temperature, cooling and MTSR found.
double milliseconds() {
  Charge charge;
  charge.k = 1e-3;
  charge.activation_energy = 75e3;
  charge.thermal = Thermal::Jacket;
  charge.ua = 2000;
  charge.ua_end = 3000;
  charge.jacket = 323.15;
  charge.dosing = 36000;
  charge.end = 40000;
  const auto system = charge.system();
  double best = 1e300;
  for (int i = 0; i < 10; ++i) {
    const std::clock_t start = std::clock();  // processor time: other programs may run beside the suite
    const Course course = followed(system);
    const double sum = course.highest([](const Moment& m) { return m.temperature; }).value +
                       course.highest([](const Moment& m) { return m.cooling; }).value +
                       course.highest([](const Moment& m) { return m.mtsr; }).value;
    EXPECT_GT(sum, 600);
    best = std::min(best, 1e3 * static_cast<double>(std::clock() - start) / CLOCKS_PER_SEC);
  }
  return best;
}

TEST(DosedSpeed, TenHoursWithAStiffRateLaw) {
  const double taken = milliseconds();
  std::printf("ten-hour dosed step with a stiff rate law: %.2f ms\n", taken);
#if defined(NDEBUG) && !defined(__SANITIZE_ADDRESS__)
#ifdef __EMSCRIPTEN__
  EXPECT_LE(taken, 40);
#else
  EXPECT_LE(taken, 20);
#endif
#endif
}

}  // namespace
}  // namespace heatledger::dosing
