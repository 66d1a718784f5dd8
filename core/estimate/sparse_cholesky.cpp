#include "core/estimate/sparse_cholesky.hpp"

#include <Eigen/OrderingMethods>
#include <Eigen/SparseCholesky>

#include "core/base/check.hpp"

namespace heatledger::estimate {

void SparseCholesky::factor(const LowerTriangle& matrix) {
  const Eigen::Index n = static_cast<Eigen::Index>(matrix.size());
  const Eigen::Map<const Eigen::SparseMatrix<double>> lower(n, n, static_cast<Eigen::Index>(matrix.value.size()),
                                                            matrix.start.data(), matrix.row.data(), matrix.value.data());
  Eigen::SimplicialLLT<Eigen::SparseMatrix<double>, Eigen::Lower, Eigen::AMDOrdering<int>> solver;
  solver.compute(lower);
  CHECK(solver.info() == Eigen::Success, "a positive definite matrix in the fit");
  const Eigen::SparseMatrix<double> l = solver.matrixL();
  factor_.start.assign(l.outerIndexPtr(), l.outerIndexPtr() + n + 1);
  factor_.row.assign(l.innerIndexPtr(), l.innerIndexPtr() + l.nonZeros());
  factor_.value.assign(l.valuePtr(), l.valuePtr() + l.nonZeros());
  const auto& order = solver.permutationP().indices();
  place_.assign(order.data(), order.data() + order.size());
}

void SparseCholesky::forward(const std::vector<double>& x, std::vector<double>& z) const {
  const std::size_t n = size();
  CHECK(x.size() == n, "one entry per unknown");
  z.assign(n, 0.0);
  for (std::size_t j = 0; j < n; ++j) z[static_cast<std::size_t>(place_[j])] = x[j];
  for (std::size_t j = 0; j < n; ++j) {
    if (z[j] == 0) continue;
    const std::size_t diagonal = static_cast<std::size_t>(factor_.start[j]), end = static_cast<std::size_t>(factor_.start[j + 1]);
    const double value = z[j] / factor_.value[diagonal];
    z[j] = value;
    for (std::size_t e = diagonal + 1; e < end; ++e) z[static_cast<std::size_t>(factor_.row[e])] -= factor_.value[e] * value;
  }
}

void SparseCholesky::backward(std::vector<double> z, std::vector<double>& x) const {
  const std::size_t n = size();
  CHECK(z.size() == n, "one entry per unknown");
  for (std::size_t j = n; j-- > 0;) {
    const std::size_t diagonal = static_cast<std::size_t>(factor_.start[j]), end = static_cast<std::size_t>(factor_.start[j + 1]);
    double value = z[j];
    for (std::size_t e = diagonal + 1; e < end; ++e) value -= factor_.value[e] * z[static_cast<std::size_t>(factor_.row[e])];
    z[j] = value / factor_.value[diagonal];
  }
  x.resize(n);
  for (std::size_t j = 0; j < n; ++j) x[j] = z[static_cast<std::size_t>(place_[j])];
}

}  // namespace heatledger::estimate
