// Heat capacity, enthalpy and entropy as polynomials of temperature: gases, liquids, solids at 1 bar.
#pragma once

#include <array>
#include <span>
#include <string_view>
#include <vector>

#include "core/base/result.hpp"

namespace heatledger::facts {

/// One temperature range of a species.
struct PolynomialRange {
  double from = 0, to = 0;    ///< [K]
  std::array<double, 7> a{};  ///< coefficients as tables/polynomials.tsv defines them
};

/// A species in one phase with its ranges in rising order, joined without gaps.
struct Polynomial {
  std::string_view name;
  std::string_view formula;  ///< Hill
  char phase = 'g';          ///< 'g', 'l', 's'
  bool stable_at_298 =
      true;  ///< false: a phase that appears above 298 K; its enthalpy is on the element's scale all the same
  double formation_enthalpy = 0;  ///< [J/mol] at 298.15 K, as the report prints it; 0 when not stable then
  std::vector<PolynomialRange> ranges;

  double lowest() const { return ranges.front().from; }  ///< [K]
  double highest() const { return ranges.back().to; }    ///< [K]
};

/// What the polynomial gives at one temperature.
struct PolynomialValue {
  double cp = 0;  ///< [J/(mol K)]
  double h = 0;   ///< [J/mol]; formation enthalpy at 298.15 K plus the increment from there
  double s = 0;   ///< [J/(mol K)] at 1 bar
};

/// @param temperature  [K] within the ranges; ranges that begin at 300 K are used from 298.15 K on
/// @errors thermo.temperature_range: outside; the message names the range
/// @source McBride, Gordon, Reno, NASA TM-4513, 1993; gas constant of that report 8.314510 J/(mol K)
Result<PolynomialValue> evaluate(const Polynomial& polynomial, double temperature);

/// All, in the order of the table; read at first use.
const std::vector<Polynomial>& polynomials();
/// By name (forgiving as Library::find_name) and phase; nullptr when there is none.
const Polynomial* find_polynomial(std::string_view name, char phase);
/// All of one composition and phase. @param hill  Hill text
std::vector<const Polynomial*> find_polynomials(std::string_view hill, char phase);

}  // namespace heatledger::facts
