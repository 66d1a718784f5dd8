// Writes JSON text straight into a string: for answers that are too many to build as documents first.
// Reading JSON stands in json_line.hpp (one line of bulk work) and core/file (worksheets).
#pragma once

#include <cstdint>
#include <string>
#include <string_view>

#include "core/base/result.hpp"

namespace heatledger::page {

/// Appends JSON to a string that the caller owns; commas are set by the writer, nesting is the caller's duty.
class JsonText {
 public:
  explicit JsonText(std::string& out) : out_(out) {}

  JsonText& open_object();
  JsonText& close_object();
  JsonText& open_array();
  JsonText& close_array();
  /// `name` is a plain word of ours: letters, digits and '_' only; it is not escaped.
  JsonText& key(std::string_view name);
  /// Escapes what JSON demands; bytes that are no UTF-8 become U+FFFD, so that the output is always valid.
  JsonText& string(std::string_view text);
  JsonText& number(double value);  ///< machine_number with 10 significant digits
  JsonText& integer(std::int64_t value);
  JsonText& boolean(bool value);
  JsonText& null();
  /// Text that is one JSON value already, as an id that is handed back as it came.
  JsonText& raw(std::string_view json);

 private:
  void separate();

  std::string& out_;
  bool comma_ = false;
};

/// {"code","message","where","hint"}: the one error shape.
void write_error(JsonText& json, const Error& error);

/// Bytes of the UTF-8 character that begins at `at`, 0 when there is none (overlong, surrogate, cut off,
/// stray).
/// @source The Unicode Standard 15.0, table 3-7
std::size_t utf8_length(std::string_view text, std::size_t at);

}  // namespace heatledger::page
