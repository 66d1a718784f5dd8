#include "core/file/json.hpp"
#include "core/file/worksheet_file.hpp"

namespace heatledger::file {
namespace {

/// Builds one object in canonical order: known members that say something, then what was kept from the file.
class Writer {
 public:
  void text(const char* key, const std::string& value) {
    if (!value.empty()) object_.add(key, Json::string(value));
  }
  void flag(const char* key, bool value) {
    if (value) object_.add(key, Json::boolean(true));
  }
  void lines(const char* key, const document::Lines& lines) {
    if (lines.empty()) return;
    Json array = Json::array();
    for (const std::string& line : lines) array.items().push_back(Json::string(line));
    object_.add(key, std::move(array));
  }
  void value(const char* key, Json value) { object_.add(key, std::move(value)); }

  /// Adds the members of a kept JSON object text, leaving out keys that now have a value of their own.
  Json finish(const std::string& unknown) {
    if (!unknown.empty()) {
      Result<Json> kept = read_json(unknown);
      if (kept.ok()) {
        for (Json::Member& member : kept->members()) {
          if (object_.find(member.first) == nullptr) object_.add(member.first, std::move(member.second));
        }
      }
    }
    return std::move(object_);
  }

 private:
  Json object_ = Json::object();
};

Json header_json(const document::Header& header) {
  Writer out;
  out.text("title", header.title);
  out.text("subtitle", header.subtitle);
  out.text("sheet_number", header.sheet_number);
  out.text("revision", header.revision);
  out.text("prepared", header.prepared);
  out.text("prepared_date", header.prepared_date);
  out.text("checked", header.checked);
  out.text("checked_date", header.checked_date);
  return out.finish(header.unknown);
}

Json reaction_json(const document::ReactionSheet& reaction) {
  Writer out;
  out.text("id", reaction.id);
  out.text("title", reaction.title);
  out.text("equation", reaction.equation);
  out.text("basis", reaction.basis);
  out.text("bond_set", reaction.bond_set);
  out.text("pinned_route", reaction.pinned_route);
  out.text("note", reaction.note);
  out.flag("show_profile", reaction.show_profile);
  out.flag("show_checker", reaction.show_checker);
  if (!reaction.checker.empty()) {
    Json checker = Json::object();
    for (const auto& entry : reaction.checker) checker.add(entry.first, Json::string(entry.second));
    out.value("checker", std::move(checker));
  }
  return out.finish(reaction.unknown);
}

Json bond_json(const document::TypedBond& bond) {
  Writer out;
  out.text("bond", bond.bond);
  out.text("value", bond.value);
  out.text("source", bond.source);
  return out.finish(bond.unknown);
}

Json results_json(const SavedResults& results) {
  Writer out;
  out.text("digest", results.digest);
  if (!results.figures.empty()) {
    Json figures = Json::object();
    for (const auto& figure : results.figures) figures.add(figure.first, Json::string(figure.second));
    out.value("figures", std::move(figures));
  }
  return out.finish({});
}

}  // namespace

std::string write_worksheet(const document::Worksheet& sheet, const SavedResults& results) {
  Writer out;
  out.text("format", std::string(kWorksheetFormat));
  out.value("version", Json::number(std::to_string(kWorksheetVersion)));
  const Json header = header_json(*sheet.header);
  if (!header.members().empty()) out.value("header", header);
  Json reactions = Json::array();
  for (const auto& reaction : sheet.reactions) reactions.items().push_back(reaction_json(*reaction));
  if (!reactions.items().empty()) out.value("reactions", std::move(reactions));
  Json bonds = Json::array();
  for (const auto& bond : *sheet.typed_bonds) bonds.items().push_back(bond_json(bond));
  if (!bonds.items().empty()) out.value("bonds", std::move(bonds));
  out.lines("notes", *sheet.notes);
  out.lines("assumptions", *sheet.assumptions);
  Json saved = results_json(results);
  if (!saved.members().empty()) out.value("results", std::move(saved));
  return write_json_text(out.finish(*sheet.unknown)) + "\n";
}

}  // namespace heatledger::file
