// The caution on a conversion beyond equilibrium, against published equilibrium constants.
#include "core/step/equilibrium.hpp"

#include <cmath>

#include "tests/core/step/steps.hpp"

namespace heatledger::step {
namespace {

using namespace test_steps;
using molecule::Phase;

Writer shift(double conversion, double temperature) {
  Writer w;
  w.feed("gas", 600);
  w.part("CO", Phase::Gas, 1).part("H2O", Phase::Gas, 1);
  w.reaction("CO(g) + H2O(g) -> CO2(g) + H2(g)", ProgressKind::Conversion, conversion, "CO");
  w.input.outlet.temperature = Typed{temperature, 0};
  return w;
}

TEST(Equilibrium, ConstantOfTheShiftReaction) {
  // Chase, NIST-JANAF Thermochemical Tables, 4th ed., 1998: log10 Kf at 800 K of CO2 25.829, CO 11.914,
  // H2O 13.289, so log10 K = 0.626; 0.02 for what other tables of the same gases give.
  const std::optional<EquilibriumCheck> check = equilibrium_check(solved(shift(0.5, 800)), 0);
  ASSERT_TRUE(check);
  EXPECT_NEAR(check->log_k / std::log(10.0), 25.829 - 11.914 - 13.289, 0.02);
  EXPECT_NEAR(check->log_q, 0, 1e-12);  // half converted, equal numbers: Q is one
}

TEST(Equilibrium, CautionsBeyondAndOnlyBeyond) {
  // sqrt(K) = x / (1 − x): 67 % at 800 K.
  const auto warned = [](const StepResult& r) {
    for (const std::string& caution : r.cautions) {
      if (caution.find("beyond equilibrium") != std::string::npos) return true;
    }
    return false;
  };
  EXPECT_FALSE(warned(solved(shift(0.62, 800))));
  EXPECT_TRUE(warned(solved(shift(0.75, 800))));
  EXPECT_FALSE(warned(solved(shift(0.75, 500))));
}

TEST(Equilibrium, AFullConversionOfABurningGasIsNotAccused) {
  Writer w;
  w.feed("gas", 298.15);
  w.part("methane", Phase::Gas, 1).part("oxygen", Phase::Gas, 3);
  w.reaction("CH4(g) + 2 O2(g) -> CO2(g) + 2 H2O(g)", ProgressKind::Conversion, 1, "methane");
  w.input.outlet.temperature = Typed{1200, 0};
  for (const std::string& caution : solved(w).cautions)
    EXPECT_EQ(caution.find("beyond equilibrium"), std::string::npos) << caution;
}

}  // namespace
}  // namespace heatledger::step
