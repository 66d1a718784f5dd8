#include "core/uncertainty/normal_draws.hpp"

#include <cmath>

#include <gtest/gtest.h>

namespace heatledger::uncertainty {
namespace {

constexpr std::size_t kDraws = 20000;

double mean(const std::vector<double>& row) {
  double sum = 0;
  for (const double value : row) sum += value;
  return sum / static_cast<double>(row.size());
}

TEST(NormalDraws, HaveTheMeanAndTheWidthOfTheQuantity) {
  const Quantity q(100, 2 * kHalfWidth, source_key(SourceKind::Other, 1));  // s = 2
  const std::vector<double> row = draw_together({q}, kDraws, 7)[0];
  double square = 0, inside = 0;
  for (const double value : row) {
    square += (value - 100) * (value - 100);
    inside += std::fabs(value - 100) <= q.u95() ? 1 : 0;
  }
  // Standard errors over 20 000 draws: mean 0.014, s 0.5 %, share 0.15 %; four of each.
  EXPECT_NEAR(mean(row), 100, 0.057);
  EXPECT_NEAR(std::sqrt(square / kDraws), 2, 0.04);
  EXPECT_NEAR(inside / kDraws, 0.95, 0.0062);
}

TEST(NormalDraws, KeepWhatTwoQuantitiesShare) {
  const SourceKey shared = source_key(SourceKind::Other, 1), own = source_key(SourceKind::Other, 2);
  const Quantity a(10, 3, shared), b(20, std::vector<Part>{{shared, 3}, {own, 4}});
  const std::vector<std::vector<double>> rows = draw_together({a, b}, kDraws, 7);
  double square = 0;
  for (std::size_t i = 0; i < kDraws; ++i) {
    const double off = rows[1][i] - rows[0][i] - 10;
    square += off * off;
  }
  // The common part cancels: the difference is as wide as the other's own part, within four standard errors.
  EXPECT_NEAR(std::sqrt(square / kDraws) * kHalfWidth, 4, 0.08);
}

TEST(NormalDraws, AnExactQuantityStaysWhereItIs) {
  EXPECT_EQ(draw_together({Quantity(350)}, 100, 7)[0], std::vector<double>(100, 350.0));
}

TEST(NormalDraws, TheSameSeedGivesTheSameDraws) {
  const Quantity q(1, 1, source_key(SourceKind::Other, 1));
  EXPECT_EQ(draw_together({q}, 50, 3), draw_together({q}, 50, 3));
  EXPECT_NE(draw_together({q}, 50, 3), draw_together({q}, 50, 4));
}

}  // namespace
}  // namespace heatledger::uncertainty
