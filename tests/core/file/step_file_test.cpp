// Steps through the worksheet file: every field comes back, unknown keys stay, wrong kinds are kept and
// named.
#include "core/file/step_file.hpp"

#include <gtest/gtest.h>

#include "core/file/worksheet_file.hpp"
#include "tests/core/support/test_files.hpp"

namespace heatledger::file {
namespace {

const char* const kFull = R"json({
  "id": "s4",
  "title": "cooler",
  "kind": "charge",
  "sought": "feed.0.part.1",
  "curve": "loss",
  "note": "as built",
  "feeds": [
    {
      "name": "acid",
      "from": "s1",
      "at": "40 °C",
      "pressure": "2 bar",
      "total": "20 % excess oxygen over methane",
      "rows": [
        {
          "species": "water(l)",
          "amount": "rest",
          "colour": "blue"
        }
      ],
      "line": 7
    }
  ],
  "reactions": [
    {
      "reaction": "r1",
      "how": "conversion of water",
      "figure": "92 %",
      "heat": "-95 ± 4 kJ/mol",
      "heat_per": "water",
      "heat_at": "60 °C",
      "includes": "no"
    }
  ],
  "leaving": [
    {
      "species": "water",
      "how": "saturation"
    }
  ],
  "species": [
    {
      "species": "AM-7",
      "heat_capacity": "2 kJ/(kg K)",
      "density": "900 kg/m3",
      "vapour_pressure": "2 kPa",
      "molar_mass": "310 g/mol"
    }
  ],
  "blanks": {
    "loss": "5 kW",
    "outlet.temperature": "80 °C"
  },
  "show_checker": true,
  "checker": {
    "sought": "-250 kW"
  },
  "later": {
    "kept": [
      1,
      2
    ]
  }
})json";

/// One line for one text: spelling of blanks does not matter.
std::string canonical(const std::string& text) {
  const Result<Json> json = read_json(text);
  EXPECT_TRUE(json.ok());
  return json.ok() ? write_json_text(*json) : std::string();
}

TEST(StepFile, RoundTripKeepsEveryFieldAndEveryUnknownKey) {
  const Result<Json> json = read_json(kFull);
  ASSERT_TRUE(json.ok());
  std::vector<Error> problems;
  const document::StepSheet step = read_step_sheet(*json, "steps[0]", problems);
  EXPECT_TRUE(problems.empty());
  EXPECT_EQ(step.feeds[0].rows[0].amount, "rest");
  EXPECT_EQ(step.reactions[0].heat_at, "60 °C");
  EXPECT_EQ(step.blanks.at("outlet.temperature"), "80 °C");
  EXPECT_EQ(write_json_text(step_json(step)), canonical(kFull));
}

TEST(StepFile, WrongKindsAreNamedAndKept) {
  const std::string text =
      R"json({"id": "s1", "title": 7, "feeds": [{"rows": [3]}], "blanks": {"duty": 5}})json";
  const Result<Json> json = read_json(text);
  ASSERT_TRUE(json.ok());
  std::vector<Error> problems;
  const document::StepSheet step = read_step_sheet(*json, "steps[0]", problems);
  std::vector<std::string> places;
  for (const Error& problem : problems) {
    EXPECT_EQ(problem.code, "file.wrong_kind");
    places.push_back(problem.where);
  }
  EXPECT_EQ(places,
            (std::vector<std::string>{"steps[0].title", "steps[0].feeds[0].rows", "steps[0].blanks"}));
  const Json again = step_json(step);
  EXPECT_NE(again.find("title"), nullptr);
  EXPECT_NE(again.find("blanks"), nullptr);
  EXPECT_NE(write_json_text(again).find("\"rows\""), std::string::npos);
}

TEST(StepFile, AWorksheetGivesItsStepsIdsOfTheirOwn) {
  const Result<Opened> opened = read_worksheet(
      R"json({"format": "heatledger-worksheet", "version": 1, "steps": [{"id": "s1"}, {"id": "s1"}, {"id": "x"}, {}]})json");
  ASSERT_TRUE(opened.ok());
  ASSERT_EQ(opened->sheet.steps.size(), 4u);
  EXPECT_EQ(opened->sheet.steps[0]->id, "s1");
  EXPECT_EQ(opened->sheet.steps[1]->id, "s2");
  EXPECT_EQ(opened->sheet.steps[2]->id, "s3");
  EXPECT_EQ(opened->sheet.steps[3]->id, "s4");
  EXPECT_EQ(opened->not_understood.size(), 2u);
}

}  // namespace
}  // namespace heatledger::file
