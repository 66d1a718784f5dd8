// SMILES out, from a graph and an order of its atoms.
#pragma once

#include <cstdint>
#include <string>
#include <vector>

#include "core/molecule/graph.hpp"

namespace heatledger::molecule {

/// Writes the Kekulé orders with - left out, hydrogens as counts, charges and isotopes; no stereo marks, no
/// classes. Each fragment begins at its atom of lowest rank; branches come before the longest way on.
/// @param ranks  per atom, all different
std::string write_smiles(const Graph& graph, const std::vector<std::uint32_t>& ranks);

}  // namespace heatledger::molecule
