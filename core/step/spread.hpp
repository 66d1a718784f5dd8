// The ± of a step's figures: to first order with all correlations, and by seeded draws where the answer
// bends.
#pragma once

#include <functional>

#include "core/step/figures.hpp"

namespace heatledger::step {

/// How much of a figure's ± one number carries.
struct Share {
  std::size_t slot = 0;
  double share =
      0;  ///< of the variance; all shares of a figure add up to one, correlated ones may be negative
};

struct FigureSpread {
  uncertainty::Quantity value;  ///< first order; value and the sources of its ±
  std::vector<Share> shares;    ///< largest first
};

/// To first order, the sought blank moving along so that the balance stays closed.
/// @param v  numbers at the solution
/// @return one for each id; empty where the figure does not exist
std::vector<std::optional<FigureSpread>> first_order(const Model& model, const std::vector<FigureId>& ids,
                                                     const std::vector<double>& v);

/// Numbers that follow from a solved step, whatever they are; one that does not exist there stays empty.
using Numbers =
    std::function<void(const std::vector<double>& v, Work& work, std::vector<std::optional<double>>& out)>;
/// The same for any numbers. @param numbers  gives equally many at every call
std::vector<std::optional<FigureSpread>> first_order_of(const Model& model, const Numbers& numbers,
                                                        const std::vector<double>& v);

/// Amounts of the substances that leave, with the sources of their ± at the solution.
struct LeavingSpread {
  std::vector<uncertainty::Quantity> total, vapour;  ///< one for each substance; [mol] or [mol/s]
};
LeavingSpread leaving_spread(const Model& model, const std::vector<double>& v);

/// What seeded draws say of one figure.
struct DrawnFigure {
  double low = 0, high = 0;  ///< 2.5 and 97.5 % of the draws
  double median = 0;
  double without = 0;  ///< share of the draws in which the figure does not exist
};

struct DrawOptions {
  std::size_t draws = 10000;
  std::uint64_t seed = 20250131;
};

/// Draws every number with a ± from its normal distribution, with the correlations of the data, keeps shares
/// and conversions within their limits, and solves the step again for each.
/// Calls `each` for every draw in which the step has a solution.
void for_each_draw(const Model& model, const std::vector<double>& v, const DrawOptions& options,
                   const std::function<void(const std::vector<double>& v, Work& work)>& each);
/// What these draws say of the figures.
std::vector<std::optional<DrawnFigure>> draw_figures(const Model& model, const std::vector<FigureId>& ids,
                                                     const std::vector<double>& v,
                                                     const DrawOptions& options = {});

}  // namespace heatledger::step
