#include "core/step/linear.hpp"

#include <cmath>
#include <utility>

namespace heatledger::step {

bool solve_linear(std::vector<double>& rows, std::size_t n, std::vector<double>& x) {
  const std::size_t width = n + 1;
  for (std::size_t k = 0; k < n; ++k) {
    std::size_t pivot = k;
    for (std::size_t i = k + 1; i < n; ++i) {
      if (std::fabs(rows[i * width + k]) > std::fabs(rows[pivot * width + k])) pivot = i;
    }
    // Coefficients are stoichiometric numbers and shares of them: what is left of one after cancelling is
    // below 1e-12.
    if (std::fabs(rows[pivot * width + k]) < 1e-12) return false;
    if (pivot != k) {
      for (std::size_t c = k; c < width; ++c) std::swap(rows[k * width + c], rows[pivot * width + c]);
    }
    for (std::size_t i = k + 1; i < n; ++i) {
      const double factor = rows[i * width + k] / rows[k * width + k];
      if (factor == 0) continue;
      for (std::size_t c = k; c < width; ++c) rows[i * width + c] -= factor * rows[k * width + c];
    }
  }
  x.assign(n, 0);
  for (std::size_t k = n; k-- > 0;) {
    double right = rows[k * width + n];
    for (std::size_t c = k + 1; c < n; ++c) right -= rows[k * width + c] * x[c];
    x[k] = right / rows[k * width + k];
  }
  return true;
}

}  // namespace heatledger::step
