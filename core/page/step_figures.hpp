// How figures of a process step are spelled: the unit that suits, decimals that follow the ±.
#pragma once

#include <string>

#include "core/step/step.hpp"
#include "core/uncertainty/quantity.hpp"

namespace heatledger::page {

/// A figure in three cells.
struct ShownFigure {
  std::string value, unit, u95;  ///< "−19.7", "MW", "± 0.4"; u95 empty when it is zero
};

/// @param in_si   value and ± [SI]
/// @param ratio   a plain number is a ratio ("1.25"), else it is shown in per cent
ShownFigure shown_figure(const uncertainty::Figure& in_si, const units::Dimension& dimension,
                         bool ratio = false);
ShownFigure shown_answer(const step::Answer& answer);
/// "2.5 to 97.5 % of the draws: 410 to 455 °C"; empty without draws.
std::string drawn_text(const step::Answer& answer);
/// What stands beside an answer: its ±, the interval of the draws where it is not the same on both sides, and
/// for a figure that a safety file uses the unfavourable end.
std::string beside_answer(const step::Answer& answer);
/// Whether a safety file uses the figure.
bool is_for_safety(step::FigureId id);
/// A point of an axis or table in the same unit as `shown_figure` gives it.
double in_shown_unit(double in_si, const units::Dimension& dimension, double largest, bool ratio = false);

/// [mol] or [mol/s] as kmol or kmol/h, [kg] or [kg/s] as kg or kg/h; four significant digits.
std::string shown_amount(double amount, bool flow);
std::string shown_mass(double mass, bool flow);
/// [J] or [W] as MJ or kW with one decimal.
std::string shown_heat(double heat, bool flow);
const char* heat_unit(bool flow);

}  // namespace heatledger::page
