#include "core/burning/burn.hpp"

#include <algorithm>
#include <cmath>

#include "core/base/number_text.hpp"
#include "core/burning/calorific.hpp"
#include "core/burning/flammability.hpp"
#include "core/facts/air.hpp"
#include "core/units/constants.hpp"

namespace heatledger::burning {

namespace {

void add(Atoms& sum, const Atoms& atoms, double times) {
  for (std::size_t e = 0; e < kElements; ++e) sum[e] += times * atoms[e];
}

/// Everything of the streams but the airs, in sums.
struct Sums {
  Atoms flame{}, quench{};
  double flame_enthalpy = 0, quench_enthalpy = 0;
  double reference_enthalpy = 0;  ///< of both at 298.15 K
  double needed = 0, brought = 0, burner_needed = 0;
};

Sums sums_of(const BurnInput& in) {
  Sums s;
  for (const Stream& stream : in.streams) {
    const bool quench = stream.role == Role::QuenchWater;
    for (const Part& part : stream.parts) {
      const double n = part.moles * stream.scale;
      add(quench ? s.quench : s.flame, part.atoms, n);
      (quench ? s.quench_enthalpy : s.flame_enthalpy) += n * part.enthalpy(stream.temperature.value);
      s.reference_enthalpy += n * part.formation.value();
      const double demand = oxygen_demand(part.atoms);
      if (demand > 0) {
        s.needed += n * demand;
        if (stream.role == Role::Fuel || stream.role == Role::SupportFuel) s.burner_needed += n * demand;
      } else {
        s.brought -= n * demand;
      }
    }
  }
  return s;
}

/// Moles of dry combustion air that the rule asks for.
Result<double> dry_air_by_rule(const BurnInput& in, const Sums& s) {
  const double y = in.air.oxygen, wet = 1 + in.air.water;
  const double dilution = in.dilution ? in.dilution->value / wet : 0;
  const double figure = in.air_figure.value;
  double dry = 0;
  switch (in.rule) {
    case AirRule::Flow:
      dry = figure / wet;
      break;
    case AirRule::Ratio:
      dry = (figure * s.needed - s.brought) / y - dilution;
      break;
    case AirRule::BurnerRatio:
      dry = figure * s.burner_needed / y;
      break;
    case AirRule::FlueDry:
    case AirRule::FlueWet: {
      // Oxygen and gas without any air; each mole of dry air adds y to the one and one (or its wet amount) to
      // the other.
      Atoms atoms = s.flame;
      add(atoms, s.quench, 1);
      const Amounts bare = complete_products(atoms);
      const double gas = in.rule == AirRule::FlueDry ? total_dry(bare) : total(bare);
      const double each = in.rule == AirRule::FlueDry ? 1 : wet;
      if (!(figure >= 0 && figure * each < y)) {
        return Error{"burning.no_oxygen_left",
                     "The flue gas cannot hold " + machine_number(100 * figure, 4) +
                         " % of oxygen; the air holds " + machine_number(100 * y / each, 4) + " %.",
                     "", "Type a share below that of the air."};
      }
      dry = (figure * gas - of(bare, Product::O2)) / (y - figure * each) - dilution;
      break;
    }
  }
  if (dry < -1e-12 * (s.needed / y)) {
    return Error{"burning.no_oxygen_left",
                 "The streams and the dilution air bring more oxygen than this figure for the air allows.",
                 "", "Type a larger air ratio or oxygen content, or a flow of combustion air (0 for none)."};
  }
  return std::max(dry, 0.0);
}

struct Mixed {
  Atoms flame{}, chamber{}, flue{};
  double flame_enthalpy = 0, chamber_enthalpy = 0,
         flue_enthalpy = 0;  ///< behind the loss from the chamber on
  double dry = 0;
};

double air_enthalpy(const BurnInput& in, double temperature) {
  return enthalpy(in.air.products(), temperature, ProductOffsets{});
}

Result<Mixed> mix(const BurnInput& in, const Sums& s, double net_heat) {
  const Result<double> dry = dry_air_by_rule(in, s);
  if (!dry.ok()) return dry.error();
  Mixed m;
  m.dry = *dry;
  const Atoms air = in.air.atoms();
  m.flame = s.flame;
  add(m.flame, air, m.dry);
  m.flame_enthalpy = s.flame_enthalpy + m.dry * air_enthalpy(in, in.air_temperature.value);
  const double dilution = in.dilution ? in.dilution->value / (1 + in.air.water) : 0;
  m.chamber = m.flame;
  add(m.chamber, air, dilution);
  const double loss = in.loss ? in.loss->value : in.loss_share ? in.loss_share->value * net_heat : 0;
  m.chamber_enthalpy = m.flame_enthalpy + dilution * air_enthalpy(in, in.dilution_temperature.value) - loss;
  m.flue = m.chamber;
  add(m.flue, s.quench, 1);
  m.flue_enthalpy = m.chamber_enthalpy + s.quench_enthalpy;
  return m;
}

double net_heat_of(const BurnInput& in) {
  double sum = 0;
  for (const Stream& stream : in.streams) {
    if (stream.role != Role::QuenchWater)
      sum += heat_of_burning(stream, units::kReferenceTemperature, in.offsets).net;
  }
  return sum;
}

/// Heat that the chamber has too much for the typed temperature.
Result<double> chamber_excess(const BurnInput& in) {
  const Sums s = sums_of(in);
  const Result<Mixed> m = mix(in, s, net_heat_of(in));
  if (!m.ok()) return m.error();
  const Amounts products = complete_products(m->chamber);
  return m->chamber_enthalpy - enthalpy(products, in.chamber_temperature->value, in.offsets);
}

Stream* support_of(BurnInput& in) {
  for (Stream& stream : in.streams) {
    if (stream.role == Role::SupportFuel) return &stream;
  }
  return nullptr;
}

/// Sets the unknown so that the chamber has its typed temperature. The excess is linear in the unknown but
/// for the split of chlorine, so that the secant arrives in two or three steps.
std::optional<Error> find_unknown(BurnInput& in) {
  if (!in.chamber_temperature) {
    return Error{"burning.no_chamber_temperature",
                 "The temperature that the chamber is to have is not typed.", "chamber_temperature",
                 "Type it, such as 1100 °C."};
  }
  Stream* const support = support_of(in);
  if (in.sought == Sought::Support && support == nullptr) {
    return Error{"burning.no_support", "No feed of this step is a support fuel.", "",
                 "Give one feed the role \"support fuel\"."};
  }
  if (in.sought == Sought::Ratio) in.rule = AirRule::Ratio;
  double& unknown = in.sought == Sought::Support ? support->scale : in.air_figure.value;
  double x0 = 1, x1 = in.sought == Sought::Support ? 2 : 3;
  if (in.sought == Sought::Support) {
    // Begin where the support fuel brings about as much heat as everything else.
    const double own =
        std::max(std::abs(heat_of_burning(*support, units::kReferenceTemperature, in.offsets).net /
                          std::max(support->scale, 1e-300)),
                 1e-300);
    double others = 0;
    for (const Stream& stream : in.streams) {
      if (&stream != support)
        others += std::abs(heat_of_burning(stream, units::kReferenceTemperature, in.offsets).net);
    }
    x1 = std::max(others / own, 1e-6);
    x0 = 0;
  }
  unknown = x0;
  Result<double> f0 = chamber_excess(in);
  if (in.sought == Sought::Support && f0.ok() && *f0 > 0) {
    return Error{
        "burning.support_not_found", "The chamber is hotter than this temperature without any support fuel.",
        "chamber_temperature",
        "Type a higher temperature, or seek the temperature instead; dilution air or quench water cool."};
  }
  unknown = x1;
  Result<double> f1 = chamber_excess(in);
  for (int i = 0; i < 50; ++i) {
    if (!f0.ok()) return f0.error();
    if (!f1.ok()) return f1.error();
    if (*f1 == *f0) break;
    const double x2 = x1 - *f1 * (x1 - x0) / (*f1 - *f0);
    const bool arrived = std::abs(x2 - x1) <= 1e-13 * std::abs(x2);
    x0 = x1;
    f0 = f1;
    x1 = x2;
    unknown = x2;
    f1 = chamber_excess(in);
    if (!arrived) continue;
    if (in.sought == Sought::Ratio && x2 < 1) {
      return Error{"burning.support_not_found",
                   "The chamber does not reach this temperature with air enough for complete burning.",
                   "chamber_temperature", "Type a lower temperature, preheat the air, or add support fuel."};
    }
    if (x2 >= 0) return {};
    break;
  }
  return Error{"burning.support_not_found",
               in.sought == Sought::Support ? "No amount of support fuel gives this chamber temperature."
                                            : "No air ratio gives this chamber temperature.",
               "chamber_temperature", "Type a lower temperature, less excess air, or a smaller heat loss."};
}

}  // namespace

Result<Numbers> burn(const BurnInput& typed, bool with_equilibrium) {
  BurnInput in = typed;
  Numbers n;
  if (in.sought != Sought::Temperature) {
    if (std::optional<Error> error = find_unknown(in)) return *error;
  }
  const Sums s = sums_of(in);
  if (!(s.needed > 0)) {
    return Error{"burning.nothing_burns", "Nothing in the feeds of this step burns.", "",
                 "Write a fuel, a vent or a waste with its species and amounts."};
  }
  for (std::size_t i = 0; i < in.streams.size(); ++i) {
    const Stream& stream = in.streams[i];
    if (stream.role == Role::SupportFuel) n.support = stream.scale;
    if (stream.role == Role::QuenchWater || !burns(stream)) continue;
    FuelNumbers fuel =
        calorific_numbers(stream, in.combustion_temperature, in.metering_temperature, in.offsets);
    fuel.stream = i;
    if (in.chloride_in_water && fuel.hydrogen_chloride > 0) {
      const double more = -fuel.hydrogen_chloride * hydrogen_chloride_into_water().value_or(0);
      fuel.wobbe_gross *= (fuel.gross + more) / fuel.gross;
      fuel.gross += more;
    }
    flammability(stream, in.lfl, fuel);
    n.fuel_mass += fuel.mass;
    n.fuel_moles += fuel.moles;
    n.fuels.push_back(fuel);
  }
  for (const Stream& stream : in.streams) {
    if (stream.role == Role::QuenchWater) continue;
    const Heat heat = heat_of_burning(stream, units::kReferenceTemperature, in.offsets);
    n.net_heat += heat.net;
    n.gross_heat += heat.gross;
  }
  const Result<Mixed> mixed = mix(in, s, n.net_heat);
  if (!mixed.ok()) return mixed.error();
  const double wet = 1 + in.air.water;
  n.oxygen_needed = s.needed;
  n.oxygen_brought = s.brought;
  n.air = mixed->dry * wet;
  n.dilution = in.dilution ? in.dilution->value : 0;
  n.stoichiometric = s.needed / in.air.oxygen * wet;
  n.air_molar_mass = mass(in.air.products()) / wet;
  const double dry = mixed->dry + n.dilution / wet;
  n.ratio = (s.brought + dry * in.air.oxygen) / s.needed;
  if (s.burner_needed > 0) n.burner_ratio = mixed->dry * in.air.oxygen / s.burner_needed;
  n.flame = complete_products(mixed->flame);
  n.chamber = complete_products(mixed->chamber);
  n.flue = complete_products(mixed->flue);
  // A balance at the ratio of one may leave rounding on either side of zero.
  for (Amounts* amounts : {&n.flame, &n.chamber, &n.flue}) {
    double& oxygen = of(*amounts, Product::O2);
    if (std::abs(oxygen) < 1e-12 * s.needed) oxygen = 0;
  }
  n.complete = of(n.flame, Product::O2) >= 0;
  n.sensible_in =
      s.flame_enthalpy + s.quench_enthalpy - s.reference_enthalpy +
      mixed->dry * (air_enthalpy(in, in.air_temperature.value) - air_enthalpy(in, 298.15)) +
      n.dilution / wet * (air_enthalpy(in, in.dilution_temperature.value) - air_enthalpy(in, 298.15));
  n.loss = in.loss ? in.loss->value : in.loss_share ? in.loss_share->value * n.net_heat : 0;
  if (n.complete) {
    n.flame_temperature = temperature_at(n.flame, mixed->flame_enthalpy, in.offsets);
    n.chamber_temperature = temperature_at(n.chamber, mixed->chamber_enthalpy, in.offsets);
    if (mixed->flue_enthalpy != mixed->chamber_enthalpy)
      n.quench_temperature = temperature_at(n.flue, mixed->flue_enthalpy, in.offsets);
    if (!n.flame_temperature || !n.chamber_temperature) {
      return Error{"burning.too_hot", "The heat of this flame is outside 150 to 8000 K of its flue gas.", "",
                   "Check the amounts, the preheat and the heat loss."};
    }
    const double gas = total(n.flue);
    const double water = of(n.flue, Product::H2O) / gas * in.pressure;
    n.dew_point = water > 0 ? water_dew_point(water) : std::nullopt;
    if (in.so3 && in.so3->value > 0 && water > 0)
      n.sulfuric_dew_point = sulfuric_dew_point(water, in.so3->value * in.pressure);
    if (in.hcl && in.hcl->value > 0 && water > 0)
      n.hydrochloric_dew_point = hydrochloric_dew_point(water, in.hcl->value * in.pressure);
    if (in.flue_temperature) {
      const double t = in.flue_temperature->value;
      const double out = enthalpy(n.flue, t, in.offsets);
      n.flue_sensible = out - enthalpy(n.flue, units::kReferenceTemperature, in.offsets);
      n.flue_latent = of(n.flue, Product::H2O) * vaporisation_of_water(units::kReferenceTemperature);
      n.load = mixed->flue_enthalpy - out;
      n.efficiency = *n.load / n.net_heat;
    }
    if (in.chamber_volume) {
      const double flow = total(n.chamber) * units::kGasConstant * *n.chamber_temperature / in.pressure;
      n.residence = in.chamber_volume->value / flow;
    }
  }
  if (with_equilibrium) {
    Result<Equilibrium> e =
        equilibrium_burnt(combustion_gases(), mixed->flame, mixed->flame_enthalpy, in.pressure);
    if (!e.ok()) return e.error();
    // What the offsets do to the gases formed, at the composition found.
    double moved = 0;
    for (std::size_t p = 0; p < kProducts; ++p) {
      const ProductOffset& offset = in.offsets[p];
      if (offset.formation == 0 && offset.factor == 1) continue;
      Amounts one{};
      one[p] = 1;
      for (std::size_t j = 0; j < combustion_gases().size(); ++j) {
        if (combustion_gases()[j].formula != kProductFormulas[p]) continue;
        moved += e->moles[j] * (enthalpy(one, e->temperature, in.offsets) -
                                enthalpy(one, e->temperature, ProductOffsets{}));
      }
    }
    e->temperature -= moved / e->heat_capacity;
    n.equilibrium = std::move(e).value();
  }
  return n;
}

}  // namespace heatledger::burning
