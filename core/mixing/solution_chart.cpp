#include "core/mixing/solution_chart.hpp"

#include <cmath>

#include "core/base/number_text.hpp"
#include "core/mixing/mixing_cautions.hpp"

namespace heatledger::mixing {
namespace {

/// Points of the curve; more than a drawing can show.
constexpr int kPoints = 60;

double ratio_at(double fraction, double molar_mass) {
  return (1 - fraction) / fraction * molar_mass / kWaterMolarMass;
}

}  // namespace

void add_charts(step::Findings& findings, const step::StepResult& result) {
  const step::Model& model = *result.model;
  for (std::size_t k = 0; k < result.dilutions.size(); ++k) {
    const step::DilutionLine& line = result.dilutions[k];
    const step::SolutePlan* plan = nullptr;
    for (const step::SolutePlan& solute : model.solution().solutes) {
      if (solute.substance == line.substance) plan = &solute;
    }
    if (plan == nullptr) continue;
    const std::string& name = model.input().substances[line.substance].name;
    const double mass = model.molar_mass(line.substance);
    const double strongest = thermo::mass_fraction(plan->curve.least(), mass);
    const double weakest =
        std::isinf(plan->curve.most()) ? 0.01 * strongest : thermo::mass_fraction(plan->curve.most(), mass);
    const auto heat = [&](double fraction) -> std::optional<double> {
      const auto point = plan->curve.at(fraction >= 1 ? 0 : ratio_at(fraction, mass));
      return point ? std::optional<double>(point->heat) : std::nullopt;
    };
    step::Chart chart;
    chart.id = "heat_of_solution." + std::to_string(k);
    chart.title = "Heat of solution of " + name + " against strength";
    chart.x_label = "strength of the solution, by mass";
    chart.y_label = "at 25 °C";
    chart.x_dimension = units::dimension::kMassFraction;
    chart.y_dimension = units::dimension::kEnergyPerMole;
    step::ChartCurve curve;
    curve.label = "per mole of " + name;
    for (int i = 0; i <= kPoints; ++i) {
      const double fraction = weakest + (strongest - weakest) * i / kPoints;
      if (const std::optional<double> y = heat(fraction)) {
        curve.x.push_back(fraction);
        curve.y.push_back(*y);
      }
    }
    chart.curves.push_back(std::move(curve));
    const auto mark = [&](double fraction, const char* words) {
      if (!(fraction > 0)) return;
      if (const std::optional<double> y = heat(fraction))
        chart.marks.push_back(
            {fraction, *y, std::string(words) + ", " + display_number(100 * fraction, 1) + " wt%"});
    };
    mark(line.before, "as fed");
    mark(line.after, "mixture");
    chart.described = "Heat of solution of " + name + " per mole against its strength, from " +
                      display_number(100 * weakest, 1) + " to " + display_number(100 * strongest, 1) +
                      " wt%; marked are the strength as fed and that of the mixture.";
    findings.charts.push_back(std::move(chart));
  }
}

}  // namespace heatledger::mixing
