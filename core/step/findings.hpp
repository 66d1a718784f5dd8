// What any kind of step hands on to be shown: figures in groups, each with its ± and working, and curves to
// be drawn. A kind of step fills these; the page sets them in type and knows nothing of the kind.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "core/uncertainty/quantity.hpp"
#include "core/units/dimension.hpp"

namespace heatledger::step {

/// One figure of the answer.
struct Finding {
  std::string id;     ///< stable within the step, lower case: "mtsr", "calorific.gross.mass"
  std::string label;  ///< "maximum temperature of the synthesis reaction"
  units::Dimension dimension;
  uncertainty::Quantity value;  ///< SI
  bool ratio = false;           ///< a plain number shown as such, 1.25, instead of in per cent
  std::string mark;             ///< "remove", "notional", "at 3.2 h"
  std::string why_missing;      ///< set: there is no value, and this says why and what to type
  std::string text;             ///< set: the answer is words ("class 3"), no number
  /// Unfavourable end of the interval, for figures that a safety file uses; same unit as the value.
  std::optional<double> unfavourable;
  std::vector<std::string> working;  ///< one line each, with the figures put in
  std::vector<std::string> sources;  ///< published source of the equation and of its figures
};

struct FindingGroup {
  std::string id, heading;
  std::string aside;  ///< quiet words at the end of the heading
  std::vector<Finding> findings;
};

/// Role of a curve: a face maps it to ink.
enum class CurveRole : std::uint8_t { Main, Second, Third, Limit };

struct ChartCurve {
  std::string label;
  CurveRole role = CurveRole::Main;
  std::vector<double> x, y;  ///< SI, equally many, x rising
};
/// A point to be seen, with words beside it.
struct ChartMark {
  double x = 0, y = 0;
  std::string label;
};
/// One or more curves over one axis. All y share a dimension.
struct Chart {
  std::string id, title;  ///< the title is a heading that says what it shows
  std::string x_label, y_label;
  units::Dimension x_dimension, y_dimension;
  bool x_ratio = false, y_ratio = false;  ///< plain numbers shown as such, not in per cent
  std::vector<ChartCurve> curves;
  std::vector<ChartMark> marks;
  std::string described;  ///< the text alternative: what a reader would see, in one or two sentences
};

struct Findings {
  std::vector<FindingGroup> groups;
  std::vector<Chart> charts;
  std::vector<std::string> notes, cautions;
  std::string closure;  ///< one sentence: what closes and how well; empty: nothing to close
  bool closes = true;
};

}  // namespace heatledger::step
