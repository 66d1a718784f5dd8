#include <gtest/gtest.h>

#include "tests/core/page/page_reader.hpp"

namespace heatledger::page {
namespace {

Session worked_sheet() {
  Session session;
  EXPECT_TRUE(session.edit("r1.equation", "nitrobenzene(l) + 3 H2(g) -> aniline(l) + 2 H2O(l)").ok());
  EXPECT_TRUE(session.command("unfold_all", {}).ok());
  return session;
}

TEST(Margin, EveryFigureShowsItsWorking) {
  Session session = worked_sheet();
  ASSERT_TRUE(session.edit("r1.basis", "kg nitrobenzene").ok());
  int figures = 0;
  for (const Block& block : session.page().blocks) {
    const Table* table = std::get_if<Table>(&block);
    if (table == nullptr) continue;
    for (const Row& row : table->rows) {
      for (const Cell& cell : row.cells) {
        if (!cell.has_working) continue;
        ++figures;
        const Result<Margin> margin = session.margin(cell.id);
        ASSERT_TRUE(margin.ok()) << cell.id;
        EXPECT_EQ(margin->value, cell.text) << cell.id;
        EXPECT_FALSE(margin->subject.empty()) << cell.id;
        EXPECT_FALSE(margin->steps.empty()) << cell.id;
      }
    }
  }
  EXPECT_GT(figures, 40);
}

TEST(Margin, ABondLinePutsItsFiguresIn) {
  Session session;
  ASSERT_TRUE(session.edit("r1.equation", "CH4(g) + 2 O2(g) -> CO2(g) + 2 H2O(g)").ok());
  ASSERT_TRUE(
      session.command("add_bond", {{"bond", "C-H"}, {"value", "410"}, {"source", "notebook 3"}}).ok());
  ASSERT_TRUE(session.edit("r1.row.0", "open").ok());
  const Result<Margin> margin = session.margin("r1.row.0.line.0.total");
  ASSERT_TRUE(margin.ok());
  ASSERT_FALSE(margin->steps.empty());
  EXPECT_EQ(margin->steps[0], "C\u2013H  4 \u00d7 410 = 1\u2009640");
  EXPECT_EQ(margin->sources, std::vector<std::string>{"notebook 3"});
}

TEST(Margin, SaysWhyTheRoutesDiffer) {
  Session session = worked_sheet();
  const Result<Margin> margin = session.margin("r1.gas_298");
  ASSERT_TRUE(margin.ok());
  bool found = false;
  for (const Margin::Section& section : margin->sections) {
    if (section.heading != "Why the routes differ") continue;
    found = true;
    ASSERT_GE(section.notes.size(), 2U);
    EXPECT_NE(section.notes[1].text.find("nitrobenzene"), std::string::npos) << section.notes[1].text;
  }
  EXPECT_TRUE(found);
}

TEST(Margin, ABlankDoesNotPassItsExampleOffAsTyped) {
  Session session = worked_sheet();
  ASSERT_TRUE(session.edit("steps.add.c", "").ok());
  ASSERT_TRUE(session.edit("s1.feed.0.name", "charge").ok());
  const Result<Margin> margin = session.margin("s1.feed.0.row.0.amount");
  ASSERT_TRUE(margin.ok()) << margin.error().message;
  EXPECT_TRUE(margin->value.empty());
  EXPECT_EQ(margin->subject, "nothing typed; to be written like 340 kg");
  EXPECT_TRUE(margin->sources.empty());
}

TEST(Margin, TypedCellsSayTheyAreTyped) {
  Session session = worked_sheet();
  ASSERT_TRUE(session.edit("header.title", "T").ok());
  const Result<Margin> margin = session.margin("header.title");
  ASSERT_TRUE(margin.ok());
  EXPECT_EQ(margin->value, "T");
  EXPECT_EQ(margin->sources, std::vector<std::string>{"typed on this sheet"});
  EXPECT_EQ(session.margin("").error().code, "edit.no_such_cell");
}

}  // namespace
}  // namespace heatledger::page
