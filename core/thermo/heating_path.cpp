#include "core/thermo/heating_path.hpp"

#include <cmath>

#include "core/base/number_text.hpp"
#include "core/thermo/estimated.hpp"
#include "core/thermo/heat_capacity_curve.hpp"
#include "core/thermo/saturation.hpp"
#include "core/units/constants.hpp"

namespace heatledger::thermo {
namespace {

using facts::Datum;
using facts::Species;
using molecule::Phase;
using uncertainty::Quantity;
using uncertainty::SourceKind;

constexpr double kJ = 1000.0;
constexpr double kReference = units::kReferenceTemperature;

std::string celsius(double kelvin) {
  return display_number(kelvin - 273.15, 1) + " °C";
}

std::string lettered(const Species& species, Phase phase) {
  return species.name + " (" + std::string(molecule::phase_text(phase)) + ")";
}

void append(Sourced& to, const Sourced& from) {
  to.working.insert(to.working.end(), from.working.begin(), from.working.end());
  to.cautions.insert(to.cautions.end(), from.cautions.begin(), from.cautions.end());
}

Error no_data(const Species& species, const std::string& what) {
  return Error{"thermo.no_phase_change_data", "No table here has " + what + " of " + species.name + ".",
               species.text, "Type it with its source."};
}

/// h(T) of the new phase less h(T) of the old one, from their difference at 298.15 K and Kirchhoff.
Result<Sourced> carried(const Species& species, const Sourced& at_298, Phase old, Phase now,
                        double temperature) {
  Sourced result = at_298;
  const Result<HeatCapacityCurve> before = heat_capacity_curve(species, old),
                                  after = heat_capacity_curve(species, now);
  if (temperature == kReference) return result;
  if (!before.ok()) return before.error();
  if (!after.ok()) return after.error();
  const Result<Sourced> left = increment_of(*before, temperature), right = increment_of(*after, temperature);
  if (!left.ok()) return left;
  if (!right.ok()) return right;
  result.value.add(right->value);
  result.value.add(left->value, -1);
  append(result, *right);
  append(result, *left);
  return result;
}

/// Liquid to gas, solid to liquid, solid to gas at 298.15 K; backwards with the other sign.
Result<Sourced> change_at_298(const Species& species, Phase old, Phase now) {
  if (old == Phase::Gas || now == Phase::Gas) {
    const Phase condensed = old == Phase::Gas ? now : old;
    Result<Sourced> change = best_gas_to_phase(species, condensed, {});
    if (!change.ok()) return change;
    Sourced result = std::move(change).value();
    if (now == Phase::Gas) result.value = result.value.scaled(-1);
    return result;
  }
  Result<Sourced> after = best_formation(species, now, {});
  const Result<Sourced> before = best_formation(species, old, {});
  if (!after.ok()) return after;
  if (!before.ok()) return before;
  Sourced result = std::move(after).value();
  result.value.add(before->value, -1);
  append(result, *before);
  return result;
}

/// A tabulated enthalpy of the change that the curves do not reproduce.
void compare(const Species& species, const Datum& table, const std::string& what, Sourced& change) {
  const double gap = std::fabs(std::fabs(change.value.value()) - table.value);
  const double u95 = change.value.u95();
  if (gap <= std::sqrt(u95 * u95 + table.u95 * table.u95)) return;
  change.cautions.push_back(species.name + ": " + what + " is " +
                            display_number(std::fabs(change.value.value()) / kJ, 2) +
                            " kJ/mol by formation enthalpies and heat capacities, the table has " +
                            display_number(table.value / kJ, 2) + " (" + std::string(table.source) + ").");
}

class Path {
 public:
  Path(const Species& species, double pressure) : species_(species), pressure_(pressure) {}

  std::optional<Error> heat(Phase phase, double from, double to) {
    if (from == to) return std::nullopt;
    const Result<HeatCapacityCurve> curve = heat_capacity_curve(species_, phase);
    if (!curve.ok()) return curve.error();
    const Result<Sourced> there = increment_of(*curve, to), here = increment_of(*curve, from);
    if (!there.ok()) return there.error();
    if (!here.ok()) return here.error();
    PathLeg leg;
    leg.phase = phase;
    leg.from = from;
    leg.to = to;
    leg.what = lettered(species_, phase) + ", " + celsius(from) + " to " + celsius(to);
    leg.change = *there;
    leg.change.value.add(here->value, -1);
    append(leg.change, *here);
    legs.push_back(std::move(leg));
    return std::nullopt;
  }

  std::optional<Error> change(Phase old, Phase now, double at) {
    const Result<Sourced> start = change_at_298(species_, old, now);
    if (!start.ok()) return start.error();
    Result<Sourced> moved = carried(species_, *start, old, now, at);
    if (!moved.ok()) return moved.error();
    PathLeg leg;
    leg.phase = now;
    leg.from = leg.to = at;
    leg.change = std::move(moved).value();
    const bool gas = old == Phase::Gas || now == Phase::Gas,
               solid = old == Phase::Solid || now == Phase::Solid;
    const bool up = now == Phase::Gas || old == Phase::Solid;
    leg.kind = !gas    ? PathLeg::Kind::Fusion
               : solid ? PathLeg::Kind::Sublimation
                       : PathLeg::Kind::Vaporisation;
    leg.what = species_.name +
               (!gas    ? (up ? " melts" : " freezes")
                : solid ? (up ? " sublimes" : " deposits")
                : up    ? " boils"
                        : " condenses") +
               " at " + celsius(at);
    const facts::Compound* c = species_.compound;
    if (c != nullptr && !gas && c->fusion_enthalpy && c->melting_point && at == c->melting_point->value)
      compare(species_, *c->fusion_enthalpy, "the enthalpy of fusion", leg.change);
    if (c != nullptr && gas && !solid && c->vaporisation_enthalpy_boiling && c->boiling_point &&
        std::fabs(at - c->boiling_point->value) < 1)
      compare(species_, *c->vaporisation_enthalpy_boiling,
              "the enthalpy of vaporisation at the boiling point", leg.change);
    legs.push_back(std::move(leg));
    return std::nullopt;
  }

  double melting() const {
    const facts::Compound* c = species_.compound;
    return c != nullptr && c->melting_point ? c->melting_point->value : kReference;
  }

  double boiling() const {
    const Result<Saturation> line = boiling_temperature(species_, pressure_);
    return line.ok() ? line->value : kReference;
  }

  std::vector<PathLeg> legs;

 private:
  const Species& species_;
  double pressure_;
};

int rank(Phase phase) {
  return phase == Phase::Solid ? 0 : phase == Phase::Liquid ? 1 : 2;
}

}  // namespace

Result<Sourced> fusion_enthalpy(const Species& species, double temperature) {
  const facts::Compound* c = species.compound;
  if (c == nullptr || !c->fusion_enthalpy || !c->melting_point)
    return no_data(species, "the enthalpy of fusion and the melting point");
  const Datum& table = *c->fusion_enthalpy;
  const double melting = c->melting_point->value;
  Sourced result;
  result.value = Quantity(table.value, table.u95, figure_key(SourceKind::Phase, species, Phase::Solid));
  result.route = "table";
  result.source = std::string(table.source);
  result.working.push_back("fusion of " + species.name + " at " + display_number(melting, 2) +
                           " K: " + display_number(table.value / kJ, 2) + " ± " +
                           display_number(table.u95 / kJ, 2) + " kJ/mol, " + result.source);
  if (temperature == melting) return result;
  const Result<HeatCapacityCurve> solid = heat_capacity_curve(species, Phase::Solid),
                                  liquid = heat_capacity_curve(species, Phase::Liquid);
  if (solid.ok() && liquid.ok()) {
    const double change = liquid->increment(temperature) - liquid->increment(melting) -
                          solid->increment(temperature) + solid->increment(melting);
    const auto part = [&](const HeatCapacityCurve& curve, double sign) {
      return uncertainty::Part{curve.key, sign * (curve.deviation(temperature) - curve.deviation(melting))};
    };
    result.value.add(Quantity(change, {part(*liquid, 1), part(*solid, -1)}));
    result.working.push_back("plus ∫ (cp(l) − cp(s)) dT from " + display_number(melting, 2) + " to " +
                             display_number(temperature, 2) + " K = " + display_signed(change / kJ, 2) +
                             " kJ/mol");
    return result;
  }
  // A constant entropy of fusion at one end, a constant enthalpy at the other.
  const double lean = table.value * (temperature / melting - 1) / 2;
  result.value.add(
      Quantity(lean, std::fabs(lean), figure_key(SourceKind::HeatCapacity, species, Phase::Solid)));
  result.working.push_back(
      "carried to " + display_number(temperature, 2) +
      " K, halfway between constant enthalpy and constant entropy: " + display_signed(lean / kJ, 2) + " ± " +
      display_number(std::fabs(lean) / kJ, 2) + " kJ/mol");
  return result;
}

Result<Sourced> vaporisation_enthalpy(const Species& species, double temperature) {
  const facts::Compound* c = species.compound;
  if (c != nullptr && c->critical_temperature && temperature >= c->critical_temperature->value) {
    return Error{"thermo.temperature_range",
                 species.name + " has no liquid above its critical temperature, " +
                     display_number(c->critical_temperature->value, 1) + " K.",
                 display_number(temperature, 2) + " K", "Write it as gas."};
  }
  const Result<Sourced> start = change_at_298(species, Phase::Liquid, Phase::Gas);
  if (!start.ok()) return start;
  return carried(species, *start, Phase::Liquid, Phase::Gas, temperature);
}

Result<std::vector<PathLeg>> heating_path(const Species& species, Phase from, double start, Phase to,
                                          double end, std::optional<double> pressure) {
  if (from == Phase::Unstated) from = Phase::Gas;
  if (to == Phase::Unstated) to = Phase::Gas;
  Path path(species, pressure.value_or(units::kStandardAtmosphere));
  const auto is_pure = [](Phase phase) {
    return phase == Phase::Gas || phase == Phase::Liquid || phase == Phase::Solid;
  };
  if (from == to) {
    if (const std::optional<Error> failed = path.heat(from, start, end)) return *failed;
    return std::move(path.legs);
  }
  if (!is_pure(from) || !is_pure(to)) return no_data(species, "a way between a solution and a pure phase");

  // Where each change happens; a solid goes through the liquid if it melts below its boiling point.
  struct Stop {
    Phase phase;
    double at;
  };
  std::vector<Stop> stops;
  const bool up = rank(to) > rank(from);
  const double melting = path.melting(), boiling = path.boiling();
  const bool through_liquid = rank(from) + rank(to) == 2 && from != Phase::Liquid && melting < boiling &&
                              melting != kReference && boiling != kReference;
  if (through_liquid) {
    stops = up ? std::vector<Stop>{{Phase::Liquid, melting}, {Phase::Gas, boiling}}
               : std::vector<Stop>{{Phase::Liquid, boiling}, {Phase::Solid, melting}};
  } else {
    const bool gas = from == Phase::Gas || to == Phase::Gas,
               solid = from == Phase::Solid || to == Phase::Solid;
    stops = {{to, !gas ? melting : solid ? kReference : boiling}};
  }
  Phase now = from;
  double temperature = start;
  for (const Stop& stop : stops) {
    if (const std::optional<Error> failed = path.heat(now, temperature, stop.at)) return *failed;
    if (const std::optional<Error> failed = path.change(now, stop.phase, stop.at)) return *failed;
    now = stop.phase;
    temperature = stop.at;
  }
  if (const std::optional<Error> failed = path.heat(now, temperature, end)) return *failed;
  return std::move(path.legs);
}

}  // namespace heatledger::thermo
