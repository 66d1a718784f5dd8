// What of a step dissolves in its water and how strong it leaves: laid out once, evaluated with every change
// of a number.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "core/step/step_input.hpp"
#include "core/thermo/solution.hpp"

namespace heatledger::step {

/// A substance that makes a solution with the water it leaves with.
struct SolutePlan {
  std::size_t substance = 0;
  facts::SolutionHeatCurve curve;
  const facts::SolutionHeatCapacities* heat_capacities = nullptr;  ///< null: as the state it leaves in
  std::string source;                                              ///< of the heats
  double from_pure = 0;   ///< of the state it leaves in above the pure solute, at 25 °C [J/mol]
  double bridge = 0;      ///< of that, half width where no table is [J/mol]
  std::size_t error = 0;  ///< slot of the table's error, in units of its ±
  std::optional<std::size_t> heat_capacity_error;  ///< slot of the heat capacity's error, in units of its ±
};

struct SolutionPlan {
  std::optional<std::size_t> water;  ///< substance
  std::vector<SolutePlan> solutes;
  Includes in_measured = Includes::No;  ///< whether a typed heat of reaction holds the heat of dilution
  std::optional<std::size_t> typed;     ///< slot of the typed heat of mixing

  bool has_heat_capacity(std::size_t substance) const {
    for (const SolutePlan& solute : solutes) {
      if (solute.substance == substance) return solute.heat_capacities != nullptr;
    }
    return false;
  }
};

/// The solution of one evaluation.
struct Dissolving {
  std::vector<std::size_t> active;  ///< solutes that leave in water, by index of SolutionPlan::solutes
  std::vector<thermo::Solute> pool;
  thermo::SharedWater share;          ///< of the active ones
  std::vector<double> above_leaving;  ///< for each substance: heat of its solution above the state it leaves
                                      ///< in [J/mol]
  std::vector<double> ratio;  ///< for each substance: moles of water per mole where it is dissolved, else < 0
  std::vector<double> set_free;  ///< for each solute, > 0 gives off heat, 25 °C [J] or [W]
  double tables = 0;             ///< sum of that
  double taken = 0;              ///< as the balance takes it: typed, in the measured figure, or by the tables
};

}  // namespace heatledger::step
