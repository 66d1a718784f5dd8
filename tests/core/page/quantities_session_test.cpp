// Named quantities and arithmetic in the cells of a sheet, as a person types them.
#include <gtest/gtest.h>

#include "core/page/session.hpp"
#include "tests/core/page/page_reader.hpp"

namespace heatledger::page {
namespace {

using test::find_cell;

void type(Session& session, const char* cell, const char* text) {
  const Status status = session.edit(cell, text);
  ASSERT_TRUE(status.ok()) << cell << ": " << status.error().message;
}

/// A cooler of nitrogen; the flow is called by name.
void make_cooler(Session& session) {
  type(session, "steps.add.f", "");
  type(session, "s1.feed.0.name", "gas");
  type(session, "s1.feed.0.at", "50 °C + 50 K");
  type(session, "s1.feed.0.row.0.species", "N2(g)");
  type(session, "s1.feed.0.row.0.amount", "flow / 2");
  type(session, "s1.blank.outlet.temperature", "25 °C");
}

TEST(QuantitiesOnASheet, CellsCallThemByName) {
  Session session;
  make_cooler(session);
  type(session, "quantity.0.name", "flow");
  type(session, "quantity.0.value", "2*(1.05-0.05) kmol/h");
  const Cell* figure = find_cell(session.page(), "quantity.0.figure");
  ASSERT_NE(figure, nullptr);
  EXPECT_EQ(figure->text, "2.0000");
  const Cell* duty = find_cell(session.page(), "s1.answer.0");
  ASSERT_NE(duty, nullptr);
  const std::string named = duty->text;

  Session plain;
  make_cooler(plain);
  type(plain, "s1.feed.0.row.0.amount", "1 kmol/h");
  EXPECT_EQ(named, find_cell(plain.page(), "s1.answer.0")->text);
  EXPECT_FALSE(named.empty());

  // A change of the quantity reaches the cell that calls it, and undo takes it back.
  type(session, "quantity.0.value", "4 kmol/h");
  EXPECT_NE(find_cell(session.page(), "s1.answer.0")->text, named);
  ASSERT_TRUE(session.command("undo", {}).ok());
  EXPECT_EQ(find_cell(session.page(), "s1.answer.0")->text, named);
}

TEST(QuantitiesOnASheet, AMissingNameIsSaidAtTheCell) {
  Session session;
  make_cooler(session);
  bool said = false;
  for (const Block& block : session.page().blocks) {
    const Note* note = std::get_if<Note>(&block);
    if (note == nullptr || note->kind != NoteKind::Error) continue;
    said = said || (note->text.find("flow") != std::string::npos && !note->cells.empty() &&
                    note->cells.front() == "s1.feed.0.row.0.amount");
  }
  EXPECT_TRUE(said);
}

TEST(QuantitiesOnASheet, TravelWithTheFile) {
  Session session;
  make_cooler(session);
  type(session, "quantity.0.name", "flow");
  type(session, "quantity.0.value", "2 kmol/h");
  type(session, "quantity.0.note", "design case");
  const std::string saved = session.save();
  Session again;
  ASSERT_TRUE(again.open(saved).ok());
  EXPECT_EQ(again.save(), saved);
  EXPECT_EQ(find_cell(again.page(), "quantity.0.note")->text, "design case");
  EXPECT_EQ(find_cell(again.page(), "s1.answer.0")->text, find_cell(session.page(), "s1.answer.0")->text);
}

}  // namespace
}  // namespace heatledger::page
