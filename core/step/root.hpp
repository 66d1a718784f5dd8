// Every place where a function of one number crosses zero, within limits.
#pragma once

#include <functional>
#include <optional>
#include <vector>

namespace heatledger::step {

/// A value, or nothing where the function has none.
using Function = std::function<std::optional<double>(double)>;

struct Search {
  std::vector<double> roots;              ///< rising
  std::optional<double> lowest, highest;  ///< of the function over the points tried; empty: no value anywhere
  double nearest_x = 0;                   ///< where the function came nearest to zero
  double nearest = 0;                     ///< its value there
  double first_x = 0, last_x = 0;         ///< where the function had values
};

/// Tries the points and closes in on every change of sign between neighbours.
/// @param points  rising
/// @param small   a function value that counts as zero, >= 0
Search find_roots(const Function& f, const std::vector<double>& points, double small);

/// Brent's method between two points with values of different sign.
/// @source R. P. Brent, Algorithms for Minimization without Derivatives, 1973, chapter 4
/// @return empty when the function has no value somewhere on the way
std::optional<double> close_in(const Function& f, double a, double fa, double b, double fb);

}  // namespace heatledger::step
