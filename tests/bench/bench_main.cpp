// All benchmarks in one run, then the figures that were asked for beside what was reached, and the sheet of
// twenty reactions natively beside WebAssembly. The suites' helper library brings GoogleTest's main along;
// this one goes first.
#include <benchmark/benchmark.h>

#include <cstdio>
#include <cstdlib>
#include <filesystem>
#include <map>
#include <string>

#include "tests/bench/programs.hpp"

namespace heatledger::bench {
namespace {

/// Prints as usual and keeps the counters.
class Keeping : public benchmark::ConsoleReporter {
 public:
  void ReportRuns(const std::vector<Run>& runs) override {
    for (const Run& run : runs) {
      std::string name = run.run_name.function_name;
      if (!run.aggregate_name.empty()) name += "_" + run.aggregate_name;
      for (const auto& counter : run.counters) kept_[name][counter.first] = counter.second.value;
    }
    ConsoleReporter::ReportRuns(runs);
  }
  /// 0: not measured
  double counter(const std::string& benchmark, const std::string& name) const {
    const auto found = kept_.find(benchmark);
    if (found == kept_.end()) return 0;
    const auto value = found->second.find(name);
    return value == found->second.end() ? 0 : value->second;
  }

 private:
  std::map<std::string, std::map<std::string, double>> kept_;
};

void print_load(const char* when) {
  double load[1] = {0};
  if (::getloadavg(load, 1) == 1) std::printf("load average %s: %.1f\n", when, load[0]);
}

void print_smiles(const Keeping& kept) {
  const auto rate = [&](const char* of) {
    return kept.counter(std::string("SmilesToTally_") + of + "_median", "molecules/s");
  };
  const double ours = rate("Heatledger"), rdkit = rate("Rdkit"), open_babel = rate("OpenBabel");
  if (ours == 0 || rdkit == 0 || open_babel == 0) return;
  std::printf("\nSMILES to bond tally, the same 2,000 molecules on one core      (aim: 30 times RDKit)\n");
  std::printf(
      "  %-14s %12.0f molecules/s\n  %-14s %12.0f  %6.1f times slower\n  %-14s %12.0f  %6.1f times slower\n",
      "Heatledger", ours, "RDKit", rdkit, ours / rdkit, "Open Babel", open_babel, ours / open_babel);
}

void print_bulk() {
  const std::vector<BulkFigure> figures = bulk_figures();
  if (figures.empty()) return;
  std::printf(
      "\nheatledger bulk, four species, short answers (aim: average 100,000 a second, memory the same for "
      "any\n"
      "number of lines; context 2,000 a second)\n  %-46s %9s %12s %24s %16s %10s\n",
      "", "lines", "a second", "(least to most)", "a CPU second", "peak kB");
  for (const BulkFigure& figure : figures) {
    char range[40];
    std::snprintf(range, sizeof range, "(%.0f to %.0f)", figure.least, figure.most);
    std::printf("  %-46s %9d %12.0f %24s %16.0f %10ld\n", figure.what.c_str(), figure.lines,
                figure.per_second, range, figure.per_cpu_second, figure.kilobytes);
  }
}

void print_sheet() {
  static const std::map<std::string, const char*> kAims{
      {"sheet, first of the program", "100 ms"},
      {"sheet, first computation", "100 ms"},
      {"one equation edited: results", "1 ms"},
      {"bond value in 20 ledgers edited: results", "1 ms"},
      {"one equation edited: page and its changes", "1 ms"},
      {"fit of all five properties, structures counted anew", "600, 1500 ms"},
      {"one estimate with ±, counting included", "0.2, aim 0.05 ms"}};
  const std::vector<SheetTime> native = sheet_times(HEATLEDGER_SHEET_TIMES);
  const std::string module = HEATLEDGER_SHEET_TIMES_WASM;
  std::vector<SheetTime> wasm;
  if (std::filesystem::exists(module)) wasm = sheet_times("node --no-experimental-fetch " + module);
  std::printf(
      "\nSheet of 20 reactions and 60 species [ms]: native, WebAssembly under node (aim: at most twice)\n");
  std::printf("  %-55s %9s %9s %9s %9s %7s  %s\n", "", "median", "least", "wasm med.", "least", "times",
              "aim");
  for (std::size_t i = 0; i < native.size(); ++i) {
    const auto aim = kAims.find(native[i].name);
    std::printf("  %-55s %9.3f %9.3f", native[i].name.c_str(), native[i].median, native[i].least);
    if (i < wasm.size()) {
      std::printf(" %9.3f %9.3f %7.2f", wasm[i].median, wasm[i].least, wasm[i].least / native[i].least);
    } else {
      std::printf(" %9s %9s %7s", "-", "-", "-");
    }
    std::printf("  %s\n", aim == kAims.end() ? "" : aim->second);
  }
  if (wasm.empty())
    std::printf(
        "  No WebAssembly build: cmake --preset wasm -DHEATLEDGER_BENCH=ON && cmake --build --preset wasm "
        "--target sheet_times\n");
}

}  // namespace
}  // namespace heatledger::bench

int main(int argc, char** argv) {
  using namespace heatledger::bench;
  const bool all = argc == 1;
  benchmark::Initialize(&argc, argv);
  print_load("at the beginning");
  Keeping kept;
  benchmark::RunSpecifiedBenchmarks(&kept);
  if (!all) return 0;
  print_smiles(kept);
  print_sheet();
  print_bulk();
  print_load("at the end");
  return 0;
}
