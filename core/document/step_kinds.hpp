// The kinds of process step that a sheet can hold: what each asks for, and who computes it. A new kind is one
// row here, its blanks in step_blanks(), and its reading beside this file.
#pragma once

#include <string>
#include <utility>
#include <vector>

#include "core/document/step_computation.hpp"
#include "core/step/lookups.hpp"

namespace heatledger::document {

struct KindOfStep {
  const char* name;    ///< in the file and on the sheet, "charge"; that of the first row also when empty
  const char* button;  ///< "Add a charge step"
  char letter;         ///< of StepBlank::kinds
  bool per_time;       ///< amounts are flows and heats are power
  bool reactions, leaving, species;  ///< whether these tables belong to it
  bool profile;                      ///< a feed is dosed over time
  bool rate_law;                     ///< reactions may carry one
  std::vector<const char*> roles;    ///< of a feed; the first stands for an empty text; none: not asked
  /// Blanks that can be sought, with their words, the one meant by an empty text first; empty: every blank of
  /// the balance.
  std::vector<std::pair<const char*, const char*>> sought;
  /// Fills everything of the outcome but its library.
  void (*compute)(const StepSheet& sheet, const StepContext& context, step::Lookups& lookups,
                  StepOutcome& outcome);
  /// What it follows beyond the conventions of the balance, one sentence each; null: nothing.
  std::vector<std::string> (*conventions)() = nullptr;
};

/// In the order of the choice.
const std::vector<KindOfStep>& kinds_of_step();
/// Of a sheet; the first for a text that names none.
const KindOfStep& kind_of(const StepSheet& sheet);

}  // namespace heatledger::document
