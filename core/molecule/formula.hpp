// Molecular formulas: composition, molar mass, text. Condensed line formulas become graphs in line_formula.hpp.
#pragma once

#include <map>
#include <string>
#include <string_view>

#include "core/base/result.hpp"
#include "core/molecule/graph.hpp"

namespace heatledger::molecule {

/// Atoms of a species and its charge. Key: atomic number, plus 1000 × mass number for a named isotope (D is 2001).
/// Counts may be fractional (hydrates such as CaSO4·0.5H2O).
struct Composition {
  std::map<int, double> atoms;
  int charge = 0;

  friend bool operator==(const Composition& a, const Composition& b) {
    return a.charge == b.charge && a.atoms == b.atoms;
  }
};

/// Reads nested brackets, hydrates ("CuSO4·5H2O", "*" or "." for the dot), charges ("SO4^2-", "NH4+", "SO4-2"),
/// D and T, subscript digits.
/// @errors formula.*; `where` is "offset N"
Result<Composition> parse_formula(std::string_view text);
Composition composition(const Graph& graph);
/// [g/mol]
double molar_mass(const Composition& composition);
/// Hill order, plain digits ("C6H5NO2"); charge as "+", "2-".
std::string hill_formula(const Composition& composition);
/// The same with subscript digits and superscript charge for display ("C₆H₅NO₂", "SO₄²⁻").
std::string display_formula(const Composition& composition);

}  // namespace heatledger::molecule
