// What average bonds do not hold in a structure: where a bond sum is known to miss, and in which direction.
#pragma once

#include <string>
#include <vector>

#include "core/facts/resolve.hpp"

namespace heatledger::balance {

/// Groups of the structure that a sum of average bonds misses, in plain words, the heaviest first; empty for
/// plain ones.
/// @source size and sign of each: gas atomisation enthalpies (ATcT 1.112, CRC Handbook 95th ed.) against bond
/// sums of the primary set; test Strains, NamesWhatTheBondSumMisses
std::vector<std::string> strains_of(const facts::Species& species);

}  // namespace heatledger::balance
