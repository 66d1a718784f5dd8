// A molecular graph: atoms, bonds, hydrogens as counts. Reading it from text stands in smiles.hpp, counting
// its bonds in bonds.hpp, rings in rings.hpp.
#pragma once

#include <cstdint>
#include <vector>

namespace heatledger::molecule {

/// Order of a bond in a Kekulé structure. `Dative` and `Quarter` orders do not exist here: charges carry
/// that.
enum class Order : std::uint8_t { Zero = 0, Single = 1, Double = 2, Triple = 3, Quadruple = 4 };

/// Stereo marks are kept as written and take no part in counting.
enum class BondMark : std::uint8_t { None, Up, Down };

struct Atom {
  std::uint8_t element = 0;  ///< atomic number, 1 to 118; 0 is '*' (end of a repeat unit)
  std::int8_t charge = 0;    ///< elementary charges
  std::uint8_t hydrogens =
      0;                  ///< hydrogens that are not atoms of the graph (implicit or written inside brackets)
  bool aromatic = false;  ///< set by aromaticity.hpp; parse_smiles sets it as written
  std::uint8_t chirality =
      0;  ///< 0 none, 1 '@', 2 '@@', higher: index into the extended classes of OpenSMILES
  std::uint8_t unpaired =
      0;  ///< unpaired electrons that the valence leaves (bracket atoms below their valence)
  std::uint16_t isotope = 0;  ///< mass number, 0 natural
  std::uint16_t atom_class = 0;
};

struct Bond {
  std::uint32_t a = 0, b = 0;   ///< atom indices in order of writing
  Order order = Order::Single;  ///< Kekulé order; never "aromatic"
  bool aromatic = false;        ///< member of an aromatic ring (or written ':')
  BondMark mark = BondMark::None;
};

/// Atoms in the order of the text; bonds in the order they are closed. May hold several fragments.
struct Graph {
  std::vector<Atom> atoms;
  std::vector<Bond> bonds;

  void clear() {
    atoms.clear();
    bonds.clear();
  }
};

/// Neighbour lists of a Graph in one block: for atom i the entries first[i] .. first[i+1].
struct Adjacency {
  struct Entry {
    std::uint32_t atom, bond;
  };
  std::vector<std::uint32_t> first;  ///< atoms + 1 entries
  std::vector<Entry> entries;        ///< two per bond
};

void build_adjacency(const Graph& graph, Adjacency& out);

}  // namespace heatledger::molecule
