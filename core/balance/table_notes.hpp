// What a reader should know of the data behind the formation route: tables that part, heats that are not in
// it.
#pragma once

#include "core/balance/background.hpp"

namespace heatledger::balance {

/// Notes where published formation enthalpies of a species part beyond their ± and by enough to move the
/// figure (2 kJ for the written coefficients), and where a typed one covers a published one; a caution where
/// solutions of several solutes meet, whose heat of mixing is in no figure here, and where a repeat unit is
/// crowded along its chain. Only where the formation
/// route has a figure.
void note_tables(Background& background);

}  // namespace heatledger::balance
