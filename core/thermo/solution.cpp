#include "core/thermo/solution.hpp"

#include <algorithm>
#include <cmath>

namespace heatledger::thermo {
namespace {

constexpr double kWaterMolarMass = 0.018015;  ///< [kg/mol] IUPAC 2021, abridged

/// Heat of one solute at a ratio; false where its table has none, and the end of the table stands in.
bool take(const Solute& solute, double ratio, std::size_t i, std::vector<double>& heat,
          std::vector<double>& u95, std::vector<double>& bridge) {
  const facts::SolutionHeatCurve& curve = *solute.curve;
  std::optional<facts::SolutionHeatPoint> point = curve.at(ratio);
  const bool there = point.has_value();
  if (!there) point = curve.at(ratio < curve.least() ? curve.least() : curve.most());
  heat[i] = point ? point->heat : 0;
  u95[i] = point ? point->u95 : 0;
  bridge[i] = point ? point->bridge : 0;
  return there;
}

}  // namespace

double solution_mass(double ratio, double molar_mass) {
  return molar_mass + ratio * kWaterMolarMass;
}

double mass_fraction(double ratio, double molar_mass) {
  return std::isinf(ratio) ? 0 : molar_mass / solution_mass(ratio, molar_mass);
}

std::optional<ApparentHeatCapacity> apparent_heat_capacity(const facts::SolutionHeatCapacities& table,
                                                           double ratio, double molar_mass) {
  if (!(ratio >= 0) || !(molar_mass > 0) || std::isinf(ratio)) return std::nullopt;
  const double mass = solution_mass(ratio, molar_mass);
  const std::optional<facts::SolutionHeatCapacity> cp =
      facts::solution_heat_capacity_at(table, molar_mass / mass);
  if (!cp) return std::nullopt;
  return ApparentHeatCapacity{cp->cp * mass - table.cp.at(0) * ratio * kWaterMolarMass, cp->u95 * mass,
                              cp->cp * mass};
}

double dilution_u95(double change, double u95, double bridge, double span) {
  return std::hypot(u95 * std::sqrt(std::min(1.0, std::fabs(change) / span)), bridge);
}

void share_water(const std::vector<Solute>& solutes, double water, SharedWater& out) {
  const std::size_t n = solutes.size();
  for (std::vector<double>* list : {&out.ratio, &out.heat, &out.u95, &out.bridge}) list->assign(n, 0);
  out.without.reset();
  out.by_mole = out.to_stronger = 0;
  out.two_limits = n > 1;
  double moles = 0;
  for (const Solute& solute : solutes) moles += solute.amount;
  if (!(moles > 0)) return;
  std::size_t stronger = 0;
  for (std::size_t i = 0; i < n; ++i) {
    out.ratio[i] = water / moles;
    if (!take(solutes[i], out.ratio[i], i, out.heat, out.u95, out.bridge)) out.without = i;
    out.by_mole += solutes[i].amount * out.heat[i];
    if (out.heat[i] < out.heat[stronger]) stronger = i;
  }
  out.to_stronger = out.by_mole;
  if (n < 2) return;
  double left = water;
  for (std::size_t i = 0; i < n; ++i) {
    if (i != stronger) left -= solutes[i].amount * solutes[i].curve->least();
  }
  if (left < 0) return;
  auto& [ratio, heat, u95, bridge] = out.other;
  for (std::vector<double>* list : {&ratio, &heat, &u95, &bridge}) list->assign(n, 0);
  bool whole = true;
  double sum = 0;
  for (std::size_t i = 0; i < n; ++i) {
    ratio[i] = i == stronger ? left / solutes[i].amount : solutes[i].curve->least();
    whole = take(solutes[i], ratio[i], i, heat, u95, bridge) && whole;
    sum += solutes[i].amount * heat[i];
  }
  if (!whole) return;
  out.to_stronger = sum;
  if (sum < out.by_mole || out.without) {
    std::swap(out.ratio, ratio);
    std::swap(out.heat, heat);
    std::swap(out.u95, u95);
    std::swap(out.bridge, bridge);
    out.without.reset();
  }
}

}  // namespace heatledger::thermo
