#include "core/document/step_sheet.hpp"

namespace heatledger::document {

const std::vector<StepBlank>& step_blanks() {
  static const std::vector<StepBlank> all = {
      {"outlet.temperature", "outlet or end temperature", "180 °C", "fc"},
      {"outlet.pressure", "pressure", "3 bar", "fcb"},
      {"duty", "duty, heat to the process", "-250 kW", "fc"},
      {"loss", "heat loss", "5 kW", "fcb"},
      {"shaft", "shaft work", "12 kW", "fc"},
      {"departure", "departure from ideal gas", "-12 kW or -2 %", "fc"},
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
      {"air_ratio", "air ratio", "1.15", "b"},
      {"burner_ratio", "air ratio of the burner alone", "1.1", "b"},
      {"flue_oxygen", "oxygen in the flue gas", "3 % dry", "b"},
      {"air", "air", "humid air; dry air; O2 + 3.76 N2; 30 % O2", "b"},
      {"humidity", "relative humidity", "60 % at 25 °C", "b"},
      {"chamber_temperature", "chamber temperature", "1100 °C", "b"},
      {"chamber_volume", "chamber volume", "12 m3", "b"},
      {"flue_temperature", "flue gas leaves at", "180 °C", "b"},
      {"calorific", "calorific value of an analysis", "18.2 MJ/kg gross; Channiwala-Parikh; Dulong", "b"},
      {"reference_oxygen", "concentrations stated at", "3 %", "b"},
      {"lfl", "lower flammability limit, 25 °C", "5.0 %", "b"},
      {"so3_share", "SO3 in the wet flue gas", "5 ppmv", "b"},
      {"hcl_share", "HCl in the wet flue gas", "800 ppmv", "b"},
      {"combustion_temperature", "combustion temperature of calorific values", "25 °C", "b"},
      {"metering_temperature", "metering temperature", "0 °C", "b"},
      {"technical_limit", "maximum technical temperature, if typed", "140 °C", "c"},
      {"permissible_pressure", "permissible pressure, if the vessel is closed", "6 bar", "c"},
      {"free_volume", "free volume of the vessel", "0.8 m3", "c"},
      {"free_section", "free section for vapour and gas", "0.03 m2", "c"},
      {"td24", "T_D24 of the mass", "120 °C", "c"},
      {"td24_source", "its source and the mass tested", "adiabatic calorimetry, 40 g, 2025", "c"},
      {"time_to_maximum", "time to maximum rate at the highest temperature", "12 h", "c"},
      {"medium", "what the medium is", "cooling water", "fc"},
      {"medium_heat_capacity", "heat capacity of the medium", "2.9 kJ/(kg K)", "fc"},
      {"steam_pressure", "pressure of condensing steam", "3 bar", "fc"},
      {"coolant", "coolant that evaporates", "ammonia", "fc"},
      {"coolant_pressure", "its pressure", "2 bar", "fc"},
      {"heat_transfer_coefficient", "U, fouling included", "350 W/(m2 K)", "fc"},
  };
  return all;
}

}  // namespace heatledger::document
