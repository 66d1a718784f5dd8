#include "core/balance/table_notes.hpp"

#include <cmath>

#include "core/balance/bond_words.hpp"
#include "core/base/number_text.hpp"
#include "core/thermo/estimated.hpp"

namespace heatledger::balance {
namespace {

using molecule::Phase;

constexpr double kMoves = 2000;  ///< [J] for the written coefficients

const facts::Datum* formation_of(const LedgerRow& row, const facts::Compound& compound) {
  const facts::PhaseFacts* facts = row.phase == Phase::Gas      ? &compound.gas
                                   : row.phase == Phase::Liquid ? &compound.liquid
                                   : row.phase == Phase::Solid  ? &compound.solid
                                                                : nullptr;
  return facts != nullptr && facts->formation_enthalpy ? &*facts->formation_enthalpy : nullptr;
}

void note_rivals(Background& background, const LedgerRow& row) {
  const ReactionSpecies& entry = background.reaction->species[row.species];
  if (entry.species->compound == nullptr) return;
  const facts::Datum* datum = formation_of(row, *entry.species->compound);
  if (datum == nullptr) return;
  std::string others;
  for (const facts::Rival& rival : datum->rivals) {
    // What a typed figure covers is shown however near it lies.
    if (!datum->typed && std::fabs(rival.value - datum->value) * entry.coefficient() < kMoves) continue;
    others += (others.empty() ? "" : ", ") + display_number(rival.value / 1000, 1) + " (" +
              std::string(rival.source) + ")";
  }
  if (others.empty()) return;
  if (datum->typed) {
    background.table_notes.push_back(
        display_species(entry) + ", ΔfH as " + std::string(thermo::phase_word(row.phase)) + ": " +
        display_number(datum->value / 1000, 2) +
        (datum->u95 > 0 ? " ± " + display_number(datum->u95 / 1000, 2) : std::string()) + " kJ/mol (" +
        std::string(datum->source) + "), typed in place of " + others + ".");
    return;
  }
  std::string why(datum->why_taken);
  if (!why.empty() && why.back() != '.') why += '.';
  background.table_notes.push_back("Tables part on ΔfH of " + display_species(entry) + ": " +
                                   display_number(datum->value / 1000, 1) + " kJ/mol (" +
                                   std::string(datum->source) + ") is taken, not " + others + "." +
                                   (why.empty() ? "" : " " + why));
}

/// Solutions of a stated strength among the reactants, each with a solute of its own.
std::size_t solutions_mixed(const Background& background) {
  std::size_t count = 0;
  for (const ReactionSpecies& entry : background.reaction->species) {
    const bool strong =
        entry.term.strength && entry.term.strength->kind != molecule::Strength::Kind::InfiniteDilution;
    count += !entry.product && strong ? 1 : 0;
  }
  return count;
}

}  // namespace

void note_tables(Background& background) {
  if (!background.formation.as_written) return;
  for (const LedgerRow& row : background.rows) {
    note_rivals(background, row);
    if (std::optional<std::string> caution =
            thermo::crowded_chain_caution(*background.reaction->species[row.species].species))
      background.table_cautions.push_back(*std::move(caution));
  }
  if (solutions_mixed(background) > 1) {
    background.table_cautions.push_back(
        "Solutions of stated strength are mixed here. Every heat of solution is that of one solute in its "
        "own "
        "water; the heat of mixing the concentrated liquids is no line of this ledger, so the heat given off "
        "is a "
        "lower bound. Type a measured one where it matters.");
  }
}

}  // namespace heatledger::balance
