#include "core/safety/criticality.hpp"

#include <gtest/gtest.h>

namespace heatledger::safety {
namespace {

using uncertainty::Quantity;
using uncertainty::source_key;
using uncertainty::SourceKind;

constexpr double kZero = 273.15;

struct Case {
  const char* name;
  double process, mtsr, mtt, td24;  ///< [°C]; below −300: blank
  Criticality expected;
};

constexpr double kBlank = -1000;

std::optional<double> kelvin(double celsius) {
  return celsius == kBlank ? std::nullopt : std::optional<double>(celsius + kZero);
}

class EveryCase : public testing::TestWithParam<Case> {};

/// Orders of the four temperatures as the published scheme draws them, and every tie that two of them can
/// make.
TEST_P(EveryCase, HasItsClass) {
  const Case& c = GetParam();
  EXPECT_EQ(classify({c.process + kZero, c.mtsr + kZero, kelvin(c.mtt), kelvin(c.td24)}), c.expected);
}

INSTANTIATE_TEST_SUITE_P(
    Criticality, EveryCase,
    testing::Values(Case{"limit_before_decomposition", 60, 90, 110, 150, Criticality::Class1},
                    Case{"decomposition_before_limit", 60, 90, 150, 110, Criticality::Class2},
                    Case{"boils", 60, 120, 100, 150, Criticality::Class3},
                    Case{"boils_and_decomposes", 60, 160, 100, 150, Criticality::Class4},
                    Case{"decomposes_before_boiling", 60, 120, 180, 110, Criticality::Class5},
                    Case{"limit_above_mtsr_above_decomposition", 60, 170, 180, 110, Criticality::Class5},
                    Case{"mtsr_above_limit_above_decomposition", 60, 190, 180, 110, Criticality::Class5},
                    Case{"tie_mtsr_limit", 60, 100, 100, 150, Criticality::Class3},
                    Case{"tie_limit_decomposition_above_mtsr", 60, 90, 120, 120, Criticality::Class2},
                    Case{"tie_mtsr_decomposition_limit_above", 60, 120, 150, 120, Criticality::Class5},
                    Case{"tie_mtsr_decomposition_limit_below", 60, 120, 100, 120, Criticality::Class4},
                    Case{"tie_limit_decomposition_below_mtsr", 60, 150, 120, 120, Criticality::Class5},
                    Case{"tie_of_all_three", 60, 120, 120, 120, Criticality::Class5},
                    Case{"decomposition_at_process_temperature", 60, 90, 110, 60, Criticality::NotOperable},
                    Case{"decomposition_below_process_temperature", 60, 90, 110, 40,
                         Criticality::NotOperable},
                    Case{"not_operable_needs_no_limit", 60, 90, kBlank, 40, Criticality::NotOperable},
                    Case{"boiling_already", 110, 150, 100, 200, Criticality::Class3},
                    Case{"no_heat_set_free", 60, 60, 100, 150, Criticality::Class1},
                    Case{"decomposition_not_measured", 60, 90, 110, kBlank, Criticality::NeedsTd24},
                    Case{"neither_known", 60, 90, kBlank, kBlank, Criticality::NeedsTd24},
                    Case{"limit_not_known", 60, 90, kBlank, 150, Criticality::NeedsMtt}),
    [](const testing::TestParamInfo<Case>& each) { return std::string(each.param.name); });

TEST(Criticality, EveryOrderOfTheFourTemperatures) {
  // Over a grid of all orders the class never falls when T_D24 falls or MTSR rises.
  for (int mtt = 0; mtt < 6; ++mtt) {
    for (int mtsr = 0; mtsr < 6; ++mtsr) {
      for (int td24 = 1; td24 < 6; ++td24) {
        const double t = 300;
        const Criticality here = classify({t - 1, t + mtsr, t + mtt, t + td24});
        EXPECT_GE(classify({t - 1, t + mtsr, t + mtt, t + td24 - 1.0}), here);
        EXPECT_GE(classify({t - 1, t + mtsr + 1.0, t + mtt, t + td24}), here);
      }
    }
  }
}

TEST(Criticality, RoundingDoesNotBreakATie) {
  // 60 °C and a rise of 40 K against a limit of 100 °C, each converted on its own way.
  EXPECT_EQ(classify({333.15, 333.15 + 40 - 1e-10, 373.15, 423.15}), Criticality::Class3);
}

Quantity exact(double celsius) {
  return Quantity(celsius + kZero);
}
Quantity within(double celsius, double u95, std::uint64_t source) {
  return Quantity(celsius + kZero, u95, source_key(SourceKind::Typed, source));
}

TEST(Criticality, TakesTheWorstClassThatHoldsEnoughOfTheDraws) {
  // MTSR 95 ± 10 °C against a limit of 100 °C: one in six of the draws passes it (z = 0.98, 16.4 %).
  UncertainFailure failure{exact(60), within(95, 10, 1), exact(100), exact(150)};
  const Assessment assessment = assess(failure);
  EXPECT_EQ(assessment.at_means, Criticality::Class1);
  EXPECT_EQ(assessment.verdict, Criticality::Class3);
  // Four standard errors of a share of 16 % over 10 000 draws.
  EXPECT_NEAR(assessment.shares[2], 0.1635, 0.0148);
  EXPECT_NEAR(assessment.shares[0] + assessment.shares[2], 1, 1e-12);
  EXPECT_EQ(assessment.words, "class 3");
}

TEST(Criticality, ARareClassDoesNotCount) {
  // 5 K at a standard deviation of 2.04 K: z = 2.45, 0.7 % of the draws.
  const Assessment assessment = assess({exact(60), within(95, 4, 1), exact(100), exact(150)});
  EXPECT_TRUE(assessment.drawn);
  EXPECT_EQ(assessment.verdict, Criticality::Class1);
  EXPECT_GT(assessment.shares[2], 0);
  EXPECT_LT(assessment.shares[2], 0.025);
}

TEST(Criticality, WhatTheTemperaturesShareCancels) {
  // Process temperature and MTSR move together; the limit is exact.
  const Quantity process = within(60, 8, 1);
  const Assessment shared = assess({process, within(75, 8, 1), exact(200), within(64, 8, 1)});
  EXPECT_EQ(shared.shares[4], 1);  // T_D24 stays 4 K above and 11 K below in every draw
  const Assessment apart = assess({process, within(75, 8, 2), exact(200), within(64, 8, 3)});
  EXPECT_GT(apart.shares[5], 0.1);  // 4 K against 5.8 K: z = 0.69, a quarter is not operable
  EXPECT_EQ(apart.verdict, Criticality::NotOperable);
}

TEST(Criticality, ABlankIsSaidNotGuessed) {
  const Assessment assessment = assess({exact(60), within(95, 10, 1), exact(100), std::nullopt});
  EXPECT_EQ(assessment.verdict, Criticality::NeedsTd24);
  EXPECT_EQ(assessment.words, "class needs T_D24");
  EXPECT_FALSE(assessment.drawn);
  EXPECT_TRUE(assessment.meaning.empty());
}

TEST(Criticality, BandsKeepTheirEnds) {
  EXPECT_EQ(severity(49.9), Band::Low);
  EXPECT_EQ(severity(50), Band::Medium);
  EXPECT_EQ(severity(200), Band::Medium);
  EXPECT_EQ(severity(200.1), Band::High);
  EXPECT_EQ(likelihood(24.1 * 3600), Band::Low);
  EXPECT_EQ(likelihood(24 * 3600.0), Band::Medium);
  EXPECT_EQ(likelihood(8 * 3600.0), Band::Medium);
  EXPECT_EQ(likelihood(7.9 * 3600), Band::High);
}

}  // namespace
}  // namespace heatledger::safety
