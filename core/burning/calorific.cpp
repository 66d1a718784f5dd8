#include "core/burning/calorific.hpp"

#include <algorithm>
#include <cmath>

#include "core/base/check.hpp"
#include "core/facts/air.hpp"
#include "core/units/constants.hpp"

namespace heatledger::burning {

namespace {

constexpr double kZeroCelsius = 273.15;

const thermo::PhaseEnthalpy& liquid_water() {
  static const thermo::PhaseEnthalpy water = [] {
    const auto species = facts::resolve_species("water", false);
    CHECK(species.ok(), "the library knows water");
    Result<thermo::PhaseEnthalpy> found = thermo::PhaseEnthalpy::of(**species, molecule::Phase::Liquid);
    CHECK(found.ok(), "water is tabulated as liquid");
    return std::move(found).value();
  }();
  return water;
}

/// Summation factors, the root of the second virial term of a gas at 101.325 kPa.
struct SummationFactor {
  std::string_view name;
  double at_0, at_15;
};
// ISO 6976:2016, table 2, from memory; checked against the compression factors of its worked example and of
// four mixtures (tests/data/checks/gas_mixtures.tsv).
constexpr SummationFactor kFactors[] = {
    {"methane", 0.04886, 0.04452},      {"ethane", 0.0997, 0.0919},    {"propane", 0.1465, 0.1344},
    {"butane", 0.2022, 0.1840},         {"isobutane", 0.1885, 0.1722}, {"nitrogen", 0.0214, 0.0170},
    {"carbon dioxide", 0.0821, 0.0752}, {"oxygen", 0.0311, 0.0276},
};

}  // namespace

double vaporisation_of_water(double temperature) {
  return combustion_gas("H2O").enthalpy(temperature) - liquid_water().enthalpy(temperature);
}

std::optional<double> hydrogen_chloride_into_water() {
  static const std::optional<double> heat = []() -> std::optional<double> {
    const auto species = facts::resolve_species("hydrogen chloride", false);
    CHECK(species.ok(), "the library knows hydrogen chloride");
    const molecule::Strength strength{molecule::Strength::Kind::WaterRatio, 600};
    const auto solution = thermo::tabulated_formation(**species, molecule::Phase::Aqueous, strength);
    const auto gas = thermo::tabulated_formation(**species, molecule::Phase::Gas);
    if (!solution.ok() || !gas.ok()) return {};
    return solution->value.value() - gas->value.value();
  }();
  return heat;
}

bool burns(const Stream& stream) {
  return std::any_of(stream.parts.begin(), stream.parts.end(),
                     [](const Part& part) { return part.moles > 0 && oxygen_demand(part.atoms) > 0; });
}

Heat heat_of_burning(const Stream& stream, double temperature, const ProductOffsets& offsets) {
  Atoms atoms{};
  double in = 0;
  for (const Part& part : stream.parts) {
    const double n = part.moles * stream.scale;
    for (std::size_t e = 0; e < kElements; ++e) atoms[e] += n * part.atoms[e];
    in += n * part.enthalpy(temperature);
  }
  // Oxygen stands among the products with the sign of what is short.
  const Amounts products = complete_products(atoms);
  Heat heat;
  heat.net = in - enthalpy(products, temperature, offsets);
  heat.gross = heat.net + of(products, Product::H2O) * vaporisation_of_water(temperature);
  return heat;
}

std::optional<double> compression_factor(const Stream& stream, double metering_temperature) {
  const bool at_0 = std::abs(metering_temperature - kZeroCelsius) < 1e-6;
  const bool at_15 = std::abs(metering_temperature - kZeroCelsius - 15) < 1e-6;
  if (!at_0 && !at_15) return {};
  double sum = 0, moles = 0;
  for (const Part& part : stream.parts) {
    if (part.species == nullptr || part.species->compound == nullptr) return {};
    const SummationFactor* found = nullptr;
    for (const SummationFactor& factor : kFactors) {
      if (factor.name == part.species->compound->name) found = &factor;
    }
    if (found == nullptr) return {};
    sum += part.moles * (at_0 ? found->at_0 : found->at_15);
    moles += part.moles;
  }
  const double root = sum / moles;
  return 1 - root * root;
}

FuelNumbers calorific_numbers(const Stream& stream, double combustion_temperature,
                              double metering_temperature, const ProductOffsets& offsets) {
  FuelNumbers f;
  const Heat heat = heat_of_burning(stream, combustion_temperature, offsets);
  f.gross = heat.gross;
  f.net = heat.net;
  f.moles = stream.moles();
  f.mass = stream.mass();
  f.gas = true;
  double burning = 0;
  double hydrogen = 0, chlorine = 0;
  for (const Part& part : stream.parts) {
    hydrogen += part.moles * stream.scale * of(part.atoms, Element::H);
    chlorine += part.moles * stream.scale * of(part.atoms, Element::Cl);
    f.gas = f.gas && part.phase == molecule::Phase::Gas;
    f.by_mass = f.by_mass || part.species == nullptr;
    const double demand = oxygen_demand(part.atoms);
    if (demand <= 0) continue;
    f.oxygen += demand * part.moles * stream.scale;
    burning += part.moles * stream.scale;
  }
  f.hydrogen_chloride = std::min(hydrogen, chlorine);
  if (f.by_mass || !(f.moles > 0)) return f;
  f.combustible_share = burning / f.moles;
  if (!f.gas) return f;
  f.molar_volume = units::kNormalMolarVolume * metering_temperature / kZeroCelsius;
  f.relative_density = f.mass / f.moles / facts::dry_air_molar_mass();
  const double volume = f.moles * f.molar_volume;
  f.wobbe_gross = f.gross / volume / std::sqrt(f.relative_density);
  f.wobbe_net = f.net / volume / std::sqrt(f.relative_density);
  f.compression = compression_factor(stream, metering_temperature);
  return f;
}

}  // namespace heatledger::burning
