#include <algorithm>
#include <cstdlib>

#include "core/base/number_text.hpp"
#include "core/file/json.hpp"
#include "core/file/migration.hpp"
#include "core/file/worksheet_file.hpp"

namespace heatledger::file {
namespace {

/// Reads the members of one object that this version knows; all others are kept as `rest`.
class Fields {
 public:
  Fields(const Json& object, std::string path, std::vector<Error>& problems)
      : path_(std::move(path)),
        problems_(problems),
        members_(object.members()),
        taken_(members_.size(), false) {}

  void text(std::string_view key, std::string& out) {
    if (const Json* value = take(key, Json::Kind::String, "a text")) out = value->text();
  }

  void flag(std::string_view key, bool& out) {
    const Json* value = peek(key);
    if (value == nullptr) return;
    if (!value->is_boolean()) return complain(key, "true or false");
    mark(key);
    out = value->is_true();
  }

  /// A member of the kind wanted; nullptr when it is missing or of another kind, which is then kept and
  /// reported.
  const Json* take(std::string_view key, Json::Kind kind, const char* wanted) {
    const Json* value = peek(key);
    if (value == nullptr) return nullptr;
    if (value->kind() != kind) {
      complain(key, wanted);
      return nullptr;
    }
    mark(key);
    return value;
  }

  void skip(std::string_view key) { mark(key); }

  void complain(std::string_view key, const std::string& wanted) {
    problems_.push_back({"file.wrong_kind",
                         "\"" + at(key) + "\" should be " + wanted + "; it was kept but not used.", at(key),
                         "Compare with worksheets/worksheet.schema.json."});
  }

  std::string at(std::string_view key) const {
    return path_.empty() ? std::string(key) : path_ + "." + std::string(key);
  }

  /// JSON object text of everything that was not taken; empty when nothing is left.
  std::string rest() const {
    Json left = Json::object();
    for (std::size_t i = 0; i < members_.size(); ++i) {
      if (!taken_[i]) left.add(members_[i].first, members_[i].second);
    }
    return left.members().empty() ? std::string() : write_json_text(left);
  }

 private:
  const Json* peek(std::string_view key) const {
    for (const Json::Member& member : members_) {
      if (member.first == key) return &member.second;
    }
    return nullptr;
  }

  void mark(std::string_view key) {
    for (std::size_t i = 0; i < members_.size(); ++i) {
      if (members_[i].first == key) taken_[i] = true;
    }
  }

  std::string path_;
  std::vector<Error>& problems_;
  const std::vector<Json::Member>& members_;
  std::vector<bool> taken_;
};

document::Header read_header(const Json& object, std::vector<Error>& problems) {
  document::Header header;
  Fields fields(object, "header", problems);
  fields.text("title", header.title);
  fields.text("subtitle", header.subtitle);
  fields.text("sheet_number", header.sheet_number);
  fields.text("revision", header.revision);
  fields.text("prepared", header.prepared);
  fields.text("prepared_date", header.prepared_date);
  fields.text("checked", header.checked);
  fields.text("checked_date", header.checked_date);
  header.unknown = fields.rest();
  return header;
}

/// Ids become parts of cell ids: "r" and up to six digits, so that they meet no other word there.
bool usable_id(const std::string& id) {
  if (id.size() < 2 || id.size() > 7 || id[0] != 'r') return false;
  return std::all_of(id.begin() + 1, id.end(), [](char c) { return c >= '0' && c <= '9'; });
}

document::ReactionSheet read_reaction_sheet(const Json& object, const std::string& path,
                                            std::vector<Error>& problems) {
  document::ReactionSheet reaction;
  Fields fields(object, path, problems);
  fields.text("id", reaction.id);
  fields.text("title", reaction.title);
  fields.text("equation", reaction.equation);
  fields.text("basis", reaction.basis);
  fields.text("bond_set", reaction.bond_set);
  fields.text("pinned_route", reaction.pinned_route);
  fields.text("note", reaction.note);
  fields.flag("show_profile", reaction.show_profile);
  fields.flag("show_checker", reaction.show_checker);
  if (const Json* checker = fields.take("checker", Json::Kind::Object, "an object of texts")) {
    for (const Json::Member& member : checker->members()) {
      if (member.second.is_string()) {
        reaction.checker[member.first] = member.second.text();
      } else {
        problems.push_back({"file.wrong_kind",
                            "A figure of the checker's column should be a text; it was left out.",
                            path + ".checker." + member.first, "Write figures as texts: \"-518 kJ\"."});
      }
    }
  }
  reaction.unknown = fields.rest();
  return reaction;
}

document::TypedBond read_typed_bond(const Json& object, const std::string& path,
                                    std::vector<Error>& problems) {
  document::TypedBond bond;
  Fields fields(object, path, problems);
  fields.text("bond", bond.bond);
  fields.text("value", bond.value);
  fields.text("source", bond.source);
  bond.unknown = fields.rest();
  return bond;
}

/// Calls `read` for every object of an array; other items are reported and left out.
template <typename Read>
void each_object(const Json& array, const std::string& path, std::vector<Error>& problems, Read read) {
  for (std::size_t i = 0; i < array.items().size(); ++i) {
    const std::string at = path + "[" + std::to_string(i) + "]";
    if (array.items()[i].is_object()) {
      read(array.items()[i], at);
    } else {
      problems.push_back({"file.wrong_kind", "\"" + at + "\" should be an object; it was left out.", at,
                          "Compare with worksheets/worksheet.schema.json."});
    }
  }
}

document::Lines read_lines(const Json& array, const std::string& path, std::vector<Error>& problems) {
  document::Lines lines;
  for (std::size_t i = 0; i < array.items().size(); ++i) {
    if (array.items()[i].is_string()) {
      lines.push_back(array.items()[i].text());
    } else {
      const std::string at = path + "[" + std::to_string(i) + "]";
      problems.push_back({"file.wrong_kind", "\"" + at + "\" should be a text; it was left out.", at, ""});
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
    if (usable_id(id) && !taken) continue;
    if (!id.empty()) {
      problems.push_back({"file.reaction_id", "The reaction id \"" + id + "\" was replaced.",
                          "reactions[" + std::to_string(i) + "].id",
                          "An id is \"r\" with a number that no other reaction has."});
    }
    sheet.reactions[i].change().id = document::free_reaction_id(sheet);
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
    sheet.header = document::Shared<document::Header>(read_header(*header, problems));
  }
  if (const Json* reactions = fields.take("reactions", Json::Kind::Array, "a list")) {
    each_object(*reactions, "reactions", problems, [&](const Json& object, const std::string& path) {
      sheet.reactions.push_back(
          document::Shared<document::ReactionSheet>(read_reaction_sheet(object, path, problems)));
    });
  }
  if (const Json* bonds = fields.take("bonds", Json::Kind::Array, "a list")) {
    each_object(*bonds, "bonds", problems, [&](const Json& object, const std::string& path) {
      sheet.typed_bonds.change().push_back(read_typed_bond(object, path, problems));
    });
  }
  if (const Json* notes = fields.take("notes", Json::Kind::Array, "a list of texts")) {
    sheet.notes = document::Shared<document::Lines>(read_lines(*notes, "notes", problems));
  }
  if (const Json* assumptions = fields.take("assumptions", Json::Kind::Array, "a list of texts")) {
    sheet.assumptions = document::Shared<document::Lines>(read_lines(*assumptions, "assumptions", problems));
  }
  if (const Json* results = fields.take("results", Json::Kind::Object, "an object")) {
    opened.results = read_results(*results);
  }
  sheet.unknown = document::Shared<std::string>(fields.rest());
  settle_ids(sheet, problems);
  return opened;
}

}  // namespace heatledger::file
