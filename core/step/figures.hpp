// Every figure that a step answers with, as plain numbers: what the sheet shows, what the ± is taken of, what
// the curves draw.
#pragma once

#include "core/step/model.hpp"

namespace heatledger::step {

enum class FigureId : std::uint8_t {
  Sought,          ///< the blank that is sought; always the first
  HeatSetFree,     ///< by the reactions at 25 °C (through-flow) or at process temperature (charge), > 0
                   ///< exothermic
  HeatOfDilution,  ///< set free by dissolving and diluting at 25 °C, as the balance takes it, > 0 gives off
                   ///< heat
  HeatPerMass,     ///< both per kilogram fed [J/kg]
  Conductance,     ///< UA that the duty asks for [W/K]
  Time,            ///< charge: that a typed cooling capacity asks for [s]
  MeanDuty,        ///< charge: heat set free over the time [W]
  PeakDuty,        ///< charge: at the start of a first-order reaction held at temperature [W]
  AdiabaticRise,   ///< heat set free / (m cp) [K]
  AdiabaticEnd,    ///< process temperature plus that [K]
  EndByEnthalpy,   ///< adiabatic end temperature by h(T) [K]
  EndWithVessel,   ///< the same with the vessel [K]
  ThermalInertia,  ///< 1 + vessel / (m cp)
  BoilingPoint,    ///< of the final mixture [K]
  BoiledOff,       ///< solvent boiled off when the rise stops at the boiling point [kg]
};

/// The figure that the person asked for: the sought blank, or UA or time that follow from it.
FigureId headline(const Model& model);

/// Which figures a step has; the order is that of the sheet, the headline first.
std::vector<FigureId> figures_of(const Model& model);

/// The figures after the sought blank is solved. A figure that does not exist at these numbers is empty.
/// @param out  as many as `ids`
void compute_figures(const Model& model, const std::vector<FigureId>& ids, const std::vector<double>& v,
                     Work& work, std::vector<std::optional<double>>& out);

/// Σ x p° over the ideal mixture of the liquids that leave [Pa]; 0 where none has a vapour pressure. Only in
/// a charge.
double vapour_over_mixture(const Model& model, const std::vector<double>& v, const Work& work,
                           double temperature);
/// Where that is a pressure [K]; empty when nothing boils.
std::optional<double> mixture_boiling_point(const Model& model, const std::vector<double>& v,
                                            const Work& work, double pressure);

/// Temperature at which the charge is held [K].
double process_temperature(const Model& model, const std::vector<double>& v);
/// m cp of all that is charged, at a temperature [J/K].
double charge_heat_capacity(const Model& model, const Work& work, const std::vector<double>& v,
                            double temperature);
/// All that is fed [kg].
double mass_fed(const Model& model, const Work& work);

/// "adiabatic temperature rise", and its dimension.
std::string figure_label(const Model& model, FigureId id);
units::Dimension figure_dimension(const Model& model, FigureId id);

}  // namespace heatledger::step
