// Puts a ledger together: rows, totals, corrections, routes, notes.
#include "core/balance/ledger.hpp"

#include <algorithm>
#include <cmath>
#include <map>
#include <string>

#include "core/balance/bond_words.hpp"
#include "core/balance/context_rows.hpp"
#include "core/balance/disagreement.hpp"
#include "core/balance/figures.hpp"
#include "core/balance/proposals.hpp"
#include "core/balance/routes.hpp"
#include "core/balance/table_notes.hpp"
#include "core/balance/temperature.hpp"
#include "core/base/check.hpp"
#include "core/thermo/estimated.hpp"

namespace heatledger::balance {
namespace {

using molecule::Phase;
using uncertainty::Quantity;

Correction phase_correction(const Reaction& reaction, std::size_t index, const SpeciesFigures& figures,
                            const LedgerOptions& options, std::vector<std::string>& cautions) {
  const ReactionSpecies& entry = reaction.species[index];
  const Phase phase = figures.priced.phase;
  Correction correction;
  correction.species = index;
  correction.times = entry.coefficient();
  const std::string gas = "gas", other(thermo::phase_word(phase));
  correction.what =
      display_species(entry) + ", " + (entry.product ? gas + " to " + other : other + " to " + gas);
  if (correction.times != 1) correction.what += ", " + times_text(correction.times) + " ×";
  const Result<thermo::Sourced> change =
      options.context != ContextUse::Never
          ? thermo::best_gas_to_phase(*entry.species, phase, entry.term.strength, options.observations.get())
          : thermo::gas_to_phase(*entry.species, phase, entry.term.strength);
  if (!change.ok()) {
    correction.why_not = change.error().message;
    return correction;
  }
  const double times = entry.product ? correction.times : -correction.times;
  correction.value = change->value.scaled(times);
  correction.source = change->source;
  correction.working = change->working;
  correction.working.push_back(times_text(correction.times) + " × " +
                               fine_kj((entry.product ? 1 : -1) * change->value.value()) + " = " +
                               fine_kj(correction.value->value()) + " kJ");
  cautions.insert(cautions.end(), change->cautions.begin(), change->cautions.end());
  return correction;
}

/// One note for all phases that nobody wrote.
void note_phases(Ledger& ledger) {
  std::string gas, other;
  for (const LedgerRow& row : ledger.rows) {
    const ReactionSpecies& entry = ledger.reaction->species[row.species];
    if (entry.term.phase != Phase::Unstated) continue;
    if (entry.species->repeat_unit) {
      ledger.cautions.push_back(
          display_species(entry) +
          " is a unit of a polymer and its phase is not written: it is reckoned in chains apart, as in a "
          "gas, "
          "which no polymer is. Write (l) behind it: a melt, a glass or what is dissolved in its monomer.");
      continue;
    }
    if (row.phase == Phase::Gas) {
      gas += (gas.empty() ? "" : ", ") + display_species(entry);
    } else {
      other += (other.empty() ? "" : ", ") + display_species(entry) + " as " +
               std::string(thermo::phase_word(row.phase));
    }
  }
  if (gas.empty() && other.empty()) return;
  std::string text = "No phase is written: ";
  if (!gas.empty()) text += gas + " taken as gas";
  if (!other.empty()) text += (gas.empty() ? "" : "; ") + other;
  ledger.notes.push_back(text + ". Write (g), (l), (s) or (aq) behind the name.");
}

/// Whether every bond broken is formed again: the bonds then cancel by kind and say nothing of the reaction.
bool bonds_cancel(const Ledger& ledger) {
  std::map<std::string, double> net;
  for (const LedgerRow& row : ledger.rows) {
    if (row.route != RowRoute::Bonds || row.lines.empty()) return false;
    const ReactionSpecies& entry = ledger.reaction->species[row.species];
    const double times = entry.product ? -entry.coefficient() : entry.coefficient();
    for (const BondLine& line : row.lines) {
      net[molecule::spelling(line.type)] += times * line.count;
      if (line.second) net[molecule::spelling(line.second->type)] += times * line.second->count;
    }
  }
  return std::all_of(net.begin(), net.end(), [](const auto& bond) { return std::fabs(bond.second) < 1e-9; });
}

void note_set(Ledger& ledger) {
  if (ledger.in_context) {
    ledger.notes.emplace_back(
        "Rows by bonds in context: each line is a bond in its surroundings, its base value and what the "
        "surroundings add; rings, neighbours and the molecule's own deviation stand on lines of their own. ± "
        "is "
        "that of the estimate; what both sides share cancels in the sums.");
    return;
  }
  bool priced = false, typed = false;
  for (const LedgerRow& row : ledger.rows) {
    for (const BondLine& line : row.lines) {
      priced = priced || line.price != nullptr;
      typed = typed || (line.price != nullptr && line.price->origin == estimate::BondOrigin::User) ||
              (line.second && line.second->price != nullptr &&
               line.second->price->origin == estimate::BondOrigin::User);
    }
  }
  if (priced && bonds_cancel(ledger))
    ledger.notes.emplace_back(
        "Every bond broken is formed again, so average bonds give zero whatever their values, and their ± "
        "says "
        "nothing of the heat that differing surroundings leave. Go by another route.");
  if (priced) ledger.notes.emplace_back(estimate::BondSet::spread_remark());
  if (typed)
    ledger.notes.emplace_back("Typed bond values act in this ledger; the lines that use them say so.");
}

}  // namespace

Quantity on_basis(const Quantity& quantity, const Basis& basis) {
  return quantity.scaled(basis.factor);
}

Result<Ledger> make_ledger(std::shared_ptr<const Reaction> reaction, const LedgerOptions& options) {
  CHECK(reaction != nullptr && options.set != nullptr, "a ledger has a reaction and a bond set");
  CHECK(!options.context_rows || options.context == ContextUse::Always, "rows in context need the estimates");
  if (reaction->checkable && !reaction->balance.balanced) return not_balanced(*reaction);
  if (!options.pinned_route.empty() && options.pinned_route != kAverageRoute &&
      options.pinned_route != kFormationRoute && options.pinned_route != kContextRoute &&
      options.pinned_route != kMeasuredRoute && options.pinned_route != kOtherMeasuredRoute) {
    return Error{"ledger.route_unknown", "There is no route \"" + options.pinned_route + "\".",
                 "pinned_route", "Choose average, context, formation or measured, or leave it empty."};
  }
  Result<Basis> basis = find_basis(*reaction, options.basis);
  if (!basis.ok()) return basis.error();

  Ledger ledger;
  ledger.reaction = std::move(reaction);
  ledger.set = options.set;
  ledger.basis = std::move(basis).value();
  ledger.in_context = options.context_rows;
  ledger.observations = options.observations;
  ledger.reactants_at = options.reactants_at;
  ledger.products_at = options.products_at;
  const std::vector<ReactionSpecies>& species = ledger.reaction->species;
  std::vector<SpeciesFigures> figures;
  figures.reserve(species.size());
  std::vector<Entry> entries(species.size());
  for (std::size_t i = 0; i < species.size(); ++i) {
    figures.push_back(species_figures(*species[i].species, species[i].term, *options.set, options.context,
                                      options.observations.get()));
    entries[i].coefficient = species[i].coefficient();
    entries[i].product = species[i].product;
    entries[i].figures = &figures[i];
    ledger.rows.push_back(options.context_rows
                              ? describe_context_row(species[i], i, figures[i], options.observations.get())
                              : describe_row(species[i], i, figures[i].priced, *options.set));
    if (figures[i].corrected)
      ledger.corrections.push_back(
          phase_correction(*ledger.reaction, i, figures[i], options, ledger.cautions));
    if (!species[i].species->note.empty()) ledger.notes.push_back(species[i].species->note);
  }
  const EquationFigures sums = add_up(entries);
  ledger.broken = options.context_rows ? sums.context_broken : sums.broken;
  ledger.formed = options.context_rows ? sums.context_formed : sums.formed;
  ledger.gas_298 = options.context_rows ? sums.context_gas_298 : sums.gas_298;
  ledger.as_written = options.context_rows ? sums.context_as_written : sums.as_written;
  if (!ledger.reaction->checkable)
    ledger.notes.emplace_back("Element balance not checkable: a species has no formula.");
  note_phases(ledger);
  if (const Status status = add_routes(ledger, entries, sums, options); !status.ok()) return status.error();
  note_disagreements(ledger, entries);
  note_tables(ledger);
  if (options.reactants_at || options.products_at) run_at_temperatures(ledger, options);
  if (options.pressure) note_pressure(ledger, *options.pressure);
  note_set(ledger);
  return ledger;
}

Ledger ledger_rows(std::shared_ptr<const Reaction> reaction, const LedgerOptions& options) {
  CHECK(reaction != nullptr && options.set != nullptr, "a ledger has a reaction and a bond set");
  Ledger ledger;
  ledger.reaction = std::move(reaction);
  ledger.set = options.set;
  ledger.in_context = options.context_rows;
  ledger.observations = options.observations;
  const std::vector<ReactionSpecies>& species = ledger.reaction->species;
  for (std::size_t i = 0; i < species.size(); ++i) {
    const SpeciesFigures figures = species_figures(*species[i].species, species[i].term, *options.set,
                                                   options.context_rows ? options.context : ContextUse::Never,
                                                   options.observations.get());
    ledger.rows.push_back(options.context_rows
                              ? describe_context_row(species[i], i, figures, options.observations.get())
                              : describe_row(species[i], i, figures.priced, *options.set));
  }
  return ledger;
}

}  // namespace heatledger::balance
