// Calorific values of a stream, per mole, kilogram and cubic metre, and the Wobbe index of a gas.
#pragma once

#include "core/burning/burn.hpp"

namespace heatledger::burning {

struct Heat {
  double gross = 0, net = 0;  ///< [J] or [W]
};

/// Heat set free by a stream at one temperature, products at the same: net with all water as vapour, gross
/// with it liquid; HCl and SO2 are gases in both. Water that comes along liquid has to be evaporated in the
/// net.
/// @param temperature  [K]
Heat heat_of_burning(const Stream& stream, double temperature, const ProductOffsets& offsets);

/// Enthalpy of vaporisation of water [J/mol], ideal vapour less liquid. @param temperature  [K]
double vaporisation_of_water(double temperature);

/// One mole of gaseous hydrogen chloride into 600 moles of water at 25 °C, the convention of bomb calorimetry
/// [J/mol], about −74 kJ/mol; empty where the tables do not reach that far.
std::optional<double> hydrogen_chloride_into_water();

/// Whether anything in it burns.
bool burns(const Stream& stream);

/// @source ISO 6976:2016 for what is reported and how volumes and compression factors are formed; the heats
/// come
///         from formation enthalpies and heat capacities
FuelNumbers calorific_numbers(const Stream& stream, double combustion_temperature,
                              double metering_temperature, const ProductOffsets& offsets);

/// Compression factor of a gas mixture at 101.325 kPa, Z = 1 − (Σ x √b)²; empty where one gas or the metering
/// temperature has no published summation factor.
/// @param metering_temperature  [K] 273.15 or 288.15
/// @source ISO 6976:2016, table 2
std::optional<double> compression_factor(const Stream& stream, double metering_temperature);

}  // namespace heatledger::burning
