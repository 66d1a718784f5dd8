// One spelling for groups that chemists draw in two: nitro, N-oxide, sulfone, CO, ozone, azide, diazo.
#pragma once

#include "core/molecule/graph.hpp"

namespace heatledger::molecule {

/// Raises bonds between + and - neighbours (cap: triple) and removes the charges: the hypervalent spelling,
/// which both spellings reach. Bonds marked aromatic keep their order. Where a + atom has several -
/// neighbours, oxygen goes first, then sulfur and its column, halogens, nitrogen, the rest. Linear in the
/// bonds. nitro N(=O)=O, azide C-N=N#N, diazo C=N#N, N2O N#N=O, O3 O=O=O, CO C#O, N-oxide N=O, sulfone
/// S(=O)(=O).
void neutralise_charges(Graph& graph);

/// The octet spelling, in which bonds are counted, the same for every way to draw a structure: charges
/// neutralised, then each nitrogen or oxygen above its octet gives back one order and a pair of charges, to a
/// terminal O first, then another chalcogen, a terminal N, the most electronegative neighbour. nitro
/// [N+](=O)[O-], N-oxide and nitrone [N+][O-], azide C-N=[N+]=[N-], diazo C=[N+]=[N-], N2O N#[N+]-[O-], O3
/// O=[O+][O-], adducts of boron [N+]-[B-], CO [C-]#[O+], isocyanide C-[N+]#[C-], sulfone S=O twice, ammonium
/// ylid [N+]-[C-]. Where a ring has several Kekulé structures that differ in their bonds (pyridazine), one
/// with the fewest double bonds between two hetero atoms is taken. Aromatic flags are cleared.
void take_octet_form(Graph& graph);

}  // namespace heatledger::molecule
