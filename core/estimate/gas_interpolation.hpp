// Gas heat capacity between the temperatures of the table: monotone cubic, so no bump that the nodes do not
// have.
#pragma once

#include <array>

#include "core/estimate/context_table.hpp"

namespace heatledger::estimate {

constexpr double gas_range_low = 273.15, gas_range_high = 1000;  ///< [K]

struct GasCurve {
  std::array<double, gas_node_count> value{};  ///< at gas_nodes [J/(mol K)]
  std::array<double, gas_node_count> s{};      ///< standard deviations

  /// Below the first node the curve goes on straight.
  /// @param temperature  [K] gas_range_low to gas_range_high
  double value_at(double temperature) const;
  double s_at(double temperature) const;
};

}  // namespace heatledger::estimate
