// Properties of quantities on random input (RapidCheck).
#include <gtest/gtest.h>
#include <rapidcheck/gtest.h>

#include <array>
#include <cmath>
#include <cstdlib>
#include <string>
#include <utility>

#include "core/units/quantity_text.hpp"

namespace heatledger::units {
namespace {

/// The same cases in every run; RC_PARAMS in the environment overrides it. RapidCheck prints what it uses.
[[maybe_unused]] const int seeded = setenv("RC_PARAMS", "seed=20240229 max_success=1000", 0);

std::string random_unit() {
  return *rc::gen::element<std::string>("kJ/mol", "kcal/mol", "Btu/lb", "kWh/t", "\u00B0C", "degF", "K",
                                        "bar", "barg", "psig", "mmHg", "t/h", "lb/h", "kmol/h", "Nm3/h",
                                        "scf/h", "m3/h", "L/min", "kg/m3", "J/(mol K)", "kJ/kg K", "W/(m2 K)",
                                        "kW/K", "wt%", "mol%", "1/h", "g/cm3", "Btu/(lb degF)");
}

RC_GTEST_PROP(QuantityProperties, ReadBackWhatWasWritten, ()) {
  const std::string unit_text = random_unit();
  const Unit unit = *parse_unit(unit_text);
  const double typed = *rc::gen::inRange(-99999999, 99999999) / 1000.0;
  const double si = unit.to_si(typed);
  RC_PRE(unit.dimension.kind != Kind::Temperature || si >= 0);
  const Result<TypedValue> read = parse_quantity(machine_text(si, unit));
  RC_LOG() << machine_text(si, unit);
  RC_ASSERT(read.ok());
  RC_ASSERT(read->dimension() == unit.dimension);
  // Eight digits are typed and ten are written, so only the rounding of the conversion is left.
  RC_ASSERT(std::fabs(unit.from_si(read->value) - typed) <= 1e-9 * std::fabs(typed) + 1e-9);
}

RC_GTEST_PROP(QuantityProperties, AgreeInEveryUnitOfOneDimension, ()) {
  const std::array<std::pair<const char*, const char*>, 12> pairs = {{{"kJ/mol", "kcal/mol"},
                                                                      {"Btu/lb", "kWh/t"},
                                                                      {"\u00B0C", "degF"},
                                                                      {"K", "degF"},
                                                                      {"bar", "mmHg"},
                                                                      {"barg", "psig"},
                                                                      {"t/h", "lb/h"},
                                                                      {"Nm3/h", "scf/h"},
                                                                      {"kmol/h", "m3(15C)/h"},
                                                                      {"m3/h", "L/min"},
                                                                      {"kJ/kg K", "Btu/(lb degF)"},
                                                                      {"kW", "MJ/h"}}};
  const auto& [a, b] = pairs[static_cast<std::size_t>(*rc::gen::inRange(0, 12))];
  const Unit first = *parse_unit(a), second = *parse_unit(b);
  RC_ASSERT(first.dimension == second.dimension);
  const double value = *rc::gen::inRange(1, 1000000) / 7.0;
  const double there = second.from_si(first.to_si(value));
  const double back = first.from_si(second.to_si(there));
  RC_ASSERT(std::fabs(back - value) <= 1e-11 * (std::fabs(value) + std::fabs(there)));
}

}  // namespace
}  // namespace heatledger::units
