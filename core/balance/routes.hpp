// The routes to a reaction enthalpy side by side, the one taken, and where two of them part.
#pragma once

#include "core/balance/figures.hpp"

namespace heatledger::balance {

/// Fills `routes`, `taken` and the notes about them.
/// @param entries  one for each row of the ledger
/// @errors ledger.measured_per
Status add_routes(Ledger& ledger, const std::vector<Entry>& entries, const EquationFigures& sums,
                  const LedgerOptions& options);

}  // namespace heatledger::balance
