// Where two routes, or two published tables, part beyond their ±: said on the sheet and located at the
// species and its bonds.
#pragma once

#include "core/balance/figures.hpp"

namespace heatledger::balance {

/// Adds a note for each pair of routes that disagree.
/// @param entries  one for each row of the ledger, whose routes are known
void note_disagreements(Ledger& ledger, const std::vector<Entry>& entries);

/// The note on bonds in context and formation enthalpies, which no bond set changes; empty: they agree.
std::string context_apart(const Background& background);

}  // namespace heatledger::balance
