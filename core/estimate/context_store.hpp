// The fits behind the model, for the files of this room that look inside: prediction, explanation,
// measurements, accuracy. Not for callers.
#pragma once

#include <array>
#include <memory>
#include <vector>

#include "core/estimate/context_conditioning.hpp"
#include "core/estimate/context_fit.hpp"
#include "core/estimate/context_model.hpp"
#include "core/estimate/context_observations.hpp"
#include "core/estimate/context_table.hpp"

namespace heatledger::estimate {

/// One fit with the figures that its rows came from (row i is figure i).
struct FittedProperty {
  std::vector<double> temperatures;  ///< one per right-hand side
  std::vector<TrainingFigure> figures;
  std::unique_ptr<ContextFit> fit;
  std::unique_ptr<Conditioning> plain;  ///< nothing left out, nothing added
};

/// Fits one property to the embedded table with its shipped weights.
FittedProperty fit_embedded(FitKind kind);

/// A fit of the embedded model, made when first asked for.
const FittedProperty& embedded_fit(FitKind kind);

/// Measurements of the user as they enter one fit; null when none concern it.
const Conditioning* observed_conditioning(const Observations& observations, FitKind kind);
std::vector<MeasuredDirection> observed_directions(const Observations& observations, FitKind kind);

}  // namespace heatledger::estimate
