// Which of several Kekulé structures stands for a ring: needed where they differ in the bonds that are
// counted.
#pragma once

#include <cstdint>
#include <vector>

#include "core/molecule/graph.hpp"

namespace heatledger::molecule {

/// The ring bonds whose order another Kekulé structure of the same atoms could change: both ends have exactly
/// one double bond, it lies in a ring, and so for its other end.
/// @param mobile  receives 1 or 0 per bond; its memory is reused
void find_mobile_bonds(const Graph& graph, std::vector<std::uint8_t>& mobile);

/// Moves double bonds around rings so that as few as possible join two hetero atoms: pyridazine gets two C=N
/// and one N-N, whatever the spelling. Atoms keep their valences. Structures without such a ring bond stay as
/// they are. Of structures with as few such pairs the lightest elements are paired. The number of bonds of
/// each type is then unique.
/// @complexity exhaustive over sets of hetero pairs up to 12 of them in one conjugated system, stepwise above
void choose_kekule_bonds(Graph& graph);

/// The same, and of the structures that remain the one that gives the atom of lowest rank the partner of
/// lowest rank, then the next atom, and so on: one structure for any numbering.
/// @param ranks  per atom, all different
/// @complexity quadratic in the atoms of a conjugated system
void choose_kekule_bonds(Graph& graph, const std::vector<std::uint32_t>& ranks);

}  // namespace heatledger::molecule
