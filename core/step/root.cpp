#include "core/step/root.hpp"

#include <algorithm>
#include <cmath>

namespace heatledger::step {

std::optional<double> close_in(const Function& f, double a, double fa, double b, double fb) {
  double c = a, fc = fa, before = b - a, last = before;
  for (int turn = 0; turn < 200; ++turn) {
    if (std::fabs(fc) < std::fabs(fb)) {
      a = b, b = c, c = a;
      fa = fb, fb = fc, fc = fa;
    }
    const double close = 4e-16 * std::fabs(b), middle = 0.5 * (c - b);
    if (std::fabs(middle) <= close || fb == 0) return b;
    if (std::fabs(before) < close || std::fabs(fa) <= std::fabs(fb)) {
      last = before = middle;
    } else {
      // Inverse quadratic step, or a secant where only two points differ.
      double p = 0, q = 0;
      const double s = fb / fa;
      if (a == c) {
        p = 2 * middle * s;
        q = 1 - s;
      } else {
        const double r = fb / fc, t = fa / fc;
        p = s * (2 * middle * t * (t - r) - (b - a) * (r - 1));
        q = (t - 1) * (r - 1) * (s - 1);
      }
      if (p > 0) q = -q;
      p = std::fabs(p);
      if (2 * p < std::min(3 * middle * q - std::fabs(close * q), std::fabs(before * q))) {
        before = last;
        last = p / q;
      } else {
        last = before = middle;
      }
    }
    a = b, fa = fb;
    b += std::fabs(last) > close ? last : (middle > 0 ? close : -close);
    const std::optional<double> there = f(b);
    if (!there) return std::nullopt;
    fb = *there;
    if ((fb > 0) == (fc > 0)) {
      c = a, fc = fa;
      before = last = b - a;
    }
  }
  return b;
}

Search find_roots(const Function& f, const std::vector<double>& points, double small) {
  Search search;
  std::optional<double> before;
  double before_x = 0;
  for (const double x : points) {
    const std::optional<double> here = f(x);
    if (!here) {
      before.reset();
      continue;
    }
    if (!search.lowest) {
      search.lowest = search.highest = here;
      search.first_x = search.nearest_x = x;
      search.nearest = *here;
    }
    search.last_x = x;
    search.lowest = std::min(*search.lowest, *here);
    search.highest = std::max(*search.highest, *here);
    if (std::fabs(*here) < std::fabs(search.nearest)) {
      search.nearest = *here;
      search.nearest_x = x;
    }
    if (std::fabs(*here) <= small) {
      // Neighbours that are all zero are one answer, not many.
      if (!before || std::fabs(*before) > small) search.roots.push_back(x);
    } else if (before && std::fabs(*before) > small && (*before > 0) != (*here > 0)) {
      if (const std::optional<double> root = close_in(f, before_x, *before, x, *here))
        search.roots.push_back(*root);
    }
    before = here;
    before_x = x;
  }
  return search;
}

}  // namespace heatledger::step
