#include "core/document/burning_reading.hpp"

#include <gtest/gtest.h>

#include <algorithm>

#include "core/document/step_kinds.hpp"
#include "core/document/typed_species.hpp"

namespace heatledger::document {
namespace {

/// A burning step and what it was read as.
class BurningReadingTest : public testing::Test {
 protected:
  BurningReadingTest() {
    sheet_.id = "s1";
    sheet_.kind = "burning";
    feed("gas", "fuel", "100 Nm3/h", {{"methane(g)", "95 mol%"}, {"nitrogen(g)", "rest"}});
    sheet_.blanks["air_ratio"] = "1.2";
  }

  FeedSheet& feed(const char* name, const char* role, const char* total,
                  const std::vector<std::pair<const char*, const char*>>& rows) {
    FeedSheet one;
    one.name = name;
    one.role = role;
    one.total = total;
    for (const auto& row : rows) {
      FeedRow typed;
      typed.species = row.first;
      typed.amount = row.second;
      one.rows.push_back(typed);
    }
    sheet_.feeds.push_back(one);
    return sheet_.feeds.back();
  }

  StepContext context() {
    StepContext c;
    c.species = &library_;
    c.names = &names_;
    c.ledger = [](const std::string&) { return std::shared_ptr<const balance::Ledger>(); };
    c.above = [](const std::string&) -> const step::StepResult* { return nullptr; };
    return c;
  }

  BurningReading read() { return read_burning(sheet_, context()); }

  burning::BurnInput input() {
    BurningReading reading = read();
    for (const Error& error : reading.errors) ADD_FAILURE() << error.where << ": " << error.message;
    return reading.input;
  }

  StepOutcome computed() {
    StepOutcome outcome;
    step::Lookups lookups;
    compute_burning(sheet_, context(), lookups, outcome);
    return outcome;
  }

  /// Code and place of the only error.
  std::string refused() {
    const BurningReading reading = read();
    return reading.errors.size() == 1 ? reading.errors[0].code + " " + reading.errors[0].where
                                      : std::to_string(reading.errors.size()) + " errors";
  }

  TypedFigures typed_;
  units::NamedFigures names_;
  SheetLibrary library_{typed_};
  StepSheet sheet_;
};

TEST_F(BurningReadingTest, SharesAndTotalBecomeFlows) {
  const burning::BurnInput in = input();
  ASSERT_EQ(in.streams.size(), 1u);
  // 100 normal m³/h of the ideal gas: 100 / 22.414 kmol/h.
  EXPECT_NEAR(in.streams[0].moles(), 100 / 22.414e-3 / 3600, 1e-9);
  EXPECT_NEAR(in.streams[0].parts[1].moles / in.streams[0].moles(), 0.05, 1e-12);
  EXPECT_EQ(in.rule, burning::AirRule::Ratio);
  EXPECT_DOUBLE_EQ(in.air_figure.value, 1.2);
  EXPECT_GT(in.air.water, 0.015);  // humid air unless said: 60 % at 25 °C holds 1.9 %
}

TEST_F(BurningReadingTest, AmountsByMassAndByLiquidVolume) {
  sheet_.feeds.clear();
  feed("waste", "liquid waste", "", {{"methanol(l)", "32.042 kg/h"}, {"toluene(l)", "1 m3/h"}});
  const burning::BurnInput in = input();
  ASSERT_EQ(in.streams.size(), 1u);
  EXPECT_NEAR(in.streams[0].parts[0].moles * 3600, 1000, 0.1);
  EXPECT_NEAR(in.streams[0].parts[1].moles * 3600 * 92.14e-3, 865,
              10);  // toluene, 862 to 867 kg/m³ in handbooks
}

TEST_F(BurningReadingTest, OxygenInTheFlueGasIsDryOrWet) {
  sheet_.blanks.erase("air_ratio");
  sheet_.blanks["flue_oxygen"] = "3 %";
  EXPECT_EQ(refused(), "burning.dry_or_wet blanks.flue_oxygen");
  sheet_.blanks["flue_oxygen"] = "(3 ± 0.2) % dry";
  EXPECT_EQ(input().rule, burning::AirRule::FlueDry);
  EXPECT_NEAR(input().air_figure.u95, 0.002, 1e-12);
  sheet_.blanks["flue_oxygen"] = "2.6 % wet";
  EXPECT_EQ(input().rule, burning::AirRule::FlueWet);
}

TEST_F(BurningReadingTest, AirIsFixedOnceAndOnlyOnce) {
  sheet_.blanks["flue_oxygen"] = "3 % dry";
  EXPECT_EQ(refused(), "burning.air_twice blanks.air_ratio");
  sheet_.blanks.clear();
  EXPECT_EQ(refused(), "burning.air blanks.air_ratio");
  feed("air", "combustion air", "1200 Nm3/h", {});
  const burning::BurnInput in = input();
  EXPECT_EQ(in.rule, burning::AirRule::Flow);
  // Normal cubic metres are dry; the water comes with it.
  EXPECT_NEAR(in.air_figure.value / (1 + in.air.water), 1200 / 22.414e-3 / 3600, 1e-9);
}

TEST_F(BurningReadingTest, KindsOfAir) {
  sheet_.blanks["air"] = "O2 + 3.76 N2";
  EXPECT_NEAR(input().air.oxygen, 1 / 4.76, 1e-12);
  EXPECT_EQ(input().air.water, 0);
  sheet_.blanks["air"] = "30 % O2";
  EXPECT_NEAR(input().air.oxygen, 0.3, 1e-12);
  sheet_.blanks["air"] = "dry air";
  sheet_.blanks["humidity"] = "80 % at 30 °C";
  EXPECT_GT(input().air.water, 0.03);
  sheet_.blanks["air"] = "12 % O2";
  EXPECT_EQ(refused(), "burning.air blanks.air");
  sheet_.blanks["air"] = "mountain air";
  EXPECT_EQ(refused(), "burning.air blanks.air");
  sheet_.blanks.erase("air");
  sheet_.blanks["humidity"] = "140 %";
  EXPECT_EQ(refused(), "air.humidity blanks.humidity");
}

TEST_F(BurningReadingTest, AnalysisWithTypedOrCorrelatedCalorificValue) {
  sheet_.feeds.clear();
  feed("pellets", "fuel by analysis", "500 kg/h",
       {{"C", "46 wt%"},
        {"H", "5.6 wt%"},
        {"O", "rest"},
        {"N", "0.2 wt%"},
        {"ash", "0.6 wt%"},
        {"moisture", "8 wt%"}});
  EXPECT_EQ(input().streams[0].parts.size(), 2u);
  EXPECT_NEAR(input().streams[0].mass(), 500.0 / 3600, 1e-9);
  sheet_.blanks["calorific"] = "18.2 MJ/kg";
  EXPECT_EQ(refused(), "burning.calorific blanks.calorific");
  sheet_.blanks["calorific"] = "17.1 MJ/kg net";
  const StepOutcome outcome = computed();
  ASSERT_NE(outcome.findings, nullptr);
  bool seen = false;
  for (const step::FindingGroup& group : outcome.findings->groups) {
    for (const step::Finding& finding : group.findings) {
      if (finding.id != "calorific.0.net.mass") continue;
      seen = true;
      EXPECT_NEAR(finding.value.value(), 17.1e6, 2000);  // 2 kJ/kg: atomic masses to four digits
    }
  }
  EXPECT_TRUE(seen);
  sheet_.feeds[0].rows[0].species = "graphite";
  EXPECT_EQ(refused(), "burning.analysis_row feeds[0].rows[0].species");
}

TEST_F(BurningReadingTest, NamesWhatItCannotUse) {
  sheet_.feeds[0].role = "boiler";
  EXPECT_EQ(refused(), "burning.role feeds[0].role");
  sheet_.feeds[0].role = "fuel";
  sheet_.feeds[0].rows[0].species = "trifluoromethane(g)";
  EXPECT_EQ(refused(), "burning.not_covered feeds[0].rows[0].species");
  sheet_.feeds[0].rows[0].species = "methane(g)";
  sheet_.feeds[0].rows[1].amount = "10 mol%";
  EXPECT_EQ(refused(), "step.shares feeds[0].rows[0].amount");
  sheet_.feeds[0].rows[1].amount = "5 mol%";
  feed("leak", "dilution air", "", {});
  EXPECT_EQ(refused(), "burning.no_amount feeds[1].total");
  sheet_.feeds.pop_back();
  sheet_.blanks["loss"] = "3 bar";
  EXPECT_EQ(refused(), "step.figure blanks.loss");
}

TEST_F(BurningReadingTest, EveryFigureHasItsInterval) {
  sheet_.blanks["air_ratio"] = "1.2 ± 0.05";
  const StepOutcome outcome = computed();
  ASSERT_TRUE(outcome.errors.empty());
  ASSERT_NE(outcome.findings, nullptr);
  EXPECT_TRUE(outcome.findings->closes);
  const auto figure = [&](const char* id) {
    for (const step::FindingGroup& group : outcome.findings->groups) {
      for (const step::Finding& finding : group.findings) {
        if (finding.id == id) return finding.value;
      }
    }
    ADD_FAILURE() << id;
    return uncertainty::Quantity();
  };
  // Slope of the flame temperature by working the step out at the end of the interval.
  StepSheet moved = sheet_;
  sheet_.blanks["air_ratio"] = "1.25";
  const StepOutcome at_end = computed();
  double end = 0;
  for (const step::Finding& finding : at_end.findings->groups[0].findings) {
    if (finding.id == "flame.complete") end = finding.value.value();
  }
  EXPECT_GT(figure("flame.complete").u95(), std::abs(end - figure("flame.complete").value()));
  EXPECT_LT(figure("flame.complete").u95(), std::abs(end - figure("flame.complete").value()) + 25);
  // The net heat does not depend on the air.
  EXPECT_LT(figure("heat.net").u95(), 1e-3 * figure("heat.net").value());
  EXPECT_EQ(outcome.findings->charts.size(), 2u);
}

TEST_F(BurningReadingTest, SupportFuelNeedsNoAmount) {
  sheet_.feeds.clear();
  feed("vent", "vent", "1000 Nm3/h",
       {{"toluene(g)", "0.2 mol%"}, {"oxygen(g)", "20 mol%"}, {"nitrogen(g)", "rest"}});
  feed("support", "support fuel", "", {{"methane(g)", ""}});
  sheet_.sought = "support";
  sheet_.blanks.clear();
  sheet_.blanks["burner_ratio"] = "1.1";
  sheet_.blanks["chamber_temperature"] = "850 °C";
  const StepOutcome outcome = computed();
  ASSERT_TRUE(outcome.errors.empty()) << outcome.errors[0].message;
  EXPECT_EQ(outcome.findings->groups[0].findings[0].id, "support.mass");
  EXPECT_GT(outcome.findings->groups[0].findings[0].value.value(), 0);
  sheet_.blanks.erase("chamber_temperature");
  const StepOutcome blank = computed();
  ASSERT_EQ(blank.errors.size(), 1u);
  EXPECT_EQ(blank.errors[0].code, "burning.no_chamber_temperature");
}

}  // namespace
}  // namespace heatledger::document
