// The model of bonds in context: fits from the embedded table, estimates with their ±, one more measurement.
// Estimates run over 2,000 compounds spread over the training table, each without its own row where stated.
#include <benchmark/benchmark.h>

#include <memory>
#include <vector>

#include "core/estimate/context_observations.hpp"
#include "core/estimate/context_store.hpp"
#include "core/molecule/smiles.hpp"

namespace heatledger::estimate {
namespace {

constexpr std::size_t kMolecules = 2000;

std::vector<molecule::Graph> graphs() {
  std::vector<molecule::Graph> out;
  const std::size_t step = training_compounds().size() / kMolecules;
  for (std::size_t i = 0; i < kMolecules; ++i) {
    out.push_back(*molecule::parse_smiles(training_compounds()[i * step].smiles));
  }
  return out;
}

std::vector<ContextMolecule> molecules() {
  std::vector<ContextMolecule> out;
  for (const molecule::Graph& graph : graphs()) out.push_back(*context_molecule(graph));
  return out;
}

/// Structures counted once beforehand: the time is that of the fit itself.
void ContextFitProperty(benchmark::State& state) {
  const FitKind kind = static_cast<FitKind>(state.range(0));
  for (std::size_t c = 0; c < training_compounds().size(); ++c) training_molecule(c);
  for (auto _ : state) {
    const FittedProperty fitted = fit_embedded(kind);
    benchmark::DoNotOptimize(fitted.fit->unknowns());
  }
}
BENCHMARK(ContextFitProperty)->DenseRange(0, 4)->Unit(benchmark::kMillisecond);

/// All structures of the table read and counted: what the first fit pays besides.
void ContextCountTable(benchmark::State& state) {
  for (auto _ : state) {
    for (const TrainingCompound& compound : training_compounds()) {
      benchmark::DoNotOptimize(context_molecule(*molecule::parse_smiles(compound.smiles)).ok());
    }
  }
}
BENCHMARK(ContextCountTable)->Unit(benchmark::kMillisecond);

/// From graph to formation enthalpy with ±.
void ContextEstimate(benchmark::State& state) {
  const std::vector<molecule::Graph> all = graphs();
  const ContextOptions options{.estimate_only = state.range(0) != 0};
  embedded_fit(FitKind::Formation);
  for (auto _ : state) {
    for (const molecule::Graph& graph : all) {
      const Result<ContextMolecule> molecule = context_molecule(graph);
      benchmark::DoNotOptimize(
          ContextModel::embedded().predict(Property::GasFormation, *molecule, options)->u95);
    }
  }
  state.SetItemsProcessed(static_cast<std::int64_t>(state.iterations() * kMolecules));
}
BENCHMARK(ContextEstimate)->ArgName("without_own_row")->Arg(0)->Arg(1)->Unit(benchmark::kMillisecond);

/// One measurement added and a related estimate read.
void ContextMeasurement(benchmark::State& state) {
  const std::vector<ContextMolecule> all = molecules();
  Measurement measurement;
  measurement.terms.push_back({1, std::make_shared<const ContextMolecule>(all[700])});
  measurement.value = -200000;
  measurement.u95 = 2000;
  embedded_fit(FitKind::Formation);
  for (auto _ : state) {
    Observations observations;
    benchmark::DoNotOptimize(observations.add(measurement).ok());
    benchmark::DoNotOptimize(ContextModel::embedded()
                                 .predict(Property::GasFormation, all[701], {.observations = &observations})
                                 ->u95);
  }
}
BENCHMARK(ContextMeasurement)->Unit(benchmark::kMicrosecond);

}  // namespace
}  // namespace heatledger::estimate
