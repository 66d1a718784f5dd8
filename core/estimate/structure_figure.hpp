// Figures of single structures by the shipped model, remembered: a sheet asks for the same few again with
// every edit. Sums over several molecules, measurements and rows left out stand in context_model.hpp.
#pragma once

#include <memory>

#include "core/base/result.hpp"
#include "core/estimate/context_model.hpp"
#include "core/molecule/graph.hpp"

namespace heatledger::estimate {

/// Figure of a structure as ContextModel::figure gives it, gas heat capacities at 298.15 K. Asked again for
/// the same graph it comes from memory, which is bounded. Not for use by two threads at once.
/// @errors as context_molecule
Result<std::shared_ptr<const ContextFigure>> structure_figure(Property property,
                                                              const molecule::Graph& graph);

}  // namespace heatledger::estimate
