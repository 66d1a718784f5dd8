// Features of rings: sizes, fusion, ring systems, positions on aromatic rings.
#pragma once

#include "core/estimate/context_features.hpp"

namespace heatledger::estimate {

/// R0, R1, R1h, R2, RS, RF, RP, SC, OMP0, OMP, OMP2; adds the ring measure.
void count_ring_features(const ContextGraph& graph, FeatureSink& sink, DeviationMeasures& measures);

}  // namespace heatledger::estimate
