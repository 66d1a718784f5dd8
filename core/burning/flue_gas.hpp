// Air and the flue gas of complete burning: who is in it, at which enthalpy, where its water condenses.
#pragma once

#include <array>
#include <optional>
#include <string>

#include "core/base/result.hpp"
#include "core/burning/combustion_gases.hpp"

namespace heatledger::burning {

/// Gases of complete burning, in the order of the sheet.
enum class Product : unsigned char { CO2, H2O, N2, O2, SO2, HCl, Cl2, Ar };
constexpr std::size_t kProducts = 8;
constexpr std::array<std::string_view, kProducts> kProductFormulas = {"CO2", "H2O", "N2",  "O2",
                                                                      "SO2", "HCl", "Cl2", "Ar"};

/// Moles, shares or anything else of each.
using Amounts = std::array<double, kProducts>;
constexpr double& of(Amounts& amounts, Product product) {
  return amounts[static_cast<std::size_t>(product)];
}
constexpr double of(const Amounts& amounts, Product product) {
  return amounts[static_cast<std::size_t>(product)];
}

double total(const Amounts& amounts);
double total_dry(const Amounts& amounts);
double mass(const Amounts& amounts);  ///< [kg] of moles
/// [g/mol] of one product.
double molar_mass_of(Product product);

/// How far the enthalpy of a product may be off, for the ± of what follows: added to its formation enthalpy,
/// and a factor on its increment from 298.15 K.
struct ProductOffset {
  double formation = 0;
  double factor = 1;
};
using ProductOffsets = std::array<ProductOffset, kProducts>;

/// Formation enthalpies plus increments [J]. @param temperature  [K] > 0
double enthalpy(const Amounts& amounts, double temperature, const ProductOffsets& offsets);
/// [J/K]
double heat_capacity(const Amounts& amounts, double temperature, const ProductOffsets& offsets);
/// The temperature at which the gas has an enthalpy [K]; empty outside 150 to 8000 K.
std::optional<double> temperature_at(const Amounts& amounts, double enthalpy, const ProductOffsets& offsets);

/// C to CO2, H to H2O, S to SO2, N to N2, Cl to HCl while H lasts and the rest to Cl2, Ar as it is; O2 is
/// what is left and negative when short.
Amounts complete_products(const Atoms& atoms);

/// Which air; shares of the dry gas and moles of water with each mole of it.
struct Air {
  double oxygen = 0, nitrogen = 0, argon = 0, carbon_dioxide = 0;
  double water = 0;
  std::string words;  ///< "humid air, 60 % at 25 °C", printed
  /// Atoms of one mole of dry gas with its water.
  Atoms atoms() const;
  Amounts products() const;
};
Air dry_air();
/// Oxygen with 3.76 parts of nitrogen.
Air textbook_air();
/// Dry air with pure oxygen to a share of O2 in the dry gas. @param oxygen  0.2095 .. 1
Air enriched_air(double oxygen);
/// @errors those of facts::moles_water_per_mole_dry_air
Result<Air> humid(Air air, double relative_humidity, double temperature, double pressure);

/// Temperature at which the water of a gas begins to condense [K]; empty below the triple point.
/// @param water_pressure  [Pa]
std::optional<double> water_dew_point(double water_pressure);
/// Acid dew point of sulfur trioxide [K]. @param water, so3  partial pressures [Pa] > 0
/// @source F. H. Verhoff, J. T. Banchero, Chem. Eng. Prog. 70 (1974) 71
double sulfuric_dew_point(double water, double so3);
/// Acid dew point of hydrogen chloride [K]. @param water, hcl  partial pressures [Pa] > 0
/// @source Y.-H. Kiang, Chem. Eng. 88 (1981) 127
double hydrochloric_dew_point(double water, double hcl);

}  // namespace heatledger::burning
