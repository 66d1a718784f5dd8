// Specific heat of aqueous solutions near 25 degC against their strength.
#pragma once

#include <optional>
#include <string_view>
#include <vector>

#include "core/facts/monotone_curve.hpp"

namespace heatledger::facts {

/// One solute, from water to the strongest solution tabulated.
struct SolutionHeatCapacities {
  std::string_view solute;  ///< formula as typed: "H2SO4"
  std::string_view source;
  bool from_memory = false;           ///< not compared with a copy of the source
  double strongest = 0;               ///< mass fraction, 0 .. 1
  MonotoneCurve cp;                   ///< of the solution [J/(kg K)] against the mass fraction
  std::vector<double> fraction, u95;  ///< [J/(kg K)] at the points of the table, straight in between
};

/// @param formula  as typed; compared by composition. nullptr when there is no table
const SolutionHeatCapacities* find_solution_heat_capacities(std::string_view formula);

struct SolutionHeatCapacity {
  double cp = 0, u95 = 0;  ///< of the solution [J/(kg K)]
};
/// @param fraction  of the solute by mass, 0 .. 1
/// @return empty beyond the strongest solution tabulated
std::optional<SolutionHeatCapacity> solution_heat_capacity_at(const SolutionHeatCapacities& table,
                                                              double fraction);

}  // namespace heatledger::facts
