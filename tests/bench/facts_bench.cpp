// The library as a person meets it: first use, one keystroke of completion, one species text read afresh.
#include <benchmark/benchmark.h>

#include "core/facts/ions.hpp"
#include "core/facts/library.hpp"
#include "core/facts/polynomials.hpp"
#include "core/facts/resolve.hpp"
#include "core/facts/solution_heats.hpp"
#include "core/facts/vapour_pressure.hpp"

namespace heatledger::facts {
namespace {

// Runs once in a process: what is read stays read. Registered first, so that nothing has touched the tables
// before.
void Facts_FirstUseOfAllTables(benchmark::State& state) {
  for (auto _ : state) {
    benchmark::DoNotOptimize(Library::embedded().find_name("nitrobenzene"));
    benchmark::DoNotOptimize(aqueous_substances().size());
    benchmark::DoNotOptimize(polynomials().size());
    benchmark::DoNotOptimize(vapour_pressures().size());
    benchmark::DoNotOptimize(solution_heats().size());
  }
}
BENCHMARK(Facts_FirstUseOfAllTables)->Iterations(1)->Unit(benchmark::kMillisecond);

void Facts_FirstCompletion(benchmark::State& state) {
  for (auto _ : state) benchmark::DoNotOptimize(Library::embedded().complete("eth", 12));
}
BENCHMARK(Facts_FirstCompletion)->Iterations(1)->Unit(benchmark::kMillisecond);

void Facts_Complete(benchmark::State& state, const char* text) {
  for (auto _ : state) benchmark::DoNotOptimize(Library::embedded().complete(text, 12));
}
BENCHMARK_CAPTURE(Facts_Complete, beginning, "eth");
BENCHMARK_CAPTURE(Facts_Complete, slip, "nitrobenzne");
BENCHMARK_CAPTURE(Facts_Complete, nothing_near, "aaaaaaaaaa");

void Facts_Resolve(benchmark::State& state, const char* text, bool quoted) {
  for (auto _ : state) benchmark::DoNotOptimize(resolve_species(text, quoted));
}
BENCHMARK_CAPTURE(Facts_Resolve, name, "ethyl acetate", false);
BENCHMARK_CAPTURE(Facts_Resolve, formula, "H2SO4", false);
BENCHMARK_CAPTURE(Facts_Resolve, structure_of_the_library, "CCOC(C)=O", true);
BENCHMARK_CAPTURE(Facts_Resolve, structure_outside, "CCCC(C)C(=O)OCC1CC1", true);

}  // namespace
}  // namespace heatledger::facts
