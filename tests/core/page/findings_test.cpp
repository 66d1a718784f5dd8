// Figures and curves of a kind of step, set in type.
#include <gtest/gtest.h>

#include "core/page/findings_blocks.hpp"

namespace heatledger::page {
namespace {

namespace d = units::dimension;

step::Finding figure(const char* id, const char* label, const units::Dimension& dimension, double value,
                     double u95 = 0) {
  step::Finding finding;
  finding.id = id;
  finding.label = label;
  finding.dimension = dimension;
  finding.value = uncertainty::Quantity(value, u95, 1);
  return finding;
}

step::Findings sample() {
  step::Findings findings;
  step::FindingGroup group;
  group.id = "safety";
  group.heading = "Safety figures";
  group.findings.push_back(figure("end", "end temperature", d::kTemperature, 416.15, 12));
  group.findings.back().unfavourable = 428.15;
  group.findings.back().working = {"60 °C + 83 K"};
  group.findings.push_back(figure("share", "accumulation", d::kNumber, 0.25));
  group.findings.push_back(figure("lambda", "air ratio", d::kNumber, 1.25));
  group.findings.back().ratio = true;
  step::Finding missing;
  missing.id = "class";
  missing.label = "class";
  missing.why_missing = "needs T_D24";
  group.findings.push_back(missing);
  findings.groups.push_back(group);

  step::Chart chart;
  chart.id = "time";
  chart.title = "Temperature over the dosing";
  chart.described = "Temperature rises from 20 to 60 °C within two hours.";
  chart.x_label = "time";
  chart.y_label = "temperature";
  chart.x_dimension = d::kTime;
  chart.y_dimension = d::kTemperature;
  chart.curves.push_back({"vessel", step::CurveRole::Main, {0, 3600, 7200}, {293.15, 313.15, 333.15}});
  chart.curves.push_back({"limit", step::CurveRole::Limit, {0, 7200}, {353.15, 353.15}});
  chart.marks.push_back({7200, 333.15, "worst"});
  findings.charts.push_back(chart);
  return findings;
}

const Table& first_table(const std::vector<Block>& blocks) {
  for (const Block& block : blocks) {
    if (const Table* table = std::get_if<Table>(&block)) return *table;
  }
  ADD_FAILURE() << "no table";
  static const Table none;
  return none;
}

TEST(FindingsBlocks, FiguresCarryUnitRangeAndTheirUnfavourableEnd) {
  const std::vector<Block> blocks = findings_groups("s1", sample());
  const Table& table = first_table(blocks);
  ASSERT_EQ(table.rows.size(), 4u);
  EXPECT_EQ(table.rows[0].cells[1].id, "s1.find.end");
  EXPECT_EQ(table.rows[0].cells[1].text, "143");
  EXPECT_EQ(table.rows[0].cells[2].text, "°C");
  EXPECT_EQ(table.rows[0].cells[3].text, "± 12; unfavourable end 155");
  EXPECT_EQ(table.rows[1].cells[2].text, "%");
  EXPECT_EQ(table.rows[1].cells[1].text, "25.00");
  EXPECT_EQ(table.rows[2].cells[1].text, "1.250");
  EXPECT_EQ(table.rows[2].cells[2].text, "");
}

TEST(FindingsBlocks, WhatIsMissingSaysWhy) {
  const std::vector<Block> blocks = findings_groups("s1", sample());
  const Table& table = first_table(blocks);
  ASSERT_EQ(table.rows[3].cells.size(), 2u);
  EXPECT_EQ(table.rows[3].cells[1].text, "needs T_D24");
  EXPECT_EQ(table.rows[3].cells[1].span, 3);
}

TEST(FindingsBlocks, ACurveIsDrawnInTheUnitOfItsAxis) {
  const std::vector<Block> blocks = findings_charts("s1", sample());
  ASSERT_EQ(blocks.size(), 2u);
  const Drawing& drawing = std::get<Drawing>(blocks[1]);
  EXPECT_EQ(drawing.title, "Temperature rises from 20 to 60 °C within two hours.");
  bool hours = false, named = false, marked = false;
  for (const Words& words : drawing.words) {
    hours = hours || words.text == "time, h";
    named = named || words.text == "limit";
    marked = marked || words.text == "worst";
  }
  EXPECT_TRUE(hours && named && marked);
  for (const Stroke& stroke : drawing.strokes) {
    for (std::size_t i = 0; i < stroke.xy.size(); i += 2) {
      EXPECT_GE(stroke.xy[i], 0);
      EXPECT_LE(stroke.xy[i], drawing.width);
      EXPECT_LE(stroke.xy[i + 1], drawing.height);
    }
  }
}

TEST(FindingsBlocks, AChartWithOnePointIsLeftOut) {
  step::Findings findings = sample();
  for (step::ChartCurve& curve : findings.charts[0].curves) {
    curve.x.resize(1);
    curve.y.resize(1);
  }
  EXPECT_TRUE(findings_charts("s1", findings).empty());
}

TEST(FindingsBlocks, TheMarginHoldsTheWorking) {
  const std::optional<Margin> margin = findings_margin("s1", sample(), "s1.find.end");
  ASSERT_TRUE(margin.has_value());
  EXPECT_EQ(margin->value, "143 ± 12 °C");
  ASSERT_EQ(margin->steps.size(), 1u);
  EXPECT_EQ(margin->steps[0], "60 °C + 83 K");
  EXPECT_FALSE(findings_margin("s1", sample(), "s1.answer.0").has_value());
  EXPECT_FALSE(findings_margin("s1", sample(), "s1.find.nothing").has_value());
}

}  // namespace
}  // namespace heatledger::page
