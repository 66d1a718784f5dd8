// Cis and trans at double bonds, as far as telling apart the stereo isomers of a library needs it.
#pragma once

#include "core/molecule/graph.hpp"

namespace heatledger::facts {

/// Double bonds of a structure by what its '/' and '\' say about the larger groups at both ends.
struct DoubleBondStereo {
  int cis = 0, trans = 0;

  friend bool operator==(const DoubleBondStereo& a, const DoubleBondStereo& b) {
    return a.cis == b.cis && a.trans == b.trans;
  }
};

/// Counts marked double bonds. The group that counts at an end is the one with more atoms; where two groups
/// have as many, the bond is left out.
DoubleBondStereo double_bond_stereo(const molecule::Graph& graph);

}  // namespace heatledger::facts
