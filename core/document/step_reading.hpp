// From the texts of a step to the numbers of core/step.
#pragma once

#include <functional>

#include "core/balance/ledger.hpp"
#include "core/document/step_sheet.hpp"
#include "core/step/step.hpp"
#include "core/units/expression.hpp"

namespace heatledger::document {

/// What a step refers to.
struct StepContext {
  balance::SpeciesSource* species = nullptr;
  const units::NamedFigures* names = nullptr;  ///< what the cells may call; never null
  /// The ledger of a reaction by its id; null when there is none that goes on.
  std::function<std::shared_ptr<const balance::Ledger>(const std::string& id)> ledger;
  /// The result of a step above by its id; null when there is none.
  std::function<const step::StepResult*(const std::string& id)> above;
};

struct StepReading {
  step::StepInput input;
  std::vector<Error> errors;  ///< `where` begins with the field: "feeds[0].rows[1].amount, offset 3"
  std::vector<std::string> notes;
};

/// Reads every text; a text that cannot be read is left blank and listed.
/// Codes: those of units, equations and species, and step.how, step.no_reaction, step.no_step, step.excess,
/// step.figure
StepReading read_step(const StepSheet& sheet, const StepContext& context);

/// A blank of the sheet as the balance numbers it: "feed.0.part.2" counts rows on the sheet and parts there,
/// and air is one row of several parts. Empty: the row is several parts. Other ids stay as they are.
std::optional<std::string> slot_of_row(const step::StepInput& input, const std::string& id);

/// "conversion of ethene" and the other ways a progress can be written, for a choice.
std::vector<std::string> progress_choices(const balance::Reaction& reaction);

}  // namespace heatledger::document
