// A canonical order of atoms: the same for every numbering of one graph. Text is written from it in
// smiles_writer.hpp.
#pragma once

#include <cstdint>
#include <vector>

#include "core/molecule/graph.hpp"

namespace heatledger::molecule {

/// Ranks 0 to atoms-1, all different. Atoms that a symmetry of the graph exchanges are put in an order that
/// the symmetry carries over; all others are told apart by element, degree, hydrogens, charge, isotope,
/// bonds. Colour refinement, then every way to break the remaining ties, pruned by the symmetries found on
/// the way.
/// @param labels  per bond, what tells bonds apart (order, or one label for all bonds of a mobile system)
/// @source B. D. McKay, Congr. Numer. 30 (1981) 45
/// @complexity near linear for chains and trees; ties are searched to the end in graphs of up to 1,000 atoms
/// and 5,000 trials, beyond that the first way is taken
std::vector<std::uint32_t> canonical_ranks(const Graph& graph, const std::vector<std::uint8_t>& labels);

}  // namespace heatledger::molecule
