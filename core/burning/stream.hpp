// What goes into a burner or an oxidiser: streams, their parts, and what a part needs and brings.
#pragma once

#include <memory>
#include <optional>
#include <string>
#include <vector>

#include "core/base/result.hpp"
#include "core/burning/combustion_gases.hpp"
#include "core/facts/resolve.hpp"
#include "core/step/step_input.hpp"
#include "core/thermo/phase_enthalpy.hpp"

namespace heatledger::burning {

enum class Role : std::uint8_t {
  Fuel,
  SupportFuel,  ///< its amount may be sought
  Vent,         ///< gas to be burnt; may carry oxygen, nitrogen, moisture
  LiquidWaste,
  CombustionAir,
  DilutionAir,  ///< let into the chamber behind the flame
  QuenchWater   ///< sprayed in behind the chamber
};

/// One species of a stream, or a fuel known by its analysis; then a "mole" is a kilogram.
struct Part {
  std::string name;
  std::shared_ptr<const facts::Species> species;  ///< null for an analysis
  molecule::Phase phase = molecule::Phase::Gas;
  double moles = 0;                           ///< [mol] or [mol/s], for Stream::scale of one
  double u95 = 0;                             ///< of the same as typed
  Atoms atoms{};                              ///< per mole
  double molar_mass = 0;                      ///< [kg/mol]
  uncertainty::Quantity formation;            ///< at 298.15 K [J/mol]
  std::string source;                         ///< of that
  std::optional<thermo::PhaseEnthalpy> heat;  ///< increments; empty: `heat_capacity`
  step::Typed heat_capacity;                  ///< [J/(mol K)]

  /// Formation enthalpy plus increment [J/mol]. @param temperature  [K] > 0
  double enthalpy(double temperature) const;
};

struct Stream {
  std::string name;
  Role role = Role::Fuel;
  step::Typed temperature{298.15, 0};  ///< [K]
  std::vector<Part> parts;
  double scale = 1;          ///< all amounts are multiplied with it
  bool amount_typed = true;  ///< false: the parts are shares of one mole

  double moles() const;
  double mass() const;  ///< [kg]
};

/// Moles of O2 that one mole needs for complete burning: C + S + (H − Cl)/4 − O/2, the hydrogen term never
/// below zero since chlorine left over leaves as Cl2. Negative: it brings oxygen.
double oxygen_demand(const Atoms& atoms);

/// @param moles  [mol] or [mol/s]
/// @errors burning.no_composition: a code name without a formula; burning.not_covered: F, Br, I, P, Si, a
/// metal;
///         burning.solution: an ion or a dissolved species; thermo.no_formation_data
Result<Part> make_part(const std::string& name, std::shared_ptr<const facts::Species> species,
                       molecule::Phase phase, double moles);

/// How the calorific value of an analysed fuel is come by.
enum class CalorificRule : std::uint8_t { Typed, ChanniwalaParikh, Dulong };

/// Ultimate analysis, shares of the mass as fired; they sum to one.
struct Analysis {
  double c = 0, h = 0, o = 0, n = 0, s = 0, cl = 0, ash = 0, moisture = 0;
  CalorificRule rule = CalorificRule::ChanniwalaParikh;
  step::Typed gross;  ///< Typed: gross, as fired [J/kg]
};

/// Gross calorific value of the dry fuel by correlation [J/kg dry], ± as found over the fuels it was fitted
/// to.
/// @source S. A. Channiwala, P. P. Parikh, Fuel 81 (2002) 1051: 0.3491 C + 1.1783 H + 0.1005 S − 0.1034 O
///         − 0.0151 N − 0.0211 ash in MJ/kg and per cent of the dry mass, mean error 1.45 %; Dulong's
///         formula: 0.3383 C + 1.443 (H − O/8) + 0.0942 S
/// @validity Channiwala and Parikh: C to 92 %, H 0.4 to 25 %, O to 50 %, N to 5.6 %, S to 94 %, ash to 71 %
step::Typed correlated_calorific(const Analysis& analysis);

/// The dry fuel as one part with a kilogram for a mole, and its moisture as liquid water.
/// @errors burning.analysis_sum: the shares do not sum to 100 ± 0.5 %; burning.analysis_share
Result<std::vector<Part>> analysed_fuel(const std::string& name, const Analysis& analysis);

}  // namespace heatledger::burning
