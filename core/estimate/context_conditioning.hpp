// What changes a fit without fitting again: rows left out and measurements added, both exactly.
#pragma once

#include <cstdint>
#include <vector>

#include "core/estimate/context_fit.hpp"

namespace heatledger::estimate {

/// Lower triangle of a small dense symmetric positive definite matrix, factored in place.
class SmallCholesky {
 public:
  /// @param matrix  n × n by rows; only the lower triangle is read
  void factor(std::vector<double> matrix, std::size_t n);
  std::size_t size() const { return size_; }
  /// x = C⁻¹ x
  void forward(std::vector<double>& x) const;
  /// x = C⁻ᵀ x
  void backward(std::vector<double>& x) const;

 private:
  std::vector<double> factor_;
  std::size_t size_ = 0;
};

/// A functional with what is needed to take covariances.
struct Direction {
  Functional functional;
  std::vector<double> z;        ///< forward solve of the shared part
  std::vector<double> widened;  ///< what leaving rows out adds to the spread; covariances add their products
};

/// One measurement: a functional with its figure (offset taken off) and the variance of its error.
struct MeasuredDirection {
  std::vector<ContextFit::Term> terms;
  double figure = 0;
  double variance = 0;
};

/// Rows left out of one fit, then measurements taken in. Cheap to build for a few of each.
class Conditioning {
 public:
  Conditioning(const ContextFit& fit, std::vector<std::uint32_t> without,
               const std::vector<MeasuredDirection>& measured);

  Direction direction(const std::vector<ContextFit::Term>& terms) const;
  double mean(const Direction& direction, std::size_t right_hand_side) const;
  double variance(const Direction& direction) const { return covariance(direction, direction); }
  double covariance(const Direction& a, const Direction& b) const;
  /// What the mean changes by when the figure of each row changes by one.
  std::vector<double> row_weights(const Direction& direction) const;
  /// The direction as independent parts: their squares add up to the variance, products of equal keys to a
  /// covariance. Sorted by key; keys below 2^32 are the directions of the fit's own matrix.
  std::vector<std::pair<std::uint64_t, double>> parts(const Direction& direction) const;
  const std::vector<std::uint32_t>& without() const { return without_; }

 private:
  using Parts = std::vector<std::pair<std::uint64_t, double>>;  // sorted by key
  Parts parts_before_measurements(const Direction& direction) const;
  double before_measurements(const Direction& a, const Direction& b) const;
  double mean_before_measurements(const Direction& direction, std::size_t right_hand_side) const;
  std::vector<double> onto_measurements(const Direction& direction) const;

  const ContextFit& fit_;
  std::vector<std::uint32_t> without_;
  SmallCholesky left_out_;
  std::vector<std::vector<double>> left_out_z_;
  std::vector<std::vector<double>> left_out_pull_;  ///< C⁻¹ (figures − shared features), per right-hand side
  std::vector<Direction> measured_;
  std::vector<double> measured_variance_;
  SmallCholesky measured_factor_;
  std::vector<double> measured_pull_;
};

}  // namespace heatledger::estimate
