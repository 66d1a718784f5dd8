// The octet spelling of normalise.hpp with a say in ties: for canonical text, where even equal bonds must be
// told apart.
#pragma once

#include <cstdint>
#include <vector>

#include "core/molecule/graph.hpp"

namespace heatledger::molecule {

/// Ranks of all atoms of a graph whose charges are joined; all different.
using TieBreaker = std::vector<std::uint32_t> (*)(const Graph& graph);

/// As take_octet_form; where an atom could give an order back to either of two like neighbours, the one of
/// lower rank gets it. Ranks are asked for only where an atom stands above its octet.
/// @param ties  null: the first bond in the order of writing
void take_octet_form(Graph& graph, const TieBreaker* ties);

}  // namespace heatledger::molecule
