#include "core/units/display.hpp"

#include <algorithm>
#include <cmath>

#include "core/base/check.hpp"
#include "core/base/number_text.hpp"

namespace heatledger::units {

int decimals_for(double u95, int most) {
  CHECK(std::isfinite(u95) && u95 >= 0, "an interval has a finite half width");
  if (u95 == 0) return most;
  // Two significant digits after rounding: 9.96 would print as 10.0, so it counts among the tens already.
  int decimals = 0;
  double scaled = u95;
  while (scaled < 9.95 && decimals < most) {
    scaled *= 10;
    ++decimals;
  }
  return decimals;
}

std::string figure_text(const uncertainty::Figure& figure, int most_decimals) {
  const int decimals = decimals_for(figure.u95, most_decimals);
  std::string text = display_number(figure.value, decimals);
  if (figure.u95 > 0) text += " \u00B1 " + display_number(figure.u95, decimals);
  return text;
}

}  // namespace heatledger::units
