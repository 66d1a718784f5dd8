// Seeded draws through a step.
#include <algorithm>
#include <cmath>

#include "core/step/sought.hpp"
#include "core/step/spread.hpp"
#include "core/uncertainty/covariance.hpp"
#include "core/uncertainty/normal_draws.hpp"

namespace heatledger::step {
namespace {

using uncertainty::kHalfWidth;
using uncertainty::Part;
using uncertainty::Random;

/// Numbers that share sources of error, drawn together through the root of their covariance.
struct Block {
  std::vector<std::size_t> slots;
  std::vector<double> root;  ///< lower triangle by rows, in standard deviations
};

std::vector<Block> blocks(const Model& model) {
  struct Use {
    uncertainty::SourceKey source;
    std::size_t slot;
  };
  const std::vector<Slot>& slots = model.slots();
  std::vector<Use> uses;
  std::vector<std::size_t> group(slots.size());
  for (std::size_t s = 0; s < slots.size(); ++s) {
    group[s] = s;
    if (s == model.sought()) continue;
    for (const Part& part : slots[s].spread.parts()) uses.push_back({part.source, s});
  }
  std::stable_sort(uses.begin(), uses.end(), [](const Use& a, const Use& b) { return a.source < b.source; });
  const auto leader = [&](std::size_t s) {
    while (group[s] != s) s = group[s];
    return s;
  };
  for (std::size_t i = 1; i < uses.size(); ++i) {
    if (uses[i].source != uses[i - 1].source) continue;
    const std::size_t a = leader(uses[i - 1].slot), b = leader(uses[i].slot);
    group[std::max(a, b)] = std::min(a, b);
  }
  std::vector<Block> result;
  for (std::size_t s = 0; s < slots.size(); ++s) {
    if (s == model.sought() || leader(s) != s) continue;
    Block block;
    for (std::size_t t = s; t < slots.size(); ++t) {
      if (t != model.sought() && leader(t) == s && slots[t].spread.u95() > 0) block.slots.push_back(t);
    }
    const std::size_t n = block.slots.size();
    if (n == 0) continue;
    block.root.assign(n * n, 0);
    for (std::size_t i = 0; i < n; ++i) {
      for (std::size_t j = 0; j <= i; ++j)
        block.root[i * n + j] =
            uncertainty::covariance(slots[block.slots[i]].spread, slots[block.slots[j]].spread) /
            (kHalfWidth * kHalfWidth);
    }
    uncertainty::take_root(block.root, n);
    result.push_back(std::move(block));
  }
  return result;
}

/// Slope of the missing heat by the sought blank at the solution; 0 where the balance has no value beside it.
double slope_at(const Model& model, const std::vector<double>& nominal) {
  std::vector<double> v = nominal;
  Work work;
  if (model.evaluate(v, work) != Trouble::None) return 0;
  const double x = v[model.sought()], step = 1e-5 * std::max(std::fabs(x), 1e-3);
  const std::optional<double> above = heat_missing(model, v, work, x + step),
                              below = heat_missing(model, v, work, x - step);
  return above && below ? (*above - *below) / (2 * step) : 0;
}

DrawnFigure summary(std::vector<double>& values, std::size_t draws) {
  std::sort(values.begin(), values.end());
  const auto at = [&](double share) {
    const double place = share * static_cast<double>(values.size() - 1);
    const std::size_t i = static_cast<std::size_t>(place);
    const double between = place - static_cast<double>(i);
    return i + 1 < values.size() ? values[i] + between * (values[i + 1] - values[i]) : values[i];
  };
  DrawnFigure drawn;
  drawn.low = at(0.025);
  drawn.high = at(0.975);
  drawn.median = at(0.5);
  drawn.without = 1 - static_cast<double>(values.size()) / static_cast<double>(draws);
  return drawn;
}

}  // namespace

void for_each_draw(const Model& model, const std::vector<double>& nominal, const DrawOptions& options,
                   const std::function<void(const std::vector<double>& v, Work& work)>& each) {
  const std::vector<Block> drawn_together = blocks(model);
  Random random(options.seed);
  std::vector<double> v = nominal, z;
  Work work;
  const double slope = slope_at(model, nominal);
  for (std::size_t draw = 0; draw < options.draws; ++draw) {
    v = nominal;
    for (const Block& block : drawn_together) {
      const std::size_t n = block.slots.size();
      z.resize(n);
      for (double& one : z) one = random.normal();
      for (std::size_t i = 0; i < n; ++i) {
        double off = 0;
        for (std::size_t j = 0; j <= i; ++j) off += block.root[i * n + j] * z[j];
        const Slot& slot = model.slots()[block.slots[i]];
        double& at = v[block.slots[i]];
        at += off;
        if (slot.blank) at = std::min(slot.high, std::max(slot.low, at));
      }
    }
    if (solve_near(model, v, work, slope)) each(v, work);
  }
}

std::vector<std::optional<DrawnFigure>> draw_figures(const Model& model, const std::vector<FigureId>& ids,
                                                     const std::vector<double>& nominal,
                                                     const DrawOptions& options) {
  std::vector<std::vector<double>> values(ids.size());
  for (std::vector<double>& list : values) list.reserve(options.draws);
  std::vector<std::optional<double>> figures;
  for_each_draw(model, nominal, options, [&](const std::vector<double>& v, Work& work) {
    compute_figures(model, ids, v, work, figures);
    for (std::size_t i = 0; i < ids.size(); ++i) {
      if (figures[i]) values[i].push_back(*figures[i]);
    }
  });
  std::vector<std::optional<DrawnFigure>> result(ids.size());
  for (std::size_t i = 0; i < ids.size(); ++i) {
    // Below a tenth of the draws there is no distribution to speak of.
    if (values[i].size() * 10 >= options.draws && !values[i].empty())
      result[i] = summary(values[i], options.draws);
  }
  return result;
}

}  // namespace heatledger::step
