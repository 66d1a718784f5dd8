// Element and charge balance by exact rational arithmetic.
#pragma once

#include <cstdint>
#include <string>
#include <vector>

#include "core/base/result.hpp"
#include "core/molecule/formula.hpp"

namespace heatledger::molecule {

/// One element (or charge) on both sides with the coefficients as written.
struct ElementBalance {
  int key = 0;  ///< as in Composition::atoms; -1 is charge
  double left = 0, right = 0;
};

struct BalanceCheck {
  bool balanced = false;
  std::vector<ElementBalance> elements;   ///< C, H first, then by symbol; charge last and only if any species has one
};

/// @param left, right  compositions with their coefficients, in order
BalanceCheck check_balance(const std::vector<std::pair<double, Composition>>& left,
                           const std::vector<std::pair<double, Composition>>& right);

/// All independent ways to balance: each entry one coefficient per species (left then right), smallest whole numbers,
/// zero where the species takes no part. One entry: the equation balances uniquely.
/// @errors balance.missing_element (names element and side), balance.impossible
Result<std::vector<std::vector<std::int64_t>>> balance(const std::vector<Composition>& left,
                                                       const std::vector<Composition>& right);

}  // namespace heatledger::molecule
