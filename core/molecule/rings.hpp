// Rings of a graph: the relevant cycles (union of all minimum cycle bases) and a symmetrised smallest set.
#pragma once

#include <cstdint>
#include <vector>

#include "core/molecule/graph.hpp"

namespace heatledger::molecule {

/// Atom indices around the ring; neighbours in the list are bonded, last to first too.
using Ring = std::vector<std::uint32_t>;

/// Relevant cycles in a canonical order (size, then atoms).
/// @source P. Vismara, Electron. J. Combin. 4 (1997) R9
/// @complexity polynomial in the graph for chemical graphs; families of over 1,000 rings are cut and `complete` cleared
std::vector<Ring> relevant_cycles(const Graph& graph, bool* complete = nullptr);

}  // namespace heatledger::molecule
