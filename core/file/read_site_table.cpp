#include "core/base/number_text.hpp"
#include "core/file/fields.hpp"
#include "core/file/site_table.hpp"

namespace heatledger::file {
namespace {

Error not_a_site_table(const std::string& where) {
  return {"file.not_a_site_table", "This JSON text is not a site table.", where,
          "A site table begins with \"format\": \"heatledger-site-table\", a whole number \"version\" and a "
          "\"name\"."};
}

/// Calls `read` for every object of a list; other items are reported.
template <typename Read>
void each_entry(Fields& fields, const char* list, std::vector<Error>& problems, Read read) {
  const Json* array = fields.take(list, Json::Kind::Array, "a list");
  if (array == nullptr) return;
  for (std::size_t i = 0; i < array->items().size(); ++i) {
    const std::string at = std::string(list) + "[" + std::to_string(i) + "]";
    if (array->items()[i].is_object()) {
      read(array->items()[i], at);
    } else {
      problems.push_back({"file.wrong_kind", "\"" + at + "\" should be an object; it was not used.", at,
                          "Compare with worksheets/site-table.schema.json."});
    }
  }
}

}  // namespace

bool looks_like_site_table(std::string_view text) {
  const Result<Json> json = read_json(text);
  return json.ok() && json->string_or("format", "") == kSiteTableFormat;
}

Result<SiteTable> read_site_table(std::string_view text) {
  const Result<Json> json = read_json(text);
  if (!json.ok()) return json.error();
  if (!json->is_object()) return not_a_site_table("top level");
  if (json->string_or("format", "") != kSiteTableFormat) return not_a_site_table("format");
  const Json* version = json->find("version");
  const std::optional<double> number = version != nullptr && version->kind() == Json::Kind::Number
                                           ? parse_number(version->text())
                                           : std::nullopt;
  if (!number || *number < 1) return not_a_site_table("version");
  if (*number > kSiteTableVersion) {
    return Error{"file.newer_version",
                 "This site table was written in format version " + version->text() +
                     "; this program reads up to version " + std::to_string(kSiteTableVersion) + ".",
                 "version", "Read it with a newer copy of the program; nothing was changed."};
  }
  SiteTable table;
  std::vector<Error>& problems = table.not_understood;
  Fields fields(*json, "", problems);
  fields.text("name", table.name);
  if (table.name.empty()) return not_a_site_table("name");
  each_entry(fields, "bonds", problems, [&](const Json& object, const std::string& path) {
    table.bonds.push_back(read_record(object, kBond, path, problems));
    table.bonds.back().from = table.name;
  });
  each_entry(fields, "species", problems, [&](const Json& object, const std::string& path) {
    table.figures.push_back(read_record(object, kFigure, path, problems));
    table.figures.back().from = table.name;
  });
  each_entry(fields, "heats", problems, [&](const Json& object, const std::string& path) {
    SiteTable::Heat heat;
    heat.equation = object.string_or("equation", "");
    heat.heat = read_record(object, kHeat, path, problems);
    heat.heat.unknown.clear();  // the equation is the reaction's on the sheet
    heat.heat.from = table.name;
    table.heats.push_back(std::move(heat));
  });
  return table;
}

}  // namespace heatledger::file
