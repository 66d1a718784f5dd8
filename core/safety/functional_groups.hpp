// Functional groups whose decomposition calls for a test before anything is heated, with the published range
// of their decomposition energy. The ranges say "test this", they never predict.
#pragma once

#include <vector>

#include "core/molecule/graph.hpp"

namespace heatledger::safety {

struct GroupFound {
  const char* name = "";  ///< "nitro group"
  int count = 0;
  double low = 0, high = 0;  ///< heat of decomposition per mole of the group [J/mol], exothermic, > 0
};

/// Groups of a structure in a fixed order, each once with its count.
/// @param graph  aromaticity perceived; either spelling of nitro, azide, diazo and N-oxide
/// @return empty: none of the groups known here
/// @source see functional_groups_source()
/// @example FunctionalGroups.AreFoundInEitherSpelling
std::vector<GroupFound> functional_groups(const molecule::Graph& graph);

/// Source of the ranges, as it is printed.
const char* functional_groups_source();

}  // namespace heatledger::safety
