// The routes to a reaction enthalpy side by side, the one taken, and where two of them part.
#pragma once

#include "core/balance/figures.hpp"

namespace heatledger::balance {

/// Fills `routes`, `taken` and the notes about them of a ledger whose background, rows and corrections stand.
/// @param entries  one for each row of the ledger
/// @errors ledger.measured_per
Status add_routes(Ledger& ledger, const std::vector<Entry>& entries, const BondSums& sums,
                  const LedgerOptions& options);

/// The routes that no bond set changes, from the figures and sums of a background.
Route formation_route(const Background& background);
Route context_route(const Background& background);
/// A note on the figures of the formation route that no table has; empty: there are none.
std::string estimates_of(const Background& background);

}  // namespace heatledger::balance
