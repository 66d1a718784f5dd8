// Whether two equations are one reaction, however they are spelled.
#pragma once

#include <optional>

#include "core/balance/reaction.hpp"

namespace heatledger::balance {

/// How many times `other` the reaction is: every species on the same side in the same phase and strength,
/// coefficients in one ratio. Names, order, and a species written twice on one side do not count.
/// @return > 0; empty when they are different reactions, or one is the reverse of the other
std::optional<double> times_of(const Reaction& reaction, const Reaction& other);

}  // namespace heatledger::balance
