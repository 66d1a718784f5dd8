// Figures as people read them: rounding that follows the ±, units after the figure.
#pragma once

#include <string>

#include "core/uncertainty/quantity.hpp"

namespace heatledger::units {

/// Decimals that an uncertainty justifies: two significant digits of u95, at most `most`; `most` when u95 is
/// zero.
int decimals_for(double u95, int most);

/// A figure with its ± for running text: "−552.6 ± 3.0"; the ± is left out when it is zero.
std::string figure_text(const uncertainty::Figure& figure, int most_decimals);

}  // namespace heatledger::units
