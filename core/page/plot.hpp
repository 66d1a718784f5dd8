// Axes of a drawing over one variable: round ticks, labels where they are read, and the way from figures to
// points.
#pragma once

#include <string>

#include "core/page/page.hpp"

namespace heatledger::page {

/// What a plot spans, in the unit shown.
struct PlotSpan {
  double left = 0, right = 1;  ///< of the x axis, left < right
  double low = 0, high = 1;    ///< of the y axis; widened to round figures
  std::string x_words;         ///< "air ratio", "time, h"
  std::string y_words;         ///< "°C"
};

class Plot {
 public:
  /// Draws grid, ticks and words into `drawing` and sets its size.
  Plot(Drawing& drawing, PlotSpan span);
  /// Points of the drawing.
  double x(double shown) const;
  double y(double shown) const;
  double right() const;

 private:
  PlotSpan span_;
};

Words words_at(double x, double y, std::string text, Ink ink = Ink::Text, Align anchor = Align::Left,
               double size = 9);
Stroke line_between(double x0, double y0, double x1, double y1, Ink ink, double width = 1);
Fill box_between(double x0, double y0, double x1, double y1, Ink ink);

}  // namespace heatledger::page
