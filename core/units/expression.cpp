#include "core/units/expression.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <limits>

#include "core/base/number_text.hpp"
#include "core/base/text_error.hpp"
#include "core/base/utf8.hpp"

namespace heatledger::units {
namespace {

using uncertainty::Part;
using uncertainty::Quantity;

constexpr int kDeepest = 32;
constexpr int kMostPower = 9;
constexpr std::array<std::string_view, 3> kPlusMinus = {"\u00B1", "+/-", "+-"};
constexpr std::array<std::string_view, 3> kTimes = {"*", "\u00D7", "\u00B7"};
constexpr std::array<std::string_view, 2> kMinus = {"-", "\u2212"};

bool is_digit(char c) {
  return c >= '0' && c <= '9';
}
bool is_letter(char c) {
  return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z');
}
bool is_name_byte(char c) {
  return is_letter(c) || is_digit(c) || c == '_';
}

std::size_t name_length(std::string_view text) {
  if (text.empty() || !is_letter(text.front())) return 0;
  std::size_t length = 1;
  while (length < text.size() && is_name_byte(text[length])) ++length;
  return length;
}

/// A figure on the way, with what keeps a point on a scale apart from a distance.
struct Term {
  Quantity value;
  Dimension dimension;
  Unit unit;
  int decimals = 0;
  bool kelvin = false;  ///< written in K: a temperature or a difference, as it is used
};

/// As a factor or behind a sign, K is a difference.
void take_as_difference(Term& term) {
  if (term.kelvin) {
    term.dimension.kind = Kind::TemperatureDifference;
    term.kelvin = false;
  }
}

std::string words_of(const Term& term) {
  return term.kelvin ? "a temperature or difference in K" : describe(term.dimension);
}

bool has_scale(const Dimension& dimension) {
  return dimension.kind == Kind::Temperature || dimension.kind == Kind::GaugePressure;
}

/// One typed ±: its cell and its place there. Bit 55 keeps it apart from typed figures of other rooms.
uncertainty::SourceKey typed_source(std::uint64_t cell, std::size_t at) {
  return uncertainty::source_key(uncertainty::SourceKind::Typed, (std::uint64_t{1} << 55) | cell << 20 | at);
}

class Reader {
 public:
  Reader(std::string_view text, const NamedFigures& names, std::uint64_t cell)
      : text_(text), names_(names), cell_(cell) {}

  Result<Term> read() {
    Result<Term> term = sum(0);
    if (!term) return term;
    skip();
    if (at_ < text_.size()) {
      if (text_[at_] == ')')
        return error_at("unit.unclosed_bracket", "This bracket was never opened.", at_, "Take it away.");
      return error_at("unit.unexpected", "Nothing is expected here.", at_,
                      "Join figures with +, -, * or /, and write names without blanks.");
    }
    return term;
  }

  /// Signs, brackets and names met so far: without any the text is a single quantity.
  int joints() const { return joints_; }

 private:
  void skip() { at_ = utf8::skip_blanks(text_, at_); }

  template <std::size_t N>
  bool take(const std::array<std::string_view, N>& signs) {
    skip();
    for (const std::string_view sign : signs) {
      if (text_.compare(at_, sign.size(), sign) != 0) continue;
      at_ += sign.size();
      return true;
    }
    return false;
  }

  bool take_plus() {
    skip();
    if (at_ >= text_.size() || text_[at_] != '+') return false;
    for (const std::string_view sign : kPlusMinus) {
      if (text_.compare(at_, sign.size(), sign) == 0) return false;
    }
    ++at_;
    return true;
  }

  Result<Term> sum(int depth) {
    Result<Term> left = product(depth);
    if (!left) return left;
    for (;;) {
      skip();
      const std::size_t sign_at = at_;
      const bool plus = take_plus();
      if (!plus && !take(kMinus)) return left;
      ++joints_;
      Result<Term> right = product(depth);
      if (!right) return right;
      if (std::optional<Error> failed = join(*left, *right, plus ? 1 : -1, sign_at)) return *failed;
    }
  }

  /// left += sign × right, where both measure the same thing.
  std::optional<Error> join(Term& left, Term& right, double sign, std::size_t at) {
    const bool left_scale = has_scale(left.dimension) && !left.kelvin;
    const bool right_scale = has_scale(right.dimension) && !right.kelvin;
    if (left_scale && right_scale && left.dimension == right.dimension && sign < 0) {
      left.dimension.kind =
          left.dimension.kind == Kind::Temperature ? Kind::TemperatureDifference : Kind::Plain;
    } else if (right_scale && !left_scale && sign > 0) {
      // A difference in front of a temperature: the sum is a temperature.
      Term swapped = right;
      right = left;
      left = swapped;
      return join(left, right, sign, at);
    } else {
      take_as_difference(right);
      Dimension a = left.dimension, b = right.dimension;
      if (a.kind == Kind::Temperature && b.kind == Kind::TemperatureDifference) b.kind = a.kind;
      if (a.kind == Kind::GaugePressure && b.kind == Kind::Plain) b.kind = a.kind;
      if (a != b || (left_scale && right_scale))
        return error_at("unit.no_sum",
                        "What stands left of this sign is " + words_of(left) + ", what stands right of it " +
                            words_of(right) + ".",
                        at, "Only figures that measure the same thing can be added or subtracted.");
    }
    left.value.add(right.value, sign);
    return finite(left, at);
  }

  Result<Term> product(int depth) {
    Result<Term> left = signed_factor(depth);
    if (!left) return left;
    for (;;) {
      skip();
      const std::size_t sign_at = at_;
      bool times = take(kTimes);
      if (!times) {
        if (at_ >= text_.size() || text_[at_] != '/') return left;
        ++at_;
      }
      ++joints_;
      Result<Term> right = signed_factor(depth);
      if (!right) return right;
      if (std::optional<Error> failed = multiply(*left, *right, times ? 1 : -1, sign_at)) return *failed;
    }
  }

  Result<Term> signed_factor(int depth) {
    bool negative = false;
    skip();
    const std::size_t begin = at_;
    // The sign of a number belongs to the number, where a scale of temperature sees it.
    for (std::size_t sign_at = at_; take(kMinus); sign_at = at_) {
      skip();
      if (at_ < text_.size() && is_digit(text_[at_])) {
        at_ = utf8::skip_blanks(text_, sign_at);
        break;
      }
      negative = !negative;
    }
    Result<Term> term = power(depth);
    if (!term || !negative) return term;
    take_as_difference(*term);
    if (has_scale(term->dimension)) return no_product(*term, begin);
    term->value = term->value.scaled(-1);
    return term;
  }

  Result<Term> power(int depth) {
    Result<Term> term = primary(depth);
    if (!term) return term;
    skip();
    if (at_ >= text_.size() || text_[at_] != '^') return term;
    const std::size_t begin = at_++;
    ++joints_;
    skip();
    std::size_t digits = at_;
    while (digits < text_.size() && is_digit(text_[digits])) ++digits;
    const std::optional<double> exponent = parse_number(text_.substr(at_, digits - at_));
    if (!exponent || *exponent < 1 || *exponent > kMostPower)
      return error_at("unit.bad_exponent", "A power is a whole number from 1 to 9 here.", begin,
                      "Write x^2, or 1/x^2 for a negative one.");
    at_ = digits;
    const Term base = *term;
    for (int i = 1; i < static_cast<int>(*exponent); ++i) {
      Term again = base;
      if (std::optional<Error> failed = multiply(*term, again, 1, begin)) return *failed;
    }
    if (std::optional<Error> failed = take_unit(*term, begin)) return *failed;
    return term;
  }

  /// The unit behind a bracket or power that comes to a plain number.
  std::optional<Error> take_unit(Term& term, std::size_t at) {
    if (term.dimension != dimension::kNumber) return std::nullopt;
    const std::optional<Unit> unit = unit_here();
    if (!unit) return std::nullopt;
    if (unit->offset != 0)
      return error_at("unit.no_product", "A bracket cannot stand on a scale of temperature.", at,
                      "Write its unit inside, at each figure.");
    apply(term, *unit);
    return std::nullopt;
  }

  Result<Term> primary(int depth) {
    skip();
    const std::size_t begin = at_;
    if (depth > kDeepest)
      return error_at("unit.unexpected", "Brackets are nested too deeply.", begin, "Name a part of this.");
    if (at_ < text_.size() && text_[at_] == '(') {
      ++at_;
      ++joints_;
      Result<Term> inner = sum(depth + 1);
      if (!inner) return inner;
      skip();
      if (at_ >= text_.size() || text_[at_] != ')')
        return error_at("unit.unclosed_bracket", "This bracket is never closed.", begin,
                        "Add the closing bracket.");
      ++at_;
      if (std::optional<Error> failed = take_unit(*inner, begin)) return *failed;
      return inner;
    }
    if (const std::size_t length = name_length(text_.substr(at_)); length > 0) {
      const std::string_view name = text_.substr(at_, length);
      ++joints_;
      const auto found = names_.find(name);
      if (found == names_.end())
        return error_at("unit.unknown_name", "No quantity is called \"" + std::string(name) + "\" here.",
                        begin, "Name it in the table of quantities, or write a number.");
      at_ += length;
      Term term;
      term.value = found->second.value;
      term.dimension = found->second.dimension;
      term.kelvin = found->second.kelvin;
      return term;
    }
    return literal(begin);
  }

  /// A number with its ± and unit, read by parse_quantity.
  Result<Term> literal(std::size_t begin) {
    std::size_t length = 0;
    const std::string_view rest = text_.substr(begin);
    const std::size_t sign = rest.substr(0, 1) == "-" ? 1 : rest.substr(0, 3) == "\u2212" ? 3 : 0;
    if (!parse_number_prefix(rest.substr(sign), length)) {
      const Result<TypedValue> failed =
          parse_quantity(rest.substr(0, std::min<std::size_t>(rest.size(), 40)));
      if (!failed) return moved(failed.error(), begin);
      return error_at("unit.no_number", "A number is expected here.", begin,
                      "Write a number and its unit, such as 1.2 t/h.");
    }
    // The longest stretch that is one quantity belongs together: "1.2 t/h / 3" is 1.2 t/h and a third.
    std::size_t end = begin + sign + length;
    std::optional<TypedValue> best;
    std::size_t best_end = end;
    for (std::size_t to = end; to <= text_.size() && to - begin <= kLongestQuantity; ++to) {
      if (to < text_.size() && to > end && !boundary(to)) continue;
      const std::size_t last = utf8::skip_blanks(text_, to);
      if (last != to && to != end) continue;  // the blank belongs to what follows
      Result<TypedValue> read = parse_quantity(text_.substr(begin, to - begin));
      if (!read) continue;
      best = std::move(*read);
      best_end = to;
    }
    if (!best) return moved(parse_quantity(text_.substr(begin, end - begin)).error(), begin);
    at_ = best_end;
    Term term;
    term.value =
        best->u95 ? Quantity(best->value, *best->u95, typed_source(cell_, begin)) : Quantity(best->value);
    term.dimension = best->unit.dimension;
    term.kelvin =
        term.dimension.kind == Kind::Temperature && best->unit.offset == 0 && best->unit.factor == 1;
    term.decimals = best->decimals;
    term.unit = std::move(best->unit);
    return term;
  }

  /// A quantity ends before a sign, a bracket, a blank, or at the end of a word.
  bool boundary(std::size_t at) const {
    const char before = text_[at - 1], after = text_[at];
    const bool word_before = is_name_byte(before) || static_cast<unsigned char>(before) >= 0x80;
    const bool word_after = is_name_byte(after) || static_cast<unsigned char>(after) >= 0x80;
    return !(word_before && word_after) && after != '.';
  }

  /// The longest unit that stands here, taken; empty when there is none.
  std::optional<Unit> unit_here() {
    skip();
    std::optional<Unit> best;
    std::size_t best_end = at_;
    for (std::size_t to = at_ + 1; to <= text_.size() && to - at_ <= kLongestQuantity; ++to) {
      if (to < text_.size() && !boundary(to)) continue;
      const std::string_view candidate = text_.substr(at_, to - at_);
      if (utf8::trim(candidate).size() != candidate.size()) continue;
      const char first = candidate.front();
      if (first == '/' || first == '*' || first == '(' || first == '+' || first == '-' || is_digit(first))
        break;
      Result<Unit> unit = parse_unit(candidate);
      if (!unit) continue;
      best = std::move(*unit);
      best_end = to;
    }
    if (best) at_ = best_end;
    return best;
  }

  static void apply(Term& term, const Unit& unit) {
    term.value = term.value.scaled(unit.factor);
    term.dimension = unit.dimension;
    term.unit = unit;
    term.kelvin = unit.dimension.kind == Kind::Temperature;
  }

  static Error no_product(const Term& term, std::size_t at) {
    return error_at("unit.no_product", "A product with " + describe(term.dimension) + " has no meaning.", at,
                    term.dimension.kind == Kind::GaugePressure
                        ? "Write the pressure as an absolute one."
                        : "Write a difference in K, such as (60 °C - 20 °C).");
  }

  /// left × right or left / right.
  std::optional<Error> multiply(Term& left, Term& right, int sign, std::size_t at) {
    take_as_difference(left);
    take_as_difference(right);
    if (has_scale(left.dimension)) return no_product(left, at);
    if (has_scale(right.dimension)) return no_product(right, at);
    const double a = left.value.value(), b = right.value.value();
    if (sign < 0 && b == 0)
      return error_at("unit.division_by_zero", "What stands below this line is zero.", at,
                      "Check the figures and names there.");
    // d(ab) = b da + a db; d(a/b) = da / b − (a / b²) db.
    Quantity result(sign > 0 ? a * b : a / b);
    const auto spread = [&](const Quantity& of, double factor) {
      Quantity part = of;
      part.add(Quantity(of.value()), -1);
      result.add(part, factor);
    };
    spread(left.value, sign > 0 ? b : 1 / b);
    spread(right.value, sign > 0 ? a : -a / (b * b));
    Dimension product;
    const auto grow = [&](std::int8_t one, std::int8_t other, std::int8_t& out) {
      const int exponent = one + sign * other;
      out = static_cast<std::int8_t>(exponent);
      return std::abs(exponent) <= 30;
    };
    const Dimension &l = left.dimension, &r = right.dimension;
    const bool fits = grow(l.kg, r.kg, product.kg) && grow(l.m, r.m, product.m) &&
                      grow(l.s, r.s, product.s) && grow(l.K, r.K, product.K) &&
                      grow(l.mol, r.mol, product.mol);
    if (!fits)
      return error_at("unit.out_of_range", "This product measures nothing that the sheet knows.", at, "");
    // A fraction or a difference times a plain number stays what it is.
    const auto plain = [](const Dimension& d) { return d == dimension::kNumber; };
    if (plain(r)) {
      product.kind = l.kind;
    } else if (plain(l) && sign > 0) {
      product.kind = r.kind;
    } else if (product.kg == 0 && product.m == 0 && product.s == 0 && product.mol == 0 && product.K == 1) {
      product.kind = Kind::TemperatureDifference;
    }
    left.value = std::move(result);
    left.dimension = product;
    return finite(left, at);
  }

  static std::optional<Error> finite(const Term& term, std::size_t at) {
    if (std::isfinite(term.value.value()) && std::isfinite(term.value.u95())) return std::nullopt;
    return error_at("unit.out_of_range", "This comes to no finite figure.", at, "Choose larger units.");
  }

  static Error moved(Error error, std::size_t by) {
    if (error.where.rfind("offset ", 0) == 0)
      error.where = "offset " + std::to_string(std::stoul(error.where.substr(7)) + by);
    return error;
  }

  static constexpr std::size_t kLongestQuantity = 60;

  std::string_view text_;
  const NamedFigures& names_;
  std::uint64_t cell_;
  std::size_t at_ = 0;
  int joints_ = 0;
};

/// A unit to print a calculated figure in.
Unit suiting(const Dimension& dimension) {
  const std::vector<std::string_view> units = suggested_units(dimension);
  if (!units.empty()) {
    Result<Unit> unit = parse_unit(units.front());
    if (unit.ok()) return std::move(*unit);
  }
  Unit si;
  si.dimension = dimension;
  return si;
}

TypedValue as_typed(const Evaluated& figure) {
  TypedValue typed;
  typed.value = figure.value.value();
  if (figure.value.u95() > 0) typed.u95 = figure.value.u95();
  typed.unit = figure.unit;
  typed.decimals = figure.decimals;
  return typed;
}

}  // namespace

Result<Evaluated> evaluate(std::string_view text, const NamedFigures& names, std::uint64_t cell) {
  // What reads as a single quantity is one.
  Result<TypedValue> single = parse_quantity(text);
  Evaluated figure;
  if (single.ok()) {
    figure.value =
        single->u95 ? Quantity(single->value, *single->u95, typed_source(cell, 0)) : Quantity(single->value);
    figure.dimension = single->dimension();
    figure.kelvin =
        figure.dimension.kind == Kind::Temperature && single->unit.offset == 0 && single->unit.factor == 1;
    figure.unit = std::move(single->unit);
    figure.decimals = single->decimals;
    return figure;
  }
  Reader reader(text, names, cell);
  Result<Term> term = reader.read();
  if (!term.ok()) return reader.joints() == 0 ? single.error() : term.error();
  if (term->dimension.kind == Kind::Temperature && !term->kelvin && term->value.value() < 0)
    return error_at("unit.below_absolute_zero", "This comes to a temperature below absolute zero.", 0,
                    "Check the signs and units.");
  constexpr int kAllDecimals = 12;
  figure.value = std::move(term->value);
  figure.dimension = term->dimension;
  figure.kelvin = term->kelvin;
  figure.unit = suiting(figure.dimension);
  figure.decimals = kAllDecimals;
  figure.calculated = true;
  return figure;
}

Result<TypedValue> evaluate_quantity(std::string_view text, const NamedFigures& names) {
  Result<Evaluated> figure = evaluate(text, names);
  if (!figure.ok()) return figure.error();
  return as_typed(*figure);
}

Result<TypedValue> evaluate_quantity(std::string_view text, const Dimension& expected,
                                     const NamedFigures& names) {
  Result<TypedValue> single = parse_quantity(text, expected);
  if (single.ok()) return single;
  Result<Evaluated> figure = evaluate(text, names);
  if (!figure.ok()) return figure.error();
  if (!figure->calculated) return single.error();
  const bool ratio = figure->dimension == dimension::kNumber;
  const bool difference =
      expected == dimension::kTemperatureDifference && figure->dimension == dimension::kTemperature;
  const Dimension bare{expected.kg, expected.m, expected.s, expected.K, expected.mol, Kind::Plain};
  if (figure->dimension != expected && !(ratio && bare == dimension::kNumber) &&
      !(difference && figure->kelvin)) {
    return Error{
        "unit.dimension",
        "This comes to " + describe(figure->dimension) + ", but " + describe(expected) + " is expected.", "",
        difference ? "Subtract two temperatures, or write the difference in K."
                   : "Check the units and the names in it."};
  }
  figure->unit = suiting(expected);
  figure->unit.dimension = expected;
  return as_typed(*figure);
}

std::vector<std::string> names_called(std::string_view text,
                                      const std::function<bool(std::string_view)>& is_name) {
  std::vector<std::string> called;
  for (std::size_t at = 0; at < text.size();) {
    const std::size_t length = name_length(text.substr(at));
    if (length == 0) {
      // A digit or letter of another script does not begin a name in the middle of a word.
      if (is_name_byte(text[at])) {
        while (at < text.size() && is_name_byte(text[at])) ++at;
      } else {
        ++at;
      }
      continue;
    }
    std::string name(text.substr(at, length));
    if (is_name(name) && std::find(called.begin(), called.end(), name) == called.end())
      called.push_back(std::move(name));
    at += length;
  }
  return called;
}

Status usable_name(std::string_view name) {
  constexpr std::size_t kLongest = 40;
  if (name.empty() || name_length(name) != name.size() || name.size() > kLongest)
    return Error{"unit.bad_name", "\"" + std::string(name.substr(0, kLongest)) + "\" cannot name a quantity.",
                 "", "Use letters, digits and underscores, a letter first: feed_ratio."};
  if (parse_unit(name).ok())
    return Error{"unit.bad_name", "\"" + std::string(name) + "\" is a unit.", "",
                 "Choose a longer name, such as " + std::string(name) + "_feed."};
  return success();
}

}  // namespace heatledger::units
