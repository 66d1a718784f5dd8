#include "core/document/step_kinds.hpp"

#include "core/document/burning_reading.hpp"
#include "core/document/dosed_reading.hpp"
#include "core/document/mixing_reading.hpp"
#include "core/document/step_balance.hpp"
#include "core/dosing/dosed_findings.hpp"

namespace heatledger::document {

const std::vector<KindOfStep>& kinds_of_step() {
  static const std::vector<KindOfStep> all = {
      {"through-flow",
       "Add a through-flow step",
       'f',
       true,
       true,
       true,
       true,
       false,
       false,
       {},
       {},
       compute_balance},
      {"charge", "Add a charge step", 'c', false, true, true, true, false, false, {}, {}, compute_balance},
      {"mixing", "Add a mixing step", 'm', false, true, true, true, false, false, {}, {}, compute_mixing},
      {"burning",
       "Add a burning step",
       'b',
       true,
       false,
       false,
       true,
       false,
       false,
       burning_roles(),
       {{"chamber_temperature", "temperatures"}, {"support", "support fuel"}, {"air_ratio", "air ratio"}},
       compute_burning},
      {"dosed charge",
       "Add a dosed charge",
       'd',
       false,
       true,
       true,
       true,
       true,
       true,
       {"in the vessel", "dosed"},
       {{"duty", "the course over time"}},
       compute_dosed,
       dosing::dosed_conventions},
  };
  return all;
}

const KindOfStep& kind_of(const StepSheet& sheet) {
  for (const KindOfStep& kind : kinds_of_step()) {
    if (sheet.kind == kind.name) return kind;
  }
  return kinds_of_step().front();
}

}  // namespace heatledger::document
