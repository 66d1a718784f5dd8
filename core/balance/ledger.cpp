// Puts a ledger together: rows, totals, corrections, routes, notes.
#include "core/balance/ledger.hpp"

#include <algorithm>
#include <cmath>
#include <map>
#include <string>

#include "core/balance/background.hpp"
#include "core/balance/context_rows.hpp"
#include "core/balance/disagreement.hpp"
#include "core/balance/figures.hpp"
#include "core/balance/proposals.hpp"
#include "core/balance/routes.hpp"
#include "core/balance/table_notes.hpp"
#include "core/balance/temperature.hpp"
#include "core/base/check.hpp"

namespace heatledger::balance {
namespace {

using uncertainty::Quantity;

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

std::vector<PricedSpecies> price(const Background& background, const estimate::BondSet& set) {
  std::vector<PricedSpecies> priced = background.priced;
  for (std::size_t i = 0; i < priced.size(); ++i) {
    if (background.figures[i].by_bonds)
      priced[i] = price_by_bonds(*background.reaction->species[i].species, priced[i].phase, set);
  }
  return priced;
}

std::vector<LedgerRow> rows_of(const Background& background, const std::vector<PricedSpecies>& priced,
                               const estimate::BondSet& set) {
  if (background.context_rows) return background.rows;
  std::vector<LedgerRow> rows;
  rows.reserve(background.rows.size());
  for (std::size_t i = 0; i < background.rows.size(); ++i) {
    const LedgerRow& begun = background.rows[i];
    rows.push_back(background.figures[i].by_bonds
                       ? add_bonds(begun, background.reaction->species[i], priced[i], set)
                       : begun);
  }
  return rows;
}

void append(std::vector<std::string>& to, const std::vector<std::string>& from) {
  to.insert(to.end(), from.begin(), from.end());
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

  const std::shared_ptr<const Background> background =
      options.background != nullptr && options.background->fits(reaction, options)
          ? options.background
          : make_background(reaction, options);
  Ledger ledger;
  ledger.reaction = std::move(reaction);
  ledger.set = options.set;
  ledger.basis = std::move(basis).value();
  ledger.in_context = options.context_rows;
  ledger.observations = options.observations;
  ledger.reactants_at = options.reactants_at;
  ledger.products_at = options.products_at;
  ledger.corrections = background->corrections;
  ledger.notes = background->opening_notes;
  ledger.cautions = background->phase_cautions;
  ledger.background = background;
  const std::vector<PricedSpecies> priced = price(*background, *options.set);
  ledger.rows = rows_of(*background, priced, *options.set);
  const std::vector<Entry> entries = entries_of(*background, priced);
  const OtherSums& others = background->sums;
  const BondSums bonds = bond_sums(entries);
  ledger.broken = options.context_rows ? others.context_broken : bonds.broken;
  ledger.formed = options.context_rows ? others.context_formed : bonds.formed;
  ledger.gas_298 = options.context_rows ? others.context_gas_298 : bonds.gas_298;
  ledger.as_written = options.context_rows ? others.context_as_written : bonds.as_written;
  if (const Status status = add_routes(ledger, entries, bonds, options); !status.ok()) return status.error();
  note_disagreements(ledger, entries);
  append(ledger.notes, background->table_notes);
  append(ledger.cautions, background->table_cautions);
  if (options.reactants_at || options.products_at) run_at_temperatures(ledger);
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
    if (options.context_rows) {
      const SpeciesFigures figures =
          species_figures(*species[i].species, species[i].term, options.context, options.observations.get());
      ledger.rows.push_back(describe_context_row(species[i], i, figures, options.observations.get()));
      continue;
    }
    const PricedSpecies priced = price_species(*species[i].species, species[i].term, *options.set);
    const bool by_bonds = reachable_by_bonds(*species[i].species, priced.phase);
    LedgerRow row = start_row(species[i], i, priced, by_bonds);
    ledger.rows.push_back(by_bonds ? add_bonds(std::move(row), species[i], priced, *options.set)
                                   : std::move(row));
  }
  return ledger;
}

}  // namespace heatledger::balance
