#include "core/balance/background.hpp"

#include <utility>

#include "core/balance/bond_words.hpp"
#include "core/balance/context_rows.hpp"
#include "core/balance/disagreement.hpp"
#include "core/balance/routes.hpp"
#include "core/balance/table_notes.hpp"
#include "core/balance/temperature.hpp"
#include "core/thermo/estimated.hpp"

namespace heatledger::balance {
namespace {

using molecule::Phase;

Correction phase_correction(const Reaction& reaction, std::size_t index, Phase phase,
                            const LedgerOptions& options, std::vector<std::string>& cautions) {
  const ReactionSpecies& entry = reaction.species[index];
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
void note_phases(Background& background) {
  std::string gas, other;
  for (const LedgerRow& row : background.rows) {
    const ReactionSpecies& entry = background.reaction->species[row.species];
    if (entry.term.phase != Phase::Unstated) continue;
    if (entry.species->repeat_unit) {
      background.phase_cautions.push_back(
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
  background.opening_notes.push_back(text + ". Write (g), (l), (s) or (aq) behind the name.");
}

}  // namespace

const estimate::Explanation* Explanations::of(const Reaction& reaction, std::size_t index,
                                              const estimate::Observations* observations) const {
  made_.resize(reaction.species.size());
  std::optional<Result<estimate::Explanation>>& one = made_[index];
  if (!one) one.emplace(explain_in_context(*reaction.species[index].species, observations));
  return one->ok() ? &**one : nullptr;
}

bool Background::fits(const std::shared_ptr<const Reaction>& of, const LedgerOptions& options) const {
  return reaction == of && observations == options.observations && context == options.context &&
         context_rows == options.context_rows && reactants_at == options.reactants_at &&
         products_at == options.products_at;
}

std::vector<Entry> entries_of(const Background& background, const std::vector<PricedSpecies>& priced) {
  const std::vector<ReactionSpecies>& species = background.reaction->species;
  std::vector<Entry> entries(species.size());
  for (std::size_t i = 0; i < species.size(); ++i) {
    entries[i].coefficient = species[i].coefficient();
    entries[i].product = species[i].product;
    entries[i].figures = &background.figures[i];
    entries[i].priced = &priced[i];
  }
  return entries;
}

std::shared_ptr<const Background> make_background(std::shared_ptr<const Reaction> reaction,
                                                  const LedgerOptions& options) {
  auto made = std::make_shared<Background>();
  Background& background = *made;
  background.reaction = std::move(reaction);
  background.observations = options.observations;
  background.context = options.context;
  background.context_rows = options.context_rows;
  background.reactants_at = options.reactants_at;
  background.products_at = options.products_at;
  const estimate::Observations* observations = options.observations.get();
  const std::vector<ReactionSpecies>& species = background.reaction->species;
  for (std::size_t i = 0; i < species.size(); ++i) {
    background.figures.push_back(
        species_figures(*species[i].species, species[i].term, options.context, observations));
    const SpeciesFigures& figures = background.figures.back();
    background.gas_atoms.push_back(gas_atoms_in_context(*species[i].species));
    PricedSpecies priced;
    priced.phase = figures.phase;
    if (!figures.by_bonds) priced = price_species(*species[i].species, species[i].term, *options.set);
    background.rows.push_back(options.context_rows
                                  ? describe_context_row(species[i], i, figures, observations)
                                  : start_row(species[i], i, priced, figures.by_bonds));
    background.priced.push_back(std::move(priced));
    if (figures.corrected)
      background.corrections.push_back(
          phase_correction(*background.reaction, i, figures.phase, options, background.phase_cautions));
    if (!species[i].species->note.empty()) background.opening_notes.push_back(species[i].species->note);
  }
  if (!background.reaction->checkable)
    background.opening_notes.emplace_back("Element balance not checkable: a species has no formula.");
  note_phases(background);
  const std::vector<Entry> entries = entries_of(background, background.priced);
  background.sums = other_sums(entries);
  background.formation = formation_route(background);
  if (options.context == ContextUse::Always) background.by_context = context_route(background);
  background.estimated_note = estimates_of(background);
  background.context_apart = context_apart(background);
  note_tables(background);
  if (options.reactants_at || options.products_at) bring_to_temperatures(background);
  return made;
}

}  // namespace heatledger::balance
