// A JSON value of our own: order of keys and spelling of numbers kept, so that what a version does not know
// goes back into the file as it came. Reading goes through a guarded parser (json.cpp); nothing here can
// abort.
#pragma once

#include <cstdint>
#include <string>
#include <string_view>
#include <utility>
#include <vector>

#include "core/base/result.hpp"

namespace heatledger::file {

class Json {
 public:
  enum class Kind : std::uint8_t { Null, False, True, Number, String, Array, Object };
  using Member = std::pair<std::string, Json>;

  Json() = default;
  static Json boolean(bool value) { return Json(value ? Kind::True : Kind::False); }
  static Json string(std::string text) { return Json(Kind::String, std::move(text)); }
  /// @param text  a JSON number token
  static Json number(std::string text) { return Json(Kind::Number, std::move(text)); }
  static Json array() { return Json(Kind::Array); }
  static Json object() { return Json(Kind::Object); }

  Kind kind() const { return kind_; }
  bool is_string() const { return kind_ == Kind::String; }
  bool is_array() const { return kind_ == Kind::Array; }
  bool is_object() const { return kind_ == Kind::Object; }
  bool is_boolean() const { return kind_ == Kind::True || kind_ == Kind::False; }
  bool is_true() const { return kind_ == Kind::True; }

  /// Text of a string, or the token of a number; empty for every other kind.
  const std::string& text() const { return text_; }
  const std::vector<Json>& items() const { return items_; }
  const std::vector<Member>& members() const { return members_; }
  std::vector<Json>& items() { return items_; }
  std::vector<Member>& members() { return members_; }

  /// Member of an object; nullptr when there is none or this is no object.
  const Json* find(std::string_view key) const;
  /// Text of a string member; `otherwise` when it is missing or no string.
  std::string string_or(std::string_view key, std::string otherwise) const;
  void add(std::string key, Json value) { members_.emplace_back(std::move(key), std::move(value)); }

 private:
  explicit Json(Kind kind) : kind_(kind) {}
  Json(Kind kind, std::string text) : kind_(kind), text_(std::move(text)) {}

  Kind kind_ = Kind::Null;
  std::string text_;
  std::vector<Json> items_;
  std::vector<Member> members_;
};

/// Reads one JSON text (UTF-8, RFC 8259; a byte order mark is skipped).
/// @errors file.not_json, file.too_deep (more than 64 levels), file.duplicate_key; `where` is "offset N, line
/// L"
Result<Json> read_json(std::string_view text);

/// Two-space indent, one member a line, no newline at the end; arrays of plain values that fit stand on one
/// line.
std::string write_json_text(const Json& value);

/// Appends `text` as a JSON string with its quotes; bytes that are no UTF-8 become U+FFFD.
void append_json_string(std::string& out, std::string_view text);

}  // namespace heatledger::file
