#include "core/facts/solution_heats.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <map>
#include <string>

#include "core/facts/library.hpp"
#include "core/facts/solution_heat_capacities.hpp"
#include "tests/core/support/test_files.hpp"

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

/// Largest miss [J/mol] when each inner point of a curve is left out and found from its neighbours, up to a
/// dilution.
double largest_miss(const SolutionHeats& curve, double up_to) {
  double miss = 0;
  for (std::size_t i = 1; i + 1 < curve.points.size(); ++i) {
    if (curve.points[i + 1].ratio > up_to) break;
    SolutionHeats without = curve;
    without.points.erase(without.points.begin() + static_cast<std::ptrdiff_t>(i));
    miss = std::max(miss,
                    std::fabs(solution_heat_at(without, curve.points[i].ratio)->heat - curve.points[i].heat));
  }
  return miss;
}

TEST(SolutionHeats, InterpolatePointsLeftOut) {
  // A point left out doubles the step of the table, so that what is found in the middle of a step of the
  // whole table is about four times nearer (cubic pieces: more). The bounds are four times the ± of the
  // figures; for hydrogen chloride three times more, where the hydrate between 1 and 3 mol of water bends the
  // curve, for acetic and formic acid less, because all their heats are small.
  const std::map<std::string, double> bounds = {
      {"H2SO4", 2000}, {"HCl", 1500},  {"NaOH", 1000}, {"HNO3", 600},    {"NH3", 600},  {"HBr", 700},
      {"HI", 400},     {"HClO4", 800}, {"HF", 500},    {"CH3COOH", 150}, {"HCOOH", 150}};
  int seen = 0;
  for (const SolutionHeats& curve : solution_heats()) {
    if (curve.points.size() < 3) continue;
    const auto bound = bounds.find(std::string(curve.solute));
    ASSERT_NE(bound, bounds.end()) << curve.solute;
    // Weak acids go on dissociating over decades of dilution, where steps of the table span them.
    EXPECT_LE(largest_miss(curve, 60), bound->second) << curve.solute << ", " << curve.source;
    ++seen;
  }
  EXPECT_EQ(seen, 12);
}

TEST(SolutionHeats, MeetASecondTableBetweenTheirPoints) {
  // T. Urbanski, Chemistry and Technology of Explosives 1, table 16: heat set free by diluting with 500 mol
  // of water what already holds r mol, kcal/mol. Differences from r = 0 are integral heats. The ± of that
  // table is not stated; 0.1 kcal is its scatter.
  struct Row {
    double r, left;
  };
  const auto check = [](const char* solute, const std::vector<Row>& rows, double tolerance) {
    const SolutionHeats* curve = find_solution_heats(solute, 'l');
    ASSERT_NE(curve, nullptr);
    for (const Row& row : rows) {
      const double seen = (row.left - rows.front().left) * 4184;
      EXPECT_NEAR(solution_heat_at(*curve, row.r)->heat, seen, tolerance) << solute << " " << row.r;
    }
  };
  check("H2SO4", {{0, 18.26}, {0.5, 14.53}, {1, 11.57}, {1.5, 9.47}, {2, 8.28}, {3, 6.56}}, 420);
  // Nitric acid: two generations of tables part by 0.6 kJ/mol there (1 to 3 mol of water).
  check("HNO3", {{0, 7.43}, {1, 4.16}, {2, 2.65}, {3, 1.72}}, 650);
  // The correlation of Olsson, Jernqvist, Aly (1997) halfway between points of the caustic table, evaluated
  // by hand at 25 degC from 20 mol of water on, which the table has as -42.84: the two part by 0.2 where both
  // are.
  const SolutionHeats* soda = find_solution_heats("NaOH", 's');
  EXPECT_NEAR(solution_heat_at(*soda, 2.22)->heat, -22240, 250);
  EXPECT_NEAR(solution_heat_at(*soda, 3.5)->heat, -31980, 250);
  EXPECT_NEAR(solution_heat_at(*soda, 6)->heat, -39720, 250);
  EXPECT_NEAR(solution_heat_at(*soda, 8)->heat, -41590, 250);
}

TEST(SolutionHeats, MeetThePublishedChecks) {
  const test::Table checks = test::read_table("tests/data/checks/solution_heats.tsv");
  const auto cell = [&](const std::vector<std::string>& row, const char* column) {
    return row[checks.column(column)];
  };
  std::size_t seen = 0;
  for (const auto& row : checks.rows) {
    const std::string solute = cell(row, "solute");
    const double value = std::stod(cell(row, "value")) * 1000,
                 tolerance = std::stod(cell(row, "tolerance")) * 1000;
    const std::string r = cell(row, "r");
    const double ratio = r == "inf" ? HUGE_VAL : std::stod(r);
    // Tables of two generations differ by up to 1.6 kJ/mol: a figure is compared with its own.
    const bool parker = cell(row, "source").find("Parker") != std::string::npos;
    bool met = false;
    std::string tried;
    for (const SolutionHeats& curve : solution_heats()) {
      if (curve.solute != solute || curve.phase != cell(row, "phase").front()) continue;
      if (parker != (curve.source.find("Parker") != std::string_view::npos)) continue;
      const std::optional<SolutionHeatPoint> there =
          std::isinf(ratio) && curve.infinite ? curve.infinite : solution_heat_at(curve, ratio);
      if (!there) continue;
      const double heat = cell(row, "kind") == "integral" ? there->heat : there->heat - curve.infinite->heat;
      tried += std::to_string(heat) + " ";
      met = met || std::fabs(heat - value) <= tolerance;
    }
    EXPECT_TRUE(met) << cell(row, "id") << ": " << value << " against " << tried;
    ++seen;
  }
  EXPECT_EQ(seen, 95u);
}

TEST(SolutionHeats, HoldEverydayStrengths) {
  const auto at = [](const char* solute, char phase, double fraction, double molar_mass) {
    const SolutionHeats* curve = find_solution_heats(solute, phase);
    return curve == nullptr ? std::nullopt
                            : solution_heat_at(*curve, (1 - fraction) / fraction * molar_mass / 18.015);
  };
  EXPECT_TRUE(at("HNO3", 'l', 0.70, 63.012));
  EXPECT_TRUE(at("HNO3", 'l', 0.98, 63.012));
  EXPECT_TRUE(at("NaOH", 's', 0.50, 39.997));
  EXPECT_TRUE(at("HCl", 'g', 0.37, 36.458));
  EXPECT_TRUE(at("H2SO4", 'l', 0.96, 98.079));
  EXPECT_TRUE(at("H2SO4", 'l', 0.98, 98.079));
  EXPECT_TRUE(at("NH3", 'g', 0.25, 17.031));
  EXPECT_TRUE(at("HBr", 'g', 0.48, 80.912));
  const std::optional<SolutionHeatPoint> peroxide = at("H2O2", 'l', 0.35, 34.015);
  ASSERT_TRUE(peroxide);
  // Between nothing and the 3.43 kJ/mol of infinite dilution; its ± says how little is known in between.
  EXPECT_LT(peroxide->heat, -2000);
  EXPECT_GT(peroxide->heat, -3430);
  EXPECT_GT(peroxide->bridge, 300);
}

TEST(SolutionHeatCapacities, MeetWhatIsKnownOfTheirEnds) {
  const auto at = [](const char* solute, double fraction) {
    const SolutionHeatCapacities* table = find_solution_heat_capacities(solute);
    return table == nullptr ? std::nullopt : solution_heat_capacity_at(*table, fraction);
  };
  for (const char* solute : {"H2SO4", "HNO3", "HCl", "NaOH", "NH3", "H2O2"})
    EXPECT_NEAR(at(solute, 0)->cp, 4180, 1) << solute;
  // Pure acid, JANAF: 138.9 J/(mol K); within the ± of the table, 3 %.
  EXPECT_NEAR(at("H2SO4", 1)->cp, 138.9 / 0.098079, at("H2SO4", 1)->u95);
  // Figures that balances of textbooks use: 2.5 kJ/(kg K) at 50 %, 3.85 at 10 % (Felder, Rousseau, ch. 8, 9).
  EXPECT_NEAR(at("H2SO4", 0.5)->cp, 2500, at("H2SO4", 0.5)->u95);
  EXPECT_NEAR(at("H2SO4", 0.1)->cp, 3850, at("H2SO4", 0.1)->u95);
  EXPECT_NEAR(at("NaOH", 0.2)->cp, 3600, at("NaOH", 0.2)->u95);
  EXPECT_FALSE(at("NaOH", 0.7));
  EXPECT_FALSE(at("H2SO4", -0.1));
  EXPECT_EQ(find_solution_heat_capacities("NaCl"), nullptr);
  // The ± fades in dilution: what is all water is known as water is.
  EXPECT_LT(at("NaOH", 0.01)->u95, 25);
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
      solution_heat_at(*soda, 1.0).has_value());  // below two waters the table ends: it is no solution
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
  // Solids begin where the table does.
  EXPECT_EQ(least_ratio(*find_solution_heats("HNO3", 'l')), 0);
  EXPECT_EQ(least_ratio(*find_solution_heats("NaOH", 's')), 2.1);
  EXPECT_TRUE(std::isinf(least_ratio(*find_solution_heats("NaCl", 's'))));
}

TEST(SolutionHeats, BelongToCompoundsOfTheLibrary) {
  for (const SolutionHeats& curve : solution_heats()) {
    EXPECT_FALSE(Library::embedded().find_formula(curve.solute).empty()) << curve.solute;
  }
}

}  // namespace
}  // namespace heatledger::facts
