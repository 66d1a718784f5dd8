// Flames at chemical equilibrium: one state cold (nothing kept from another), over the seeded grid of the
// suite; and a burning step with every ± and both drawings.
#include <benchmark/benchmark.h>

#include <algorithm>
#include <vector>

#include "core/burning/answer.hpp"
#include "tests/core/burning/random_flames.hpp"

namespace {

using namespace heatledger;           // NOLINT: a program, not a header
using namespace heatledger::burning;  // NOLINT

/// Each state is searched from the start; the slowest state of the grid is the counter beside.
void equilibrium_flame(benchmark::State& state) {
  const std::vector<test_flames::FuelGas> fuels = test_flames::fuel_gases();
  test_flames::Random random;
  std::vector<test_flames::Flame> flames;
  for (std::size_t i = 0; i < 20160; ++i) flames.push_back(test_flames::flame(fuels, random, i));
  std::size_t at = 0, failures = 0;
  int steps = 0;
  for (auto _ : state) {
    const test_flames::Flame& f = flames[at++ % flames.size()];
    const Result<Equilibrium> e = equilibrium_burnt(combustion_gases(), f.atoms, f.enthalpy, f.pressure);
    if (e.ok()) {
      steps = std::max(steps, e->iterations);
    } else {
      ++failures;
    }
  }
  state.counters["most steps"] = steps;
  state.counters["failures"] = static_cast<double>(failures);
}
BENCHMARK(equilibrium_flame)->Unit(benchmark::kMicrosecond)->Iterations(20160);

/// Methane, ethane and nitrogen in humid air at a typed oxygen content.
void burning_step(benchmark::State& state) {
  BurnInput in;
  Stream gas;
  gas.name = "gas";
  for (const auto& [name, moles] :
       {std::pair{"methane", 0.93}, std::pair{"ethane", 0.04}, std::pair{"nitrogen", 0.03}}) {
    const auto species = facts::resolve_species(name, false);
    gas.parts.push_back(std::move(make_part(name, *species, molecule::Phase::Gas, moles)).value());
  }
  in.streams.push_back(std::move(gas));
  in.rule = AirRule::FlueDry;
  in.air_figure = {0.03, 0.002};
  in.flue_temperature = step::Typed{453.15, 0};
  for (auto _ : state) {
    if (!answer(in).ok()) state.SkipWithError("no answer");
  }
}
BENCHMARK(burning_step)->Unit(benchmark::kMillisecond);

}  // namespace
