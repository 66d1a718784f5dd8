#include "core/estimate/gas_interpolation.hpp"

#include <algorithm>
#include <cmath>

namespace heatledger::estimate {
namespace {

using Nodes = std::array<double, gas_node_count>;

/// Slopes that keep each piece between its nodes: the weighted harmonic mean of the secants, zero at a turn.
/// @source F. N. Fritsch, J. Butland, SIAM J. Sci. Stat. Comput. 5 (1984) 300
Nodes slopes(const Nodes& value) {
  Nodes out{};
  std::array<double, gas_node_count - 1> width{}, secant{};
  for (std::size_t i = 0; i + 1 < gas_node_count; ++i) {
    width[i] = gas_nodes[i + 1] - gas_nodes[i];
    secant[i] = (value[i + 1] - value[i]) / width[i];
  }
  for (std::size_t i = 1; i + 1 < gas_node_count; ++i) {
    if (secant[i - 1] * secant[i] <= 0) continue;
    const double a = width[i - 1] + 2 * width[i], b = 2 * width[i - 1] + width[i];
    out[i] = (a + b) / (b / secant[i - 1] + a / secant[i]);
  }
  // One-sided three-point slope at the ends, held to the sign and three times the size of the first secant.
  const auto end_slope = [](double near, double far, double first, double second) {
    const double slope = ((2 * near + far) * first - near * second) / (near + far);
    if (slope * first <= 0) return 0.0;
    return std::fabs(slope) > 3 * std::fabs(first) ? 3 * first : slope;
  };
  constexpr std::size_t last = gas_node_count - 1;
  out[0] = end_slope(width[0], width[1], secant[0], secant[1]);
  out[last] = end_slope(width[last - 1], width[last - 2], secant[last - 1], secant[last - 2]);
  return out;
}

std::size_t piece(double temperature) {
  std::size_t i = 0;
  while (i + 2 < gas_node_count && temperature > gas_nodes[i + 1]) ++i;
  return i;
}

}  // namespace

double GasCurve::value_at(double temperature) const {
  const Nodes slope = slopes(value);
  if (temperature <= gas_nodes[0]) return value[0] + slope[0] * (temperature - gas_nodes[0]);
  const std::size_t i = piece(temperature);
  const double width = gas_nodes[i + 1] - gas_nodes[i], t = (temperature - gas_nodes[i]) / width, u = 1 - t;
  return value[i] * (1 + 2 * t) * u * u + value[i + 1] * (3 - 2 * t) * t * t +
         width * (slope[i] * t * u * u - slope[i + 1] * t * t * u);
}

double GasCurve::s_at(double temperature) const {
  if (temperature <= gas_nodes[0]) return s[0];
  const std::size_t i = piece(temperature);
  const double t = (temperature - gas_nodes[i]) / (gas_nodes[i + 1] - gas_nodes[i]);
  return s[i] + (s[i + 1] - s[i]) * t;
}

}  // namespace heatledger::estimate
