#include <algorithm>
#include <cmath>

#include "core/burning/answer.hpp"
#include "core/step/words.hpp"

namespace heatledger::burning {

namespace {

namespace d = units::dimension;
using step::Chart;
using step::ChartCurve;
using step::CurveRole;

Chart chart(const char* id, const char* title, const char* y_label, const units::Dimension& y) {
  Chart c;
  c.id = id;
  c.title = title;
  c.x_label = "air ratio";
  c.y_label = y_label;
  c.x_dimension = d::kNumber;
  c.x_ratio = true;
  c.y_dimension = y;
  return c;
}

ChartCurve curve(std::string label, CurveRole role) {
  ChartCurve c;
  c.label = std::move(label);
  c.role = role;
  return c;
}

}  // namespace

std::vector<Chart> charts(const BurnInput& typed, const Numbers& numbers) {
  BurnInput in = typed;
  in.sought = Sought::Temperature;
  in.rule = AirRule::Ratio;
  if (typed.sought == Sought::Support) {
    for (Stream& stream : in.streams) {
      if (stream.role == Role::SupportFuel) stream.scale = numbers.support;
    }
  }
  // What the streams bring of oxygen themselves cannot be taken away.
  const double brought = numbers.oxygen_brought / numbers.oxygen_needed;
  const double dilution = numbers.dilution / (1 + in.air.water) * in.air.oxygen / numbers.oxygen_needed;
  const double from = std::max(0.6, brought + dilution), to = std::max({2.5, 1.3 * numbers.ratio, from + 1});
  constexpr int kPoints = 40;

  Chart temperature =
      chart("temperature", "Flame temperature falls with excess air", "flame temperature", d::kTemperature);
  ChartCurve complete = curve("complete burning", CurveRole::Second),
             equilibrium = curve("chemical equilibrium", CurveRole::Main);
  Chart gas = chart("flue", "Flue gas thins as air is added", "share of the wet flue gas", d::kNumber);
  ChartCurve carbon = curve("CO₂", CurveRole::Main), water = curve("H₂O", CurveRole::Second),
             oxygen = curve("O₂", CurveRole::Third);
  double hottest = 0, hottest_at = 1;
  for (int i = 0; i <= kPoints; ++i) {
    double ratio = from + (to - from) * i / kPoints;
    // The corner at one belongs to the drawing.
    if (std::abs(ratio - 1) < (to - from) / kPoints / 2 && from < 1) ratio = 1;
    in.air_figure = {ratio, 0};
    const Result<Numbers> n = burn(in);
    if (!n.ok()) continue;
    equilibrium.x.push_back(ratio);
    equilibrium.y.push_back(n->equilibrium->temperature);
    if (n->equilibrium->temperature > hottest) {
      hottest = n->equilibrium->temperature;
      hottest_at = ratio;
    }
    if (!n->complete) continue;
    complete.x.push_back(ratio);
    complete.y.push_back(*n->flame_temperature);
    const double wet = total(n->flame);
    for (auto& [line, product] : {std::pair{&carbon, Product::CO2}, std::pair{&water, Product::H2O},
                                  std::pair{&oxygen, Product::O2}}) {
      line->x.push_back(ratio);
      line->y.push_back(of(n->flame, product) / wet);
    }
  }
  temperature.described =
      "Flame temperature at chemical equilibrium is highest near an air ratio of " +
      step::digits(hottest_at) + ", " + step::celsius(hottest) +
      ", and falls as air is added; complete burning lies above it where the flame is hot.";
  temperature.curves = {std::move(equilibrium), std::move(complete)};
  if (numbers.equilibrium)
    temperature.marks.push_back({numbers.ratio, numbers.equilibrium->temperature, "this step"});
  gas.described = "Carbon dioxide and water fall and oxygen rises with the air ratio.";
  if (numbers.complete)
    gas.marks.push_back({numbers.ratio, of(numbers.flame, Product::O2) / total(numbers.flame), "this step"});
  gas.curves = {std::move(carbon), std::move(water), std::move(oxygen)};
  std::vector<Chart> all{std::move(temperature)};
  if (!gas.curves.front().x.empty()) all.push_back(std::move(gas));
  return all;
}

}  // namespace heatledger::burning
