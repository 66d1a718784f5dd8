// Seeded draws through a step. Only + − × ÷ √ and one logarithm a pair, so that native and browser draw
// alike.
#include <algorithm>
#include <cmath>

#include "core/step/sought.hpp"
#include "core/step/spread.hpp"
#include "core/uncertainty/covariance.hpp"

namespace heatledger::step {
namespace {

using uncertainty::Part;

/// 95 % half width of the normal distribution in standard deviations.
constexpr double kHalfWidth = 1.959963984540054;

/// xoshiro256** with a splitmix64 start. @source D. Blackman, S. Vigna, ACM Trans. Math. Softw. 47 (2021) 36
class Random {
 public:
  explicit Random(std::uint64_t seed) {
    for (std::uint64_t& word : state_) {
      seed += 0x9e3779b97f4a7c15ULL;
      std::uint64_t z = seed;
      z = (z ^ (z >> 30)) * 0xbf58476d1ce4e5b9ULL;
      z = (z ^ (z >> 27)) * 0x94d049bb133111ebULL;
      word = z ^ (z >> 31);
    }
  }

  /// Standard normal, by Marsaglia's polar method. @source SIAM Rev. 6 (1964) 260
  double normal() {
    if (kept_) {
      kept_ = false;
      return other_;
    }
    double a = 0, b = 0, square = 0;
    do {
      a = 2 * uniform() - 1;
      b = 2 * uniform() - 1;
      square = a * a + b * b;
    } while (square >= 1 || square == 0);
    const double factor = std::sqrt(-2 * std::log(square) / square);
    other_ = b * factor;
    kept_ = true;
    return a * factor;
  }

 private:
  static std::uint64_t turned(std::uint64_t x, int by) { return (x << by) | (x >> (64 - by)); }

  double uniform() {
    const std::uint64_t result = turned(state_[1] * 5, 7) * 9, shifted = state_[1] << 17;
    state_[2] ^= state_[0];
    state_[3] ^= state_[1];
    state_[1] ^= state_[2];
    state_[0] ^= state_[3];
    state_[2] ^= shifted;
    state_[3] = turned(state_[3], 45);
    return static_cast<double>(result >> 11) * 0x1.0p-53;
  }

  std::uint64_t state_[4];
  double other_ = 0;
  bool kept_ = false;
};

/// Numbers that share sources of error, drawn together through the root of their covariance.
struct Block {
  std::vector<std::size_t> slots;
  std::vector<double> root;  ///< lower triangle by rows, in standard deviations
};

/// Cholesky's root; a direction without any spread of its own keeps a zero there.
void take_root(std::vector<double>& m, std::size_t n) {
  for (std::size_t j = 0; j < n; ++j) {
    for (std::size_t i = j; i < n; ++i) {
      double sum = m[i * n + j];
      for (std::size_t k = 0; k < j; ++k) sum -= m[i * n + k] * m[j * n + k];
      if (i == j) {
        m[j * n + j] = sum > 1e-12 * m[j * n + j] ? std::sqrt(sum) : 0;
      } else {
        m[i * n + j] = m[j * n + j] > 0 ? sum / m[j * n + j] : 0;
      }
    }
  }
}

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
    take_root(block.root, n);
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

std::vector<std::optional<DrawnFigure>> draw_figures(const Model& model, const std::vector<FigureId>& ids,
                                                     const std::vector<double>& nominal,
                                                     const DrawOptions& options) {
  const std::vector<Block> drawn_together = blocks(model);
  Random random(options.seed);
  std::vector<std::vector<double>> values(ids.size());
  for (std::vector<double>& list : values) list.reserve(options.draws);
  std::vector<double> v = nominal, z;
  std::vector<std::optional<double>> figures;
  Work work;
  const double slope = slope_at(model, nominal);
  for (std::size_t draw = 0; draw < options.draws; ++draw) {
    v = nominal;
    for (const Block& block : drawn_together) {
      const std::size_t n = block.slots.size();
      z.resize(n);
      for (double& each : z) each = random.normal();
      for (std::size_t i = 0; i < n; ++i) {
        double off = 0;
        for (std::size_t j = 0; j <= i; ++j) off += block.root[i * n + j] * z[j];
        const Slot& slot = model.slots()[block.slots[i]];
        double& at = v[block.slots[i]];
        at += off;
        if (slot.blank) at = std::min(slot.high, std::max(slot.low, at));
      }
    }
    if (!solve_near(model, v, work, slope)) continue;
    compute_figures(model, ids, v, work, figures);
    for (std::size_t i = 0; i < ids.size(); ++i) {
      if (figures[i]) values[i].push_back(*figures[i]);
    }
  }
  std::vector<std::optional<DrawnFigure>> result(ids.size());
  for (std::size_t i = 0; i < ids.size(); ++i) {
    // Below a tenth of the draws there is no distribution to speak of.
    if (values[i].size() * 10 >= options.draws && !values[i].empty())
      result[i] = summary(values[i], options.draws);
  }
  return result;
}

}  // namespace heatledger::step
