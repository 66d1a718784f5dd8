// The route by a measured heat of the reaction, and what such a measurement says of related estimates.
#pragma once

#include "core/balance/ledger.hpp"

namespace heatledger::balance {

/// Adds the measured heat, brought to the coefficients written, the phases written and 25 °C; as gas where
/// every phase correction of the ledger has a value. Beside it `measured_lines`, what it may hold: solutions
/// with a strength and `(diss)` come from the pure species, and products written `(g)` that are liquid at the
/// temperature of measurement are evaporated where a reactant is no gas. Not in it: the lines are added. In
/// it: they are not. Unknown: both, each as a route, the larger heat as "measured", the other as
/// "measured_other" (of two signs, the heat released).
/// @errors ledger.measured_per
Status add_measured_routes(Ledger& ledger, const MeasuredHeat& heat);

/// The measured route of a ledger as one observation of gas formation enthalpies: species that the model
/// covers are its terms, elements and tabulated ones are taken off.
/// @errors estimate.measurement: no figure as gas, no ±, two readings, or no species that the model covers
Result<estimate::Measurement> observation_of(const Ledger& ledger);

}  // namespace heatledger::balance
