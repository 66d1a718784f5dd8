// Reading one JSON object member by member, for the readers of this room. Not for callers outside it.
#pragma once

#include <map>
#include <string>
#include <string_view>
#include <utility>
#include <vector>

#include "core/file/json.hpp"
#include "core/file/members.hpp"

namespace heatledger::file {

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

  template <typename T, std::size_t N>
  void texts(const TextMember<T> (&members)[N], T& record) {
    for (const TextMember<T>& member : members) text(member.key, record.*member.field);
  }

  /// An object of texts. One with a member that is none is kept whole and reported.
  void texts(std::string_view key, std::map<std::string, std::string>& out) {
    const Json* object = peek(key);
    if (object == nullptr) return;
    bool all = object->is_object();
    if (all) {
      for (const Json::Member& member : object->members()) all = all && member.second.is_string();
    }
    if (!all) return complain(key, "an object of texts");
    mark(key);
    for (const Json::Member& member : object->members()) out[member.first] = member.second.text();
  }

  /// Reads every item of a list of objects. A list with an item that is none is kept whole and reported.
  template <typename T, typename Read>
  void objects(std::string_view key, std::vector<T>& out, Read read) {
    const Json* list = peek(key);
    if (list == nullptr) return;
    bool all = list->is_array();
    if (all) {
      for (const Json& item : list->items()) all = all && item.is_object();
    }
    if (!all) return complain(key, "a list of objects");
    mark(key);
    for (std::size_t i = 0; i < list->items().size(); ++i)
      out.push_back(read(list->items()[i], at(key) + "[" + std::to_string(i) + "]"));
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

  /// Members of a taken object that it could not use: they go back into it.
  void keep(std::string key, Json others) {
    if (!others.members().empty()) kept_.emplace_back(std::move(key), std::move(others));
  }

  /// JSON object text of everything that was not taken; empty when nothing is left.
  std::string rest() const {
    Json left = Json::object();
    for (const Json::Member& member : kept_) left.add(member.first, member.second);
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
  std::vector<Json::Member> kept_;
};

/// A record that is texts alone; what is of the wrong kind or unknown goes to its `unknown`.
template <typename T, std::size_t N>
T read_record(const Json& object, const TextMember<T> (&members)[N], const std::string& path,
              std::vector<Error>& problems) {
  T record;
  Fields fields(object, path, problems);
  fields.texts(members, record);
  record.unknown = fields.rest();
  return record;
}

}  // namespace heatledger::file
