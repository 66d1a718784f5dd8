// Normal valences: what OpenSMILES fills up with hydrogen, and what a bracket atom lacks to its valence.
#pragma once

#include <cstdint>

namespace heatledger::molecule {

/// Valence that an atom with `bonded` (sum of bond orders, hydrogens included) fills up to: the smallest
/// normal valence that is not below `bonded`; `bonded` itself where it exceeds all of them or the element has
/// none. A charged atom has the valences of the column that it is isoelectronic with (N+ like C, O- like F).
/// Octet expansion: N to 5, third row and below P to 5, S to 6, halogens to 7.
/// @param charge  [elementary charges]
/// @source OpenSMILES specification 1.0 (2016), section 3.1.5 for neutral atoms of the organic subset
int filled_valence(int element, int charge, int bonded);

/// The same for a neutral atom written without brackets: no expansion of halogens beyond 1.
int organic_valence(int element, int bonded);

}  // namespace heatledger::molecule
