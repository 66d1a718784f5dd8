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

/// Adds what the sheet shows: bond lines, table value, remarks, working.
LedgerRow describe_row(const ReactionSpecies& entry, std::size_t index, const PricedSpecies& priced,
                       const estimate::BondSet& set);

}  // namespace heatledger::balance
