// The published schema against every example worksheet, and against files it must refuse. The validator here
// knows the keywords that the schema uses and fails on any other, so that the schema cannot outgrow it
// unseen.
#include <gtest/gtest.h>

#include "core/file/json.hpp"
#include "core/file/worksheet_file.hpp"
#include "tests/core/support/test_files.hpp"

namespace heatledger::file {
namespace {

/// The patterns of the schema, read by hand: ^r[0-9]{1,6}$, the same with s, and ^[0-9a-f]{16}$.
bool matches(const std::string& pattern, const std::string& text) {
  if (pattern == "^r[0-9]{1,6}$" || pattern == "^s[0-9]{1,6}$") {
    return text.size() >= 2 && text.size() <= 7 && text[0] == pattern[1] &&
           text.find_first_not_of("0123456789", 1) == std::string::npos;
  }
  if (pattern == "^[0-9a-f]{16}$") {
    return text.size() == 16 && text.find_first_not_of("0123456789abcdef") == std::string::npos;
  }
  ADD_FAILURE() << "the schema uses a pattern this test does not know: " << pattern;
  return false;
}

bool has_type(const Json& value, const std::string& type) {
  switch (value.kind()) {
    case Json::Kind::Object:
      return type == "object";
    case Json::Kind::Array:
      return type == "array";
    case Json::Kind::String:
      return type == "string";
    case Json::Kind::True:
    case Json::Kind::False:
      return type == "boolean";
    case Json::Kind::Number:
      return type == "number" ||
             (type == "integer" && value.text().find_first_of(".eE") == std::string::npos);
    case Json::Kind::Null:
      return type == "null";
  }
  return false;
}

/// First place where `value` departs from `schema`; empty when it does not.
std::string departure(const Json& schema, const Json& value, const std::string& at) {
  for (const Json::Member& rule : schema.members()) {
    const std::string& key = rule.first;
    if (key == "$schema" || key == "title" || key == "description") continue;
    if (key == "type") {
      if (!has_type(value, rule.second.text())) return at + ": not of type " + rule.second.text();
    } else if (key == "const") {
      if (value.kind() != rule.second.kind() || value.text() != rule.second.text())
        return at + ": not the constant";
    } else if (key == "required") {
      for (const Json& name : rule.second.items()) {
        if (value.find(name.text()) == nullptr) return at + ": lacks " + name.text();
      }
    } else if (key == "pattern") {
      if (!matches(rule.second.text(), value.text())) return at + ": does not match " + rule.second.text();
    } else if (key == "properties") {
      for (const Json::Member& property : rule.second.members()) {
        const Json* member = value.find(property.first);
        if (member == nullptr) continue;
        const std::string found = departure(property.second, *member, at + "." + property.first);
        if (!found.empty()) return found;
      }
    } else if (key == "additionalProperties") {
      for (const Json::Member& member : value.members()) {
        const std::string found = departure(rule.second, member.second, at + "." + member.first);
        if (!found.empty()) return found;
      }
    } else if (key == "items") {
      for (std::size_t i = 0; i < value.items().size(); ++i) {
        const std::string found =
            departure(rule.second, value.items()[i], at + "[" + std::to_string(i) + "]");
        if (!found.empty()) return found;
      }
    } else {
      ADD_FAILURE() << "the schema uses a keyword this test does not know: " << key;
    }
  }
  return {};
}

Json schema() {
  const Result<Json> json = read_json(test::read_source_file("worksheets/worksheet.schema.json"));
  EXPECT_TRUE(json.ok());
  return json.ok() ? *json : Json();
}

bool is_example(const std::string& name) {
  const std::string ending = ".heatledger.json";
  return name.size() > ending.size() && name.compare(name.size() - ending.size(), ending.size(), ending) == 0;
}

TEST(Schema, EveryExampleWorksheetKeepsToIt) {
  const Json rules = schema();
  int examples = 0;
  for (const std::string& name : test::list_source_folder("worksheets")) {
    if (!is_example(name)) continue;
    ++examples;
    const Result<Json> json = read_json(test::read_source_file("worksheets/" + name));
    ASSERT_TRUE(json.ok()) << name;
    EXPECT_EQ(departure(rules, *json, name), "");
  }
  EXPECT_GE(examples, 4);
}

TEST(Schema, EveryExampleIsInCanonicalForm) {
  for (const std::string& name : test::list_source_folder("worksheets")) {
    if (!is_example(name)) continue;
    const std::string text = test::read_source_file("worksheets/" + name);
    const Result<Opened> opened = read_worksheet(text);
    ASSERT_TRUE(opened.ok()) << name;
    EXPECT_TRUE(opened->not_understood.empty()) << name;
    EXPECT_EQ(write_worksheet(opened->sheet, opened->results), text) << name;
  }
}

TEST(Schema, KnowsEveryKeyThatIsWritten) {
  document::Worksheet sheet = document::empty_worksheet();
  sheet.header.change() = {"a", "b", "c", "d", "e", "f", "g", "h", ""};
  document::ReactionSheet& reaction = sheet.reactions[0].change();
  reaction.title = reaction.equation = reaction.basis = reaction.bond_set = reaction.pinned_route =
      reaction.reactants_at = reaction.products_at = reaction.pressure = reaction.note = "x";
  reaction.measured = {"a", "b", "c", "d", "e", "f", "g", ""};
  reaction.show_measured = true;
  reaction.show_profile = reaction.show_checker = true;
  reaction.checker["gas_298"] = "1";
  sheet.typed_bonds.change().push_back({"a", "b", "c", "d", ""});
  sheet.typed_figures.change().push_back({"a", "b", "c", "d", "e", ""});
  sheet.notes.change().push_back("n");
  sheet.assumptions.change().push_back("a");
  const Result<Json> written = read_json(write_worksheet(sheet, {"0123456789abcdef", {{"r1", "x"}}}));
  ASSERT_TRUE(written.ok());
  const Json rules = schema();
  EXPECT_EQ(departure(rules, *written, "sheet"), "");
  // A key that the schema does not describe would pass it unseen.
  const Json& properties = *rules.find("properties");
  for (const Json::Member& member : written->members())
    EXPECT_NE(properties.find(member.first), nullptr) << member.first;
  const Json& reaction_rules = *properties.find("reactions")->find("items")->find("properties");
  for (const Json::Member& member : written->find("reactions")->items()[0].members()) {
    EXPECT_NE(reaction_rules.find(member.first), nullptr) << member.first;
  }
}

TEST(Schema, RefusesWhatIsNoWorksheet) {
  const Json rules = schema();
  for (const char* text :
       {R"([])", R"({"format": "heatledger-worksheet"})", R"({"format": "x", "version": 1})",
        R"({"format": "heatledger-worksheet", "version": 2})",
        R"({"format": "heatledger-worksheet", "version": 1, "reactions": [{"id": "header"}]})",
        R"({"format": "heatledger-worksheet", "version": 1, "notes": [1]})"}) {
    const Result<Json> json = read_json(text);
    ASSERT_TRUE(json.ok());
    EXPECT_NE(departure(rules, *json, "sheet"), "") << text;
  }
}

}  // namespace
}  // namespace heatledger::file
