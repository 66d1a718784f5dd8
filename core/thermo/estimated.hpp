// Formation and vaporisation of species that no table has, from bonds in context.
#pragma once

#include <optional>
#include <string>

#include "core/thermo/species_enthalpy.hpp"

namespace heatledger::estimate {
class Observations;
}

namespace heatledger::thermo {

/// Formation enthalpy at 298.15 K [J/mol] from the structure alone or, where its own row takes part in the
/// fit, from structure and table together. Liquid: gas minus the estimated vaporisation enthalpy. Its parts
/// are directions of one fit, so that errors which two species share cancel in a reaction.
/// @param observations  measurements of the user that sharpen the estimate, here and below; null: none
/// @errors thermo.no_estimate: no structure, one outside the model (the message says why), or a solid
Result<Sourced> estimated_formation(const facts::Species& species, molecule::Phase phase,
                                    const estimate::Observations* observations = nullptr);

/// One mole in `to` minus one mole of ideal gas [J/mol]; liquids only. @errors thermo.no_estimate
Result<Sourced> estimated_gas_to_phase(const facts::Species& species, molecule::Phase to,
                                       const estimate::Observations* observations = nullptr);

/// The table where there is one, else the estimate, a tabulated gas with an estimated vaporisation enthalpy
/// in between.
/// @errors those of tabulated_formation
Result<Sourced> best_formation(const facts::Species& species, molecule::Phase phase,
                               const std::optional<molecule::Strength>& strength,
                               const estimate::Observations* observations = nullptr);

/// The tables where they say it, else the estimate. @errors those of gas_to_phase
Result<Sourced> best_gas_to_phase(const facts::Species& species, molecule::Phase to,
                                  const std::optional<molecule::Strength>& strength,
                                  const estimate::Observations* observations = nullptr);

/// What an estimate of a repeat unit does not know: a sentence where its main chain has an atom with two side
/// groups (polyisobutene, polymethacrylates, poly(alpha-methylstyrene)). Empty for anything else.
std::optional<std::string> crowded_chain_caution(const facts::Species& species);

}  // namespace heatledger::thermo
