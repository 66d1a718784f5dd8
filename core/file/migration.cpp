#include "core/file/migration.hpp"

#include <algorithm>
#include <array>

#include "core/base/check.hpp"
#include "core/file/worksheet_file.hpp"

namespace heatledger::file {
namespace {

/// Takes a member out of an object; a Null value when there is none.
Json take(Json& object, std::string_view key, bool& found) {
  auto& members = object.members();
  const auto at =
      std::find_if(members.begin(), members.end(), [&](const Json::Member& m) { return m.first == key; });
  found = at != members.end();
  if (!found) return Json();
  Json value = std::move(at->second);
  members.erase(at);
  return value;
}

void move_member(Json& from, std::string_view old_key, Json& to, const std::string& new_key) {
  bool found = false;
  Json value = take(from, old_key, found);
  if (found) to.add(new_key, std::move(value));
}

void from_0_to_1(Json& root) {
  Json header = Json::object();
  move_member(root, "title", header, "title");
  move_member(root, "by", header, "prepared");
  move_member(root, "date", header, "prepared_date");

  Json reaction = Json::object();
  reaction.add("id", Json::string("r1"));
  move_member(root, "equation", reaction, "equation");
  move_member(root, "per", reaction, "basis");
  Json reactions = Json::array();
  reactions.items().push_back(std::move(reaction));

  Json bonds = Json::array();
  bool found = false;
  const Json old_bonds = take(root, "bonds", found);
  for (const Json::Member& member : old_bonds.members()) {
    Json bond = Json::object();
    bond.add("bond", Json::string(member.first));
    bond.add("value", member.second);
    bonds.items().push_back(std::move(bond));
  }
  root.add("header", std::move(header));
  root.add("reactions", std::move(reactions));
  if (found) root.add("bonds", std::move(bonds));
}

using Step = void (*)(Json&);
/// kSteps[v] leads from version v to v + 1.
constexpr std::array<Step, kWorksheetVersion> kSteps{from_0_to_1};

}  // namespace

void migrate_worksheet(Json& root, int version) {
  CHECK(version >= 0 && version <= kWorksheetVersion, "only versions up to the present one are migrated");
  for (auto step = static_cast<std::size_t>(version); step < kSteps.size(); ++step) kSteps[step](root);
}

}  // namespace heatledger::file
