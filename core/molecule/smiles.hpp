// OpenSMILES in and out. Aromatic input comes back with Kekulé orders assigned; aromaticity as the sheet
// perceives it stands in aromaticity.hpp.
#pragma once

#include <string>
#include <string_view>

#include "core/base/result.hpp"
#include "core/molecule/graph.hpp"

namespace heatledger::molecule {

/// Reads OpenSMILES in full: organic subset, brackets, isotopes, charges, explicit hydrogens, all bond orders, ring
/// closures including %nn, aromatic atoms, stereo marks (kept), dots, '*'. Implicit hydrogens by the standard's
/// valence table; aromatic systems get a Kekulé assignment.
/// @errors smiles.* (one code for each way to be malformed); `where` is "offset N", N bytes from the start
/// @source OpenSMILES specification 1.0 (2016), sections 3 and 4
Result<Graph> parse_smiles(std::string_view text);

/// The same into a graph whose memory is reused; for bulk work. `out` is unspecified after an error.
Status parse_smiles_into(std::string_view text, Graph& out);

/// One canonical SMILES: independent of the order in which the molecule was written; Kekulé spelling, charges
/// neutralised as in normalise.hpp when `normalised`. Equal for two spellings of one structure.
std::string canonical_smiles(const Graph& graph);

}  // namespace heatledger::molecule
