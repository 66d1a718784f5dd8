// A molecule as the model of bonds in context sees it: counts of bonds and their surroundings. Made once per
// species and reused for every property. What the counts are worth stands in context_model.hpp.
#pragma once

#include <cstdint>
#include <vector>

#include "core/base/result.hpp"
#include "core/molecule/graph.hpp"

namespace heatledger::estimate {

/// Classes of counted features, coarse to fine. Unseen features of a fine class fall back on the coarser
/// ones. The suffix c, o, x of a split class is the set of elements in the feature: only C and H; also N and
/// O; any other.
enum class FeatureClass : std::uint8_t {
  K0,
  B,
  Ac,
  Ao,
  Ax,
  B1c,
  B1o,
  B1x,
  B2c,
  B2o,
  B2x,
  B3c,
  B3o,
  B3x,
  G1c,
  G1o,
  G1x,
  P2,
  P2h,
  P3,
  P3h,
  P4h,
  GA,
  P5,
  P5m,
  R0,
  R1,
  R1h,
  R2c,
  R2o,
  R2x,
  RS,
  RF,
  RP,
  BAY,
  SC,
  OMP0,
  OMP,
  OMP2,
  CT0,
  CT,
  HB0,
  HB,
  VX,
  Bx  ///< B with Si, P or B in it, or without C, H and not of N and O alone: few rows, closer to the prior
};
constexpr std::size_t feature_class_count = static_cast<std::size_t>(FeatureClass::Bx) + 1;

/// One feature of one molecule. `key` is a hash of class and description, equal in every build.
struct FeatureCount {
  std::uint64_t key = 0;
  FeatureClass family = FeatureClass::K0;
  double count = 0;  ///< whole number, but for ring systems (root of a weight) and VX
};

/// What the variance of a molecule's own deviation is made of (see context_settings.hpp).
struct DeviationMeasures {
  double one = 1;        ///< 1 for a molecule
  double heavy = 0;      ///< heavy atoms
  double ring = 0;       ///< rings of up to 4, bridged and spiro pairs, half the fused pairs
  double polar = 0;      ///< polar clusters beyond the first
  double hetero = 0;     ///< N, O, S, P beyond the first
  double halogen = 0;    ///< F, Cl, Br, I beyond the first
  double crowding = 0;   ///< 1,5 and bay contacts
  double inorganic = 0;  ///< 1: no carbon, or B, P or Si present
  double donors = 0;     ///< O-H and N-H bonds
};

/// Counts and measures of one molecule or one repeat unit; immutable.
struct ContextMolecule {
  std::vector<FeatureCount> features;  ///< sorted by key, each key once, no zero counts
  DeviationMeasures measures;
  double atoms = 0, heavy_atoms = 0;
  double gas_atoms = 0;            ///< formation enthalpy of the free atoms, as the model takes it [J/mol]
  double base_bonds = 0;           ///< prior mean of the sum of bond enthalpies [J/mol]
  std::uint64_t constitution = 0;  ///< equal for equal structures, stereo left out
  std::uint64_t stereo = 0;        ///< tells stereoisomers apart; 0 when no stereo is given
  bool repeat_unit = false;        ///< figures are the increment of one unit in a long chain
};

/// Which Kekulé structure stands for rings that are not aromatic but could be drawn in several ways (rare:
/// fused odd rings). Canonical: the same whatever was written. AsWritten is for comparing with tables made
/// elsewhere.
enum class KekuleForm : std::uint8_t { Canonical, AsWritten };

/// Counts the features of a structure. A graph with two `*` of one bond each is a repeat unit.
/// The order in which the atoms were written makes no difference to any digit.
/// @errors estimate.empty, estimate.fragments, estimate.element, estimate.charged, estimate.radical,
///         estimate.valence, estimate.repeat_unit; the message names the atom or element
Result<ContextMolecule> context_molecule(const molecule::Graph& graph,
                                         KekuleForm form = KekuleForm::Canonical);

}  // namespace heatledger::estimate
