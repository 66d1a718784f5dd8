#include "core/molecule/formula.hpp"

#include <algorithm>
#include <array>
#include <optional>
#include <vector>

#include "core/base/text_error.hpp"
#include "core/base/utf8.hpp"
#include "core/molecule/elements.hpp"
#include "core/molecule/formula_marks.hpp"

namespace heatledger::molecule {
namespace {

constexpr std::size_t kMostLevels = 64;
constexpr double kMostAtoms = 1e9;
constexpr std::array<std::string_view, 6> kDots = {"\u00B7", "*", ".", "\u2022", "\u2219", "\u22C5"};
constexpr std::array<std::string_view, 10> kSubscripts = {"\u2080", "\u2081", "\u2082", "\u2083", "\u2084",
                                                          "\u2085", "\u2086", "\u2087", "\u2088", "\u2089"};
constexpr std::array<std::string_view, 10> kSuperscripts = {"\u2070", "\u00B9", "\u00B2", "\u00B3", "\u2074",
                                                            "\u2075", "\u2076", "\u2077", "\u2078", "\u2079"};
struct VulgarFraction {
  std::string_view text;
  double value;
};
constexpr std::array<VulgarFraction, 7> kVulgar = {{{"\u00BD", 0.5},
                                                    {"\u00BC", 0.25},
                                                    {"\u00BE", 0.75},
                                                    {"\u2153", 1.0 / 3},
                                                    {"\u2154", 2.0 / 3},
                                                    {"\u2155", 0.2},
                                                    {"\u215B", 0.125}}};

bool is_digit(char c) {
  return c >= '0' && c <= '9';
}
bool is_upper(char c) {
  return c >= 'A' && c <= 'Z';
}
bool is_lower(char c) {
  return c >= 'a' && c <= 'z';
}

/// Elements whose bare "X2+" or "X3-" is used for more than one ion: everything that is no metal.
bool is_nonmetal(int element) {
  constexpr std::array<int, 23> kNonmetals = {1,  2,  5,  6,  7,  8,  9,  10, 14, 15, 16, 17,
                                              18, 33, 34, 35, 36, 52, 53, 54, 85, 86, 117};
  for (const int other : kNonmetals) {
    if (other == element) return true;
  }
  return false;
}

/// What stands just before a count: decides what a digit before a sign means.
struct Before {
  std::size_t start = 0;  ///< offset of the symbol or of the opening bracket
  int element = 0;        ///< 0 after a bracket
  char bracket = 0;       ///< opening bracket, 0 after a symbol
};

class FormulaReader {
 public:
  explicit FormulaReader(std::string_view text) : text_(text), end_(text.size()) {
    while (const std::size_t blank = utf8::blank_before(text_, end_)) end_ -= blank;
    start_ = at_ = std::min(utf8::skip_blanks(text_, 0), end_);
  }

  FormulaMarks& marks() { return marks_; }

  Result<Composition> read() {
    if (at_ >= end_)
      return error("formula.empty", "There is no formula here.", at_, "Write a formula such as C2H5OH.");
    if (is_digit(text_[at_])) {
      return error("formula.leading_number", "A formula does not begin with a number.", at_,
                   "Put a blank between a coefficient and its formula.");
    }
    levels_.push_back({});
    for (;;) {
      const std::optional<Error> failed = read_part();
      if (failed) return *failed;
      if (at_ >= end_) break;
      const std::size_t dot = dot_at(utf8::skip_blanks(text_, at_));
      if (dot == 0) return unexpected();
      marks_.dots.push_back(utf8::skip_blanks(text_, at_));
      at_ = utf8::skip_blanks(text_, at_) + dot;
      at_ = utf8::skip_blanks(text_, at_);
      const std::optional<Error> bad_number = read_part_coefficient();
      if (bad_number) return *bad_number;
    }
    result_.charge = charge_;
    return result_;
  }

 private:
  struct Level {
    std::map<int, double> atoms;
    std::size_t open = 0;
    char bracket = 0;
  };

  static Error error(const char* code, std::string message, std::size_t offset, std::string hint) {
    return error_at(code, std::move(message), offset, std::move(hint));
  }

  std::string shown_at(std::size_t at) const {
    const std::size_t bytes = std::max<std::size_t>(1, utf8::code_point_at(text_, at).bytes);
    return std::string(text_.substr(at, bytes));
  }

  Error unexpected() const {
    return error(
        "formula.unexpected", "A formula cannot hold \"" + shown_at(at_) + "\" here.", at_,
        "A formula is element symbols with counts, brackets, a dot for a hydrate and a charge at the end.");
  }

  bool starts(std::size_t at, std::string_view word) const {
    return text_.compare(at, word.size(), word) == 0;
  }

  std::size_t dot_at(std::size_t at) const {
    for (const std::string_view dot : kDots) {
      if (at < end_ && starts(at, dot)) return dot.size();
    }
    return 0;
  }

  /// Digit of one of the raised or lowered rows at `at`; bytes 0 when there is none.
  std::pair<int, std::size_t> digit_of(const std::array<std::string_view, 10>& row, std::size_t at) const {
    if (at < end_ && static_cast<unsigned char>(text_[at]) >= 0x80) {
      for (int digit = 0; digit < 10; ++digit) {
        const std::string_view word = row[static_cast<std::size_t>(digit)];
        if (starts(at, word)) return {digit, word.size()};
      }
    }
    return {0, 0};
  }

  /// +1, -1 and the bytes of a sign on the line; 0 when there is none.
  std::pair<int, std::size_t> sign_at(std::size_t at) const {
    if (at >= end_) return {0, 0};
    if (text_[at] == '+') return {1, 1};
    if (text_[at] == '-') return {-1, 1};
    if (starts(at, "\u2212") || starts(at, "\u2013")) return {-1, 3};
    return {0, 0};
  }
  std::pair<int, std::size_t> raised_sign_at(std::size_t at) const {
    if (at < end_ && starts(at, "\u207A")) return {1, 3};
    if (at < end_ && starts(at, "\u207B")) return {-1, 3};
    return {0, 0};
  }

  std::optional<Error> read_part_coefficient() {
    part_ = 1;
    const std::size_t begin = at_;
    double whole = 0;
    std::size_t digits = 0;
    while (at_ < end_ && is_digit(text_[at_])) whole = whole * 10 + (text_[at_++] - '0'), ++digits;
    if (digits > 0 && at_ + 1 < end_ && text_[at_] == '.' && is_digit(text_[at_ + 1])) {
      double place = 1;
      double decimals = 0;
      for (++at_; at_ < end_ && is_digit(text_[at_]); ++at_)
        decimals = decimals * 10 + (text_[at_] - '0'), place *= 10;
      if (place > 1e9)
        return error("formula.too_large", "This number has too many decimals.", begin,
                     "Use up to nine decimals.");
      whole += decimals / place;
    } else if (digits > 0 && at_ + 1 < end_ && text_[at_] == '/' && is_digit(text_[at_ + 1])) {
      double below = 0;
      for (++at_; at_ < end_ && is_digit(text_[at_]); ++at_) below = below * 10 + (text_[at_] - '0');
      if (below == 0)
        return error("formula.zero_count", "A fraction cannot have zero below the line.", begin,
                     "Write the fraction again.");
      whole /= below;
    } else {
      for (const VulgarFraction& fraction : kVulgar) {
        if (at_ < end_ && starts(at_, fraction.text)) {
          whole += fraction.value;
          at_ += fraction.text.size();
          ++digits;
          break;
        }
      }
    }
    if (digits > 0) {
      if (whole == 0)
        return error("formula.zero_count", "A count cannot be zero.", begin,
                     "Leave the part out, or write its number.");
      if (!(whole <= kMostAtoms)) return too_large(begin);
      part_ = whole;
      at_ = std::min(utf8::skip_blanks(text_, at_), end_);
    }
    return std::nullopt;
  }

  static Error too_large(std::size_t at) {
    return error("formula.too_large", "This count is too large for a formula.", at,
                 "Counts reach to a thousand million atoms.");
  }

  /// One part between dots, and the charge when it is the last.
  std::optional<Error> read_part() {
    bool any = false;
    while (at_ < end_) {
      const char c = text_[at_];
      std::optional<Error> failed;
      if (is_upper(c) || is_isotope_start()) {
        failed = read_element();
      } else if (c == '(' || c == '[' || c == '{') {
        if (levels_.size() > kMostLevels) {
          return error("formula.too_deep", "Brackets are nested too deeply.", at_,
                       "Formulas may nest 64 brackets.");
        }
        levels_.push_back({{}, at_, c});
        ++at_;
      } else if (c == ')' || c == ']' || c == '}') {
        failed = close_bracket();
      } else if (is_digit(c) && levels_.back().bracket == '[' && at_ == levels_.back().open + 1) {
        const std::size_t begin = at_;
        int mass = 0;
        while (at_ < end_ && is_digit(text_[at_])) mass = std::min(mass * 10 + (text_[at_++] - '0'), 1000);
        if (at_ >= end_ || !is_upper(text_[at_])) return unexpected();
        failed = read_symbol(begin, mass);
      } else if (levels_.size() == 1 && any && charge_begins()) {
        failed = read_charge();
        if (!failed && at_ < end_) failed = unexpected();
      } else if (is_lower(c)) {
        return error("formula.unknown_element", "No element symbol begins with \"" + shown_at(at_) + "\".",
                     at_, "Element symbols begin with a capital letter.");
      } else {
        break;
      }
      if (failed) return failed;
      any = true;
    }
    if (levels_.size() > 1) {
      if (at_ < end_) return unexpected();
      return error("formula.unclosed_bracket", "This bracket is never closed.", levels_.back().open,
                   "Add the closing bracket.");
    }
    if (!any) {
      if (at_ < end_ && dot_at(at_) == 0) return unexpected();
      return error("formula.empty_part", "A part of the formula is missing beside the dot.", at_,
                   "Write a formula on both sides of the dot.");
    }
    for (const auto& [key, count] : levels_.front().atoms) {
      double& total = result_.atoms[key];
      total += count * part_;
      if (!(total <= kMostAtoms)) return too_large(start_);
    }
    levels_.front().atoms.clear();
    return std::nullopt;
  }

  /// Raised digits before a capital: a named isotope.
  bool is_isotope_start() const {
    std::size_t at = at_, digits = 0;
    for (;; ++digits) {
      const std::size_t bytes = digit_of(kSuperscripts, at).second;
      if (bytes == 0) break;
      at += bytes;
    }
    return digits > 0 && digits <= 3 && at < end_ && is_upper(text_[at]);
  }

  std::optional<Error> read_element() {
    const std::size_t begin = at_;
    int mass = 0;
    for (auto [digit, bytes] = digit_of(kSuperscripts, at_); bytes > 0;) {
      mass = mass * 10 + digit;
      at_ += bytes;
      const auto next = digit_of(kSuperscripts, at_);
      digit = next.first, bytes = next.second;
    }
    return read_symbol(begin, mass);
  }

  std::optional<Error> read_symbol(std::size_t begin, int mass) {
    std::optional<int> element;
    std::size_t length = 0;
    if (at_ + 1 < end_ && is_lower(text_[at_ + 1])) {
      element = atomic_number(text_.substr(at_, 2));
      length = 2;
    } else {
      length = 1;
      const char c = text_[at_];
      if ((c == 'D' || c == 'T') && mass == 0) {
        element = 1;
        mass = c == 'D' ? 2 : 3;
      } else {
        element = atomic_number(text_.substr(at_, 1));
      }
    }
    if (!element || *element == 0) {
      const bool two = at_ + 1 < end_ && is_lower(text_[at_ + 1]);
      return error("formula.unknown_element",
                   "There is no element \"" + std::string(text_.substr(at_, two ? 2 : 1)) + "\".", at_,
                   "Use element symbols; groups such as Ph or Et are written out, C6H5 or C2H5.");
    }
    if (mass != 0 && (mass < *element || mass > 3 * *element + 4 || mass > 300)) {
      return error("formula.bad_isotope",
                   "This element has no isotope of mass number " + std::to_string(mass) + ".", begin,
                   "Write the mass number in front of the symbol: [13C].");
    }
    at_ += length;
    double count = 1;
    if (std::optional<Error> failed = read_count({begin, *element, 0}, count)) return failed;
    levels_.back().atoms[*element + 1000 * mass] += count;
    return std::nullopt;
  }

  std::optional<Error> close_bracket() {
    const char c = text_[at_];
    const char opener = c == ')' ? '(' : c == ']' ? '[' : '{';
    if (levels_.size() == 1) {
      return error("formula.stray_bracket", "This bracket closes nothing.", at_,
                   "Remove it, or add the opening bracket.");
    }
    if (levels_.back().bracket != opener) {
      return error("formula.stray_bracket", "This bracket does not match the one that was opened.", at_,
                   std::string("The open one is \"") + levels_.back().bracket + "\".");
    }
    if (levels_.back().atoms.empty()) {
      return error("formula.empty_bracket", "There is nothing between these brackets.", levels_.back().open,
                   "Remove them, or write the group.");
    }
    const Level group = std::move(levels_.back());
    levels_.pop_back();
    ++at_;
    double count = 1;
    if (std::optional<Error> failed = read_count({group.open, 0, group.bracket}, count)) return failed;
    for (const auto& [key, atoms] : group.atoms) {
      double& total = levels_.back().atoms[key];
      total += atoms * count;
      if (!(total <= kMostAtoms)) return too_large(group.open);
    }
    return std::nullopt;
  }

  /// True when from `at` only signs follow until the end of the text.
  bool only_signs_from(std::size_t at) const {
    std::size_t signs = 0;
    for (std::size_t bytes = sign_at(at).second; bytes > 0; bytes = sign_at(at).second) at += bytes, ++signs;
    return signs > 0 && at == end_;
  }

  std::optional<Error> read_count(const Before& before, double& count) {
    const std::size_t begin = at_;
    if (before.bracket == '[' && at_ < end_ && is_digit(text_[begin]) && levels_.size() == 1 &&
        before.start == start_) {
      std::size_t at = at_;
      while (at < end_ && is_digit(text_[at])) ++at;
      if (only_signs_from(at)) return std::nullopt;  // the digits belong to the charge: "[Fe(CN)6]3-"
    }
    double value = 0;
    std::size_t digits = 0;
    if (at_ < end_ && is_digit(text_[at_])) {
      while (at_ < end_ && is_digit(text_[at_])) value = value * 10 + (text_[at_++] - '0'), ++digits;
      if (value == 0 && digits == 1 && at_ + 1 < end_ && text_[at_] == '.' && is_digit(text_[at_ + 1])) {
        double place = 1;
        for (++at_; at_ < end_ && is_digit(text_[at_]); ++at_)
          value = value * 10 + (text_[at_] - '0'), place *= 10;
        if (place > 1e9)
          return error("formula.too_large", "This number has too many decimals.", begin,
                       "Use up to nine decimals.");
        value /= place;
      } else if (before.bracket != 0 && at_ + 1 < end_ && text_[at_] == '/' && is_digit(text_[at_ + 1])) {
        double below = 0;
        for (++at_; at_ < end_ && is_digit(text_[at_]); ++at_) below = below * 10 + (text_[at_] - '0');
        value = below == 0 ? 0 : value / below;
      } else if (levels_.size() == 1 && only_signs_from(at_)) {
        return split_charge(before, begin, digits, count);
      }
    } else {
      for (auto [digit, bytes] = digit_of(kSubscripts, at_); bytes > 0;) {
        value = value * 10 + digit;
        ++digits;
        at_ += bytes;
        const auto next = digit_of(kSubscripts, at_);
        digit = next.first, bytes = next.second;
      }
    }
    if (digits == 0) return std::nullopt;
    return take_count(value, begin, count);
  }

  std::optional<Error> take_count(double value, std::size_t begin, double& count) {
    if (value == 0)
      return error("formula.zero_count", "A count cannot be zero.", begin,
                   "Leave the element out, or write its number.");
    if (!(value <= kMostAtoms)) return too_large(begin);
    count = value;
    marks_.counts.emplace_back(begin, at_);
    return std::nullopt;
  }

  /// Digits [begin, at_) stand between an atom or group and a final sign: how many of them are the count?
  std::optional<Error> split_charge(const Before& before, std::size_t begin, std::size_t digits,
                                    double& count) {
    const auto [sign, bytes] = sign_at(at_);
    const bool one_sign = at_ + bytes == end_;
    const bool whole = before.start == start_ && result_.atoms.empty();
    const int first = text_[begin] - '0';
    const int second = digits == 2 ? text_[begin + 1] - '0' : 0;
    const bool second_is_charge = second >= 2 && second <= 4 && first >= 2;
    if (one_sign && whole && before.bracket == 0 && digits == 1 && first > 0 && sign > 0 &&
        !is_nonmetal(before.element)) {
      at_ = begin;  // "Fe3+": a metal alone, the digit is its charge
      return std::nullopt;
    }
    if (one_sign && digits == 2 && before.element == 8 && sign < 0 && second_is_charge && !whole) {
      at_ = begin + 1;  // "SO42-": no oxyanion holds 42 oxygen atoms
      return take_count(first, begin, count);
    }
    if (one_sign && ((whole && digits <= 2) || (digits == 2 && second_is_charge))) {
      const std::string base(text_.substr(start_, begin - start_));
      const std::string mark = sign > 0 ? "+" : "-";
      const std::string number(text_.substr(begin, digits));
      const std::string other = digits == 1 ? base + "^" + number + mark
                                            : base + number.substr(0, 1) + "^" + number.substr(1) + mark;
      return error("formula.ambiguous_charge", "The number before the sign can be a count or a charge.",
                   begin, "Write " + base + number + "^" + mark + " or " + other + ".");
    }
    double value = 0;
    for (std::size_t i = begin; i < at_; ++i) value = value * 10 + (text_[i] - '0');
    return take_count(value, begin, count);
  }

  bool charge_begins() const {
    if (text_[at_] == '^' || sign_at(at_).second > 0 || raised_sign_at(at_).second > 0) return true;
    if (digit_of(kSuperscripts, at_).second > 0) return true;
    if (is_digit(text_[at_])) return true;  // left by read_count for the charge
    const std::size_t next = utf8::skip_blanks(text_, at_);
    return next > at_ && dot_at(next) == 0;
  }

  /// "^2-", "^-2", "^{2-}", "²⁻", "2-", " 2-", "-2", "+++"; raised and plain rows may not be mixed.
  std::optional<Error> read_charge() {
    marks_.charge = at_;
    at_ = std::min(utf8::skip_blanks(text_, at_), end_);
    const std::size_t begin = at_;
    bool braced = false;
    if (text_[at_] == '^') {
      ++at_;
      if (at_ < end_ && text_[at_] == '{') braced = true, ++at_;
    }
    const bool raised = digit_of(kSuperscripts, at_).second > 0 || raised_sign_at(at_).second > 0;
    auto take_digits = [&](int& number) {
      std::size_t digits = 0;
      for (;;) {
        std::pair<int, std::size_t> digit = {0, 0};
        if (raised) {
          digit = digit_of(kSuperscripts, at_);
        } else if (at_ < end_ && is_digit(text_[at_])) {
          digit = {text_[at_] - '0', 1};
        }
        if (digit.second == 0) return digits;
        number = std::min(number * 10 + digit.first, 1000);
        at_ += digit.second;
        ++digits;
      }
    };
    int number = 0;
    std::size_t digits = take_digits(number);
    int sign = 0, signs = 0;
    for (auto next = raised ? raised_sign_at(at_) : sign_at(at_); next.second > 0;
         next = raised ? raised_sign_at(at_) : sign_at(at_)) {
      if (sign != 0 && next.first != sign) return bad_charge(begin);
      sign = next.first;
      ++signs;
      at_ += next.second;
    }
    if (digits == 0 && signs == 1) digits = take_digits(number);
    if (braced) {
      if (at_ >= end_ || text_[at_] != '}') return bad_charge(begin);
      ++at_;
    }
    if (sign == 0 || (digits > 0 && (signs > 1 || number == 0 || number > 99)) || signs > 99 || at_ < end_)
      return bad_charge(begin);
    charge_ = sign * (digits > 0 ? number : signs);
    return std::nullopt;
  }

  static Error bad_charge(std::size_t at) {
    return error("formula.bad_charge", "This is not a charge at the end of a formula.", at,
                 "Write a charge as ^2-, 2- after a blank, or + and -.");
  }

  std::string_view text_;
  std::size_t at_ = 0, start_ = 0, end_ = 0;
  std::vector<Level> levels_;
  double part_ = 1;
  int charge_ = 0;
  Composition result_;
  FormulaMarks marks_;
};

}  // namespace

Result<Composition> parse_formula(std::string_view text) {
  return FormulaReader(text).read();
}

std::optional<FormulaMarks> formula_marks(std::string_view text, int& charge) {
  FormulaReader reader(text);
  const Result<Composition> composition = reader.read();
  if (!composition) return std::nullopt;
  charge = composition->charge;
  if (reader.marks().charge == FormulaMarks::kNone) reader.marks().charge = text.size();
  return std::move(reader.marks());
}

Composition composition(const Graph& graph) {
  Composition result;
  double hydrogens = 0;
  for (const Atom& atom : graph.atoms) {
    hydrogens += atom.hydrogens;
    result.charge += atom.charge;
    if (atom.element != 0) result.atoms[atom.element + 1000 * atom.isotope] += 1;
  }
  if (hydrogens > 0) result.atoms[1] += hydrogens;
  return result;
}

double molar_mass(const Composition& composition) {
  double mass = 0;
  for (const auto& [key, count] : composition.atoms) {
    mass += count * (key >= 1000 ? isotope_mass(key % 1000, key / 1000) : atomic_mass(key));
  }
  return mass;
}

}  // namespace heatledger::molecule
