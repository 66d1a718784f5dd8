// Rings of a graph: which bonds lie in one, and the relevant cycles (union of all minimum cycle bases).
#pragma once

#include <cstdint>
#include <vector>

#include "core/molecule/graph.hpp"

namespace heatledger::molecule {

/// Atom indices around the ring; neighbours in the list are bonded, last to first too.
using Ring = std::vector<std::uint32_t>;

/// Marks the bonds that lie in at least one ring (those that are not bridges).
/// @param in_ring  receives 1 or 0 per bond; its memory is reused
void find_ring_bonds(const Graph& graph, std::vector<std::uint8_t>& in_ring);

/// Union of all minimum cycle bases, sorted by size, then by atoms; each ring starts at its smallest atom and
/// goes on to the smaller of its two neighbours.
/// @param complete  cleared when a family was cut or a ring system was too large; null when not wanted
/// @source P. Vismara, Electron. J. Combin. 4 (1997) R9
/// @complexity quadratic in the atoms of a ring system; families of over 1,000 rings are cut, and systems of
/// over 4,000 ring atoms give none, and then `complete` is cleared
std::vector<Ring> relevant_cycles(const Graph& graph, bool* complete = nullptr);

}  // namespace heatledger::molecule
