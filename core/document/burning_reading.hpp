// A burning step: feeds by their role, air, and what is asked of the chamber and the flue gas.
#pragma once

#include "core/burning/burn.hpp"
#include "core/document/step_computation.hpp"
#include "core/step/lookups.hpp"

namespace heatledger::document {

/// Roles of its feeds, the first for an empty text.
const std::vector<const char*>& burning_roles();

struct BurningReading {
  burning::BurnInput input;
  std::vector<Error> errors;  ///< `where` begins with the field: "feeds[0].rows[1].amount, offset 3"
  std::vector<std::string> notes;
};

/// Codes: those of read_step and of core/burning, and burning.role, burning.air, burning.air_twice,
/// burning.dry_or_wet, burning.no_amount, burning.analysis_row, burning.calorific, air.humidity
BurningReading read_burning(const StepSheet& sheet, const StepContext& context);

/// See KindOfStep::compute.
void compute_burning(const StepSheet& sheet, const StepContext& context, step::Lookups& lookups,
                     StepOutcome& outcome);

}  // namespace heatledger::document
