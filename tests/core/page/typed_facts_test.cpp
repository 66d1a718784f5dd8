// What a person types beside the equations: conditions, measured heats, species, site tables; on the page, in
// undo and through the file.
#include <gtest/gtest.h>

#include <cmath>
#include <ctime>

#include "core/base/number_text.hpp"
#include "core/file/worksheet_file.hpp"
#include "core/page/session.hpp"
#include "core/page/writers.hpp"
#include "tests/core/page/page_reader.hpp"

namespace heatledger::page {
namespace {

using test::find_block;
using test::find_cell;
using test::find_note;
using test::text_of;

constexpr const char* kHydrogenation = "nitrobenzene(l) + 3 H2(g) -> aniline(l) + 2 H2O(l)";

Session sheet_of(const std::string& equation) {
  Session session;
  EXPECT_TRUE(session.edit("r1.equation", equation).ok());
  return session;
}

void type(Session& session, const std::string& cell, const std::string& text) {
  const Status status = session.edit(cell, text);
  EXPECT_TRUE(status.ok()) << cell << ": " << (status.ok() ? "" : status.error().message);
}

/// A figure as printed, read back: true minus, thin spaces.
double number(const std::string& printed) {
  std::string plain;
  for (std::size_t i = 0; i < printed.size(); ++i) {
    if (printed.compare(i, 3, "\u2212") == 0) {
      plain += '-';
      i += 2;
    } else if (printed.compare(i, 3, "\u2009") == 0) {
      i += 2;
    } else if (printed[i] != '+') {
      plain += printed[i];
    }
  }
  const std::optional<double> value = parse_number(plain);
  EXPECT_TRUE(value.has_value()) << printed;
  return value.value_or(0);
}

std::string whole_text(Session& session) {
  return write_text(session.page(), 100);
}

TEST(Conditions, LinesToTheTemperaturesAddUpToTheFigureAsRun) {
  Session session = sheet_of(kHydrogenation);
  EXPECT_EQ(find_block(session.page(), "r1.run"), nullptr);
  type(session, "r1.reactants_at", "80 degC");
  type(session, "r1.products_at", "120 degC");
  double sum = number(text_of(session, "r1.run.taken"));
  int lines = 0;
  while (find_cell(session.page(), "r1.run." + std::to_string(lines)) != nullptr)
    sum += number(text_of(session, "r1.run." + std::to_string(lines++)));
  EXPECT_EQ(lines, 4);
  // Printed numbers have one decimal: their sum is exact to what adding them in binary leaves.
  EXPECT_NEAR(sum, number(text_of(session, "r1.as_run.line")), 1e-9);
  EXPECT_EQ(text_of(session, "r1.as_run"), text_of(session, "r1.as_run.line"));
  EXPECT_FALSE(session.margin("r1.run.0")->steps.empty());
  EXPECT_FALSE(session.margin("r1.as_run")->steps.empty());
}

TEST(Conditions, CorrectionsOfTheLedgerAddUpToTheLastDigitShown) {
  Session session = sheet_of(kHydrogenation);
  for (const char* set : {"", "bonds in context"}) {
    if (set[0] != 0) type(session, "r1.bond_set", set);
    double sum = number(text_of(session, "r1.gas_298"));
    int lines = 0;
    while (find_cell(session.page(), "r1.correction." + std::to_string(lines)) != nullptr)
      sum += number(text_of(session, "r1.correction." + std::to_string(lines++)));
    EXPECT_EQ(lines, 3);
    EXPECT_NEAR(sum, number(text_of(session, "r1.as_written")), 1e-9) << set;
  }
}

TEST(Conditions, ATextThatIsNoTemperatureStaysWithItsError) {
  Session session = sheet_of(kHydrogenation);
  type(session, "r1.reactants_at", "warm");
  EXPECT_EQ(text_of(session, "r1.reactants_at"), "warm");
  ASSERT_NE(find_note(session.page(), "r1.option"), nullptr);
  EXPECT_EQ(find_note(session.page(), "r1.option")->cells, std::vector<std::string>{"r1.reactants_at"});
  EXPECT_NE(find_cell(session.page(), "r1.taken"), nullptr);
}

TEST(Conditions, PressureNearTheCriticalOneIsACaution) {
  Session session = sheet_of("ethylene(g) + H2(g) -> ethane(g)");
  EXPECT_EQ(whole_text(session).find("taken as ideal. At"), std::string::npos);
  type(session, "r1.pressure", "1 bar");
  EXPECT_EQ(whole_text(session).find("taken as ideal. At"), std::string::npos);
  type(session, "r1.pressure", "30 bar");  // ethylene: critical pressure 50.4 bar
  EXPECT_NE(whole_text(session).find("taken as ideal. At"), std::string::npos);
  type(session, "r1.pressure", "2 barg");  // 3.0 bar: p/pc 0.06, but hydrogen (13 bar) is beyond a tenth
  EXPECT_NE(whole_text(session).find("(p/pc 0.2"), std::string::npos);
}

TEST(MeasuredHeat, BecomesARouteAndGoesOnUnlessAnotherIsPinned) {
  Session session = sheet_of(kHydrogenation);
  const std::string before = text_of(session, "r1.taken");
  type(session, "r1.measure", "");
  type(session, "r1.measured.value", "-545 \u00b1 8 kJ/mol");
  type(session, "r1.measured.per", "nitrobenzene");
  type(session, "r1.measured.source", "reaction calorimeter, March");
  EXPECT_EQ(number(text_of(session, "r1.taken")), -545);
  EXPECT_EQ(number(text_of(session, "r1.route.measured.as_written")), -545);
  type(session, "r1.measured.per", "H2");
  EXPECT_EQ(number(text_of(session, "r1.taken")), -1635);  // three times, for the coefficients written
  type(session, "r1.measured.per", "benzene");
  EXPECT_EQ(text_of(session, "r1.taken"), before);
  EXPECT_NE(find_note(session.page(), "r1.option"), nullptr);
  type(session, "r1.measured.per", "nitrobenzene");
  type(session, "r1.route", "formation enthalpies");
  EXPECT_EQ(text_of(session, "r1.taken"), before);
  EXPECT_NE(find_cell(session.page(), "r1.route.measured.as_written"), nullptr);
  const std::string report = write_html(session.page(), session.workings());
  EXPECT_NE(report.find("pinned"), std::string::npos);
}

TEST(MeasuredHeat, SharpensRelatedEstimatesAndLeavesNoTrace) {
  // No table has the ester; both reactions ask for it.
  const std::string ester = "\"CCCC(=O)OCC(C)CCl\"";
  Session session = sheet_of(ester + "(l) + H2O(l) -> butanoic acid(l) + \"OCC(C)CCl\"(l)");
  ASSERT_TRUE(
      session.command("add_reaction", {{"equation", ester + "(l) + 10.5 O2 -> 8 CO2 + 7 H2O(l) + HCl(g)"}})
          .ok());
  const auto figures = [&] {
    return std::vector<std::string>{
        text_of(session, "r1.route.context.as_written"), text_of(session, "r1.route.context.as_written.u95"),
        text_of(session, "r2.route.context.as_written"), text_of(session, "r2.route.context.as_written.u95")};
  };
  const std::vector<std::string> before = figures();
  type(session, "r1.measured.value", "-4 \u00b1 0.5 kJ");
  (void)session.page();
  // The promise is 50 ms for the recalculation. Timed is the second measured value, the fits being made; time
  // of this process, so that others on the machine do not count.
  const std::clock_t start = std::clock();
  type(session, "r1.measured.value", "-5 \u00b1 0.5 kJ");
  (void)session.page();
  const double took = 1000.0 * static_cast<double>(std::clock() - start) / CLOCKS_PER_SEC;
#ifdef NDEBUG
  EXPECT_LT(took, 50);
#else
  EXPECT_LT(took, 1000);  // without optimisation only a run away is caught
#endif
  const std::vector<std::string> after = figures();
  EXPECT_NE(after[0], before[0]);
  EXPECT_LT(number(after[1]), number(before[1]));
  EXPECT_LE(number(after[3]), number(before[3]));
  type(session, "r1.measured.value", "");
  EXPECT_EQ(figures(), before);
  ASSERT_TRUE(session.command("undo", {}).ok());
  EXPECT_EQ(figures(), after);
}

TEST(MeasuredHeat, RoutesThatPartAreSaidAndLocated) {
  Session session = sheet_of(kHydrogenation);
  type(session, "r1.measured.value", "-300 \u00b1 5 kJ");
  const std::string text = whole_text(session);
  EXPECT_NE(text.find("The measured heat is"), std::string::npos);
  EXPECT_NE(text.find("beyond their"), std::string::npos);
}

TEST(MeasuredHeat, ShowsBothResultsWhereNobodySaysWhatItHolds) {
  Session session = sheet_of("ethanol(l) -> ethylene(g) + H2O(g)");
  type(session, "r1.measured.value", "2 \u00b1 1 kJ");
  EXPECT_EQ(number(text_of(session, "r1.taken")), 46.0);  // the water evaporated: 44.0 kJ/mol more
  EXPECT_EQ(number(text_of(session, "r1.other_reading")), 2.0);
  EXPECT_EQ(number(text_of(session, "r1.route.measured_other.as_written")), 2.0);
  EXPECT_EQ(text_of(session, "r1.measured_line.0"), "+44.00");
  const std::string report = write_html(session.page(), session.workings());
  EXPECT_NE(report.find("The larger heat is used"), std::string::npos);
  EXPECT_NE(report.find("Not taken: with mixing and evaporation in it"), std::string::npos);
  for (const char* cell : {"r1.other_reading", "r1.measured_line.0", "r1.route.measured_other.as_written"}) {
    const Result<Margin> margin = session.margin(cell);
    ASSERT_TRUE(margin.ok()) << cell;
    EXPECT_FALSE(margin->steps.empty()) << cell;
  }
  type(session, "r1.measured.includes", "yes");
  EXPECT_EQ(number(text_of(session, "r1.taken")), 2.0);
  EXPECT_EQ(find_cell(session.page(), "r1.other_reading"), nullptr);
  EXPECT_NE(whole_text(session).find("in the measured figure"), std::string::npos);
  type(session, "r1.measured.includes", "no");
  EXPECT_EQ(number(text_of(session, "r1.taken")), 46.0);
  EXPECT_EQ(find_cell(session.page(), "r1.other_reading"), nullptr);
}

TEST(ContextLedger, LinesAddUpToTheRowAndRowsToTheSums) {
  Session session = sheet_of("ethyl acetate(l) + H2O(l) -> acetic acid(l) + ethanol(l)");
  type(session, "r1.bond_set", "bonds in context");
  ASSERT_TRUE(session.command("unfold_all", {}).ok());
  double broken = 0;
  for (int row = 0; row < 2; ++row) {
    const std::string id = "r1.row." + std::to_string(row);
    double sum = 0;
    int lines = 0;
    for (; find_cell(session.page(), id + ".line." + std::to_string(lines) + ".total") != nullptr; ++lines)
      sum += number(text_of(session, id + ".line." + std::to_string(lines) + ".total"));
    EXPECT_GT(lines, 0);
    EXPECT_NEAR(sum, number(text_of(session, id + ".broken")), 1e-9) << id;
    broken += number(text_of(session, id + ".broken"));
  }
  // Rows are rounded each for itself: half a last digit for each.
  EXPECT_NEAR(broken, number(text_of(session, "r1.sum.broken")), 0.11);
  EXPECT_EQ(text_of(session, "r1.as_written"), text_of(session, "r1.route.context.as_written"));
  const Result<Margin> margin = session.margin("r1.row.0.line.0.total");
  ASSERT_TRUE(margin.ok());
  EXPECT_FALSE(margin->steps.empty());
  ASSERT_FALSE(margin->sections.empty());
  EXPECT_NE(margin->sections.back().heading.find("carries the estimate"), std::string::npos);
}

TEST(ContextLedger, WhatTheModelDoesNotReachEntersByItsFormationEnthalpy) {
  Session session = sheet_of("NaOH(s) + HCl(g) -> NaCl(s) + H2O(l)");
  type(session, "r1.bond_set", "bonds in context");
  EXPECT_NE(find_cell(session.page(), "r1.gas_298"), nullptr);
  EXPECT_NE(text_of(session, "r1.gas_298"), "no value");
}

TEST(TypedSpecies, LieOverPublishedFiguresWhichStayInSight) {
  Session session = sheet_of(kHydrogenation);
  const std::string before = text_of(session, "r1.taken");
  type(session, "fact.0.species", "aniline");
  type(session, "fact.0.figure", "formation enthalpy, liquid");
  type(session, "fact.0.value", "35 \u00b1 2 kJ/mol");
  type(session, "fact.0.source", "own combustion calorimetry");
  EXPECT_NE(text_of(session, "r1.taken"), before);
  const std::string published = text_of(session, "fact.0.published");
  EXPECT_NE(published.find("31.6"), std::string::npos) << published;  // CRC Handbook, 95th ed.
  const Result<Margin> margin = session.margin("fact.0.published");
  ASSERT_TRUE(margin.ok());
  ASSERT_GE(margin->steps.size(), 2u);
  // In the unit of the blank, not in J/mol.
  EXPECT_NE(margin->steps[1].find("31.6"), std::string::npos) << margin->steps[1];
  EXPECT_NE(margin->steps[1].find("kJ/mol"), std::string::npos) << margin->steps[1];
  EXPECT_NE(whole_text(session).find("typed in place of"), std::string::npos);
  ASSERT_TRUE(session.command("remove_figure", {{"figure", "0"}}).ok());
  EXPECT_EQ(text_of(session, "r1.taken"), before);
}

TEST(TypedFacts, WhatATemperatureCoversIsShownInItsOwnUnit) {
  Session session = sheet_of("toluene(l) -> toluene(g)");
  type(session, "fact.0.species", "toluene");
  type(session, "fact.0.figure", "boiling point");
  type(session, "fact.0.value", "111 degC");
  const std::string published = text_of(session, "fact.0.published");
  EXPECT_EQ(published.find("110."), 0u) << published;  // 110.6 °C, CRC Handbook, 95th ed.
  EXPECT_NE(published.find("\u00b0C"), std::string::npos) << published;
}

TEST(TypedSpecies, ACodeNameReactsByATypedFormationEnthalpy) {
  Session session = sheet_of("KX-17(l) + H2O(l) -> KX-18(l)");
  EXPECT_EQ(find_cell(session.page(), "r1.taken"), nullptr);
  const char* rows[4][3] = {{"KX-17", "molar mass", "212.3 g/mol"},
                            {"KX-17", "formation enthalpy, liquid", "-310 \u00b1 5 kJ/mol"},
                            {"KX-18", "molar mass", "230.3 g/mol"},
                            {"KX-18", "formation enthalpy, liquid", "-620 \u00b1 5 kJ/mol"}};
  for (int i = 0; i < 4; ++i) {
    const std::string id = "fact." + std::to_string(i);
    type(session, id + ".species", rows[i][0]);
    type(session, id + ".figure", rows[i][1]);
    type(session, id + ".value", rows[i][2]);
  }
  EXPECT_EQ(text_of(session, "r1.balance"), "element balance not checkable");
  // -620 - (-310) - (-285.83): the formation enthalpy of liquid water, CODATA 1989.
  EXPECT_NEAR(number(text_of(session, "r1.taken")), -24.2, 0.051);
  EXPECT_NE(find_cell(session.page(), "r1.per_kg"), nullptr);
  // A heat capacity per kilogram becomes one per mole with the molar mass typed.
  type(session, "r1.products_at", "60 degC");
  EXPECT_EQ(find_cell(session.page(), "r1.as_run"), nullptr);
  type(session, "fact.4.species", "KX-18");
  type(session, "fact.4.figure", "heat capacity, liquid");
  type(session, "fact.4.value", "2 J/(g K)");
  // 2 J/(g K) × 230.3 g/mol × 35 K = 16.12 kJ/mol
  EXPECT_NEAR(number(text_of(session, "r1.as_run")) - number(text_of(session, "r1.taken")), 16.1, 0.11);
}

TEST(TypedSpecies, AFigureThatCannotBeReadStaysWithItsError) {
  Session session = sheet_of(kHydrogenation);
  type(session, "fact.0.species", "aniline");
  type(session, "fact.0.figure", "formation enthalpy, liquid");
  type(session, "fact.0.value", "a lot");
  EXPECT_EQ(text_of(session, "fact.0.value"), "a lot");
  const Note* note = find_note(session.page(), "species.error.0");
  ASSERT_NE(note, nullptr);
  EXPECT_EQ(note->cells, std::vector<std::string>{"fact.0.value"});
}

TEST(TypedSpecies, HalfWidthsThatAreMissingAreCountedAndGiven) {
  Session session = sheet_of("CH4(g) + Cl2(g) -> CH3Cl(g) + HCl(g)");
  EXPECT_EQ(find_note(session.page(), "exact.note"), nullptr);
  type(session, "bond.0.bond", "C-Cl");
  type(session, "bond.0.value", "340 kJ/mol");
  type(session, "fact.0.species", "CH3Cl");
  type(session, "fact.0.figure", "formation enthalpy, gas");
  type(session, "fact.0.value", "-82 kJ/mol");
  const Note* note = find_note(session.page(), "exact.note");
  ASSERT_NE(note, nullptr);
  EXPECT_EQ(note->text.substr(0, 2), "2 ");
  EXPECT_EQ(note->cells, (std::vector<std::string>{"bond.0.value", "fact.0.value"}));
  type(session, "exact.u95", "much");
  EXPECT_NE(find_note(session.page(), "exact.rejected"), nullptr);
  type(session, "exact.u95", "3 %");
  EXPECT_EQ(find_note(session.page(), "exact.note"), nullptr);
  EXPECT_EQ(text_of(session, "bond.0.value"), "340 \u00b1 10.2 kJ/mol");
  EXPECT_EQ(text_of(session, "fact.0.value"), "-82 \u00b1 2.46 kJ/mol");
}

TEST(TypedFacts, TravelThroughTheFileByteForByte) {
  Session session = sheet_of("KX-17(l) + H2O(l) -> KX-18(l)");
  type(session, "fact.0.species", "KX-17");
  type(session, "fact.0.figure", "molar mass");
  type(session, "fact.0.value", "212.3 g/mol");
  type(session, "r1.reactants_at", "80 degC");
  type(session, "r1.pressure", "3 bar");
  type(session, "r1.measured.value", "-24 \u00b1 2 kJ");
  type(session, "r1.measured.includes", "yes");
  const std::string file = session.save();
  Session again;
  ASSERT_TRUE(again.open(file).ok());
  EXPECT_EQ(again.save(), file);
  EXPECT_EQ(whole_text(again), whole_text(session));
  for (const char* piece :
       {"\"species\"", "\"reactants_at\"", "\"measured\"", "212.3 g/mol", "\"includes\": \"yes\""})
    EXPECT_NE(file.find(piece), std::string::npos) << piece;
}

constexpr const char* kSiteTable = R"json({
  "format": "heatledger-site-table", "version": 1, "name": "Harbour Works",
  "species": [
    {"species": "aniline", "figure": "formation_liquid", "value": "33 ± 1 kJ/mol", "source": "own calorimetry"},
    {"species": "toluene", "figure": "formation_liquid", "value": "12 ± 1 kJ/mol", "source": "own calorimetry"}
  ],
  "bonds": [{"bond": "C-Cl", "value": "340 ± 5 kJ/mol"}, {"bond": "H-H", "value": "436 ± 1 kJ/mol"}],
  "heats": [{"equation": "nitrobenzene(l) + 3 H2(g) -> aniline(l) + 2 H2O(l)", "value": "-548 ± 4 kJ/mol",
             "per": "nitrobenzene", "source": "plant trial"}]
})json";

TEST(SiteTable, RowsThatTheSheetUsesAreCopiedWithTheirOrigin) {
  Session session = sheet_of(kHydrogenation);
  ASSERT_TRUE(session.command("import_site_table", {{"text", kSiteTable}}).ok());
  EXPECT_EQ(text_of(session, "fact.0.species"), "aniline");
  EXPECT_EQ(text_of(session, "fact.1.species"), "");
  EXPECT_EQ(text_of(session, "bond.0.bond"), "H-H");
  EXPECT_EQ(text_of(session, "bond.1.bond"), "");
  EXPECT_EQ(number(text_of(session, "r1.taken")), -548);
  EXPECT_NE(session.save().find("\"from\": \"Harbour Works\""), std::string::npos);
  // Once more: the rows are replaced, not doubled.
  ASSERT_TRUE(session.command("import_site_table", {{"text", kSiteTable}}).ok());
  EXPECT_EQ(text_of(session, "fact.1.species"), "");
  // What is typed on the sheet lies over the site's row.
  type(session, "fact.1.species", "aniline");
  type(session, "fact.1.figure", "formation enthalpy, liquid");
  type(session, "fact.1.value", "40 \u00b1 1 kJ/mol");
  EXPECT_NE(whole_text(session).find("40.00 ± 1.00 kJ/mol"), std::string::npos);
  ASSERT_TRUE(session.command("undo", {}).ok());
}

/// One heat of a site, for a reaction that the sheet spells in its own way.
TEST(SiteTable, HeatsFollowTheReactionNotItsSpelling) {
  const auto taken = [](const std::string& equation, const std::string& heat) {
    Session session = sheet_of(equation);
    const Status status = session.command(
        "import_site_table",
        {{"text", R"({"format": "heatledger-site-table", "version": 1, "name": "Harbour", "heats": [)" +
                      heat + "]}"}});
    return status.ok() ? text_of(session, "r1.taken") : status.error().code;
  };
  const std::string per = R"json({"equation": "3 H2(g) + C6H5NO2(l) -> 2 water(l) + aniline(l)",
                                  "value": "-548 ± 4 kJ/mol", "per": "C6H5NO2"})json";
  EXPECT_EQ(number(taken(kHydrogenation, per)), -548);
  EXPECT_EQ(number(taken("2 nitrobenzene(l) + 6 H2(g) -> 2 aniline(l) + 4 H2O(l)", per)), -1096);
  const std::string whole = R"json({"equation": "2 nitrobenzene(l) + 6 H2(g) -> 2 aniline(l) + 4 H2O(l)",
                                    "value": "-1096 ± 8 kJ"})json";
  EXPECT_EQ(number(taken("H2(g) + 1/3 \"[O-][N+](=O)c1ccccc1\"(l) -> 2/3 H2O(l) + 1/3 aniline(l)", whole)),
            -182.7);
  EXPECT_EQ(number(taken("nitrobenzene(l) + H2(g) + 2 H2(g) -> aniline(l) + 2 H2O(l)", whole)), -548);
  // Another phase or the reverse is another reaction.
  EXPECT_EQ(taken("nitrobenzene(l) + 3 H2(g) -> aniline(l) + 2 H2O(g)", whole), "site_table.nothing_used");
  EXPECT_EQ(taken("aniline(l) + 2 H2O(l) -> nitrobenzene(l) + 3 H2(g)", whole), "site_table.nothing_used");
}

TEST(TypedFacts, AHeatOfDissolvingStandsForTheEstimate) {
  Session session = sheet_of("salicylic acid(s) -> salicylic acid(diss)");
  const double guessed = number(text_of(session, "r1.route.formation.as_written.u95"));
  EXPECT_GT(guessed, 5);  // ± of mixing that nobody measured
  type(session, "fact.0.species", "salicylic acid");
  type(session, "fact.0.figure", "heat of dissolving, as (diss)");
  type(session, "fact.0.value", "21.4 \u00b1 0.6 kJ/mol");
  type(session, "fact.0.source", "solution calorimeter, ethanol");
  EXPECT_EQ(number(text_of(session, "r1.taken")), 21.4);
  EXPECT_NEAR(number(text_of(session, "r1.route.formation.as_written.u95")), 0.6, 1e-9);
  EXPECT_EQ(whole_text(session).find("its heat of solution is not known"), std::string::npos);
  type(session, "fact.0.value", "-3 kJ/mol");  // given off: no figure that has to be above zero
  EXPECT_EQ(number(text_of(session, "r1.taken")), -3);
}

TEST(SiteTable, IsNoWorksheetToOpen) {
  Session session = sheet_of(kHydrogenation);
  const Status status = session.open(kSiteTable);
  ASSERT_FALSE(status.ok());
  EXPECT_EQ(status.error().code, "file.is_site_table");
  EXPECT_EQ(text_of(session, "r1.equation").substr(0, 12), "nitrobenzene");
}

TEST(SiteTable, SaysWhenNoRowBelongsToTheSheet) {
  Session session = sheet_of("N2 + 3 F2 -> 2 NF3");
  const Status status = session.command("import_site_table", {{"text", kSiteTable}});
  ASSERT_FALSE(status.ok());
  EXPECT_EQ(status.error().code, "site_table.nothing_used");
  ASSERT_TRUE(session.command("import_site_table", {{"text", kSiteTable}, {"rows", "all"}}).ok());
  EXPECT_EQ(text_of(session, "fact.1.species"), "toluene");
}

TEST(SiteTable, RefusesWhatIsNone) {
  Session session;
  const auto code = [&](const char* text) {
    const Status status = session.command("import_site_table", {{"text", text}});
    return status.ok() ? std::string("taken") : status.error().code;
  };
  EXPECT_EQ(code("{"), "file.not_json");
  EXPECT_EQ(code("{}"), "file.not_a_site_table");
  EXPECT_EQ(code(R"({"format": "heatledger-site-table", "version": 1})"), "file.not_a_site_table");
  EXPECT_EQ(code(R"({"format": "heatledger-site-table", "version": 2, "name": "x"})"), "file.newer_version");
}

}  // namespace
}  // namespace heatledger::page
