// Cholesky factor of a sparse symmetric positive definite matrix, in an order that keeps it sparse. Only + − × ÷ √ in
// a fixed order, so every build gives the same digits.
#pragma once

#include <cstdint>
#include <vector>

namespace heatledger::estimate {

/// Lower triangle by columns: rows of column j are row[start[j]] .. row[start[j + 1]], ascending, diagonal first.
struct LowerTriangle {
  std::vector<int> start, row;
  std::vector<double> value;
  std::size_t size() const { return start.empty() ? 0 : start.size() - 1; }
};

class SparseCholesky {
 public:
  /// Factors P = Πᵀ L Lᵀ Π. CHECKs that the matrix is positive definite.
  void factor(const LowerTriangle& matrix);

  std::size_t size() const { return factor_.size(); }
  std::size_t nonzeros() const { return factor_.value.size(); }

  /// z = L⁻¹ Π x, so that x'P⁻¹y = z(x)·z(y). Columns whose entry is zero cost nothing.
  /// @param x  length size(); left as it was
  /// @param z  receives length size()
  void forward(const std::vector<double>& x, std::vector<double>& z) const;
  /// x = Πᵀ L⁻ᵀ z
  void backward(std::vector<double> z, std::vector<double>& x) const;

 private:
  LowerTriangle factor_;
  std::vector<int> place_;  ///< place_[j]: row of L that stands for unknown j
};

}  // namespace heatledger::estimate
