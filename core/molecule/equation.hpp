// Equation text to terms. What a species text means is decided one room further down
// (core/facts/resolve.hpp).
#pragma once

#include <cstdint>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "core/base/result.hpp"

namespace heatledger::molecule {

enum class Phase : std::uint8_t { Unstated, Gas, Liquid, Solid, Aqueous, Dissolved };

/// "g", "l", "s", "aq", "diss", "" for Unstated.
std::string_view phase_text(Phase phase);

/// Strength of a solution as typed: "96 wt%" or "r=5" (moles of water per mole of solute).
struct Strength {
  enum class Kind : std::uint8_t {
    InfiniteDilution,
    MassFraction,
    WaterRatio,
    Molality
  } kind = Kind::InfiniteDilution;
  double value = 0;  ///< mass fraction 0..1; mol water per mol; mol/kg water
};

/// A coefficient as typed; exact where it is an integer, decimal or fraction.
struct Coefficient {
  std::int64_t numerator = 1, denominator = 1;
  std::string typed;  ///< empty when none was written
  double value() const { return static_cast<double>(numerator) / static_cast<double>(denominator); }
};

struct Term {
  Coefficient coefficient;
  std::string species;  ///< text of the species without coefficient and phase; without the quotes when quoted
  bool quoted = false;  ///< always SMILES
  Phase phase = Phase::Unstated;
  std::optional<Strength> strength;    ///< with (aq, ...) only
  std::size_t offset = 0, length = 0;  ///< bytes of the whole term in the equation text
  std::size_t species_offset = 0;      ///< where `species` begins in the equation text
};

struct EquationText {
  std::vector<Term> reactants, products;
  bool reversible = false;  ///< written with <=> or ⇌
};

/// Reads one equation as people type it. Decided by syntax alone, so that an equation means the same on every
/// sheet:
///   arrows     -> --> => → ⟶ and = between blanks; <=> ⇌ ⇄ as reversible. <- and <-> are refused. Exactly
///   one. plus       separates, except as a charge: directly after text and before a blank and a further
///   plus, an arrow or
///              the end ("Na+ + Cl-"), before a phase ("Fe3+(aq)"), a hydrate dot or the digits of a charge
///              ("Fe+3 + …"). Of a run "++" between texts the last one separates. Inside brackets and quotes
///              never.
///   numbers    integer, decimal (point), fraction (1/2, ½, 1 1/2), before a blank or a quote; without a
///   blank only when
///              what follows is a formula ("3H2", "1/2O2"). A number before '-' or ',' belongs to a name
///              (2-propanol).
///   quotes     "…" is SMILES
///   phases     (g) (l) (s) (aq) (diss), also gas, liq, liquid, solid; (aq, 96 wt%), (aq, r=5), (aq, 2
///   mol/kg)
/// @errors equation.empty, equation.not_utf8, equation.no_arrow, equation.two_arrows, equation.not_an_arrow,
///         equation.empty_side, equation.empty_term, equation.empty_species, equation.only_number,
///         equation.zero_coefficient, equation.bad_coefficient, equation.unclosed_bracket,
///         equation.stray_bracket, equation.unclosed_quote, equation.misplaced_quote,
///         equation.text_after_quote, equation.two_phases, equation.bad_strength; `where` is "offset N"
/// @complexity linear in the text
/// @example Equation.TellsChargesFromSeparators
Result<EquationText> parse_equation(std::string_view text);

}  // namespace heatledger::molecule
