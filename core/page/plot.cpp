#include "core/page/plot.hpp"

#include <algorithm>
#include <cmath>

#include "core/base/number_text.hpp"

namespace heatledger::page {
namespace {

constexpr double kLeft = 70, kRight = 480, kTop = 26, kBottom = 190, kWidth = 520, kUnder = 36;
constexpr int kMostXTicks = 6, kMostYTicks = 5;

/// 1, 2 or 5 times a power of ten, at least range / most.
double tick_step(double range, int most) {
  double step = 1e-6;
  const double factors[3] = {2, 2.5, 2};
  for (int i = 0; range / step > most && i < 90; ++i) step *= factors[i % 3];
  return step;
}

int tick_decimals(double step) {
  int decimals = 0;
  while (step < 0.999 && decimals < 6) {
    step *= 10;
    ++decimals;
  }
  return decimals;
}

}  // namespace

Words words_at(double x, double y, std::string text, Ink ink, Align anchor, double size) {
  Words words;
  words.x = x;
  words.y = y;
  words.text = std::move(text);
  words.ink = ink;
  words.anchor = anchor;
  words.size = size;
  return words;
}

Stroke line_between(double x0, double y0, double x1, double y1, Ink ink, double width) {
  Stroke stroke;
  stroke.xy = {x0, y0, x1, y1};
  stroke.ink = ink;
  stroke.width = width;
  return stroke;
}

Fill box_between(double x0, double y0, double x1, double y1, Ink ink) {
  Fill fill;
  fill.ink = ink;
  fill.xy = {x0, y0, x1, y0, x1, y1, x0, y1};
  return fill;
}

Plot::Plot(Drawing& drawing, PlotSpan span) : span_(std::move(span)) {
  double &low = span_.low, &high = span_.high;
  const double left = span_.left, right = span_.right;
  if (!(high - low > 1e-9 * std::max(std::fabs(low), std::fabs(high)))) {
    const double around = std::max(1.0, std::fabs(high)) / 10;
    low -= around;
    high += around;
  }
  const double y_step = tick_step(high - low, kMostYTicks), x_step = tick_step(right - left, kMostXTicks);
  low = std::floor(low / y_step) * y_step;
  high = std::ceil(high / y_step) * y_step;
  drawing.width = kWidth;
  drawing.height = kBottom + kUnder;
  for (int i = 0; low + i * y_step <= high + y_step / 2; ++i) {
    const double at = low + i * y_step;
    drawing.strokes.push_back(line_between(kLeft, y(at), kRight, y(at), Ink::Grid, 0.5));
    drawing.words.push_back(words_at(kLeft - 6, y(at) + 3, display_number(at, tick_decimals(y_step)),
                                     Ink::QuietText, Align::Right));
  }
  for (int i = 0;; ++i) {
    const double at = (std::ceil(left / x_step - 1e-9) + i) * x_step;
    if (at > right + 1e-9 * x_step) break;
    drawing.strokes.push_back(line_between(x(at), kBottom, x(at), kBottom + 4, Ink::Axis, 0.5));
    drawing.words.push_back(words_at(x(at), kBottom + 15, display_number(at, tick_decimals(x_step)),
                                     Ink::QuietText, Align::Centre));
  }
  drawing.words.push_back(words_at(0, kTop - 12, span_.y_words, Ink::QuietText, Align::Left));
  drawing.words.push_back(words_at(kRight, kBottom + 30, span_.x_words, Ink::QuietText, Align::Right));
  drawing.strokes.push_back(line_between(kLeft, kBottom, kRight, kBottom, Ink::Axis, 0.5));
}

double Plot::x(double shown) const {
  return kLeft + (kRight - kLeft) * (shown - span_.left) / (span_.right - span_.left);
}

double Plot::y(double shown) const {
  return kBottom - (kBottom - kTop) * (shown - span_.low) / (span_.high - span_.low);
}

double Plot::right() const {
  return kRight;
}

}  // namespace heatledger::page
