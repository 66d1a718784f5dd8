#include "core/page/session.hpp"

#include <gtest/gtest.h>

#include <set>

#include "tests/core/page/page_reader.hpp"

namespace heatledger::page {
namespace {

using test::find_block;
using test::find_cell;
using test::find_note;
using test::text_of;

/// Methane with chlorine: four plain bond types, every one in every table.
Session chlorination() {
  Session session;
  EXPECT_TRUE(session.edit("r1.equation", "CH4(g) + Cl2(g) -> CH3Cl(g) + HCl(g)").ok());
  return session;
}

TEST(Session, BeginsWithOneEmptyReaction) {
  Session session;
  EXPECT_EQ(text_of(session, "r1.equation"), "");
  EXPECT_NE(find_cell(session.page(), "header.title"), nullptr);
  EXPECT_EQ(find_cell(session.page(), "r1.gas_298"), nullptr);
  EXPECT_FALSE(session.changed_since_save());
}

TEST(Session, AnEquationBecomesALedger) {
  Session session = chlorination();
  EXPECT_EQ(text_of(session, "r1.equation"), "CH\u2084(g) + Cl\u2082(g) \u2192 CH\u2083Cl(g) + HCl(g)");
  EXPECT_EQ(find_cell(session.page(), "r1.equation")->edit_text, "CH4(g) + Cl2(g) -> CH3Cl(g) + HCl(g)");
  EXPECT_EQ(text_of(session, "r1.balance"), "balanced: C 1, H 4, Cl 2");
  EXPECT_NE(text_of(session, "r1.row.0.broken"), "(no such cell)");
  EXPECT_EQ(text_of(session, "r1.row.0.formed"), "(no such cell)");
  EXPECT_NE(text_of(session, "r1.row.3.formed"), "(no such cell)");
  EXPECT_NE(text_of(session, "r1.taken"), "(no such cell)");
}

TEST(Session, SumsAreThoseOfTheirColumns) {
  // Typed whole prices make the sums plain: 4 x 400 + 240 broken, 3 x 400 + 330 + 430 formed.
  Session session = chlorination();
  const char* typed[4][2] = {{"C-H", "400"}, {"Cl-Cl", "240"}, {"C-Cl", "330"}, {"Cl-H", "430"}};
  for (int i = 0; i < 4; ++i) {
    const std::string id = "bond." + std::to_string(i);
    ASSERT_TRUE(session.edit(id + ".bond", typed[i][0]).ok());
    ASSERT_TRUE(session.edit(id + ".value", typed[i][1]).ok());
  }
  EXPECT_EQ(text_of(session, "r1.row.0.broken"), "1\u2009600");
  EXPECT_EQ(text_of(session, "r1.sum.broken"), "1\u2009840");
  EXPECT_EQ(text_of(session, "r1.sum.formed"), "1\u2009960");
  EXPECT_EQ(text_of(session, "r1.gas_298").substr(0, 6), "\u2212120");
}

TEST(Session, UnfoldsARowToItsBondLines) {
  Session session = chlorination();
  session.save();
  EXPECT_EQ(find_cell(session.page(), "r1.row.0.line.0.total"), nullptr);
  ASSERT_TRUE(session.edit("r1.row.0", "open").ok());
  EXPECT_NE(find_cell(session.page(), "r1.row.0.line.0.total"), nullptr);
  EXPECT_FALSE(session.changed_since_save()) << "folds are no edits";
  ASSERT_TRUE(session.edit("r1.row.0", "").ok());
  EXPECT_EQ(find_cell(session.page(), "r1.row.0.line.0.total"), nullptr);
  ASSERT_TRUE(session.command("unfold_all", {}).ok());
  EXPECT_NE(find_cell(session.page(), "r1.row.3.line.0.total"), nullptr);
}

TEST(Session, ACoefficientRewritesTheEquation) {
  Session session;
  ASSERT_TRUE(session.edit("r1.equation", "2 H2(g) + O2(g) -> 2 H2O(g)").ok());
  const std::string before = text_of(session, "r1.sum.broken");
  ASSERT_TRUE(session.edit("r1.row.0.times", "4").ok());
  EXPECT_EQ(find_cell(session.page(), "r1.equation")->edit_text, "4 H2(g) + O2(g) -> 2 H2O(g)");
  EXPECT_EQ(text_of(session, "r1.sum.broken"), "(no such cell)") << "an equation out of balance has no sum";
  EXPECT_NE(find_note(session.page(), "r1.unbalanced"), nullptr);
  EXPECT_EQ(text_of(session, "r1.row.0.times"), "4") << "the cell stays where it was typed";
  ASSERT_TRUE(session.edit("r1.row.0.times", "2").ok());
  EXPECT_EQ(text_of(session, "r1.sum.broken"), before);
  ASSERT_TRUE(session.command("undo", {}).ok());
  ASSERT_TRUE(session.command("undo", {}).ok());
  EXPECT_EQ(text_of(session, "r1.sum.broken"), before);
  ASSERT_TRUE(session.edit("r1.row.1.times", "3/3").ok());
  EXPECT_EQ(find_cell(session.page(), "r1.equation")->edit_text, "2 H2(g) + 3/3 O2(g) -> 2 H2O(g)");
  EXPECT_EQ(text_of(session, "r1.sum.broken"), before);
}

TEST(Session, KeepsACoefficientItCannotReadInItsCell) {
  Session session;
  ASSERT_TRUE(session.edit("r1.equation", "2 H2(g) + O2(g) -> 2 H2O(g)").ok());
  const std::string sum = text_of(session, "r1.sum.broken");
  ASSERT_TRUE(session.edit("r1.row.0.times", "two").ok());
  EXPECT_EQ(text_of(session, "r1.row.0.times"), "two");
  EXPECT_EQ(find_cell(session.page(), "r1.row.0.times")->tone, Tone::Caution);
  EXPECT_EQ(text_of(session, "r1.sum.broken"), sum);
  const Note* note = find_note(session.page(), "r1.row.0.times.rejected");
  ASSERT_NE(note, nullptr);
  EXPECT_EQ(note->cells, std::vector<std::string>{"r1.row.0.times"});
  ASSERT_TRUE(session.edit("r1.row.0.times", "2").ok());
  EXPECT_EQ(find_note(session.page(), "r1.row.0.times.rejected"), nullptr);
}

TEST(Session, KeepsAnEquationItCannotRead) {
  Session session;
  ASSERT_TRUE(session.edit("r1.equation", "CH4 + 2 O2 CO2").ok());
  EXPECT_EQ(text_of(session, "r1.equation"), "CH4 + 2 O2 CO2");
  const Note* note = find_note(session.page(), "r1.error");
  ASSERT_NE(note, nullptr);
  EXPECT_EQ(note->kind, NoteKind::Error);
  EXPECT_EQ(note->cells, std::vector<std::string>{"r1.equation"});
  EXPECT_NE(session.save().find("CH4 + 2 O2 CO2"), std::string::npos);
}

TEST(Session, OffersAWayToBalanceAsOnePress) {
  Session session;
  ASSERT_TRUE(session.edit("r1.equation", "C3H8(g) + O2(g) -> CO2(g) + H2O(g)").ok());
  const Cell* proposal = find_cell(session.page(), "r1.proposal.0");
  ASSERT_NE(proposal, nullptr);
  EXPECT_EQ(proposal->kind, CellKind::Button);
  ASSERT_TRUE(session.edit("r1.proposal.0", "").ok());
  EXPECT_EQ(text_of(session, "r1.balance").substr(0, 9), "balanced:");
  EXPECT_EQ(find_cell(session.page(), "r1.proposal.0"), nullptr);
  ASSERT_TRUE(session.command("undo", {}).ok());
  EXPECT_NE(find_cell(session.page(), "r1.proposal.0"), nullptr);
}

TEST(Session, ChangesTheBasis) {
  Session session;
  ASSERT_TRUE(session.edit("r1.equation", "2 H2(g) + O2(g) -> 2 H2O(g)").ok());
  const Cell* basis = find_cell(session.page(), "r1.basis");
  ASSERT_NE(basis, nullptr);
  EXPECT_EQ(basis->text, "as written");
  ASSERT_TRUE(session.edit("r1.basis", basis->choices[1]).ok());
  EXPECT_EQ(text_of(session, "r1.basis").substr(0, 7), "per mol");
  EXPECT_NE(find_cell(session.page(), "r1.difference"), nullptr);
  // A basis that is no species of the equation leaves the ledger standing, as written.
  ASSERT_TRUE(session.edit("r1.basis", "unobtainium").ok());
  EXPECT_EQ(text_of(session, "r1.basis"), "unobtainium");
  EXPECT_NE(find_note(session.page(), "r1.option"), nullptr);
  EXPECT_NE(text_of(session, "r1.sum.broken"), "(no such cell)");
}

TEST(Session, PinsARoute) {
  Session session = chlorination();
  ASSERT_TRUE(session.edit("r1.route", "average bonds").ok());
  EXPECT_EQ(text_of(session, "r1.route"), "average bonds");
  EXPECT_NE(session.save().find("\"pinned_route\": \"average\""), std::string::npos);
  ASSERT_TRUE(session.edit("r1.route", "the best there is").ok());
  EXPECT_EQ(session.save().find("pinned_route"), std::string::npos);
}

TEST(Session, TypedBondValuesActAndCanBeTakenAway) {
  Session session = chlorination();
  const std::string before = text_of(session, "r1.row.0.broken");
  ASSERT_TRUE(session.command("add_bond", {{"bond", "C-H"}, {"value", "500"}, {"source", "test"}}).ok());
  EXPECT_EQ(text_of(session, "r1.row.0.broken"), "2\u2009000");
  ASSERT_TRUE(session.edit("bond.0.value", "five hundred").ok());
  EXPECT_EQ(text_of(session, "bond.0.value"), "five hundred");
  EXPECT_EQ(find_cell(session.page(), "bond.0.value")->tone, Tone::Caution);
  ASSERT_NE(find_note(session.page(), "bonds.error.0"), nullptr);
  EXPECT_EQ(find_note(session.page(), "bonds.error.0")->cells, std::vector<std::string>{"bond.0.value"});
  EXPECT_EQ(text_of(session, "r1.row.0.broken"), before) << "a value that cannot be read does not act";
  ASSERT_TRUE(session.edit("bond.0.remove", "").ok());
  EXPECT_EQ(text_of(session, "bond.0.bond"), "");
}

TEST(Session, ListsGrowAtTheirLastLineAndShrinkWhenEmptied) {
  Session session;
  ASSERT_TRUE(session.edit("assumption.0", "Dry feed.").ok());
  ASSERT_TRUE(session.edit("assumption.1", "No side reactions.").ok());
  EXPECT_EQ(text_of(session, "assumption.2"), "");
  ASSERT_TRUE(session.edit("assumption.0", "").ok());
  EXPECT_EQ(text_of(session, "assumption.0"), "No side reactions.");
  EXPECT_EQ(session.edit("assumption.7", "x").error().code, "edit.no_such_cell");
  ASSERT_TRUE(session.edit("remark.0", "A note.").ok());
  EXPECT_EQ(text_of(session, "remark.0"), "A note.");
}

TEST(Session, AddsMovesAndRemovesReactions) {
  Session session = chlorination();
  ASSERT_TRUE(session.command("add_reaction", {{"equation", "H2 + Cl2 -> 2 HCl"}}).ok());
  EXPECT_NE(text_of(session, "r2.sum.broken"), "(no such cell)");
  ASSERT_TRUE(session.edit("r2.move_up", "").ok());
  EXPECT_LT(session.save().find("\"r2\""), session.save().find("\"r1\""));
  ASSERT_TRUE(session.command("remove_reaction", {{"reaction", "r1"}}).ok());
  EXPECT_EQ(find_cell(session.page(), "r1.equation"), nullptr);
  ASSERT_TRUE(session.command("remove_reaction", {{"reaction", "r2"}}).ok());
  EXPECT_EQ(text_of(session, "r1.equation"), "") << "an empty reaction takes the place of the last one";
  for (int i = 0; i < 4; ++i) ASSERT_TRUE(session.command("undo", {}).ok());
  EXPECT_NE(text_of(session, "r1.sum.broken"), "(no such cell)");
}

TEST(Session, NamesWhatUndoWouldTakeBack) {
  Session session;
  EXPECT_EQ(session.command("undo", {}).error().code, "command.nothing_to_undo");
  ASSERT_TRUE(session.edit("header.title", "T").ok());
  EXPECT_EQ(session.page().commands[0].text, "Undo edit title block");
  EXPECT_TRUE(session.page().commands[0].enabled);
  ASSERT_TRUE(session.command("undo", {}).ok());
  EXPECT_EQ(session.page().commands[1].text, "Redo edit title block");
  EXPECT_FALSE(session.page().commands[0].enabled);
  EXPECT_EQ(session.command("undo", {}).error().code, "command.nothing_to_undo");
  ASSERT_TRUE(session.command("redo", {}).ok());
  EXPECT_EQ(session.command("redo", {}).error().code, "command.nothing_to_redo");
}

TEST(Session, RefusesCellsAndCommandsThatDoNotExist) {
  Session session = chlorination();
  for (const char* cell :
       {"", "r1", "r1.", "r9.equation", "header.colour", "r1.row.0", "r1.row.99.times", "r1.row.x.times",
        "bond.0.colour", "bond.5.value", "assumption.x", "r1.proposal.0.x", ".", "..", "r1.check."}) {
    if (std::string(cell) == "r1.row.0") continue;  // a fold
    EXPECT_FALSE(session.edit(cell, "1").ok()) << cell;
  }
  EXPECT_EQ(session.edit("r1.row.0.broken", "1").error().code, "edit.not_editable");
  EXPECT_EQ(session.edit("r1.gas_298", "1").error().code, "edit.not_editable");
  EXPECT_EQ(session.command("dance", {}).error().code, "command.unknown");
  EXPECT_EQ(session.command("fold", {{"row", "r1.row.77"}}).error().code, "command.argument");
  EXPECT_EQ(session.command("remove_reaction", {{"reaction", "r7"}}).error().code, "command.argument");
  EXPECT_EQ(session.command("take_proposal", {{"proposal", "0"}}).error().code, "command.argument");
}

TEST(Session, OpensWhatItSaved) {
  Session session = chlorination();
  ASSERT_TRUE(session.edit("header.title", "T").ok());
  EXPECT_TRUE(session.changed_since_save());
  const std::string text = session.save();
  EXPECT_FALSE(session.changed_since_save());
  EXPECT_EQ(session.file_text(), text);
  Session other;
  ASSERT_TRUE(other.open(text).ok());
  EXPECT_FALSE(other.changed_since_save());
  EXPECT_EQ(other.save(), text);
  EXPECT_EQ(text_of(other, "r1.taken"), text_of(session, "r1.taken"));
  EXPECT_EQ(find_note(other.page(), "opening.changed.0"), nullptr);
  // A file that does not open leaves the sheet alone.
  EXPECT_FALSE(other.open("{").ok());
  EXPECT_EQ(text_of(other, "header.title"), "T");
}

TEST(Session, SaysWhenAFigureNoLongerReadsAsSaved) {
  Session session = chlorination();
  std::string text = session.save();
  const std::size_t figure = text.find("\"r1\": \"");
  ASSERT_NE(figure, std::string::npos);
  text.insert(figure + 7, "9");
  const std::size_t digest = text.find("\"digest\": \"");
  text.replace(digest + 11, 16, "0000000000000000");
  Session other;
  ASSERT_TRUE(other.open(text).ok());
  const Note* note = find_note(other.page(), "opening.changed.0");
  ASSERT_NE(note, nullptr);
  EXPECT_EQ(note->kind, NoteKind::Disagreement);
  EXPECT_NE(note->text.find("Reaction 1 read 9"), std::string::npos) << note->text;
}

TEST(Session, ShowsTheCheckersColumnOnRequest) {
  Session session = chlorination();
  EXPECT_EQ(find_cell(session.page(), "r1.check.broken"), nullptr);
  ASSERT_TRUE(session.command("show_checker", {}).ok());
  ASSERT_NE(find_cell(session.page(), "r1.check.broken"), nullptr);
  const std::string ours = text_of(session, "r1.sum.broken");
  ASSERT_TRUE(session.edit("r1.check.broken", ours).ok());
  EXPECT_EQ(text_of(session, "r1.check.broken"), ours);
  ASSERT_NE(find_note(session.page(), "r1.review"), nullptr);
  EXPECT_EQ(find_note(session.page(), "r1.review")->kind, NoteKind::Info) << "our own figure agrees";
  ASSERT_TRUE(session.edit("r1.check.broken", "12").ok());
  EXPECT_EQ(find_note(session.page(), "r1.review")->kind, NoteKind::Disagreement);
}

TEST(Session, ShowsTheProfileOnRequest) {
  Session session = chlorination();
  EXPECT_EQ(find_block(session.page(), "r1.profile"), nullptr);
  ASSERT_TRUE(session.edit("r1.show", "enthalpy profile").ok());
  ASSERT_NE(find_block(session.page(), "r1.profile"), nullptr);
  ASSERT_TRUE(session.edit("r1.show", "nothing more").ok());
  EXPECT_EQ(find_block(session.page(), "r1.profile"), nullptr);
}

TEST(Session, CompletesTheLastNameOfAnEquation) {
  Session session;
  const auto list = session.suggest("CH4 + 2 methan", 5);
  ASSERT_FALSE(list.empty());
  bool methanol = false;
  for (const Session::Suggestion& one : list) {
    EXPECT_EQ(one.insert.substr(0, 8), "CH4 + 2 ");
    methanol = methanol || one.insert == "CH4 + 2 methanol";
  }
  EXPECT_TRUE(methanol);
  EXPECT_TRUE(session.suggest("", 5).empty());
  EXPECT_TRUE(session.suggest("methan", 0).empty());
}

TEST(Session, IdsOnThePageAreUnique) {
  Session session = chlorination();
  ASSERT_TRUE(session.command("add_reaction", {{"equation", "H2 + Cl2 -> 2 HCl"}}).ok());
  ASSERT_TRUE(session.edit("r1.show", "enthalpy profile and checker's column").ok());
  ASSERT_TRUE(session.command("unfold_all", {}).ok());
  std::set<std::string> cells, blocks;
  for (const Block& block : session.page().blocks) {
    EXPECT_TRUE(blocks.insert(block_id(block)).second) << block_id(block);
    const Table* table = std::get_if<Table>(&block);
    if (table == nullptr) continue;
    for (const Row& row : table->rows) {
      std::size_t columns = 0;
      for (const Cell& cell : row.cells) {
        columns += static_cast<std::size_t>(cell.span);
        EXPECT_TRUE(cell.id.empty() || cells.insert(cell.id).second) << cell.id;
      }
      EXPECT_EQ(columns, table->columns.size()) << row.id;
    }
  }
}

TEST(Session, TenThousandEditsCanBeUndone) {
  Session session = chlorination();
  for (int i = 1; i < 20; ++i) {
    ASSERT_TRUE(session.command("add_reaction", {{"equation", "H2 + Cl2 -> 2 HCl"}}).ok());
  }
  for (int i = 0; i < 10000; ++i) {
    const std::string id = "r" + std::to_string(1 + i % 20) + ".note";
    ASSERT_TRUE(session.edit(id, "remark " + std::to_string(i)).ok());
  }
  for (int i = 0; i < 10000; ++i) ASSERT_TRUE(session.command("undo", {}).ok());
  EXPECT_EQ(text_of(session, "r1.note"), "");
  EXPECT_EQ(text_of(session, "r20.note"), "");
}

}  // namespace
}  // namespace heatledger::page
