// Kekulé orders for aromatic SMILES: the last step of the reader in smiles.cpp, not a door of the room.
#pragma once

#include <cstdint>
#include <optional>

#include "core/molecule/graph.hpp"

namespace heatledger::molecule {

/// How the reader marks an atom written without brackets until its hydrogens are filled in.
inline constexpr std::uint8_t hydrogens_unfilled = 255;

/// Fills in a graph as the reader leaves it: `Atom::unpaired` holds the sum of written bond orders (an
/// aromatic bond counts one), `Atom::hydrogens` is hydrogens_unfilled for atoms written without brackets.
/// Afterwards every aromatic system has alternating orders, hydrogens and unpaired electrons are what the
/// valences leave, and bonds between aromatic atoms that no ring holds are plain single bonds.
/// @return the atom that cannot be given a double bond; empty when all is well
std::optional<std::uint32_t> fill_valences(Graph& graph, bool any_aromatic);

}  // namespace heatledger::molecule
