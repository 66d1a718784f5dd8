// A dosed charge: one course in time, and everything that the sheet says of it with its ±.
#include <benchmark/benchmark.h>

#include "core/dosing/run.hpp"

namespace heatledger::dosing {
namespace {

std::shared_ptr<DosedSystem> ten_hours(double rate_constant) {
  auto system = std::make_shared<DosedSystem>();
  const auto substance = [&](const char* name, double mass) {
    system->substances.push_back({name, mass, mass / 1000, Enthalpy::constant(0, 2000 * mass)});
  };
  substance("A", 0.1);
  substance("B", 0.1);
  substance("C", 0.2);
  substance("S", 0.1);
  system->start = {5000, 0, 0, 5000};
  system->start_temperature = 333.15;
  DosedFeed feed;
  feed.amounts = {0, 5000, 0, 0};
  feed.enthalpy = 500 * 2000 * 35.0;
  feed.profile = Profile::constant(0, 36000);
  system->feeds.push_back(feed);
  DosedReaction reaction;
  reaction.terms = {{0, -1}, {1, -1}, {2, 1}};
  reaction.heat = -180e3;
  reaction.speed = Speed::ByRateLaw;
  reaction.law.constant = rate_constant;
  reaction.law.reference = 333.15;
  reaction.law.activation_energy = 75e3;
  reaction.law.factors = {{0, 1}, {1, 1}};
  system->reactions.push_back(reaction);
  system->thermal = Thermal::Jacket;
  system->jacket_temperature = 323.15;
  system->conductance_start = 2000;
  system->conductance_end = 3000;
  system->end = 40000;
  return system;
}

/// Aimed at 20 ms. The argument is the power of ten of the rate constant in m³/(mol s).
void Dosing_TenHours(benchmark::State& state) {
  double constant = 1;
  for (std::int64_t i = state.range(0); i < 0; ++i) constant /= 10;
  const auto system = ten_hours(constant);
  for (auto _ : state) {
    const Result<Course> course = Course::follow(system);
    benchmark::DoNotOptimize(course->highest([](const Moment& m) { return m.mtsr; }).value);
  }
}
BENCHMARK(Dosing_TenHours)->Arg(-7)->Arg(-5)->Arg(-3)->Arg(0)->Unit(benchmark::kMillisecond);

}  // namespace
}  // namespace heatledger::dosing
