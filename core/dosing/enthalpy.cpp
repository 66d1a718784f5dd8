#include "core/dosing/enthalpy.hpp"

#include "core/units/constants.hpp"

namespace heatledger::dosing {
namespace {

// From where liquids freeze in a plant to far beyond where they decompose.
constexpr double kFrom = 198.15, kStep = 5;
constexpr std::size_t kNodes = 202;

}  // namespace

Enthalpy Enthalpy::constant(double at_25, double cp) {
  Enthalpy enthalpy;
  enthalpy.at_25_ = at_25;
  enthalpy.cp_ = cp;
  return enthalpy;
}

Enthalpy Enthalpy::tabulated(const std::function<double(double)>& value,
                             const std::function<double(double)>& slope) {
  Enthalpy enthalpy;
  enthalpy.nodes_.reserve(kNodes);
  for (std::size_t i = 0; i < kNodes; ++i) {
    const double temperature = kFrom + kStep * static_cast<double>(i);
    enthalpy.nodes_.push_back({value(temperature), slope(temperature)});
  }
  return enthalpy;
}

double Enthalpy::at(double temperature) const {
  if (nodes_.empty()) return at_25_ + cp_ * (temperature - units::kReferenceTemperature);
  const double place = (temperature - kFrom) / kStep;
  if (!(place > 0)) return nodes_.front().value + nodes_.front().slope * (temperature - kFrom);
  if (place >= static_cast<double>(kNodes - 1))
    return nodes_.back().value + nodes_.back().slope * kStep * (place - static_cast<double>(kNodes - 1));
  const std::size_t i = static_cast<std::size_t>(place);
  const double s = place - static_cast<double>(i), rest = 1 - s;
  const Node &a = nodes_[i], &b = nodes_[i + 1];
  return rest * rest * ((1 + 2 * s) * a.value + s * kStep * a.slope) +
         s * s * ((3 - 2 * s) * b.value - rest * kStep * b.slope);
}

double Enthalpy::heat_capacity(double temperature) const {
  if (nodes_.empty()) return cp_;
  const double place = (temperature - kFrom) / kStep;
  if (!(place > 0)) return nodes_.front().slope;
  if (place >= static_cast<double>(kNodes - 1)) return nodes_.back().slope;
  const std::size_t i = static_cast<std::size_t>(place);
  const double s = place - static_cast<double>(i), rest = 1 - s;
  const Node &a = nodes_[i], &b = nodes_[i + 1];
  return 6 * s * rest * (b.value - a.value) / kStep + rest * (1 - 3 * s) * a.slope +
         s * (3 * s - 2) * b.slope;
}

}  // namespace heatledger::dosing
