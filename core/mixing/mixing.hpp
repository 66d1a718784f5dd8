// Mixing as a step of its own: dissolving, diluting, neutralising. The balance is that of core/step; here
// stands what a mixing asks beyond it: what dissolves by itself, the temperature that it reaches when no heat
// is taken away, the strengths before and after, and the cautions of the trade.
#pragma once

#include "core/step/findings.hpp"
#include "core/step/step.hpp"

namespace heatledger::mixing {

struct Mixed {
  step::StepResult result;  ///< of the figure sought; by default the duty that holds the temperature typed
  step::Findings findings;
};

/// Mixes the feeds. What has heats of solution and is fed solid, liquid or as gas leaves dissolved unless the
/// sheet says how it leaves. Without an end temperature and with the duty sought, the duty is zero and the
/// end temperature is sought.
/// @param input  kind Charge; amounts [mol], heats [J]
/// @errors those of step::solve_step
/// @example Mixing.DilutesSulfuricAcid
Result<Mixed> mix(step::StepInput input, step::Lookups& lookups, const step::SolveOptions& options = {});

}  // namespace heatledger::mixing
