#include "core/units/unit_table.hpp"

#include <array>

#include "core/units/constants.hpp"

namespace heatledger::units {
namespace {

// Sources of the factors.
// SI brochure, 9th edition (2019): prefixes; table 8: min, h, d, L, t, and bar, mmHg, atm of the 8th
// edition's tables. ISO 80000-5:2019: thermochemical calorie 4.184 J, International Table calorie 4.1868 J,
// International Table Btu. International yard and pound agreement (1959): lb 0.45359237 kg, ft 0.3048 m, in
// 0.0254 m; lbf = lb × 9.80665 m/s2. All are exact by definition, except where a line says otherwise.
constexpr double kMinute = 60, kHour = 3600, kDay = 86400;
constexpr double kPound = 0.45359237;
constexpr double kFoot = 0.3048;
constexpr double kInch = 0.0254;
constexpr double kInternationalCalorie = 4.1868;
constexpr double kBtu = 1055.05585262;                       // IT calorie × 1000 × lb/kg / 1.8
constexpr double kPsi = kPound * 9.80665 / (kInch * kInch);  // 6894.757… Pa
constexpr double kMillimetreMercury = 133.322387415;  // conventional: 13595.1 kg/m3 × 9.80665 m/s2 × 1 mm
constexpr double kIcePoint = 273.15;
// Gas at stated conditions counts as an amount: ideal, 22.414 m3/kmol at 0 °C and 101.325 kPa, scaled with
// temperature.
constexpr double kNormalCubicMetre = 1 / kNormalMolarVolume;  // mol
constexpr double kAt15 = kNormalCubicMetre * kIcePoint / 288.15;
constexpr double kAt20 = kNormalCubicMetre * kIcePoint / 293.15;
// 60 °F = 288.70556 K and 14.696 psia.
constexpr double kScf = kNormalCubicMetre * (kFoot * kFoot * kFoot) * kIcePoint / (519.67 / 1.8) *
                        (14.696 * kPsi / kStandardAtmosphere);

namespace d = dimension;

constexpr UnitName si(std::string_view text, double factor, const Dimension& dimension) {
  return {text, text, factor, 0, dimension};
}
constexpr UnitName other(std::string_view text, std::string_view display, double factor,
                         const Dimension& dimension) {
  return {text, display, factor, 0, dimension};
}

constexpr std::array kNames = {
    // energy
    si("J", 1, d::kEnergy),
    si("kJ", 1e3, d::kEnergy),
    si("MJ", 1e6, d::kEnergy),
    si("GJ", 1e9, d::kEnergy),
    si("TJ", 1e12, d::kEnergy),
    si("Wh", 3600, d::kEnergy),
    si("kWh", 3.6e6, d::kEnergy),
    si("MWh", 3.6e9, d::kEnergy),
    si("GWh", 3.6e12, d::kEnergy),
    si("cal", kCalorie, d::kEnergy),
    si("kcal", 1e3 * kCalorie, d::kEnergy),
    si("Mcal", 1e6 * kCalorie, d::kEnergy),
    si("Gcal", 1e9 * kCalorie, d::kEnergy),
    si("cal_IT", kInternationalCalorie, d::kEnergy),
    si("kcal_IT", 1e3 * kInternationalCalorie, d::kEnergy),
    si("Btu", kBtu, d::kEnergy),
    other("BTU", "Btu", kBtu, d::kEnergy),
    si("MMBtu", 1e6 * kBtu, d::kEnergy),
    // power
    si("W", 1, d::kPower),
    si("mW", 1e-3, d::kPower),
    si("kW", 1e3, d::kPower),
    si("MW", 1e6, d::kPower),
    si("GW", 1e9, d::kPower),
    // temperature: scales have an offset, K is scale and difference in one
    si("K", 1, d::kTemperature),
    UnitName{"°C", "°C", 1, kIcePoint, d::kTemperature},
    UnitName{"degC", "°C", 1, kIcePoint, d::kTemperature},
    UnitName{"deg C", "°C", 1, kIcePoint, d::kTemperature},
    UnitName{"º"
             "C",
             "°C", 1, kIcePoint, d::kTemperature},
    UnitName{"\u2103", "°C", 1, kIcePoint, d::kTemperature},
    UnitName{"°F", "°F", 1 / 1.8, 459.67 / 1.8, d::kTemperature},
    UnitName{"degF", "°F", 1 / 1.8, 459.67 / 1.8, d::kTemperature},
    UnitName{"deg F", "°F", 1 / 1.8, 459.67 / 1.8, d::kTemperature},
    UnitName{"\u2109", "°F", 1 / 1.8, 459.67 / 1.8, d::kTemperature},
    // absolute pressure
    si("Pa", 1, d::kPressure),
    si("hPa", 100, d::kPressure),
    si("kPa", 1e3, d::kPressure),
    si("MPa", 1e6, d::kPressure),
    si("bar", 1e5, d::kPressure),
    si("mbar", 100, d::kPressure),
    si("atm", kStandardAtmosphere, d::kPressure),
    si("mmHg", kMillimetreMercury, d::kPressure),
    si("torr", kStandardAtmosphere / 760, d::kPressure),
    si("Torr", kStandardAtmosphere / 760, d::kPressure),
    si("psi", kPsi, d::kPressure),
    si("psia", kPsi, d::kPressure),
    si("bara", 1e5, d::kPressure),
    other("bar a", "bara", 1e5, d::kPressure),
    other("bar(a)", "bara", 1e5, d::kPressure),
    si("mbara", 100, d::kPressure),
    si("kPaa", 1e3, d::kPressure),
    other("kPa a", "kPaa", 1e3, d::kPressure),
    other("kPa(a)", "kPaa", 1e3, d::kPressure),
    // gauge pressure
    si("barg", 1e5, d::kGaugePressure),
    other("bar g", "barg", 1e5, d::kGaugePressure),
    other("bar(g)", "barg", 1e5, d::kGaugePressure),
    si("mbarg", 100, d::kGaugePressure),
    other("mbar g", "mbarg", 100, d::kGaugePressure),
    other("mbar(g)", "mbarg", 100, d::kGaugePressure),
    si("kPag", 1e3, d::kGaugePressure),
    other("kPa g", "kPag", 1e3, d::kGaugePressure),
    other("kPa(g)", "kPag", 1e3, d::kGaugePressure),
    si("MPag", 1e6, d::kGaugePressure),
    si("psig", kPsi, d::kGaugePressure),
    // mass
    si("kg", 1, d::kMass),
    si("g", 1e-3, d::kMass),
    si("mg", 1e-6, d::kMass),
    si("t", 1e3, d::kMass),
    si("kt", 1e6, d::kMass),
    si("lb", kPound, d::kMass),
    // amount of substance, and gas at stated conditions
    si("mol", 1, d::kAmount),
    si("mmol", 1e-3, d::kAmount),
    si("kmol", 1e3, d::kAmount),
    si("lbmol", 1e3 * kPound, d::kAmount),
    other("Nm3", "Nm³", kNormalCubicMetre, d::kAmount),
    si("Nm³", kNormalCubicMetre, d::kAmount),
    other("Nm^3", "Nm³", kNormalCubicMetre, d::kAmount),
    other("m3(n)", "m³(n)", kNormalCubicMetre, d::kAmount),
    si("m³(n)", kNormalCubicMetre, d::kAmount),
    other("m3(15C)", "m³(15 °C)", kAt15, d::kAmount),
    other("m3(15 °C)", "m³(15 °C)", kAt15, d::kAmount),
    si("m³(15 °C)", kAt15, d::kAmount),
    other("m3(20C)", "m³(20 °C)", kAt20, d::kAmount),
    other("m3(20 °C)", "m³(20 °C)", kAt20, d::kAmount),
    si("m³(20 °C)", kAt20, d::kAmount),
    si("scf", kScf, d::kAmount),
    si("Mscf", 1e3 * kScf, d::kAmount),
    si("MMscf", 1e6 * kScf, d::kAmount),
    // length and volume; areas and volumes by exponents
    si("m", 1, d::kLength),
    si("cm", 1e-2, d::kLength),
    si("mm", 1e-3, d::kLength),
    si("km", 1e3, d::kLength),
    si("ft", kFoot, d::kLength),
    si("in", kInch, d::kLength),
    si("L", 1e-3, d::kVolume),
    other("l", "L", 1e-3, d::kVolume),
    si("mL", 1e-6, d::kVolume),
    other("ml", "mL", 1e-6, d::kVolume),
    si("hL", 0.1, d::kVolume),
    // time
    si("s", 1, d::kTime),
    si("ms", 1e-3, d::kTime),
    si("min", kMinute, d::kTime),
    si("h", kHour, d::kTime),
    other("hr", "h", kHour, d::kTime),
    si("d", kDay, d::kTime),
    other("day", "d", kDay, d::kTime),
    // fractions
    si("wt%", 0.01, d::kMassFraction),
    other("wt.%", "wt%", 0.01, d::kMassFraction),
    other("wt %", "wt%", 0.01, d::kMassFraction),
    other("% w/w", "wt%", 0.01, d::kMassFraction),
    si("ppmw", 1e-6, d::kMassFraction),
    si("mol%", 0.01, d::kMoleFraction),
    other("mol %", "mol%", 0.01, d::kMoleFraction),
    other("mol-%", "mol%", 0.01, d::kMoleFraction),
    si("vol%", 0.01, d::kVolumeFraction),
    other("vol %", "vol%", 0.01, d::kVolumeFraction),
    other("vol.%", "vol%", 0.01, d::kVolumeFraction),
    si("ppmv", 1e-6, d::kVolumeFraction),
    si("%", 0.01, d::kNumber),
};

constexpr std::string_view kGasHint =
    "Write Nm3 (0 °C, 101.325 kPa), m3(15C), m3(20C) (both 101.325 kPa) or scf (60 °F, 14.696 psia).";
constexpr std::array<AmbiguousName, 20> kAmbiguous = {
    {{"standard m3", kGasHint},
     {"standard m³", kGasHint},
     {"standard m^3", kGasHint},
     {"std m3", kGasHint},
     {"std m³", kGasHint},
     {"stdm3", kGasHint},
     {"Sm3", kGasHint},
     {"Sm³", kGasHint},
     {"sm3", kGasHint},
     {"sm³", kGasHint},
     {"m3(s)", kGasHint},
     {"m³(s)", kGasHint},
     {"ton", "Write t for 1000 kg; 2000 lb for a short ton."},
     {"tons", "Write t for 1000 kg; 2000 lb for a short ton."},
     {"gal", "US and imperial gallons differ: write L, m3 or ft3."},
     {"gpm", "US and imperial gallons differ: write L/min or m3/h."},
     {"ppm", "Write ppmv by volume or ppmw by mass."},
     {"C", "Write degC or °C for a temperature."},
     {"F", "Write degF or °F for a temperature."},
     {"M", "Write mol/L for a concentration."}}};

bool is_letter(char c) {
  return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z') || c == '_';
}

/// A name ends where no letter follows, so that "mol" is not "m".
template <typename Names>
auto longest(const Names& names, std::string_view text) -> decltype(&names[0]) {
  decltype(&names[0]) best = nullptr;
  for (const auto& name : names) {
    const std::size_t size = name.text.size();
    if (text.compare(0, size, name.text) != 0 || (best != nullptr && best->text.size() >= size)) continue;
    if (text.size() > size && is_letter(name.text.back()) && (is_letter(text[size]) || text[size] == '%'))
      continue;
    best = &name;
  }
  return best;
}

char lower(char c) {
  return c >= 'A' && c <= 'Z' ? static_cast<char>(c - 'A' + 'a') : c;
}

bool equal_ignoring_case(std::string_view a, std::string_view b) {
  if (a.size() != b.size()) return false;
  for (std::size_t i = 0; i < a.size(); ++i) {
    if (lower(a[i]) != lower(b[i])) return false;
  }
  return true;
}

}  // namespace

const UnitName* find_unit_name(std::string_view text) {
  return longest(kNames, text);
}

const AmbiguousName* find_ambiguous_name(std::string_view text) {
  return longest(kAmbiguous, text);
}

std::string_view nearest_unit_name(std::string_view text) {
  for (const UnitName& name : kNames) {
    if (equal_ignoring_case(name.text, text)) return name.text;
  }
  return {};
}

}  // namespace heatledger::units
