#include "core/base/utf8.hpp"

#include <array>

namespace heatledger::utf8 {
namespace {

constexpr std::array<std::string_view, 5> kWideBlanks = {"\u00A0", "\u2009", "\u2007", "\u202F", "\u3000"};

bool is_plain(char c) {
  return static_cast<unsigned char>(c) < 0x80;
}
bool is_plain_blank(char c) {
  return c == ' ' || c == '\t' || c == '\n' || c == '\r';
}

bool is_continuation(char c) {
  return (static_cast<unsigned char>(c) & 0xC0u) == 0x80u;
}

bool is_combining(std::uint32_t c) {
  return (c >= 0x0300 && c <= 0x036F) || (c >= 0x20D0 && c <= 0x20FF) || c == 0x200B || c == 0x200D ||
         c == 0xFE0F;
}

bool is_wide(std::uint32_t c) {
  return (c >= 0x1100 && c <= 0x115F) || (c >= 0x2E80 && c <= 0xA4CF) || (c >= 0xAC00 && c <= 0xD7A3) ||
         (c >= 0xF900 && c <= 0xFAFF) || (c >= 0xFE30 && c <= 0xFE6F) || (c >= 0xFF00 && c <= 0xFF60) ||
         (c >= 0xFFE0 && c <= 0xFFE6) || (c >= 0x1F300 && c <= 0x1FAFF) || (c >= 0x20000 && c <= 0x3FFFD);
}

}  // namespace

CodePoint code_point_at(std::string_view text, std::size_t at) {
  if (at >= text.size()) return {};
  const auto lead = static_cast<unsigned char>(text[at]);
  if (lead < 0x80) return {lead, 1};
  std::size_t bytes = 0;
  std::uint32_t value = 0, least = 0;
  if (lead >= 0xC2 && lead <= 0xDF) {
    bytes = 2, value = lead & 0x1Fu, least = 0x80;
  } else if (lead >= 0xE0 && lead <= 0xEF) {
    bytes = 3, value = lead & 0x0Fu, least = 0x800;
  } else if (lead >= 0xF0 && lead <= 0xF4) {
    bytes = 4, value = lead & 0x07u, least = 0x10000;
  } else {
    return {};
  }
  if (text.size() - at < bytes) return {};
  for (std::size_t i = 1; i < bytes; ++i) {
    if (!is_continuation(text[at + i])) return {};
    value = (value << 6) | (static_cast<unsigned char>(text[at + i]) & 0x3Fu);
  }
  if (value < least || value > 0x10FFFF || (value >= 0xD800 && value <= 0xDFFF)) return {};
  return {value, bytes};
}

void append(std::string& out, std::uint32_t code) {
  const auto put = [&](std::uint32_t byte) { out += static_cast<char>(byte); };
  if (code < 0x80) {
    put(code);
  } else if (code < 0x800) {
    put(0xC0 | code >> 6);
    put(0x80 | (code & 0x3F));
  } else if (code < 0x10000) {
    put(0xE0 | code >> 12);
    put(0x80 | (code >> 6 & 0x3F));
    put(0x80 | (code & 0x3F));
  } else {
    put(0xF0 | code >> 18);
    put(0x80 | (code >> 12 & 0x3F));
    put(0x80 | (code >> 6 & 0x3F));
    put(0x80 | (code & 0x3F));
  }
}

std::size_t first_malformed(std::string_view text) {
  std::size_t at = 0;
  while (at < text.size()) {
    const std::size_t bytes = code_point_at(text, at).bytes;
    if (bytes == 0) return at;
    at += bytes;
  }
  return at;
}

std::size_t blank_at(std::string_view text, std::size_t at) {
  if (at >= text.size()) return 0;
  if (is_plain(text[at])) return is_plain_blank(text[at]) ? 1 : 0;
  for (const std::string_view blank : kWideBlanks) {
    if (text.compare(at, blank.size(), blank) == 0) return blank.size();
  }
  return 0;
}

std::size_t blank_before(std::string_view text, std::size_t at) {
  if (at == 0 || at > text.size()) return 0;
  if (is_plain(text[at - 1])) return is_plain_blank(text[at - 1]) ? 1 : 0;
  for (const std::string_view blank : kWideBlanks) {
    if (at >= blank.size() && text.compare(at - blank.size(), blank.size(), blank) == 0) return blank.size();
  }
  return 0;
}

std::size_t skip_blanks(std::string_view text, std::size_t at) {
  while (const std::size_t bytes = blank_at(text, at)) at += bytes;
  return at;
}

std::string_view trim(std::string_view text) {
  text.remove_prefix(skip_blanks(text, 0));
  while (const std::size_t bytes = blank_before(text, text.size())) text.remove_suffix(bytes);
  return text;
}

std::size_t display_width(std::string_view text) {
  std::size_t width = 0, at = 0;
  while (at < text.size()) {
    const CodePoint point = code_point_at(text, at);
    if (point.bytes == 0) {
      ++width, ++at;
      continue;
    }
    if (!is_combining(point.value)) width += is_wide(point.value) ? 2 : 1;
    at += point.bytes;
  }
  return width;
}

}  // namespace heatledger::utf8
