// What a step must say beside its figures: ranges left, phases that would not stay, figures that are
// notional.
#pragma once

#include "core/step/step.hpp"

namespace heatledger::step {

/// Fills `notes` and `cautions` of a solved step.
void add_cautions(StepResult& result, const Work& work);

/// Why a figure does not exist at these numbers, a clause.
std::string why_no_figure(const Model& model, FigureId id, const std::vector<double>& v);
/// The figure with its numbers put in.
std::vector<std::string> figure_working(const StepResult& result, const Work& work, FigureId id);
/// "notional" for a temperature above the boiling point, a typed limit or the range of the heat capacities.
std::string figure_mark(const StepResult& result, FigureId id, double value);

}  // namespace heatledger::step
