#include "core/step/equilibrium.hpp"

#include <cmath>

#include "core/facts/compound.hpp"
#include "core/units/constants.hpp"

namespace heatledger::step {
namespace {

using molecule::Phase;

/// What counts as all gone, as a share of what was there: a typed conversion of 100 % is no statement on the
/// last ppm.
constexpr double kAllGone = 1e-6;

/// ∫ cp / T dT from 25 °C, Simpson's rule on forty strips: cp is smooth.
double entropy_increment(const Curve& curve, double temperature) {
  constexpr int kStrips = 40;
  const double from = units::kReferenceTemperature, width = (temperature - from) / kStrips;
  double sum = 0;
  for (int i = 0; i <= kStrips; ++i) {
    const double t = from + i * width;
    sum += (i == 0 || i == kStrips ? 1 : i % 2 == 1 ? 4 : 2) * curve.heat_capacity(t) / t;
  }
  return sum * width / 3;
}

const facts::PhaseFacts* facts_of(const facts::Species& species, Phase phase) {
  if (species.compound == nullptr) return nullptr;
  return phase == Phase::Gas      ? &species.compound->gas
         : phase == Phase::Liquid ? &species.compound->liquid
         : phase == Phase::Solid  ? &species.compound->solid
                                  : nullptr;
}

/// Moles of all that leaves in a phase, and of one substance in it.
struct Amounts {
  double all = 0, one = 0;
};

Amounts leaving(const StepResult& result, std::size_t substance, Phase phase) {
  Amounts amounts;
  for (const StreamLine& line : result.out) {
    if (line.state.phase != phase) continue;
    amounts.all += line.amount;
    if (line.substance == substance) amounts.one += line.amount;
  }
  return amounts;
}

}  // namespace

std::optional<EquilibriumCheck> equilibrium_check(const StepResult& result, std::size_t reaction) {
  const Model& model = *result.model;
  const StepReaction& of = model.input().reactions[reaction];
  const double temperature = result.values[model.outlet_temperature_slot()];
  const double pressure = result.values[*model.slot("outlet.pressure")] / units::kReferencePressure;
  if (!(result.reactions[reaction].extent > 0)) return std::nullopt;
  double entropy = 0;
  EquilibriumCheck check;
  for (std::size_t i = 0; i < of.substances.size(); ++i) {
    const balance::ReactionSpecies& species = of.reaction->species[i];
    const double number = species.product ? species.coefficient() : -species.coefficient();
    const Phase phase = thermo::phase_taken(*species.species, species.term.phase).phase;
    const facts::PhaseFacts* facts = facts_of(*species.species, phase);
    if (facts == nullptr || !facts->entropy) return std::nullopt;
    const StateCurve* state = nullptr;
    for (const StateCurve& one : model.states()) {
      if (one.substance == of.substances[i] && one.state.phase == phase) state = &one;
    }
    if (state == nullptr || !state->curve) return std::nullopt;
    entropy += number * (facts->entropy->value + entropy_increment(*state->curve, temperature));
    if (phase == Phase::Solid) continue;
    const Amounts there = leaving(result, of.substances[i], phase);
    double gross = there.one;
    if (!species.product) gross += species.coefficient() * result.reactions[reaction].extent;
    const double amount = std::max(there.one, kAllGone * gross);
    if (!(amount > 0) || !(there.all > 0)) return std::nullopt;  // leaves in another phase
    check.log_q += number * (std::log(amount / there.all) + (phase == Phase::Gas ? std::log(pressure) : 0));
  }
  const double rt = units::kGasConstant * temperature;
  check.log_k = -(result.reactions[reaction].heat_at_end - temperature * entropy) / rt;
  check.log_k_u95 = result.reactions[reaction].heat_25.u95() / rt;
  return check;
}

}  // namespace heatledger::step
