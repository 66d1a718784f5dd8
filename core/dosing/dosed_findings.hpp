// The answers of a dosed charge in words, groups of figures and drawings.
#pragma once

#include "core/dosing/answers.hpp"
#include "core/step/findings.hpp"

namespace heatledger::dosing {

/// Groups "dosing" and "failure", drawings, notes and cautions.
step::Findings findings_of(const DosedModel& model, const Answers& answers);

/// The conventions that a dosed charge follows, one sentence each.
std::vector<std::string> dosed_conventions();

/// "2.35 h", "14 min", "40 s".
std::string duration_text(double seconds);

}  // namespace heatledger::dosing
