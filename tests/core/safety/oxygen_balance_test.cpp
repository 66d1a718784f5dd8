#include "core/safety/oxygen_balance.hpp"

#include <gtest/gtest.h>

namespace heatledger::safety {
namespace {

double balance(const std::string& formula) {
  const Result<std::shared_ptr<const facts::Species>> species = facts::make_coded_species("X", 0, formula);
  EXPECT_TRUE(species.ok()) << formula;
  const Result<double> result = oxygen_balance(**species);
  EXPECT_TRUE(result.ok()) << formula;
  return result.ok() ? 100 * *result : 0;
}

TEST(OxygenBalance, OfKnownSubstances) {
  // J. Köhler, R. Meyer, A. Homburg, Explosives, 5th ed., to the last digit printed there.
  EXPECT_NEAR(balance("C7H5N3O6"), -73.9, 0.1);  // trinitrotoluene
  EXPECT_NEAR(balance("C3H5N3O9"), 3.5, 0.1);    // glycerol trinitrate
  EXPECT_NEAR(balance("H4N2O3"), 19.99, 0.05);   // ammonium nitrate
  EXPECT_NEAR(balance("C3H6N6O6"), -21.6, 0.1);  // hexogen
  EXPECT_NEAR(balance("C6H3N3O7"), -45.4, 0.1);  // picric acid
}

TEST(OxygenBalance, HalogensTakeHydrogenAndNeverOxygen) {
  // By hand from the formula: chlorobenzene −1600 (12 + 4/2) / 112.56; dichloromethane −1600 × 2 / 84.93;
  // tetrachloromethane keeps its four chlorines: −1600 × 2 / 153.81.
  EXPECT_NEAR(balance("C6H5Cl"), -1600 * 14 / 112.56, 0.05);
  EXPECT_NEAR(balance("CH2Cl2"), -1600 * 2 / 84.93, 0.02);
  EXPECT_NEAR(balance("CCl4"), -1600 * 2 / 153.81, 0.02);
  EXPECT_NEAR(balance("C2H6S"), -1600 * (4 + 3 + 2) / 62.13, 0.05);
}

TEST(OxygenBalance, SaysWhatItDoesNotCover) {
  const auto code = [](const std::string& formula) {
    return oxygen_balance(**facts::make_coded_species("X", 0, formula)).error().code;
  };
  EXPECT_EQ(code("NaNO3"), "safety.element");
  EXPECT_EQ(oxygen_balance(**facts::make_coded_species("X", 0.2)).error().code, "safety.no_composition");
}

}  // namespace
}  // namespace heatledger::safety
