// OpenSMILES in and out. Aromatic input comes back with Kekulé orders assigned; aromaticity as the sheet
// perceives it stands in aromaticity.hpp.
#pragma once

#include <string>
#include <string_view>

#include "core/base/result.hpp"
#include "core/molecule/graph.hpp"

namespace heatledger::molecule {

/// Reads OpenSMILES in full: organic subset, brackets, isotopes, charges, explicit hydrogens, all bond
/// orders, ring closures including %nn, aromatic atoms, stereo marks (kept), dots, '*'. Implicit hydrogens by
/// the standard's valence table; aromatic systems get a Kekulé assignment. Plain ring bonds between small
/// letters are aromatic only inside rings; [HH] is read as [H][H].
/// @errors smiles.* (one code for each way to be malformed); `where` is "offset N", N bytes from the start
/// @source OpenSMILES specification 1.0 (2016), sections 3 and 4
Result<Graph> parse_smiles(std::string_view text);

/// The same into a graph whose memory is reused; for bulk work. `out` is unspecified after an error.
Status parse_smiles_into(std::string_view text, Graph& out);

/// One canonical SMILES: equal for every order of writing and every spelling of a structure, and reads back
/// to it. Octet spelling of normalise.hpp, Kekulé orders, hydrogens as counts; isotopes and charges are kept,
/// stereo marks and atom classes are not: stereoisomers share one text. Structures that differ only in which
/// of several Kekulé structures was drawn share one text too.
/// @complexity see ranking.hpp; some 10 µs for ten atoms
/// @example CanonicalSmiles.IsTheSameForEveryNumbering
std::string canonical_smiles(const Graph& graph);

}  // namespace heatledger::molecule
