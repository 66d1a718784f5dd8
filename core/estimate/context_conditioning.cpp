#include "core/estimate/context_conditioning.hpp"

#include <algorithm>
#include <cmath>

#include "core/base/check.hpp"
#include "core/estimate/feature_code.hpp"

namespace heatledger::estimate {
namespace {

double dot(const std::vector<double>& a, const std::vector<double>& b) {
  double sum = 0;
  for (std::size_t i = 0; i < a.size(); ++i) sum += a[i] * b[i];
  return sum;
}

using Parts = std::vector<std::pair<std::uint64_t, double>>;

/// Key of a part that is no direction of the matrix; those are numbered from 0.
std::uint64_t outside_matrix(std::uint64_t key) {
  return key | std::uint64_t{1} << 63;
}

Parts merged(Parts parts) {
  std::stable_sort(parts.begin(), parts.end(),
                   [](const auto& a, const auto& b) { return a.first < b.first; });
  std::size_t kept = 0;
  for (std::size_t i = 0; i < parts.size(); ++i) {
    if (kept != 0 && parts[kept - 1].first == parts[i].first) {
      parts[kept - 1].second += parts[i].second;
    } else {
      parts[kept++] = parts[i];
    }
  }
  parts.resize(kept);
  return parts;
}

double product(const Parts& a, const Parts& b) {
  double sum = 0;
  for (std::size_t i = 0, k = 0; i < a.size() && k < b.size();) {
    if (a[i].first < b[k].first) {
      ++i;
    } else if (b[k].first < a[i].first) {
      ++k;
    } else {
      sum += a[i++].second * b[k++].second;
    }
  }
  return sum;
}

void subtract(Parts& from, double factor, const Parts& what) {
  for (const auto& part : what) from.emplace_back(part.first, -factor * part.second);
  from = merged(std::move(from));
}

}  // namespace

void SmallCholesky::factor(std::vector<double> matrix, std::size_t n) {
  size_ = n;
  for (std::size_t j = 0; j < n; ++j) {
    for (std::size_t i = j; i < n; ++i) {
      double value = matrix[i * n + j];
      for (std::size_t k = 0; k < j; ++k) value -= matrix[i * n + k] * matrix[j * n + k];
      if (i == j) {
        CHECK(value > 0, "a positive definite small matrix");
        matrix[j * n + j] = std::sqrt(value);
      } else {
        matrix[i * n + j] = value / matrix[j * n + j];
      }
    }
  }
  factor_ = std::move(matrix);
}

void SmallCholesky::forward(std::vector<double>& x) const {
  for (std::size_t i = 0; i < size_; ++i) {
    double value = x[i];
    for (std::size_t k = 0; k < i; ++k) value -= factor_[i * size_ + k] * x[k];
    x[i] = value / factor_[i * size_ + i];
  }
}

void SmallCholesky::backward(std::vector<double>& x) const {
  for (std::size_t i = size_; i-- > 0;) {
    double value = x[i];
    for (std::size_t k = i + 1; k < size_; ++k) value -= factor_[k * size_ + i] * x[k];
    x[i] = value / factor_[i * size_ + i];
  }
}

Conditioning::Conditioning(const ContextFit& fit, std::vector<std::uint32_t> without,
                           const std::vector<MeasuredDirection>& measured)
    : fit_(fit), without_(std::move(without)) {
  const std::size_t n = without_.size();
  std::vector<double> x;
  for (const std::uint32_t row : without_) {
    fit_.row_vector(row, x);
    left_out_z_.emplace_back();
    fit_.cholesky().forward(x, left_out_z_.back());
  }
  // Taking a row out: P loses x x' / variance. With H = X P⁻¹ X' the small matrix is variance − H, still
  // positive.
  std::vector<double> matrix(n * n, 0.0);
  for (std::size_t i = 0; i < n; ++i) {
    for (std::size_t j = 0; j <= i; ++j) matrix[i * n + j] = -dot(left_out_z_[i], left_out_z_[j]);
    matrix[i * n + i] += fit_.row_variance(without_[i]);
  }
  left_out_.factor(std::move(matrix), n);
  for (std::size_t k = 0; k < fit_.right_hand_sides(); ++k) {
    std::vector<double> pull(n);
    for (std::size_t i = 0; i < n; ++i) pull[i] = fit_.row_residual(without_[i], k);
    left_out_.forward(pull);
    left_out_pull_.push_back(std::move(pull));
  }

  const std::size_t m = measured.size();
  for (const MeasuredDirection& one : measured) measured_.push_back(direction(one.terms));
  std::vector<double> spread(m * m, 0.0);
  for (std::size_t i = 0; i < m; ++i) {
    for (std::size_t j = 0; j <= i; ++j) spread[i * m + j] = before_measurements(measured_[i], measured_[j]);
    spread[i * m + i] += measured[i].variance;
  }
  measured_factor_.factor(std::move(spread), m);
  for (const MeasuredDirection& one : measured) measured_variance_.push_back(one.variance);
  for (std::size_t i = 0; i < m; ++i) {
    measured_pull_.push_back(measured[i].figure - mean_before_measurements(measured_[i], 0));
  }
  measured_factor_.forward(measured_pull_);
}

Direction Conditioning::direction(const std::vector<ContextFit::Term>& terms) const {
  Direction out;
  out.functional = fit_.functional(terms, without_);
  fit_.cholesky().forward(out.functional.x, out.z);
  for (const std::vector<double>& z : left_out_z_) out.widened.push_back(dot(out.z, z));
  left_out_.forward(out.widened);
  return out;
}

double Conditioning::before_measurements(const Direction& a, const Direction& b) const {
  return fit_.covariance(a.functional, a.z, b.functional, b.z) + dot(a.widened, b.widened);
}

double Conditioning::mean_before_measurements(const Direction& direction, std::size_t right_hand_side) const {
  return fit_.mean(direction.functional, right_hand_side) -
         dot(direction.widened, left_out_pull_[right_hand_side]);
}

std::vector<double> Conditioning::onto_measurements(const Direction& direction) const {
  std::vector<double> onto;
  for (const Direction& measured : measured_) onto.push_back(before_measurements(direction, measured));
  measured_factor_.forward(onto);
  return onto;
}

double Conditioning::mean(const Direction& direction, std::size_t right_hand_side) const {
  const double before = mean_before_measurements(direction, right_hand_side);
  return measured_.empty() ? before : before + dot(onto_measurements(direction), measured_pull_);
}

Conditioning::Parts Conditioning::parts_before_measurements(const Direction& direction) const {
  Parts shared, parts;
  shared.reserve(direction.z.size());
  for (std::size_t j = 0; j < direction.z.size(); ++j) {
    if (direction.z[j] != 0) shared.emplace_back(j, direction.z[j]);
  }
  std::uint64_t set = 0;
  for (const std::uint32_t row : without_) set = mix(set, row);
  for (std::size_t i = 0; i < direction.widened.size(); ++i)
    parts.emplace_back(outside_matrix(mix(set, mix(i, 0x22))), direction.widened[i]);
  for (const Functional::Latent& latent : direction.functional.latents)
    parts.emplace_back(outside_matrix(latent.key), latent.coefficient);
  // A row ties its unknowns u together: their covariance is 1 - u u'/variance, whose root is 1 - a u u'.
  for (const Functional::RowShare& share : direction.functional.rows) {
    double squares = 0;
    const Parts latents = fit_.row_latents(share.row);
    for (const auto& latent : latents) squares += latent.second * latent.second;
    const double a = (1 - std::sqrt(std::max(0.0, 1 - squares / fit_.row_variance(share.row)))) / squares;
    for (const auto& [key, in_row] : latents)
      parts.emplace_back(outside_matrix(key), -a * in_row * share.share);
  }
  parts = merged(std::move(parts));
  shared.insert(shared.end(), parts.begin(), parts.end());
  return shared;
}

std::vector<std::pair<std::uint64_t, double>> Conditioning::parts(const Direction& direction) const {
  // Measurements one after the other: each takes m m'/variance off, in parts 1 - a m m' of what is left.
  Parts out = parts_before_measurements(direction);
  std::vector<Parts> measured;
  for (const Direction& one : measured_) measured.push_back(parts_before_measurements(one));
  for (std::size_t o = 0; o < measured.size(); ++o) {
    const double squares = product(measured[o], measured[o]), variance = squares + measured_variance_[o];
    if (squares == 0) continue;
    const double a = (1 - std::sqrt(std::max(0.0, 1 - squares / variance))) / squares;
    const Parts known = measured[o];
    for (std::size_t later = o + 1; later < measured.size(); ++later)
      subtract(measured[later], a * product(measured[later], known), known);
    subtract(out, a * product(out, known), known);
  }
  return out;
}

std::vector<double> Conditioning::row_weights(const Direction& direction) const {
  // Measurements take over a part of the estimate: what is left of it, as a sum of directions.
  std::vector<std::pair<double, const Direction*>> parts{{1.0, &direction}};
  std::vector<double> gain = onto_measurements(direction);
  measured_factor_.backward(gain);
  for (std::size_t o = 0; o < gain.size(); ++o) parts.emplace_back(-gain[o], &measured_[o]);
  std::vector<double> weights(fit_.rows().size(), 0.0), z(fit_.unknowns(), 0.0), solved;
  for (const auto& [factor, part] : parts) {
    for (std::size_t j = 0; j < z.size(); ++j) z[j] += factor * part->z[j];
    std::vector<double> pull = part->widened;
    left_out_.backward(pull);
    for (std::size_t r = 0; r < pull.size(); ++r) {
      for (std::size_t j = 0; j < z.size(); ++j) z[j] += factor * pull[r] * left_out_z_[r][j];
    }
    for (const Functional::RowShare& share : part->functional.rows) {
      weights[share.row] += factor * share.share / fit_.row_variance(share.row);
    }
  }
  fit_.cholesky().backward(std::move(z), solved);
  for (std::uint32_t row = 0; row < weights.size(); ++row) {
    if (std::find(without_.begin(), without_.end(), row) != without_.end()) continue;
    weights[row] += fit_.row_dot(row, solved) / fit_.row_variance(row);
  }
  return weights;
}

double Conditioning::covariance(const Direction& a, const Direction& b) const {
  const double before = before_measurements(a, b);
  return measured_.empty() ? before : before - dot(onto_measurements(a), onto_measurements(b));
}

}  // namespace heatledger::estimate
