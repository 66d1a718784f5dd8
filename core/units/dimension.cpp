#include "core/units/dimension.hpp"

#include <array>

namespace heatledger::units {
namespace {

struct Named {
  Dimension dimension;
  std::string_view words;
  std::string_view units;  ///< separated by commas
};

constexpr std::array<Named, 32> kNamed = {{
    {dimension::kNumber, "a plain number", ""},
    {dimension::kMassFraction, "a mass fraction", "wt%,ppmw"},
    {dimension::kMoleFraction, "a mole fraction", "mol%"},
    {dimension::kVolumeFraction, "a volume fraction", "vol%,ppmv"},
    {dimension::kEnergy, "an energy", "kJ,MJ,GJ,kWh,kcal,Btu,J"},
    {dimension::kEnergyPerMole, "an energy per mole", "kJ/mol,J/mol,kcal/mol"},
    {dimension::kEnergyPerMass, "an energy per mass", "kJ/kg,MJ/kg,kWh/t,kcal/kg,Btu/lb"},
    {dimension::kPower, "a power", "kW,MW,W,kJ/h,MJ/h,Btu/h"},
    {dimension::kTemperature, "a temperature", "°C,K,°F"},
    {dimension::kTemperatureDifference, "a temperature difference", "K"},
    {dimension::kPressure, "an absolute pressure", "bar,kPa,mbar,MPa,Pa,atm,psia,mmHg"},
    {dimension::kGaugePressure, "a gauge pressure", "barg,mbarg,kPag,psig"},
    {dimension::kMass, "a mass", "kg,t,g,lb"},
    {dimension::kAmount, "an amount of substance", "kmol,mol,Nm3"},
    {dimension::kMolarMass, "a molar mass", "g/mol,kg/kmol"},
    {dimension::kMassFlow, "a mass flow", "kg/h,t/h,kg/s,lb/h"},
    {dimension::kMolarFlow, "a molar flow", "kmol/h,mol/s,Nm3/h"},
    {dimension::kLength, "a length", "m,mm,ft"},
    {dimension::kArea, "an area", "m2,ft2"},
    {dimension::kVolume, "a volume", "m3,L,ft3"},
    {dimension::kVolumeFlow, "a volume flow", "m3/h,m3/s,L/h"},
    {dimension::kTime, "a time", "h,min,s,d"},
    {dimension::kRate, "a rate", "1/h,1/s"},
    {dimension::kDensity, "a density", "kg/m3,g/L,g/cm3"},
    {dimension::kConcentration, "a concentration", "mol/L,kmol/m3"},
    {dimension::kMolality, "a molality", "mol/kg"},
    {dimension::kHeatCapacity, "a heat capacity", "kJ/K"},
    {dimension::kMolarHeatCapacity, "a molar heat capacity", "J/(mol K)"},
    {dimension::kMassHeatCapacity, "a heat capacity per mass", "kJ/(kg K)"},
    {dimension::kHeatTransferCoefficient, "a heat transfer coefficient", "W/(m2 K)"},
    {dimension::kHeatTransferPerKelvin, "a heat transfer per kelvin", "W/K,kW/K"},
    {Dimension{0, 1, -1, 0, 0, Kind::Plain}, "a velocity", "m/s"},
}};

const Named* find(const Dimension& dimension) {
  for (const Named& entry : kNamed) {
    if (entry.dimension == dimension) return &entry;
  }
  return nullptr;
}

void add_base(std::string& text, std::string_view name, int exponent) {
  constexpr std::array<std::string_view, 10> kRaised = {"\u2070", "",       "\u00B2", "\u00B3", "\u2074",
                                                        "\u2075", "\u2076", "\u2077", "\u2078", "\u2079"};
  if (exponent <= 0) return;
  if (!text.empty()) text += ' ';
  text += name;
  if (exponent < 10) text += kRaised[static_cast<std::size_t>(exponent)];
}

}  // namespace

std::string describe(const Dimension& dimension) {
  if (const Named* entry = find(dimension)) return std::string(entry->words);
  std::string above, below;
  const std::array<std::pair<std::string_view, int>, 5> bases = {{{"kg", dimension.kg},
                                                                  {"m", dimension.m},
                                                                  {"mol", dimension.mol},
                                                                  {"K", dimension.K},
                                                                  {"s", dimension.s}}};
  for (const auto& [name, exponent] : bases) {
    add_base(above, name, exponent);
    add_base(below, name, -exponent);
  }
  if (above.empty()) above = "1";
  if (below.empty()) return "a figure in " + above;
  return "a figure in " + above + "/" + (below.find(' ') == std::string::npos ? below : "(" + below + ")");
}

std::vector<std::string_view> suggested_units(const Dimension& dimension) {
  std::vector<std::string_view> result;
  const Named* entry = find(dimension);
  std::string_view rest = entry == nullptr ? std::string_view() : entry->units;
  while (!rest.empty()) {
    const std::size_t comma = rest.find(',');
    result.push_back(rest.substr(0, comma));
    rest = comma == std::string_view::npos ? std::string_view() : rest.substr(comma + 1);
  }
  return result;
}

}  // namespace heatledger::units
