// A sheet of 20 reactions over 60 species: first computation, an edit with everything it makes anew, size of
// the page.
#include <benchmark/benchmark.h>

#include <array>
#include <string>

#include "core/base/check.hpp"
#include "core/document/computation.hpp"
#include "core/page/page_json.hpp"
#include "core/page/session.hpp"
#include "core/page/writers.hpp"

namespace heatledger {
namespace {

/// Sixty species of the library and of plain SMILES; three of them new in each reaction.
constexpr std::array<const char*, 20> kEquations{
    "nitrobenzene(l) + 3 H2(g) -> aniline(l) + 2 H2O(l)",
    "toluene(l) + Cl2(g) -> benzyl chloride(l) + HCl(g)",
    "acetic acid(l) + ethanol(l) -> ethyl acetate(l) + water(l)",
    "methanol(g) + 3/2 O2(g) -> CO2(g) + 2 H2O(g)",
    "acetone(l) + H2(g) -> 2-propanol(l)",
    "ethylene(g) + HBr(g) -> \"CCBr\"(g)",
    "propane(g) -> propylene(g) + H2(g)",
    "\"CCCC=C\"(l) + H2(g) -> \"CCCCC\"(l)",
    "benzene(l) + 3 H2(g) -> cyclohexane(l)",
    "phenol(l) + \"CC(=O)Cl\"(l) -> \"CC(=O)Oc1ccccc1\"(l) + HCl(g)",
    "\"CCC=O\"(l) + H2(g) -> \"CCCO\"(l)",
    "\"C1CC1\"(g) -> \"CC=C\"(g)",
    "\"CCN\"(g) + \"CC(=O)O\"(l) -> \"CCNC(C)=O\"(l) + H2O(l)",
    "\"C=CC=C\"(g) + \"C=C\"(g) -> \"C1=CCCCC1\"(l)",
    "\"CC#N\"(l) + 2 H2(g) -> \"CCN\"(g)",
    "\"C1CO1\"(g) + H2O(l) -> \"OCCO\"(l)",
    "\"CS\"(g) + \"CO\"(l) -> \"CSC\"(l) + H2O(l)",
    "\"Clc1ccccc1\"(l) + \"O\"(l) -> \"Oc1ccccc1\"(s) + HCl(g)",
    "\"CC(C)O\"(l) + \"CCC(=O)O\"(l) -> \"CCC(=O)OC(C)C\"(l) + H2O(l)",
    "\"COC(C)(C)C\"(l) -> \"CC(C)=C\"(g) + \"CO\"(l)"};

document::Worksheet sheet() {
  document::Worksheet sheet;
  for (std::size_t i = 0; i < kEquations.size(); ++i) {
    document::ReactionSheet reaction;
    reaction.id = "r" + std::to_string(i + 1);
    reaction.equation = kEquations[i];
    sheet.reactions.push_back(document::Shared<document::ReactionSheet>(std::move(reaction)));
  }
  return sheet;
}

page::Session session() {
  page::Session session;
  CHECK(session.edit("r1.equation", kEquations[0]).ok(), "the first reaction is typed");
  for (std::size_t i = 1; i < kEquations.size(); ++i) {
    CHECK(session.command("add_reaction", {{"equation", kEquations[i]}}).ok(), "a reaction is added");
  }
  return session;
}

/// A balanced equation with coefficients of its own for each turn, so that no result is remembered.
std::string hydrogenation(std::size_t turn) {
  const auto times = [&](std::size_t factor) { return std::to_string(factor * (1 + turn)) + " "; };
  return times(1) + "nitrobenzene(l) + " + times(3) + "H2(g) -> " + times(1) + "aniline(l) + " + times(2) +
         "H2O(l)";
}

/// The first sheet of a program: reads the library and fits what is fitted at first use. One turn, and it
/// must run before every other benchmark of this file.
void sheet_first_of_the_program(benchmark::State& state) {
  const document::Worksheet twenty = sheet();
  for (auto _ : state) benchmark::DoNotOptimize(document::Calculator().compute(twenty));
}
BENCHMARK(sheet_first_of_the_program)->Iterations(1)->Unit(benchmark::kMillisecond);

/// A new calculator each time: equations read, species built, ledgers made. What a program does once, reading
/// the library and fitting at first use, has its own benchmark above.
void sheet_first_computation(benchmark::State& state) {
  const document::Worksheet twenty = sheet();
  document::Calculator().compute(twenty);
  for (auto _ : state) {
    document::Calculator calculator;  // no species cached
    benchmark::DoNotOptimize(calculator.compute(twenty));
  }
}
BENCHMARK(sheet_first_computation)->Unit(benchmark::kMillisecond);

/// A new equation over known species each time: read, balanced, priced, put on the page.
void sheet_edit_equation(benchmark::State& state) {
  page::Session edited = session();
  (void)edited.page();
  std::size_t turn = 0;
  for (auto _ : state) {
    ++turn;
    CHECK(edited.edit("r1.equation", hydrogenation(turn)).ok(), "an edit is taken");
    benchmark::DoNotOptimize(edited.page());
  }
}
BENCHMARK(sheet_edit_equation)->Unit(benchmark::kMicrosecond);

/// The same with its answer as JSON: what one key press costs the browser's core.
void sheet_edit_with_changes_as_json(benchmark::State& state) {
  page::Session edited = session();
  std::uint64_t seen = edited.page().revision;
  std::size_t turn = 0, bytes = 0;
  for (auto _ : state) {
    ++turn;
    CHECK(edited.edit("r1.equation", hydrogenation(turn)).ok(), "an edit is taken");
    const page::Page& page = edited.page();
    const std::string json = page::write_changes(page, seen, seen >= edited.order_changed());
    seen = page.revision;
    bytes = json.size();
  }
  state.counters["bytes"] = static_cast<double>(bytes);
}
BENCHMARK(sheet_edit_with_changes_as_json)->Unit(benchmark::kMicrosecond);

/// A typed bond value reaches every ledger that prices it.
void sheet_edit_bond_value(benchmark::State& state) {
  page::Session edited = session();
  CHECK(edited.command("add_bond", {{"bond", "C-H"}, {"value", "413"}}).ok(), "a bond value is typed");
  std::size_t turn = 0;
  for (auto _ : state) {
    ++turn;
    CHECK(edited.edit("bond.0.value", std::to_string(400 + turn % 20) + "." + std::to_string(turn)).ok(),
          "taken");
    benchmark::DoNotOptimize(edited.page());
  }
}
BENCHMARK(sheet_edit_bond_value)->Unit(benchmark::kMicrosecond);

void sheet_whole_page_as_json(benchmark::State& state) {
  page::Session whole = session();
  std::size_t bytes = 0;
  for (auto _ : state) {
    const std::string json = page::write_json(whole.page());
    bytes = json.size();
    benchmark::DoNotOptimize(json.data());
  }
  state.counters["bytes"] = static_cast<double>(bytes);
}
BENCHMARK(sheet_whole_page_as_json)->Unit(benchmark::kMicrosecond);

}  // namespace
}  // namespace heatledger
