// One burning step as plain numbers: streams in, air by ratio or by oxygen in the flue gas, flame, chamber,
// flue gas, heat. Words, ± and drawings stand in answer.hpp.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "core/burning/flue_gas.hpp"
#include "core/burning/gibbs.hpp"
#include "core/burning/stream.hpp"

namespace heatledger::burning {

/// What fixes the amount of combustion air.
enum class AirRule : std::uint8_t {
  Ratio,        ///< all O2 entering / O2 for complete burning of everything that burns
  BurnerRatio,  ///< O2 of the combustion air / O2 that fuel and support fuel need
  FlueDry,      ///< share of O2 in the dry flue gas
  FlueWet,      ///< in the wet flue gas
  Flow          ///< moles of the combustion air, as it is
};

enum class Sought : std::uint8_t {
  Temperature,  ///< of the chamber
  Support,      ///< amount of support fuel for a typed chamber temperature
  Ratio         ///< air ratio for a typed chamber temperature
};

/// All in SI; amounts are flows per second and heats are power.
struct BurnInput {
  std::vector<Stream> streams;  ///< all but air
  Air air = dry_air();
  step::Typed air_temperature{298.15, 0};  ///< [K]
  AirRule rule = AirRule::Ratio;
  step::Typed air_figure{1, 0};         ///< ratio, share or moles
  std::optional<step::Typed> dilution;  ///< moles of dilution air, with its water
  step::Typed dilution_temperature{298.15, 0};
  double pressure = 101325;                           ///< [Pa]
  step::Blank loss;                                   ///< [W] or [J]
  step::Blank loss_share;                             ///< of the net heat set free, instead
  step::Blank chamber_temperature, flue_temperature;  ///< [K]
  step::Blank chamber_volume;                         ///< [m3]
  step::Blank reference_oxygen;  ///< share in dry flue gas that concentrations are stated at
  step::Blank lfl;               ///< typed lower flammability limit at 25 °C of what burns in a vent, 0 .. 1
  step::Blank so3, hcl;          ///< shares of the wet flue gas, typed for the acid dew point
  double combustion_temperature = 298.15, metering_temperature = 273.15;  ///< [K] of the calorific values
  /// Gross values with the hydrogen chloride dissolved in 600 moles of water, as a bomb leaves it.
  bool chloride_in_water = false;
  Sought sought = Sought::Temperature;
  ProductOffsets offsets{};  ///< for the ± only
};

/// One stream that burns.
struct FuelNumbers {
  std::size_t stream = 0;
  bool gas = false;      ///< all parts are gases
  bool by_mass = false;  ///< known by its analysis: nothing per mole
  double moles = 0, mass = 0;
  double gross = 0, net = 0;              ///< of the whole stream [J] or [W], at the combustion temperature
  double oxygen = 0;                      ///< moles of O2 its burnable parts need
  double hydrogen_chloride = 0;           ///< moles formed
  double molar_volume = 0;                ///< [m3/mol] at the metering temperature, ideal
  double relative_density = 0;            ///< ideal, to dry air
  double wobbe_gross = 0, wobbe_net = 0;  ///< [J/m3]
  std::optional<double> compression;      ///< compression factor at the metering conditions
  double combustible_share = 0;           ///< moles that burn / all moles
  double lfl = 0;     ///< of what burns in it, in air at 25 °C, as a share of the volume; 0: not given
  double lfl_at = 0;  ///< at the temperature of the stream
  bool lfl_typed = false;
};

struct Numbers {
  std::vector<FuelNumbers> fuels;
  double fuel_mass = 0, fuel_moles = 0;          ///< of the streams that burn
  double oxygen_needed = 0, oxygen_brought = 0;  ///< O2 for complete burning; O2 that the streams bring along
  double air = 0;                                ///< moles of combustion air with its water
  double stoichiometric = 0;  ///< moles of air, with its water, that all which burns would need by itself
  double dilution = 0;
  double air_molar_mass = 0;  ///< [kg/mol]
  double ratio = 0;
  std::optional<double> burner_ratio;
  double support = 0;                   ///< scale of the support fuel found
  bool complete = true;                 ///< enough oxygen for complete burning
  Amounts flame{}, flue{};              ///< behind the flame; behind dilution and quench
  Amounts chamber{};                    ///< flame and dilution
  double gross_heat = 0, net_heat = 0;  ///< set free by the streams that burn, 25 °C
  double sensible_in = 0;               ///< of all streams and airs above 25 °C
  double loss = 0;
  std::optional<double> flame_temperature, chamber_temperature,
      quench_temperature;  ///< [K], complete burning
  std::optional<double> flue_sensible, flue_latent, load, efficiency;
  std::optional<double> dew_point, sulfuric_dew_point, hydrochloric_dew_point;
  std::optional<double> residence;         ///< [s]
  std::optional<Equilibrium> equilibrium;  ///< of the flame
};

/// @param with_equilibrium  also the flame at chemical equilibrium
/// @errors burning.nothing_burns; burning.no_oxygen_left: the typed oxygen content cannot be reached;
///         burning.no_chamber_temperature; burning.no_support; burning.support_not_found; burning.too_hot;
///         those of equilibrium_burnt
Result<Numbers> burn(const BurnInput& input, bool with_equilibrium = true);

}  // namespace heatledger::burning
