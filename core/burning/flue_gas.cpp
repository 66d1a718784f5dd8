#include "core/burning/flue_gas.hpp"

#include <algorithm>
#include <cmath>

#include "core/facts/air.hpp"
#include "core/facts/water_saturation.hpp"
#include "core/molecule/elements.hpp"
#include "core/units/constants.hpp"

namespace heatledger::burning {

namespace {

constexpr double kReference = units::kReferenceTemperature;
constexpr double kPascalPerTorr = 101325.0 / 760;

const Gas& gas_of(std::size_t product) {
  static const std::array<const Gas*, kProducts> gases = [] {
    std::array<const Gas*, kProducts> all{};
    for (std::size_t p = 0; p < kProducts; ++p) all[p] = &combustion_gas(kProductFormulas[p]);
    return all;
  }();
  return *gases[product];
}

const std::array<double, kProducts>& formations() {
  static const std::array<double, kProducts> all = [] {
    std::array<double, kProducts> h{};
    for (std::size_t p = 0; p < kProducts; ++p) h[p] = gas_of(p).enthalpy(kReference);
    return h;
  }();
  return all;
}

}  // namespace

double molar_mass_of(Product product) {
  double sum = 0;
  const Atoms& atoms = gas_of(static_cast<std::size_t>(product)).atoms;
  for (std::size_t e = 0; e < kElements; ++e) sum += atoms[e] * molecule::atomic_mass(kElementNumbers[e]);
  return sum;
}

double total(const Amounts& amounts) {
  double sum = 0;
  for (const double n : amounts) sum += n;
  return sum;
}

double total_dry(const Amounts& amounts) {
  return total(amounts) - of(amounts, Product::H2O);
}

double mass(const Amounts& amounts) {
  double sum = 0;
  for (std::size_t p = 0; p < kProducts; ++p)
    sum += amounts[p] * molar_mass_of(static_cast<Product>(p)) / 1000;
  return sum;
}

double enthalpy(const Amounts& amounts, double temperature, const ProductOffsets& offsets) {
  const double log_t = std::log(temperature);
  double sum = 0;
  for (std::size_t p = 0; p < kProducts; ++p) {
    if (amounts[p] == 0) continue;
    const double h = kFitGasConstant * temperature * gas_of(p).at(temperature, log_t).h_rt;
    const double formation = formations()[p];
    sum += amounts[p] * (formation + offsets[p].formation + offsets[p].factor * (h - formation));
  }
  return sum;
}

double heat_capacity(const Amounts& amounts, double temperature, const ProductOffsets& offsets) {
  const double log_t = std::log(temperature);
  double sum = 0;
  for (std::size_t p = 0; p < kProducts; ++p) {
    if (amounts[p] == 0) continue;
    sum += amounts[p] * offsets[p].factor * kFitGasConstant * gas_of(p).at(temperature, log_t).cp_r;
  }
  return sum;
}

std::optional<double> temperature_at(const Amounts& amounts, double wanted, const ProductOffsets& offsets) {
  double low = 150, high = 8000, t = 1500;
  if (enthalpy(amounts, low, offsets) > wanted || enthalpy(amounts, high, offsets) < wanted) return {};
  for (int i = 0; i < 100; ++i) {
    const double excess = enthalpy(amounts, t, offsets) - wanted;
    (excess > 0 ? high : low) = t;
    double next = t - excess / heat_capacity(amounts, t, offsets);
    if (!(next > low && next < high)) next = low + (high - low) / 2;
    const bool arrived = std::abs(next - t) < 1e-10 * t;
    t = next;
    if (arrived) break;
  }
  return t;
}

Amounts complete_products(const Atoms& atoms) {
  Amounts out{};
  const double h = of(atoms, Element::H), cl = of(atoms, Element::Cl);
  const double hcl = std::min(h, cl);
  of(out, Product::CO2) = of(atoms, Element::C);
  of(out, Product::SO2) = of(atoms, Element::S);
  of(out, Product::HCl) = hcl;
  of(out, Product::Cl2) = (cl - hcl) / 2;
  of(out, Product::H2O) = (h - hcl) / 2;
  of(out, Product::N2) = of(atoms, Element::N) / 2;
  of(out, Product::Ar) = of(atoms, Element::Ar);
  of(out, Product::O2) = (of(atoms, Element::O) - 2 * of(out, Product::CO2) - 2 * of(out, Product::SO2) -
                          of(out, Product::H2O)) /
                         2;
  return out;
}

Atoms Air::atoms() const {
  Atoms a{};
  of(a, Element::O) = 2 * oxygen + 2 * carbon_dioxide + water;
  of(a, Element::N) = 2 * nitrogen;
  of(a, Element::Ar) = argon;
  of(a, Element::C) = carbon_dioxide;
  of(a, Element::H) = 2 * water;
  return a;
}

Amounts Air::products() const {
  Amounts p{};
  of(p, Product::O2) = oxygen;
  of(p, Product::N2) = nitrogen;
  of(p, Product::Ar) = argon;
  of(p, Product::CO2) = carbon_dioxide;
  of(p, Product::H2O) = water;
  return p;
}

Air dry_air() {
  Air air;
  for (const facts::AirComponent& part : facts::dry_air()) {
    if (part.formula == "O2") air.oxygen = part.mole_fraction;
    if (part.formula == "N2") air.nitrogen = part.mole_fraction;
    if (part.formula == "Ar") air.argon = part.mole_fraction;
    if (part.formula == "CO2") air.carbon_dioxide = part.mole_fraction;
  }
  air.words = "dry air";
  return air;
}

Air textbook_air() {
  Air air;
  air.oxygen = 1 / 4.76;
  air.nitrogen = 3.76 / 4.76;
  air.words = "O2 + 3.76 N2";
  return air;
}

Air enriched_air(double oxygen) {
  Air air = dry_air();
  const double of_air = (1 - oxygen) / (1 - air.oxygen);
  air.oxygen = oxygen;
  air.nitrogen *= of_air;
  air.argon *= of_air;
  air.carbon_dioxide *= of_air;
  air.words = "air enriched with oxygen";
  return air;
}

Result<Air> humid(Air air, double relative_humidity, double temperature, double pressure) {
  const Result<double> water = facts::moles_water_per_mole_dry_air(relative_humidity, temperature, pressure);
  if (!water.ok()) return water.error();
  air.water = *water;
  return air;
}

std::optional<double> water_dew_point(double water_pressure) {
  const Result<double> t = facts::boiling_temperature_of_water(water_pressure);
  if (!t.ok()) return {};
  return *t;
}

double sulfuric_dew_point(double water, double so3) {
  const double w = std::log(water / kPascalPerTorr), s = std::log(so3 / kPascalPerTorr);
  return 1 / (2.276e-3 - 2.943e-5 * w - 8.58e-5 * s + 6.20e-6 * w * s);
}

double hydrochloric_dew_point(double water, double hcl) {
  const double w = std::log(water / kPascalPerTorr), s = std::log(hcl / kPascalPerTorr);
  return 1 / (3.7368e-3 - 1.591e-4 * w - 3.06e-5 * s + 1.09e-6 * w * s);
}

}  // namespace heatledger::burning
