// An estimate in context as the lines of a ledger: each bond with its surroundings, what rings and contacts
// add, the molecule's own deviation, and the compounds of the table that carry it.
#pragma once

#include <string>
#include <vector>

#include "core/base/result.hpp"
#include "core/estimate/context_model.hpp"
#include "core/molecule/graph.hpp"

namespace heatledger::estimate {

/// What a line stands for. Lines after Bond touch no single bond.
enum class LineKind : std::uint8_t {
  Bond,           ///< bonds of one kind in one kind of surroundings
  Ring,           ///< ring strain or resonance
  Crowding,       ///< groups that press on each other: gauche, cis, 1,5 and bay contacts
  RingPositions,  ///< ortho, meta, para neighbours and hetero atoms of aromatic rings
  HydrogenBond,   ///< hydrogen bonds that can close inside the molecule
  FarPolar,       ///< polar atoms four bonds apart
  Liquid,         ///< size and hydrogen bonding of the liquid
  Constant,       ///< the same for every molecule
  Start,  ///< what the fit starts from: so much an atom (not for formation, whose start is the base bonds)
  OwnDeviation  ///< what the molecule's own row of the table, or a measurement, says beyond all that
};

struct ContextLine {
  LineKind kind = LineKind::Bond;
  std::string bond;  ///< "C–H", "C=O", "C⋯C" for aromatic; empty for other kinds
  std::string text;  ///< surroundings in plain words: "in CH₃ on CH₂", "CH₃–CH₂(O)"; else what the line is
  double count = 1;         ///< bonds of the molecule on this line
  double base = 0;          ///< what one bond of this type is worth anywhere [J/mol or J/(mol K)]
  double surroundings = 0;  ///< what its surroundings add to one bond
  double total = 0;         ///< count × (base + surroundings)
  int unseen = 0;           ///< counted features of this line that no row of the table has
};

/// One row of the table that carries the estimate.
struct ReferenceRow {
  std::string name, smiles, sources;
  double value = 0, u95 = 0;  ///< as tabulated, in the unit of the property
  double weight = 0;          ///< what the estimate changes by when this figure changes by one
};

struct Explanation {
  /// Sum of all lines: the sum of bond enthalpies for GasFormation (free atoms minus formation enthalpy), the
  /// property itself otherwise.
  double sum = 0;
  Prediction prediction;  ///< of the property itself
  double gas_atoms = 0;  ///< formation enthalpy of the free atoms: prediction.value = gas_atoms − sum [J/mol]
  std::vector<ContextLine> lines;  ///< bonds by bond and surroundings, then the rest in the order of LineKind
  std::vector<ReferenceRow> rows;  ///< greatest weight first, ten at most
  std::vector<std::string> unseen;  ///< features that no row has, spelled out
};

/// @param graph    a structure or a repeat unit
/// @param options  as for predict; the gas heat capacity is explained at 298.15 K only
/// @errors those of context_molecule; estimate.temperature
/// @validity lines add up to `sum` exactly in the last printed digit: the own deviation takes up the rounding
Result<Explanation> explain(Property property, const molecule::Graph& graph,
                            const ContextOptions& options = {});

}  // namespace heatledger::estimate
