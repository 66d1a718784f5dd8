#include "core/estimate/context_robust.hpp"

#include <algorithm>

namespace heatledger::estimate {
namespace {

/// Degrees of freedom of the errors: evaluated values are close to normal, single ones have heavy tails.
double degrees_of_freedom(FitKind kind, const TrainingFigure& figure) {
  if (kind != FitKind::Formation) return figure.trusted ? 5 : 3;
  const bool network = figure.sources.find_first_of("Aa") != std::string_view::npos;
  return network ? 30 : figure.trusted ? 6 : 3;
}

}  // namespace

std::vector<double> robust_weights(FitKind kind, const std::vector<TrainingFigure>& figures,
                                   const std::vector<double>& temperatures, int rounds,
                                   const MoleculeSource& molecule) {
  std::vector<TrainingFigure> weighted = figures;
  for (TrainingFigure& figure : weighted) figure.weight = 1;
  const ContextSettings& settings = context_settings(kind);
  for (int round = 0; round < rounds; ++round) {
    const ContextFit fit(settings, fit_rows(kind, weighted, temperatures, molecule));
    for (std::uint32_t r = 0; r < weighted.size(); ++r) {
      const FitRow& row = fit.rows()[r];
      const Functional features = fit.functional({{1, row.molecule, false}}, {});
      double misfit = 0;
      for (std::size_t k = 0; k < temperatures.size(); ++k) {
        const double residual = row.y[k] - fit.mean(features, k);
        misfit += residual * residual / static_cast<double>(temperatures.size());
      }
      const double stated = row.own + error_variance(settings, weighted[r]);
      const double nu = degrees_of_freedom(kind, weighted[r]);
      weighted[r].weight = std::min(1.0, (nu + 1) / (nu + (misfit + fit.variance(features)) / stated));
    }
  }
  std::vector<double> weights;
  for (const TrainingFigure& figure : weighted) weights.push_back(figure.weight);
  return weights;
}

}  // namespace heatledger::estimate
