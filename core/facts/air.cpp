#include "core/facts/air.hpp"

#include "core/base/check.hpp"
#include "core/facts/water_saturation.hpp"
#include "core/molecule/formula.hpp"

namespace heatledger::facts {

const std::array<AirComponent, 4>& dry_air() {
  static constexpr std::array<AirComponent, 4> air = {{{"nitrogen", "N2", 0.78084},
                                                       {"oxygen", "O2", 0.20946},
                                                       {"argon", "Ar", 0.00934},
                                                       {"carbon dioxide", "CO2", 0.00036}}};
  return air;
}

const std::array<AirComponent, 2>& textbook_air() {
  static constexpr std::array<AirComponent, 2> air = {
      {{"nitrogen", "N2", 3.76 / 4.76}, {"oxygen", "O2", 1 / 4.76}}};
  return air;
}

double dry_air_molar_mass() {
  static const double mass = [] {
    double sum = 0;
    for (const AirComponent& part : dry_air()) {
      const Result<molecule::Composition> composition = molecule::parse_formula(part.formula);
      CHECK(composition.ok(), "the formulas of air can be read");
      sum += part.mole_fraction * molecule::molar_mass(*composition) * 1e-3;
    }
    return sum;
  }();
  return mass;
}

Result<double> moles_water_per_mole_dry_air(double relative_humidity, double temperature, double pressure) {
  if (!(relative_humidity >= 0 && relative_humidity <= 1)) {
    return Error{"air.humidity", "A relative humidity lies between 0 and 100 %.", "humidity",
                 "Type a value such as 60 %."};
  }
  const Result<SaturatedWater> water = saturated_water(temperature);
  if (!water) return water.error();
  const double steam = relative_humidity * water->pressure;
  if (!(steam < pressure)) {
    return Error{"air.no_dry_air", "At this temperature and humidity water vapour alone fills the pressure.",
                 "humidity", "Lower the humidity or the temperature, or raise the pressure."};
  }
  return steam / (pressure - steam);
}

}  // namespace heatledger::facts
