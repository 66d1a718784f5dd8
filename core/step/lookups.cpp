#include "core/step/lookups.hpp"

#include "core/base/number_text.hpp"
#include "core/thermo/estimated.hpp"

namespace heatledger::step {
namespace {

/// Kept entries; a sheet of forty species in three states stays well below.
constexpr std::size_t kCapacity = 2000;

std::string key_of(const facts::Species* species, const State& state) {
  std::string key = std::to_string(reinterpret_cast<std::uintptr_t>(species)) + '|' +
                    std::string(molecule::phase_text(state.phase));
  if (state.strength) {
    key += '|' + std::to_string(static_cast<int>(state.strength->kind)) + '|' +
           machine_number(state.strength->value, 15);
  }
  return key;
}

}  // namespace

std::shared_ptr<const StateFacts> Lookups::state(const std::shared_ptr<const facts::Species>& species,
                                                 const State& state) {
  const std::string key = key_of(species.get(), state);
  if (const auto found = states_.find(key); found != states_.end()) return found->second.facts;
  if (states_.size() >= kCapacity) states_.clear();
  std::shared_ptr<const StateFacts> facts = std::make_shared<const StateFacts>(
      StateFacts{Curve::of(*species, state.phase, state.strength),
                 thermo::best_gas_to_phase(*species, state.phase, state.strength),
                 thermo::best_formation(*species, state.phase, state.strength)});
  states_.emplace(key, Held<StateFacts>{species, facts});
  return facts;
}

std::shared_ptr<const Result<SaturationCurve>> Lookups::saturation(
    const std::shared_ptr<const facts::Species>& species) {
  if (const auto found = saturations_.find(species.get()); found != saturations_.end())
    return found->second.facts;
  if (saturations_.size() >= kCapacity) saturations_.clear();
  auto curve = std::make_shared<const Result<SaturationCurve>>(SaturationCurve::of(*species));
  saturations_.emplace(species.get(), Held<Result<SaturationCurve>>{species, curve});
  return curve;
}

}  // namespace heatledger::step
