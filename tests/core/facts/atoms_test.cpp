#include "core/facts/atoms.hpp"

#include <gtest/gtest.h>

namespace heatledger::facts {
namespace {

TEST(Atoms, TakeTheNetworkValueWhereThereIsOne) {
  // ATcT 1.112: carbon 716.87, nitrogen 472.435 kJ/mol; CODATA 1989 has 716.68 and 472.68.
  const std::optional<Datum> carbon = gas_atom_formation(6);
  ASSERT_TRUE(carbon.has_value());
  EXPECT_NEAR(carbon->value, 716870, 0.5);
  EXPECT_EQ(carbon->source, "ATcT 1.112");
  ASSERT_EQ(carbon->rivals.size(), 1u);
  EXPECT_NEAR(carbon->rivals[0].value, 716680, 0.5);
  EXPECT_FALSE(carbon->why_taken.empty());
  EXPECT_NEAR(gas_atom_formation(7)->value, 472435, 0.5);
}

TEST(Atoms, FallBackOnCodata) {
  const std::optional<Datum> sulfur = gas_atom_formation(16);  // CODATA 1989: 277.17 ± 0.15
  ASSERT_TRUE(sulfur.has_value());
  EXPECT_NEAR(sulfur->value, 277170, 0.5);
  EXPECT_NEAR(sulfur->u95, 150, 0.5);
  EXPECT_FALSE(sulfur->u95_is_default);
}

TEST(Atoms, AreEmptyWhereNoTableHasTheAtom) {
  EXPECT_FALSE(gas_atom_formation(0).has_value());
  EXPECT_FALSE(gas_atom_formation(118).has_value());
  EXPECT_FALSE(gas_atom_formation(-3).has_value());
}

}  // namespace
}  // namespace heatledger::facts
