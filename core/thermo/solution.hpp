// Solutions as mixtures: what the solute adds to the heat capacity of its water, and how several solutes that
// share water are bounded.
#pragma once

#include <optional>
#include <vector>

#include "core/facts/solution_heat_capacities.hpp"
#include "core/facts/solution_heats.hpp"

namespace heatledger::thermo {

/// Heat capacity of a solution counted on its solute.
struct ApparentHeatCapacity {
  double cp = 0;           ///< of the solution less that of its water as pure water [J/(mol K)]
  double u95 = 0;          ///< [J/(mol K)]
  double of_solution = 0;  ///< of one mole of solute with its water [J/K]
};
/// @param ratio       moles of water per mole
/// @param molar_mass  of the solute [kg/mol]
/// @return empty beyond the strongest solution tabulated
std::optional<ApparentHeatCapacity> apparent_heat_capacity(const facts::SolutionHeatCapacities& table,
                                                           double ratio, double molar_mass);

/// Mass of the solute per mass of solution. @param ratio  moles of water per mole; @param molar_mass [kg/mol]
double mass_fraction(double ratio, double molar_mass);
/// Mass of one mole of solute with its water [kg/mol].
double solution_mass(double ratio, double molar_mass);

/// Half width of the 95 % interval of a heat between two points of one table [J/mol]. Its errors are taken as
/// independent steps along the table, so that a dilution by nothing has none and one over the whole table has
/// that of the table.
/// @param change  the heat between the points [J/mol]
/// @param u95     of the table there [J/mol]
/// @param bridge  difference of the further half widths where no table is [J/mol]
/// @param span    largest heat of the table in size [J/mol] > 0
double dilution_u95(double change, double u95, double bridge, double span);

/// One solute of a solution.
struct Solute {
  const facts::SolutionHeatCurve* curve = nullptr;
  double amount = 0;  ///< [mol] > 0
};

/// Water given to the solutes of one solution; memory kept between calls.
struct SharedWater {
  std::vector<double> ratio;   ///< moles of water per mole, for each solute, as taken
  std::vector<double> heat;    ///< of solution [J/mol], as taken
  std::vector<double> u95;     ///< of the table there [J/mol]
  std::vector<double> bridge;  ///< further half width where no table is [J/mol]
  double by_mole = 0;          ///< heat of all solutes with the water shared by mole [J]
  double to_stronger = 0;      ///< heat of all with the water given to the one that binds it more [J]
  bool two_limits = false;     ///< several solutes: the one of larger heat release is taken
  /// A solute whose table has no figure for the water it gets; its heat is that at the end of the table, so
  /// that a search finds its way back.
  std::optional<std::size_t> without;
  std::vector<double> other[4];  ///< the same lists for the limit not taken
};

/// One solute takes all water. Several bound the mixture by two limits: the water shared by mole, and all of
/// it with the solute that gives most heat for it, the others keeping as little as their tables begin with.
/// Two binary heats are never added over the same water; the heat of mixing of the solutes themselves is left
/// out.
/// @param water  [mol] >= 0
void share_water(const std::vector<Solute>& solutes, double water, SharedWater& out);

}  // namespace heatledger::thermo
