#include "core/page/json_text.hpp"

#include "core/base/number_text.hpp"

namespace heatledger::page {

void JsonText::separate() {
  if (comma_) out_ += ',';
  comma_ = true;
}

JsonText& JsonText::open_object() {
  separate();
  out_ += '{';
  comma_ = false;
  return *this;
}

JsonText& JsonText::close_object() {
  out_ += '}';
  comma_ = true;
  return *this;
}

JsonText& JsonText::open_array() {
  separate();
  out_ += '[';
  comma_ = false;
  return *this;
}

JsonText& JsonText::close_array() {
  out_ += ']';
  comma_ = true;
  return *this;
}

JsonText& JsonText::key(std::string_view name) {
  separate();
  out_ += '"';
  out_ += name;
  out_ += "\":";
  comma_ = false;
  return *this;
}

JsonText& JsonText::string(std::string_view text) {
  separate();
  out_ += '"';
  std::size_t plain_from = 0;
  for (std::size_t at = 0; at < text.size();) {
    const auto byte = static_cast<unsigned char>(text[at]);
    if (byte >= 0x20 && byte < 0x80 && byte != '"' && byte != '\\') {
      ++at;
      continue;
    }
    const std::size_t length = byte >= 0x80 ? utf8_length(text, at) : 0;
    if (length != 0) {
      at += length;
      continue;
    }
    out_.append(text, plain_from, at - plain_from);
    if (byte == '"' || byte == '\\') {
      out_ += '\\';
      out_ += text[at];
    } else if (byte == '\n') {
      out_ += "\\n";
    } else if (byte == '\t') {
      out_ += "\\t";
    } else if (byte < 0x20) {
      constexpr std::string_view kHex = "0123456789abcdef";
      out_ += "\\u00";
      out_ += kHex[byte >> 4];
      out_ += kHex[byte & 15];
    } else {
      out_ += "\uFFFD";
    }
    plain_from = ++at;
  }
  out_.append(text, plain_from, text.size() - plain_from);
  out_ += '"';
  return *this;
}

JsonText& JsonText::number(double value) {
  separate();
  append_machine_number(out_, value);
  return *this;
}

JsonText& JsonText::integer(std::int64_t value) {
  separate();
  out_ += std::to_string(value);
  return *this;
}

JsonText& JsonText::boolean(bool value) {
  separate();
  out_ += value ? "true" : "false";
  return *this;
}

JsonText& JsonText::null() {
  separate();
  out_ += "null";
  return *this;
}

JsonText& JsonText::raw(std::string_view json) {
  separate();
  out_ += json;
  return *this;
}

void write_error(JsonText& json, const Error& error) {
  json.open_object();
  json.key("code").string(error.code).key("message").string(error.message);
  json.key("where").string(error.where).key("hint").string(error.hint);
  json.close_object();
}

std::size_t utf8_length(std::string_view text, std::size_t at) {
  const auto byte = [&](std::size_t i) { return i < text.size() ? static_cast<unsigned char>(text[i]) : 0u; };
  const auto follows = [&](std::size_t i, unsigned low = 0x80, unsigned high = 0xBF) {
    return byte(i) >= low && byte(i) <= high;
  };
  const unsigned first = byte(at);
  if (at >= text.size()) return 0;
  if (first < 0x80) return 1;
  if (first >= 0xC2 && first <= 0xDF) return follows(at + 1) ? 2 : 0;
  if (first >= 0xE0 && first <= 0xEF) {
    const unsigned low = first == 0xE0 ? 0xA0u : 0x80u;
    const unsigned high = first == 0xED ? 0x9Fu : 0xBFu;
    return follows(at + 1, low, high) && follows(at + 2) ? 3 : 0;
  }
  if (first >= 0xF0 && first <= 0xF4) {
    const unsigned low = first == 0xF0 ? 0x90u : 0x80u;
    const unsigned high = first == 0xF4 ? 0x8Fu : 0xBFu;
    return follows(at + 1, low, high) && follows(at + 2) && follows(at + 3) ? 4 : 0;
  }
  return 0;
}

}  // namespace heatledger::page
