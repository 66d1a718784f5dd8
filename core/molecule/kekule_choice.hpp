// Which of several Kekulé structures stands for a ring: needed where they differ in the bonds that are counted.
#pragma once

#include "core/molecule/graph.hpp"

namespace heatledger::molecule {

/// Moves double bonds around rings so that as few as possible join two hetero atoms: pyridazine gets two C=N and one
/// N-N, whatever the spelling. Atoms keep their valences. Structures without such a ring bond stay as they are.
/// With carbon and one kind of hetero atom the number of bonds of each type is then unique.
/// @complexity exhaustive over sets of hetero pairs up to 12 of them in one conjugated system, stepwise above
void choose_kekule_bonds(Graph& graph);

}  // namespace heatledger::molecule
