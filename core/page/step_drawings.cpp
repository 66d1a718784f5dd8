// Drawings of one step, to scale, in points. Labels stand at the line they name; inks are roles.
#include <algorithm>
#include <cmath>

#include "core/base/number_text.hpp"
#include "core/page/plot.hpp"
#include "core/page/step_blocks.hpp"
#include "core/page/step_figures.hpp"
#include "core/step/words.hpp"

namespace heatledger::page {
namespace {

Ink ink_of(step::HeatLine::Kind kind) {
  switch (kind) {
    case step::HeatLine::Kind::Reaction:
      return Ink::Broken;
    case step::HeatLine::Kind::Duty:
      return Ink::Accent;
    case step::HeatLine::Kind::Stream:
      return Ink::Band;
    default:
      return Ink::Formed;
  }
}

}  // namespace

Drawing heat_bands(const std::string& id, const step::StepResult& result) {
  Drawing drawing;
  drawing.id = id;
  const bool flow = result.model->input().kind == step::StepKind::ThroughFlow;
  drawing.title =
      "Where does the heat come from, and where does it go? " + std::string(heat_unit(flow)) + ", from 25 °C";
  double in = 0;
  for (const step::HeatLine& heat : result.heats) in += std::max(0.0, heat.in);
  if (!(in > 0)) return drawing;

  constexpr double kHeight = 150, kTop = 20, kBand = 26, kLeft = 190, kMiddle = 260, kRight = 330,
                   kPitch = 13;
  drawing.width = 520;
  double lowest = kTop + kHeight;
  for (const bool coming : {true, false}) {
    double y = kTop, words_y = 0;
    for (const step::HeatLine& heat : result.heats) {
      if ((heat.in > 0) != coming) continue;
      const double height = kHeight * std::fabs(heat.in) / in;
      const double x0 = coming ? kLeft : kRight - kBand, x1 = coming ? kLeft + kBand : kRight;
      drawing.fills.push_back(box_between(x0, y, x1, y + height, ink_of(heat.kind)));
      drawing.strokes.push_back(line_between(x0, y, x1, y, Ink::Axis, 0.5));
      // Thin bands keep their labels apart.
      words_y = std::max(y + height / 2 + 3, words_y + kPitch);
      drawing.words.push_back(words_at(coming ? kLeft - 8 : kRight + 8, words_y,
                                       heat.label + ": " + shown_heat(std::fabs(heat.in), flow), Ink::Text,
                                       coming ? Align::Right : Align::Left));
      y += height;
    }
    lowest = std::max(lowest, words_y + 4);
  }
  // Between them runs the whole.
  drawing.fills.push_back(box_between(kLeft + kBand, kTop, kRight - kBand, kTop + kHeight, Ink::Grid));
  drawing.words.push_back(
      words_at(kMiddle, kTop + kHeight / 2 + 3, shown_heat(in, flow), Ink::QuietText, Align::Centre));
  drawing.strokes.push_back(line_between(kLeft, kTop + kHeight, kRight, kTop + kHeight, Ink::Axis, 0.5));
  drawing.height = lowest + 8;
  return drawing;
}

Drawing answer_curve(const std::string& id, const document::StepOutcome& outcome) {
  Drawing drawing;
  drawing.id = id;
  if (outcome.result == nullptr || outcome.curve.size() < 2) return drawing;
  const step::Answer& answer = outcome.result->answers.front();
  double y_size = 0, x_size = 0;
  for (const document::CurvePoint& point : outcome.curve) {
    y_size = std::max(y_size, std::fabs(point.y) + point.u95);
    x_size = std::max(x_size, std::fabs(point.x));
  }
  const auto y_of = [&](double value) { return in_shown_unit(value, answer.dimension, y_size); };
  const auto x_of = [&](double value) { return in_shown_unit(value, outcome.curve_dimension, x_size); };
  const std::string y_unit = shown_figure({y_size, 0}, answer.dimension).unit,
                    x_unit = shown_figure({x_size, 0}, outcome.curve_dimension).unit;
  drawing.title = "How does the " + answer.label + " follow the " + outcome.curve_label + "?";

  double low = 1e300, high = -1e300;
  for (const document::CurvePoint& point : outcome.curve) {
    low = std::min(low, y_of(point.y - point.u95));
    high = std::max(high, y_of(point.y + point.u95));
  }
  const double left = x_of(outcome.curve.front().x), right = x_of(outcome.curve.back().x);
  const Plot plot(drawing, {left, right, low, high, outcome.curve_label + ", " + x_unit, y_unit});
  const auto px = [&](double x) { return plot.x(x); };
  const auto py = [&](double y) { return plot.y(y); };

  Fill band;
  band.ink = Ink::Band;
  Stroke curve;
  curve.ink = Ink::Broken;
  curve.width = 1.5;
  for (const document::CurvePoint& point : outcome.curve) {
    band.xy.push_back(px(x_of(point.x)));
    band.xy.push_back(py(y_of(point.y + point.u95)));
    curve.xy.push_back(px(x_of(point.x)));
    curve.xy.push_back(py(y_of(point.y)));
  }
  for (std::size_t i = outcome.curve.size(); i-- > 0;) {
    band.xy.push_back(px(x_of(outcome.curve[i].x)));
    band.xy.push_back(py(y_of(outcome.curve[i].y - outcome.curve[i].u95)));
  }
  drawing.fills.push_back(std::move(band));
  drawing.strokes.push_back(std::move(curve));
  const step::Model& model = *outcome.result->model;
  for (const step::Slot& slot : model.slots()) {
    if (slot.label != outcome.curve_label) continue;
    const double x = px(x_of(slot.value)), y = py(y_of(answer.value.value()));
    drawing.fills.push_back(box_between(x - 3, y - 3, x + 3, y + 3, Ink::Typed));
    drawing.words.push_back(words_at(x + 6, y + 13, "as typed", Ink::Typed));
  }
  return drawing;
}

}  // namespace heatledger::page
