// How long a person waits for a sheet of twenty reactions, and for the fits and estimates behind it. A
// program of its own without a benchmark library, so that the same source runs natively and, compiled to
// WebAssembly, under node; and what happens once in a program, reading tables and fitting, is met here for
// the first time. Prints lines of: name, median, least [ms], tabs between. On a busy machine only the least
// tells.
#include <algorithm>
#include <chrono>
#include <cstdint>
#include <cstdio>
#include <functional>
#include <string>
#include <vector>

#include "core/base/check.hpp"
#include "core/document/computation.hpp"
#include "core/estimate/context_store.hpp"
#include "core/molecule/smiles.hpp"
#include "core/page/page_json.hpp"
#include "core/page/session.hpp"
#include "core/page/writers.hpp"
#include "tests/bench/twenty_reactions.hpp"

namespace heatledger::bench {
namespace {

double milliseconds() {
  const auto now = std::chrono::steady_clock::now().time_since_epoch();
  return std::chrono::duration<double, std::milli>(now).count();
}

/// Runs `once` with the number of the turn and prints a line.
/// @param each  what one turn does this many times
void measure(const char* name, std::size_t turns, const std::function<void(std::size_t)>& once,
             double each = 1) {
  std::vector<double> times;
  for (std::size_t turn = 0; turn < turns; ++turn) {
    const double begin = milliseconds();
    once(turn);
    times.push_back((milliseconds() - begin) / each);
  }
  std::sort(times.begin(), times.end());
  std::printf("%s\t%.5f\t%.5f\n", name, times[times.size() / 2], times.front());
  std::fflush(stdout);
}

document::Worksheet sheet() {
  document::Worksheet sheet;
  for (const char* equation : twenty_reactions) {
    document::ReactionSheet reaction;
    reaction.id = "r" + std::to_string(sheet.reactions.size() + 1);
    reaction.equation = equation;
    sheet.reactions.push_back(document::Shared<document::ReactionSheet>(std::move(reaction)));
  }
  return sheet;
}

page::Session session() {
  page::Session session;
  CHECK(session.edit("r1.equation", twenty_reactions[0]).ok(), "the first reaction is typed");
  for (std::size_t i = 1; i < twenty_reactions.size(); ++i) {
    CHECK(session.command("add_reaction", {{"equation", twenty_reactions[i]}}).ok(), "a reaction is added");
  }
  return session;
}

/// A balanced equation with coefficients of its own for each turn, so that no result is remembered.
std::string hydrogenation(std::size_t turn) {
  const auto times = [&](std::size_t factor) { return std::to_string(factor * (2 + turn)) + " "; };
  return times(1) + "nitrobenzene(l) + " + times(3) + "H2(g) -> " + times(1) + "aniline(l) + " + times(2) +
         "H2O(l)";
}

/// A bond value of its own for each turn.
std::string bond_value(std::size_t turn) {
  return std::to_string(400 + turn % 20) + "." + std::to_string(turn + 1);
}

/// Forty gases in one feed, adiabatic, outlet temperature sought: every edit also draws 10,000 times.
page::Session forty_species() {
  const char* const gases[] = {
      "methane",          "ethane",         "propane",         "butane",         "isobutane",
      "pentane",          "hexane",         "heptane",         "octane",         "ethene",
      "propene",          "1-butene",       "benzene",         "toluene",        "ethylbenzene",
      "styrene",          "methanol",       "ethanol",         "acetone",        "1-propanol",
      "2-propanol",       "acetaldehyde",   "formaldehyde",    "dimethyl ether", "ammonia",
      "diethyl ether",    "hydrogen",       "nitrogen",        "oxygen",         "argon",
      "chlorine",         "carbon dioxide", "carbon monoxide", "water",          "sulfur dioxide",
      "hydrogen sulfide", "acetylene",      "nitric oxide",    "nitrous oxide",  "hydrogen chloride"};
  page::Session session;
  const auto type = [&](const std::string& cell, const std::string& text) {
    CHECK(session.edit(cell, text).ok(), "a step is typed");
  };
  type("r1.equation", "CO(g) + H2O(g) -> CO2(g) + H2(g)");
  type("steps.add.f", "");
  std::size_t row = 0;
  for (const char* gas : gases) {
    const std::string cell = "s1.feed.0.row." + std::to_string(row++);
    type(cell + ".species", std::string(gas) + "(g)");
    type(cell + ".amount", "1 kmol/h");
  }
  type("s1.feed.0.at", "320 °C");
  type("s1.reaction.0.reaction", "r1");
  type("s1.reaction.0.how", "conversion of CO");
  type("s1.blank.duty", "0 kW");
  type("s1.sought", "outlet or end temperature");
  return session;
}

void steps() {
  page::Session session = forty_species();
  measure("step of forty species, edit to page with 10,000 draws", 20, [&](std::size_t turn) {
    const Status done = session.edit("s1.reaction.0.figure", std::to_string(40 + turn) + " %");
    CHECK(done.ok() && !session.page().blocks.empty(), "a conversion is typed");
  });
}

void sheets() {
  const document::Worksheet twenty = sheet();
  measure("sheet, first of the program", 1, [&](std::size_t) { document::Calculator().compute(twenty); });
  measure("sheet, first computation", 30, [&](std::size_t) { document::Calculator().compute(twenty); });

  document::Calculator calculator;
  calculator.compute(twenty);
  document::Worksheet edited = twenty;
  measure("one equation edited: results", 300, [&](std::size_t turn) {
    document::ReactionSheet reaction = *edited.reactions[0];
    reaction.equation = hydrogenation(turn);
    edited.reactions[0] = document::Shared<document::ReactionSheet>(std::move(reaction));
    calculator.compute(edited);
  });
  measure("bond value in 20 ledgers edited: results", 100, [&](std::size_t turn) {
    document::TypedBond bond;
    bond.bond = "C-H";
    bond.value = bond_value(turn);
    edited.typed_bonds = document::Shared<document::TypedBonds>(document::TypedBonds{bond});
    calculator.compute(edited);
  });

  page::Session open = session();
  std::uint64_t seen = open.page().revision;
  const auto changes = [&] {
    const page::Page& page = open.page();
    const std::string json = page::write_changes(page, seen, seen >= open.order_changed());
    seen = page.revision;
    CHECK(!json.empty(), "changes are written");
  };
  measure("one equation edited: page and its changes", 300, [&](std::size_t turn) {
    CHECK(open.edit("r1.equation", hydrogenation(turn)).ok(), "an edit is taken");
    changes();
  });
  CHECK(open.command("add_bond", {{"bond", "C-H"}, {"value", "413"}}).ok(), "a bond value is typed");
  measure("bond value in 20 ledgers edited: page and its changes", 100, [&](std::size_t turn) {
    CHECK(open.edit("bond.0.value", bond_value(turn)).ok(), "an edit is taken");
    changes();
  });
  measure("whole page as JSON", 30,
          [&](std::size_t) { CHECK(!page::write_json(open.page()).empty(), "a page is written"); });
}

void fits() {
  using namespace estimate;
  measure("fit of all five properties, structures counted anew", 5, [](std::size_t) {
    for (const TrainingCompound& compound : training_compounds())
      CHECK(context_molecule(*molecule::parse_smiles(compound.smiles)).ok(), "a structure of the model");
    for (std::size_t kind = 0; kind < fit_kind_count; ++kind)
      CHECK(fit_embedded(static_cast<FitKind>(kind)).fit->unknowns() > 0, "a fit");
  });
  std::vector<molecule::Graph> graphs;
  for (std::size_t i = 0; i < training_compounds().size(); i += 5)
    graphs.push_back(*molecule::parse_smiles(training_compounds()[i].smiles));
  measure(
      "one estimate with ±, counting included", 9,
      [&](std::size_t) {
        for (const molecule::Graph& graph : graphs) {
          const Result<ContextMolecule> counted = context_molecule(graph);
          CHECK(ContextModel::embedded().predict(Property::GasFormation, *counted).ok(), "an estimate");
        }
      },
      static_cast<double>(graphs.size()));
}

}  // namespace
}  // namespace heatledger::bench

int main() {
  heatledger::bench::sheets();
  heatledger::bench::steps();
  heatledger::bench::fits();
  return 0;
}
