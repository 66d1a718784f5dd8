// One question to one fit: which rows are left out, which measurements count, and the answers that prediction
// and explanation share. Not for callers outside this room.
#pragma once

#include <memory>
#include <optional>
#include <span>
#include <unordered_map>
#include <vector>

#include "core/estimate/context_explain.hpp"
#include "core/estimate/context_store.hpp"

namespace heatledger::estimate {

/// The fit at 298.15 K that a property asks.
FitKind fit_kind_of(Property property);
/// What the fit's unit is worth in the unit of the property: 1000 for kJ/mol.
double unit_of(FitKind kind);

/// Values and variance in the unit of the fit.
struct ContextEstimate {
  std::vector<double> value;  ///< one for each temperature of the fit
  double variance = 0;
  int unseen = 0;
  bool in_table = false;
};

class Query {
 public:
  Query(FitKind kind, std::span<const ContextTerm> terms, const ContextOptions& options);

  const FittedProperty& fitted() const { return fitted_; }
  const Conditioning& conditioning() const { return *conditioning_; }
  /// Nothing left out and nothing measured.
  bool plain() const { return conditioning_ == fitted_.plain.get(); }

  ContextEstimate estimate() const;
  /// Independent parts of the estimate's deviation, in the unit of the fit.
  std::vector<std::pair<std::uint64_t, double>> parts() const { return conditioning_->parts(direction()); }
  /// Rows that carry the estimate, greatest weight first.
  std::vector<ReferenceRow> reference_rows(std::size_t most) const;

 private:
  const Direction& direction() const;
  std::vector<ContextFit::Term> parts_of_terms() const;
  FitKind kind_;
  std::vector<ContextTerm> terms_;
  const FittedProperty& fitted_;
  std::unique_ptr<Conditioning> own_;
  const Conditioning* conditioning_ = nullptr;
  mutable std::optional<Direction> direction_;  ///< made when first needed: it costs most of an estimate
};

/// What one count of each feature of a molecule adds, under a query.
class FeatureValues {
 public:
  struct Value {
    double value = 0;     ///< unit of the fit
    bool unseen = false;  ///< no row in use has it
  };
  FeatureValues(const Query& query, const ContextMolecule& molecule);
  Value of(std::uint64_t key) const;

 private:
  std::unordered_map<std::uint64_t, Value> values_;
};

}  // namespace heatledger::estimate
