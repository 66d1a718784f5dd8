#include "core/facts/atoms.hpp"

namespace heatledger::facts {

std::optional<Datum> gas_atom_formation(int) { return std::nullopt; }

}  // namespace heatledger::facts
