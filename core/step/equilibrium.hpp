// Whether a typed progress lies beyond chemical equilibrium at the outlet.
#pragma once

#include "core/step/step.hpp"

namespace heatledger::step {

/// ln K at a temperature and ln Q of what leaves, one reaction for itself; ideal gas and ideal mixture,
/// standard state 100 kPa.
struct EquilibriumCheck {
  double log_k = 0;
  double log_k_u95 = 0;  ///< from the ± of the heat of reaction
  double log_q = 0;
  bool beyond() const { return log_q > log_k + log_k_u95 + 0.05; }
};

/// @return empty where an entropy or heat capacity is missing, or a species is in solution
std::optional<EquilibriumCheck> equilibrium_check(const StepResult& result, std::size_t reaction);

}  // namespace heatledger::step
