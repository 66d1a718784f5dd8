#include "core/molecule/extreme_rays.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <numeric>

namespace heatledger::molecule {
namespace {

__extension__ typedef __int128 Wide;

constexpr std::size_t kMostColumns = 40;
constexpr std::size_t kMostRays = 512;

Wide absolute(Wide value) {
  return value < 0 ? -value : value;
}

Wide common_divisor(Wide a, Wide b) {
  a = absolute(a), b = absolute(b);
  while (b != 0) {
    const Wide rest = a % b;
    a = b;
    b = rest;
  }
  return a;
}

/// a * x + b * y divided by the common divisor of its entries; false beyond 63 bits.
bool combine(std::int64_t a, const WholeVector& x, std::int64_t b, const WholeVector& y, WholeVector& out) {
  std::vector<Wide> sums(x.size());
  Wide divisor = 0;
  for (std::size_t i = 0; i < x.size(); ++i) {
    // Two products of 63-bit numbers add up to less than 127 bits.
    sums[i] = static_cast<Wide>(a) * x[i] + static_cast<Wide>(b) * y[i];
    divisor = common_divisor(divisor, sums[i]);
  }
  if (divisor == 0) divisor = 1;
  out.resize(x.size());
  for (std::size_t i = 0; i < x.size(); ++i) {
    const Wide value = sums[i] / divisor;
    if (absolute(value) > std::numeric_limits<std::int64_t>::max()) return false;
    out[i] = static_cast<std::int64_t>(value);
  }
  return true;
}

/// row · ray; empty beyond 63 bits.
std::optional<std::int64_t> dot(const WholeVector& row, const WholeVector& ray) {
  Wide sum = 0;
  for (std::size_t i = 0; i < row.size(); ++i) {
    sum += static_cast<Wide>(row[i]) * ray[i];
    if (absolute(sum) > (static_cast<Wide>(1) << 125)) return std::nullopt;
  }
  if (absolute(sum) > std::numeric_limits<std::int64_t>::max()) return std::nullopt;
  return static_cast<std::int64_t>(sum);
}

std::uint64_t support(const WholeVector& ray) {
  std::uint64_t bits = 0;
  for (std::size_t i = 0; i < ray.size(); ++i) {
    if (ray[i] != 0) bits |= std::uint64_t{1} << i;
  }
  return bits;
}

}  // namespace

std::optional<WholeVector> whole_row(const std::vector<double>& row) {
  // Counts come from decimals and simple fractions, so the common denominator is found entry by entry.
  std::int64_t factor = 1;
  for (const double value : row) {
    const double scaled = value * static_cast<double>(factor);
    bool found = false;
    for (std::int64_t more = 1; more * factor <= 1000000 && !found; ++more) {
      const double trial = scaled * static_cast<double>(more);
      if (std::fabs(trial - std::round(trial)) <= 1e-9 * std::max(1.0, std::fabs(trial))) {
        factor *= more;
        found = true;
      }
    }
    if (!found) return std::nullopt;
  }
  WholeVector whole;
  for (const double value : row) {
    const double scaled = std::round(value * static_cast<double>(factor));
    if (!(std::fabs(scaled) < 9e15)) return std::nullopt;
    whole.push_back(static_cast<std::int64_t>(scaled));
  }
  return whole;
}

std::optional<std::vector<WholeVector>> extreme_rays(const std::vector<WholeVector>& rows,
                                                     std::size_t columns) {
  if (columns > kMostColumns) return std::nullopt;
  std::vector<WholeVector> rays;
  for (std::size_t i = 0; i < columns; ++i) {
    WholeVector unit(columns, 0);
    unit[i] = 1;
    rays.push_back(std::move(unit));
  }
  std::vector<bool> done(rows.size(), false);
  for (std::size_t step = 0; step < rows.size(); ++step) {
    // The row that makes the fewest new rays goes next.
    std::size_t best = rows.size(), fewest = 0;
    std::vector<std::int64_t> values;
    for (std::size_t r = 0; r < rows.size(); ++r) {
      if (done[r]) continue;
      std::vector<std::int64_t> here;
      std::size_t positive = 0, negative = 0;
      for (const WholeVector& ray : rays) {
        const std::optional<std::int64_t> value = dot(rows[r], ray);
        if (!value) return std::nullopt;
        here.push_back(*value);
        positive += *value > 0;
        negative += *value < 0;
      }
      if (best == rows.size() || positive * negative < fewest) {
        best = r;
        fewest = positive * negative;
        values = std::move(here);
      }
    }
    done[best] = true;
    std::vector<std::uint64_t> supports;
    for (const WholeVector& ray : rays) supports.push_back(support(ray));
    std::vector<WholeVector> next;
    for (std::size_t p = 0; p < rays.size(); ++p) {
      if (values[p] == 0) next.push_back(rays[p]);
    }
    for (std::size_t p = 0; p < rays.size(); ++p) {
      if (values[p] <= 0) continue;
      for (std::size_t n = 0; n < rays.size(); ++n) {
        if (values[n] >= 0) continue;
        // Two rays span an edge when no third ray lives on the species of both.
        const std::uint64_t both = supports[p] | supports[n];
        bool edge = true;
        for (std::size_t k = 0; k < rays.size() && edge; ++k) {
          edge = k == p || k == n || (supports[k] & ~both) != 0;
        }
        if (!edge) continue;
        WholeVector ray;
        if (!combine(-values[n], rays[p], values[p], rays[n], ray)) return std::nullopt;
        next.push_back(std::move(ray));
        if (next.size() > kMostRays) return std::nullopt;
      }
    }
    rays = std::move(next);
  }
  return rays;
}

std::optional<bool> RankCounter::add(WholeVector vector) {
  for (std::size_t i = 0; i < rows_.size(); ++i) {
    const std::size_t pivot = pivots_[i];
    if (vector[pivot] == 0) continue;
    WholeVector reduced;
    if (!combine(rows_[i][pivot], vector, -vector[pivot], rows_[i], reduced)) return std::nullopt;
    vector = std::move(reduced);
  }
  const auto lead = std::find_if(vector.begin(), vector.end(), [](std::int64_t value) { return value != 0; });
  if (lead == vector.end()) return false;
  pivots_.push_back(static_cast<std::size_t>(lead - vector.begin()));
  rows_.push_back(std::move(vector));
  return true;
}

std::vector<std::size_t> wrong_side(const std::vector<WholeVector>& rows, std::size_t columns) {
  RankCounter rank;
  for (const WholeVector& row : rows) {
    if (!rank.add(row)) return {};
  }
  if (rank.pivots().size() + 1 != columns) return {};
  // Back substitution from the one free column, all kept whole.
  std::vector<bool> is_pivot(columns, false);
  for (const std::size_t pivot : rank.pivots()) is_pivot[pivot] = true;
  WholeVector solution(columns, 0);
  solution[static_cast<std::size_t>(std::find(is_pivot.begin(), is_pivot.end(), false) - is_pivot.begin())] =
      1;
  for (std::size_t i = rank.reduced().size(); i-- > 0;) {
    const WholeVector& row = rank.reduced()[i];
    const std::size_t pivot = rank.pivots()[i];
    const std::optional<std::int64_t> sum = dot(row, solution);
    if (!sum) return {};
    // row[pivot] * x + sum = 0: scale the rest so that x is whole.
    WholeVector unit(columns, 0);
    unit[pivot] = row[pivot] > 0 ? -1 : 1;
    WholeVector scaled;
    if (row[pivot] == std::numeric_limits<std::int64_t>::min()) return {};
    if (!combine(std::abs(row[pivot]), solution, *sum, unit, scaled)) return {};
    solution = std::move(scaled);
  }
  std::vector<std::size_t> positive, negative;
  for (std::size_t i = 0; i < columns; ++i) {
    if (solution[i] > 0) positive.push_back(i);
    if (solution[i] < 0) negative.push_back(i);
  }
  if (positive.empty() || negative.empty()) return {};
  return negative.size() <= positive.size() ? negative : positive;
}

}  // namespace heatledger::molecule
