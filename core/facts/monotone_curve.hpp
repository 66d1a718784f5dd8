// A smooth curve through tabulated points that stays between them.
#pragma once

#include <vector>

namespace heatledger::facts {

/// Monotone cubic pieces through given points; no overshoot between two of them.
/// @source F. N. Fritsch and R. E. Carlson, SIAM J. Numer. Anal. 17 (1980) 238; slopes by their harmonic mean
class MonotoneCurve {
 public:
  MonotoneCurve() = default;
  /// @param x  rising; at least one point
  /// @param y  as many
  MonotoneCurve(std::vector<double> x, std::vector<double> y);

  /// @param x  between the first and the last point; beyond them the value at the end
  double at(double x) const;
  bool empty() const { return x_.empty(); }

 private:
  std::vector<double> x_, y_, slope_;
};

}  // namespace heatledger::facts
