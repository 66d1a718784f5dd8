#include "core/thermo/estimated.hpp"

#include <memory>

#include "core/base/number_text.hpp"
#include "core/estimate/context_model.hpp"
#include "core/estimate/context_molecule.hpp"
#include "core/estimate/context_observations.hpp"
#include "core/estimate/repeat_unit.hpp"
#include "core/estimate/structure_figure.hpp"
#include "core/thermo/solvent_heat.hpp"

namespace heatledger::thermo {
namespace {

using estimate::ContextFigure;
using estimate::Prediction;
using estimate::Property;
using estimate::Reading;
using facts::Species;
using molecule::Phase;

constexpr double kJ = 1000.0;

Error no_estimate(const Species& species, const std::string& why) {
  return Error{"thermo.no_estimate", "No estimate for " + species.name + ": " + why, species.text,
               "Type a value with its source."};
}

/// As structure_figure, sharpened by what was measured; not remembered, since the list changes.
Result<std::shared_ptr<const ContextFigure>> observed_figure(Property property, const molecule::Graph& graph,
                                                             const estimate::Observations& observations) {
  const Result<estimate::ContextMolecule> read = estimate::context_molecule(graph);
  if (!read.ok()) return read.error();
  estimate::ContextOptions options;
  options.observations = &observations;
  const estimate::ContextTerm one{1, &*read};
  Result<ContextFigure> figure = estimate::ContextModel::embedded().figure(
      property, std::span<const estimate::ContextTerm>(&one, 1), options);
  if (!figure.ok()) return figure.error();
  return std::make_shared<const ContextFigure>(std::move(figure).value());
}

Result<Sourced> estimated(const Species& species, Property property, const std::string& what,
                          const estimate::Observations* observations) {
  if (!species.graph) return no_estimate(species, "it has no structure here.");
  const Result<std::shared_ptr<const ContextFigure>> figure =
      observations == nullptr ? structure_figure(property, *species.graph)
                              : observed_figure(property, *species.graph, *observations);
  if (!figure.ok()) return no_estimate(species, figure.error().message);
  const Prediction& prediction = (*figure)->prediction;
  Sourced result;
  result.value = (*figure)->quantity;
  result.route = "estimate";
  result.source = observations != nullptr && !observations->list().empty()
                      ? "bonds in context, with what was measured on this sheet"
                      : "bonds in context";
  result.working.push_back(what + " of " + species.name +
                           ", bonds in context: " + display_signed(prediction.value / kJ, 1) + " ± " +
                           display_number(prediction.u95 / kJ, 1) + " kJ/mol");
  if (prediction.reading == Reading::None) {
    result.cautions.push_back(species.name + ": the structure alone gives no reliable figure (± " +
                              display_number(prediction.u95 / kJ, 0) + " kJ/mol); measure this.");
  }
  return result;
}

}  // namespace

Result<Sourced> estimated_gas_to_phase(const Species& species, Phase to,
                                       const estimate::Observations* observations) {
  if (to != Phase::Liquid) return no_estimate(species, "only vaporisation can be estimated.");
  Result<Sourced> evaporation =
      estimated(species, Property::Vaporisation298, "vaporisation enthalpy", observations);
  if (!evaporation.ok()) return evaporation;
  Sourced result = std::move(evaporation).value();
  result.value = result.value.scaled(-1);
  return result;
}

Result<Sourced> estimated_formation(const Species& species, Phase phase,
                                    const estimate::Observations* observations) {
  if (phase != Phase::Gas && phase != Phase::Unstated && phase != Phase::Liquid) {
    return no_estimate(species, "the model gives gas and liquid only.");
  }
  Result<Sourced> gas = estimated(species, Property::GasFormation, "ΔfH(g)", observations);
  if (!gas.ok() || phase != Phase::Liquid) return gas;
  const Result<Sourced> change = estimated_gas_to_phase(species, phase, observations);
  if (!change.ok()) return change;
  Sourced result = std::move(gas).value();
  result.value.add(change->value);
  result.working.insert(result.working.end(), change->working.begin(), change->working.end());
  return result;
}

Result<Sourced> best_formation(const Species& species, Phase phase,
                               const std::optional<molecule::Strength>& strength,
                               const estimate::Observations* observations) {
  if (phase == Phase::Dissolved) {
    return formation_dissolved(species, [](const Species& of, Phase in, const auto& strong) {
      return best_formation(of, in, strong);
    });
  }
  Result<Sourced> table = tabulated_formation(species, phase, strength);
  if (table.ok()) return table;
  if (phase == Phase::Liquid) {
    Result<Sourced> gas = tabulated_formation(species, Phase::Gas);
    const Result<Sourced> change = gas.ok() ? estimated_gas_to_phase(species, phase, observations) : gas;
    if (gas.ok() && change.ok()) {
      Sourced result = std::move(gas).value();
      result.value.add(change->value);
      result.route = "estimate";
      result.source += "; vaporisation by bonds in context";
      result.working.insert(result.working.end(), change->working.begin(), change->working.end());
      return result;
    }
  }
  Result<Sourced> estimate = estimated_formation(species, phase, observations);
  return estimate.ok() ? std::move(estimate) : std::move(table);
}

Result<Sourced> best_gas_to_phase(const Species& species, Phase to,
                                  const std::optional<molecule::Strength>& strength,
                                  const estimate::Observations* observations) {
  if (to == Phase::Dissolved) {
    Result<Sourced> dissolved = best_formation(species, to, strength, observations);
    const Result<Sourced> gas = best_formation(species, Phase::Gas, {}, observations);
    if (!dissolved.ok()) return dissolved;
    if (!gas.ok()) return gas;
    Sourced result = std::move(dissolved).value();
    result.value.add(gas->value, -1);
    result.working.insert(result.working.end(), gas->working.begin(), gas->working.end());
    return result;
  }
  Result<Sourced> table = gas_to_phase(species, to, strength);
  if (table.ok()) return table;
  Result<Sourced> estimate = estimated_gas_to_phase(species, to, observations);
  return estimate.ok() ? std::move(estimate) : std::move(table);
}

std::optional<std::string> crowded_chain_caution(const Species& species) {
  if (!species.repeat_unit || !species.graph || !estimate::has_crowded_chain(*species.graph)) return {};
  // Published heats of polymerisation of isobutene, alpha-methylstyrene and methyl methacrylate (Polymer
  // Handbook; Roberts 1950) lie 8 to 17 kJ/mol on this side of the estimate.
  return species.name +
         ": two side groups on one atom of the chain crowd its neighbours, and no compound behind the "
         "estimate is "
         "crowded so. Its formation enthalpy comes out too low and a polymerisation too exothermic, by some "
         "10 to "
         "20 kJ per mole of units, which the ± does not hold; type a measured one.";
}

}  // namespace heatledger::thermo
