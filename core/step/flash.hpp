// Vapour and liquid of an ideal mixture at one temperature and pressure (Raoult's law, ideal gas).
#pragma once

#include <vector>

namespace heatledger::step {

/// What takes part without changing its phase [mol].
struct Flash {
  double gas = 0;     ///< gases that do not condense
  double liquid = 0;  ///< liquids that do not evaporate
};

/// Moles of vapour, gases that do not condense included. y_i p = x_i p°_i for every condensable i.
/// @param amounts  [mol] of each substance
/// @param k        p°_i / p of those that may condense; 0: takes no part (its amount stands in `others` or
/// nowhere)
/// @source H. H. Rachford, J. D. Rice, J. Pet. Technol. 4 (1952) 10-19, equation for the vapour share
double vapour_moles(const Flash& others, const std::vector<double>& amounts, const std::vector<double>& k);

/// Moles that take part in all.
double flash_total(const Flash& others, const std::vector<double>& amounts, const std::vector<double>& k);

/// What of one condensable is vapour [mol].
inline double vapour_part(double amount, double k, double vapour, double liquid) {
  const double weight = k * vapour;
  return weight > 0 ? amount * weight / (weight + liquid) : 0;
}

}  // namespace heatledger::step
