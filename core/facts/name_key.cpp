#include "core/facts/name_key.hpp"

#include <array>

namespace heatledger::facts {

namespace {

/// One code point from the front of UTF-8 text; a malformed byte counts as itself, so that no input is lost.
char32_t take_code_point(std::string_view& text) {
  const auto byte = [&](std::size_t i) { return static_cast<unsigned char>(text[i]); };
  const unsigned char first = byte(0);
  const std::size_t length = first < 0x80       ? 1
                             : first >> 5 == 6  ? 2
                             : first >> 4 == 14 ? 3
                             : first >> 3 == 30 ? 4
                                                : 1;
  if (length == 1 || length > text.size()) {
    text.remove_prefix(1);
    return first;
  }
  char32_t value = first & (0xffu >> (length + 1));
  for (std::size_t i = 1; i < length; ++i) value = (value << 6) | (byte(i) & 0x3fu);
  text.remove_prefix(length);
  return value;
}

constexpr std::array<std::string_view, 25> kGreek = {
    "alpha", "beta",   "gamma",   "delta", "epsilon", "zeta",    "eta",  "theta", "iota",
    "kappa", "lambda", "mu",      "nu",    "xi",      "omicron", "pi",   "rho",   "sigma",
    "sigma", "tau",    "upsilon", "phi",   "chi",     "psi",     "omega"};

/// Latin letters with marks, U+00C0 to U+00FF, as plain lower case; '-' where there is no letter.
constexpr std::string_view kLatin1 = "aaaaaaaceeeeiiiidnooooo-ouuuuytsaaaaaaaceeeeiiiidnooooo-ouuuuyty";

bool is_filler(char32_t c) {
  switch (c) {
    case ' ':
    case '\t':
    case '-':
    case ',':
    case '\'':
    case '"':
    case '(':
    case ')':
    case '[':
    case ']':
    case '{':
    case '}':
    case '.':
    case '_':
    case '`':
    case 0xa0:
    case 0xb4:
    case 0xb7:
      return true;
    default:
      return (c >= 0x2000 && c <= 0x2027) || (c >= 0x202f && c <= 0x2037) || c == 0x2212 || c == 0xfeff;
  }
}

/// Spellings of one word in British and American use; the first is replaced by the second.
struct Spelling {
  std::string_view from, to;
};
constexpr Spelling kSpellings[] = {{"sulph", "sulf"}, {"aluminium", "aluminum"}, {"caesium", "cesium"}};

}  // namespace

std::size_t append_name_key(std::string_view text, std::string& out) {
  const std::size_t start = out.size();
  while (!text.empty()) {
    const char32_t c = take_code_point(text);
    if (c >= 'A' && c <= 'Z') {
      out += static_cast<char>(c - 'A' + 'a');
    } else if (is_filler(c)) {
      continue;
    } else if (c < 0x80) {
      if (c > ' ' && c != 0x7f) out += static_cast<char>(c);
    } else if (c >= 0xc0 && c <= 0xff) {
      if (const char letter = kLatin1[c - 0xc0]; letter != '-') out += letter;
    } else if (c >= 0x3b1 && c <= 0x3c9) {
      out += kGreek[c - 0x3b1];
    } else if (c >= 0x391 && c <= 0x3a9) {
      out += kGreek[c - 0x391];
    } else if (c == 0xb5) {
      out += "mu";
    } else if (c >= 0x2080 && c <= 0x2089) {
      out += static_cast<char>('0' + (c - 0x2080));
    } else {
      out += '?';  // keeps names with letters outside this alphabet apart from those without
    }
  }
  for (const Spelling& spelling : kSpellings) {
    for (std::size_t at = start; (at = out.find(spelling.from, at)) != std::string::npos;
         at += spelling.to.size()) {
      out.replace(at, spelling.from.size(), spelling.to);
    }
  }
  return out.size() - start;
}

std::string name_key(std::string_view text) {
  std::string key;
  append_name_key(text, key);
  return key;
}

std::uint64_t key_hash(std::string_view key) {
  std::uint64_t hash = 0xcbf29ce484222325ULL;
  for (const char c : key) {
    hash ^= static_cast<unsigned char>(c);
    hash *= 0x100000001b3ULL;
  }
  return hash ^ (hash >> 32);
}

}  // namespace heatledger::facts
