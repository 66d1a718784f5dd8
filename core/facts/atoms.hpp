// Formation enthalpies of gaseous atoms: what ties bond sums to formation enthalpies.
#pragma once

#include <optional>

#include "core/facts/compound.hpp"

namespace heatledger::facts {

/// Enthalpy of formation of the gaseous atom at 298.15 K [J/mol]; empty where the table has none.
/// @source CODATA Key Values (Cox, Wagman, Medvedev, 1989); ATcT 1.112 where it has the atom
std::optional<Datum> gas_atom_formation(int atomic_number);

}  // namespace heatledger::facts
