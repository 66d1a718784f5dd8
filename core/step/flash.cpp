#include "core/step/flash.hpp"

#include <cmath>

namespace heatledger::step {
namespace {

struct Slope {
  double value, slope;
};

/// Σ z (K − 1) / (1 + β (K − 1)), falling in β; K of a gas is endless, of a liquid that stays it is zero.
Slope balance(double beta, double total, const Flash& others, const std::vector<double>& amounts,
              const std::vector<double>& k) {
  Slope sum{0, 0};
  for (std::size_t i = 0; i < k.size(); ++i) {
    if (k[i] == 0 || amounts[i] == 0) continue;
    const double part = (k[i] - 1) / (1 + beta * (k[i] - 1)), z = amounts[i] / total;
    sum.value += z * part;
    sum.slope -= z * part * part;
  }
  if (others.gas > 0) {
    const double z = others.gas / total;
    sum.value += z / beta;
    sum.slope -= z / (beta * beta);
  }
  if (others.liquid > 0) {
    const double z = others.liquid / total;
    sum.value -= z / (1 - beta);
    sum.slope -= z / ((1 - beta) * (1 - beta));
  }
  return sum;
}

}  // namespace

double flash_total(const Flash& others, const std::vector<double>& amounts, const std::vector<double>& k) {
  double total = others.gas + others.liquid;
  for (std::size_t i = 0; i < k.size(); ++i) {
    if (k[i] > 0) total += amounts[i];
  }
  return total;
}

double vapour_moles(const Flash& others, const std::vector<double>& amounts, const std::vector<double>& k) {
  const double total = flash_total(others, amounts, k);
  if (!(total > 0)) return 0;
  if (others.gas == 0 && balance(0, total, others, amounts, k).value <= 0) return 0;
  if (others.liquid == 0 && balance(1, total, others, amounts, k).value >= 0) return total;
  // One root in between: Newton, held inside the bracket.
  double low = others.gas / total, high = 1 - others.liquid / total, beta = 0.5 * (low + high);
  for (int turn = 0; turn < 100; ++turn) {
    const Slope at = balance(beta, total, others, amounts, k);
    (at.value > 0 ? low : high) = beta;
    double next = beta - at.value / at.slope;
    if (!(next > low && next < high)) next = 0.5 * (low + high);
    if (std::fabs(next - beta) <= 1e-15) return next * total;
    beta = next;
  }
  return beta * total;
}

}  // namespace heatledger::step
