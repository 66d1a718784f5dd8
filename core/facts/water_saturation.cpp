#include "core/facts/water_saturation.hpp"

#include <array>
#include <cmath>
#include <string>

#include "core/base/number_text.hpp"

namespace heatledger::facts {

namespace {

constexpr double kTriple = 273.16, kCritical = 647.096;  ///< [K]
constexpr double kCriticalPressure = 22.064e6;           ///< [Pa]
constexpr double kCriticalDensity = 322;                 ///< [kg/m3]

struct Term {
  double factor, power;
};

template <std::size_t N>
double sum(const std::array<Term, N>& terms, double base) {
  double total = 0;
  for (const Term& term : terms) total += term.factor * std::pow(base, term.power);
  return total;
}

constexpr std::array<Term, 6> kPressure = {{{-7.85951783, 1},
                                            {1.84408259, 1.5},
                                            {-11.7866497, 3},
                                            {22.6807411, 3.5},
                                            {-15.9618719, 4},
                                            {1.80122502, 7.5}}};
constexpr std::array<Term, 6> kLiquid = {{{1.99274064, 1.0 / 3},
                                          {1.09965342, 2.0 / 3},
                                          {-0.510839303, 5.0 / 3},
                                          {-1.75493479, 16.0 / 3},
                                          {-45.5170352, 43.0 / 3},
                                          {-6.74694450e5, 110.0 / 3}}};
constexpr std::array<Term, 6> kVapour = {{{-2.03150240, 2.0 / 6},
                                          {-2.68302940, 4.0 / 6},
                                          {-5.38626492, 8.0 / 6},
                                          {-17.2991605, 18.0 / 6},
                                          {-44.7586581, 37.0 / 6},
                                          {-63.9201063, 71.0 / 6}}};
constexpr std::array<Term, 5> kAlpha = {
    {{-5.65134998e-8, -19}, {2690.66631, 1}, {127.287297, 4.5}, {-135.003439, 5}, {0.981825814, 54.5}}};
constexpr double kAlphaOffset = -1135.905627715;  ///< [kJ/kg]

double log_pressure(double t) {
  return kCritical / t * sum(kPressure, 1 - t / kCritical);
}

/// d ln(p) / dT, from the same terms.
double log_pressure_slope(double t) {
  const double tau = 1 - t / kCritical;
  double derivative = 0;
  for (const Term& term : kPressure) derivative += term.factor * term.power * std::pow(tau, term.power - 1);
  return -(log_pressure(t) + derivative) / t;
}

}  // namespace

Result<SaturatedWater> saturated_water(double temperature) {
  if (!(temperature >= kTriple && temperature <= kCritical)) {
    const std::string where =
        std::isfinite(temperature) ? machine_number(temperature, 6) + " K" : "temperature";
    return Error{"thermo.temperature_range",
                 "Water and steam stand side by side from 273.16 to 647.096 K only.", where,
                 "Choose a temperature between the triple point and the critical point."};
  }
  const double t = temperature, tau = 1 - t / kCritical;
  SaturatedWater w;
  w.temperature = t;
  w.pressure = kCriticalPressure * std::exp(log_pressure(t));
  w.pressure_slope = w.pressure * log_pressure_slope(t);
  w.liquid_density = kCriticalDensity * (1 + sum(kLiquid, tau));
  w.vapour_density = kCriticalDensity * std::exp(sum(kVapour, tau));
  const double alpha = 1000 * (kAlphaOffset + sum(kAlpha, t / kCritical));
  w.liquid_enthalpy = alpha + t / w.liquid_density * w.pressure_slope;
  w.vapour_enthalpy = alpha + t / w.vapour_density * w.pressure_slope;
  return w;
}

Result<double> boiling_temperature_of_water(double pressure) {
  const double lowest = kCriticalPressure * std::exp(log_pressure(kTriple));
  if (!(pressure >= lowest && pressure <= kCriticalPressure)) {
    const std::string where = std::isfinite(pressure) ? machine_number(pressure, 6) + " Pa" : "pressure";
    return Error{"thermo.pressure_range", "Water boils between 611.657 Pa and 22.064 MPa only.", where,
                 "Choose a pressure between the triple point and the critical point."};
  }
  // ln p rises all the way: halving the interval cannot fail, and 60 halvings reach the last bit.
  double low = kTriple, high = kCritical;
  const double wanted = std::log(pressure / kCriticalPressure);
  for (int i = 0; i < 60; ++i) {
    const double middle = 0.5 * (low + high);
    (log_pressure(middle) < wanted ? low : high) = middle;
  }
  return 0.5 * (low + high);
}

}  // namespace heatledger::facts
