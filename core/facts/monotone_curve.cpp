#include "core/facts/monotone_curve.hpp"

#include <algorithm>
#include <cmath>

#include "core/base/check.hpp"

namespace heatledger::facts {

MonotoneCurve::MonotoneCurve(std::vector<double> x, std::vector<double> y)
    : x_(std::move(x)), y_(std::move(y)), slope_(x_.size(), 0) {
  CHECK(!x_.empty() && x_.size() == y_.size(), "a curve has points, each with both figures");
  const std::size_t n = x_.size();
  if (n == 1) return;
  std::vector<double> secant(n - 1);
  for (std::size_t i = 0; i + 1 < n; ++i) secant[i] = (y_[i + 1] - y_[i]) / (x_[i + 1] - x_[i]);
  slope_[0] = secant[0];
  slope_[n - 1] = secant[n - 2];
  for (std::size_t i = 1; i + 1 < n; ++i) {
    slope_[i] =
        secant[i - 1] * secant[i] <= 0 ? 0 : 2 * secant[i - 1] * secant[i] / (secant[i - 1] + secant[i]);
  }
  for (std::size_t i = 0; i + 1 < n; ++i) {
    if (secant[i] == 0) {
      slope_[i] = slope_[i + 1] = 0;
      continue;
    }
    const double a = slope_[i] / secant[i], b = slope_[i + 1] / secant[i];
    const double square = a * a + b * b;
    if (square > 9) {
      const double factor = 3 / std::sqrt(square);
      slope_[i] = factor * a * secant[i];
      slope_[i + 1] = factor * b * secant[i];
    }
  }
}

double MonotoneCurve::at(double x) const {
  if (x <= x_.front()) return y_.front();
  if (x >= x_.back()) return y_.back();
  const std::size_t above = static_cast<std::size_t>(std::upper_bound(x_.begin(), x_.end(), x) - x_.begin());
  const std::size_t i = above - 1;
  const double width = x_[i + 1] - x_[i], t = (x - x_[i]) / width, rest = 1 - t;
  return y_[i] * (1 + 2 * t) * rest * rest + y_[i + 1] * (3 - 2 * t) * t * t +
         width * t * rest * (slope_[i] * rest - slope_[i + 1] * t);
}

}  // namespace heatledger::facts
