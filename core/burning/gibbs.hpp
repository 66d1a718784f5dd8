// Chemical equilibrium of an ideal gas mixture by Gibbs energy minimisation, at given temperature and
// pressure or at constant enthalpy and pressure. Which gases there are stands in combustion_gases.hpp.
//
// Unknowns are the logarithms of the mole fractions of as many species as there are elements (the component
// species) and of the total amount; every other amount follows from them exactly, so that trace species need
// no care. Component species are the ones that a linear programme over the Gibbs energies makes the majority,
// found by the simplex method from free atoms, and are exchanged when another species outgrows them: at the
// air ratio of one, where oxygen and carbon monoxide are both traces, the equations stay well conditioned.
#pragma once

#include <optional>
#include <vector>

#include "core/base/result.hpp"
#include "core/burning/combustion_gases.hpp"

namespace heatledger::burning {

struct EquilibriumOptions {
  /// [K] where the search begins, with what is stable there; the answer does not depend on it.
  std::optional<double> start_temperature;
};

struct Equilibrium {
  double temperature = 0;           ///< [K]
  double pressure = 0;              ///< [Pa]
  std::vector<double> moles;        ///< in the order of the gases given; zero where an element is absent
  double total = 0;                 ///< [mol]
  double enthalpy = 0;              ///< [J], formation enthalpies included
  double heat_capacity = 0;         ///< dH/dT with the composition following [J/K]
  double frozen_heat_capacity = 0;  ///< with the composition held [J/K]
  double closure = 0;               ///< largest element imbalance, as a share of all atoms
  /// Activity of carbon against graphite; above one soot would form. Zero without carbon.
  double carbon_activity = 0;
  int iterations = 0;  ///< Newton steps taken in all
};

/// @param gases        one gas at least for every element present; an atom of each element among them
/// @param atoms        [mol] >= 0, not all zero
/// @param temperature  [K] 200 to 6000
/// @param pressure     [Pa] > 0
/// @errors burning.no_atoms; burning.temperature_range; burning.pressure; burning.no_equilibrium (did not
///         converge)
/// @source W. R. Smith, R. W. Missen, Chemical Reaction Equilibrium Analysis, Wiley, 1982, chapters 4 and 6
///         (element potentials, optimised component species); the linear programme as a start: W. C.
///         Reynolds, The Element Potential Method, Stanford, 1986
/// @example Gibbs.DoesNotDependOnTheStartOrTheOrderOfSpecies
Result<Equilibrium> equilibrium_at(const std::vector<Gas>& gases, const Atoms& atoms, double temperature,
                                   double pressure, const EquilibriumOptions& options = {});

/// The temperature at which the equilibrium mixture has an enthalpy, between 200 and 6000 K.
/// @param enthalpy  [J] of the atoms as they came in, formation enthalpies included
/// @errors as equilibrium_at; burning.enthalpy_range: no temperature in the range has this enthalpy
Result<Equilibrium> equilibrium_burnt(const std::vector<Gas>& gases, const Atoms& atoms, double enthalpy,
                                      double pressure, const EquilibriumOptions& options = {});

}  // namespace heatledger::burning
