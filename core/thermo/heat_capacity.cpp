// h(T) − h(298.15 K) of a phase that is kept: polynomial, else tabulated heat capacity, else the estimate.
#include <cmath>

#include "core/base/number_text.hpp"
#include "core/estimate/context_model.hpp"
#include "core/estimate/context_molecule.hpp"
#include "core/facts/polynomials.hpp"
#include "core/thermo/species_enthalpy.hpp"
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
/// Heat capacities of liquids and solids rise by about 0.1 to 0.3 % a kelvin; a constant one misses the mean
/// over ΔT by half of that. @source e.g. Poling, Prausnitz, O'Connell, The Properties of Gases and Liquids,
/// 5th ed., chapter 6
constexpr double kDriftPerKelvin = 0.003 / 2;
/// Beyond this distance from 298.15 K a constant heat capacity carries a caution.
constexpr double kConstantRange = 75;

std::string kelvin(double t) {
  return display_number(t, 2) + " K";
}

Quantity increment(const Species& species, Phase phase, double value, double u95) {
  return Quantity(value, u95, figure_key(SourceKind::HeatCapacity, species, phase));
}

const facts::Polynomial* polynomial_of(const Species& species, Phase phase) {
  const char letter = phase == Phase::Liquid ? 'l' : phase == Phase::Solid ? 's' : 'g';
  return species.compound == nullptr ? nullptr : facts::find_polynomial(species.compound->name, letter);
}

Result<Sourced> by_polynomial(const Species& species, Phase phase, const facts::Polynomial& polynomial,
                              double temperature) {
  const Result<facts::PolynomialValue> there = facts::evaluate(polynomial, temperature),
                                       here = facts::evaluate(polynomial, kReference);
  if (!there.ok()) return there.error();
  if (!here.ok()) return here.error();
  const double value = there->h - here->h;
  Sourced result;
  result.value = increment(species, phase, value, kPolynomialShare * std::fabs(value));
  result.route = "table";
  result.source = "NASA TM-4513, 1993";
  result.working.push_back("h(" + kelvin(temperature) + ") − h(298.15 K) of " + species.name + " (" +
                           std::string(molecule::phase_text(phase)) +
                           ") = " + display_signed(value / 1000, 2) + " kJ/mol, polynomial for " +
                           display_number(polynomial.lowest(), 0) + " to " +
                           display_number(polynomial.highest(), 0) + " K, NASA TM-4513, 1993");
  return result;
}

Sourced by_constant(const Species& species, Phase phase, double cp, double u95, const std::string& route,
                    const std::string& source, double temperature) {
  const double span = temperature - kReference, value = cp * span;
  const double drift = kDriftPerKelvin * std::fabs(span) * std::fabs(value);
  Sourced result;
  result.value = increment(species, phase, value, std::sqrt(u95 * span * u95 * span + drift * drift));
  result.route = route;
  result.source = source;
  result.working.push_back("cp(" + std::string(molecule::phase_text(phase)) + ") of " + species.name + " " +
                           display_number(cp, 1) + " J/(mol K) × (" + display_number(temperature, 2) +
                           " − 298.15) K = " + display_signed(value / 1000, 2) + " kJ/mol, " + source);
  if (std::fabs(span) > kConstantRange) {
    result.cautions.push_back(species.name + ": the heat capacity at 298.15 K is used as constant to " +
                              kelvin(temperature) + ".");
  }
  return result;
}

/// ∫ cp dT of the estimated ideal gas by Simpson's rule on four strips; cp is smooth in temperature.
Result<Sourced> by_estimated_gas(const Species& species, double temperature) {
  const Result<estimate::ContextMolecule> molecule = estimate::context_molecule(*species.graph);
  if (!molecule.ok()) return molecule.error();
  constexpr int kStrips = 4;
  constexpr double kWeights[kStrips + 1] = {1, 4, 2, 4, 1};
  double sum = 0, u95 = 0;
  for (int i = 0; i <= kStrips; ++i) {
    estimate::ContextOptions options;
    options.temperature = kReference + (temperature - kReference) * i / kStrips;
    const Result<estimate::Prediction> cp =
        estimate::ContextModel::embedded().predict(estimate::Property::GasHeatCapacity, *molecule, options);
    if (!cp.ok()) return cp.error();
    sum += kWeights[i] * cp->value;
    u95 += kWeights[i] * cp->u95;  // the errors along one molecule go together
  }
  const double step = (temperature - kReference) / (3 * kStrips);
  Sourced result;
  result.value = increment(species, Phase::Gas, sum * step, std::fabs(u95 * step));
  result.route = "estimate";
  result.source = "bonds in context";
  result.working.push_back("h(" + kelvin(temperature) + ") − h(298.15 K) of " + species.name +
                           " (g) = " + display_signed(sum * step / 1000, 2) + " kJ/mol, mean cp " +
                           display_number(sum / (3 * kStrips), 1) + " J/(mol K), bonds in context");
  return result;
}

Error no_heat_capacity(const Species& species, Phase phase) {
  return Error{"thermo.no_heat_capacity",
               "No heat capacity of " + species.name + " as " + std::string(phase_word(phase)) + " is known.",
               species.text, "Type one with its source."};
}

}  // namespace

Result<Sourced> enthalpy_increment(const Species& species, Phase phase, double temperature) {
  if (phase == Phase::Unstated) phase = Phase::Gas;
  if (!(temperature > 0)) {
    return Error{"thermo.temperature_range", "A temperature is above zero kelvin.", species.text,
                 "Type a temperature such as 80 degC."};
  }
  if (temperature == kReference) {
    Sourced none;
    none.value = Quantity(0);
    none.route = "table";
    none.source = "25 °C";
    return none;
  }
  std::optional<Error> out_of_range;
  if (const facts::Polynomial* polynomial = polynomial_of(species, phase)) {
    Result<Sourced> result = by_polynomial(species, phase, *polynomial, temperature);
    if (result.ok()) return result;
    out_of_range = result.error();
  }
  if (phase == Phase::Gas && species.graph && temperature > kReference) {
    Result<Sourced> result = by_estimated_gas(species, temperature);
    if (result.ok()) return result;
  }
  const facts::Compound* compound = species.compound;
  if (compound != nullptr && (phase == Phase::Gas || phase == Phase::Liquid || phase == Phase::Solid)) {
    const facts::PhaseFacts& facts = phase == Phase::Gas      ? compound->gas
                                     : phase == Phase::Liquid ? compound->liquid
                                                              : compound->solid;
    if (facts.heat_capacity) {
      return by_constant(species, phase, facts.heat_capacity->value, facts.heat_capacity->u95, "table",
                         std::string(facts.heat_capacity->source), temperature);
    }
  }
  if (phase == Phase::Liquid && species.graph) {
    const Result<estimate::ContextMolecule> molecule = estimate::context_molecule(*species.graph);
    if (molecule.ok()) {
      const Result<estimate::Prediction> cp =
          estimate::ContextModel::embedded().predict(estimate::Property::LiquidHeatCapacity298, *molecule);
      if (cp.ok())
        return by_constant(species, phase, cp->value, cp->u95, "estimate", "bonds in context", temperature);
    }
  }
  if (out_of_range) return *out_of_range;
  return no_heat_capacity(species, phase);
}

}  // namespace heatledger::thermo
