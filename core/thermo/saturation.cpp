#include "core/thermo/saturation.hpp"

#include <algorithm>
#include <cmath>

#include "core/base/number_text.hpp"
#include "core/facts/vapour_pressure.hpp"
#include "core/facts/water_saturation.hpp"
#include "core/thermo/estimated.hpp"
#include "core/units/constants.hpp"

namespace heatledger::thermo {
namespace {

using facts::Species;

constexpr double kWaterU95 = 0.001;  ///< share; the release states 0.1 % or better

bool is_water(const Species& species) {
  return species.compound != nullptr && species.compound->cas == "7732-18-5";
}

/// ln p = ln p0 − slope (1/T − 1/T0), through the boiling point.
struct StraightLine {
  double slope = 0;  ///< [K]
  double boiling = 0;
  double slope_u95 = 0;
  double highest = 0;  ///< [K]
  std::string source;
};

std::optional<StraightLine> straight_line(const Species& species) {
  const facts::Compound* c = species.compound;
  if (c == nullptr || !c->boiling_point) return std::nullopt;
  StraightLine line;
  line.boiling = c->boiling_point->value;
  if (c->critical_temperature && c->critical_pressure && c->critical_temperature->value > line.boiling) {
    line.highest = c->critical_temperature->value;
    line.slope = std::log(c->critical_pressure->value / units::kStandardAtmosphere) /
                 (1 / line.boiling - 1 / line.highest);
    line.source = "straight line of ln p against 1/T through the boiling point and the critical point";
  } else {
    const Result<Sourced> change = best_gas_to_phase(species, molecule::Phase::Liquid, {});
    const double heat = c->vaporisation_enthalpy_boiling ? c->vaporisation_enthalpy_boiling->value
                        : change.ok()                    ? -change->value.value()
                                                         : 0;
    if (!(heat > 0)) return std::nullopt;
    line.highest = 1.5 * line.boiling;
    line.slope = heat / units::kGasConstant;
    line.source =
        "straight line of ln p against 1/T through the boiling point, slope from the vaporisation "
        "enthalpy";
  }
  line.slope_u95 = 0.08 * line.slope;  // the slope of real vapours changes by about this along the line
  return line;
}

Error no_vapour_pressure(const Species& species) {
  return Error{"thermo.no_vapour_pressure", "Nothing here tells the vapour pressure of " + species.name + ".",
               species.text, "Type a boiling point with its source."};
}

Error above_critical(const Species& species, double highest, const std::string& where) {
  return Error{"thermo.temperature_range",
               species.name + " has no vapour pressure above " + display_number(highest, 1) + " K.", where,
               "Write it as gas."};
}

}  // namespace

Result<Saturation> vapour_pressure(const Species& species, double temperature) {
  const std::string where = display_number(temperature, 2) + " K";
  Saturation result;
  if (is_water(species)) {
    const Result<facts::SaturatedWater> water = facts::saturated_water(temperature);
    if (!water.ok()) return water.error();
    result.value = water->pressure;
    result.u95 = kWaterU95 * water->pressure;
    result.source = "IAPWS SR1-86(1992)";
    return result;
  }
  if (species.compound != nullptr) {
    const facts::VapourPressure* equation = facts::find_vapour_pressure(*species.compound);
    if (equation != nullptr && temperature >= equation->from && temperature <= equation->to) {
      const Result<facts::PressureValue> value = facts::vapour_pressure(*equation, temperature);
      if (!value.ok()) return value.error();
      result.value = value->pressure;
      result.u95 = value->u95;
      result.source = std::string(equation->source);
      return result;
    }
  }
  const std::optional<StraightLine> line = straight_line(species);
  if (!line) return no_vapour_pressure(species);
  if (temperature > line->highest) return above_critical(species, line->highest, where);
  const double distance = 1 / temperature - 1 / line->boiling;
  result.value = units::kStandardAtmosphere * std::exp(-line->slope * distance);
  result.u95 = result.value * (0.02 + std::fabs(line->slope_u95 * distance));
  result.source = line->source;
  result.estimated = true;
  return result;
}

Result<Saturation> boiling_temperature(const Species& species, double pressure) {
  const std::string where = display_number(pressure / 1000, 3) + " kPa";
  Saturation result;
  if (!(pressure > 0)) {
    return Error{"thermo.pressure_range", "A pressure is above zero.", where,
                 "Type a pressure such as 3 bar."};
  }
  if (is_water(species)) {
    const Result<double> boiling = facts::boiling_temperature_of_water(pressure);
    if (!boiling.ok()) return boiling.error();
    result.value = *boiling;
    result.u95 = 0.05;
    result.source = "IAPWS SR1-86(1992)";
    return result;
  }
  const facts::Compound* c = species.compound;
  if (c != nullptr && c->boiling_point && std::fabs(pressure - units::kStandardAtmosphere) < 1) {
    result.value = c->boiling_point->value;
    result.u95 = c->boiling_point->u95;
    result.source = std::string(c->boiling_point->source);
    return result;
  }
  if (c != nullptr && c->critical_pressure && pressure > c->critical_pressure->value) {
    return Error{"thermo.pressure_range",
                 species.name + " does not boil above its critical pressure, " +
                     display_number(c->critical_pressure->value / 1000, 0) + " kPa.",
                 where, "Write the phase that is meant."};
  }
  const std::optional<StraightLine> line = straight_line(species);
  const facts::VapourPressure* equation = c != nullptr ? facts::find_vapour_pressure(*c) : nullptr;
  double low = 0, high = 0;
  if (line) {
    low = 0.4 * line->boiling;
    high = line->highest;
  } else if (equation != nullptr) {
    low = equation->from;
    high = equation->to;
  } else {
    return no_vapour_pressure(species);
  }
  // Bisection: the pressure rises with temperature, and 60 halvings end below a nanokelvin.
  const double lowest = low, highest = high;
  for (int i = 0; i < 60; ++i) {
    const double middle = (low + high) / 2;
    const Result<Saturation> there = vapour_pressure(species, middle);
    if (!there.ok()) return there.error();
    (there->value < pressure ? low : high) = middle;
  }
  result.value = (low + high) / 2;
  if (result.value - lowest < 1e-6 || highest - result.value < 1e-6) {
    return Error{"thermo.pressure_range",
                 "The boiling temperature of " + species.name + " at that pressure lies outside " +
                     display_number(lowest, 0) + " to " + display_number(highest, 0) + " K.",
                 where, "Type the boiling temperature with its source."};
  }
  const Result<Saturation> here = vapour_pressure(species, result.value);
  if (!here.ok()) return here.error();
  const Result<Saturation> above = vapour_pressure(species, std::min(result.value * 1.001, highest));
  const double slope =
      above.ok() ? (above->value - here->value) / (std::min(result.value * 1.001, highest) - result.value)
                 : 0;
  result.u95 = slope > 0 ? here->u95 / slope : 0.02 * result.value;
  result.source = here->source;
  result.estimated = here->estimated;
  return result;
}

std::optional<CriticalPoint> critical_point(const Species& species) {
  const facts::Compound* c = species.compound;
  CriticalPoint point;
  if (c == nullptr) return std::nullopt;
  if (c->critical_temperature) {
    point.temperature = c->critical_temperature->value;
  } else if (c->boiling_point) {
    point.temperature = 1.5 * c->boiling_point->value;
    point.estimated = true;
  } else {
    return std::nullopt;
  }
  if (c->critical_pressure) {
    point.pressure = c->critical_pressure->value;
  } else if (species.graph) {
    std::size_t atoms = species.graph->atoms.size();
    for (const molecule::Atom& atom : species.graph->atoms) atoms += static_cast<std::size_t>(atom.hydrogens);
    const double root = 0.113 + 0.0032 * static_cast<double>(atoms);
    point.pressure = 1e5 / (root * root);
    point.estimated = true;
  } else {
    return std::nullopt;
  }
  return point;
}

std::string ideal_gas_caution(const Species& species, double temperature, double pressure) {
  const std::optional<CriticalPoint> critical = critical_point(species);
  if (!critical || !(temperature > 0) || !(pressure > 0)) return {};
  const double reduced_t = temperature / critical->temperature, reduced_p = pressure / critical->pressure;
  double virial = 0.083 - 0.422 / std::pow(reduced_t, 1.6);
  if (!critical->estimated && species.compound->boiling_point) {
    const double ratio = critical->temperature / species.compound->boiling_point->value - 1;
    const double acentric = 3.0 / 7 * std::log10(critical->pressure / units::kStandardAtmosphere) / ratio - 1;
    if (ratio > 0) virial += acentric * (0.139 - 0.172 / std::pow(reduced_t, 4.2));
  }
  const double off = virial * reduced_p / reduced_t;  // compression factor − 1
  constexpr double kOff = 0.05;
  if (std::fabs(off) <= kOff) return {};
  return species.name + ": at " + display_number(pressure / 1e5, 2) + " bar and " +
         display_number(temperature - 273.15, 0) +
         " °C the gas is no longer ideal (compression factor off one by " +
         (std::fabs(off) > 1 ? std::string("more than 100")
                             : "about " + display_number(100 * std::fabs(off), 0)) +
         " %; critical point " + display_number(critical->temperature - 273.15, 0) + " °C, " +
         display_number(critical->pressure / 1e5, 1) + " bar" + (critical->estimated ? ", estimated" : "") +
         "). Its enthalpy is reckoned as ideal.";
}

}  // namespace heatledger::thermo
