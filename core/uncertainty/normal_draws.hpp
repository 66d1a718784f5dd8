// Seeded draws from normal distributions. Only + − × ÷ √ and one logarithm a pair, so that native and browser
// draw alike.
#pragma once

#include "core/uncertainty/quantity.hpp"

namespace heatledger::uncertainty {

/// 95 % half width of the normal distribution in standard deviations.
constexpr double kHalfWidth = 1.959963984540054;

/// xoshiro256** with a splitmix64 start.
/// @source D. Blackman, S. Vigna, ACM Trans. Math. Softw. 47 (2021) 36
class Random {
 public:
  explicit Random(std::uint64_t seed);

  /// Standard normal, by Marsaglia's polar method. @source SIAM Rev. 6 (1964) 260
  double normal();

 private:
  double uniform();

  std::uint64_t state_[4];
  double other_ = 0;
  bool kept_ = false;
};

/// Cholesky's root in place, lower triangle by rows; a direction without any spread of its own keeps a zero
/// there.
/// @param m  n × n, symmetric, of which the lower triangle is read
void take_root(std::vector<double>& m, std::size_t n);

/// Draws quantities together, with all that they have in common.
/// @return  one row of `draws` values for each quantity
/// @complexity  draws × quantities²
std::vector<std::vector<double>> draw_together(const std::vector<Quantity>& quantities, std::size_t draws,
                                               std::uint64_t seed);

}  // namespace heatledger::uncertainty
