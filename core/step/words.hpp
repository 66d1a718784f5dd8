// Figures of a step in running text.
#pragma once

#include <string>

#include "core/units/dimension.hpp"

namespace heatledger::step {

/// "−19.7 MW", "4.49 GJ": four significant digits in the unit that suits them.
/// @param heat  [W] for through-flow, else [J]
std::string heat_text(double heat, bool flow);
/// "43.7 mol/s", "24.37 kmol".
std::string amount_text(double amount, bool flow);
/// "2 000 kg", "1.2 t/h" style: kg or kg/s. @param mass [kg] or [kg/s]
std::string mass_text(double mass, bool flow);
/// "300.0 °C".
std::string celsius(double kelvin);
/// Four significant digits without unit.
std::string digits(double value);
/// A blank's value in the unit that suits its dimension.
std::string value_text(double value, const units::Dimension& dimension, bool flow);

}  // namespace heatledger::step
