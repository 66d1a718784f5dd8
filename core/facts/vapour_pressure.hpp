// Vapour pressure of a liquid from published equations.
#pragma once

#include <array>
#include <string_view>
#include <vector>

#include "core/base/result.hpp"
#include "core/facts/compound.hpp"

namespace heatledger::facts {

struct VapourPressure {
  enum class Form : char {
    Logarithmic = 'l',  ///< p/Pa = exp(c1 + c2/T + c3 ln T + c4 T^c5)
    Antoine = 'a',      ///< log10(p/Pa) = c1 - c2/(T + c3)
  };
  std::string_view cas;
  Form form = Form::Logarithmic;
  double from = 0, to = 0;  ///< range of validity [K]
  std::array<double, 5> c{};
  std::string_view source;
};

/// Pressure with the ± of the equation.
struct PressureValue {
  double pressure = 0;  ///< [Pa]
  double u95 =
      0;  ///< [Pa]; 2 % of the pressure, 5 % below 10 kPa: the scatter of such equations about measurements
};

/// All rows of the table.
const std::vector<VapourPressure>& vapour_pressures();
/// The equation of a compound; nullptr when there is none.
const VapourPressure* find_vapour_pressure(const Compound& compound);

/// @param temperature  [K] within the range of the equation
/// @errors thermo.temperature_range: outside; the message names the range
Result<PressureValue> vapour_pressure(const VapourPressure& equation, double temperature);

}  // namespace heatledger::facts
