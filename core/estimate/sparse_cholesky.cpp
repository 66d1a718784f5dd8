#include "core/estimate/sparse_cholesky.hpp"

#include <Eigen/OrderingMethods>
#include <Eigen/SparseCore>
#include <algorithm>
#include <cmath>

#include "core/base/check.hpp"

namespace heatledger::estimate {
namespace {

std::size_t at(int index) {
  return static_cast<std::size_t>(index);
}

/// Approximate minimum degree order: place of each unknown.
std::vector<int> sparse_order(const LowerTriangle& matrix) {
  const Eigen::Index n = static_cast<Eigen::Index>(matrix.size());
  const Eigen::Map<const Eigen::SparseMatrix<double>> lower(
      n, n, static_cast<Eigen::Index>(matrix.value.size()), matrix.start.data(), matrix.row.data(),
      matrix.value.data());
  Eigen::SparseMatrix<double> full;
  full = lower.selfadjointView<Eigen::Lower>();
  Eigen::PermutationMatrix<Eigen::Dynamic, Eigen::Dynamic, int> old_of_new;
  Eigen::AMDOrdering<int>()(full, old_of_new);
  std::vector<int> place(matrix.size());
  for (std::size_t i = 0; i < place.size(); ++i)
    place[at(old_of_new.indices()[static_cast<Eigen::Index>(i)])] = static_cast<int>(i);
  return place;
}

LowerTriangle permuted(const LowerTriangle& matrix, const std::vector<int>& place) {
  const std::size_t n = matrix.size();
  std::vector<std::vector<std::pair<int, double>>> columns(n);
  for (std::size_t j = 0; j < n; ++j) {
    for (std::size_t e = at(matrix.start[j]); e < at(matrix.start[j + 1]); ++e) {
      const int a = place[j], b = place[at(matrix.row[e])];
      columns[at(std::min(a, b))].emplace_back(std::max(a, b), matrix.value[e]);
    }
  }
  LowerTriangle out;
  out.start.assign(1, 0);
  for (auto& column : columns) {
    std::sort(column.begin(), column.end());
    for (const auto& [row, value] : column) {
      out.row.push_back(row);
      out.value.push_back(value);
    }
    out.start.push_back(static_cast<int>(out.row.size()));
  }
  return out;
}

/// Entries of each column of L, by the elimination tree: the pattern of a column is that of its matrix column
/// and of its children in the tree.
std::vector<std::size_t> column_counts(const LowerTriangle& matrix) {
  const std::size_t n = matrix.size();
  std::vector<std::size_t> counts(n);
  std::vector<std::vector<int>> pattern(n), children(n);
  std::vector<std::size_t> mark(n, n);
  for (std::size_t j = 0; j < n; ++j) {
    mark[j] = j;
    const auto take = [&](int row) {
      if (at(row) <= j || mark[at(row)] == j) return;
      mark[at(row)] = j;
      pattern[j].push_back(row);
    };
    for (std::size_t e = at(matrix.start[j]); e < at(matrix.start[j + 1]); ++e) take(matrix.row[e]);
    for (const int child : children[j]) {
      for (const int row : pattern[at(child)]) take(row);
      pattern[at(child)].clear();
      pattern[at(child)].shrink_to_fit();
    }
    counts[j] = pattern[j].size() + 1;
    if (!pattern[j].empty())
      children[at(*std::min_element(pattern[j].begin(), pattern[j].end()))].push_back(static_cast<int>(j));
  }
  return counts;
}

/// Where the dense block begins: as early as at least this share of its triangle is filled.
std::size_t dense_begin(const std::vector<std::size_t>& counts) {
  constexpr double kFilled = 0.8;
  std::size_t begin = counts.size(), entries = 0;
  for (std::size_t j = counts.size(); j-- > 0;) {
    entries += counts[j];
    const double width = static_cast<double>(counts.size() - j);
    if (static_cast<double>(entries) >= kFilled * width * (width + 1) / 2) begin = j;
  }
  return begin;
}

/// y[0..n) -= a × x[0..n). Entries are independent, so the compiler may use wide registers without changing a
/// digit.
void subtract(double* __restrict y, const double* __restrict x, double a, std::size_t n) {
  for (std::size_t i = 0; i < n; ++i) y[i] -= a * x[i];
}

/// Four at once, in the order a, b, c, d: the same digits as four calls, a quarter of the memory traffic.
void subtract4(double* __restrict y, const double* __restrict p, const double* __restrict q,
               const double* __restrict r, const double* __restrict s, double a, double b, double c, double d,
               std::size_t n) {
  for (std::size_t i = 0; i < n; ++i) y[i] = (((y[i] - a * p[i]) - b * q[i]) - c * r[i]) - d * s[i];
}

}  // namespace

void SparseCholesky::factor(const LowerTriangle& matrix) {
  place_ = sparse_order(matrix);
  const LowerTriangle ordered = permuted(matrix, place_);
  dense_ = size() - dense_begin(column_counts(ordered));
  column_start_.resize(dense_);
  std::size_t entries = 0;
  for (std::size_t j = 0; j < dense_; ++j) {
    column_start_[j] = entries;
    entries += dense_ - j;
  }
  block_.assign(entries, 0.0);
  const std::size_t begin = size() - dense_;
  for (std::size_t j = begin; j < size(); ++j) {
    for (std::size_t e = at(ordered.start[j]); e < at(ordered.start[j + 1]); ++e)
      column(j - begin)[at(ordered.row[e]) - j] = ordered.value[e];
  }
  factor_sparse(ordered);
  factor_dense();
}

/// Column by column, each taking in the finished columns that reach it; what falls into the block is
/// subtracted there.
void SparseCholesky::factor_sparse(const LowerTriangle& ordered) {
  const std::size_t n = size(), begin = n - dense_;
  sparse_ = LowerTriangle();
  sparse_.start.assign(1, 0);
  std::vector<double> work(n, 0.0);
  std::vector<char> touched(n, 0);
  std::vector<int> rows, next_in_list(begin, -1), list(begin, -1);
  std::vector<std::size_t> position(begin, 0);  // next entry of a finished column to be used
  for (std::size_t j = 0; j < begin; ++j) {
    rows.clear();
    const auto touch = [&](int row) {
      if (touched[at(row)] != 0) return;
      touched[at(row)] = 1;
      rows.push_back(row);
    };
    for (std::size_t e = at(ordered.start[j]); e < at(ordered.start[j + 1]); ++e) {
      touch(ordered.row[e]);
      work[at(ordered.row[e])] = ordered.value[e];
    }
    // Finished columns in ascending order, so that every entry sums its parts in one order.
    std::vector<int> reaching;
    for (int k = list[j]; k >= 0; k = next_in_list[at(k)]) reaching.push_back(k);
    std::sort(reaching.begin(), reaching.end());
    for (const int k : reaching) {
      const std::size_t from = position[at(k)], end = at(sparse_.start[at(k) + 1]);
      const double factor = sparse_.value[from];
      for (std::size_t e = from; e < end; ++e) {
        touch(sparse_.row[e]);
        work[at(sparse_.row[e])] -= factor * sparse_.value[e];
      }
      position[at(k)] = from + 1;
      if (from + 1 < end && at(sparse_.row[from + 1]) < begin) {
        next_in_list[at(k)] = list[at(sparse_.row[from + 1])];
        list[at(sparse_.row[from + 1])] = k;
      }
    }
    std::sort(rows.begin(), rows.end());
    CHECK(rows.front() == static_cast<int>(j) && work[j] > 0, "a positive definite matrix in the fit");
    const double diagonal = std::sqrt(work[j]);
    for (const int row : rows) {
      sparse_.row.push_back(row);
      sparse_.value.push_back(at(row) == j ? diagonal : work[at(row)] / diagonal);
      work[at(row)] = 0;
      touched[at(row)] = 0;
    }
    const std::size_t first = at(sparse_.start[j]) + 1, end = sparse_.row.size();
    sparse_.start.push_back(static_cast<int>(end));
    position[j] = first;
    if (first < end && at(sparse_.row[first]) < begin) {
      next_in_list[j] = list[at(sparse_.row[first])];
      list[at(sparse_.row[first])] = static_cast<int>(j);
    }
  }
  for (std::size_t k = 0; k < begin; ++k) {
    std::size_t e = at(sparse_.start[k]);
    const std::size_t end = at(sparse_.start[k + 1]);
    while (e < end && at(sparse_.row[e]) < begin) ++e;
    for (std::size_t a = e; a < end; ++a) {
      const std::size_t ja = at(sparse_.row[a]);
      double* target = column(ja - begin);
      for (std::size_t b = a; b < end; ++b)
        target[at(sparse_.row[b]) - ja] -= sparse_.value[a] * sparse_.value[b];
    }
  }
}

void SparseCholesky::factor_dense() {
  for (std::size_t j = 0; j < dense_; ++j) {
    double* target = column(j);
    const std::size_t rows = dense_ - j;
    std::size_t k = 0;
    for (; k + 4 <= j; k += 4) {
      const double *p = column(k) + (j - k), *q = column(k + 1) + (j - k - 1),
                   *r = column(k + 2) + (j - k - 2), *s = column(k + 3) + (j - k - 3);
      subtract4(target, p, q, r, s, *p, *q, *r, *s, rows);
    }
    for (; k < j; ++k) subtract(target, column(k) + (j - k), column(k)[j - k], rows);
    CHECK(target[0] > 0, "a positive definite matrix in the fit");
    const double diagonal = std::sqrt(target[0]);
    target[0] = diagonal;
    for (std::size_t i = 1; i < rows; ++i) target[i] /= diagonal;
  }
}

void SparseCholesky::forward_sparse(std::vector<double>& z) const {
  const std::size_t begin = size() - dense_;
  for (std::size_t j = 0; j < begin; ++j) {
    if (z[j] == 0) continue;
    const std::size_t diagonal = at(sparse_.start[j]), end = at(sparse_.start[j + 1]);
    const double value = z[j] / sparse_.value[diagonal];
    z[j] = value;
    for (std::size_t e = diagonal + 1; e < end; ++e) z[at(sparse_.row[e])] -= sparse_.value[e] * value;
  }
}

void SparseCholesky::forward_dense(double* z) const {
  std::size_t j = 0;
  while (j < dense_ && z[j] == 0) ++j;
  for (; j + 4 <= dense_; j += 4) {
    const double *p = column(j), *q = column(j + 1), *r = column(j + 2), *s = column(j + 3);
    z[j] /= p[0];
    z[j + 1] = (z[j + 1] - p[1] * z[j]) / q[0];
    z[j + 2] = ((z[j + 2] - p[2] * z[j]) - q[1] * z[j + 1]) / r[0];
    z[j + 3] = (((z[j + 3] - p[3] * z[j]) - q[2] * z[j + 1]) - r[1] * z[j + 2]) / s[0];
    subtract4(z + j + 4, p + 4, q + 3, r + 2, s + 1, z[j], z[j + 1], z[j + 2], z[j + 3], dense_ - j - 4);
  }
  for (; j < dense_; ++j) {
    z[j] /= column(j)[0];
    subtract(z + j + 1, column(j) + 1, z[j], dense_ - j - 1);
  }
}

void SparseCholesky::forward(const std::vector<double>& x, std::vector<double>& z) const {
  CHECK(x.size() == size(), "one entry per unknown");
  z.resize(size());
  for (std::size_t j = 0; j < size(); ++j) z[at(place_[j])] = x[j];
  forward_sparse(z);
  forward_dense(z.data() + (size() - dense_));
}

void SparseCholesky::backward(std::vector<double> z, std::vector<double>& x) const {
  CHECK(z.size() == size(), "one entry per unknown");
  const std::size_t n = size(), begin = n - dense_;
  for (std::size_t j = dense_; j-- > 0;) {
    double value = z[begin + j];
    const double* below = column(j);
    for (std::size_t i = 1; i < dense_ - j; ++i) value -= below[i] * z[begin + j + i];
    z[begin + j] = value / below[0];
  }
  for (std::size_t j = begin; j-- > 0;) {
    const std::size_t diagonal = at(sparse_.start[j]), end = at(sparse_.start[j + 1]);
    double value = z[j];
    for (std::size_t e = diagonal + 1; e < end; ++e) value -= sparse_.value[e] * z[at(sparse_.row[e])];
    z[j] = value / sparse_.value[diagonal];
  }
  x.resize(n);
  for (std::size_t j = 0; j < n; ++j) x[j] = z[at(place_[j])];
}

double SparseCholesky::squared_norm(const std::vector<double>& x) const {
  std::vector<double> z;
  forward(x, z);
  double sum = 0;
  for (const double entry : z) sum += entry * entry;
  return sum;
}

}  // namespace heatledger::estimate
