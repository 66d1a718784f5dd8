#include "core/page/json_line.hpp"

#include <set>
#include <utility>

#include "core/base/utf8.hpp"
#include "core/page/json_text.hpp"

namespace heatledger::page {
namespace {

constexpr int kDeepest = 64;

bool is_digit(char c) {
  return c >= '0' && c <= '9';
}

/// One pass over the line; the first thing that is wrong stops it and stands in `error`.
class Reader {
 public:
  Reader(std::string_view line, LineQuestion& question) : line_(line), question_(question) {}

  Status read() {
    blanks();
    if (peek() != '{') {
      value(0);
      if (!failed_) return Error{"bulk.not_an_object", "The line is not a JSON object.", "offset 0", kShape};
      return error_;
    }
    object_of_question();
    blanks();
    if (!failed_ && at_ != line_.size()) fail("bulk.not_json", "Something follows the end of the object.");
    if (failed_ || doubtful_) return error_;
    return success();
  }

 private:
  static constexpr const char* kShape = "Write {\"id\": 1, \"equation\": \"H2 + Cl2 -> 2 HCl\"} on one line.";

  char peek() const { return at_ < line_.size() ? line_[at_] : '\0'; }
  void blanks() {
    while (at_ < line_.size() &&
           (line_[at_] == ' ' || line_[at_] == '\t' || line_[at_] == '\r' || line_[at_] == '\n'))
      ++at_;
  }
  /// The line cannot be read on from here.
  void fail(const char* code, std::string message, const char* hint = kShape) {
    if (failed_) return;
    doubtful_ = false;  // broken JSON is told before anything that was odd further left
    object(code, std::move(message), hint);
    failed_ = true;
  }
  /// The line is JSON, but not a question; reading goes on, so that the id is still found. The first
  /// objection counts.
  void object(const char* code, std::string message, const char* hint = kShape) {
    if (doubtful_) return;
    doubtful_ = true;
    error_ = {code, std::move(message), "offset " + std::to_string(at_), hint};
  }
  void expect(char c) {
    blanks();
    if (failed_) return;
    if (peek() != c || at_ >= line_.size()) {
      fail("bulk.not_json", std::string("The JSON breaks off: '") + c + "' expected.");
      return;
    }
    ++at_;
  }

  unsigned hex4() {
    unsigned code = 0;
    for (int i = 0; i < 4; ++i, ++at_) {
      const char c = peek();
      unsigned digit = 0;
      if (is_digit(c)) {
        digit = static_cast<unsigned>(c - '0');
      } else if (c >= 'a' && c <= 'f') {
        digit = static_cast<unsigned>(c - 'a') + 10;
      } else if (c >= 'A' && c <= 'F') {
        digit = static_cast<unsigned>(c - 'A') + 10;
      } else {
        fail("bulk.not_json", "\\u is not followed by four hexadecimal digits.");
        return 0;
      }
      code = code << 4 | digit;
    }
    return code;
  }

  void escape(std::string& out) {
    ++at_;  // the backslash
    const char c = peek();
    ++at_;
    switch (c) {
      case '"':
      case '\\':
      case '/':
        out += c;
        return;
      case 'b':
        out += '\b';
        return;
      case 'f':
        out += '\f';
        return;
      case 'n':
        out += '\n';
        return;
      case 'r':
        out += '\r';
        return;
      case 't':
        out += '\t';
        return;
      case 'u':
        break;
      default:
        --at_;
        fail("bulk.not_json", "A backslash is followed by something that JSON does not know.");
        return;
    }
    unsigned code = hex4();
    if (failed_) return;
    if (code >= 0xD800 && code < 0xDC00) {
      if (line_.substr(at_, 2) != "\\u")
        return fail("bulk.not_json", "Half of a surrogate pair stands alone.");
      at_ += 2;
      const unsigned low = hex4();
      if (failed_) return;
      if (low < 0xDC00 || low > 0xDFFF)
        return fail("bulk.not_json", "Half of a surrogate pair stands alone.");
      code = 0x10000 + ((code - 0xD800) << 10) + (low - 0xDC00);
    } else if (code >= 0xDC00 && code < 0xE000) {
      return fail("bulk.not_json", "Half of a surrogate pair stands alone.");
    }
    utf8::append(out, code);
  }

  /// A string: points into the line when it holds no escape, else into `memory`.
  std::string_view text(std::string& memory) {
    expect('"');
    if (failed_) return {};
    const std::size_t begin = at_;
    bool escaped = false;
    std::size_t copied = begin;
    while (!failed_) {
      if (at_ >= line_.size()) {
        fail("bulk.not_json", "A text has no closing quote.");
        break;
      }
      const auto byte = static_cast<unsigned char>(line_[at_]);
      if (byte == '"') break;
      if (byte == '\\') {
        if (!escaped) memory.clear();
        escaped = true;
        memory.append(line_, copied, at_ - copied);
        escape(memory);
        copied = at_;
      } else if (byte < 0x20) {
        fail("bulk.not_json", "A control character stands in a text.");
      } else if (byte < 0x80) {
        ++at_;
      } else {
        const std::size_t length = utf8_length(line_, at_);
        if (length == 0) fail("bulk.not_json", "The line is not valid UTF-8.", "Save the file as UTF-8.");
        at_ += length;
      }
    }
    if (failed_) return {};
    const std::size_t end = at_++;
    if (!escaped) return line_.substr(begin, end - begin);
    memory.append(line_, copied, end - copied);
    return memory;
  }

  void word(std::string_view expected) {
    if (line_.substr(at_, expected.size()) != expected) return fail("bulk.not_json", "A value is not JSON.");
    at_ += expected.size();
  }

  void number() {
    if (peek() == '-') ++at_;
    if (peek() == '0') {
      ++at_;
    } else if (is_digit(peek())) {
      while (is_digit(peek())) ++at_;
    } else {
      return fail("bulk.not_json", "A value is not JSON.");
    }
    if (peek() == '.') {
      ++at_;
      if (!is_digit(peek())) return fail("bulk.not_json", "A number ends with its decimal point.");
      while (is_digit(peek())) ++at_;
    }
    if (peek() == 'e' || peek() == 'E') {
      ++at_;
      if (peek() == '+' || peek() == '-') ++at_;
      if (!is_digit(peek())) return fail("bulk.not_json", "A number has no digits in its exponent.");
      while (is_digit(peek())) ++at_;
    }
  }

  /// Any value, checked and passed over.
  void value(int depth) {
    blanks();
    if (depth > kDeepest) return fail("bulk.too_deep", "Values are nested more than 64 deep.");
    switch (peek()) {
      case '"':
        text(passed_over_);
        return;
      case '{':
        container('}', depth, true);
        return;
      case '[':
        container(']', depth, false);
        return;
      case 't':
        word("true");
        return;
      case 'f':
        word("false");
        return;
      case 'n':
        word("null");
        return;
      default:
        number();
        return;
    }
  }

  void container(char close, int depth, bool with_keys) {
    ++at_;
    blanks();
    if (peek() == close) {
      ++at_;
      return;
    }
    while (!failed_) {
      if (with_keys) {
        text(passed_over_);
        expect(':');
      }
      if (!failed_) value(depth + 1);
      blanks();
      if (failed_) return;
      if (peek() != ',') return expect(close);
      ++at_;
    }
  }

  void known_text(std::optional<std::string_view>& slot, std::string& memory, std::string_view name) {
    blanks();
    if (peek() != '"') {
      object("bulk.wrong_type", "\"" + std::string(name) + "\" is not a text.");
      return value(1);
    }
    slot = text(memory);
  }

  void known_flag() {
    blanks();
    if (peek() == 't') {
      word("true");
      question_.estimate_only = true;
    } else if (peek() == 'f') {
      word("false");
    } else {
      object("bulk.wrong_type", "\"estimate_only\" is neither true nor false.");
      value(1);
    }
  }

  void identity() {
    blanks();
    const std::size_t begin = at_;
    const bool plain = peek() != '{' && peek() != '[';
    if (!plain) object("bulk.wrong_type", "\"id\" is neither a text nor a number.");
    value(1);
    if (!failed_ && plain) question_.id = line_.substr(begin, at_ - begin);
  }

  void object_of_question() {
    enum Seen : unsigned { kId = 1, kEquation = 2, kSpecies = 4, kSmiles = 8, kEstimate = 16 };
    unsigned seen = 0;
    ++at_;
    blanks();
    if (peek() == '}') {
      ++at_;
      return;
    }
    while (!failed_) {
      blanks();
      const std::size_t key_at = at_;
      const std::string_view key = text(key_);
      if (failed_) return;
      const unsigned bit = key == "id"              ? kId
                           : key == "equation"      ? kEquation
                           : key == "species"       ? kSpecies
                           : key == "smiles"        ? kSmiles
                           : key == "estimate_only" ? kEstimate
                                                    : 0u;
      const bool twice = bit != 0 ? (seen & bit) != 0 : seen_before(key);
      if (twice) {
        const std::size_t behind = std::exchange(at_, key_at);
        object("bulk.duplicate_key", "The key \"" + std::string(key) + "\" stands twice on the line.",
               "Keep one of the two.");
        at_ = behind;
      }
      seen |= bit;
      expect(':');
      if (failed_) return;
      switch (bit) {
        case kId:
          identity();
          break;
        case kEquation:
          known_text(question_.equation, question_.equation_text, "equation");
          break;
        case kSpecies:
          known_text(question_.species, question_.species_text, "species");
          break;
        case kSmiles:
          known_text(question_.smiles, question_.smiles_text, "smiles");
          break;
        case kEstimate:
          known_flag();
          break;
        default:
          if (question_.first_unknown.empty()) question_.first_unknown = key;
          value(1);
      }
      blanks();
      if (failed_) return;
      if (peek() != ',') return expect('}');
      ++at_;
    }
  }

  bool seen_before(std::string_view key) { return !others_.emplace(key).second; }

  std::string_view line_;
  LineQuestion& question_;
  std::size_t at_ = 0;
  bool failed_ = false, doubtful_ = false;
  Error error_;
  std::string key_, passed_over_;
  std::set<std::string> others_;  ///< keys that mean nothing here, for finding one that stands twice
};

}  // namespace

void LineQuestion::clear() {
  id = {};
  equation.reset();
  species.reset();
  smiles.reset();
  estimate_only = false;
  first_unknown.clear();
}

Status read_question(std::string_view line, LineQuestion& question) {
  question.clear();
  return Reader(line, question).read();
}

}  // namespace heatledger::page
