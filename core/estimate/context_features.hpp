// Counting: every bond, atom, ring and contact of a ContextGraph turned into features. For people, each count
// can be kept with the place in the molecule where it arose.
#pragma once

#include <cstdint>
#include <vector>

#include "core/estimate/context_graph.hpp"
#include "core/estimate/context_molecule.hpp"
#include "core/estimate/feature_code.hpp"

namespace heatledger::estimate {

/// Where a count arose, so that a ledger can put it on a line.
struct FeatureSite {
  enum class Where : std::uint8_t {
    Nowhere,    ///< no single place: rings, contacts, the molecule as a whole
    Bond,       ///< heavy-heavy bond `first`
    Hydrogens,  ///< the X-H bonds of atom `first`
    Atom,       ///< atom `first`: shared among its bonds
    TwoBonds    ///< bonds `first` and `second`, half each
  } where = Where::Nowhere;
  std::uint32_t first = 0, second = 0;
};

/// One act of counting.
struct FeatureInstance {
  std::uint64_t key = 0;
  FeatureClass family = FeatureClass::K0;
  double amount = 0;
  FeatureSite site;
  FeatureCode code{FeatureClass::K0};
};

/// Gathers counts by key. Small open-addressing table; memory is reused between molecules.
class FeatureSink {
 public:
  FeatureSink();
  /// Keeps every instance too; for explaining, not for bulk work.
  void keep_instances(std::vector<FeatureInstance>* instances) { instances_ = instances; }

  void add(const FeatureCode& code, double amount, FeatureSite site = {});
  /// Takes out what was gathered, sorted by key, zero counts dropped; the sink is empty afterwards.
  std::vector<FeatureCount> take();

 private:
  void grow();
  std::vector<FeatureCount> counts_;
  std::vector<std::uint32_t> slots_;  ///< index + 1 into counts_
  std::vector<FeatureInstance>* instances_ = nullptr;
};

/// Counts all features of the graph but VX, which needs the donors.
void count_features(const ContextGraph& graph, FeatureSink& sink, DeviationMeasures& measures);

/// Everything that context_molecule gives, counted through a sink of the caller's.
ContextMolecule molecule_from(const ContextGraph& graph, FeatureSink& sink);

}  // namespace heatledger::estimate
