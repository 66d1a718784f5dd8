// Equations in type and as plain text that reads back.
#include "core/balance/reaction.hpp"
#include "core/base/number_text.hpp"

namespace heatledger::balance {
namespace {

using molecule::Coefficient;
using molecule::Phase;
using molecule::Strength;
using molecule::Term;

bool is_digit(char c) {
  return c >= '0' && c <= '9';
}
bool is_letter(char c) {
  return (c >= 'A' && c <= 'Z') || (c >= 'a' && c <= 'z');
}

/// Whether a typed text is the formula of the species, so that its digits are counts to be set low.
bool reads_as_formula(const ReactionSpecies& entry) {
  if (entry.term.quoted || entry.term.species.empty()) return false;
  const char first = entry.term.species.front();
  if (!(first >= 'A' && first <= 'Z') && first != '(' && first != '[') return false;
  for (const char c : entry.term.species) {
    if (c == ' ' || c == '-' || c == '=' || c == '#' || c == ',') return false;
  }
  if (!entry.species->composition) return false;
  const Result<molecule::Composition> formula = molecule::parse_formula(entry.term.species);
  return formula.ok() && *formula == *entry.species->composition;
}

std::string with_subscripts(std::string_view formula) {
  constexpr const char* kSubscript[] = {"₀", "₁", "₂", "₃", "₄", "₅", "₆", "₇", "₈", "₉"};
  constexpr const char* kSuperscript[] = {"⁰", "¹", "²", "³", "⁴", "⁵", "⁶", "⁷", "⁸", "⁹"};
  std::string text;
  bool raised = false;
  for (std::size_t i = 0; i < formula.size(); ++i) {
    const char c = formula[i];
    const char before = i == 0 ? ' ' : formula[i - 1];
    if (c == '^') {
      raised = true;
    } else if (raised && is_digit(c)) {
      text += kSuperscript[c - '0'];
    } else if ((c == '+' || c == '-') && (raised || i + 1 == formula.size())) {
      text += c == '+' ? "⁺" : "⁻";
    } else if (is_digit(c) && (is_letter(before) || is_digit(before) || before == ')' || before == ']')) {
      text += kSubscript[c - '0'];
    } else if (c == '*' || c == '.') {
      text += "·";
    } else {
      text += c;
    }
  }
  return text;
}

/// As typed where something was typed, else the fraction.
std::string coefficient_text(const Coefficient& coefficient) {
  if (!coefficient.typed.empty()) return coefficient.typed;
  if (coefficient.numerator == coefficient.denominator) return {};
  std::string text = std::to_string(coefficient.numerator);
  if (coefficient.denominator != 1) text += "/" + std::to_string(coefficient.denominator);
  return text;
}

template <typename SpeciesText>
std::string join(const Reaction& reaction, std::string_view arrow, SpeciesText species_text) {
  std::string text;
  bool product = false, first = true;
  for (const ReactionSpecies& entry : reaction.species) {
    if (entry.product && !product) {
      text += std::string(" ").append(arrow).append(" ");
      product = first = true;
    }
    if (!first) text += " + ";
    first = false;
    const std::string coefficient = coefficient_text(entry.term.coefficient);
    if (!coefficient.empty()) text += coefficient + " ";
    text += species_text(entry) + phase_suffix(entry.term);
  }
  return text;
}

}  // namespace

std::string phase_suffix(const Term& term) {
  if (term.phase == Phase::Unstated) return {};
  std::string text = "(" + std::string(molecule::phase_text(term.phase));
  if (term.strength) {
    switch (term.strength->kind) {
      case Strength::Kind::InfiniteDilution:
        break;
      case Strength::Kind::MassFraction:
        text += ", " + machine_number(term.strength->value * 100, 8) + " wt%";
        break;
      case Strength::Kind::WaterRatio:
        text += ", r=" + machine_number(term.strength->value, 8);
        break;
      case Strength::Kind::Molality:
        text += ", " + machine_number(term.strength->value, 8) + " mol/kg";
        break;
    }
  }
  return text + ")";
}

std::string display_species(const ReactionSpecies& entry) {
  if (entry.term.quoted) return "\"" + entry.term.species + "\"";
  return reads_as_formula(entry) ? with_subscripts(entry.term.species) : entry.term.species;
}

std::string display_equation(const Reaction& reaction) {
  return join(reaction, reaction.reversible ? "⇌" : "→",
              [](const ReactionSpecies& entry) { return display_species(entry); });
}

std::string plain_equation(const Reaction& reaction) {
  return join(reaction, reaction.reversible ? "<=>" : "->", [](const ReactionSpecies& entry) {
    return entry.term.quoted ? "\"" + entry.term.species + "\"" : entry.term.species;
  });
}

}  // namespace heatledger::balance
