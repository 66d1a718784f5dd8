#include "core/uncertainty/quantity.hpp"

#include <gtest/gtest.h>

namespace heatledger::uncertainty {
namespace {

TEST(Quantity, SharedSourcesCancelInADifference) {
  const Quantity bond(413, 5, source_key(SourceKind::BondValue, 1));
  Quantity difference = bond.scaled(4);
  difference.add(bond, -4);
  EXPECT_EQ(difference.value(), 0);
  EXPECT_EQ(difference.u95(), 0);
}

TEST(Quantity, IndependentSourcesAddInQuadrature) {
  Quantity sum(10, 3, source_key(SourceKind::BondValue, 1));
  sum.add(Quantity(20, 4, source_key(SourceKind::Compound, 1)), -1);
  EXPECT_EQ(sum.value(), -10);
  EXPECT_DOUBLE_EQ(sum.u95(), 5);
}

TEST(Quantity, KindsKeepEqualIndicesApart) {
  EXPECT_NE(source_key(SourceKind::BondValue, 7), source_key(SourceKind::Phase, 7));
}

}  // namespace
}  // namespace heatledger::uncertainty
