// h(T) − h(298.15 K) of a phase that is kept.
#include "core/thermo/heat_capacity_curve.hpp"
#include "core/thermo/species_enthalpy.hpp"
#include "core/units/constants.hpp"

namespace heatledger::thermo {

Result<Sourced> enthalpy_increment(const facts::Species& species, molecule::Phase phase, double temperature) {
  if (!(temperature > 0)) {
    return Error{"thermo.temperature_range", "A temperature is above zero kelvin.", species.text,
                 "Type a temperature such as 80 degC."};
  }
  if (temperature == units::kReferenceTemperature) {
    Sourced none;
    none.value = uncertainty::Quantity(0);
    none.route = "table";
    none.source = "25 °C";
    return none;
  }
  const Result<HeatCapacityCurve> curve = heat_capacity_curve(species, phase);
  if (!curve.ok()) return curve.error();
  return increment_of(*curve, temperature);
}

}  // namespace heatledger::thermo
