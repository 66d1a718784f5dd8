// The gases that burnt mixtures consist of, as plain numbers for iterations: composition, enthalpy, entropy
// and heat capacity at any temperature. Published polynomials stand in core/facts.
#pragma once

#include <array>
#include <cstddef>
#include <string_view>
#include <vector>

#include "core/facts/polynomials.hpp"

namespace heatledger::burning {

/// Elements that the burning step covers, in the order of every array of element amounts.
enum class Element : unsigned char { C, H, O, N, S, Cl, Ar };
constexpr std::size_t kElements = 7;
constexpr std::array<std::string_view, kElements> kElementSymbols = {"C", "H", "O", "N", "S", "Cl", "Ar"};
constexpr std::array<int, kElements> kElementNumbers = {6, 1, 8, 7, 16, 17, 18};  ///< atomic numbers

/// Moles of atoms, or atoms per molecule.
using Atoms = std::array<double, kElements>;
constexpr double& of(Atoms& atoms, Element element) {
  return atoms[static_cast<std::size_t>(element)];
}
constexpr double of(const Atoms& atoms, Element element) {
  return atoms[static_cast<std::size_t>(element)];
}

/// Enthalpy, entropy at 1 bar and heat capacity of one mole, by the gas constant that the fits came with.
struct GasFigures {
  double h_rt = 0;  ///< H/(RT); H is the formation enthalpy at 298.15 K plus the increment
  double s_r = 0;   ///< S/R
  double cp_r = 0;  ///< Cp/R
};

/// One gas. Beyond the range of its polynomial it goes on with the heat capacity at the end of it, so that a
/// search always finds its way back.
struct Gas {
  std::string_view name;     ///< library name
  std::string_view formula;  ///< as written: "SO2", "HCl"
  Atoms atoms{};
  const facts::Polynomial* polynomial = nullptr;
  double shift =
      0;  ///< of the formation enthalpy, from the report's figure to that of the sheet's tables [J/mol]

  GasFigures at(double temperature, double log_temperature) const;
  /// Formation enthalpy plus increment [J/mol]. @param temperature  [K] > 0
  double enthalpy(double temperature) const;
  /// [J/(mol K)]
  double heat_capacity(double temperature) const;
};

/// Gas constant of the report that the fits come from [J/(mol K)].
constexpr double kFitGasConstant = 8.314510;

/// All gases of the equilibrium, 58 of them: what C, H, O, N, S, Cl and Ar form hot, and what they form cold
/// and short of oxygen. Read at first use.
/// Products of complete burning carry the formation enthalpies of the sheet's tables, so that a flame and a
/// ledger agree; all others keep those of the report, which its fits belong to.
/// @source McBride, Gordon, Reno, NASA TM-4513, 1993
const std::vector<Gas>& combustion_gases();
/// One of them by formula; CHECKs that it is there.
const Gas& combustion_gas(std::string_view formula);
/// Graphite in the same measure: G/(RT) at 1 bar. @param temperature  [K]
double graphite_gibbs(double temperature);

}  // namespace heatledger::burning
