#include "core/thermo/heat_capacity_curve.hpp"

#include <algorithm>
#include <cmath>

#include "core/base/number_text.hpp"
#include "core/estimate/context_model.hpp"
#include "core/estimate/context_molecule.hpp"
#include "core/estimate/gas_interpolation.hpp"
#include "core/facts/ions.hpp"
#include "core/facts/polynomials.hpp"
#include "core/thermo/solution.hpp"
#include "core/units/constants.hpp"

namespace heatledger::thermo {
namespace {

using facts::Species;
using molecule::Phase;
using uncertainty::Quantity;
using uncertainty::SourceKind;

constexpr double kReference = units::kReferenceTemperature;
/// Enthalpy increments of two sets of gas polynomials part by up to 1.2 % (methane, 1000 K, NASA 1993 and
/// JANAF 1998).
constexpr double kPolynomialShare = 0.012;
/// Heat capacities of gases fall by up to 8 % from 298 to 200 K (sulfur dioxide, JANAF 1998).
constexpr double kColdGasShare = 0.05;
constexpr double kPolynomialGasConstant = 8.314510;  ///< [J/(mol K)] goes with the coefficients
/// Heat capacities of solids drift by up to 0.3 % a kelvin; a constant one misses the mean over ΔT by half.
constexpr double kSolidDrift = 0.003 / 2;
/// Liquid heat capacities near 298 K rise by 0 (water) to 0.4 (lower alcohols), mostly 0.1 to 0.25 % a
/// kelvin.
/// @source e.g. Poling, Prausnitz, O'Connell, The Properties of Gases and Liquids, 5th ed., chapter 6
constexpr double kLiquidRise = 0.0018, kLiquidRiseU95 = 0.002;
/// A figure at 298.15 K carries no further than this from there [K].
constexpr double kConstantReach = 300, kLowestGas = 200, kLowestCondensed = 100;
/// Beyond this distance from 298.15 K it carries a caution [K].
constexpr double kCautionReach = 75;
/// Where a solution's heat capacity near 25 °C is carried [K]: between freezing of brines and boiling of
/// strong acids. It rises by some 0.05 % a kelvin (hydrochloric acid, 20 to 60 °C, Perry).
constexpr double kSolutionLow = 233.15, kSolutionHigh = 523.15, kSolutionDrift = 0.0005;

std::string kelvin(double t) {
  return display_number(t, 2) + " K";
}

double cp_of(const HeatCapacityPiece& p, double t) {
  return p.c[0] + t * (p.c[1] + t * (p.c[2] + t * (p.c[3] + t * p.c[4])));
}

double integral_of(const HeatCapacityPiece& p, double t) {
  return t * (p.c[0] + t * (p.c[1] / 2 + t * (p.c[2] / 3 + t * (p.c[3] / 4 + t * p.c[4] / 5))));
}

const HeatCapacityPiece& piece_at(const std::vector<HeatCapacityPiece>& pieces, double t) {
  std::size_t i = 0;
  while (i + 1 < pieces.size() && t >= pieces[i + 1].from) ++i;
  return pieces[i];
}

/// Joins the pieces: offsets and deviations, both zero at 298.15 K.
void join(HeatCapacityCurve& curve) {
  double enthalpy = 0, deviation = 0;
  for (HeatCapacityPiece& p : curve.pieces) {
    p.offset = enthalpy - integral_of(p, p.from);
    p.deviation = deviation;
    enthalpy += integral_of(p, p.to) - integral_of(p, p.from);
    deviation += p.u95 * (p.to - p.from);
  }
  const HeatCapacityPiece& here = piece_at(curve.pieces, kReference);
  const double zero = here.offset + integral_of(here, kReference);
  const double zero_deviation = here.deviation + here.u95 * (kReference - here.from);
  curve.at_298 = cp_of(here, kReference);
  for (HeatCapacityPiece& p : curve.pieces) {
    p.offset -= zero;
    p.deviation -= zero_deviation;
  }
}

HeatCapacityPiece straight(double from, double to, double cp, double at, double slope, double u95) {
  HeatCapacityPiece p;
  p.from = from;
  p.to = to;
  p.c = {cp - slope * at, slope, 0, 0, 0};
  p.u95 = u95;
  return p;
}

/// The table of polynomials names some compounds otherwise than the library: "propene" for propylene.
const facts::Polynomial* polynomial_of(const Species& species, Phase phase) {
  if (species.compound == nullptr) return nullptr;
  const char letter = phase == Phase::Liquid ? 'l' : phase == Phase::Solid ? 's' : 'g';
  const facts::Polynomial* found = facts::find_polynomial(species.compound->name, letter);
  for (const std::string_view synonym : species.compound->synonyms) {
    if (found != nullptr) break;
    found = facts::find_polynomial(synonym, letter);
  }
  return found != nullptr && found->formula == species.compound->formula ? found : nullptr;
}

void by_polynomial(HeatCapacityCurve& curve, const facts::Polynomial& polynomial) {
  curve.kind = CurveKind::Polynomial;
  curve.route = "table";
  curve.source = "NASA TM-4513, 1993";
  for (const facts::PolynomialRange& range : polynomial.ranges) {
    HeatCapacityPiece p;
    p.from = range.from;
    p.to = range.to;
    for (std::size_t i = 0; i < p.c.size(); ++i) p.c[i] = range.a[i] * kPolynomialGasConstant;
    curve.pieces.push_back(p);
  }
  HeatCapacityPiece& first = curve.pieces.front();
  if (first.from >= kReference && first.from <= 300) {
    first.from = kReference;  // 1.85 K of extrapolation move cp by less than 0.1 %
    // A gas goes on down to where the other polynomials begin, with the heat capacity at its lower end.
    const double low = cp_of(first, kReference);
    if (curve.phase == Phase::Gas)
      curve.pieces.insert(curve.pieces.begin(),
                          straight(kLowestGas, kReference, low, 0, 0, kColdGasShare * low));
  } else if (first.from > kReference) {
    // A phase that appears above 298 K: carried down with the heat capacity at its lower end.
    const double low = cp_of(first, first.from);
    curve.pieces.insert(curve.pieces.begin(), straight(kReference, first.from, low, 0, 0, 0));
  }
}

/// The estimate at 298.15 K, at the temperatures of its table and halfway between: it is a cubic between two
/// of them, whose integral three points give exactly.
bool by_estimated_gas(HeatCapacityCurve& curve, const estimate::ContextMolecule& molecule) {
  constexpr double kNodes[] = {298.15, 400, 500, 600, 800, 1000};
  estimate::ContextOptions options;
  bool complete = true;
  const auto at = [&](double temperature, double& u95) {
    options.temperature = temperature;
    const Result<estimate::Prediction> cp =
        estimate::ContextModel::embedded().predict(estimate::Property::GasHeatCapacity, molecule, options);
    complete = complete && cp.ok();
    u95 = cp.ok() ? cp->u95 : 0;
    return cp.ok() ? cp->value : 0;
  };
  double u_low = 0, u_mid = 0, u_high = 0;
  double low = at(kNodes[0], u_low);
  const double cold = at(estimate::gas_range_low, u_mid);
  if (!complete) return false;
  const double slope = std::max(0.0, (low - cold) / (kNodes[0] - estimate::gas_range_low));
  curve.pieces.push_back(straight(kLowestGas, kNodes[0], low, kNodes[0], slope, u_low));
  for (std::size_t i = 0; i + 1 < std::size(kNodes); ++i) {
    const double from = kNodes[i], to = kNodes[i + 1], half = (to - from) / 2, middle = from + half;
    const double mid = at(middle, u_mid), high = at(to, u_high);
    if (!complete) return false;
    // Parabola through three points, written in powers of T.
    const double bend = (low - 2 * mid + high) / (2 * half * half), rise = (high - low) / (2 * half);
    HeatCapacityPiece p;
    p.from = from;
    p.to = to;
    p.c = {mid - rise * middle + bend * middle * middle, rise - 2 * bend * middle, bend, 0, 0};
    p.u95 = (u_low + 4 * u_mid + u_high) / 6;
    curve.pieces.push_back(p);
    low = high;
    u_low = u_high;
  }
  curve.kind = CurveKind::Estimate;
  curve.route = "estimate";
  curve.source = "bonds in context";
  return true;
}

const facts::PhaseFacts& facts_of(const facts::Compound& compound, Phase phase) {
  return phase == Phase::Gas ? compound.gas : phase == Phase::Liquid ? compound.liquid : compound.solid;
}

/// The slope of a liquid's heat capacity as a share of it per kelvin with its ±: general knowledge, sharpened
/// by the enthalpy of vaporisation at two temperatures, Δvap h(Tb) = Δvap h(298 K) + ∫ (cp,g − cp,l) dT.
std::array<double, 2> liquid_rise(const Species& species, double cp, double cp_u95) {
  std::array<double, 2> rise = {kLiquidRise, kLiquidRiseU95};
  const facts::Compound* compound = species.compound;
  if (compound == nullptr || !compound->boiling_point || !compound->vaporisation_enthalpy_boiling ||
      compound->vapour_associates)
    return rise;
  const double boiling = compound->boiling_point->value, span = boiling - kReference;
  if (std::fabs(span) < 20) return rise;  // too short a way to tell a slope
  const Result<Sourced> here = gas_to_phase(species, Phase::Liquid);
  const Result<HeatCapacityCurve> gas = heat_capacity_curve(species, Phase::Gas);
  if (!here.ok() || !gas.ok() || boiling > gas->highest() || boiling < gas->lowest()) return rise;
  const facts::Datum& there = *compound->vaporisation_enthalpy_boiling;
  const double liquid = -here->value.value() + gas->increment(boiling) - there.value;  // ∫ cp,l dT
  const double seen = 2 * (liquid / span - cp) / (span * cp);
  const double gas_u = gas->deviation(boiling);
  const double error = std::sqrt(here->value.u95() * here->value.u95() + there.u95 * there.u95 +
                                 gas_u * gas_u + cp_u95 * span * cp_u95 * span);
  const double seen_u95 = 2 * error / (span * span * cp);
  const double weight = rise[1] * rise[1] / (rise[1] * rise[1] + seen_u95 * seen_u95);
  const double held = std::clamp(seen, kLiquidRise - 2 * kLiquidRiseU95, kLiquidRise + 2 * kLiquidRiseU95);
  return {rise[0] + weight * (held - rise[0]), std::sqrt(1 - weight) * rise[1]};
}

void by_constant(HeatCapacityCurve& curve, const Species& species, double cp, double u95) {
  const facts::Compound* compound = species.compound;
  double low = curve.phase == Phase::Gas ? kLowestGas : kLowestCondensed, high = kReference + kConstantReach;
  curve.kind = CurveKind::Constant;
  curve.drift = kSolidDrift;
  if (curve.phase == Phase::Liquid) {
    const std::array<double, 2> rise = liquid_rise(species, cp, u95);
    curve.kind = CurveKind::Rising;
    curve.slope = rise[0] * cp;
    curve.drift = rise[1] / 2;  // the mean over ΔT moves by half of what the end does
    if (compound != nullptr && compound->critical_temperature)
      high = std::min(high, compound->critical_temperature->value);
  } else if (curve.phase == Phase::Solid && compound != nullptr && compound->melting_point) {
    curve.caution_above = compound->melting_point->value;
  }
  if (high <= kReference) high = kReference;
  curve.pieces.push_back(straight(low, high, cp, kReference, curve.slope, u95));
}

/// A heat capacity of the sheet or a site table, which goes before polynomials and estimates.
const facts::Datum* typed_figure(const Species& species, Phase phase) {
  if (species.compound == nullptr || phase == Phase::Aqueous) return nullptr;
  const std::optional<facts::Datum>& datum = facts_of(*species.compound, phase).heat_capacity;
  return datum && datum->typed && datum->value > 0 ? &*datum : nullptr;
}

bool by_tabulated(HeatCapacityCurve& curve, const Species& species) {
  if (species.compound == nullptr) return false;
  const std::optional<facts::Datum>& datum = facts_of(*species.compound, curve.phase).heat_capacity;
  if (!datum || !(datum->value > 0)) return false;
  curve.route = "table";
  curve.source = std::string(datum->source);
  by_constant(curve, species, datum->value, datum->u95);
  return true;
}

bool by_estimated_liquid(HeatCapacityCurve& curve, const Species& species,
                         const estimate::ContextMolecule& molecule) {
  const Result<estimate::Prediction> cp =
      estimate::ContextModel::embedded().predict(estimate::Property::LiquidHeatCapacity298, molecule);
  if (!cp.ok() || !(cp->value > 0)) return false;
  curve.route = "estimate";
  curve.source = "bonds in context";
  by_constant(curve, species, cp->value, cp->u95);
  return true;
}

/// The apparent heat capacity of the solute: what is left of the solution's own when its water counts as pure
/// water, so that both together heat as the solution does.
bool by_solution(HeatCapacityCurve& curve, const Species& species,
                 const std::optional<molecule::Strength>& strength) {
  if (!strength || species.compound == nullptr) return false;
  const std::optional<double> ratio = water_ratio(*strength, species.molar_mass);
  const facts::SolutionHeatCapacities* table =
      facts::find_solution_heat_capacities(species.compound->formula);
  if (!ratio || table == nullptr) return false;
  const std::optional<ApparentHeatCapacity> apparent =
      apparent_heat_capacity(*table, *ratio, species.molar_mass);
  if (!apparent) return false;
  curve.kind = CurveKind::Constant;
  curve.route = "table";
  curve.source = "of the solution less its water, " + std::string(table->source) +
                 (table->from_memory ? " (from memory)" : "");
  curve.drift = kSolutionDrift * std::fabs(apparent->of_solution / std::max(1.0, std::fabs(apparent->cp)));
  curve.pieces.push_back(straight(kSolutionLow, kSolutionHigh, apparent->cp, 0, 0, apparent->u95));
  return true;
}

constexpr double kWaterFreezes = 273.15, kWaterBoils = 373.15;

void by_partial(HeatCapacityCurve& curve, double cp, double u95, const std::string& source) {
  curve.kind = CurveKind::Constant;
  curve.route = "table";
  curve.source = source;
  curve.drift = 0.01;  // partial molar heat capacities of ions change by their own size within 100 K
  curve.pieces.push_back(straight(kWaterFreezes, kWaterBoils, cp, 0, 0, u95));
}

/// A salt: the sum of its ions.
bool by_ions(HeatCapacityCurve& curve, const Species& species) {
  if (species.compound == nullptr) return false;
  double cp = 0, squares = 0;
  std::string source;
  const auto ions = facts::ions_of(*species.compound);
  for (const auto& ion : ions) {
    if (!ion.first->heat_capacity) return false;
    const facts::Datum& datum = *ion.first->heat_capacity;
    cp += ion.second * datum.value;
    squares += ion.second * datum.u95 * ion.second * datum.u95;
    source = std::string(datum.source);
  }
  if (ions.empty()) return false;
  by_partial(curve, cp, std::sqrt(squares), "partial molar, sum of the ions at infinite dilution, " + source);
  return true;
}

/// An organic solute that no table has in water: more than the pure liquid, since water orders itself around
/// it.
/// @source partial molar less liquid heat capacity, J/(mol K): methanol 158 − 81, ethanol 260 − 112, acetone
///         241 − 126, acetic acid 169 − 123 (NBS Tables 1982 and CRC Handbook; from memory): mean 96, twice
///         the spread 88
bool by_liquid_in_water(HeatCapacityCurve& curve, const Species& species) {
  constexpr double kMore = 95, kMoreU95 = 90;
  constexpr int kCarbon = 6;
  if (!species.graph || !species.composition || species.composition->atoms.count(kCarbon) == 0) return false;
  const Result<HeatCapacityCurve> liquid = heat_capacity_curve(species, Phase::Liquid);
  if (!liquid.ok()) return false;
  by_partial(curve, liquid->at_298 + kMore, std::hypot(kMoreU95, piece_at(liquid->pieces, kReference).u95),
             "estimate: the pure liquid (" + liquid->source + ") and 95 ± 90 J/(mol K) more");
  curve.route = "estimate";
  return true;
}

/// Only at infinite dilution, and negative for many ions: good for a correction to temperature near 25 °C.
bool by_partial_molar(HeatCapacityCurve& curve, const Species& species) {
  if (species.aqueous != nullptr && species.aqueous->heat_capacity) {
    const facts::Datum& datum = *species.aqueous->heat_capacity;
    by_partial(curve, datum.value, datum.u95,
               "partial molar, infinite dilution, " + std::string(datum.source));
    return true;
  }
  return by_ions(curve, species) || by_liquid_in_water(curve, species);
}

Error no_heat_capacity(const Species& species, Phase phase) {
  return Error{"thermo.no_heat_capacity",
               "No heat capacity of " + species.name + " as " + std::string(phase_word(phase)) + " is known.",
               species.text,
               phase == Phase::Aqueous ? "Type the heat capacity of the solution with its source."
                                       : "Type one with its source."};
}

Error out_of_range(const HeatCapacityCurve& curve, double temperature) {
  return Error{"thermo.temperature_range",
               "The heat capacity of " + curve.name + " (" + std::string(molecule::phase_text(curve.phase)) +
                   ") holds from " + machine_number(curve.lowest(), 6) + " to " +
                   machine_number(curve.highest(), 6) + " K (" + curve.source + ").",
               std::isfinite(temperature) ? machine_number(temperature, 6) + " K" : "temperature",
               "Choose a temperature in this range, or type a heat capacity with its source."};
}

bool in_range(const HeatCapacityCurve& curve, double temperature) {
  return temperature >= curve.lowest() && temperature <= curve.highest();
}

void add_cautions(const HeatCapacityCurve& curve, double temperature, Sourced& result) {
  const double span = std::fabs(temperature - kReference);
  if ((curve.kind == CurveKind::Constant || curve.kind == CurveKind::Rising) && span > kCautionReach) {
    result.cautions.push_back(curve.name + ": the heat capacity at 298.15 K is carried to " +
                              kelvin(temperature) + ".");
  }
  if (curve.caution_above && temperature > *curve.caution_above) {
    result.cautions.push_back(curve.name + ": " + kelvin(temperature) + " lies above its melting point " +
                              kelvin(*curve.caution_above) + "; it is reckoned as solid, as written.");
  }
}

std::string phase_of(const HeatCapacityCurve& curve) {
  return std::string(molecule::phase_text(curve.phase));
}

}  // namespace

double HeatCapacityCurve::heat_capacity(double temperature) const {
  const double t = std::clamp(temperature, lowest(), highest());
  return cp_of(piece_at(pieces, t), t);
}

double HeatCapacityCurve::increment(double temperature) const {
  const double t = std::clamp(temperature, lowest(), highest());
  const HeatCapacityPiece& p = piece_at(pieces, t);
  return p.offset + integral_of(p, t) + cp_of(p, t) * (temperature - t);
}

double HeatCapacityCurve::deviation(double temperature) const {
  const double t = std::clamp(temperature, lowest(), highest());
  const HeatCapacityPiece& p = piece_at(pieces, t);
  const double span = temperature - kReference;
  double figure = p.deviation + p.u95 * (temperature - p.from);
  if (kind == CurveKind::Polynomial) figure = std::hypot(figure, kPolynomialShare * increment(temperature));
  const double grown = drift * std::fabs(span) * at_298 * span;
  const double both = std::sqrt(figure * figure + grown * grown);
  return span < 0 ? -both : both;
}

Result<HeatCapacityCurve> heat_capacity_curve(const Species& species, Phase phase,
                                              const std::optional<molecule::Strength>& strength,
                                              const std::optional<Quantity>& typed,
                                              const std::string& typed_source) {
  HeatCapacityCurve curve;
  curve.phase = phase == Phase::Unstated ? Phase::Gas : phase == Phase::Dissolved ? Phase::Liquid : phase;
  curve.name = species.name;
  curve.key = figure_key(SourceKind::HeatCapacity, species, curve.phase);
  const auto found = [&]() {
    if (typed && typed->value() > 0) {
      curve.kind = CurveKind::Typed;
      curve.route = "typed";
      curve.source = typed_source;
      if (!typed->parts().empty()) curve.key = typed->parts().front().source;
      curve.pieces.push_back(
          straight(kLowestCondensed, kReference + 1000, typed->value(), 0, 0, typed->u95()));
      return true;
    }
    if (curve.phase == Phase::Aqueous && by_solution(curve, species, strength)) return true;
    if (curve.phase == Phase::Aqueous)
      return !(strength && strength->kind != molecule::Strength::Kind::InfiniteDilution) &&
             by_partial_molar(curve, species);
    if (const facts::Datum* sheet = typed_figure(species, curve.phase)) {
      curve.kind = CurveKind::Typed;
      curve.route = "typed";
      curve.source = std::string(sheet->source);
      curve.pieces.push_back(straight(kLowestCondensed, kReference + 1000, sheet->value, 0, 0, sheet->u95));
      return true;
    }
    const facts::Polynomial* polynomial = polynomial_of(species, curve.phase);
    // A liquid whose polynomial ends near 25 °C (octane, 300 K) goes on by its heat capacity there instead.
    const bool ends_early = polynomial != nullptr && curve.phase == Phase::Liquid &&
                            polynomial->highest() < kReference + kCautionReach;
    if (ends_early && by_tabulated(curve, species)) return true;
    if (polynomial != nullptr) {
      by_polynomial(curve, *polynomial);
      return true;
    }
    if (curve.phase == Phase::Liquid && by_tabulated(curve, species)) return true;
    if (species.graph && curve.phase != Phase::Solid) {
      const Result<estimate::ContextMolecule> molecule = estimate::context_molecule(*species.graph);
      if (molecule.ok()) {
        if (curve.phase == Phase::Gas ? by_estimated_gas(curve, *molecule)
                                      : by_estimated_liquid(curve, species, *molecule))
          return true;
        curve.pieces.clear();
      }
    }
    return by_tabulated(curve, species);
  };
  if (!found()) return no_heat_capacity(species, curve.phase);
  join(curve);
  return curve;
}

Result<Sourced> increment_of(const HeatCapacityCurve& curve, double temperature) {
  if (!in_range(curve, temperature)) return out_of_range(curve, temperature);
  const double value = curve.increment(temperature), span = temperature - kReference;
  Sourced result;
  result.value = Quantity(value, {uncertainty::Part{curve.key, curve.deviation(temperature)}});
  result.route = curve.route;
  result.source = curve.source;
  const std::string sum = display_signed(value / 1000, 2) + " kJ/mol";
  if (curve.kind == CurveKind::Polynomial || curve.kind == CurveKind::Estimate) {
    const bool published = curve.kind == CurveKind::Polynomial;
    result.working.push_back(
        "h(" + kelvin(temperature) + ") − h(298.15 K) of " + curve.name + " (" + phase_of(curve) +
        ") = " + sum + ", " +
        (published ? "polynomial for " + display_number(curve.lowest(), 0) + " to " +
                         display_number(curve.highest(), 0) + " K"
                   : "mean cp " + display_number(span == 0 ? curve.at_298 : value / span, 1) + " J/(mol K)") +
        ", " + curve.source);
  } else {
    std::string line =
        "cp(" + phase_of(curve) + ") of " + curve.name + " " + display_number(curve.at_298, 1) + " J/(mol K)";
    if (curve.slope != 0)
      line += " × (1 + " + display_number(curve.slope / curve.at_298, 4) + "/K × (" +
              display_number(temperature, 2) + " − 298.15) K / 2)";
    result.working.push_back(line + " × (" + display_number(temperature, 2) + " − 298.15) K = " + sum + ", " +
                             curve.source);
  }
  add_cautions(curve, temperature, result);
  return result;
}

Result<Sourced> heat_capacity_of(const HeatCapacityCurve& curve, double temperature) {
  if (!in_range(curve, temperature)) return out_of_range(curve, temperature);
  const double value = curve.heat_capacity(temperature);
  const HeatCapacityPiece& p = piece_at(curve.pieces, temperature);
  const double figure =
      curve.kind == CurveKind::Polynomial ? std::hypot(p.u95, kPolynomialShare * value) : p.u95;
  const double grown = 2 * curve.drift * std::fabs(temperature - kReference) * curve.at_298;
  Sourced result;
  result.value = Quantity(value, {uncertainty::Part{curve.key, std::sqrt(figure * figure + grown * grown)}});
  result.route = curve.route;
  result.source = curve.source;
  result.working.push_back("cp(" + phase_of(curve) + ") of " + curve.name + " at " + kelvin(temperature) +
                           " = " + display_number(value, 1) + " J/(mol K), " + curve.source);
  add_cautions(curve, temperature, result);
  return result;
}

}  // namespace heatledger::thermo
