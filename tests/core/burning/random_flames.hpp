// Seeded random flames for the suites and the benchmark: fuels of C, H, O, N, S and Cl, alone and mixed, in
// air at air ratios from 0.3 to 10.
#pragma once

#include <cmath>
#include <cstdint>
#include <string>
#include <vector>

#include "core/burning/combustion_gases.hpp"
#include "core/facts/polynomials.hpp"
#include "core/molecule/formula.hpp"

namespace heatledger::burning::test_flames {

/// SplitMix64: the same numbers everywhere. @source G. L. Steele and others, OOPSLA 2014
struct Random {
  std::uint64_t state = 20240601;
  double next() {
    state += 0x9e3779b97f4a7c15ULL;
    std::uint64_t z = state;
    z = (z ^ (z >> 30)) * 0xbf58476d1ce4e5b9ULL;
    z = (z ^ (z >> 27)) * 0x94d049bb133111ebULL;
    return static_cast<double>((z ^ (z >> 31)) >> 11) / 9007199254740992.0;
  }
};

struct FuelGas {
  Gas gas;
  double oxygen_demand = 0;  ///< mol O2 per mol
};

/// Gases of the polynomial table that burn and hold only covered elements.
inline std::vector<FuelGas> fuel_gases() {
  std::vector<FuelGas> all;
  for (const facts::Polynomial& p : facts::polynomials()) {
    const std::string_view n = p.name;
    if (p.phase != 'g' || n.ends_with(" atom") || n.ends_with(" radical") || n.ends_with("idogen")) continue;
    const Result<molecule::Composition> composition = molecule::parse_formula(p.formula);
    FuelGas fuel;
    fuel.gas.name = p.name;
    fuel.gas.formula = p.formula;
    fuel.gas.polynomial = &p;
    double covered = 0, atoms = 0;
    for (const auto& [element, count] : composition->atoms) {
      atoms += count;
      for (std::size_t e = 0; e < kElements; ++e) {
        if (kElementNumbers[e] == element) {
          fuel.gas.atoms[e] = count;
          covered += count;
        }
      }
    }
    const Atoms& a = fuel.gas.atoms;
    const double hydrogen_left = std::max(of(a, Element::H) - of(a, Element::Cl), 0.0);
    fuel.oxygen_demand = of(a, Element::C) + of(a, Element::S) + hydrogen_left / 4 - of(a, Element::O) / 2;
    if (covered == atoms && fuel.oxygen_demand > 0.2) all.push_back(fuel);
  }
  return all;
}

struct Flame {
  Atoms atoms{};
  double enthalpy = 0, pressure = 0;
  std::string text;
};

/// Flame number i of the grid: single fuels by turns, then mixtures of two and three.
inline Flame flame(const std::vector<FuelGas>& fuels, Random& random, std::size_t i) {
  Flame f;
  const double exact[] = {0.3, 0.5, 0.9, 1, 1, 1.1, 2, 10};
  const double lambda = i % 4 == 0 ? exact[(i / 4) % 8] : 0.3 * std::pow(10 / 0.3, random.next());
  const double preheat = 250 + 1250 * random.next();
  f.pressure = 1e4 * std::pow(1000.0, random.next());
  const std::size_t parts = 1 + i % 3;
  double demand = 0;
  for (std::size_t k = 0; k < parts; ++k) {
    const FuelGas& fuel =
        k == 0 ? fuels[i % fuels.size()]
               : fuels[static_cast<std::size_t>(random.next() * static_cast<double>(fuels.size()))];
    const double n = k == 0 ? 1 : random.next();
    for (std::size_t e = 0; e < kElements; ++e) f.atoms[e] += n * fuel.gas.atoms[e];
    f.enthalpy += n * fuel.gas.enthalpy(preheat);
    demand += n * fuel.oxygen_demand;
    f.text += std::string(fuel.gas.name) + " ";
  }
  const double oxygen = lambda * demand;
  const auto add = [&](const char* formula, double n) {
    const Gas& gas = combustion_gas(formula);
    for (std::size_t e = 0; e < kElements; ++e) f.atoms[e] += n * gas.atoms[e];
    f.enthalpy += n * gas.enthalpy(preheat);
  };
  add("O2", oxygen);
  if (i % 7 == 0) {
    add("N2", 3.76 * oxygen);
  } else if (i % 7 != 1) {  // else oxygen alone
    add("N2", oxygen * 78.084 / 20.946);
    add("Ar", oxygen * 0.934 / 20.946);
    add("CO2", oxygen * 0.036 / 20.946);
    if (i % 2 == 0) add("H2O", oxygen * 0.09);
  }
  f.text += "lambda " + std::to_string(lambda) + ", " + std::to_string(preheat) + " K, " +
            std::to_string(f.pressure) + " Pa";
  return f;
}

}  // namespace heatledger::burning::test_flames
