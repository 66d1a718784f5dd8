#include "core/thermo/solution.hpp"

#include <algorithm>
#include <cmath>

namespace heatledger::thermo {
namespace {

constexpr double kWaterMolarMass = 0.018015;  ///< [kg/mol] IUPAC 2021, abridged

/// Heat of one solute at a ratio; false where its table has none.
bool take(const Solute& solute, double ratio, double& heat, double& u95) {
  const std::optional<facts::SolutionHeatPoint> point = solute.curve->at(ratio);
  heat = point ? point->heat : 0;
  u95 = point ? std::hypot(point->u95, point->bridge) : 0;
  return point.has_value();
}

}  // namespace

std::optional<ApparentHeatCapacity> apparent_heat_capacity(const facts::SolutionHeatCapacities& table,
                                                           double ratio, double molar_mass) {
  if (!(ratio >= 0) || !(molar_mass > 0) || std::isinf(ratio)) return std::nullopt;
  const double mass = molar_mass + ratio * kWaterMolarMass;
  const std::optional<facts::SolutionHeatCapacity> cp =
      facts::solution_heat_capacity_at(table, molar_mass / mass);
  if (!cp) return std::nullopt;
  return ApparentHeatCapacity{cp->cp * mass - table.cp.at(0) * ratio * kWaterMolarMass, cp->u95 * mass,
                              cp->cp * mass};
}

void share_water(const std::vector<Solute>& solutes, double water, SharedWater& out) {
  const std::size_t n = solutes.size();
  out.ratio.assign(n, 0);
  out.heat.assign(n, 0);
  out.u95.assign(n, 0);
  out.without.reset();
  out.by_mole = out.to_stronger = 0;
  out.two_limits = n > 1;
  double moles = 0;
  for (const Solute& solute : solutes) moles += solute.amount;
  if (!(moles > 0)) return;
  std::size_t stronger = 0;
  for (std::size_t i = 0; i < n; ++i) {
    out.ratio[i] = water / moles;
    if (!take(solutes[i], out.ratio[i], out.heat[i], out.u95[i])) out.without = i;
    out.by_mole += solutes[i].amount * out.heat[i];
    if (out.heat[i] < out.heat[stronger]) stronger = i;
  }
  if (n < 2) {
    out.to_stronger = out.by_mole;
    return;
  }
  double left = water;
  for (std::size_t i = 0; i < n; ++i) {
    if (i != stronger) left -= solutes[i].amount * solutes[i].curve->least();
  }
  bool whole = left >= 0;
  std::vector<double> ratio(n), heat(n), u95(n);
  for (std::size_t i = 0; i < n; ++i) {
    ratio[i] = i == stronger ? left / solutes[i].amount : solutes[i].curve->least();
    whole = take(solutes[i], ratio[i], heat[i], u95[i]) && whole;
    out.to_stronger += solutes[i].amount * heat[i];
  }
  if (!whole) {
    out.to_stronger = out.by_mole;
  } else if (out.to_stronger < out.by_mole || out.without) {
    out.ratio = std::move(ratio);
    out.heat = std::move(heat);
    out.u95 = std::move(u95);
    out.without.reset();
  }
}

}  // namespace heatledger::thermo
