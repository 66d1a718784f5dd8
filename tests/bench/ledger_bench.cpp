// How long a sheet takes: a first computation of 20 reactions with 60 species, one edit, and equations in
// bulk.
#include <benchmark/benchmark.h>

#include <string>
#include <vector>

#include "core/balance/ledger.hpp"
#include "core/balance/quick_tally.hpp"

namespace {

using namespace heatledger;  // NOLINT: a program, not a header

/// Twenty reactions of a solvent plant, 60 different species in all; inputs are fixed.
const char* const kEquations[] = {
    "nitrobenzene(l) + 3 H2(g) -> aniline(l) + 2 water(l)",
    "toluene(l) + Cl2(g) -> benzyl chloride(l) + hydrogen chloride(g)",
    "acetic acid(l) + ethanol(l) -> ethyl acetate(l) + water(l)",
    "methane(g) + 2 O2(g) -> CO2(g) + 2 water(g)",
    "acetone(g) + 4 O2(g) -> 3 CO2(g) + 3 water(g)",
    "ethene(g) + Cl2(g) -> 1,2-dichloroethane(l)",
    "CO(g) + water(g) -> CO2(g) + H2(g)",
    "N2(g) + 3 H2(g) -> 2 ammonia(g)",
    "2 methanol(l) -> dimethyl ether(g) + water(l)",
    "propene(g) + water(g) -> 2-propanol(l)",
    "cyclohexene(l) + H2(g) -> cyclohexane(l)",
    "benzene(l) + propene(g) -> cumene(l)",
    "styrene(l) + H2(g) -> ethylbenzene(l)",
    "acetonitrile(l) + 2 H2(g) -> ethylamine(g)",
    "acetic anhydride(l) + water(l) -> 2 acetic acid(l)",
    "butanal(l) + H2(g) -> 1-butanol(l)",
    "phenol(l) + 3 H2(g) -> cyclohexanol(l)",
    "pentane(g) + 8 O2(g) -> 5 CO2(g) + 6 water(g)",
    "chlorobenzene(l) + 7 O2(g) -> 6 CO2(g) + 2 water(g) + hydrogen chloride(g)",
    "4 nitric oxide(g) + 4 ammonia(g) + O2(g) -> 4 N2(g) + 6 water(g)",
};

std::shared_ptr<const estimate::BondSet> primary_set() {
  return std::make_shared<const estimate::BondSet>(std::move(estimate::BondSet::published("")).value());
}

std::shared_ptr<const balance::Ledger> compute(const char* equation, balance::SpeciesSource& species,
                                               const balance::LedgerOptions& options) {
  Result<balance::Reaction> read = balance::read_reaction(equation, species);
  if (!read.ok()) return nullptr;
  Result<balance::Ledger> made =
      balance::make_ledger(std::make_shared<const balance::Reaction>(std::move(read).value()), options);
  if (!made.ok()) return nullptr;
  return std::make_shared<const balance::Ledger>(std::move(made).value());
}

/// Species are read anew each time; tables are in memory, as they are once a program has started.
void first_computation(benchmark::State& state) {
  balance::LedgerOptions options;
  options.set = primary_set();
  for (auto _ : state) {
    balance::CachedSpecies species;
    for (const char* equation : kEquations) {
      if (compute(equation, species, options) == nullptr) state.SkipWithError(equation);
    }
  }
}
BENCHMARK(first_computation)->Unit(benchmark::kMillisecond);

/// One coefficient edited: one ledger of the twenty is made again.
void one_edit(benchmark::State& state) {
  balance::LedgerOptions options;
  options.set = primary_set();
  balance::CachedSpecies species;
  for (const char* equation : kEquations) compute(equation, species, options);
  std::size_t at = 0;
  for (auto _ : state) {
    if (compute(kEquations[at % std::size(kEquations)], species, options) == nullptr)
      state.SkipWithError("no ledger");
    ++at;
  }
}
BENCHMARK(one_edit)->Unit(benchmark::kMicrosecond);

/// 1 000 different equations of four species each: 40 alkanes burned in 25 amounts.
std::vector<std::string> many_equations() {
  std::vector<std::string> fuels;
  for (int chain = 1; chain <= 40; ++chain)
    fuels.push_back(std::string(static_cast<std::size_t>(chain), 'C'));
  std::vector<std::string> equations;
  for (int times = 1; times <= 25; ++times) {
    for (std::size_t i = 0; i < fuels.size(); ++i) {
      const int carbon = static_cast<int>(i) + 1;
      equations.push_back(std::to_string(2 * times) + " \"" + fuels[i] + "\"(g) + " +
                          std::to_string(times * (3 * carbon + 1)) + " O2(g) -> " +
                          std::to_string(2 * times * carbon) + " CO2(g) + " +
                          std::to_string(2 * times * (carbon + 1)) + " H2O(g)");
    }
  }
  return equations;
}

void bulk_average(benchmark::State& state) {
  const std::vector<std::string> equations = many_equations();
  balance::QuickTally quick(primary_set(), balance::ContextUse::Never);
  std::size_t at = 0;
  for (auto _ : state) {
    const Result<balance::QuickAnswer> answer = quick.tally(equations[at]);
    if (!answer.ok()) state.SkipWithError(equations[at].c_str());
    benchmark::DoNotOptimize(answer);
    at = (at + 1) % equations.size();
  }
  state.SetItemsProcessed(state.iterations());
}
BENCHMARK(bulk_average);

}  // namespace
