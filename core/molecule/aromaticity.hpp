// Aromaticity as the sheet perceives it, from Kekulé or aromatic input alike.
#pragma once

#include "core/molecule/graph.hpp"

namespace heatledger::molecule {

/// Sets `aromatic` of atoms and bonds from the Kekulé orders. Per ring of size 5 or 6: aromatic if every atom is
/// sp2-capable and the electrons sum to 6 (C or N with a ring double bond 1; N, O, S with lone pair in a five-ring 2;
/// C with exocyclic C=O 0). Azulene and tropone stay Kekulé. Run before neutralise_charges.
void perceive_aromaticity(Graph& graph);

}  // namespace heatledger::molecule
