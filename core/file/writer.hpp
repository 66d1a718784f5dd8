// Writing one JSON object member by member, for the writers of this room. Not for callers outside it.
#pragma once

#include <algorithm>
#include <map>
#include <string>
#include <utility>

#include "core/file/json.hpp"
#include "core/file/members.hpp"

namespace heatledger::file {

/// Builds one object in canonical order: known members that say something, then what was kept from the file.
class Writer {
 public:
  void text(const char* key, const std::string& value) {
    if (!value.empty()) object_.add(key, Json::string(value));
  }
  template <typename T, std::size_t N>
  void texts(const TextMember<T> (&members)[N], const T& record) {
    for (const TextMember<T>& member : members) text(member.key, record.*member.field);
  }
  void texts(const char* key, const std::map<std::string, std::string>& entries) {
    if (entries.empty()) return;
    Json object = Json::object();
    for (const auto& entry : entries) object.add(entry.first, Json::string(entry.second));
    value(key, std::move(object));
  }
  void flag(const char* key, bool value) {
    if (value) object_.add(key, Json::boolean(true));
  }
  void lines(const char* key, const document::Lines& lines, const document::Misfits& misfits) {
    Json array = Json::array();
    for (const std::string& line : lines) array.items().push_back(Json::string(line));
    list(key, std::move(array), misfits);
  }
  void value(const char* key, Json value) { object_.add(key, std::move(value)); }

  /// A list with the items that were kept aside put back to their places.
  void list(const char* key, Json array, const document::Misfits& misfits) {
    for (const document::Misfit& misfit : misfits) {
      if (misfit.list != key) continue;
      Result<Json> item = read_json(misfit.json);
      if (!item.ok()) continue;
      const std::size_t place = std::min(misfit.place, array.items().size());
      array.items().insert(array.items().begin() + static_cast<std::ptrdiff_t>(place),
                           std::move(item).value());
    }
    if (!array.items().empty()) object_.add(key, std::move(array));
  }

  /// Adds the members of a kept JSON object text, leaving out keys that now have a value of their own; what
  /// was kept of an object that has one goes into it.
  Json finish(const std::string& unknown) {
    if (!unknown.empty()) {
      Result<Json> kept = read_json(unknown);
      if (kept.ok()) {
        for (Json::Member& member : kept->members()) {
          merge(std::move(member));
        }
      }
    }
    return std::move(object_);
  }

 private:
  void merge(Json::Member kept) {
    for (Json::Member& own : object_.members()) {
      if (own.first != kept.first) continue;
      if (!own.second.is_object() || !kept.second.is_object()) return;
      for (Json::Member& inner : kept.second.members()) {
        if (own.second.find(inner.first) == nullptr) own.second.add(inner.first, std::move(inner.second));
      }
      return;
    }
    object_.add(std::move(kept.first), std::move(kept.second));
  }

  Json object_ = Json::object();
};

/// A record that is texts alone.
template <typename T, std::size_t N>
Json record_json(const T& record, const TextMember<T> (&members)[N]) {
  Writer out;
  out.texts(members, record);
  return out.finish(record.unknown);
}

}  // namespace heatledger::file
