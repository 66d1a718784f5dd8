// The dosed charge as a kind of step: from its texts to the numbers of core/dosing, and its answers back.
#pragma once

#include "core/document/step_computation.hpp"

namespace heatledger::document {

/// Fills balance, findings and errors of a dosed charge.
/// Codes: those of read_step and dosing::DosedModel::of, and dosing.thermal, dosing.orders, dosing.profile,
/// step.blank, step.out_of_range
void compute_dosed(const StepSheet& sheet, const StepContext& context, step::Lookups& lookups,
                   StepOutcome& outcome);

}  // namespace heatledger::document
