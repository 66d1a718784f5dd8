// h(T) and cp(T) of one species in one phase, looked up once and then asked as often as a balance needs: with
// ± and working for the sheet, as plain numbers for root searches and time steps. The way between two phases
// stands in heating_path.hpp, saturation and the reach of the ideal gas in saturation.hpp.
#pragma once

#include <memory>
#include <optional>
#include <string>

#include "core/thermo/species_enthalpy.hpp"

namespace heatledger::thermo {

/// Figures of a sheet that stand in place of the tables, for species that no table has (a code name, a
/// brine). A figure typed for a compound of the library belongs into a site record
/// (facts/layered_library.hpp) instead.
struct TypedCurve {
  std::optional<uncertainty::Quantity> formation;      ///< [J/mol] in the phase asked, 298.15 K
  std::optional<uncertainty::Quantity> heat_capacity;  ///< [J/(mol K)], constant
  std::string source;                                  ///< "typed", "typed: plant data 2025"
};

/// One species in one phase. A value; copies share what was looked up.
class PhaseEnthalpy {
 public:
  /// Heat capacity as heat_capacity_curve takes it, formation enthalpy as best_formation gives it.
  /// @param phase     Unstated is read as gas. Aqueous: only with a tabulated partial molar heat capacity or
  ///                  a typed one; Dissolved: as the liquid
  /// @param strength  of a solution; empty: infinite dilution
  /// @errors thermo.no_heat_capacity
  static Result<PhaseEnthalpy> of(const facts::Species& species, molecule::Phase phase,
                                  const std::optional<molecule::Strength>& strength = {},
                                  const TypedCurve& typed = {});

  molecule::Phase phase() const;
  /// Range that the data cover [K]; inside it every call below answers.
  double lowest() const;
  double highest() const;

  // Plain numbers, for root searches. Outside the range they go on with the heat capacity at its end, so that
  // a search always finds its way back; a figure that is shown comes from the calls with ± below.

  /// h(T) − h(298.15 K) [J/mol]. @param temperature  [K] > 0
  double increment(double temperature) const;
  /// [J/(mol K)] > 0
  double heat_capacity(double temperature) const;
  /// Whether a formation enthalpy is known; without one the phase still heats and cools.
  bool has_formation() const;
  /// ΔfH(298.15 K) + increment [J/mol]. @param temperature  [K] > 0. CHECKs has_formation()
  double enthalpy(double temperature) const;
  /// The temperature at which the increment has a value [K]: Newton on the pieces, held above 1 K.
  double temperature_at_increment(double increment) const;

  // With ±, working and cautions, for the sheet. Errors of one species and phase have one source, so that
  // h(T2) − h(T1) and the two sides of a balance cancel what they share.

  /// ΔfH at 298.15 K [J/mol]. @errors thermo.no_formation_data and those of best_formation
  const Result<Sourced>& formation() const;
  /// h(T) − h(298.15 K) [J/mol]. @errors thermo.temperature_range: outside the range, which the message names
  Result<Sourced> increment_with_error(double temperature) const;
  /// ΔfH(298.15 K) + increment [J/mol]. @errors as the two calls above
  Result<Sourced> enthalpy_with_error(double temperature) const;
  /// [J/(mol K)]. @errors thermo.temperature_range
  Result<Sourced> heat_capacity_with_error(double temperature) const;

 private:
  struct Data;
  explicit PhaseEnthalpy(std::shared_ptr<const Data> data) : data_(std::move(data)) {}
  std::shared_ptr<const Data> data_;
};

}  // namespace heatledger::thermo
