// Repeat units of polymers: the increment of one unit between two long chains, so that the ends cancel.
#pragma once

#include "core/base/result.hpp"
#include "core/estimate/context_molecule.hpp"
#include "core/molecule/graph.hpp"

namespace heatledger::estimate {

bool has_open_ends(const molecule::Graph& graph);

/// A chain of `units` repeat units, its two ends closed with hydrogen.
/// @errors estimate.repeat_unit: not exactly two `*`, each with one single bond to an atom of the unit
Result<molecule::Graph> chain_of(const molecule::Graph& unit, unsigned units);

/// True when an atom of the unit's main chain, on the way from one `*` to the other, carries two side groups
/// that are more than hydrogen or fluorine, as in polyisobutene: every second atom of the chain is then
/// crowded on both sides, which no compound of the training table is. False for anything but a repeat unit.
bool has_crowded_chain(const molecule::Graph& graph);

/// Counts of the longer chain minus counts of the shorter one. Own deviation: that of one unit taken as a
/// molecule.
/// @errors estimate.repeat_unit; those of context_molecule
Result<ContextMolecule> repeat_unit(const molecule::Graph& unit);

}  // namespace heatledger::estimate
