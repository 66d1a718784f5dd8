// The route by a measured heat of the reaction, and what such a measurement says of related estimates.
#pragma once

#include "core/balance/ledger.hpp"

namespace heatledger::balance {

/// The measured heat brought to the coefficients written, the phases written and 25 °C; as gas where every
/// phase correction of the ledger has a value.
/// @errors ledger.measured_per
Result<Route> measured_route(const Ledger& ledger, const MeasuredHeat& heat);

/// The measured route of a ledger as one observation of gas formation enthalpies: species that the model
/// covers are its terms, elements and tabulated ones are taken off.
/// @errors estimate.measurement: no figure as gas, no ±, or no species that the model covers
Result<estimate::Measurement> observation_of(const Ledger& ledger);

}  // namespace heatledger::balance
