#include "core/estimate/context_model.hpp"

#include <algorithm>
#include <cmath>

#include "core/estimate/context_query.hpp"
#include "core/estimate/context_store.hpp"
#include "core/estimate/gas_interpolation.hpp"

namespace heatledger::estimate {
namespace {

constexpr double kGasConstant = 8.314462618;  // J/(mol K), exact by the SI of 2019

/// A gas molecule of more than three atoms never takes up more than all its vibrations at full swing.
double above_classical_limit(const ContextMolecule& molecule, double heat_capacity) {
  if (molecule.atoms <= 3 || molecule.repeat_unit) return 0;
  return std::max(0.0, heat_capacity - (3 * molecule.atoms - 2) * kGasConstant);
}

}  // namespace

const ContextModel& ContextModel::embedded() {
  static const ContextModel model;
  return model;
}

const FittedProperty& embedded_fit(FitKind kind) {
  static std::array<std::unique_ptr<FittedProperty>, fit_kind_count> fits;
  std::unique_ptr<FittedProperty>& one = fits[static_cast<std::size_t>(kind)];
  if (one == nullptr) one = std::make_unique<FittedProperty>(fit_embedded(kind));
  return *one;
}

FittedProperty fit_embedded(FitKind kind) {
  FittedProperty out;
  out.temperatures.assign(1, gas_nodes[0]);
  if (kind == FitKind::GasAbove) out.temperatures.assign(gas_nodes + 1, gas_nodes + gas_node_count);
  out.figures = training_figures(kind);
  out.fit =
      std::make_unique<ContextFit>(context_settings(kind), fit_rows(kind, out.figures, out.temperatures));
  out.plain = std::make_unique<Conditioning>(*out.fit, std::vector<std::uint32_t>{},
                                             std::vector<MeasuredDirection>{});
  return out;
}

namespace {

Prediction finished(double value, double s, double scale, const ContextSettings& settings,
                    const ContextEstimate& from) {
  Prediction out;
  out.value = value * scale;
  out.s = s * scale;
  out.u68 = settings.k68 * out.s;
  out.u95 = settings.k95 * out.s;
  out.unseen = from.unseen;
  out.in_table = from.in_table;
  return out;
}

/// Every property but the gas heat capacity comes from one fit.
Prediction from_one_fit(const Query& query, FitKind kind) {
  const ContextEstimate at = query.estimate();
  Prediction out = finished(at.value[0], std::sqrt(at.variance), unit_of(kind), context_settings(kind), at);
  if (kind != FitKind::Liquid)
    out.reading = out.s <= 8000 ? Reading::Good : out.s <= 15000 ? Reading::Rough : Reading::None;
  return out;
}

}  // namespace

Result<Prediction> ContextModel::predict(Property property, std::span<const ContextTerm> terms,
                                         const ContextOptions& options) const {
  const auto estimate = [&](FitKind kind, std::span<const ContextTerm> of) {
    return Query(kind, of, options).estimate();
  };
  if (property != Property::GasHeatCapacity) {
    const FitKind kind = fit_kind_of(property);
    return from_one_fit(Query(kind, terms, options), kind);
  }
  if (options.temperature < gas_range_low || options.temperature > gas_range_high) {
    return Error{"estimate.temperature", "Gas heat capacities are estimated from 273.15 K to 1000 K.",
                 "temperature", "Use a table or a polynomial beyond that range."};
  }
  const ContextEstimate low = estimate(FitKind::Gas298, terms);
  if (options.temperature == gas_nodes[0] && terms.size() == 1) {
    const double excess =
        above_classical_limit(*terms[0].molecule, low.value[0] / terms[0].coefficient) * terms[0].coefficient;
    return finished(low.value[0] - excess, std::sqrt(low.variance), 1.0, context_settings(FitKind::Gas298),
                    low);
  }
  const auto curve_of = [&](std::span<const ContextTerm> of) {
    const ContextEstimate first = estimate(FitKind::Gas298, of), above = estimate(FitKind::GasAbove, of);
    GasCurve curve;
    curve.value[0] = first.value[0];
    curve.s[0] = std::sqrt(first.variance);
    for (std::size_t node = 1; node < gas_node_count; ++node) {
      curve.value[node] = above.value[node - 1];
      curve.s[node] = std::sqrt(above.variance);
    }
    return curve;
  };
  const GasCurve curve = curve_of(terms);
  double value = curve.value_at(options.temperature);
  for (const ContextTerm& term : terms) {
    const ContextTerm alone{1, term.molecule};
    const GasCurve own = terms.size() == 1 ? curve : curve_of(std::span<const ContextTerm>(&alone, 1));
    const double each = terms.size() == 1 ? 1 / term.coefficient : 1;
    value -=
        term.coefficient * above_classical_limit(*term.molecule, own.value_at(options.temperature) * each);
  }
  return finished(value, curve.s_at(options.temperature), 1.0, context_settings(FitKind::GasAbove), low);
}

Result<Prediction> ContextModel::predict(Property property, const ContextMolecule& molecule,
                                         const ContextOptions& options) const {
  const ContextTerm term{1, &molecule};
  return predict(property, std::span<const ContextTerm>(&term, 1), options);
}

namespace {

/// The parts of a query scaled to the ± of a prediction.
uncertainty::Quantity with_parts(const Prediction& prediction, const Query& query, FitKind kind) {
  const std::vector<std::pair<std::uint64_t, double>> found = query.parts();
  double squares = 0;
  for (const auto& part : found) squares += part.second * part.second;
  const double scale = squares > 0 ? prediction.u95 / std::sqrt(squares) : 0;
  std::vector<uncertainty::Part> parts;
  parts.reserve(found.size());
  for (const auto& part : found) {
    if (part.second == 0) continue;
    // Directions of the matrix keep their order and stay apart from the hashes of everything else.
    const bool of_matrix = part.first >> 32 == 0;
    const std::uint64_t index =
        of_matrix ? static_cast<std::uint64_t>(kind) << 32 | part.first
                  : mix(part.first, static_cast<std::uint64_t>(kind)) | std::uint64_t{1} << 55;
    parts.push_back({uncertainty::source_key(uncertainty::SourceKind::Estimate, index), scale * part.second});
  }
  const auto hashes = std::find_if(
      parts.begin(), parts.end(), [](const uncertainty::Part& part) { return (part.source >> 55 & 1) != 0; });
  std::sort(hashes, parts.end(),
            [](const uncertainty::Part& a, const uncertainty::Part& b) { return a.source < b.source; });
  return uncertainty::Quantity(prediction.value, std::move(parts));
}

}  // namespace

Result<ContextFigure> ContextModel::figure(Property property, std::span<const ContextTerm> terms,
                                           const ContextOptions& options) const {
  if (property != Property::GasHeatCapacity) {
    const FitKind kind = fit_kind_of(property);
    const Query query(kind, terms, options);
    const Prediction prediction = from_one_fit(query, kind);
    return ContextFigure{prediction, with_parts(prediction, query, kind)};
  }
  const Result<Prediction> prediction = predict(property, terms, options);
  if (!prediction) return prediction.error();
  // A gas heat capacity between two fits takes the shape of its deviation from the nearer one.
  const bool above = options.temperature > (gas_nodes[0] + gas_nodes[1]) / 2;
  const FitKind kind = above ? FitKind::GasAbove : FitKind::Gas298;
  return ContextFigure{*prediction, with_parts(*prediction, Query(kind, terms, options), kind)};
}

Result<uncertainty::Quantity> ContextModel::quantity(Property property, std::span<const ContextTerm> terms,
                                                     const ContextOptions& options) const {
  Result<ContextFigure> made = figure(property, terms, options);
  if (!made) return made.error();
  return std::move(made->quantity);
}

}  // namespace heatledger::estimate
