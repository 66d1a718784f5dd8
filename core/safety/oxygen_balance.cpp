#include "core/safety/oxygen_balance.hpp"

#include <algorithm>

#include "core/molecule/elements.hpp"

namespace heatledger::safety {

Result<double> oxygen_balance(const facts::Species& species) {
  if (!species.composition || !(species.molar_mass > 0)) {
    return Error{"safety.no_composition", "The composition of " + species.name + " is not known.", "",
                 "Enter it by its formula or structure."};
  }
  if (species.composition->charge != 0) {
    return Error{"safety.ion", species.name + " is an ion; an oxygen balance belongs to a whole substance.",
                 "", "Enter the salt."};
  }
  double carbon = 0, hydrogen = 0, oxygen = 0, sulfur = 0, halogen = 0;
  for (const auto& [key, count] : species.composition->atoms) {
    constexpr int kIsotope = 1000;  // Composition's keys: atomic number plus 1000 × mass number
    switch (key % kIsotope) {
      case 1:
        hydrogen += count;
        break;
      case 6:
        carbon += count;
        break;
      case 7:
        break;
      case 8:
        oxygen += count;
        break;
      case 16:
        sulfur += count;
        break;
      case 9:
      case 17:
      case 35:
      case 53:
        halogen += count;
        break;
      default:
        return Error{"safety.element",
                     "The oxygen balance knows C, H, N, O, S and halogens; " + species.name + " holds " +
                         std::string(molecule::symbol(key % kIsotope)) + ".",
                     "", "Leave it out, or reckon it with its own products."};
    }
  }
  const double wanted = 2 * carbon + std::max(0.0, hydrogen - halogen) / 2 + 2 * sulfur;
  constexpr double kOxygenMass = 0.016;  // as the formula has it [kg/mol]
  return (oxygen - wanted) * kOxygenMass / species.molar_mass;
}

}  // namespace heatledger::safety
