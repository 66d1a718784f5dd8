#include "core/document/history.hpp"

#include <gtest/gtest.h>

namespace heatledger::document {
namespace {

State titled(const std::string& title) {
  Worksheet sheet = empty_worksheet();
  sheet.header.change().title = title;
  return std::make_shared<const Worksheet>(std::move(sheet));
}

TEST(History, UndoesAndRedoesWithLabels) {
  History history(titled("a"));
  history.push(titled("b"), "edit title");
  history.push(titled("c"), "edit equation");
  EXPECT_EQ(history.undo_label(), "edit equation");
  EXPECT_TRUE(history.undo());
  EXPECT_EQ(history.current()->header->title, "b");
  EXPECT_EQ(history.undo_label(), "edit title");
  EXPECT_EQ(history.redo_label(), "edit equation");
  EXPECT_TRUE(history.undo());
  EXPECT_FALSE(history.undo());
  EXPECT_EQ(history.current()->header->title, "a");
  EXPECT_TRUE(history.redo());
  EXPECT_TRUE(history.redo());
  EXPECT_FALSE(history.redo());
  EXPECT_EQ(history.current()->header->title, "c");
}

TEST(History, ANewEditClearsRedo) {
  History history(titled("a"));
  history.push(titled("b"), "one");
  history.undo();
  history.push(titled("c"), "two");
  EXPECT_FALSE(history.can_redo());
  EXPECT_TRUE(history.undo());
  EXPECT_EQ(history.current()->header->title, "a");
}

TEST(History, HoldsTenThousandEditsAndMore) {
  History history(titled("0"));
  for (int i = 1; i <= 12000; ++i) history.push(titled(std::to_string(i)), "edit");
  EXPECT_EQ(history.undo_depth(), 12000U);
  for (int i = 0; i < 12000; ++i) ASSERT_TRUE(history.undo());
  EXPECT_EQ(history.current()->header->title, "0");
}

TEST(History, ForgetsTheOldestBeyondItsDepth) {
  History history(titled("0"), 3);
  for (int i = 1; i <= 5; ++i) history.push(titled(std::to_string(i)), "edit");
  EXPECT_EQ(history.undo_depth(), 3U);
  while (history.undo()) {
  }
  EXPECT_EQ(history.current()->header->title, "2");
}

TEST(Worksheet, StatesShareWhatAnEditLeavesAlone) {
  Worksheet first = empty_worksheet();
  first.reactions.push_back(Shared<ReactionSheet>(ReactionSheet{}));
  Worksheet second = first;
  second.reactions[1].change().equation = "A -> B";
  EXPECT_TRUE(same(first.reactions[0], second.reactions[0]));
  EXPECT_TRUE(same(first.header, second.header));
  EXPECT_FALSE(same(first.reactions[1], second.reactions[1]));
  EXPECT_EQ(first.reactions[1]->equation, "");
}

TEST(Worksheet, FreeIdsFillTheLowestGap) {
  Worksheet sheet = empty_worksheet();
  EXPECT_EQ(free_reaction_id(sheet), "r2");
  ReactionSheet third;
  third.id = "r3";
  sheet.reactions.push_back(Shared<ReactionSheet>(third));
  EXPECT_EQ(free_reaction_id(sheet), "r2");
  EXPECT_EQ(find_reaction(sheet, "r3"), 1U);
  EXPECT_EQ(find_reaction(sheet, "r9"), 2U);
}

}  // namespace
}  // namespace heatledger::document
