// The routes to a reaction enthalpy side by side, the one taken, and where two of them part.
#pragma once

#include "core/balance/figures.hpp"

namespace heatledger::balance {

/// Fills `routes`, `taken` and the notes about them.
void add_routes(Ledger& ledger, const EquationFigures& sums, std::string_view pinned);

}  // namespace heatledger::balance
