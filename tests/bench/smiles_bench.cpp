// SMILES to bond tally, beside RDKit and Open Babel, on the same 2,000 structures on one core.
// Input: the first 2,000 lines of tests/data/smiles/molecules.tsv (process compounds, 12 characters in the
// median). Ours: parse_smiles_into and count_bonds with all hydrogens, Kekulé orders, settings marked. RDKit:
// SmilesToMol with its usual sanitisation, bonds counted by order, hydrogens as counts. Open Babel:
// ReadString, the same count.
#include <benchmark/benchmark.h>

#include <string>
#include <vector>

#include "core/molecule/bonds.hpp"
#include "core/molecule/smiles.hpp"
#include "tests/core/support/test_files.hpp"
#include "tests/oracles/oracle.hpp"

namespace heatledger {
namespace {

constexpr std::size_t structures = 2000;

const std::vector<std::string>& texts() {
  static const std::vector<std::string> all = [] {
    const test::Table table = test::read_table("tests/data/smiles/molecules.tsv");
    std::vector<std::string> found;
    for (std::size_t i = 0; i < structures && i < table.rows.size(); ++i) {
      found.push_back(table.rows[i][table.column("smiles")]);
    }
    return found;
  }();
  return all;
}

// Molecules a second, and time for one, from passes over all texts.
void report(benchmark::State& state) {
  const auto count = static_cast<double>(texts().size());
  state.counters["molecules/s"] = benchmark::Counter(count, benchmark::Counter::kIsIterationInvariantRate);
  state.counters["each"] =
      benchmark::Counter(count, benchmark::Counter::kIsIterationInvariantRate | benchmark::Counter::kInvert);
}

void SmilesToTally_Heatledger(benchmark::State& state) {
  molecule::Graph graph;
  molecule::BondTally tally;
  for (auto _ : state) {
    std::size_t types = 0;
    for (const std::string& text : texts()) {
      if (!molecule::parse_smiles_into(text, graph)) continue;
      molecule::count_bonds(graph, tally);
      types += tally.size();
    }
    benchmark::DoNotOptimize(types);
  }
  report(state);
}

void SmilesToTally_Rdkit(benchmark::State& state) {
  test::silence_rdkit();
  for (auto _ : state) {
    int bonds = 0;
    for (const std::string& text : texts()) bonds += test::rdkit_quick_count(text);
    benchmark::DoNotOptimize(bonds);
  }
  report(state);
}

void SmilesToTally_OpenBabel(benchmark::State& state) {
  test::silence_open_babel();
  for (auto _ : state) {
    int bonds = 0;
    for (const std::string& text : texts()) bonds += test::open_babel_quick_count(text);
    benchmark::DoNotOptimize(bonds);
  }
  report(state);
}

void SmilesToCanonical_Heatledger(benchmark::State& state) {
  molecule::Graph graph;
  for (auto _ : state) {
    std::size_t length = 0;
    for (const std::string& text : texts()) {
      if (!molecule::parse_smiles_into(text, graph)) continue;
      length += molecule::canonical_smiles(graph).size();
    }
    benchmark::DoNotOptimize(length);
  }
  report(state);
}

// Five repetitions: the median and the spread are what counts on a shared machine.
BENCHMARK(SmilesToTally_Heatledger)->Unit(benchmark::kMillisecond)->Repetitions(5)->ReportAggregatesOnly();
BENCHMARK(SmilesToTally_Rdkit)->Unit(benchmark::kMillisecond)->Repetitions(5)->ReportAggregatesOnly();
BENCHMARK(SmilesToTally_OpenBabel)->Unit(benchmark::kMillisecond)->Repetitions(5)->ReportAggregatesOnly();
BENCHMARK(SmilesToCanonical_Heatledger)
    ->Unit(benchmark::kMillisecond)
    ->Repetitions(5)
    ->ReportAggregatesOnly();

}  // namespace
}  // namespace heatledger
