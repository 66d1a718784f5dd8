// Formation enthalpy of what is dissolved, in water or in another solvent.
#pragma once

#include "core/thermo/species_enthalpy.hpp"

namespace heatledger::thermo {

/// One mole dissolved at 298.15 K [J/mol], the water itself not counted. Ions only at infinite dilution;
/// salts, strong bases and strong acids as the sum of their ions, all of one table; with a strength the pure
/// solute plus its heat of solution.
/// @errors thermo.no_solution_data
Result<Sourced> dissolved_formation(const facts::Species& species,
                                    const std::optional<molecule::Strength>& strength);

using FormationOf = Result<Sourced> (*)(const facts::Species&, molecule::Phase,
                                        const std::optional<molecule::Strength>&);

/// One mole dissolved in an organic solvent at 298.15 K [J/mol], where nobody typed its heat of solution: the
/// liquid, so that a solid takes up its enthalpy of fusion and a gas gives off that of vaporisation, with the
/// ± of mixing on top: 8 kJ/mol for a solid, 5 for a gas, 3 for a liquid.
/// @param formation  how formation enthalpies of the pure phases are found (tables alone, or estimates too)
/// @source the ± covers usual enthalpies of mixing of organic liquids (J. Christensen, R. Hanks, R. Izatt,
///         Handbook of Heats of Mixing, 1982; range from memory); solutions that bind hydrogen or react go
///         beyond it
/// @errors those of `formation`
Result<Sourced> formation_in_solvent(const facts::Species& species, FormationOf formation);

}  // namespace heatledger::thermo
