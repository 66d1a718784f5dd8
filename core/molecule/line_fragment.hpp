// Pieces that condensed formulas are put together from: a graph with free valences and two ends.
#pragma once

#include <cstdint>
#include <vector>

#include "core/molecule/graph.hpp"

namespace heatledger::molecule {

constexpr std::uint32_t kNoAtom = 0xffffffffu;

/// Valence of an atom in a condensed chain; 0 for elements that such formulas do not hold.
int chain_valence(int element);

struct LineFragment {
  Graph graph;
  std::vector<int> free;              ///< free valences per atom
  std::vector<bool> fixed;            ///< per bond: its order does not grow any more
  std::vector<std::uint32_t> parent;  ///< the atom that an atom was bound to when it came
  std::uint32_t first = kNoAtom;      ///< binds to what stands before
  std::uint32_t current = kNoAtom;    ///< the next atom binds here
  std::uint32_t spare = kNoAtom;      ///< the other end of a ring that stands first

  bool empty() const { return graph.atoms.empty(); }
  std::uint32_t add_atom(int element, int valences);
  /// False when a valence is not free; then nothing changes.
  bool bind(std::uint32_t a, std::uint32_t b, int order, bool is_fixed);
  bool add_hydrogens(std::uint32_t atom, int count);
  int total_free() const;
  /// Two free valences, one at each end: may be repeated along a chain.
  bool is_link() const;
  /// Appends a copy; its atom i becomes the returned number + i.
  std::uint32_t append(const LineFragment& other);
  /// Where the next atom binds; kNoAtom when nothing is free there.
  std::uint32_t free_end() const;
  /// A saturated end other than carbon is a substituent: the chain goes on from the atom that carries it.
  void step_back();
  /// Turns free valences into double and triple bonds where only one way exists. False when some stay free.
  bool close_valences();
};

LineFragment phenyl_piece();
/// @param apart  1 ortho, 2 meta, 3 para
LineFragment phenylene_piece(int apart);
LineFragment vinyl_piece();
LineFragment nitro_piece();
/// N=[N+]=[N-], bound by its first nitrogen.
LineFragment azide_piece();
/// =[N+]=[N-], bound twice by its first nitrogen.
LineFragment diazo_piece();
LineFragment carboxyl_piece();
/// @param kind  'n' straight, 'i' iso (3 or 4 carbons), 's' and 't' (4 carbons)
LineFragment alkyl_piece(int carbons, char kind);

}  // namespace heatledger::molecule
