// A step worked on through a session: edits, answers, what an edit reaches, undo, files, margins.
#include <gtest/gtest.h>

#include "core/page/session.hpp"
#include "tests/core/page/page_reader.hpp"
#include "tests/core/support/test_files.hpp"

namespace heatledger::page {
namespace {

void type(Session& session, const std::string& cell, const std::string& text) {
  const Status done = session.edit(cell, text);
  EXPECT_TRUE(done.ok()) << cell << ": " << (done.ok() ? "" : done.error().message);
}

/// Water gas shift in a through-flow step, typed cell by cell.
Session shift_reactor() {
  Session session;
  type(session, "r1.equation", "CO(g) + H2O(g) -> CO2(g) + H2(g)");
  type(session, "steps.add.f", "");
  type(session, "s1.feed.0.name", "raw gas");
  type(session, "s1.feed.0.at", "350 °C");
  type(session, "s1.feed.0.row.0.species", "CO(g)");
  type(session, "s1.feed.0.row.0.amount", "100 kmol/h");
  type(session, "s1.feed.0.row.1.species", "H2O(g)");
  type(session, "s1.feed.0.row.1.amount", "220 kmol/h");
  type(session, "s1.reaction.0.reaction", "r1");
  type(session, "s1.reaction.0.how", "conversion of CO");
  type(session, "s1.reaction.0.figure", "(90 ± 1) %");
  type(session, "s1.blank.outlet.temperature", "400 °C");
  return session;
}

TEST(StepSession, TypedCellByCellItGivesItsDuty) {
  Session session = shift_reactor();
  // By hand with mean heat capacities (CO 30, H2O 35.3, CO2 44.6, H2 29.2 J/(mol K)): 25 mol/s × −41.2 kJ/mol
  // is −1029 kW, what leaves carries 1202 kW from 25 °C, what enters 965 kW: −792 kW, good to some 1 %.
  const std::string duty = test::text_of(session, "s1.answer.0");
  ASSERT_EQ(duty.substr(0, 3), "\u2212") << duty;
  EXPECT_NEAR(std::stod(duty.substr(3)), 792, 10);
  const Result<Margin> margin = session.margin("s1.answer.0");
  ASSERT_TRUE(margin.ok());
  EXPECT_EQ(margin->subject, "duty, remove");
  EXPECT_GE(margin->steps.size(), 4u);
  ASSERT_FALSE(margin->sections.empty());
  EXPECT_EQ(margin->sections[0].heading, "Which inputs carry the ±");
}

TEST(StepSession, SeeksAnotherBlankOnceTheDutyIsTyped) {
  Session session = shift_reactor();
  type(session, "s1.sought", "outlet or end temperature");
  type(session, "s1.blank.duty", "0 kW");
  const double end = std::stod(test::text_of(session, "s1.answer.0"));
  EXPECT_GT(end, 550);
  EXPECT_LT(end, 700);
}

TEST(StepSession, AnEditOfTheReactionReachesTheStepAndUndoTakesItBack) {
  Session session = shift_reactor();
  const std::string before = test::text_of(session, "s1.answer.0");
  type(session, "s1.reaction.0.heat", "-45 ± 2 kJ/mol");
  EXPECT_NE(test::text_of(session, "s1.answer.0"), before);
  const std::string typed = test::text_of(session, "s1.answer.0");
  type(session, "s1.reaction.0.heat_at", "400 °C");  // then nothing is left to correct at the outlet
  EXPECT_NE(test::text_of(session, "s1.answer.0"), typed);
  type(session, "s1.reaction.0.includes", "yes");
  EXPECT_EQ(test::text_of(session, "s1.reaction.0.includes"), "yes");
  for (int i = 0; i < 3; ++i) EXPECT_TRUE(session.command("undo", {}).ok());
  EXPECT_EQ(test::text_of(session, "s1.answer.0"), before);
}

TEST(StepSession, WhatCannotBeReadStaysInItsCellBesideItsError) {
  Session session = shift_reactor();
  type(session, "s1.feed.0.row.1.amount", "220 kmol/fortnight");
  EXPECT_EQ(test::text_of(session, "s1.feed.0.row.1.amount"), "220 kmol/fortnight");
  const Note* note = test::find_note(session.page(), "s1.error.0");
  ASSERT_NE(note, nullptr);
  ASSERT_FALSE(note->cells.empty());
  EXPECT_EQ(note->cells[0], "s1.feed.0.row.1.amount");
  type(session, "s1.feed.0.row.1.amount", "220 kmol/h");
  type(session, "s1.blank.outlet.temperature", "");
  const Note* blank = test::find_note(session.page(), "s1.error.0");
  ASSERT_NE(blank, nullptr);
  EXPECT_EQ(blank->cells[0], "s1.blank.outlet.temperature");
}

TEST(StepSession, ASavedSheetOpensWithTheSameStep) {
  Session session = shift_reactor();
  const std::string saved = session.save(), duty = test::text_of(session, "s1.answer.0");
  Session other;
  ASSERT_TRUE(other.open(saved).ok());
  EXPECT_EQ(test::text_of(other, "s1.answer.0"), duty);
  EXPECT_EQ(other.save(), saved);
}

TEST(StepSession, OneStepFeedsTheNext) {
  Session session = shift_reactor();
  ASSERT_TRUE(session.command("add_step", {{"kind", "through-flow"}}).ok());
  type(session, "s2.feed.0.name", "shifted gas");
  type(session, "s2.feed.0.from", "from s1");
  type(session, "s2.blank.outlet.temperature", "60 °C");
  type(session, "s2.leaving.0.species", "H2O");
  type(session, "s2.leaving.0.how", "saturation");
  EXPECT_EQ(test::find_note(session.page(), "s2.error.0"), nullptr);
  const std::string before = test::text_of(session, "s2.answer.0");
  type(session, "s1.reaction.0.figure", "50 %");
  EXPECT_NE(test::text_of(session, "s2.answer.0"), before);
  ASSERT_TRUE(session.command("remove_step", {{"step", "s1"}}).ok());
  EXPECT_NE(test::find_note(session.page(), "s2.error.0"), nullptr);
}

TEST(StepSession, TheCheckersColumnNamesASlip) {
  Session session = shift_reactor();
  type(session, "s1.show_checker", "shown");
  const std::string duty = test::text_of(session, "s1.answer.0");
  type(session, "s1.check.sought", duty + " kW");
  const Note* agrees = test::find_note(session.page(), "s1.checker.summary");
  ASSERT_NE(agrees, nullptr);
  EXPECT_EQ(agrees->text, "Every figure typed agrees.");
  type(session, "s1.check.sought", duty.substr(3) + " kW");  // without its sign
  const Note* slip = test::find_note(session.page(), "s1.checker.summary");
  ASSERT_NE(slip, nullptr);
  EXPECT_EQ(slip->text.substr(0, 71), "One slip explains the sheet: the sign of the duty is turned round.");
}

TEST(StepSession, TheSheetsOwnDataStandBesideOurs) {
  Session session = shift_reactor();
  type(session, "s1.show_checker", "shown");
  type(session, "s1.check.own.heat.0", "-40 kJ/mol");
  // By hand: the same moles leave as enter, 30 J/(mol K) on all 320 kmol/h over 50 K, and 90 kmol/h of −40:
  // 133.3 − 1000 kW.
  const Table* own = std::get_if<Table>(test::find_block(session.page(), "s1.own"));
  ASSERT_NE(own, nullptr);
  std::vector<std::string> capacities;
  for (const Row& row : own->rows) {
    const std::string& id = row.cells[2].id;
    if (id.find(".own.cp.") != std::string::npos) capacities.push_back(id);
  }
  EXPECT_EQ(capacities.size(), 4u);
  for (const std::string& cell : capacities) type(session, cell, "30 J/(mol K)");
  type(session, "s1.check.sought", "-866.7 kW");
  const Note* summary = test::find_note(session.page(), "s1.checker.summary");
  ASSERT_NE(summary, nullptr);
  EXPECT_EQ(summary->text, "Every figure typed agrees.");
  const Table* figures = std::get_if<Table>(test::find_block(session.page(), "s1.checker"));
  ASSERT_NE(figures, nullptr);
  EXPECT_EQ(figures->columns[2].heading, "same method, their data");
  EXPECT_EQ(figures->rows[0].cells[2].text, "\u2212866.7 kW");
  EXPECT_NE(figures->rows[0].cells[1].text, figures->rows[0].cells[2].text);
  const std::string saved = session.save();
  Session other;
  ASSERT_TRUE(other.open(saved).ok());
  EXPECT_EQ(test::text_of(other, "s1.check.own.heat.0"), "-40 kJ/mol");
}

TEST(StepSession, WhatIsTypedWhereTheAnswerIsSoughtIsMarked) {
  Session session = shift_reactor();
  type(session, "s1.sought", "outlet or end temperature");
  type(session, "s1.blank.duty", "0 kW");
  const Cell* cell = test::find_cell(session.page(), "s1.blank.outlet.temperature");
  ASSERT_NE(cell, nullptr);
  EXPECT_EQ(cell->edit_text, "400 °C");
  EXPECT_NE(cell->text.find("not used"), std::string::npos);
  EXPECT_EQ(test::text_of(session, "s1.blank.duty"), "0 kW");
}

TEST(StepSession, ConductanceIsSoughtForATypedOutlet) {
  Session session = shift_reactor();
  type(session, "s1.blank.medium_in", "100 °C");
  type(session, "s1.sought", "UA of the surface");
  const Cell* cell = test::find_cell(session.page(), "s1.answer.0");
  ASSERT_NE(cell, nullptr);
  // −792 kW (above) against 300 K between the medium and the mixed outlet: 2.64 kW/K within its 1 %.
  EXPECT_NEAR(std::stod(cell->text), 2.64, 0.03);
}

TEST(StepSession, OneEntryGivesEveryExactInputItsSpread) {
  Session session = shift_reactor();
  ASSERT_NE(test::find_cell(session.page(), "s1.exact"), nullptr);
  type(session, "s1.exact", "many");
  EXPECT_NE(test::find_note(session.page(), "s1.exact.rejected"), nullptr);
  EXPECT_EQ(test::text_of(session, "s1.exact"), "many");
  type(session, "s1.exact", "1 %");
  EXPECT_EQ(test::find_note(session.page(), "s1.exact.rejected"), nullptr);
  EXPECT_EQ(test::text_of(session, "s1.feed.0.row.0.amount"), "100 ± 1 kmol/h");
  EXPECT_EQ(test::text_of(session, "s1.feed.0.row.1.amount"), "220 ± 2.2 kmol/h");
  EXPECT_EQ(test::text_of(session, "s1.reaction.0.figure"), "(90 ± 1) %");
  EXPECT_EQ(test::text_of(session, "s1.feed.0.at"), "350 °C");
  type(session, "s1.exact", "2 K");
  EXPECT_EQ(test::text_of(session, "s1.feed.0.at"), "350 ± 2 °C");
  EXPECT_EQ(test::text_of(session, "s1.blank.outlet.temperature"), "400 ± 2 °C");
  EXPECT_EQ(test::find_note(session.page(), "s1.error.0"), nullptr);
  EXPECT_EQ(test::find_cell(session.page(), "s1.exact"), nullptr);
  EXPECT_TRUE(session.command("undo", {}).ok());
  EXPECT_EQ(test::text_of(session, "s1.feed.0.at"), "350 °C");
}

TEST(StepSession, AirIsOneEntryOfAFeed) {
  Session session;
  type(session, "r1.equation", "CH4(g) + 2 O2(g) -> CO2(g) + 2 H2O(g)");
  type(session, "steps.add.f", "");
  type(session, "s1.feed.0.name", "gas");
  type(session, "s1.feed.0.at", "25 °C");
  type(session, "s1.feed.0.row.0.species", "CH4(g)");
  type(session, "s1.feed.0.row.0.amount", "10 kmol/h");
  type(session, "s1.feed.1.name", "air");
  type(session, "s1.feed.1.at", "25 °C");
  type(session, "s1.feed.1.total", "20 % excess oxygen over methane");
  type(session, "s1.feed.1.row.0.species", "air");
  type(session, "s1.reaction.0.reaction", "r1");
  type(session, "s1.reaction.0.how", "conversion of CH4");
  type(session, "s1.reaction.0.figure", "100 %");
  type(session, "s1.blank.outlet.temperature", "1200 °C");
  ASSERT_EQ(test::find_note(session.page(), "s1.error.0"), nullptr);
  const Table* feeds = std::get_if<Table>(test::find_block(session.page(), "s1.feeds"));
  ASSERT_NE(feeds, nullptr);
  double air = 0;
  for (const Row& row : feeds->rows) {
    if (row.id == "s1.feed.1.row.0.line") air = std::stod(row.cells[3].text);
  }
  // 1.2 × 2 × 10 kmol/h of oxygen in 20.946 %, shown with one decimal.
  EXPECT_NEAR(air, 24 / 0.20946, 0.05);
  // The excess that a hotter outlet needs without any duty.
  type(session, "s1.blank.duty", "0 kW");
  type(session, "s1.sought", "excess in air");
  ASSERT_EQ(test::find_note(session.page(), "s1.error.0"), nullptr);
  EXPECT_GT(std::stod(test::text_of(session, "s1.answer.0")), 40);
  type(session, "s1.feed.1.row.0.species", "O2 + 3.76 N2");
  EXPECT_EQ(test::find_note(session.page(), "s1.error.0"), nullptr);
  type(session, "s1.feed.1.row.0.species", "humid air, 40 % at 30 °C");
  EXPECT_EQ(test::find_note(session.page(), "s1.error.0"), nullptr);
  type(session, "s1.feed.1.row.0.species", "humid air, 140 %");
  EXPECT_NE(test::find_note(session.page(), "s1.error.0"), nullptr);
}

TEST(StepSession, AChargeHasItsClassAndItsCautions) {
  Session session;
  type(session, "r1.equation", "benzene(l) + nitric acid(l) -> nitrobenzene(l) + water(l)");
  type(session, "steps.add.c", "");
  type(session, "s1.feed.0.name", "charge");
  type(session, "s1.feed.0.at", "50 °C");
  type(session, "s1.feed.0.row.0.species", "benzene(l)");
  type(session, "s1.feed.0.row.0.amount", "400 kg");
  type(session, "s1.feed.0.row.1.species", "nitric acid(l)");
  type(session, "s1.feed.0.row.1.amount", "330 kg");
  type(session, "s1.reaction.0.reaction", "r1");
  type(session, "s1.reaction.0.how", "conversion of benzene");
  type(session, "s1.reaction.0.figure", "98 %");
  type(session, "s1.blank.outlet.temperature", "50 °C");
  ASSERT_EQ(test::find_note(session.page(), "s1.error.0"), nullptr);
  EXPECT_EQ(test::text_of(session, "s1.find.criticality"), "class needs T_D24");
  type(session, "s1.blank.td24", "180 °C");
  type(session, "s1.blank.td24_source", "adiabatic calorimetry, 40 g");
  EXPECT_EQ(test::text_of(session, "s1.find.criticality").substr(0, 6), "class ");
  EXPECT_NE(test::text_of(session, "s1.find.criticality"), "class needs T_D24");
  bool calorimetry = false;
  for (const Block& block : session.page().blocks) {
    const Note* note = std::get_if<Note>(&block);
    calorimetry =
        calorimetry || (note != nullptr && note->text.find("calorimetry before") != std::string::npos);
  }
  EXPECT_TRUE(calorimetry);
  EXPECT_NE(test::find_note(session.page(), "s1.covers"), nullptr);
}

TEST(StepSession, CellsThatAreNotThereAreRefused) {
  Session session = shift_reactor();
  EXPECT_EQ(session.edit("s1.blank.nonsense", "1").error().code, "edit.no_such_cell");
  EXPECT_EQ(session.edit("s1.feed.9.at", "1").error().code, "edit.no_such_cell");
  EXPECT_EQ(session.edit("s2.title", "1").error().code, "edit.no_such_cell");
  EXPECT_EQ(session.edit("s1.answer.0", "1").error().code, "edit.not_editable");
  EXPECT_EQ(session.command("remove_step", {{"step", "s7"}}).error().code, "command.argument");
}

}  // namespace
}  // namespace heatledger::page
