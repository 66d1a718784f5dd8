#include "core/step/words.hpp"

#include <cmath>

#include "core/base/number_text.hpp"
#include "core/units/display.hpp"
#include "core/units/quantity_text.hpp"

namespace heatledger::step {
namespace {

struct Prefix {
  double factor;
  const char* text;
};
constexpr Prefix kPrefixes[] = {{1e9, "G"}, {1e6, "M"}, {1e3, "k"}, {1, ""}};

std::string with_prefix(double value, const char* unit) {
  for (const Prefix& prefix : kPrefixes) {
    if (std::fabs(value) >= prefix.factor || prefix.factor == 1)
      return digits(value / prefix.factor) + ' ' + prefix.text + unit;
  }
  return digits(value) + ' ' + unit;
}

}  // namespace

std::string digits(double value) {
  const double size = std::fabs(value);
  int decimals = 3;
  for (double limit = 10; decimals > 0 && size >= limit; limit *= 10) --decimals;
  if (size > 0 && size < 1) {
    for (double limit = 1; decimals < 9 && size < limit; limit /= 10) ++decimals;
  }
  return display_number(value, decimals);
}

std::string heat_text(double heat, bool flow) {
  return with_prefix(heat, flow ? "W" : "J");
}

std::string amount_text(double amount, bool flow) {
  return with_prefix(amount, flow ? "mol/s" : "mol");
}

std::string mass_text(double mass, bool flow) {
  return digits(mass) + (flow ? " kg/s" : " kg");
}

std::string celsius(double kelvin) {
  return display_number(kelvin - 273.15, 1) + " °C";
}

std::string value_text(double value, const units::Dimension& dimension, bool flow) {
  if (dimension == units::dimension::kTemperature) return celsius(value);
  if (dimension == units::dimension::kPower || dimension == units::dimension::kEnergy)
    return heat_text(value, flow);
  if (dimension == units::dimension::kMolarFlow || dimension == units::dimension::kAmount)
    return amount_text(value, flow);
  if (dimension == units::dimension::kNumber) return digits(value * 100) + " %";
  const std::vector<std::string_view> suited = units::suggested_units(dimension);
  if (suited.empty()) return digits(value);
  const Result<units::Unit> unit = units::parse_unit(suited.front());
  return unit.ok() ? digits(unit->from_si(value)) + ' ' + unit->display : digits(value);
}

}  // namespace heatledger::step
