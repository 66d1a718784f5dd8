// One spelling for groups that chemists draw in two: nitro, N-oxide, sulfone, CO, ozone, azide, diazo.
#pragma once

#include "core/molecule/graph.hpp"

namespace heatledger::molecule {

/// Raises bonds between + and - neighbours (cap: triple) and removes the charges: the hypervalent spelling, which
/// both spellings reach. Aromatic bonds keep their order. See shared rules in core/molecule/README or DEVELOPERS.md.
/// nitro N(=O)=O, azide C-N=N#N, diazo C=N#N, N2O N#N=O, O3 O=O=O, CO C#O, N-oxide N=O, sulfone S(=O)(=O).
void neutralise_charges(Graph& graph);

}  // namespace heatledger::molecule
