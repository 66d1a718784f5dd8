// What to say about an equation that does not balance: which element is short, and the ways to balance it.
#pragma once

#include "core/balance/reaction.hpp"

namespace heatledger::balance {

/// Fills `proposals` and `why_unbalanced` of a checkable reaction that does not balance.
void explain_imbalance(Reaction& reaction);

/// The error `ledger.not_balanced` of such a reaction; its hint lists the proposals.
Error not_balanced(const Reaction& reaction);

}  // namespace heatledger::balance
