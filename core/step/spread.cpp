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
  Gradient(const Model& model, const Numbers& numbers, const std::vector<double>& v)
      : model_(model), numbers_(numbers), v_(v) {}

  Point at(std::size_t slot, double value) {
    const double kept = v_[slot];
    v_[slot] = value;
    Point point;
    if (model_.evaluate(v_, work_) == Trouble::None) {
      point.missing = work_.needed - v_[model_.duty_slot()];
      numbers_(v_, work_, point.figures);
    }
    v_[slot] = kept;
    return point;
  }

 private:
  const Model& model_;
  const Numbers& numbers_;
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
  return first_order_of(
      model,
      [&](const std::vector<double>& at, Work& work, Values& out) {
        compute_figures(model, ids, at, work, out);
      },
      v);
}

std::vector<std::optional<FigureSpread>> first_order_of(const Model& model, const Numbers& numbers,
                                                        const std::vector<double>& v) {
  Gradient gradient(model, numbers, v);
  const std::size_t sought = model.sought();
  const Point base = gradient.at(sought, v[sought]);
  CHECK(base.missing.has_value(), "the step is solved before its ± is asked");
  const double scale = std::max(std::fabs(v[sought]), 1e-3);
  const Slopes by_sought = slopes(gradient, base, sought, v[sought], 1e-5 * scale);

  struct Contribution {
    std::size_t slot;
    double slope;
  };
  const std::size_t count = base.figures.size();
  std::vector<std::vector<Contribution>> found(count);
  for (std::size_t s = 0; s < model.slots().size(); ++s) {
    const Slot& slot = model.slots()[s];
    const double u95 = slot.spread.u95();
    if (s == sought || !(u95 > 0)) continue;
    // A hundredth of the ±: small against any curvature, large against rounding.
    const Slopes by_slot = slopes(gradient, base, s, v[s], 0.01 * u95);
    if (!by_slot.known) continue;
    const double follows =
        by_sought.known && by_sought.missing != 0 ? -by_slot.missing / by_sought.missing : 0;
    for (std::size_t i = 0; i < count; ++i) {
      if (!by_slot.figures[i]) continue;
      const double along = by_sought.known && by_sought.figures[i] ? *by_sought.figures[i] * follows : 0;
      const double slope = *by_slot.figures[i] + along;
      if (slope != 0) found[i].push_back({s, slope});
    }
  }

  std::vector<std::optional<FigureSpread>> result(count);
  for (std::size_t i = 0; i < count; ++i) {
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

LeavingSpread leaving_spread(const Model& model, const std::vector<double>& v) {
  const auto amounts = [](const std::vector<double>&, Work& work, Values& out) {
    out.assign(work.leaving.begin(), work.leaving.end());
    out.insert(out.end(), work.vapour.begin(), work.vapour.end());
  };
  const std::vector<std::optional<FigureSpread>> spreads = first_order_of(model, amounts, v);
  LeavingSpread result;
  for (std::size_t i = 0; i < spreads.size(); ++i)
    (i < spreads.size() / 2 ? result.total : result.vapour).push_back(spreads[i]->value);
  return result;
}

}  // namespace heatledger::step
