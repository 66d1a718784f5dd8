#include "core/molecule/kekule.hpp"

#include <utility>
#include <vector>

#include "core/molecule/matching.hpp"
#include "core/molecule/rings.hpp"
#include "core/molecule/valence.hpp"

namespace heatledger::molecule {
namespace {

// Whether an aromatic atom takes part in a double bond of the ring.
enum class Need : std::uint8_t { Never, May, Must };

// One byte per atom, off the heap for usual molecules: the reader runs millions of times.
template <typename T>
class AtomList {
 public:
  AtomList(std::size_t size, T value) : data_(inline_) {
    if (size > sizeof(inline_)) {
      heap_.resize(size);
      data_ = heap_.data();
    }
    for (std::size_t i = 0; i < size; ++i) data_[i] = value;
  }
  AtomList(const AtomList&) = delete;
  AtomList& operator=(const AtomList&) = delete;
  T& operator[](std::size_t at) { return data_[at]; }

 private:
  static_assert(sizeof(T) == 1);
  T inline_[128];
  std::vector<T> heap_;
  T* data_;
};
using Needs = AtomList<Need>;
using Flags = AtomList<std::uint8_t>;

// OpenSMILES counts an aromatic atom one above its written bonds where a valence asks for it: c with two ring
// bonds has a double bond and one hydrogen, n with three has neither. Brackets state hydrogens, so a missing
// electron there may be a double bond or stay unpaired ([c] of phenyl).
Need need_of(const Atom& atom) {
  if (atom.element == 0) return Need::May;
  if (atom.hydrogens == hydrogens_unfilled) {
    return organic_valence(atom.element, atom.unpaired) > atom.unpaired ? Need::Must : Need::Never;
  }
  const int bonded = atom.unpaired + atom.hydrogens;
  return filled_valence(atom.element, atom.charge, bonded) > bonded ? Need::May : Need::Never;
}

void fill_atom(Atom& atom, int ring_double_bonds) {
  const int written = atom.unpaired + ring_double_bonds;
  if (atom.hydrogens == hydrogens_unfilled) {
    atom.hydrogens = static_cast<std::uint8_t>(organic_valence(atom.element, written) - written);
    atom.unpaired = 0;
  } else {
    const int bonded = written + atom.hydrogens;
    atom.unpaired = static_cast<std::uint8_t>(filled_valence(atom.element, atom.charge, bonded) - bonded);
  }
}

// Clears the flag of bonds that no ring holds; false, nothing settled, where the molecule is too large.
// In the order of writing every atom but the first of a fragment hangs on an earlier one by the first bond
// that names it second; the others are ring closures, one bit each. Summing the bits of both ends of each
// closure from the last atom to the first leaves on every hanging bond the closures that pass over it: none
// means a bridge.
bool mark_bridges_quickly(const Graph& graph, Flags& in_ring) {
  constexpr std::size_t most_atoms = 128, most_closures = 64;
  const std::size_t atoms = graph.atoms.size();
  if (atoms > most_atoms) return false;
  constexpr std::uint32_t none = 0xFFFFFFFF;
  std::uint64_t passing[most_atoms];
  std::uint32_t hangs_by[most_atoms];
  for (std::size_t i = 0; i < atoms; ++i) {
    passing[i] = 0;
    hangs_by[i] = none;
  }
  std::size_t closures = 0;
  for (std::uint32_t i = 0; i < graph.bonds.size(); ++i) {
    const Bond& bond = graph.bonds[i];
    if (bond.a < bond.b && hangs_by[bond.b] == none) {
      hangs_by[bond.b] = i;
      continue;
    }
    if (closures == most_closures) return false;
    const std::uint64_t bit = std::uint64_t{1} << closures++;
    passing[bond.a] ^= bit;
    passing[bond.b] ^= bit;
  }
  for (std::size_t i = atoms; i-- > 1;) {
    if (hangs_by[i] == none) continue;
    if (passing[i] == 0) in_ring[hangs_by[i]] = 0;
    passing[graph.bonds[hangs_by[i]].a] ^= passing[i];
  }
  return true;
}

// Bonds between aromatic atoms that no ring holds (biphenyl) are single. Systems of lone cycles need no
// search.
void drop_bonds_outside_rings(Graph& graph) {
  Flags degree(graph.atoms.size(), 0);
  const auto count = [&](std::uint32_t atom) {
    if (degree[atom] < 3) ++degree[atom];
  };
  for (const Bond& bond : graph.bonds) {
    if (!bond.aromatic) continue;
    count(bond.a);
    count(bond.b);
  }
  bool lone_cycles = true;
  for (std::size_t i = 0; i < graph.atoms.size(); ++i) {
    if (degree[i] == 1 || degree[i] > 2) lone_cycles = false;
  }
  if (lone_cycles) return;
  std::vector<std::uint8_t> found;
  Flags quick(graph.bonds.size(), 1);
  const bool settled = mark_bridges_quickly(graph, quick);
  if (!settled) find_ring_bonds(graph, found);
  for (Atom& atom : graph.atoms) {
    if (atom.element == 0) atom.aromatic = false;
  }
  for (std::size_t i = 0; i < graph.bonds.size(); ++i) {
    Bond& bond = graph.bonds[i];
    if (settled ? !quick[i] : !found[i]) bond.aromatic = false;
    if (bond.aromatic) graph.atoms[bond.a].aromatic = graph.atoms[bond.b].aromatic = true;
  }
}

std::optional<std::uint32_t> match_rest(Graph& graph, Needs& need) {
  std::vector<std::pair<std::uint32_t, std::uint32_t>> edges;
  std::vector<std::uint32_t> edge_bond;
  for (std::uint32_t i = 0; i < graph.bonds.size(); ++i) {
    const Bond& bond = graph.bonds[i];
    if (!bond.aromatic || need[bond.a] == Need::Never || need[bond.b] == Need::Never) continue;
    edges.emplace_back(bond.a, bond.b);
    edge_bond.push_back(i);
  }
  Matching matching(static_cast<std::uint32_t>(graph.atoms.size()), edges);
  for (std::size_t e = 0; e < edges.size(); ++e) {
    Bond& bond = graph.bonds[edge_bond[e]];
    if (bond.order != Order::Double) continue;
    matching.join(bond.a, bond.b);
    bond.order = Order::Single;
  }
  for (std::uint32_t i = 0; i < graph.atoms.size(); ++i) {
    if (graph.atoms[i].aromatic && need[i] == Need::May) matching.set_optional(i);
  }
  for (std::uint32_t i = 0; i < graph.atoms.size(); ++i) {
    if (!graph.atoms[i].aromatic || need[i] != Need::Must || matching.mate(i) != Matching::none) continue;
    if (!matching.augment(i, true)) return i;
  }
  // Then as few unpaired electrons as can be; '*' has none to pair.
  for (std::uint32_t i = 0; i < graph.atoms.size(); ++i) {
    const Atom& atom = graph.atoms[i];
    if (!atom.aromatic || need[i] != Need::May || atom.element == 0 || matching.mate(i) != Matching::none)
      continue;
    matching.augment(i, false);
  }
  for (const std::uint32_t at : edge_bond) {
    Bond& bond = graph.bonds[at];
    if (matching.mate(bond.a) == bond.b) bond.order = Order::Double;
  }
  return std::nullopt;
}

std::optional<std::uint32_t> assign_orders(Graph& graph) {
  drop_bonds_outside_rings(graph);
  Needs need(graph.atoms.size(), Need::Never);
  Flags done(graph.atoms.size(), 0);
  for (std::size_t i = 0; i < graph.atoms.size(); ++i) {
    if (graph.atoms[i].aromatic) need[i] = need_of(graph.atoms[i]);
  }
  // Pairing along the text succeeds for most molecules; augmenting paths mend the rest.
  for (Bond& bond : graph.bonds) {
    if (!bond.aromatic || need[bond.a] == Need::Never || need[bond.b] == Need::Never) continue;
    if (done[bond.a] || done[bond.b]) continue;
    bond.order = Order::Double;
    done[bond.a] = done[bond.b] = 1;
  }
  bool complete = true;
  for (std::size_t i = 0; i < graph.atoms.size(); ++i) {
    if (need[i] != Need::Never && !done[i]) complete = false;
  }
  if (!complete) {
    const std::optional<std::uint32_t> failed = match_rest(graph, need);
    if (failed) return failed;
    for (std::size_t i = 0; i < graph.atoms.size(); ++i) done[i] = 0;
    for (const Bond& bond : graph.bonds) {
      if (bond.aromatic && bond.order == Order::Double) done[bond.a] = done[bond.b] = 1;
    }
  }
  for (std::size_t i = 0; i < graph.atoms.size(); ++i) fill_atom(graph.atoms[i], done[i]);
  return std::nullopt;
}

}  // namespace

std::optional<std::uint32_t> fill_valences(Graph& graph, bool any_aromatic) {
  if (any_aromatic) return assign_orders(graph);
  for (Atom& atom : graph.atoms) fill_atom(atom, 0);
  return std::nullopt;
}

}  // namespace heatledger::molecule
