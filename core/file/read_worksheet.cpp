#include <algorithm>
#include <cstdlib>

#include "core/base/number_text.hpp"
#include "core/file/fields.hpp"
#include "core/file/migration.hpp"
#include "core/file/step_file.hpp"
#include "core/file/worksheet_file.hpp"

namespace heatledger::file {
namespace {

/// Ids become parts of cell ids: a letter and up to six digits, so that they meet no other word there.
bool usable_id(const std::string& id, char letter) {
  if (id.size() < 2 || id.size() > 7 || id[0] != letter) return false;
  return std::all_of(id.begin() + 1, id.end(), [](char c) { return c >= '0' && c <= '9'; });
}

document::ReactionSheet read_reaction_sheet(const Json& object, const std::string& path,
                                            std::vector<Error>& problems) {
  document::ReactionSheet reaction;
  Fields fields(object, path, problems);
  fields.texts(kReaction, reaction);
  if (const Json* measured = fields.take("measured", Json::Kind::Object, "an object")) {
    reaction.measured = read_record(*measured, kHeat, path + ".measured", problems);
  }
  fields.text("note", reaction.note);
  fields.flag("show_profile", reaction.show_profile);
  fields.flag("show_checker", reaction.show_checker);
  fields.flag("show_measured", reaction.show_measured);
  if (const Json* checker = fields.take("checker", Json::Kind::Object, "an object of texts")) {
    Json others = Json::object();
    for (const Json::Member& member : checker->members()) {
      if (member.second.is_string()) {
        reaction.checker[member.first] = member.second.text();
      } else {
        problems.push_back({"file.wrong_kind",
                            "A figure of the checker's column should be a text; it was kept but not used.",
                            path + ".checker." + member.first, "Write figures as texts: \"-518 kJ\"."});
        others.add(member.first, member.second);
      }
    }
    fields.keep("checker", std::move(others));
  }
  reaction.unknown = fields.rest();
  return reaction;
}

/// Keeps an item that its list cannot hold, and says so.
void keep_misfit(const Json& item, const std::string& list, std::size_t place, const char* wanted,
                 document::Worksheet& sheet, std::vector<Error>& problems) {
  const std::string at = list + "[" + std::to_string(place) + "]";
  problems.push_back({"file.wrong_kind", "\"" + at + "\" should be " + wanted + "; it was kept but not used.",
                      at, "Compare with worksheets/worksheet.schema.json."});
  sheet.misfits.change().push_back({list, place, write_json_text(item)});
}

/// Calls `read` for every object of an array; other items are kept aside.
template <typename Read>
void each_object(const Json& array, const std::string& list, document::Worksheet& sheet,
                 std::vector<Error>& problems, Read read) {
  for (std::size_t i = 0; i < array.items().size(); ++i) {
    if (array.items()[i].is_object()) {
      read(array.items()[i], list + "[" + std::to_string(i) + "]");
    } else {
      keep_misfit(array.items()[i], list, i, "an object", sheet, problems);
    }
  }
}

document::Lines read_lines(const Json& array, const std::string& list, document::Worksheet& sheet,
                           std::vector<Error>& problems) {
  document::Lines lines;
  for (std::size_t i = 0; i < array.items().size(); ++i) {
    if (array.items()[i].is_string()) {
      lines.push_back(array.items()[i].text());
    } else {
      keep_misfit(array.items()[i], list, i, "a text", sheet, problems);
    }
  }
  return lines;
}

SavedResults read_results(const Json& object) {
  SavedResults results;
  results.digest = object.string_or("digest", "");
  if (const Json* figures = object.find("figures")) {
    for (const Json::Member& member : figures->members()) {
      if (member.second.is_string()) results.figures[member.first] = member.second.text();
    }
  }
  return results;
}

Error not_a_worksheet(const std::string& where) {
  return {"file.not_a_worksheet", "This JSON text is not a worksheet.", where,
          "A worksheet begins with \"format\": \"heatledger-worksheet\" and a whole number \"version\"."};
}

/// Version of the file, or why it cannot be opened.
Result<int> file_version(const Json& root) {
  if (!root.is_object()) return not_a_worksheet("top level");
  const Json* format = root.find("format");
  if (format == nullptr || !format->is_string() || format->text() != kWorksheetFormat)
    return not_a_worksheet("format");
  const Json* version = root.find("version");
  if (version == nullptr || version->kind() != Json::Kind::Number) return not_a_worksheet("version");
  const std::optional<double> number = parse_number(version->text());
  constexpr double kMostChecked = 1e9;  // beyond it a number is newer whatever its decimals
  if (!number || *number < 0) return not_a_worksheet("version");
  if (*number < kMostChecked && static_cast<int>(*number) != *number) return not_a_worksheet("version");
  if (*number > kWorksheetVersion) {
    return Error{"file.newer_version",
                 "This worksheet was saved in format version " + version->text() +
                     "; this program reads up to version " + std::to_string(kWorksheetVersion) + ".",
                 "version", "Open it with a newer copy of the program; nothing was changed."};
  }
  return static_cast<int>(*number);
}

/// Gives every reaction an id of its own that can be part of a cell id.
void settle_ids(document::Worksheet& sheet, std::vector<Error>& problems) {
  for (std::size_t i = 0; i < sheet.reactions.size(); ++i) {
    const std::string& id = sheet.reactions[i]->id;
    const bool taken = document::find_reaction(sheet, id) < i;
    if (usable_id(id, 'r') && !taken) continue;
    if (!id.empty()) {
      problems.push_back({"file.reaction_id", "The reaction id \"" + id + "\" was replaced.",
                          "reactions[" + std::to_string(i) + "].id",
                          "An id is \"r\" with a number that no other reaction has."});
    }
    sheet.reactions[i].change().id = document::free_reaction_id(sheet);
  }
  for (std::size_t i = 0; i < sheet.steps.size(); ++i) {
    const std::string& id = sheet.steps[i]->id;
    if (usable_id(id, 's') && document::find_step(sheet, id) == i) continue;
    if (!id.empty()) {
      problems.push_back({"file.step_id", "The step id \"" + id + "\" was replaced.",
                          "steps[" + std::to_string(i) + "].id",
                          "An id is \"s\" with a number that no other step has."});
    }
    sheet.steps[i].change().id = document::free_step_id(sheet);
  }
}

}  // namespace

Result<Opened> read_worksheet(std::string_view text) {
  Result<Json> json = read_json(text);
  if (!json) return json.error();
  const Result<int> version = file_version(*json);
  if (!version) return version.error();
  migrate_worksheet(*json, *version);

  Opened opened;
  opened.version = *version;
  std::vector<Error>& problems = opened.not_understood;
  document::Worksheet& sheet = opened.sheet;
  Fields fields(*json, "", problems);
  fields.skip("format");
  fields.skip("version");
  if (const Json* header = fields.take("header", Json::Kind::Object, "an object")) {
    sheet.header = document::Shared<document::Header>(read_record(*header, kHeader, "header", problems));
  }
  if (const Json* reactions = fields.take("reactions", Json::Kind::Array, "a list")) {
    each_object(*reactions, "reactions", sheet, problems, [&](const Json& object, const std::string& path) {
      sheet.reactions.push_back(
          document::Shared<document::ReactionSheet>(read_reaction_sheet(object, path, problems)));
    });
  }
  if (const Json* steps = fields.take("steps", Json::Kind::Array, "a list")) {
    each_object(*steps, "steps", sheet, problems, [&](const Json& object, const std::string& path) {
      sheet.steps.push_back(document::Shared<document::StepSheet>(read_step_sheet(object, path, problems)));
    });
  }
  if (const Json* bonds = fields.take("bonds", Json::Kind::Array, "a list")) {
    each_object(*bonds, "bonds", sheet, problems, [&](const Json& object, const std::string& path) {
      sheet.typed_bonds.change().push_back(read_record(object, kBond, path, problems));
    });
  }
  if (const Json* species = fields.take("species", Json::Kind::Array, "a list")) {
    each_object(*species, "species", sheet, problems, [&](const Json& object, const std::string& path) {
      sheet.typed_figures.change().push_back(read_record(object, kFigure, path, problems));
    });
  }
  if (const Json* quantities = fields.take("quantities", Json::Kind::Array, "a list")) {
    each_object(*quantities, "quantities", sheet, problems, [&](const Json& object, const std::string& path) {
      sheet.quantities.change().push_back(read_record(object, kQuantity, path, problems));
    });
  }
  if (const Json* notes = fields.take("notes", Json::Kind::Array, "a list of texts")) {
    sheet.notes = document::Shared<document::Lines>(read_lines(*notes, "notes", sheet, problems));
  }
  if (const Json* assumptions = fields.take("assumptions", Json::Kind::Array, "a list of texts")) {
    sheet.assumptions =
        document::Shared<document::Lines>(read_lines(*assumptions, "assumptions", sheet, problems));
  }
  if (const Json* results = fields.take("results", Json::Kind::Object, "an object")) {
    opened.results = read_results(*results);
  }
  sheet.unknown = document::Shared<std::string>(fields.rest());
  settle_ids(sheet, problems);
  return opened;
}

}  // namespace heatledger::file
