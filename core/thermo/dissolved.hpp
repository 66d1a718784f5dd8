// Formation enthalpy of what is dissolved in water.
#pragma once

#include "core/thermo/species_enthalpy.hpp"

namespace heatledger::thermo {

/// One mole dissolved at 298.15 K [J/mol], the water itself not counted. Ions only at infinite dilution.
/// @errors thermo.no_solution_data
Result<Sourced> dissolved_formation(const facts::Species& species,
                                    const std::optional<molecule::Strength>& strength);

}  // namespace heatledger::thermo
