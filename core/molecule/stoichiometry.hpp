// Element and charge balance by exact rational arithmetic.
#pragma once

#include <cstdint>
#include <string>
#include <utility>
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
  std::vector<ElementBalance>
      elements;  ///< C, H first, then by symbol; charge last and only if any species has one
};

/// @param left, right  compositions with their coefficients, in order
BalanceCheck check_balance(const std::vector<std::pair<double, Composition>>& left,
                           const std::vector<std::pair<double, Composition>>& right);

/// What an unbalanced equation lacks, in one or two sentences: "2 H and 1 O more stand on the left: one H2O
/// is missing on the right." Empty when it is balanced.
std::string describe_imbalance(const BalanceCheck& check);

/// All independent ways to balance: each entry one coefficient per species (left then right), smallest whole
/// numbers, zero where the species takes no part. One entry: the equation balances uniquely. Several: each is
/// a reaction that cannot be split further (as few species as possible), simplest first; every balanced
/// reaction of these species in the written direction is a sum of such. A pair of equal composition on both
/// sides (an inert, or two isomers) is a way of its own, A -> A, and stands last. Exact: extreme rays of the
/// cone {x >= 0, atoms and charge balance}, double description in whole numbers.
/// @errors balance.missing_element: an element (or charge) stands on one side only; names it and the side
///         balance.impossible: every element stands on both sides, yet no positive coefficients exist
///         balance.too_large: over 40 species, or numbers or ways beyond what is exact
/// @source T. S. Motzkin and others, Contributions to the Theory of Games II (1953) 51: double description
/// @complexity exponential in the number of species at worst; capped
/// @example Stoichiometry.ListsIndependentWays
Result<std::vector<std::vector<std::int64_t>>> balance(const std::vector<Composition>& left,
                                                       const std::vector<Composition>& right);

}  // namespace heatledger::molecule
