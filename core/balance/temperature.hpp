// From 25 °C to the temperatures at which the reaction is run.
#pragma once

#include "core/balance/background.hpp"

namespace heatledger::balance {

/// Corrections of every species from 25 °C to the temperature asked for, kept in the phase written, with
/// their notes and cautions.
void bring_to_temperatures(Background& background);

/// Fills `to_temperature` and `as_run` of a ledger whose routes are known: ΔH(run) = ΔH(25 °C) + Σ products ν
/// Δh(T) − Σ reactants ν Δh(T).
void run_at_temperatures(Ledger& ledger);

/// Adds a caution for gases that are no longer ideal at this pressure: above a tenth of the critical
/// pressure, or above 10 bar where that is unknown.
/// @param pressure  [Pa]
void note_pressure(Ledger& ledger, double pressure);

}  // namespace heatledger::balance
