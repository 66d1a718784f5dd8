#include "core/burning/answer.hpp"
#include "core/step/words.hpp"

namespace heatledger::burning {

namespace {

bool holds(const BurnInput& in, Element element) {
  for (const Stream& stream : in.streams) {
    for (const Part& part : stream.parts) {
      if (part.moles > 0 && of(part.atoms, element) > 0) return true;
    }
  }
  return false;
}

/// Nitrogen that is not N2.
bool fuel_nitrogen(const BurnInput& in) {
  for (const Stream& stream : in.streams) {
    for (const Part& part : stream.parts) {
      if (part.moles > 0 && of(part.atoms, Element::N) > 0 && oxygen_demand(part.atoms) > 0) return true;
    }
  }
  return false;
}

}  // namespace

std::vector<std::string> cautions(const BurnInput& in, const Numbers& n) {
  std::vector<std::string> all;
  std::string equilibrium =
      "NO, CO and the like at chemical equilibrium are no emission predictions: burners leave far more or "
      "far "
      "less of them than the flame's equilibrium.";
  if (fuel_nitrogen(in)) equilibrium += " Nitrogen bound in the fuel gives far more NO.";
  all.push_back(std::move(equilibrium));
  if (holds(in, Element::Cl)) {
    all.push_back(
        "Chlorine to hydrogen chloride freezes at a temperature above that of the stack: expect some Cl2, "
        "and ask "
        "for a quench and scrubber laid out by measurement. Dioxins and furans are not assessed.");
  }
  if (holds(in, Element::S)) {
    all.push_back(
        "A part of the sulfur dioxide becomes trioxide on the way to the stack; how much is measured, not "
        "calculated here. It sets the acid dew point.");
  }
  if (!n.complete) {
    all.push_back(
        "There is less oxygen than complete burning needs: carbon monoxide and hydrogen stay in the flue "
        "gas, and only the figures at chemical equilibrium stand.");
  }
  if (n.equilibrium && n.equilibrium->carbon_activity > 1) {
    all.push_back("At this equilibrium soot would form: the activity of carbon against graphite is " +
                  step::digits(n.equilibrium->carbon_activity) +
                  ". The equilibrium shown is that of the gases alone.");
  }
  bool vent = false;
  for (const FuelNumbers& fuel : n.fuels) {
    const Stream& stream = in.streams[fuel.stream];
    if (stream.role != Role::Vent || fuel.lfl_at <= 0) continue;
    vent = true;
    if (fuel.combustible_share > 0.25 * fuel.lfl_at) {
      all.push_back("The vent " + stream.name +
                    " lies above 25 % of its lower flammability limit, the customary bound "
                    "without monitoring; measure the limit before the vent is laid out.");
    }
  }
  if (vent) {
    all.push_back(
        "Flammability limits by rule hold for gases in air: they are not valid for enriched oxygen, mist "
        "and dust, or mixtures that halogens inhibit. Measurement and local codes go first.");
  }
  if (in.flue_temperature && n.dew_point && in.flue_temperature->value < *n.dew_point) {
    all.push_back("The flue gas leaves below its water dew point, " + step::celsius(*n.dew_point) +
                  ": water condenses there, and its heat is not in the heat to the load.");
  }
  if (n.quench_temperature && n.dew_point && *n.quench_temperature < *n.dew_point) {
    all.push_back("More water is sprayed in than evaporates: behind the quench the gas is saturated near " +
                  step::celsius(*n.dew_point) + " and water is left over.");
  }
  if (in.pressure > 1e6)
    all.push_back("Above 10 bar the gases depart from the ideal gas that is reckoned with.");
  all.push_back(
      "Purging, flame supervision, interlocks and flame arresters are laid out by the local code and "
      "licensed practice, not by this sheet.");
  return all;
}

}  // namespace heatledger::burning
