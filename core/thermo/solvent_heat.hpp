// What a species is by itself at a temperature, and what dissolving it in an organic solvent takes.
#pragma once

#include <optional>

#include "core/thermo/dissolved.hpp"

namespace heatledger::thermo {

/// The phase of the pure species at a temperature and 101.325 kPa, by boiling and melting point, else by the
/// phase that has a formation enthalpy; empty where nothing says.
/// @param temperature  [K] > 0
std::optional<molecule::Phase> stable_phase(const facts::Species& species, double temperature);

/// One mole dissolved in an organic solvent at 298.15 K [J/mol]: the pure species plus the heat of dissolving
/// that was typed for it, else formation_in_solvent.
/// @param formation  how formation enthalpies of the pure phases are found
/// @errors those of `formation`
Result<Sourced> formation_dissolved(const facts::Species& species, FormationOf formation);

}  // namespace heatledger::thermo
