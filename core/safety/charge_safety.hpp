// The figures of a safety file for a charge in which everything is there at once: what a cooling failure
// leads to, what gas is set free, which substances call for a test. A dosed charge brings its own MTSR and
// uses criticality.hpp.
#pragma once

#include "core/step/findings.hpp"
#include "core/step/step.hpp"

namespace heatledger::safety {

/// What is typed for the safety figures, beyond the step itself.
struct SafetyInput {
  step::Blank td24;             ///< temperature at which decomposition takes 24 h to its maximum rate [K]
  std::string td24_source;      ///< who measured it, with what, on what mass
  step::Blank technical_limit;  ///< MTT typed [K]: goes before any boiling point
  step::Blank permissible_pressure;  ///< [Pa] of a closed vessel: MTT is where its pressure reaches it
  step::Blank free_volume;           ///< of the vessel [m³]
  step::Blank free_section;          ///< of the vapour's way [m²]
  step::Blank time_to_maximum;       ///< of the decomposition at MTSR [s]
};

/// Groups "After a cooling failure" and "Gas set free" of a charge with a reaction, with ± from the step's
/// own numbers; the class by seeded draws through the step. Nothing for a through-flow step.
/// @example ChargeSafety.ClassFollowsFromTheStep
step::Findings charge_safety(const step::StepResult& result, const SafetyInput& input);

/// Group "Substances that call for a test": oxygen balance and functional groups of what is on the step, and
/// the customary cautions.
/// @param dosed  something is fed while it reacts
step::Findings substance_findings(const step::StepResult& result, bool dosed);

}  // namespace heatledger::safety
