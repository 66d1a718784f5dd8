// Two worksheets compared: what was typed, what came of it, and which input moved what.
#include "core/page/comparison.hpp"

#include <gtest/gtest.h>

#include <algorithm>

#include "core/page/session.hpp"

namespace heatledger::page {
namespace {

void type(Session& session, const char* cell, const char* text) {
  const Status status = session.edit(cell, text);
  ASSERT_TRUE(status.ok()) << cell << ": " << status.error().message;
}

/// A heater of nitrogen.
void make_heater(Session& session, const char* flow, const char* outlet) {
  type(session, "steps.add.f", "");
  type(session, "s1.feed.0.name", "gas");
  type(session, "s1.feed.0.at", "25 °C");
  type(session, "s1.feed.0.row.0.species", "N2(g)");
  type(session, "s1.feed.0.row.0.amount", flow);
  type(session, "s1.blank.outlet.temperature", outlet);
}

const ChangedCell* find(const std::vector<ChangedCell>& cells, const char* id) {
  const auto found =
      std::find_if(cells.begin(), cells.end(), [&](const ChangedCell& cell) { return cell.cell == id; });
  return found == cells.end() ? nullptr : &*found;
}

TEST(Comparison, NamesInputsResultsAndWhatEachMoves) {
  Session before, after;
  make_heater(before, "10 kmol/h", "125 °C");
  make_heater(after, "20 kmol/h", "225 °C");
  const Result<Comparison> got = compare_sheets(before.save(), after.save());
  ASSERT_TRUE(got.ok()) << got.error().message;
  ASSERT_EQ(got->inputs.size(), 2u);
  EXPECT_EQ(got->inputs[0].input.cell, "s1.feed.0.row.0.amount");
  EXPECT_EQ(got->inputs[0].input.before, "10 kmol/h");
  EXPECT_EQ(got->inputs[0].input.after, "20 kmol/h");
  EXPECT_NE(got->inputs[1].input.place.find("outlet"), std::string::npos) << got->inputs[1].input.place;
  const ChangedCell* duty = find(got->results, "s1.answer.0");
  ASSERT_NE(duty, nullptr);
  // The flow alone doubles the duty of the first sheet: the second sheet with the first one's outlet says so.
  Session flow_alone;
  make_heater(flow_alone, "20 kmol/h", "125 °C");
  const Result<Comparison> alone = compare_sheets(before.save(), flow_alone.save());
  ASSERT_TRUE(alone.ok());
  const ChangedCell* expected = find(alone->results, "s1.answer.0");
  ASSERT_NE(expected, nullptr);
  const auto& moved = got->inputs[0].moved;
  const auto found =
      std::find_if(moved.begin(), moved.end(), [](const MovedResult& m) { return m.cell == "s1.answer.0"; });
  ASSERT_NE(found, moved.end());
  EXPECT_EQ(found->after, expected->after);
  EXPECT_EQ(found->before, duty->before);
  EXPECT_EQ(found->by.front(), '+');
}

TEST(Comparison, ASheetEqualsItself) {
  Session session;
  make_heater(session, "10 kmol/h", "125 °C");
  const std::string text = session.save();
  const Result<Comparison> got = compare_sheets(text, text);
  ASSERT_TRUE(got.ok());
  EXPECT_TRUE(got->inputs.empty());
  EXPECT_TRUE(got->results.empty());
  EXPECT_EQ(got->notes.size(), 1u);
  EXPECT_EQ(comparison_page(*got).blocks.size(), 1u);
}

TEST(Comparison, WhatWasAddedStandsOnOtherChanges) {
  Session before, after;
  make_heater(before, "10 kmol/h", "125 °C");
  make_heater(after, "10 kmol/h", "125 °C");
  type(after, "steps.add.c", "");
  type(after, "s2.title", "a charge");
  const Result<Comparison> got = compare_sheets(before.save(), after.save());
  ASSERT_TRUE(got.ok());
  bool added = false;
  for (const InputEffect& effect : got->inputs) {
    added =
        added || (effect.input.cell == "s2.title" && effect.input.before.empty() && !effect.why_not.empty());
  }
  EXPECT_TRUE(added);
}

TEST(Comparison, SaysWhichFileCannotBeRead) {
  Session session;
  const Result<Comparison> got = compare_sheets(session.save(), "{");
  ASSERT_FALSE(got.ok());
  EXPECT_EQ(got.error().where.compare(0, 12, "second sheet"), 0) << got.error().where;
}

}  // namespace
}  // namespace heatledger::page
