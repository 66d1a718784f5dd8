#include "core/molecule/aromaticity.hpp"

#include <cstddef>
#include <vector>

#include "core/molecule/rings.hpp"
#include "core/molecule/valence.hpp"

namespace heatledger::molecule {
namespace {

constexpr int not_sp2 = -1;

// Outer electrons minus normal valence: the electrons of the lone pairs of the neutral atom.
int lone_electrons(int element) {
  switch (element) {
    case 7:
    case 15:
    case 33:
      return 2;
    case 8:
    case 16:
    case 34:
    case 52:
      return 4;
    default:
      return 0;  // B, C, Si
  }
}

int normal_valence(int element) {
  switch (element) {
    case 5:
      return 3;
    case 6:
    case 14:
      return 4;
    case 7:
    case 15:
    case 33:
      return 3;
    case 8:
    case 16:
    case 34:
    case 52:
      return 2;
    default:
      return 0;
  }
}

// Outer electrons tell which end of a double bond draws the pair; within a column the lighter atom does.
int outer_electrons(int element) {
  switch (element) {
    case 5:
      return 3;
    case 6:
    case 14:
    case 32:
      return 4;
    case 7:
    case 15:
    case 33:
      return 5;
    case 8:
    case 16:
    case 34:
    case 52:
      return 6;
    case 9:
    case 17:
    case 35:
    case 53:
      return 7;
    default:
      return 1;
  }
}

bool draws_from(int element, int other) {
  const int own = outer_electrons(element);
  const int theirs = outer_electrons(other);
  return own > theirs || (own == theirs && element < other);
}

struct Surroundings {
  int degree = 0, bonded = 0, multiple = 0;
  bool multiple_in_ring = false;
  std::uint32_t outside = 0;  // neighbour of a multiple bond that no ring holds
  bool multiple_outside = false;
};

Surroundings look_around(const Graph& graph, const Adjacency& adjacency,
                         const std::vector<std::uint8_t>& in_ring, std::uint32_t atom) {
  Surroundings around;
  around.degree = around.bonded = graph.atoms[atom].hydrogens;
  for (std::uint32_t e = adjacency.first[atom]; e < adjacency.first[atom + 1]; ++e) {
    const Adjacency::Entry& entry = adjacency.entries[e];
    const Order order = graph.bonds[entry.bond].order;
    ++around.degree;
    around.bonded += static_cast<int>(order);
    if (order < Order::Double) continue;
    ++around.multiple;
    if (in_ring[entry.bond]) {
      around.multiple_in_ring = true;
    } else {
      around.multiple_outside = true;
      around.outside = entry.atom;
    }
  }
  return around;
}

// Electrons that the atom brings into a ring of sp2 atoms; not_sp2 where it breaks the ring.
int ring_electrons(const Graph& graph, const Adjacency& adjacency, const std::vector<std::uint8_t>& in_ring,
                   std::uint32_t index) {
  const Atom& atom = graph.atoms[index];
  const int valence = normal_valence(atom.element);
  if (valence == 0) return not_sp2;
  Surroundings around = look_around(graph, adjacency, in_ring, index);
  int charge = atom.charge;
  const bool amine_oxide = atom.element == 7 && charge == 0 && around.bonded == 5 && around.multiple == 2 &&
                           around.multiple_outside && graph.atoms[around.outside].element == 8;
  if (amine_oxide) {
    charge = 1;
    around.bonded = 4;
    around.multiple = 1;
    around.multiple_outside = false;
  }
  if (around.degree > 3 || around.multiple > 1) return not_sp2;
  if (around.bonded > filled_valence(atom.element, charge, 0)) return not_sp2;
  if (atom.unpaired != 0 && (atom.element != 6 || charge != 0)) return not_sp2;
  const int pairs = lone_electrons(atom.element) - charge;
  int electrons = valence - around.degree + (pairs > 0 ? pairs : 0) - atom.unpaired;
  if (electrons > 1 && around.bonded - around.degree > 1)
    electrons = 1;  // a triple bond in the ring: benzyne
  if (electrons < 0) return not_sp2;
  const bool drawn_out =
      around.multiple_outside && draws_from(graph.atoms[around.outside].element, atom.element);
  if (electrons == 0) {
    if (around.multiple_outside) return 0;
    return around.multiple_in_ring ? 1 : not_sp2;
  }
  if (electrons == 1) {
    if (around.multiple_outside) return drawn_out ? 0 : 1;
    if (around.multiple > 0) return 1;
    return charge == 1 ? 0 : not_sp2;
  }
  if (drawn_out) --electrons;
  return electrons % 2 == 1 ? 1 : 2;
}

}  // namespace

void perceive_aromaticity(Graph& graph) {
  for (Atom& atom : graph.atoms) atom.aromatic = false;
  for (Bond& bond : graph.bonds) bond.aromatic = false;
  const std::vector<Ring> rings = relevant_cycles(graph);
  if (rings.empty()) return;
  Adjacency adjacency;
  build_adjacency(graph, adjacency);
  std::vector<std::uint8_t> in_ring;
  find_ring_bonds(graph, in_ring);
  for (const Ring& ring : rings) {
    if (ring.size() != 5 && ring.size() != 6) continue;
    int sum = 0;
    bool sp2 = true;
    for (const std::uint32_t atom : ring) {
      const int electrons = ring_electrons(graph, adjacency, in_ring, atom);
      if (electrons == not_sp2) {
        sp2 = false;
        break;
      }
      sum += electrons;
    }
    if (!sp2 || sum != 6) continue;
    for (std::size_t i = 0; i < ring.size(); ++i) {
      const std::uint32_t here = ring[i];
      const std::uint32_t next = ring[(i + 1) % ring.size()];
      graph.atoms[here].aromatic = true;
      for (std::uint32_t e = adjacency.first[here]; e < adjacency.first[here + 1]; ++e) {
        if (adjacency.entries[e].atom == next) graph.bonds[adjacency.entries[e].bond].aromatic = true;
      }
    }
  }
}

}  // namespace heatledger::molecule
