// The one blank that is sought: the number that closes the balance.
#pragma once

#include "core/step/model.hpp"
#include "core/step/root.hpp"

namespace heatledger::step {

/// Solves for the blank that is sought, in `v`. `work` holds the amounts and heats at the answer.
/// @errors step.no_solution: no value closes the balance, the message says how near it comes and where;
///         step.several_solutions: lists them; step.no_influence: the blank does not change the balance;
///         step.exhausted, step.progress, step.shares: the numbers themselves are wrong
Status solve_sought(const Model& model, std::vector<double>& v, Work& work);

/// The same from a point near by, without words: secant steps.
/// @param slope  of the missing heat by the sought blank there; 0 when it is not known
/// @return false when there is none
bool solve_near(const Model& model, std::vector<double>& v, Work& work, double slope = 0);

/// Heat still missing: needed − duty, with the sought blank at `x`; empty where the numbers are wrong.
std::optional<double> heat_missing(const Model& model, std::vector<double>& v, Work& work, double x);

/// The error that a Trouble becomes on the sheet.
Error trouble_error(const Model& model, Trouble trouble, const Work& work);

}  // namespace heatledger::step
