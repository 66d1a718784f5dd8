// What kind of thing a number measures: exponents of the SI base units, and a kind that keeps apart what has
// equal exponents. Units of measure stand in unit.hpp.
#pragma once

#include <cstdint>
#include <string>
#include <string_view>
#include <vector>

namespace heatledger::units {

/// Keeps apart what the exponents cannot.
enum class Kind : std::uint8_t {
  Plain,
  Temperature,            ///< a point on the scale: 25 °C is 298.15 K
  TemperatureDifference,  ///< a distance on it
  GaugePressure,          ///< above the pressure around; "bar" alone is absolute
  MassFraction,
  MoleFraction,
  VolumeFraction,
};

struct Dimension {
  std::int8_t kg = 0, m = 0, s = 0, K = 0, mol = 0;
  Kind kind = Kind::Plain;

  friend bool operator==(const Dimension& a, const Dimension& b) {
    return a.kg == b.kg && a.m == b.m && a.s == b.s && a.K == b.K && a.mol == b.mol && a.kind == b.kind;
  }
  friend bool operator!=(const Dimension& a, const Dimension& b) { return !(a == b); }
};

namespace dimension {
constexpr Dimension kNumber{0, 0, 0, 0, 0, Kind::Plain};
constexpr Dimension kMassFraction{0, 0, 0, 0, 0, Kind::MassFraction};
constexpr Dimension kMoleFraction{0, 0, 0, 0, 0, Kind::MoleFraction};
constexpr Dimension kVolumeFraction{0, 0, 0, 0, 0, Kind::VolumeFraction};
constexpr Dimension kEnergy{1, 2, -2, 0, 0, Kind::Plain};
constexpr Dimension kEnergyPerMole{1, 2, -2, 0, -1, Kind::Plain};
constexpr Dimension kEnergyPerMass{0, 2, -2, 0, 0, Kind::Plain};
constexpr Dimension kPower{1, 2, -3, 0, 0, Kind::Plain};
constexpr Dimension kTemperature{0, 0, 0, 1, 0, Kind::Temperature};
constexpr Dimension kTemperatureDifference{0, 0, 0, 1, 0, Kind::TemperatureDifference};
constexpr Dimension kPressure{1, -1, -2, 0, 0, Kind::Plain};  ///< absolute
constexpr Dimension kGaugePressure{1, -1, -2, 0, 0, Kind::GaugePressure};
constexpr Dimension kMass{1, 0, 0, 0, 0, Kind::Plain};
constexpr Dimension kAmount{0, 0, 0, 0, 1, Kind::Plain};  ///< also normal cubic metres of gas
constexpr Dimension kMolarMass{1, 0, 0, 0, -1, Kind::Plain};
constexpr Dimension kMassFlow{1, 0, -1, 0, 0, Kind::Plain};
constexpr Dimension kMolarFlow{0, 0, -1, 0, 1, Kind::Plain};
constexpr Dimension kLength{0, 1, 0, 0, 0, Kind::Plain};
constexpr Dimension kArea{0, 2, 0, 0, 0, Kind::Plain};
constexpr Dimension kVolume{0, 3, 0, 0, 0, Kind::Plain};
constexpr Dimension kVolumeFlow{0, 3, -1, 0, 0, Kind::Plain};
constexpr Dimension kTime{0, 0, 1, 0, 0, Kind::Plain};
constexpr Dimension kRate{0, 0, -1, 0, 0, Kind::Plain};
constexpr Dimension kDensity{1, -3, 0, 0, 0, Kind::Plain};
constexpr Dimension kConcentration{0, -3, 0, 0, 1, Kind::Plain};
constexpr Dimension kMolality{-1, 0, 0, 0, 1, Kind::Plain};
constexpr Dimension kHeatCapacity{1, 2, -2, -1, 0, Kind::Plain};
constexpr Dimension kMolarHeatCapacity{1, 2, -2, -1, -1, Kind::Plain};
constexpr Dimension kMassHeatCapacity{0, 2, -2, -1, 0, Kind::Plain};
constexpr Dimension kHeatTransferCoefficient{1, 0, -3, -1, 0, Kind::Plain};  ///< U
constexpr Dimension kHeatTransferPerKelvin{1, 2, -3, -1, 0, Kind::Plain};    ///< UA
constexpr Dimension kEnergyPerVolume{1, -1, -2, 0, 0, Kind::Plain};  ///< the same exponents as a pressure
}  // namespace dimension

/// "an energy per mole", "a gauge pressure"; for dimensions without a name their SI unit, "a figure in kg
/// m²/s".
std::string describe(const Dimension& dimension);

/// Units that suit a dimension, the one to print in first: for hints and for completion. Empty for those
/// without a name.
std::vector<std::string_view> suggested_units(const Dimension& dimension);

}  // namespace heatledger::units
