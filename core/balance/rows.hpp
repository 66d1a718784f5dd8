// One species priced: its bond lines and sum, or how else its atoms are reached.
#pragma once

#include "core/balance/ledger.hpp"

namespace heatledger::balance {

/// The row of one species apart from its coefficient and its texts: what the totals need, and no more.
struct PricedSpecies {
  RowRoute route = RowRoute::Missing;
  molecule::Phase phase = molecule::Phase::Gas;   ///< phase reckoned with
  std::optional<uncertainty::Quantity> per_mole;  ///< bond sum of one mole [J/mol]
  std::vector<molecule::BondType> missing;
};

/// @param written  the term on the sheet: its phase, Unstated included, and strength count
PricedSpecies price_species(const facts::Species& species, const molecule::Term& written,
                            const estimate::BondSet& set);

/// Whether the structure can be taken apart into neutral atoms bond by bond: no ions, no element in its solid
/// state.
bool reachable_by_bonds(const facts::Species& species, molecule::Phase phase);

/// As price_species for a species that `reachable_by_bonds` holds for, without asking again.
/// @param phase  reckoned with
PricedSpecies price_by_bonds(const facts::Species& species, molecule::Phase phase,
                             const estimate::BondSet& set);

/// What the sheet shows of a row apart from what a bond set decides: the whole row of a species that no bond
/// reaches, else its strains and what the table implies.
/// @param priced    of a species that no bond reaches; of others the phase is enough
/// @param by_bonds  see reachable_by_bonds
LedgerRow start_row(const ReactionSpecies& entry, std::size_t index, const PricedSpecies& priced,
                    bool by_bonds);

/// Adds to a row begun by start_row for a species that bonds reach: bond lines, sum, remarks, working.
LedgerRow add_bonds(LedgerRow row, const ReactionSpecies& entry, const PricedSpecies& priced,
                    const estimate::BondSet& set);

}  // namespace heatledger::balance
