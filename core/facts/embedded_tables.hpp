// The tables as compiled in; each file under tables/ says its columns, units and sources at its head.
#pragma once

#include <string_view>

namespace heatledger::facts::tables {

extern const std::string_view atoms;
extern const std::string_view compounds;
extern const std::string_view defaults;
extern const std::string_view ions;
extern const std::string_view polynomials;
extern const std::string_view solution_heat_capacities;
extern const std::string_view solution_heats;
extern const std::string_view sources;
extern const std::string_view vapour_pressure;

}  // namespace heatledger::facts::tables
