#include "core/file/step_file.hpp"

namespace heatledger::file {
namespace {

using document::FeedRow;
using document::FeedSheet;
using document::LeavingRow;
using document::ProgressSheet;
using document::SpeciesRow;
using document::StepSheet;

/// The texts of one kind of object: key in the file and field; in canonical order.
template <typename T>
struct TextField {
  const char* key;
  std::string T::*field;
};

constexpr TextField<FeedRow> kFeedRow[] = {{"species", &FeedRow::species}, {"amount", &FeedRow::amount}};
constexpr TextField<FeedSheet> kFeed[] = {{"name", &FeedSheet::name},
                                          {"from", &FeedSheet::from},
                                          {"at", &FeedSheet::at},
                                          {"pressure", &FeedSheet::pressure},
                                          {"total", &FeedSheet::total}};
constexpr TextField<ProgressSheet> kProgress[] = {
    {"reaction", &ProgressSheet::reaction}, {"how", &ProgressSheet::how},
    {"figure", &ProgressSheet::figure},     {"heat", &ProgressSheet::heat},
    {"heat_per", &ProgressSheet::heat_per}, {"heat_at", &ProgressSheet::heat_at},
    {"includes", &ProgressSheet::includes}};
constexpr TextField<LeavingRow> kLeaving[] = {{"species", &LeavingRow::species}, {"how", &LeavingRow::how}};
constexpr TextField<SpeciesRow> kSpecies[] = {{"species", &SpeciesRow::species},
                                              {"heat_capacity", &SpeciesRow::heat_capacity},
                                              {"density", &SpeciesRow::density},
                                              {"vapour_pressure", &SpeciesRow::vapour_pressure},
                                              {"molar_mass", &SpeciesRow::molar_mass}};
constexpr TextField<StepSheet> kStep[] = {{"id", &StepSheet::id},       {"title", &StepSheet::title},
                                          {"kind", &StepSheet::kind},   {"sought", &StepSheet::sought},
                                          {"curve", &StepSheet::curve}, {"note", &StepSheet::note}};

void complain(std::vector<Error>& problems, const std::string& at, const char* wanted) {
  problems.push_back({"file.wrong_kind", "\"" + at + "\" should be " + wanted + "; it was kept but not used.",
                      at, "Compare with worksheets/worksheet.schema.json."});
}

std::string kept(const Json& left) {
  return left.members().empty() ? std::string() : write_json_text(left);
}

/// Reads the texts of an object; what is none of them goes through `other`, which says whether it took it.
template <typename T, std::size_t N, typename Other>
T read_object(const Json& object, const TextField<T> (&fields)[N], const std::string& path,
              std::vector<Error>& problems, Other other) {
  T result;
  Json left = Json::object();
  for (const Json::Member& member : object.members()) {
    const std::string at = path + "." + member.first;
    bool taken = false, known = false;
    for (const TextField<T>& field : fields) {
      if (member.first != field.key) continue;
      known = true;
      if (!member.second.is_string()) break;
      result.*field.field = member.second.text();
      taken = true;
    }
    if (!taken && known) complain(problems, at, "a text");
    if (!taken && !known) taken = other(result, member, at);
    if (!taken) left.add(member.first, member.second);
  }
  result.unknown = kept(left);
  return result;
}

template <typename T, std::size_t N>
T read_plain(const Json& object, const TextField<T> (&fields)[N], const std::string& path,
             std::vector<Error>& problems) {
  return read_object(object, fields, path, problems,
                     [](T&, const Json::Member&, const std::string&) { return false; });
}

/// A list of objects; the whole list is kept as unknown when an item is none, so that nothing is lost.
template <typename T, typename Read>
bool read_list(const Json::Member& member, const std::string& at, std::vector<Error>& problems,
               std::vector<T>& out, Read read) {
  bool all = member.second.is_array();
  if (all) {
    for (const Json& item : member.second.items()) all = all && item.is_object();
  }
  if (!all) {
    complain(problems, at, "a list of objects");
    return false;
  }
  for (std::size_t i = 0; i < member.second.items().size(); ++i)
    out.push_back(read(member.second.items()[i], at + "[" + std::to_string(i) + "]"));
  return true;
}

bool read_texts(const Json::Member& member, const std::string& at, std::vector<Error>& problems,
                std::map<std::string, std::string>& out) {
  bool texts = member.second.is_object();
  if (texts) {
    for (const Json::Member& entry : member.second.members()) texts = texts && entry.second.is_string();
  }
  if (!texts) {
    complain(problems, at, "an object of texts");
    return false;
  }
  for (const Json::Member& entry : member.second.members()) out[entry.first] = entry.second.text();
  return true;
}

/// Adds the members of a kept JSON object text.
void add_unknown(Json& object, const std::string& unknown) {
  if (unknown.empty()) return;
  Result<Json> left = read_json(unknown);
  if (!left.ok()) return;
  for (Json::Member& member : left->members()) {
    if (object.find(member.first) == nullptr) object.add(member.first, std::move(member.second));
  }
}

template <typename T, std::size_t N>
Json texts_json(const T& from, const TextField<T> (&fields)[N]) {
  Json object = Json::object();
  for (const TextField<T>& field : fields) {
    if (!(from.*field.field).empty()) object.add(field.key, Json::string(from.*field.field));
  }
  return object;
}

template <typename T, std::size_t N>
void add_list(Json& object, const char* key, const std::vector<T>& list, const TextField<T> (&fields)[N]) {
  if (list.empty()) return;
  Json array = Json::array();
  for (const T& item : list) {
    Json one = texts_json(item, fields);
    add_unknown(one, item.unknown);
    array.items().push_back(std::move(one));
  }
  object.add(key, std::move(array));
}

}  // namespace

Json step_json(const StepSheet& step) {
  Json object = texts_json(step, kStep);
  if (!step.feeds.empty()) {
    Json feeds = Json::array();
    for (const FeedSheet& feed : step.feeds) {
      Json one = texts_json(feed, kFeed);
      add_list(one, "rows", feed.rows, kFeedRow);
      add_unknown(one, feed.unknown);
      feeds.items().push_back(std::move(one));
    }
    object.add("feeds", std::move(feeds));
  }
  add_list(object, "reactions", step.reactions, kProgress);
  add_list(object, "leaving", step.leaving, kLeaving);
  add_list(object, "species", step.species, kSpecies);
  if (!step.blanks.empty()) {
    Json blanks = Json::object();
    for (const auto& [key, text] : step.blanks) blanks.add(key, Json::string(text));
    object.add("blanks", std::move(blanks));
  }
  if (step.show_checker) object.add("show_checker", Json::boolean(true));
  if (!step.checker.empty()) {
    Json checker = Json::object();
    for (const auto& [cell, text] : step.checker) checker.add(cell, Json::string(text));
    object.add("checker", std::move(checker));
  }
  add_unknown(object, step.unknown);
  return object;
}

StepSheet read_step_sheet(const Json& object, const std::string& path, std::vector<Error>& problems) {
  return read_object(
      object, kStep, path, problems, [&](StepSheet& step, const Json::Member& member, const std::string& at) {
        if (member.first == "feeds") {
          return read_list(member, at, problems, step.feeds, [&](const Json& feed, const std::string& where) {
            return read_object(feed, kFeed, where, problems,
                               [&](FeedSheet& sheet, const Json::Member& part, const std::string& there) {
                                 if (part.first != "rows") return false;
                                 return read_list(part, there, problems, sheet.rows,
                                                  [&](const Json& row, const std::string& its) {
                                                    return read_plain(row, kFeedRow, its, problems);
                                                  });
                               });
          });
        }
        if (member.first == "reactions") {
          return read_list(member, at, problems, step.reactions,
                           [&](const Json& item, const std::string& where) {
                             return read_plain(item, kProgress, where, problems);
                           });
        }
        if (member.first == "leaving") {
          return read_list(member, at, problems, step.leaving,
                           [&](const Json& item, const std::string& where) {
                             return read_plain(item, kLeaving, where, problems);
                           });
        }
        if (member.first == "species") {
          return read_list(member, at, problems, step.species,
                           [&](const Json& item, const std::string& where) {
                             return read_plain(item, kSpecies, where, problems);
                           });
        }
        if (member.first == "blanks") return read_texts(member, at, problems, step.blanks);
        if (member.first == "checker") return read_texts(member, at, problems, step.checker);
        if (member.first != "show_checker") return false;
        if (!member.second.is_boolean()) {
          complain(problems, at, "true or false");
          return false;
        }
        step.show_checker = member.second.is_true();
        return true;
      });
}

}  // namespace heatledger::file
