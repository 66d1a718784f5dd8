#include "core/step/spread.hpp"
#include "core/uncertainty/covariance.hpp"

#include <algorithm>
#include <cmath>

#include "core/base/check.hpp"
#include "core/step/sought.hpp"

namespace heatledger::step {
namespace {

using uncertainty::Part;
using uncertainty::Quantity;

using Values = std::vector<std::optional<double>>;

/// Figures and heat missing with the sought blank held where it is.
struct Point {
  Values figures;
  std::optional<double> missing;
};

class Gradient {
 public:
  Gradient(const Model& model, const std::vector<FigureId>& ids, const std::vector<double>& v)
      : model_(model), ids_(ids), v_(v) {}

  Point at(std::size_t slot, double value) {
    const double kept = v_[slot];
    v_[slot] = value;
    Point point;
    if (model_.evaluate(v_, work_) == Trouble::None) {
      point.missing = work_.needed - v_[model_.duty_slot()];
      compute_figures(model_, ids_, v_, work_, point.figures);
    }
    v_[slot] = kept;
    return point;
  }

 private:
  const Model& model_;
  const std::vector<FigureId>& ids_;
  std::vector<double> v_;
  Work work_;
};

/// Slopes of the figures and of the missing heat by one number; one-sided where the other side does not
/// exist.
struct Slopes {
  Values figures;
  double missing = 0;
  bool known = false;
};

Slopes slopes(Gradient& gradient, const Point& base, std::size_t slot, double value, double step) {
  Slopes result;
  Point above = gradient.at(slot, value + step), below = gradient.at(slot, value - step);
  double width = 2 * step;
  if (!above.missing && !below.missing) return result;
  if (!above.missing) {
    above = base;
    width = step;
  } else if (!below.missing) {
    below = base;
    width = step;
  }
  result.known = true;
  result.missing = (*above.missing - *below.missing) / width;
  result.figures.resize(base.figures.size());
  for (std::size_t i = 0; i < base.figures.size(); ++i) {
    if (above.figures[i] && below.figures[i])
      result.figures[i] = (*above.figures[i] - *below.figures[i]) / width;
  }
  return result;
}

}  // namespace

std::vector<std::optional<FigureSpread>> first_order(const Model& model, const std::vector<FigureId>& ids,
                                                     const std::vector<double>& v) {
  Gradient gradient(model, ids, v);
  const std::size_t sought = model.sought();
  const Point base = gradient.at(sought, v[sought]);
  CHECK(base.missing.has_value(), "the step is solved before its ± is asked");
  const double scale = std::max(std::fabs(v[sought]), 1e-3);
  const Slopes by_sought = slopes(gradient, base, sought, v[sought], 1e-5 * scale);

  struct Contribution {
    std::size_t slot;
    double slope;
  };
  std::vector<std::vector<Contribution>> found(ids.size());
  for (std::size_t s = 0; s < model.slots().size(); ++s) {
    const Slot& slot = model.slots()[s];
    const double u95 = slot.spread.u95();
    if (s == sought || !(u95 > 0)) continue;
    // A hundredth of the ±: small against any curvature, large against rounding.
    const Slopes by_slot = slopes(gradient, base, s, v[s], 0.01 * u95);
    if (!by_slot.known) continue;
    const double follows =
        by_sought.known && by_sought.missing != 0 ? -by_slot.missing / by_sought.missing : 0;
    for (std::size_t i = 0; i < ids.size(); ++i) {
      if (!by_slot.figures[i]) continue;
      const double along = by_sought.known && by_sought.figures[i] ? *by_sought.figures[i] * follows : 0;
      const double slope = *by_slot.figures[i] + along;
      if (slope != 0) found[i].push_back({s, slope});
    }
  }

  std::vector<std::optional<FigureSpread>> result(ids.size());
  for (std::size_t i = 0; i < ids.size(); ++i) {
    if (!base.figures[i]) continue;
    std::vector<Part> parts;
    for (const Contribution& c : found[i]) {
      for (const Part& part : model.slots()[c.slot].spread.parts())
        parts.push_back({part.source, c.slope * part.u95});
    }
    FigureSpread spread;
    spread.value = Quantity(*base.figures[i], std::move(parts));
    const double variance = spread.value.u95() * spread.value.u95();
    if (variance > 0) {
      for (const Contribution& c : found[i])
        spread.shares.push_back(
            {c.slot,
             c.slope * uncertainty::covariance(model.slots()[c.slot].spread, spread.value) / variance});
      std::stable_sort(spread.shares.begin(), spread.shares.end(),
                       [](const Share& a, const Share& b) { return a.share > b.share; });
    }
    result[i] = std::move(spread);
  }
  return result;
}

LeavingSpread leaving_spread(const Model& model, const std::vector<double>& nominal) {
  std::vector<double> v = nominal;
  Work work;
  const std::size_t sought = model.sought();
  const auto at = [&](std::size_t slot, double value) {
    const double kept = v[slot];
    v[slot] = value;
    const bool exists = model.evaluate(v, work) == Trouble::None;
    v[slot] = kept;
    return exists;
  };
  struct Side {
    std::vector<double> total, vapour;
    double missing = 0;
  };
  /// Slopes by one number, one-sided at the edge of what can be; empty where neither side exists.
  const auto slopes = [&](std::size_t slot, double step) -> std::optional<Side> {
    std::optional<Side> sides[2];
    double width = 0;
    for (int s = 0; s < 2; ++s) {
      const bool exists = at(slot, v[slot] + (s == 0 ? step : -step));
      width += exists ? step : 0;
      if (!exists && !at(slot, v[slot])) return std::nullopt;
      sides[s] = Side{work.leaving, work.vapour, work.needed - v[model.duty_slot()]};
    }
    if (width == 0) return std::nullopt;
    Side slope = *sides[0];
    for (std::size_t i = 0; i < slope.total.size(); ++i)
      slope.total[i] = (slope.total[i] - sides[1]->total[i]) / width;
    for (std::size_t i = 0; i < slope.vapour.size(); ++i)
      slope.vapour[i] = (slope.vapour[i] - sides[1]->vapour[i]) / width;
    slope.missing = (slope.missing - sides[1]->missing) / width;
    return slope;
  };
  CHECK(at(sought, v[sought]), "the step is solved before its ± is asked");
  const std::vector<double> total = work.leaving, vapour = work.vapour;
  std::vector<std::vector<Part>> total_parts(total.size()), vapour_parts(vapour.size());
  const std::optional<Side> by_sought = slopes(sought, 1e-5 * std::max(std::fabs(v[sought]), 1e-3));
  for (std::size_t s = 0; s < model.slots().size(); ++s) {
    const Quantity& spread = model.slots()[s].spread;
    if (s == sought || !(spread.u95() > 0)) continue;
    const std::optional<Side> by_slot = slopes(s, 0.01 * spread.u95());
    if (!by_slot) continue;
    const double follows = by_sought && by_sought->missing != 0 ? -by_slot->missing / by_sought->missing : 0;
    const auto add = [&](std::vector<std::vector<Part>>& parts, const std::vector<double>& direct,
                         const std::vector<double>& along) {
      for (std::size_t i = 0; i < parts.size(); ++i) {
        const double slope = direct[i] + (follows != 0 ? along[i] * follows : 0);
        if (slope == 0) continue;
        for (const Part& part : spread.parts()) parts[i].push_back({part.source, slope * part.u95});
      }
    };
    static const std::vector<double> none;
    add(total_parts, by_slot->total, by_sought ? by_sought->total : none);
    add(vapour_parts, by_slot->vapour, by_sought ? by_sought->vapour : none);
  }
  LeavingSpread result;
  for (std::size_t i = 0; i < total.size(); ++i)
    result.total.push_back(Quantity(total[i], std::move(total_parts[i])));
  for (std::size_t i = 0; i < vapour.size(); ++i)
    result.vapour.push_back(Quantity(vapour[i], std::move(vapour_parts[i])));
  return result;
}

}  // namespace heatledger::step
