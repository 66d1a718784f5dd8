// Whole-number linear algebra for balancing: extreme rays of {x >= 0, Ax = 0}, rank, exact rows. Every
// operation tells when numbers outgrow 64 bits instead of wrapping.
#pragma once

#include <cstddef>
#include <cstdint>
#include <optional>
#include <vector>

namespace heatledger::molecule {

using WholeVector = std::vector<std::int64_t>;

/// The row times the smallest number (up to 1,000,000) that makes every entry whole; empty when there is
/// none.
std::optional<WholeVector> whole_row(const std::vector<double>& row);

/// Extreme rays of {x >= 0, rows · x = 0}, each as smallest whole numbers; empty optional beyond 40 columns,
/// 512 rays or 64 bits.
std::optional<std::vector<WholeVector>> extreme_rays(const std::vector<WholeVector>& rows,
                                                     std::size_t columns);

/// When the null space is one line whose vector has both signs: the columns of the sign in the minority. Else
/// empty.
std::vector<std::size_t> wrong_side(const std::vector<WholeVector>& rows, std::size_t columns);

/// Counts linearly independent vectors as they come.
class RankCounter {
 public:
  /// True when the vector is independent of those before; empty on overflow.
  std::optional<bool> add(WholeVector vector);
  const std::vector<WholeVector>& reduced() const { return rows_; }
  const std::vector<std::size_t>& pivots() const { return pivots_; }

 private:
  std::vector<WholeVector> rows_;  ///< in echelon form
  std::vector<std::size_t> pivots_;
};

}  // namespace heatledger::molecule
