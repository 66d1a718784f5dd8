// Atoms and bonds of a ContextGraph in words for people.
#pragma once

#include <string>

#include "core/estimate/context_graph.hpp"

namespace heatledger::estimate {

/// "C–C", "C=O", "C≡N", "C⋯C" for aromatic; the elements in alphabetical order.
std::string bond_words(Kind a, Kind b, unsigned order);
/// "CH₃–CH₂(O)": the two groups that a bond joins, each with its other heavy neighbours.
std::string ends_words(const ContextGraph& graph, std::uint32_t bond);
/// "in CH₃ on C(=O)".
std::string hydrogens_words(const ContextGraph& graph, std::uint32_t atom);

}  // namespace heatledger::estimate
