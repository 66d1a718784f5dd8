// Oxygen balance: oxygen left over, or wanting, when a substance burns in itself.
#pragma once

#include "core/base/result.hpp"
#include "core/facts/resolve.hpp"

namespace heatledger::safety {

/// Share of the substance's mass: −1600 (2 C + (H − X)/2 + 2 S − O) / M in per cent, here as a share; CO2,
/// H2O, N2, SO2 and HX leave. Halogen beyond the hydrogen leaves as the element and asks for no oxygen.
/// @return −0.740 for trinitrotoluene, +0.200 for ammonium nitrate
/// @errors safety.no_composition; safety.element: one that the formula does not know; safety.ion
/// @source M. Lothrop, G. Handrick, Chem. Rev. 44 (1949) 419, with halogens as HX
/// @example OxygenBalance.OfKnownSubstances
Result<double> oxygen_balance(const facts::Species& species);

}  // namespace heatledger::safety
