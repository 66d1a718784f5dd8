// Compositions as text: Hill order, display with raised and lowered digits.
#include <algorithm>
#include <array>
#include <cmath>
#include <cstdlib>
#include <optional>
#include <vector>

#include "core/base/number_text.hpp"
#include "core/base/utf8.hpp"
#include "core/molecule/elements.hpp"
#include "core/molecule/formula.hpp"
#include "core/molecule/formula_marks.hpp"

namespace heatledger::molecule {
namespace {

constexpr std::array<std::string_view, 10> kSubscripts = {"\u2080", "\u2081", "\u2082", "\u2083", "\u2084",
                                                          "\u2085", "\u2086", "\u2087", "\u2088", "\u2089"};
constexpr std::array<std::string_view, 10> kSuperscripts = {"\u2070", "\u00B9", "\u00B2", "\u00B3", "\u2074",
                                                            "\u2075", "\u2076", "\u2077", "\u2078", "\u2079"};

/// Whole numbers only: there is no lowered point or slash, and "Fe0.95O" has to read back.
std::string lowered(const std::string& digits) {
  if (digits.find_first_of("./") != std::string::npos) return digits;
  std::string text;
  for (const char c : digits) {
    if (c >= '0' && c <= '9') {
      text += kSubscripts[static_cast<std::size_t>(c - '0')];
    } else {
      text += c;
    }
  }
  return text;
}

std::string raised(const std::string& digits) {
  std::string text;
  for (const char c : digits) {
    if (c >= '0' && c <= '9') {
      text += kSuperscripts[static_cast<std::size_t>(c - '0')];
    } else {
      text += c == '+' ? "\u207A" : "\u207B";
    }
  }
  return text;
}

std::string charge_text(int charge) {
  const int size = std::abs(charge);
  return (size > 1 ? std::to_string(size) : "") + (charge > 0 ? "+" : "-");
}

struct Entry {
  int key = 0;
  double count = 0;
  std::string order;  ///< sorts the entries
};

std::string symbol_text(int key, bool display) {
  const int mass = key / 1000;
  if (mass == 0) return std::string(symbol(key));
  if (key == 2001) return "D";
  if (key == 3001) return "T";
  const std::string element(symbol(key % 1000));
  return display ? raised(std::to_string(mass)) + element : "[" + std::to_string(mass) + element + "]";
}

std::vector<Entry> in_hill_order(const Composition& composition) {
  bool carbon = false;
  for (const auto& [key, count] : composition.atoms) carbon = carbon || key % 1000 == 6;
  std::vector<Entry> entries;
  for (const auto& [key, count] : composition.atoms) {
    const int element = key % 1000;
    std::string order(symbol(element));
    if (carbon && element == 6) order = "!";
    if (carbon && element == 1) order = "\"";
    // The natural element first, then its isotopes by mass number.
    order += ' ' + std::to_string(1000 + key / 1000);
    entries.push_back({key, count, order});
  }
  std::sort(entries.begin(), entries.end(), [](const Entry& a, const Entry& b) { return a.order < b.order; });
  return entries;
}

/// Smallest number that makes every count whole; 0 when there is none up to 10,000.
int common_denominator(const std::vector<Entry>& entries) {
  for (int factor = 1; factor <= 10000; ++factor) {
    const bool whole = std::all_of(entries.begin(), entries.end(), [factor](const Entry& entry) {
      const double scaled = entry.count * factor;
      // What the digits of a typed count leave, but never a share of an atom that a reader would see.
      return std::fabs(scaled - std::round(scaled)) <= std::min(1e-9 * std::max(1.0, scaled), 1e-6);
    });
    if (whole) return factor;
  }
  return 0;
}

std::string formula_text(const Composition& composition, bool display) {
  const std::vector<Entry> entries = in_hill_order(composition);
  const int denominator = common_denominator(entries);
  std::string text;
  for (const Entry& entry : entries) {
    const double count = denominator == 0 ? entry.count : std::round(entry.count * denominator);
    text += symbol_text(entry.key, display);
    if (count == 1) continue;
    const std::string number = machine_number(count, 15);
    text += display ? lowered(number) : number;
  }
  if (denominator > 1) text = "(" + text + ")1/" + std::to_string(denominator);
  if (composition.charge != 0)
    text += display ? raised(charge_text(composition.charge)) : "^" + charge_text(composition.charge);
  return text;
}

}  // namespace

std::string hill_formula(const Composition& composition) {
  return formula_text(composition, false);
}

std::string display_formula(const Composition& composition) {
  return formula_text(composition, true);
}

std::string typeset_formula(std::string_view text) {
  text = utf8::trim(text);
  int charge = 0;
  const std::optional<FormulaMarks> marks = formula_marks(text, charge);
  if (!marks) return std::string(text);
  std::string result;
  std::size_t at = 0, count = 0, dot = 0;
  while (at < marks->charge) {
    if (dot < marks->dots.size() && marks->dots[dot] == at) {
      result += "\u00B7";
      at += utf8::code_point_at(text, at).bytes;
      ++dot;
    } else if (count < marks->counts.size() && marks->counts[count].first == at) {
      const auto [begin, end] = marks->counts[count];
      result += lowered(std::string(text.substr(begin, end - begin)));
      at = end;
      ++count;
    } else {
      result += text[at++];
    }
  }
  if (charge != 0) result += raised(charge_text(charge));
  return result;
}

}  // namespace heatledger::molecule
