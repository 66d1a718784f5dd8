#include "core/document/step_sheet.hpp"

namespace heatledger::document {

const std::vector<StepBlank>& step_blanks() {
  static const std::vector<StepBlank> all = {
      {"outlet.temperature", "outlet or end temperature", "180 °C", "fc"},
      {"outlet.pressure", "pressure", "3 bar", "fc"},
      {"duty", "duty, heat to the process", "-250 kW", "fc"},
      {"loss", "heat loss", "5 kW", "fc"},
      {"shaft", "shaft work", "12 kW", "fc"},
      {"mass_heat_capacity", "cp of the mass", "2.1 kJ/(kg K)", "fc"},
      {"medium_in", "cooling or heating medium, in", "15 °C", "fc"},
      {"medium_out", "the same, out", "25 °C", "fc"},
      {"time", "time over which it reacts", "4 h", "c"},
      {"process_temperature", "process temperature", "60 °C", "c"},
      {"vessel.heat_capacity", "vessel and internals", "1200 kJ/K", "c"},
      {"vessel.temperature", "vessel at the start", "20 °C", "c"},
      {"solvent", "solvent that boils under reflux", "toluene", "c"},
      {"limit_temperature", "limit, such as of decomposition", "160 °C", "c"},
      {"cooling", "cooling capacity", "80 kW", "c"},
      {"rate_constant", "first-order rate constant", "0.4 1/h", "c"},
  };
  return all;
}

}  // namespace heatledger::document
