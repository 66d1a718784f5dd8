#include "core/facts/solution_heats.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>

#include "core/facts/library.hpp"

namespace heatledger::facts {
namespace {

TEST(SolutionHeats, HitTheirPointsAndStayBetweenThem) {
  for (const SolutionHeats& curve : solution_heats()) {
    for (std::size_t i = 0; i < curve.points.size(); ++i) {
      const SolutionHeatPoint& p = curve.points[i];
      EXPECT_NEAR(solution_heat_at(curve, p.ratio)->heat, p.heat, 1e-6) << curve.solute;
      if (i == 0) continue;
      const SolutionHeatPoint& before = curve.points[i - 1];
      for (const double share : {0.1, 0.5, 0.9}) {
        const double heat = solution_heat_at(curve, before.ratio + share * (p.ratio - before.ratio))->heat;
        EXPECT_GE(heat, std::min(before.heat, p.heat) - 1e-6) << curve.solute << " " << p.ratio;
        EXPECT_LE(heat, std::max(before.heat, p.heat) + 1e-6) << curve.solute << " " << p.ratio;
      }
    }
  }
}

TEST(SolutionHeats, InterpolatePointsLeftOut) {
  // Each inner point of the sulfuric acid curve from its neighbours. Where a step of the table spans up to a
  // factor of five in dilution the interpolation has to be within 1.5 kJ/mol, a fiftieth of the whole heat.
  const SolutionHeats* acid = find_solution_heats("H2SO4", 'l');
  ASSERT_NE(acid, nullptr);
  ASSERT_GE(acid->points.size(), 10u);
  for (std::size_t i = 1; i + 1 < acid->points.size(); ++i) {
    SolutionHeats without = *acid;
    without.points.erase(without.points.begin() + static_cast<std::ptrdiff_t>(i));
    if (acid->points[i + 1].ratio > 30) break;  // beyond, the second dissociation shifts over decades
    EXPECT_NEAR(solution_heat_at(without, acid->points[i].ratio)->heat, acid->points[i].heat, 1500)
        << acid->points[i].ratio;
  }
}

TEST(SolutionHeats, ApproachInfiniteDilution) {
  const SolutionHeats* hcl = find_solution_heats("HCl", 'g');
  ASSERT_NE(hcl, nullptr);
  ASSERT_TRUE(hcl->infinite.has_value());
  EXPECT_NEAR(solution_heat_at(*hcl, HUGE_VAL)->heat, hcl->infinite->heat, 1e-6);
  EXPECT_LE(solution_heat_at(*hcl, 1e9)->heat, hcl->points.back().heat);
}

TEST(SolutionHeats, GiveNothingOutsideTheCurve) {
  const SolutionHeats* soda = find_solution_heats("NaOH", 's');
  ASSERT_NE(soda, nullptr);
  EXPECT_FALSE(
      solution_heat_at(*soda, 1.0).has_value());  // below three waters the table ends: it is no solution
  EXPECT_FALSE(solution_heat_at(*soda, std::nan("")).has_value());
  const SolutionHeats* salt = find_solution_heats("NaCl", 's');
  ASSERT_NE(salt, nullptr);
  EXPECT_TRUE(salt->points.empty());
  EXPECT_NEAR(salt->infinite->heat, 3880, 1);  // Parker, NSRDS-NBS 2, 1965
  EXPECT_FALSE(solution_heat_at(*salt, 100).has_value());
  EXPECT_EQ(find_solution_heats("NaCl", 'g'), nullptr);
  EXPECT_EQ(find_solution_heats("??", 's'), nullptr);
}

TEST(SolutionHeats, BeginAtThePureLiquid) {
  const SolutionHeats* acid = find_solution_heats("H2SO4", 'l');
  ASSERT_NE(acid, nullptr);
  EXPECT_EQ(least_ratio(*acid), 0);
  EXPECT_EQ(solution_heat_at(*acid, 0)->heat, 0);
  EXPECT_FALSE(solution_heat_at(*acid, -0.1).has_value());
  // Without its first point the curve from the pure acid meets it within its ±, and no worse than the table's
  // 0.5.
  SolutionHeats without = *acid;
  without.points.erase(without.points.begin());
  const SolutionHeatPoint bridged = *solution_heat_at(without, acid->points[0].ratio);
  EXPECT_NEAR(bridged.heat, acid->points[0].heat, 500);
  EXPECT_GT(bridged.bridge, 500);
  EXPECT_EQ(solution_heat_at(*acid, 0.7)->bridge, 0);
  // 96 per cent by mass: between the pure acid and the first point, without a step there.
  const SolutionHeatPoint strong = *solution_heat_at(*acid, 0.2268);
  EXPECT_LT(strong.heat, -7100);
  EXPECT_GT(strong.heat, -8700);
  EXPECT_NEAR(solution_heat_at(*acid, 0.4999999)->heat, acid->points[0].heat, 1);
  // Nitric acid's table begins at 2.8 moles of water, too far to bridge; solids begin where the table does.
  EXPECT_GT(least_ratio(*find_solution_heats("HNO3", 'l')), 2);
  EXPECT_EQ(least_ratio(*find_solution_heats("NaOH", 's')), 3);
  EXPECT_TRUE(std::isinf(least_ratio(*find_solution_heats("NaCl", 's'))));
}

TEST(SolutionHeats, BelongToCompoundsOfTheLibrary) {
  for (const SolutionHeats& curve : solution_heats()) {
    EXPECT_FALSE(Library::embedded().find_formula(curve.solute).empty()) << curve.solute;
  }
}

}  // namespace
}  // namespace heatledger::facts
