#include "core/units/unit.hpp"

#include <array>
#include <cmath>
#include <optional>

#include "core/base/text_error.hpp"
#include "core/base/utf8.hpp"
#include "core/units/unit_table.hpp"

namespace heatledger::units {
namespace {

constexpr std::size_t kLongestText = 200;
constexpr int kMostExponent = 9;
constexpr std::array<std::string_view, 10> kSuperscripts = {"\u2070", "\u00B9", "\u00B2", "\u00B3", "\u2074",
                                                            "\u2075", "\u2076", "\u2077", "\u2078", "\u2079"};
constexpr std::string_view kRaisedMinus = "\u207B";
constexpr std::string_view kMinus = "\u2212";

bool is_digit(char c) {
  return c >= '0' && c <= '9';
}
bool is_letter(char c) {
  return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z') || c == '_';
}

std::string raised(int exponent) {
  std::string text = exponent < 0 ? std::string(kRaisedMinus) : "";
  for (const char c : std::to_string(std::abs(exponent)))
    text += kSuperscripts[static_cast<std::size_t>(c - '0')];
  return text;
}

class UnitReader {
 public:
  explicit UnitReader(std::string_view text) : text_(text) {}

  Result<Unit> read() {
    if (text_.size() > kLongestText)
      return error_at("unit.too_long", "This is too long for a unit.", 0, "Write a unit such as kJ/mol.");
    at_ = utf8::skip_blanks(text_, 0);
    if (at_ < text_.size()) {
      if (std::optional<Error> failed = read_product(1, false)) return *failed;
    }
    if (names_ == 1 && only_ != nullptr && only_exponent_ == 1) {
      unit_.offset = only_->offset;
      unit_.dimension = only_->dimension;
    }
    unit_.text = std::string(utf8::trim(text_));
    return std::move(unit_);
  }

 private:
  bool starts(std::string_view word) const { return text_.compare(at_, word.size(), word) == 0; }

  /// Factors joined and divided until the end or a closing bracket.
  /// @param sign  1 above the line, -1 below
  std::optional<Error> read_product(int sign, bool inside) {
    int here = sign;
    bool expects_factor = true;
    std::size_t after_slash = 0;  // in the display text
    int factors_below = 0;
    auto bracket_below = [&] {
      // "J/mol K" is shown with the bracket that it means.
      if (factors_below < 2) return;
      unit_.display.insert(after_slash, "(");
      unit_.display += ')';
    };
    for (;;) {
      at_ = utf8::skip_blanks(text_, at_);
      if (at_ >= text_.size() || (inside && text_[at_] == ')')) {
        if (expects_factor)
          return error_at("unit.unexpected", "A unit is missing here.", at_, "Write a unit such as kJ/mol.");
        bracket_below();
        return std::nullopt;
      }
      if (text_[at_] == '/') {
        if (expects_factor)
          return error_at("unit.unexpected", "A unit is missing before this slash.", at_,
                          "Write 1/h or a unit in front.");
        here = -sign;
        bracket_below();
        factors_below = 0;
        unit_.display += '/';
        after_slash = unit_.display.size();
        ++at_;
        expects_factor = true;
        continue;
      }
      if (!expects_factor) {
        const std::size_t joint = joint_bytes();
        at_ = utf8::skip_blanks(text_, at_ + joint);
        unit_.display += "\u00B7";
      }
      if (std::optional<Error> failed = read_factor(here)) return failed;
      factors_below += after_slash > 0;
      expects_factor = false;
    }
  }

  std::size_t joint_bytes() const {
    if (starts("*")) return 1;
    if (starts("\u00B7") || starts("\u22C5")) return starts("\u00B7") ? 2 : 3;
    if (starts("-") && at_ + 1 < text_.size() && is_letter(text_[at_ + 1])) return 1;
    return 0;
  }

  std::optional<Error> read_factor(int sign) {
    const std::size_t begin = at_;
    if (at_ >= text_.size())
      return error_at("unit.unexpected", "A unit is missing here.", at_, "Write a unit such as kJ/mol.");
    if (text_[at_] == '(') {
      if (++depth_ > 8)
        return error_at("unit.unexpected", "Brackets are nested too deeply.", begin,
                        "Write a unit such as kJ/(kg K).");
      ++at_;
      unit_.display += '(';
      if (std::optional<Error> failed = read_product(sign, true)) return failed;
      if (at_ >= text_.size())
        return error_at("unit.unclosed_bracket", "This bracket is never closed.", begin,
                        "Add the closing bracket.");
      ++at_;
      --depth_;
      unit_.display += ')';
      return std::nullopt;
    }
    if (text_[at_] == '1' && at_ + 1 < text_.size() && utf8::skip_blanks(text_, at_ + 1) < text_.size() &&
        text_[utf8::skip_blanks(text_, at_ + 1)] == '/') {
      ++at_;
      unit_.display += '1';
      names_ += 2;  // no scale of temperature stands alone any more
      return std::nullopt;
    }
    const std::string_view rest = text_.substr(at_);
    const UnitName* name = find_unit_name(rest);
    const AmbiguousName* two = find_ambiguous_name(rest);
    if (two != nullptr && (name == nullptr || two->text.size() > name->text.size())) {
      return error_at("unit.ambiguous", "\"" + std::string(two->text) + "\" has more than one meaning.",
                      begin, std::string(two->hint));
    }
    if (name == nullptr) return unknown(begin);
    at_ += name->text.size();
    int exponent = 1;
    if (std::optional<Error> failed = read_exponent(exponent)) return failed;
    unit_.display += name->display;
    if (exponent != 1) unit_.display += raised(exponent);
    ++names_;
    only_ = name;
    only_exponent_ = exponent * sign;
    return multiply(*name, exponent * sign, begin);
  }

  std::optional<Error> read_exponent(int& exponent) {
    const std::size_t begin = at_;
    bool negative = false, any = false;
    int value = 0;
    const bool caret = at_ < text_.size() && text_[at_] == '^';
    if (caret) ++at_;
    const std::size_t sign_bytes = starts("-") ? 1 : starts(kMinus) || starts(kRaisedMinus) ? 3 : 0;
    if (sign_bytes > 0) {
      const std::size_t after = at_ + sign_bytes;
      const bool digit = after < text_.size() &&
                         (is_digit(text_[after]) || static_cast<unsigned char>(text_[after]) >= 0xC2);
      if (!digit && !caret) return std::nullopt;  // a hyphen that joins two units
      negative = true;
      at_ = after;
    }
    while (at_ < text_.size()) {
      int digit = -1;
      std::size_t bytes = 1;
      if (is_digit(text_[at_])) digit = text_[at_] - '0';
      for (int i = 0; i < 10 && digit < 0; ++i) {
        if (starts(kSuperscripts[static_cast<std::size_t>(i)]))
          digit = i, bytes = kSuperscripts[static_cast<std::size_t>(i)].size();
      }
      if (digit < 0) break;
      value = std::min(value * 10 + digit, 100);
      any = true;
      at_ += bytes;
    }
    if (!any) {
      if (caret || negative) return bad_exponent(begin);
      return std::nullopt;
    }
    if (value == 0 || value > kMostExponent) return bad_exponent(begin);
    exponent = negative ? -value : value;
    return std::nullopt;
  }

  static Error bad_exponent(std::size_t at) {
    return error_at("unit.bad_exponent", "This exponent cannot be read.", at,
                    "Write exponents as m2, m^2 or s-1, from 1 to 9.");
  }

  std::optional<Error> multiply(const UnitName& name, int exponent, std::size_t begin) {
    for (int i = 0; i < std::abs(exponent); ++i)
      unit_.factor = exponent > 0 ? unit_.factor * name.factor : unit_.factor / name.factor;
    auto grow = [&](std::int8_t& total, std::int8_t one) {
      const int sum = total + one * exponent;
      if (std::abs(sum) > 4 * kMostExponent) return false;
      total = static_cast<std::int8_t>(sum);
      return true;
    };
    Dimension& sum = unit_.dimension;
    const Dimension& one = name.dimension;
    const bool fits = grow(sum.kg, one.kg) && grow(sum.m, one.m) && grow(sum.s, one.s) &&
                      grow(sum.K, one.K) && grow(sum.mol, one.mol);
    if (!fits || !std::isfinite(unit_.factor) || unit_.factor == 0) return bad_exponent(begin);
    return std::nullopt;
  }

  Error unknown(std::size_t begin) const {
    std::size_t end = begin;
    while (end < text_.size() &&
           (is_letter(text_[end]) || is_digit(text_[end]) || static_cast<unsigned char>(text_[end]) >= 0x80))
      ++end;
    if (end == begin) end = std::min(text_.size(), begin + 1);
    const std::string_view word = text_.substr(begin, end - begin);
    std::string_view letters = word;
    while (!letters.empty() && is_digit(letters.back())) letters.remove_suffix(1);
    const std::string_view near = nearest_unit_name(letters);
    return error_at("unit.unknown", "There is no unit \"" + std::string(word) + "\" here.", begin,
                    near.empty() ? "Write a unit such as kJ/mol, kg/h, bar or °C."
                                 : "Did you mean " + std::string(near) + "?");
  }

  std::string_view text_;
  std::size_t at_ = 0;
  int depth_ = 0, names_ = 0, only_exponent_ = 0;
  const UnitName* only_ = nullptr;
  Unit unit_;
};

}  // namespace

Result<Unit> parse_unit(std::string_view text) {
  return UnitReader(text).read();
}

}  // namespace heatledger::units
