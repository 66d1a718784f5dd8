#include "core/estimate/context_query.hpp"

#include <algorithm>
#include <cmath>
#include <string>

namespace heatledger::estimate {
namespace {

std::vector<std::uint32_t> rows_to_leave(const ContextFit& fit, std::span<const ContextTerm> terms,
                                         const ContextOptions& options) {
  std::vector<std::uint32_t> rows;
  const auto leave = [&](const ContextMolecule& molecule) {
    for (const std::uint32_t row : fit.rows_of(molecule.constitution)) rows.push_back(row);
  };
  for (const ContextMolecule* molecule : options.leave_out) leave(*molecule);
  if (options.estimate_only) {
    for (const ContextTerm& term : terms) leave(*term.molecule);
  }
  std::sort(rows.begin(), rows.end());
  rows.erase(std::unique(rows.begin(), rows.end()), rows.end());
  return rows;
}

}  // namespace

FitKind fit_kind_of(Property property) {
  switch (property) {
    case Property::GasFormation:
      return FitKind::Formation;
    case Property::Vaporisation298:
      return FitKind::Vaporisation;
    case Property::LiquidHeatCapacity298:
      return FitKind::Liquid;
    case Property::GasHeatCapacity:
      break;
  }
  return FitKind::Gas298;
}

double unit_of(FitKind kind) {
  return kind == FitKind::Formation || kind == FitKind::Vaporisation ? 1000 : 1;
}

Query::Query(FitKind kind, std::span<const ContextTerm> terms, const ContextOptions& options)
    : kind_(kind), terms_(terms.begin(), terms.end()), fitted_(embedded_fit(kind)) {
  const std::vector<std::uint32_t> without = rows_to_leave(*fitted_.fit, terms, options);
  if (without.empty()) {
    conditioning_ =
        options.observations != nullptr ? observed_conditioning(*options.observations, kind) : nullptr;
    if (conditioning_ == nullptr) conditioning_ = fitted_.plain.get();
    return;
  }
  own_ = std::make_unique<Conditioning>(*fitted_.fit, without,
                                        options.observations != nullptr
                                            ? observed_directions(*options.observations, kind)
                                            : std::vector<MeasuredDirection>{});
  conditioning_ = own_.get();
}

std::vector<ContextFit::Term> Query::parts_of_terms() const {
  std::vector<ContextFit::Term> parts;
  parts.reserve(terms_.size());
  for (const ContextTerm& term : terms_) parts.push_back({term.coefficient, term.molecule});
  return parts;
}

const Direction& Query::direction() const {
  if (!direction_) direction_ = conditioning_->direction(parts_of_terms());
  return *direction_;
}

ContextEstimate Query::estimate() const {
  ContextEstimate out;
  const Direction& asked = direction();
  // Rounding may leave a variance of nothing a hair below zero.
  out.variance = std::max(0.0, conditioning_->variance(asked));
  out.unseen = asked.functional.unseen;
  out.in_table = asked.functional.in_table;
  for (std::size_t k = 0; k < fitted_.temperatures.size(); ++k) {
    double value = conditioning_->mean(asked, k);
    for (const ContextTerm& term : terms_)
      value += term.coefficient * offset(kind_, *term.molecule, fitted_.temperatures[k]);
    out.value.push_back(sign_of(kind_) * value);
  }
  return out;
}

std::vector<ReferenceRow> Query::reference_rows(std::size_t most) const {
  const std::vector<double> weights = conditioning_->row_weights(direction());
  std::vector<std::uint32_t> order(weights.size());
  for (std::uint32_t r = 0; r < order.size(); ++r) order[r] = r;
  most = std::min(most, order.size());
  std::partial_sort(order.begin(), order.begin() + static_cast<std::ptrdiff_t>(most), order.end(),
                    [&](std::uint32_t a, std::uint32_t b) {
                      const double x = std::fabs(weights[a]), y = std::fabs(weights[b]);
                      return x != y ? x > y : a < b;
                    });
  std::vector<ReferenceRow> rows;
  for (std::size_t i = 0; i < most; ++i) {
    const TrainingFigure& figure = fitted_.figures[order[i]];
    const TrainingCompound& compound = training_compounds()[figure.compound];
    ReferenceRow row;
    row.name = compound.name;
    row.smiles = compound.smiles;
    row.sources = source_text(figure.sources);
    row.value = figure.value[0] * unit_of(kind_);
    row.u95 = figure.u95 * unit_of(kind_);
    row.weight = weights[order[i]];
    rows.push_back(std::move(row));
  }
  return rows;
}

FeatureValues::FeatureValues(const Query& query, const ContextMolecule& molecule) {
  const ContextFit& fit = *query.fitted().fit;
  for (const FeatureCount& feature : molecule.features) {
    if (fit.settings().spread[static_cast<std::size_t>(feature.family)] == 0) continue;
    Value value;
    if (query.plain()) {
      value.value = fit.feature_value(feature, 0);
      value.unseen = fit.find(feature.key) == nullptr;
    } else {
      ContextMolecule alone;
      alone.features.push_back(feature);
      alone.features.back().count = 1;
      const Direction direction = query.conditioning().direction({{1, &alone, false}});
      value.value = query.conditioning().mean(direction, 0);
      value.unseen = direction.functional.unseen != 0;
    }
    values_.emplace(feature.key, value);
  }
}

FeatureValues::Value FeatureValues::of(std::uint64_t key) const {
  const auto found = values_.find(key);
  return found == values_.end() ? Value{} : found->second;
}

}  // namespace heatledger::estimate
