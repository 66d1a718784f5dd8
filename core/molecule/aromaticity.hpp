// Aromaticity as the sheet perceives it, from Kekulé or aromatic input alike.
#pragma once

#include "core/molecule/graph.hpp"

namespace heatledger::molecule {

/// Sets `aromatic` of atoms and bonds from the Kekulé orders, whatever was written. Per ring of size 5 or 6:
/// aromatic if every atom can be sp2 and the ring's electrons sum to 6. An atom with a double bond in any
/// ring gives 1; C with a double bond out of the rings gives 1, or 0 if that neighbour draws the pair (C=O,
/// C=S, C=N); N, O, S and their columns with a lone pair, and C-, give 2; C+ without a double bond 0. Atoms
/// above their normal valence, with four neighbours or two double bonds are out; N=O of an amine oxide counts
/// as N+. Azulene and tropone stay Kekulé. Run before neutralise_charges.
void perceive_aromaticity(Graph& graph);

}  // namespace heatledger::molecule
