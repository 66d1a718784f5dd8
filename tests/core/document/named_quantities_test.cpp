// The table of named quantities: order of working out, circles, units, what cells make of it.
#include "core/document/named_quantities.hpp"

#include <gtest/gtest.h>

namespace heatledger::document {
namespace {

NamedQuantities table(std::initializer_list<std::pair<const char*, const char*>> rows) {
  NamedQuantities all;
  for (const auto& row : rows) {
    NamedQuantity one;
    one.name = row.first;
    one.value = row.second;
    all.push_back(one);
  }
  return all;
}

TEST(NamedQuantities, AreWorkedOutInTheOrderOfTheirCalls) {
  const ReadQuantities read =
      read_quantities(table({{"both", "feed + 2*side"}, {"side", "feed / 4"}, {"feed", "1.2 ± 0.1 t/h"}}));
  EXPECT_TRUE(read.errors.empty());
  ASSERT_TRUE(read.rows[0].figure.has_value());
  EXPECT_NEAR(read.rows[0].figure->value.value(), 1.8 * 1000 / 3600, 1e-12);
  // One feed is one error, however often it is called: 1.5 × 0.1 t/h.
  EXPECT_NEAR(read.rows[0].figure->value.u95(), 0.15 * 1000 / 3600, 1e-12);
}

TEST(NamedQuantities, ACircleNamesWhoTakesPart) {
  const ReadQuantities read =
      read_quantities(table({{"a_flow", "b_flow"}, {"b_flow", "c_flow * 2"}, {"c_flow", "a_flow + 1 kg/h"}}));
  ASSERT_FALSE(read.errors.empty());
  EXPECT_EQ(read.errors.back().code, "quantity.circle");
  EXPECT_NE(read.errors.back().message.find("a_flow → b_flow → c_flow → a_flow"), std::string::npos)
      << read.errors.back().message;
  EXPECT_TRUE(read.names.empty());
  const ReadQuantities itself = read_quantities(table({{"x_feed", "x_feed + 1"}}));
  ASSERT_EQ(itself.errors.size(), 1u);
  EXPECT_EQ(itself.errors[0].code, "quantity.circle");
}

TEST(NamedQuantities, EveryErrorNamesItsCell) {
  const ReadQuantities read = read_quantities(
      table({{"kg", "3"}, {"", "4 kg"}, {"twice", "1"}, {"twice", "2"}, {"wrong", "3 kg + 2 h"}}));
  ASSERT_EQ(read.errors.size(), 4u);
  EXPECT_EQ(read.errors[0].where, "quantities[0].name");
  EXPECT_EQ(read.errors[1].where, "quantities[1].name");
  EXPECT_EQ(read.errors[2].where, "quantities[3].name");
  EXPECT_EQ(read.errors[2].code, "quantity.twice");
  EXPECT_EQ(read.errors[3].where, "quantities[4].value, offset 5");
}

TEST(NamedQuantities, AreShownInTheUnitAskedFor) {
  NamedQuantities typed = table({{"heat", "3 kW * 2 h"}, {"rise", "60 °C - 20 °C"}, {"part", "1/4"}});
  typed[0].unit = "kWh";
  typed[1].unit = "K";
  typed[2].unit = "%";
  ReadQuantities read = read_quantities(typed);
  for (const ReadQuantity& row : read.rows) EXPECT_TRUE(row.shown_in.has_value());
  EXPECT_TRUE(read.errors.empty());
  typed[0].unit = "kg";
  read = read_quantities(typed);
  ASSERT_EQ(read.errors.size(), 1u);
  EXPECT_EQ(read.errors[0].code, "unit.dimension");
  EXPECT_EQ(read.errors[0].where, "quantities[0].unit");
}

}  // namespace
}  // namespace heatledger::document
