#include "core/estimate/sparse_cholesky.hpp"

#include <Eigen/OrderingMethods>
#include <Eigen/SparseCore>
#include <algorithm>
#include <bit>
#include <cmath>

#include "core/base/check.hpp"

namespace heatledger::estimate {
namespace {

std::size_t at(int index) {
  return static_cast<std::size_t>(index);
}

/// Approximate minimum degree order: place of each unknown. Only the pattern counts, so the entries handed
/// over are single bytes.
std::vector<int> sparse_order(const LowerTriangle& matrix) {
  const std::size_t n = matrix.size();
  std::vector<int> start(n + 1, 0);
  const auto for_each = [&](const auto& use) {
    for (std::size_t j = 0; j < n; ++j) {
      for (std::size_t e = at(matrix.start[j]); e < at(matrix.start[j + 1]); ++e) {
        const std::size_t i = at(matrix.row[e]);
        use(j, i);
        if (i != j) use(i, j);
      }
    }
  };
  for_each([&](std::size_t column, std::size_t) { ++start[column + 1]; });
  for (std::size_t j = 0; j < n; ++j) start[j + 1] += start[j];
  std::vector<int> rows(at(start[n]));
  const std::vector<signed char> filled(rows.size(), 1);
  std::vector<int> next(start.begin(), start.end() - 1);
  for_each([&](std::size_t column, std::size_t row) { rows[at(next[column]++)] = static_cast<int>(row); });
  using Bytes = Eigen::SparseMatrix<signed char>;
  const Eigen::Index size = static_cast<Eigen::Index>(n);
  const Eigen::Map<const Bytes> whole(size, size, static_cast<Eigen::Index>(rows.size()), start.data(),
                                      rows.data(), filled.data());
  Bytes consumed = whole;
  Eigen::PermutationMatrix<Eigen::Dynamic, Eigen::Dynamic, int> old_of_new;
  Eigen::internal::minimum_degree_ordering(consumed, old_of_new);
  std::vector<int> place(n);
  for (std::size_t i = 0; i < n; ++i)
    place[at(old_of_new.indices()[static_cast<Eigen::Index>(i)])] = static_cast<int>(i);
  return place;
}

/// The matrix in its new order, columns ascending, rows of a column in no order.
LowerTriangle permuted(const LowerTriangle& matrix, const std::vector<int>& place) {
  const std::size_t n = matrix.size();
  LowerTriangle out;
  out.start.assign(n + 1, 0);
  const auto for_each = [&](const auto& use) {
    for (std::size_t j = 0; j < n; ++j) {
      for (std::size_t e = at(matrix.start[j]); e < at(matrix.start[j + 1]); ++e) {
        const int a = place[j], b = place[at(matrix.row[e])];
        use(at(std::min(a, b)), std::max(a, b), matrix.value[e]);
      }
    }
  };
  for_each([&](std::size_t column, int, double) { ++out.start[column + 1]; });
  for (std::size_t j = 0; j < n; ++j) out.start[j + 1] += out.start[j];
  out.row.resize(matrix.row.size());
  out.value.resize(matrix.row.size());
  std::vector<int> next(out.start.begin(), out.start.end() - 1);
  for_each([&](std::size_t column, int row, double value) {
    const std::size_t e = at(next[column]++);
    out.row[e] = row;
    out.value[e] = value;
  });
  return out;
}

/// Pattern of L, one row of bits for each column: with some thousand unknowns whole words are faster than
/// lists.
class Pattern {
 public:
  /// The pattern of a column is that of its matrix column and of the columns whose first entry below the
  /// diagonal it is.
  explicit Pattern(const LowerTriangle& matrix)
      : size_(matrix.size()), words_((size_ + 63) / 64), bits_(size_ * words_, 0), counts_(size_) {
    for (std::size_t j = 0; j < size_; ++j) {
      std::uint64_t* column = bits_.data() + j * words_;
      for (std::size_t e = at(matrix.start[j]); e < at(matrix.start[j + 1]); ++e)
        column[at(matrix.row[e]) / 64] |= std::uint64_t{1} << (at(matrix.row[e]) % 64);
      column[j / 64] &= ~std::uint64_t{0} << (j % 64);  // a child's word may begin above the diagonal
      for (std::size_t w = j / 64; w < words_; ++w)
        counts_[j] += static_cast<std::size_t>(std::popcount(column[w]));
      const std::size_t parent = next(j, j + 1);
      if (parent == size_) continue;
      std::uint64_t* above = bits_.data() + parent * words_;
      for (std::size_t w = parent / 64; w < words_; ++w) above[w] |= column[w];
    }
  }

  std::size_t size() const { return size_; }
  /// Entries of a column, its diagonal included.
  std::size_t count(std::size_t column) const { return counts_[column]; }
  /// First row >= from of a column; size() when there is none.
  std::size_t next(std::size_t column, std::size_t from) const {
    const std::uint64_t* bits = bits_.data() + column * words_;
    for (std::size_t w = from / 64; w < words_; ++w) {
      const std::uint64_t left = w == from / 64 ? bits[w] & (~std::uint64_t{0} << (from % 64)) : bits[w];
      if (left != 0) return w * 64 + static_cast<std::size_t>(std::countr_zero(left));
    }
    return size_;
  }
  /// Whether column j + 1 has the pattern of column j without its diagonal.
  bool continued(std::size_t j) const { return counts_[j + 1] + 1 == counts_[j] && next(j, j + 1) == j + 1; }

 private:
  std::size_t size_, words_;
  std::vector<std::uint64_t> bits_;
  std::vector<std::size_t> counts_;
};

/// Where the dense block begins: as early as at least this share of its triangle is filled.
std::size_t dense_begin(const Pattern& pattern) {
  constexpr double kFilled = 0.8;
  std::size_t begin = pattern.size(), entries = 0;
  for (std::size_t j = pattern.size(); j-- > 0;) {
    entries += pattern.count(j);
    const double width = static_cast<double>(pattern.size() - j);
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

/// y[where[i]] -= Σ factor[c] × columns[c][i], c ascending; the places differ from each other.
void subtract_scattered(double* __restrict y, const int* __restrict where, const double* const* columns,
                        const double* factor, std::size_t width, std::size_t n) {
  std::size_t c = 0;
  for (; c + 4 <= width; c += 4) {
    const double *p = columns[c], *q = columns[c + 1], *r = columns[c + 2], *s = columns[c + 3];
    const double a = factor[c], b = factor[c + 1], d = factor[c + 2], e = factor[c + 3];
    for (std::size_t i = 0; i < n; ++i) {
      double& at_row = y[where[i]];
      at_row = (((at_row - a * p[i]) - b * q[i]) - d * r[i]) - e * s[i];
    }
  }
  for (; c < width; ++c) {
    const double* p = columns[c];
    const double a = factor[c];
    for (std::size_t i = 0; i < n; ++i) y[where[i]] -= a * p[i];
  }
}

}  // namespace

/// Columns that follow one another with the same rows below them: what they give to a later column is worked
/// out in one pass.
struct SparseCholesky::Panel {
  std::size_t begin = 0, end = 0;  ///< columns
  std::vector<int> below;          ///< rows below the last column
  std::size_t next = 0;            ///< entry of `below` that is to be used next
};

void SparseCholesky::factor(const LowerTriangle& matrix) {
  place_ = sparse_order(matrix);
  const LowerTriangle ordered = permuted(matrix, place_);
  const Pattern pattern(ordered);
  dense_ = size() - dense_begin(pattern);
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
  std::vector<Panel> panels;
  sparse_ = LowerTriangle();
  sparse_.start.assign(1, 0);
  for (std::size_t j = 0; j < begin; ++j) {
    if (j == 0 || !pattern.continued(j - 1)) {
      panels.emplace_back();
      panels.back().begin = j;
    }
    panels.back().end = j + 1;
    for (std::size_t row = j; row < size(); row = pattern.next(j, row + 1))
      sparse_.row.push_back(static_cast<int>(row));
    sparse_.start.push_back(static_cast<int>(sparse_.row.size()));
  }
  for (Panel& panel : panels)
    panel.below.assign(sparse_.row.begin() + sparse_.start[panel.end - 1] + 1,
                       sparse_.row.begin() + sparse_.start[panel.end]);
  sparse_.value.assign(sparse_.row.size(), 0.0);
  factor_sparse(ordered, panels);
  factor_dense();
}

/// Panel by panel, each taking in the finished panels that reach it; what falls into the block is subtracted
/// there. Every entry sums its parts in ascending order of the columns they come from.
void SparseCholesky::factor_sparse(const LowerTriangle& ordered, std::vector<Panel>& panels) {
  const std::size_t begin = size() - dense_;
  std::vector<std::uint32_t> panel_of(begin);
  for (std::uint32_t p = 0; p < panels.size(); ++p)
    for (std::size_t j = panels[p].begin; j < panels[p].end; ++j) panel_of[j] = p;
  std::vector<std::vector<std::uint32_t>> reaching(panels.size());
  std::vector<int> place(size(), 0), where;  // of a row: its distance from the first row of the panel
  std::vector<const double*> columns;
  std::vector<double> factors;
  // Entries `from`.. of the rows below a finished panel, columns and the factors that belong to one of them.
  const auto take_columns = [&](const Panel& panel, std::size_t from) {
    columns.clear();
    factors.clear();
    for (std::size_t c = panel.begin; c < panel.end; ++c) {
      columns.push_back(sparse_.value.data() + sparse_.start[c] + (panel.end - c) + from);
      factors.push_back(columns.back()[0]);
    }
  };
  for (std::uint32_t p = 0; p < panels.size(); ++p) {
    Panel& panel = panels[p];
    const std::size_t width = panel.end - panel.begin;
    for (std::size_t j = panel.begin; j < panel.end; ++j) place[j] = static_cast<int>(j - panel.begin);
    for (std::size_t i = 0; i < panel.below.size(); ++i)
      place[at(panel.below[i])] = static_cast<int>(width + i);
    // Column j begins with its diagonal, so its entry for a row stands (j - first column) places earlier.
    const auto target = [&](std::size_t j) {
      return sparse_.value.data() + sparse_.start[j] - (j - panel.begin);
    };
    for (std::size_t j = panel.begin; j < panel.end; ++j) {
      for (std::size_t e = at(ordered.start[j]); e < at(ordered.start[j + 1]); ++e)
        target(j)[place[at(ordered.row[e])]] = ordered.value[e];
    }
    std::sort(reaching[p].begin(), reaching[p].end());
    for (const std::uint32_t q : reaching[p]) {
      Panel& from = panels[q];
      const std::size_t rows = from.below.size(), first = from.next;
      where.clear();
      for (std::size_t i = first; i < rows; ++i) where.push_back(place[at(from.below[i])]);
      for (; from.next < rows && at(from.below[from.next]) < panel.end; ++from.next) {
        take_columns(from, from.next);
        subtract_scattered(target(at(from.below[from.next])), where.data() + (from.next - first),
                           columns.data(), factors.data(), columns.size(), rows - from.next);
      }
      if (from.next < rows && at(from.below[from.next]) < begin)
        reaching[panel_of[at(from.below[from.next])]].push_back(q);
    }
    for (std::size_t j = panel.begin; j < panel.end; ++j) {
      double* own = sparse_.value.data() + sparse_.start[j];
      const std::size_t rows = at(sparse_.start[j + 1] - sparse_.start[j]);
      const auto column_from = [&](std::size_t k) {
        return sparse_.value.data() + sparse_.start[k] + (j - k);
      };
      std::size_t k = panel.begin;
      for (; k + 4 <= j; k += 4) {
        const double *a = column_from(k), *b = column_from(k + 1), *c = column_from(k + 2),
                     *d = column_from(k + 3);
        subtract4(own, a, b, c, d, *a, *b, *c, *d, rows);
      }
      for (; k < j; ++k) subtract(own, column_from(k), *column_from(k), rows);
      CHECK(own[0] > 0, "a positive definite matrix in the fit");
      own[0] = std::sqrt(own[0]);
      for (std::size_t i = 1; i < rows; ++i) own[i] /= own[0];
    }
    if (!panel.below.empty() && at(panel.below[0]) < begin)
      reaching[panel_of[at(panel.below[0])]].push_back(p);
  }
  for (const Panel& panel : panels) {
    const std::size_t rows = panel.below.size();
    for (std::size_t i = panel.next; i < rows; ++i) {
      const std::size_t j = at(panel.below[i]) - begin;
      where.clear();
      for (std::size_t k = i; k < rows; ++k) where.push_back(panel.below[k] - panel.below[i]);
      take_columns(panel, i);
      subtract_scattered(column(j), where.data(), columns.data(), factors.data(), columns.size(), rows - i);
    }
  }
}

/// Four columns of the block at a time take in four finished ones at a time: each finished entry is read once
/// for four that need it.
void SparseCholesky::factor_dense() {
  const auto finish = [this](std::size_t j) {
    double* target = column(j);
    CHECK(target[0] > 0, "a positive definite matrix in the fit");
    target[0] = std::sqrt(target[0]);
    for (std::size_t i = 1; i < dense_ - j; ++i) target[i] /= target[0];
  };
  const auto take_in = [this](std::size_t j, std::size_t k) {
    subtract(column(j), column(k) + (j - k), column(k)[j - k], dense_ - j);
  };
  std::size_t j = 0;
  for (; j + 4 <= dense_; j += 4) {
    for (std::size_t k = 0; k < j; k += 4) {
      for (std::size_t t = 0; t < 4; ++t) {
        const double *p = column(k) + (j + t - k), *q = column(k + 1) + (j + t - k - 1),
                     *r = column(k + 2) + (j + t - k - 2), *s = column(k + 3) + (j + t - k - 3);
        subtract4(column(j + t), p, q, r, s, *p, *q, *r, *s, dense_ - j - t);
      }
    }
    for (std::size_t t = 0; t < 4; ++t) {
      for (std::size_t k = j; k < j + t; ++k) take_in(j + t, k);
      finish(j + t);
    }
  }
  for (; j < dense_; ++j) {
    for (std::size_t k = 0; k < j; ++k) take_in(j, k);
    finish(j);
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
