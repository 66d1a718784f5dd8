#include "core/molecule/equation_term.hpp"

#include <algorithm>
#include <array>
#include <numeric>

#include "core/base/number_text.hpp"
#include "core/base/text_error.hpp"
#include "core/base/utf8.hpp"
#include "core/molecule/formula.hpp"

namespace heatledger::molecule {
namespace {

bool is_digit(char c) {
  return c >= '0' && c <= '9';
}

struct Vulgar {
  std::string_view text;
  int numerator, denominator;
};
constexpr std::array<Vulgar, 15> kVulgar = {{{"\u00BD", 1, 2},
                                             {"\u00BC", 1, 4},
                                             {"\u00BE", 3, 4},
                                             {"\u2153", 1, 3},
                                             {"\u2154", 2, 3},
                                             {"\u2155", 1, 5},
                                             {"\u2156", 2, 5},
                                             {"\u2157", 3, 5},
                                             {"\u2158", 4, 5},
                                             {"\u2159", 1, 6},
                                             {"\u215A", 5, 6},
                                             {"\u215B", 1, 8},
                                             {"\u215C", 3, 8},
                                             {"\u215D", 5, 8},
                                             {"\u215E", 7, 8}}};

struct PhaseWord {
  std::string_view word;
  Phase phase;
};
constexpr std::array<PhaseWord, 9> kPhases = {{{"g", Phase::Gas},
                                               {"gas", Phase::Gas},
                                               {"l", Phase::Liquid},
                                               {"liq", Phase::Liquid},
                                               {"liquid", Phase::Liquid},
                                               {"s", Phase::Solid},
                                               {"solid", Phase::Solid},
                                               {"aq", Phase::Aqueous},
                                               {"diss", Phase::Dissolved}}};

Phase phase_of(std::string_view word) {
  for (const PhaseWord& entry : kPhases) {
    if (entry.word == word) return entry.phase;
  }
  return Phase::Unstated;
}

/// Offset of the parenthesis that opens the group which ends the text; npos when the text ends otherwise.
std::size_t last_group(std::string_view text) {
  if (text.empty() || text.back() != ')') return std::string_view::npos;
  // A phase holds no parentheses of its own, so the nearest opening one is its own.
  const std::size_t open = text.find_last_of('(');
  return open != std::string_view::npos && text.find(')', open) == text.size() - 1 ? open
                                                                                   : std::string_view::npos;
}

struct Number {
  Coefficient value;
  std::size_t bytes = 0;  ///< 0: no number begins here
  bool too_long = false, zero_below = false;
};

bool take_digits(std::string_view text, std::size_t& at, std::int64_t& value, int& digits) {
  while (at < text.size() && is_digit(text[at])) {
    if (++digits > 12) return false;
    value = value * 10 + (text[at++] - '0');
  }
  return true;
}

/// "½" at `at`: numerator, denominator, bytes (0: none).
const Vulgar* vulgar_at(std::string_view text, std::size_t at) {
  if (static_cast<unsigned char>(text[at]) < 0x80) return nullptr;
  for (const Vulgar& vulgar : kVulgar) {
    if (text.compare(at, vulgar.text.size(), vulgar.text) == 0) return &vulgar;
  }
  return nullptr;
}

Number read_number(std::string_view text) {
  Number number;
  std::size_t at = 0;
  int digits = 0;
  std::int64_t numerator = 0, denominator = 1;
  auto too_long = [&] {
    number.too_long = true;
    while (at < text.size() && is_digit(text[at])) ++at;
    number.bytes = at;
    return number;
  };
  if (!take_digits(text, at, numerator, digits)) return too_long();
  if (digits > 0 && at + 1 < text.size() && text[at] == '.' && is_digit(text[at + 1])) {
    const std::size_t point = at++;
    if (!take_digits(text, at, numerator, digits)) return too_long();
    for (std::size_t i = point + 1; i < at; ++i) denominator *= 10;
  } else if (digits > 0) {
    // "1/2", "1 1/2", "1½"
    std::int64_t whole = 0;
    std::size_t bar = at;
    std::int64_t above = numerator;
    const std::size_t second = utf8::skip_blanks(text, at);
    if (second > at && second < text.size() && is_digit(text[second])) {
      std::size_t end = second;
      std::int64_t value = 0;
      int more = 0;
      if (!take_digits(text, end, value, more)) return too_long();
      if (end + 1 < text.size() && text[end] == '/' && is_digit(text[end + 1])) {
        whole = numerator;
        above = value;
        bar = end;
      }
    }
    if (bar + 1 < text.size() && text[bar] == '/' && is_digit(text[bar + 1])) {
      at = bar + 1;
      std::int64_t below = 0;
      int more = 0;
      if (!take_digits(text, at, below, more)) return too_long();
      number.zero_below = below == 0;
      // Both parts hold at most 12 digits; more than 18 together would not fit.
      if (whole > 999999 || below > 999999) return too_long();
      numerator = whole * below + above;
      denominator = below == 0 ? 1 : below;
    } else if (const Vulgar* vulgar = at < text.size() ? vulgar_at(text, at) : nullptr) {
      numerator = numerator * vulgar->denominator + vulgar->numerator;
      denominator = vulgar->denominator;
      at += vulgar->text.size();
    }
  } else if (const Vulgar* vulgar = text.empty() ? nullptr : vulgar_at(text, 0)) {
    numerator = vulgar->numerator;
    denominator = vulgar->denominator;
    at = vulgar->text.size();
  } else if (text.size() > 1 && text[0] == '.' && is_digit(text[1])) {
    at = 1;
    if (!take_digits(text, at, numerator, digits)) return too_long();
    for (std::size_t i = 1; i < at; ++i) denominator *= 10;
  } else {
    return number;
  }
  const std::int64_t common = std::gcd(numerator, denominator);
  number.value.numerator = numerator / common;
  number.value.denominator = denominator / common;
  number.value.typed = std::string(text.substr(0, at));
  number.bytes = at;
  return number;
}

Error bad_strength(std::size_t offset, std::string message) {
  return error_at("equation.bad_strength", std::move(message), offset,
                  "Write (aq, 20 wt%), (aq, r=5) for moles of water per mole, or (aq, 2 mol/kg).");
}

/// "96 wt%", "r=5", "2 mol/kg" between the comma and the closing parenthesis.
Result<Strength> read_strength(std::string_view text, std::size_t offset) {
  Strength strength;
  if (!text.empty() && (text[0] == 'r' || text[0] == 'R')) {
    const std::size_t equals = utf8::skip_blanks(text, 1);
    if (equals >= text.size() || text[equals] != '=')
      return bad_strength(offset, "This strength of the solution cannot be read.");
    const std::optional<double> ratio = parse_number(utf8::trim(text.substr(equals + 1)));
    if (!ratio || !(*ratio > 0) || !(*ratio <= 1e9)) {
      return bad_strength(offset, "The moles of water per mole are to be a positive number.");
    }
    strength.kind = Strength::Kind::WaterRatio;
    strength.value = *ratio;
    return strength;
  }
  std::size_t length = 0;
  const std::optional<double> value = parse_number_prefix(text, length);
  if (!value) return bad_strength(offset, "This strength of the solution cannot be read.");
  const std::string_view unit = utf8::trim(text.substr(length));
  if (unit == "wt%" || unit == "wt.%" || unit == "wt %" || unit == "wt.-%" || unit == "wt-%" ||
      unit == "% w/w") {
    if (!(*value > 0) || !(*value < 100))
      return bad_strength(offset, "A mass fraction lies between 0 and 100 wt%.");
    strength.kind = Strength::Kind::MassFraction;
    strength.value = *value / 100;
    return strength;
  }
  if (unit == "mol/kg" || unit == "molal") {
    if (!(*value > 0) || !(*value <= 1e3))
      return bad_strength(offset, "A molality lies above 0 and below 1000 mol/kg.");
    strength.kind = Strength::Kind::Molality;
    strength.value = *value;
    return strength;
  }
  if (unit == "%") return bad_strength(offset, "A bare % does not say by mass or by volume.");
  if (unit == "M" || unit == "mol/L" || unit == "mol/l" || unit == "N") {
    return bad_strength(offset, "A strength per litre needs the density of the solution.");
  }
  return bad_strength(offset, "This strength of the solution cannot be read.");
}

/// The inside of a pair of parentheses, split at its first comma.
struct PhaseInside {
  Phase phase = Phase::Unstated;
  std::string_view rest;        ///< after the comma
  std::size_t rest_offset = 0;  ///< bytes from the opening parenthesis
  bool has_comma = false;
};

PhaseInside look_inside(std::string_view parentheses) {
  PhaseInside inside;
  if (parentheses.size() < 3 || parentheses.front() != '(' || parentheses.back() != ')') return inside;
  const std::string_view between = parentheses.substr(1, parentheses.size() - 2);
  const std::size_t comma = between.find_first_of(",;");
  inside.phase = phase_of(utf8::trim(between.substr(0, comma)));
  if (comma == std::string_view::npos) return inside;
  inside.has_comma = true;
  inside.rest_offset = 1 + utf8::skip_blanks(between, comma + 1);
  inside.rest = utf8::trim(between.substr(comma + 1));
  return inside;
}

}  // namespace

std::size_t closing_quote(std::string_view text, std::size_t at) {
  if (text[at] == '"') {
    const std::size_t close = text.find('"', at + 1);
    return close == std::string_view::npos ? close : close + 1;
  }
  const std::size_t close = text.find(kCloseQuote, at + kOpenQuote.size());
  return close == std::string_view::npos ? close : close + kCloseQuote.size();
}

bool is_phase(std::string_view parentheses) {
  return look_inside(parentheses).phase != Phase::Unstated;
}

Result<Term> parse_term(std::string_view text, std::size_t offset) {
  Term term;
  term.offset = offset;
  term.length = text.size();
  std::string_view rest = text;

  // Phase and strength at the end.
  if (const std::size_t open = last_group(rest); open != std::string_view::npos) {
    const PhaseInside inside = look_inside(rest.substr(open));
    if (inside.phase != Phase::Unstated) {
      if (inside.has_comma) {
        if (inside.phase != Phase::Aqueous)
          return bad_strength(offset + open, "Only (aq) carries a strength.");
        Result<Strength> strength = read_strength(inside.rest, offset + open + inside.rest_offset);
        if (!strength) return strength.error();
        term.strength = *strength;
      }
      term.phase = inside.phase;
      rest = utf8::trim(rest.substr(0, open));
      if (const std::size_t again = last_group(rest);
          again != std::string_view::npos && is_phase(rest.substr(again))) {
        return error_at("equation.two_phases", "This species has two phases.", offset + open,
                        "Keep one of them.");
      }
    }
  }

  // Coefficient in front.
  const Number number = read_number(rest);
  if (number.bytes > 0) {
    const std::string_view after = rest.substr(number.bytes);
    const bool blank = utf8::blank_at(after, 0) > 0;
    const bool quote =
        !after.empty() && (after[0] == '"' || after.substr(0, kOpenQuote.size()) == kOpenQuote);
    bool taken = blank || quote || after.empty();
    if (!taken && !number.too_long && after[0] != '-' && after[0] != ',' && after[0] != '\'')
      taken = parse_formula(after).ok();
    if (taken) {
      if (number.too_long) {
        return error_at("equation.bad_coefficient", "This coefficient has too many digits.", offset,
                        "Use up to twelve digits.");
      }
      if (number.zero_below) {
        return error_at("equation.bad_coefficient", "A fraction cannot have zero below the line.", offset,
                        "Write the coefficient again.");
      }
      if (after.empty()) {
        return error_at("equation.only_number", "Here is a number without a species.", offset,
                        "Write the species after its coefficient; a charge such as Fe^3+ needs no blank.");
      }
      if (number.value.numerator == 0) {
        return error_at("equation.zero_coefficient", "A coefficient cannot be zero.", offset,
                        "Leave the species out instead.");
      }
      term.coefficient = number.value;
      rest = utf8::trim(after);
    }
  }
  if (rest.size() > 1 && rest[0] == '-' && (is_digit(rest[1]) || utf8::blank_at(rest, 1) > 0)) {
    return error_at("equation.bad_coefficient", "A coefficient cannot be negative.", offset,
                    "Move the species to the other side of the arrow.");
  }
  if (rest.size() > 2 && rest[0] == '0' && rest[1] == ',' && is_digit(rest[2])) {
    return error_at("equation.bad_coefficient", "A comma is no decimal point here.", offset,
                    "Write the coefficient with a point: 0.5.");
  }

  // What is left is the species.
  term.species_offset = rest.empty() ? offset : offset + static_cast<std::size_t>(rest.data() - text.data());
  const bool plain_quote = !rest.empty() && rest[0] == '"';
  if (plain_quote || rest.substr(0, kOpenQuote.size()) == kOpenQuote) {
    const std::size_t close = closing_quote(rest, 0);
    if (close != rest.size()) {
      const std::size_t at = term.species_offset + utf8::skip_blanks(rest, close);
      return error_at("equation.text_after_quote", "After a quoted SMILES only a phase may stand.", at,
                      "Join further species with +.");
    }
    const std::size_t mark = plain_quote ? 1 : kOpenQuote.size();
    const std::string_view inner = rest.substr(mark, rest.size() - 2 * mark);
    term.species_offset += mark + utf8::skip_blanks(inner, 0);
    term.quoted = true;
    rest = utf8::trim(inner);
  } else if (const std::size_t quote = std::min(rest.find('"'), rest.find(kOpenQuote));
             quote != std::string_view::npos) {
    return error_at("equation.misplaced_quote", "A quotation mark begins in the middle of a species.",
                    term.species_offset + quote, "Put the whole SMILES in quotation marks, or none of it.");
  }
  if (rest.empty()) {
    return error_at("equation.empty_species", "A species is missing here.", term.species_offset,
                    "Write a name, a formula or SMILES.");
  }
  term.species = std::string(rest);
  return term;
}

}  // namespace heatledger::molecule
