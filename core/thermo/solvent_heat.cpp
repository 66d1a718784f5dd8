#include "core/thermo/solvent_heat.hpp"

#include "core/base/number_text.hpp"
#include "core/thermo/saturation.hpp"
#include "core/units/constants.hpp"

namespace heatledger::thermo {

using molecule::Phase;
using uncertainty::Quantity;
using uncertainty::SourceKind;

std::optional<Phase> stable_phase(const facts::Species& species, double temperature) {
  const Result<Saturation> boils = boiling_temperature(species, units::kStandardAtmosphere);
  if (boils.ok() && boils->value <= temperature) return Phase::Gas;
  const facts::Compound* compound = species.compound;
  if (compound != nullptr && compound->melting_point) {
    if (compound->melting_point->value > temperature) return Phase::Solid;
    if (boils.ok()) return Phase::Liquid;
  }
  for (const Phase phase : {Phase::Liquid, Phase::Solid, Phase::Gas}) {
    if (tabulated_formation(species, phase).ok()) return phase;
  }
  return boils.ok() ? std::optional<Phase>(Phase::Liquid) : std::nullopt;
}

Result<Sourced> formation_dissolved(const facts::Species& species, FormationOf formation) {
  const facts::Compound* compound = species.compound;
  if (compound == nullptr || !compound->dissolving_enthalpy) return formation_in_solvent(species, formation);
  const facts::Datum& typed = *compound->dissolving_enthalpy;
  const Phase pure = stable_phase(species, units::kReferenceTemperature).value_or(Phase::Liquid);
  Result<Sourced> found = formation(species, pure, {});
  if (!found.ok()) return found;
  Sourced result = std::move(found).value();
  result.value.add(
      Quantity(typed.value, typed.u95, figure_key(SourceKind::Phase, species, Phase::Dissolved)));
  result.source += "; heat of dissolving typed: " + std::string(typed.source);
  result.working.push_back("plus heat of dissolving " + display_signed(typed.value / 1000, 2) +
                           (typed.u95 > 0 ? " ± " + display_number(typed.u95 / 1000, 2) : std::string()) +
                           " kJ/mol from the pure " + std::string(phase_word(pure)) + ", typed: " +
                           std::string(typed.source) + (typed.u95 > 0 ? "" : ", taken as exact"));
  return result;
}

}  // namespace heatledger::thermo
