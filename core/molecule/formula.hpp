// Molecular formulas: composition, molar mass, text. Condensed line formulas become graphs in
// line_formula.hpp.
#pragma once

#include <map>
#include <string>
#include <string_view>

#include "core/base/result.hpp"
#include "core/molecule/graph.hpp"

namespace heatledger::molecule {

/// Atoms of a species and its charge. Key: atomic number, plus 1000 × mass number for a named isotope (D is
/// 2001). Counts may be fractional (hydrates such as CaSO4·0.5H2O).
struct Composition {
  std::map<int, double> atoms;
  int charge = 0;

  friend bool operator==(const Composition& a, const Composition& b) {
    return a.charge == b.charge && a.atoms == b.atoms;
  }
};

/// Reads molecular and structural formulas for their composition.
///   groups     ( ) [ ] { } nested to 64 levels, each with a multiplier; after a bracket also a fraction,
///   "(…)1/2" counts     plain or subscript digits; decimals only below one ("Fe0.95O"), since "CuSO4.5H2O"
///   is a hydrate hydrates   · * . • ∙ ⋅ with a coefficient: "CuSO4·5H2O", "CaSO4·0.5H2O", "CaSO4·1/2H2O",
///   "CaSO4·½H2O" isotopes   D, T, "[13C]", "¹³C" charges    "^2-", "^-2", superscripts ("SO₄²⁻"), after a
///   blank ("SO4 2-"), sign first ("SO4-2", "Hg2+2"), plain
///              sign ("NH4+", "Fe+++"). A digit just before the sign is a count ("NO3-" is one negative
///              charge), except: a metal alone ("Fe3+"), a bracketed ion ("[Fe(CN)6]3-"), and two digits
///              after a last O ("SO42-"). "I3-" and "S2-" have two readings and are refused.
/// @errors formula.empty, formula.unexpected, formula.unknown_element, formula.unclosed_bracket,
///         formula.stray_bracket, formula.empty_bracket, formula.zero_count, formula.too_large,
///         formula.too_deep, formula.bad_isotope, formula.bad_charge, formula.ambiguous_charge,
///         formula.leading_number, formula.empty_part; `where` is "offset N"
/// @complexity linear in the text
/// @example Formula.ReadsEverySpellingOfACharge
Result<Composition> parse_formula(std::string_view text);
Composition composition(const Graph& graph);
/// [g/mol]; charge is not counted (an electron weighs 0.00055 g/mol).
double molar_mass(const Composition& composition);
/// Hill order with plain digits ("C6H5NO2"): with carbon C, H, then by symbol; without carbon all by symbol.
/// D and T follow H, other isotopes follow their element as "[13C]". Charge as "^+", "^2-". Fractional counts
/// as a multiple of whole ones
/// ("(Ca2H2O9S2)1/2"). Reads back through parse_formula to the same composition.
/// @source E. A. Hill, J. Am. Chem. Soc. 22 (1900) 478
std::string hill_formula(const Composition& composition);
/// The same with subscript digits and superscript charge for display ("C₆H₅NO₂", "O₄S²⁻").
std::string display_formula(const Composition& composition);

/// Plain formula text as typed with its digits set for display: "CH3CH2OH" to "CH₃CH₂OH", "SO4^2-" to
/// "SO₄²⁻", "CuSO4.5H2O" to "CuSO₄·5H₂O". The order of the typed text is kept.
/// @return the text unchanged when parse_formula refuses it
std::string typeset_formula(std::string_view text);

}  // namespace heatledger::molecule
