#include "core/safety/utilities.hpp"

#include <cmath>

#include "core/base/number_text.hpp"
#include "core/facts/water_saturation.hpp"
#include "core/step/words.hpp"
#include "core/thermo/heat_capacity_curve.hpp"
#include "core/thermo/heating_path.hpp"
#include "core/thermo/saturation.hpp"
#include "core/units/constants.hpp"

namespace heatledger::safety {
namespace {

namespace d = units::dimension;
using step::Finding;
using uncertainty::Quantity;

const char* const kSaturationSource =
    "IAPWS SR1-86 (1992); W. Wagner and A. Pruss, J. Phys. Chem. Ref. Data 22 (1993) 783";

Finding finding(const char* id, std::string label, const units::Dimension& dimension) {
  Finding made;
  made.id = std::string("utility.") + id;
  made.label = std::move(label);
  made.dimension = dimension;
  return made;
}

/// Heat over something positive; more heat is worse.
void divide(Finding& of, const Quantity& heat, double by) {
  of.value = heat.scaled((heat.value() < 0 ? -1 : 1) / by);
  if (of.value.u95() > 0) of.unfavourable = of.value.value() + of.value.u95();
}

std::string kilojoules(double joules) {
  return step::digits(joules / 1000);
}

const facts::Species* water() {
  static const Result<std::shared_ptr<const facts::Species>> species = facts::resolve_species("water", false);
  return species.ok() ? species->get() : nullptr;
}

Finding medium_flow(const UtilityInput& input) {
  const std::string name = input.medium.empty() ? "cooling water" : input.medium;
  Finding flow = finding("flow", "flow of " + name, d::kMassFlow);
  const double rise = input.medium_out->value - input.medium_in->value;
  if (rise * input.heat.value() >= 0) {
    flow.why_missing = std::string("the medium has to leave ") +
                       (input.heat.value() < 0 ? "warmer" : "colder") + " than it enters";
    return flow;
  }
  double capacity = 0;
  if (input.medium_heat_capacity) {
    capacity = input.medium_heat_capacity->value;
    flow.sources = {"heat capacity typed"};
  } else if (name == "cooling water" || name == "water" || name == "warm water") {
    const Result<thermo::HeatCapacityCurve> curve =
        thermo::heat_capacity_curve(*water(), molecule::Phase::Liquid);
    if (!curve.ok()) {
      flow.why_missing = curve.error().message;
      return flow;
    }
    capacity =
        std::fabs(curve->increment(input.medium_out->value) - curve->increment(input.medium_in->value)) /
        std::fabs(rise) / water()->molar_mass;
    flow.sources = {"heat capacity of liquid water by its table, mean over the rise"};
  } else {
    flow.why_missing = "type the heat capacity of the " + name + ": it depends on its strength or grade";
    return flow;
  }
  divide(flow, input.heat, capacity * std::fabs(rise));
  flow.working = {input.heat_words + " " + step::heat_text(std::fabs(input.heat.value()), true) + " ÷ (" +
                  kilojoules(capacity) + " kJ/(kg K) × " + step::digits(std::fabs(rise)) + " K)"};
  return flow;
}

std::vector<Finding> steam(const UtilityInput& input) {
  Finding temperature = finding("steam_temperature", "saturation temperature of the steam", d::kTemperature),
          flow = finding("steam", "steam that condenses", d::kMassFlow);
  const double pressure = input.steam_pressure->value;
  const Result<double> at = facts::boiling_temperature_of_water(pressure);
  const Result<facts::SaturatedWater> line = at.ok() ? facts::saturated_water(*at) : at.error();
  if (!line.ok()) {
    flow.why_missing = line.error().message;
    return {std::move(flow)};
  }
  temperature.value = Quantity(line->temperature);
  temperature.working = {"saturated steam at " + step::digits(pressure / 1e5) + " bar absolute"};
  temperature.sources = {kSaturationSource};
  if (!(input.heat.value() > 0)) {
    flow.why_missing = "this step gives heat away; steam supplies it";
    return {std::move(temperature), std::move(flow)};
  }
  const double latent = line->vapour_enthalpy - line->liquid_enthalpy;
  divide(flow, input.heat, latent);
  flow.working = {input.heat_words + " " + step::heat_text(input.heat.value(), true) + " ÷ " +
                      kilojoules(latent) + " kJ/kg of latent heat",
                  "saturated steam in, condensate out at the same temperature"};
  flow.sources = {kSaturationSource};
  return {std::move(temperature), std::move(flow)};
}

struct Boiling {
  double temperature = 0;  ///< [K]
  Quantity latent;         ///< [J/kg]
  std::vector<std::string> sources;
};

/// Water by its saturation line, anything else by the tables of this program.
Result<Boiling> boiling(const facts::Species& species, double pressure) {
  if (water() != nullptr && species.compound != nullptr && species.compound == water()->compound) {
    const Result<double> at = facts::boiling_temperature_of_water(pressure);
    const Result<facts::SaturatedWater> line = at.ok() ? facts::saturated_water(*at) : at.error();
    if (!line.ok()) return line.error();
    return Boiling{
        line->temperature, Quantity(line->vapour_enthalpy - line->liquid_enthalpy), {kSaturationSource}};
  }
  const Result<thermo::Saturation> at = thermo::boiling_temperature(species, pressure);
  if (!at.ok()) return at.error();
  // Near its boiling point the tabulated heat stands closer than one carried there from 25 °C.
  constexpr double kNear = 10;  // [K], over which it changes by some 2 %
  const facts::Compound* c = species.compound;
  if (c != nullptr && c->boiling_point && c->vaporisation_enthalpy_boiling && species.molar_mass > 0 &&
      std::fabs(c->boiling_point->value - at->value) < kNear) {
    const facts::Datum& tabulated = *c->vaporisation_enthalpy_boiling;
    const Quantity heat(tabulated.value, tabulated.u95,
                        thermo::figure_key(uncertainty::SourceKind::Phase, species, molecule::Phase::Liquid));
    return Boiling{
        at->value, heat.scaled(1 / species.molar_mass), {at->source, std::string(tabulated.source)}};
  }
  const Result<thermo::Sourced> latent = thermo::vaporisation_enthalpy(species, at->value);
  if (!latent.ok()) return latent.error();
  if (!(latent->value.value() > 0) || !(species.molar_mass > 0))
    return Error{"thermo.no_phase_change_data", "It has no heat of vaporisation there.", "", ""};
  return Boiling{at->value, latent->value.scaled(1 / species.molar_mass), {at->source, latent->source}};
}

Finding coolant(const UtilityInput& input) {
  const facts::Species& species = *input.coolant;
  Finding flow = finding("coolant", species.name + " that evaporates", d::kMassFlow);
  if (!(input.heat.value() < 0)) {
    flow.why_missing = "this step asks for heat; a coolant takes it away";
    return flow;
  }
  const double pressure = input.coolant_pressure ? input.coolant_pressure->value : units::kStandardAtmosphere;
  const Result<Boiling> boils = boiling(species, pressure);
  if (!boils.ok()) {
    flow.why_missing = boils.error().message;
    return flow;
  }
  const Quantity& latent = boils->latent;
  divide(flow, input.heat, latent.value());
  flow.value.add(Quantity(0, latent.parts()), -flow.value.value() / latent.value());
  if (flow.value.u95() > 0) flow.unfavourable = flow.value.value() + flow.value.u95();
  flow.working = {
      "boils at " + step::celsius(boils->temperature) + " under " + step::digits(pressure / 1000) + " kPa",
      input.heat_words + " " + step::heat_text(-input.heat.value(), true) + " ÷ " +
          kilojoules(latent.value()) + " kJ/kg"};
  flow.sources = boils->sources;
  return flow;
}

Finding area(const UtilityInput& input) {
  Finding made = finding("area", "surface asked for", d::kArea);
  if (!input.conductance) {
    made.why_missing = "type the temperature of the medium, and for a charge the time over which it reacts";
    return made;
  }
  divide(made, *input.conductance, input.heat_transfer_coefficient->value);
  made.working = {"UA " + step::digits(input.conductance->value() / 1000) + " kW/K ÷ U " +
                      step::digits(input.heat_transfer_coefficient->value) +
                      " W/(m² K), fouling included in U",
                  "mean temperature difference: " + input.mean_difference};
  return made;
}

}  // namespace

step::FindingGroup utilities(const UtilityInput& input) {
  step::FindingGroup group{"utilities", "Utilities", input.heat_words, {}};
  if (input.medium_in && input.medium_out && input.medium_in->value != input.medium_out->value)
    group.findings.push_back(medium_flow(input));
  if (input.steam_pressure) {
    for (Finding& one : steam(input)) group.findings.push_back(std::move(one));
  }
  if (input.coolant != nullptr) group.findings.push_back(coolant(input));
  if (input.heat_transfer_coefficient) group.findings.push_back(area(input));
  return group;
}

}  // namespace heatledger::safety
