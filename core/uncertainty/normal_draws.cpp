#include "core/uncertainty/normal_draws.hpp"

#include <cmath>

#include "core/uncertainty/covariance.hpp"

namespace heatledger::uncertainty {
namespace {

std::uint64_t turned(std::uint64_t x, int by) {
  return (x << by) | (x >> (64 - by));
}

}  // namespace

Random::Random(std::uint64_t seed) {
  for (std::uint64_t& word : state_) {
    seed += 0x9e3779b97f4a7c15ULL;
    std::uint64_t z = seed;
    z = (z ^ (z >> 30)) * 0xbf58476d1ce4e5b9ULL;
    z = (z ^ (z >> 27)) * 0x94d049bb133111ebULL;
    word = z ^ (z >> 31);
  }
}

double Random::uniform() {
  const std::uint64_t result = turned(state_[1] * 5, 7) * 9, shifted = state_[1] << 17;
  state_[2] ^= state_[0];
  state_[3] ^= state_[1];
  state_[1] ^= state_[2];
  state_[0] ^= state_[3];
  state_[2] ^= shifted;
  state_[3] = turned(state_[3], 45);
  return static_cast<double>(result >> 11) * 0x1.0p-53;
}

double Random::normal() {
  if (kept_) {
    kept_ = false;
    return other_;
  }
  double a = 0, b = 0, square = 0;
  do {
    a = 2 * uniform() - 1;
    b = 2 * uniform() - 1;
    square = a * a + b * b;
  } while (square >= 1 || square == 0);
  const double factor = std::sqrt(-2 * std::log(square) / square);
  other_ = b * factor;
  kept_ = true;
  return a * factor;
}

void take_root(std::vector<double>& m, std::size_t n) {
  for (std::size_t j = 0; j < n; ++j) {
    for (std::size_t i = j; i < n; ++i) {
      double sum = m[i * n + j];
      for (std::size_t k = 0; k < j; ++k) sum -= m[i * n + k] * m[j * n + k];
      if (i == j) {
        m[j * n + j] = sum > 1e-12 * m[j * n + j] ? std::sqrt(sum) : 0;
      } else {
        m[i * n + j] = m[j * n + j] > 0 ? sum / m[j * n + j] : 0;
      }
    }
  }
}

std::vector<std::vector<double>> draw_together(const std::vector<Quantity>& quantities, std::size_t draws,
                                               std::uint64_t seed) {
  const std::size_t n = quantities.size();
  std::vector<double> root(n * n, 0);
  for (std::size_t i = 0; i < n; ++i) {
    for (std::size_t j = 0; j <= i; ++j)
      root[i * n + j] = covariance(quantities[i], quantities[j]) / (kHalfWidth * kHalfWidth);
  }
  take_root(root, n);
  Random random(seed);
  std::vector<std::vector<double>> rows(n, std::vector<double>(draws));
  std::vector<double> z(n);
  for (std::size_t draw = 0; draw < draws; ++draw) {
    for (double& each : z) each = random.normal();
    for (std::size_t i = 0; i < n; ++i) {
      double value = quantities[i].value();
      for (std::size_t j = 0; j <= i; ++j) value += root[i * n + j] * z[j];
      rows[i][draw] = value;
    }
  }
  return rows;
}

}  // namespace heatledger::uncertainty
