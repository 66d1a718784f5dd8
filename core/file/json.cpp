#include "core/file/json.hpp"

#include <algorithm>
#include <cstdio>
#include <nlohmann/json.hpp>
#include <set>

namespace heatledger::file {
namespace {

constexpr std::size_t kDeepest = 64;

std::string place(std::string_view text, std::size_t offset) {
  const std::string_view before = text.substr(0, std::min(offset, text.size()));
  const auto line = 1 + std::count(before.begin(), before.end(), '\n');
  return "offset " + std::to_string(offset) + ", line " + std::to_string(line);
}

/// Receives the parser's events. Stops it at the first thing that is not wanted instead of building it first.
class Builder {
 public:
  using Source = nlohmann::json;

  Builder(std::string_view text, Json& root) : text_(text), root_(root) {}

  const Error& error() const { return error_; }

  bool null() { return put(Json()); }
  bool boolean(bool value) { return put(Json::boolean(value)); }
  bool number_integer(Source::number_integer_t value) { return put(Json::number(std::to_string(value))); }
  bool number_unsigned(Source::number_unsigned_t value) { return put(Json::number(std::to_string(value))); }
  bool number_float(Source::number_float_t, const Source::string_t& token) {
    return put(Json::number(token));
  }
  bool string(Source::string_t& value) { return put(Json::string(std::move(value))); }
  bool binary(Source::binary_t&) { return false; }
  bool start_object(std::size_t) { return open(Json::object()); }
  bool start_array(std::size_t) { return open(Json::array()); }
  bool end_object() { return close(); }
  bool end_array() { return close(); }

  bool key(Source::string_t& name) {
    if (!names_.back().insert(name).second) {
      error_ = {"file.duplicate_key", "The key \"" + name + "\" stands twice in the same object.", path(),
                "Remove one of the two; which of them was meant cannot be known here."};
      return false;
    }
    key_ = std::move(name);
    return true;
  }

  template <typename Exception>
  bool parse_error(std::size_t offset, const std::string&, const Exception&) {
    const std::size_t at = offset > 0 ? offset - 1 : 0;
    if (at >= text_.size()) {
      error_ = {"file.not_json", "The text ends before its last bracket is closed.",
                place(text_, text_.size()),
                "The file seems to be cut short: get it again from where it came."};
    } else {
      error_ = {"file.not_json", "This is not JSON.", place(text_, at),
                "A worksheet is a JSON text; compare the place named with a worksheet that opens."};
    }
    return false;
  }

 private:
  bool put(Json value) {
    place_value(std::move(value));
    return true;
  }

  Json* place_value(Json value) {
    if (open_.empty()) {
      root_ = std::move(value);
      return &root_;
    }
    Json& parent = *open_.back();
    if (parent.is_array()) {
      parent.items().push_back(std::move(value));
      return &parent.items().back();
    }
    parent.add(std::move(key_), std::move(value));
    return &parent.members().back().second;
  }

  bool open(Json value) {
    if (open_.size() >= kDeepest) {
      error_ = {"file.too_deep", "Brackets are nested more than 64 deep.", path(),
                "No worksheet needs that: the file is damaged or not a worksheet."};
      return false;
    }
    open_.push_back(place_value(std::move(value)));
    names_.emplace_back();
    return true;
  }

  bool close() {
    open_.pop_back();
    names_.pop_back();
    return true;
  }

  /// Field path of the innermost open bracket: "reactions[0].checker".
  std::string path() const {
    std::string out;
    for (std::size_t i = 0; i + 1 < open_.size(); ++i) {
      if (open_[i]->is_array()) {
        out += "[" + std::to_string(open_[i]->items().size() - 1) + "]";
      } else {
        out += (out.empty() ? "" : ".") + open_[i]->members().back().first;
      }
      if (out.size() > 60) return out.substr(0, 60) + "...";
    }
    return out.empty() ? "top level" : out;
  }

  std::string_view text_;
  Json& root_;
  std::vector<Json*> open_;  ///< pointers stay valid: only the innermost value of each level grows
  std::vector<std::set<std::string>> names_;  ///< keys seen in each open object
  std::string key_;
  Error error_;
};

void append_indented(std::string& out, const Json& value, std::size_t level);

void append_scalar(std::string& out, const Json& value) {
  switch (value.kind()) {
    case Json::Kind::Null:
      out += "null";
      break;
    case Json::Kind::False:
      out += "false";
      break;
    case Json::Kind::True:
      out += "true";
      break;
    case Json::Kind::Number:
      out += value.text();
      break;
    case Json::Kind::String:
      append_json_string(out, value.text());
      break;
    case Json::Kind::Array:
      out += "[]";
      break;
    case Json::Kind::Object:
      out += "{}";
      break;
  }
}

void new_line(std::string& out, std::size_t level) {
  out += '\n';
  out.append(2 * level, ' ');
}

void append_indented(std::string& out, const Json& value, std::size_t level) {
  if (value.is_object() && !value.members().empty()) {
    out += '{';
    bool first = true;
    for (const Json::Member& member : value.members()) {
      if (!first) out += ',';
      first = false;
      new_line(out, level + 1);
      append_json_string(out, member.first);
      out += ": ";
      append_indented(out, member.second, level + 1);
    }
    new_line(out, level);
    out += '}';
  } else if (value.is_array() && !value.items().empty()) {
    const bool plain = std::all_of(value.items().begin(), value.items().end(), [](const Json& item) {
      return item.kind() != Json::Kind::String && !item.is_array() && !item.is_object();
    });
    out += '[';
    bool first = true;
    for (const Json& item : value.items()) {
      if (!first) out += plain ? ", " : ",";
      first = false;
      if (!plain) new_line(out, level + 1);
      append_indented(out, item, level + 1);
    }
    if (!plain) new_line(out, level);
    out += ']';
  } else {
    append_scalar(out, value);
  }
}

/// Length of the valid UTF-8 sequence at `at`; 0 when there is none.
std::size_t utf8_length(std::string_view text, std::size_t at) {
  const auto byte = [&](std::size_t i) { return static_cast<unsigned>(static_cast<unsigned char>(text[i])); };
  const auto follows = [&](std::size_t i) { return i < text.size() && (byte(i) & 0xc0U) == 0x80U; };
  const unsigned lead = byte(at);
  if (lead < 0x80) return 1;
  if (lead >= 0xc2 && lead < 0xe0) return follows(at + 1) ? 2 : 0;
  if (lead >= 0xe0 && lead < 0xf0) {
    if (!follows(at + 1) || !follows(at + 2)) return 0;
    if (lead == 0xe0 && byte(at + 1) < 0xa0) return 0;
    if (lead == 0xed && byte(at + 1) >= 0xa0) return 0;
    return 3;
  }
  if (lead >= 0xf0 && lead < 0xf5) {
    if (!follows(at + 1) || !follows(at + 2) || !follows(at + 3)) return 0;
    if (lead == 0xf0 && byte(at + 1) < 0x90) return 0;
    if (lead == 0xf4 && byte(at + 1) >= 0x90) return 0;
    return 4;
  }
  return 0;
}

}  // namespace

const Json* Json::find(std::string_view key) const {
  for (const Member& member : members_) {
    if (member.first == key) return &member.second;
  }
  return nullptr;
}

std::string Json::string_or(std::string_view key, std::string otherwise) const {
  const Json* member = find(key);
  return member != nullptr && member->is_string() ? member->text() : std::move(otherwise);
}

Result<Json> read_json(std::string_view text) {
  Json root;
  Builder builder(text, root);
  if (!nlohmann::json::sax_parse(text.begin(), text.end(), &builder)) return builder.error();
  return root;
}

std::string write_json_text(const Json& value) {
  std::string out;
  append_indented(out, value, 0);
  return out;
}

void append_json_string(std::string& out, std::string_view text) {
  out += '"';
  std::size_t at = 0;
  while (at < text.size()) {
    const char c = text[at];
    const auto code = static_cast<unsigned char>(c);
    if (code >= 0x20 && code < 0x7f && c != '"' && c != '\\') {
      out += c;
      ++at;
    } else if (code >= 0x80) {
      const std::size_t length = utf8_length(text, at);
      if (length == 0) {
        out += "\ufffd";
        ++at;
      } else {
        out.append(text, at, length);
        at += length;
      }
    } else {
      switch (c) {
        case '"':
          out += "\\\"";
          break;
        case '\\':
          out += "\\\\";
          break;
        case '\n':
          out += "\\n";
          break;
        case '\t':
          out += "\\t";
          break;
        case '\r':
          out += "\\r";
          break;
        default: {
          char buffer[8];
          std::snprintf(buffer, sizeof buffer, "\\u%04x", static_cast<unsigned>(code));
          out += buffer;
        }
      }
      ++at;
    }
  }
  out += '"';
}

}  // namespace heatledger::file
