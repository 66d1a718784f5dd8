#include "core/document/typed_energy.hpp"

#include <array>
#include <cmath>
#include <string>

#include "core/base/number_text.hpp"
#include "core/units/constants.hpp"

namespace heatledger::document {
namespace {

struct Unit {
  std::string_view name;
  double joule_per_mole;
};

/// eV per particle: elementary charge times Avogadro constant, both exact (SI 2019).
constexpr double kElectronvolt = 96485.33212;
constexpr std::array<Unit, 8> kUnits{{{"kJ/mol", 1000},
                                      {"kJ", 1000},
                                      {"J/mol", 1},
                                      {"J", 1},
                                      {"kcal/mol", 1000 * units::kCalorie},
                                      {"kcal", 1000 * units::kCalorie},
                                      {"cal/mol", units::kCalorie},
                                      {"eV", kElectronvolt}}};

constexpr std::array<std::string_view, 4> kBlanks{" ", "\u2009", "\u00a0", "\u202f"};

/// Length of the blank at `at`, 0 when there is none.
std::size_t blank_at(std::string_view text, std::size_t at) {
  for (const std::string_view blank : kBlanks) {
    if (text.substr(at, blank.size()) == blank) return blank.size();
  }
  return 0;
}

void skip_blanks(std::string_view text, std::size_t& at) {
  while (const std::size_t length = blank_at(text, at)) at += length;
}

bool is_digit(std::string_view text, std::size_t at) {
  return at < text.size() && text[at] >= '0' && text[at] <= '9';
}

/// Reads one number at `at` whose thousands may be parted by single blanks before exactly three digits.
std::optional<double> take_number(std::string_view text, std::size_t& at) {
  std::string plain;
  std::size_t end = at;
  while (end < text.size()) {
    const std::size_t blank = blank_at(text, end);
    if (blank == 0) {
      plain += text[end++];
      continue;
    }
    const std::size_t next = end + blank;
    const bool thousands = end > at && is_digit(text, end - 1) && is_digit(text, next) &&
                           is_digit(text, next + 1) && is_digit(text, next + 2) && !is_digit(text, next + 3);
    if (!thousands) break;
    end = next;
  }
  std::size_t length = 0;
  const std::optional<double> value = parse_number_prefix(plain, length);
  if (!value) return std::nullopt;
  // Walk the same number of kept bytes through the original text.
  std::size_t kept = 0;
  while (kept < length) {
    const std::size_t blank = blank_at(text, at);
    at += blank;
    if (blank == 0) {
      ++at;
      ++kept;
    }
  }
  return value;
}

Error not_a_number(std::size_t offset) {
  return {"typed_energy.not_a_number", "A figure was expected here.", "offset " + std::to_string(offset),
          "Type a number with a decimal point and a unit, such as 340 kJ/mol."};
}

}  // namespace

Result<uncertainty::Figure> parse_molar_energy(std::string_view text) {
  std::size_t at = 0;
  skip_blanks(text, at);
  const std::optional<double> value = take_number(text, at);
  if (!value) return not_a_number(at);
  skip_blanks(text, at);
  double half_width = 0;
  for (const std::string_view mark : {std::string_view("\u00b1"), std::string_view("+/-")}) {
    if (text.substr(at, mark.size()) != mark) continue;
    at += mark.size();
    skip_blanks(text, at);
    const std::optional<double> u95 = take_number(text, at);
    if (!u95 || *u95 < 0) return not_a_number(at);
    half_width = *u95;
    skip_blanks(text, at);
    break;
  }
  std::string_view unit = text.substr(at);
  while (!unit.empty() && unit.back() == ' ') unit.remove_suffix(1);
  double factor = 1000;
  if (!unit.empty()) {
    factor = 0;
    for (const Unit& known : kUnits) {
      if (known.name == unit) factor = known.joule_per_mole;
    }
    if (factor == 0) {
      return Error{"typed_energy.unit",
                   "The unit \"" + std::string(unit) + "\" is not one of energy per mole.",
                   "offset " + std::to_string(at), "Use kJ/mol, J/mol, kcal/mol, cal/mol or eV."};
    }
  }
  const uncertainty::Figure figure{*value * factor, half_width * factor};
  // Far above any heat of reaction, far below what sums and squares of it could not hold.
  constexpr double kLargest = 1e15;  // [J/mol]
  if (!(std::fabs(figure.value) <= kLargest && figure.u95 <= kLargest)) {
    return Error{"typed_energy.out_of_range", "No heat per mole is as large as this.", "offset 0",
                 "Check the power of ten and the unit."};
  }
  return figure;
}

}  // namespace heatledger::document
