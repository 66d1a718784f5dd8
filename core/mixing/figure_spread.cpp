#include "core/mixing/figure_spread.hpp"

#include <algorithm>
#include <cmath>

namespace heatledger::mixing {
namespace {

/// The figure and the heat missing with the sought blank held where it is.
struct Point {
  double figure = 0, missing = 0;
};

}  // namespace

std::optional<uncertainty::Quantity> spread_of(const step::Model& model, const std::vector<double>& v,
                                               const FigureOf& figure) {
  step::Work work;
  std::vector<double> moved = v;
  const auto at = [&](std::size_t slot, double value) -> std::optional<Point> {
    moved[slot] = value;
    const bool sound = model.evaluate(moved, work) == step::Trouble::None;
    const std::optional<double> there = sound ? figure(model, moved, work) : std::nullopt;
    const double missing = work.needed - moved[model.duty_slot()];
    moved[slot] = v[slot];
    return there ? std::optional<Point>(Point{*there, missing}) : std::nullopt;
  };
  const std::size_t sought = model.sought();
  const std::optional<Point> base = at(sought, v[sought]);
  if (!base) return std::nullopt;
  /// One-sided where the other side does not exist.
  const auto slope = [&](std::size_t slot, double step) -> std::optional<Point> {
    const std::optional<Point> above = at(slot, v[slot] + step), below = at(slot, v[slot] - step);
    if (!above && !below) return std::nullopt;
    const double width = above && below ? 2 * step : step;
    const Point high = above.value_or(*base), low = below.value_or(*base);
    return Point{(high.figure - low.figure) / width, (high.missing - low.missing) / width};
  };
  const std::optional<Point> follows = slope(sought, 1e-5 * std::max(std::fabs(v[sought]), 1e-3));
  std::vector<uncertainty::Part> parts;
  for (std::size_t s = 0; s < model.slots().size(); ++s) {
    const step::Slot& slot = model.slots()[s];
    const double u95 = slot.spread.u95();
    if (s == sought || !(u95 > 0)) continue;
    // A hundredth of the ±: small against any curvature, large against rounding.
    const std::optional<Point> by = slope(s, 0.01 * u95);
    if (!by) continue;
    const double moves = follows && follows->missing != 0 ? -by->missing / follows->missing : 0;
    const double whole = by->figure + (follows ? follows->figure * moves : 0);
    if (whole == 0) continue;
    for (const uncertainty::Part& part : slot.spread.parts())
      parts.push_back({part.source, whole * part.u95});
  }
  return uncertainty::Quantity(base->figure, std::move(parts));
}

}  // namespace heatledger::mixing
