// Cholesky factor of a sparse symmetric positive definite matrix in an order that keeps it sparse, with its
// dense last block stored as such. Only + − × ÷ √, each entry in a fixed order, so every build gives the same
// digits.
#pragma once

#include <cstdint>
#include <vector>

namespace heatledger::estimate {

/// Lower triangle by columns: rows of column j are row[start[j]] .. row[start[j + 1]], ascending, diagonal
/// first.
struct LowerTriangle {
  std::vector<int> start, row;
  std::vector<double> value;
  std::size_t size() const { return start.empty() ? 0 : start.size() - 1; }
};

/// P = Πᵀ L Lᵀ Π. Unknowns that few rows share come first and stay sparse; the often-seen ones end up in a
/// dense block.
class SparseCholesky {
 public:
  /// CHECKs that the matrix is positive definite.
  void factor(const LowerTriangle& matrix);

  std::size_t size() const { return place_.size(); }
  std::size_t dense_size() const { return dense_; }
  std::size_t nonzeros() const { return sparse_.value.size() + dense_ * (dense_ + 1) / 2; }

  /// z = L⁻¹ Π x, so that x'P⁻¹y = z(x)·z(y). Unknowns that x does not touch cost nothing in the sparse part.
  /// @param x  length size(); left as it was
  /// @param z  receives length size()
  void forward(const std::vector<double>& x, std::vector<double>& z) const;
  /// x = Πᵀ L⁻ᵀ z
  void backward(std::vector<double> z, std::vector<double>& x) const;

  /// x'P⁻¹x
  double squared_norm(const std::vector<double>& x) const;

 private:
  struct Panel;
  void factor_sparse(const LowerTriangle& permuted, std::vector<Panel>& panels);
  void factor_dense();
  void forward_sparse(std::vector<double>& z) const;
  void forward_dense(double* z) const;
  double* column(std::size_t j) { return block_.data() + column_start_[j]; }
  const double* column(std::size_t j) const { return block_.data() + column_start_[j]; }

  std::size_t dense_ = 0;      ///< unknowns of the dense block, the last ones
  LowerTriangle sparse_;       ///< columns before the block, rows down to the end
  std::vector<double> block_;  ///< lower triangle of the block by columns, each from its diagonal down
  std::vector<std::size_t> column_start_;
  std::vector<int> place_;  ///< place_[j]: row of L that stands for unknown j
};

}  // namespace heatledger::estimate
