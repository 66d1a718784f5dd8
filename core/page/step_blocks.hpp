// The blocks of one process step: what goes in, what reacts, what leaves, the answers, drawings, cautions.
#pragma once

#include <set>
#include <string>

#include "core/document/step_computation.hpp"
#include "core/page/page.hpp"
#include "core/page/reaction_blocks.hpp"

namespace heatledger::page {

struct StepView {
  const document::StepSheet& sheet;
  const document::StepOutcome& outcome;
  std::size_t number = 1;
  std::vector<std::string> reactions;    ///< ids of the sheet's reactions, for choices
  std::vector<std::string> steps_above;  ///< ids of the steps above this one
  /// What was typed as the ± of all exact inputs and could not be taken; null: nothing.
  const RejectedText* rejected = nullptr;
};

std::vector<Block> step_blocks(const StepView& view);
/// What two engineers must share about steps, printed on every sheet that has one.
/// @param kinds  names of the kinds of step on the sheet
std::vector<Block> step_convention_blocks(const std::set<std::string>& kinds);
/// The buttons that add a step.
std::vector<Block> add_step_blocks();

/// Heats in and out to scale. No result gives an empty drawing.
Drawing heat_bands(const std::string& id, const step::StepResult& result);
/// The answer against one blank, with its ± as a band; fewer than two points give an empty drawing.
Drawing answer_curve(const std::string& id, const document::StepOutcome& outcome);

/// Everything about one cell of a step; empty when it is none with a working.
std::optional<Margin> step_margin(const document::StepSheet& sheet, const document::StepOutcome& outcome,
                                  const std::string& cell);

/// Words of a blank in the choice of what is sought, and back: "outlet.temperature", "outlet or end
/// temperature".
std::string sought_words(const document::StepSheet& sheet, const std::string& id);
std::string sought_from_words(const document::StepSheet& sheet, const std::string& words);

}  // namespace heatledger::page
