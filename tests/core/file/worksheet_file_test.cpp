#include "core/file/worksheet_file.hpp"

#include <gtest/gtest.h>

namespace heatledger::file {
namespace {

document::Worksheet full_sheet() {
  document::Worksheet sheet = document::empty_worksheet();
  document::Header& header = sheet.header.change();
  header.title = "Chlorination of toluene, R-12 \u00b7 \"draft\"";
  header.sheet_number = "HB-0417-02";
  header.revision = "B";
  header.prepared = "M. Okafor";
  header.prepared_date = "12 May";
  document::ReactionSheet& first = sheet.reactions[0].change();
  first.equation = "toluene(l) + Cl2 -> \"ClCc1ccccc1\"(l) + HCl";
  first.basis = "kg toluene";
  first.show_profile = true;
  first.checker["gas_298"] = "-112 kJ";
  document::ReactionSheet second;
  second.id = "r2";
  second.equation = "half typed ->";
  second.pinned_route = "average";
  sheet.reactions.push_back(document::Shared<document::ReactionSheet>(second));
  sheet.typed_bonds.change().push_back({"C-Cl", "340 \u00b1 8 kJ/mol", "works notebook 7, p. 31", "", ""});
  sheet.typed_figures.change().push_back(
      {"KX-17", "formation_liquid", "-310 \u00b1 5 kJ/mol", "own calorimetry", "Harbour Works", ""});
  first.reactants_at = "80 degC";
  first.products_at = "120 degC";
  first.pressure = "3 bar";
  first.measured.value = "-112 \u00b1 4 kJ";
  first.measured.per = "toluene";
  first.measured.at = "60 degC";
  first.measured.medium = "neat";
  first.measured.includes = "no";
  first.measured.source = "reaction calorimeter";
  sheet.notes.change().push_back("HCl leaves through the scrubber.");
  sheet.assumptions.change().push_back("No ring chlorination.");
  return sheet;
}

TEST(WorksheetFile, WritesCanonicalOrder) {
  const std::string text = write_worksheet(document::empty_worksheet(), {});
  EXPECT_EQ(text,
            "{\n"
            "  \"format\": \"heatledger-worksheet\",\n"
            "  \"version\": 1,\n"
            "  \"reactions\": [\n"
            "    {\n"
            "      \"id\": \"r1\"\n"
            "    }\n"
            "  ]\n"
            "}\n");
}

TEST(WorksheetFile, RoundTripKeepsEveryField) {
  SavedResults results;
  results.digest = "0123456789abcdef";
  results.figures["r1"] = "\u2212112 kJ";
  const std::string text = write_worksheet(full_sheet(), results);
  const Result<Opened> opened = read_worksheet(text);
  ASSERT_TRUE(opened.ok());
  EXPECT_TRUE(opened->not_understood.empty());
  const document::Worksheet& sheet = opened->sheet;
  EXPECT_EQ(sheet.header->title, full_sheet().header->title);
  ASSERT_EQ(sheet.reactions.size(), 2U);
  EXPECT_EQ(sheet.reactions[0]->equation, "toluene(l) + Cl2 -> \"ClCc1ccccc1\"(l) + HCl");
  EXPECT_TRUE(sheet.reactions[0]->show_profile);
  EXPECT_FALSE(sheet.reactions[0]->show_checker);
  EXPECT_EQ(sheet.reactions[0]->checker.at("gas_298"), "-112 kJ");
  EXPECT_EQ(sheet.reactions[1]->pinned_route, "average");
  EXPECT_EQ(sheet.typed_bonds->at(0).source, "works notebook 7, p. 31");
  EXPECT_EQ(sheet.notes->at(0), "HCl leaves through the scrubber.");
  EXPECT_EQ(sheet.assumptions->at(0), "No ring chlorination.");
  EXPECT_EQ(opened->results.digest, results.digest);
  EXPECT_EQ(opened->results.figures.at("r1"), "\u2212112 kJ");
  EXPECT_EQ(write_worksheet(sheet, opened->results), text);
}

TEST(WorksheetFile, WhatAListCannotHoldIsKeptInItsPlace) {
  const std::string text = R"json({
  "format": "heatledger-worksheet",
  "version": 1,
  "reactions": [
    {
      "id": "r1",
      "measured": {
        "value": "-5 kJ",
        "vessel": "RC-1"
      },
      "checker": {
        "gas_298": "-112 kJ",
        "as_written": 7
      }
    },
    "not a reaction"
  ],
  "bonds": [
    null,
    {
      "bond": "C-Cl",
      "value": "340 kJ/mol"
    },
    [1, 2]
  ],
  "species": [
    12,
    {
      "species": "KX-17",
      "figure": "molar_mass",
      "value": "212 g/mol",
      "lot": 4
    }
  ],
  "notes": [
    "first",
    {
      "text": "second"
    },
    "third"
  ],
  "assumptions": [true]
}
)json";
  Result<Opened> opened = read_worksheet(text);
  ASSERT_TRUE(opened.ok());
  EXPECT_EQ(opened->not_understood.size(), 7U);
  EXPECT_EQ(opened->sheet.typed_bonds->size(), 1U);
  EXPECT_EQ(opened->sheet.notes->size(), 2U);
  EXPECT_EQ(write_worksheet(opened->sheet, opened->results), text);
  // An edit elsewhere keeps them too.
  opened->sheet.notes.change().push_back("fourth");
  const std::string edited = write_worksheet(opened->sheet, opened->results);
  EXPECT_NE(edited.find("\"text\": \"second\""), std::string::npos);
  EXPECT_NE(edited.find("not a reaction"), std::string::npos);
}

TEST(WorksheetFile, KeepsUnknownKeysAtEveryLevel) {
  const std::string text = R"({
  "format": "heatledger-worksheet",
  "version": 1,
  "header": {
    "title": "T",
    "client": "Brackwater Works"
  },
  "reactions": [
    {
      "id": "r1",
      "equation": "A -> B",
      "temperature": {
        "reactants": "25 degC",
        "steps": [1.50, 2]
      }
    }
  ],
  "bonds": [
    {
      "bond": "C-Cl",
      "value": "340",
      "approved": true
    }
  ],
  "streams": [
    {
      "name": "vent"
    }
  ]
}
)";
  const Result<Opened> opened = read_worksheet(text);
  ASSERT_TRUE(opened.ok());
  EXPECT_TRUE(opened->not_understood.empty());
  EXPECT_EQ(write_worksheet(opened->sheet, opened->results), text);
}

TEST(WorksheetFile, KeepsAKnownKeyOfTheWrongKindAndReportsIt) {
  const std::string text = R"({"format": "heatledger-worksheet", "version": 1,
    "header": {"title": 5}, "reactions": [{"id": "r1", "equation": ["A"]}, 7], "notes": "one"})";
  const Result<Opened> opened = read_worksheet(text);
  ASSERT_TRUE(opened.ok());
  std::vector<std::string> places;
  for (const Error& error : opened->not_understood) places.push_back(error.where);
  EXPECT_EQ(places,
            (std::vector<std::string>{"header.title", "reactions[0].equation", "reactions[1]", "notes"}));
  const std::string again = write_worksheet(opened->sheet, {});
  EXPECT_NE(again.find("\"title\": 5"), std::string::npos);
  EXPECT_NE(again.find("\"notes\": \"one\""), std::string::npos);
  // Typing over it replaces what was not understood.
  document::Worksheet typed = opened->sheet;
  typed.header.change().title = "new";
  EXPECT_NE(write_worksheet(typed, {}).find("\"title\": \"new\""), std::string::npos);
  EXPECT_EQ(write_worksheet(typed, {}).find("\"title\": 5"), std::string::npos);
}

TEST(WorksheetFile, GivesReactionsWithoutAUsableIdOne) {
  const Result<Opened> opened = read_worksheet(R"({"format": "heatledger-worksheet", "version": 1,
    "reactions": [{"id": "r2"}, {"id": "r2"}, {"id": "header"}, {}]})");
  ASSERT_TRUE(opened.ok());
  std::vector<std::string> ids;
  for (const auto& reaction : opened->sheet.reactions) ids.push_back(reaction->id);
  EXPECT_EQ(ids, (std::vector<std::string>{"r2", "r1", "r3", "r4"}));
  EXPECT_EQ(opened->not_understood.size(), 2U);  // the second r2 and "header"; a missing id is no fault
}

TEST(WorksheetFile, MigratesDraftVersion0) {
  const Result<Opened> opened = read_worksheet(R"({"format": "heatledger-worksheet", "version": 0,
    "title": "Old sheet", "by": "A. Lind", "date": "3 March", "equation": "CH4 + 2 O2 -> CO2 + 2 H2O", "per": "CH4",
    "bonds": {"C-H": "413 kJ/mol"}, "site": "north"})");
  ASSERT_TRUE(opened.ok());
  EXPECT_EQ(opened->version, 0);
  EXPECT_TRUE(opened->not_understood.empty());
  EXPECT_EQ(opened->sheet.header->title, "Old sheet");
  EXPECT_EQ(opened->sheet.header->prepared, "A. Lind");
  EXPECT_EQ(opened->sheet.header->prepared_date, "3 March");
  ASSERT_EQ(opened->sheet.reactions.size(), 1U);
  EXPECT_EQ(opened->sheet.reactions[0]->equation, "CH4 + 2 O2 -> CO2 + 2 H2O");
  EXPECT_EQ(opened->sheet.reactions[0]->basis, "CH4");
  ASSERT_EQ(opened->sheet.typed_bonds->size(), 1U);
  EXPECT_EQ(opened->sheet.typed_bonds->at(0).bond, "C-H");
  EXPECT_NE(write_worksheet(opened->sheet, {}).find("\"site\": \"north\""), std::string::npos);
  EXPECT_NE(write_worksheet(opened->sheet, {}).find("\"version\": 1"), std::string::npos);
}

TEST(WorksheetFile, RefusesNewerVersionsCalmly) {
  const Result<Opened> opened = read_worksheet(R"({"format": "heatledger-worksheet", "version": 2})");
  ASSERT_FALSE(opened.ok());
  EXPECT_EQ(opened.error().code, "file.newer_version");
  EXPECT_EQ(opened.error().message,
            "This worksheet was saved in format version 2; this program reads up to version 1.");
}

TEST(WorksheetFile, RefusesEveryTruncation) {
  const std::string text = write_worksheet(full_sheet(), {});
  // Up to the last bracket; the newline after it may go.
  for (std::size_t length = 0; length + 1 < text.size(); ++length) {
    EXPECT_FALSE(read_worksheet(text.substr(0, length)).ok()) << "cut at " << length;
  }
}

}  // namespace
}  // namespace heatledger::file
