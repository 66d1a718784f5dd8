// Small dense systems of linear equations.
#pragma once

#include <cstddef>
#include <vector>

namespace heatledger::step {

/// Solves n equations by elimination with the largest pivot of the column.
/// @param rows  n rows of n coefficients and the right side; overwritten
/// @param x     n values
/// @return false when the rows depend on each other
bool solve_linear(std::vector<double>& rows, std::size_t n, std::vector<double>& x);

}  // namespace heatledger::step
