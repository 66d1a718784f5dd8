// Equation text to terms. What a species text means is decided one room further down (core/facts/resolve.hpp).
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
  enum class Kind : std::uint8_t { InfiniteDilution, MassFraction, WaterRatio, Molality } kind = Kind::InfiniteDilution;
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
  std::optional<Strength> strength;  ///< with (aq, ...) only
  std::size_t offset = 0, length = 0;  ///< bytes of the whole term in the equation text
};

struct EquationText {
  std::vector<Term> reactants, products;
  bool reversible = false;  ///< written with <=> or ⇌
};

/// Reads `->`, `→`, `=` (between blanks only), `<=>`, `⇌`; terms joined by " + "; coefficients before a blank
/// (or written "3H2" when the rest begins no known name: see equation.cpp); phases and strengths.
/// @errors equation.*; `where` is "offset N"
Result<EquationText> parse_equation(std::string_view text);

}  // namespace heatledger::molecule
