// The graph that features are counted on: heavy atoms with hydrogens as counts, charges neutralised, rings
// and their bonds listed. Built from a molecule::Graph; the features themselves stand in
// context_features.cpp.
#pragma once

#include <array>
#include <cstdint>
#include <string>
#include <vector>

#include "core/base/result.hpp"
#include "core/estimate/context_molecule.hpp"
#include "core/estimate/feature_code.hpp"
#include "core/molecule/graph.hpp"

namespace heatledger::estimate {

struct ContextAtom {
  Kind kind = Kind::C;
  Unsaturation unsaturation = Unsaturation::None;
  std::uint8_t sign = 0;  ///< 0 none, 1 '+', 2 '-': a charge that no neighbour could settle
  std::uint8_t hydrogens = 0;
  std::uint8_t degree = 0;  ///< neighbours, hydrogens included
  std::uint8_t heavy = 0;   ///< heavy neighbours
  bool aromatic = false;
  bool in_ring = false;
  std::uint8_t chirality = 0;
  std::uint32_t source = 0;  ///< atom index in the molecule::Graph
  std::uint64_t colour = 0;  ///< equal for atoms that the constitution does not tell apart

  ShortType type() const { return short_type(kind, unsaturation); }
  FullType full() const { return full_type(signed_type(type(), sign), degree, hydrogens); }
};

struct ContextBond {
  std::uint32_t a = 0, b = 0;
  std::uint8_t order = 1;     ///< 1, 2, 3; aromatic_order
  std::uint16_t rings = 0;    ///< rings that hold it
  std::int8_t side_of_b = 0;  ///< mark of a stereo double bond beside it: +1 b above a, -1 below
  std::uint32_t source = 0;   ///< bond index in the molecule::Graph
};

struct ContextRing {
  std::vector<std::uint32_t> atoms, bonds;  ///< around the ring; bond i joins atoms i and i + 1
  bool aromatic = false;                    ///< every bond is
};

/// Cis or trans, when the structure says so for this double bond: +1 or -1 for each neighbour of an end.
struct ContextGraph {
  struct Neighbour {
    std::uint32_t atom, bond;
  };
  std::vector<ContextAtom> atoms;  ///< heavy atoms only
  std::vector<ContextBond> bonds;  ///< between heavy atoms
  std::vector<std::uint32_t> first;
  std::vector<Neighbour> neighbours;
  std::vector<ContextRing> rings;
  unsigned hydrogen_bonds = 0;  ///< H-H: 1 in the hydrogen molecule
  std::array<unsigned, kind_count> elements{};
  std::uint64_t constitution = 0;
  std::uint64_t stereo = 0;

  const Neighbour* begin_of(std::uint32_t atom) const { return neighbours.data() + first[atom]; }
  const Neighbour* end_of(std::uint32_t atom) const { return neighbours.data() + first[atom + 1]; }
};

/// Iterates over the heavy neighbours of an atom.
struct NeighbourRange {
  const ContextGraph::Neighbour* from;
  const ContextGraph::Neighbour* to;
  const ContextGraph::Neighbour* begin() const { return from; }
  const ContextGraph::Neighbour* end() const { return to; }
};
inline NeighbourRange around(const ContextGraph& graph, std::uint32_t atom) {
  return {graph.begin_of(atom), graph.end_of(atom)};
}

/// Position of one neighbour of a double bond's end: +1 above the bond, -1 below, 0 not given.
int side_of(const ContextGraph& graph, std::uint32_t end, std::uint32_t neighbour, std::uint32_t double_bond);
/// True when both ends of a double bond have a given side and two different neighbours each.
bool has_stereo(const ContextGraph& graph, std::uint32_t double_bond);

/// @errors as context_molecule, but for repeat units, which stand in context_polymer.cpp
Result<ContextGraph> context_graph(const molecule::Graph& graph, KekuleForm form = KekuleForm::Canonical);

}  // namespace heatledger::estimate
