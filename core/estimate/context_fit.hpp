// One fitted property: the posterior of all feature values given the rows of a table, in information form. A
// feature that only one row has is settled exactly by that row alone and never enters the matrix; nor does a
// row's own deviation.
#pragma once

#include <cstdint>
#include <vector>

#include "core/estimate/context_molecule.hpp"
#include "core/estimate/context_settings.hpp"
#include "core/estimate/sparse_cholesky.hpp"

namespace heatledger::estimate {

/// One row to fit: figure minus offset = Σ features + own deviation + error.
struct FitRow {
  const ContextMolecule* molecule = nullptr;
  double own = 0;         ///< variance of the molecule's own deviation
  double noise = 0;       ///< variance of own deviation and error, divided by the row's weight
  std::vector<double> y;  ///< one figure for each right-hand side
};

/// Value of one feature relative to its prior spread ("scaled"): where it lives in the fit.
struct FeaturePlace {
  static constexpr std::uint32_t none = 0xffffffffU;
  std::uint32_t shared = none;  ///< unknown of the matrix
  std::uint32_t row = none;     ///< the only row that has it
  double in_row = 0;            ///< scaled count in that row
};

/// A sum of features and own deviations, split by where the knowledge comes from. Two functionals over one
/// fit have a covariance; see covariance().
struct Functional {
  std::vector<double> x;  ///< scaled coefficients of the shared unknowns, what rows say already taken in
  std::vector<double> constant;  ///< one for each right-hand side
  struct Latent {                ///< coefficient of an independent unit-variance unknown outside the matrix
    std::uint64_t key = 0;
    double coefficient = 0;
    std::uint32_t row = FeaturePlace::none;  ///< the row that informs it, if any
    double in_row = 0;                       ///< its coefficient in that row
    bool own = false;                        ///< a molecule's own deviation
  };
  std::vector<Latent> latents;  ///< sorted by key
  struct RowShare {
    std::uint32_t row = 0;
    double share = 0;  ///< covariance of the latents with the row's figure
  };
  std::vector<RowShare> rows;  ///< sorted by row
  int unseen = 0;              ///< features that no row in use has
  bool in_table = false;       ///< a row of one of the molecules takes part
};

class ContextFit {
 public:
  /// @param rows  in the order of the table; molecules must outlive the fit
  ContextFit(const ContextSettings& settings, std::vector<FitRow> rows);

  const ContextSettings& settings() const { return settings_; }
  const std::vector<FitRow>& rows() const { return rows_; }
  std::size_t unknowns() const { return cholesky_.size(); }
  std::size_t features() const { return entries_.size(); }
  std::size_t factor_entries() const { return cholesky_.nonzeros(); }
  std::size_t right_hand_sides() const { return beta_.size(); }
  const SparseCholesky& cholesky() const { return cholesky_; }

  /// nullptr: no row has this feature.
  const FeaturePlace* find(std::uint64_t key) const;
  /// Row of the table for a molecule: same constitution and stereo. Where the table has only one row of that
  /// constitution, it also stands for the molecule if either is written without stereo or both have the same
  /// counts (mirror images). FeaturePlace::none when there is no such row.
  std::uint32_t find_row(const ContextMolecule& molecule) const;
  /// Rows of one constitution: the molecule and its stereoisomers.
  std::vector<std::uint32_t> rows_of(std::uint64_t constitution) const;

  /// Posterior mean of a feature, unscaled: what one count of it adds [unit of the figure].
  double feature_value(const FeatureCount& feature, std::size_t right_hand_side) const;
  /// Variance that the row's figure has around its shared features: noise and its own features.
  double row_variance(std::uint32_t row) const { return row_noise_[row]; }
  /// Shared features of a row, scaled, as a dense vector.
  void row_vector(std::uint32_t row, std::vector<double>& x) const;
  double row_dot(std::uint32_t row, const std::vector<double>& x) const;
  /// The unknowns that only this row tells of: its own features and its own deviation, each with its part in
  /// the row.
  std::vector<std::pair<std::uint64_t, double>> row_latents(std::uint32_t row) const;
  /// Figure of a row minus its shared features at the posterior mean.
  double row_residual(std::uint32_t row, std::size_t right_hand_side) const {
    return rows_[row].y[right_hand_side] - row_dot(row, beta_[right_hand_side]);
  }

  /// Σ coefficient × molecule as a functional, without offset. Rows in `without` give nothing.
  struct Term {
    double coefficient = 1;
    const ContextMolecule* molecule = nullptr;
    bool own = true;      ///< with the molecule's own deviation
    bool own_row = true;  ///< the molecule's row of the table, if any, tells of that deviation
  };
  Functional functional(const std::vector<Term>& terms, const std::vector<std::uint32_t>& without) const;

  /// Σ x β for one right-hand side plus the constant of the functional.
  double mean(const Functional& functional, std::size_t right_hand_side) const;
  double variance(const Functional& functional) const;
  /// Covariance of two functionals whose forward solves are known.
  double covariance(const Functional& f, const std::vector<double>& zf, const Functional& g,
                    const std::vector<double>& zg) const;

 private:
  void place_features();
  LowerTriangle information() const;
  void solve();

  ContextSettings settings_;
  std::vector<FitRow> rows_;
  struct Entry {
    std::uint64_t key = 0;
    FeaturePlace place;
  };
  std::vector<Entry> entries_;            ///< sorted by key
  std::vector<std::uint32_t> slots_;      ///< open addressing into entries_, index + 1
  std::vector<std::uint32_t> row_start_;  ///< shared features of row r: row_start_[r] .. row_start_[r + 1]
  std::vector<std::uint32_t> row_index_;
  std::vector<double> row_value_;
  std::vector<double> row_noise_;
  std::vector<std::pair<std::uint64_t, std::uint32_t>> by_constitution_;
  SparseCholesky cholesky_;
  std::vector<std::vector<double>> beta_;
};

}  // namespace heatledger::estimate
