// Drawings of one reaction, to scale, in points. Labels stand at the line they name; inks are roles.
#include <algorithm>
#include <cmath>
#include <limits>

#include "core/base/number_text.hpp"
#include "core/page/figures.hpp"
#include "core/page/plot.hpp"
#include "core/page/reaction_blocks.hpp"

namespace heatledger::page {
namespace {

/// Eight-sided dot: every face draws polygons, none needs to know circles.
Fill dot(double x, double y, double radius, Ink ink) {
  Fill fill;
  fill.ink = ink;
  const double near = radius * 0.41421356237;  // tan 22.5°: the corner of a regular octagon
  fill.xy = {x - near, y - radius, x + near, y - radius, x + radius, y - near, x + radius, y + near,
             x + near, y + radius, x - near, y + radius, x - radius, y + near, x - radius, y - near};
  return fill;
}

/// 1, 2 or 5 times a power of ten, at least range / most.
double tick_step(double range, int most) {
  double step = 1e-3;
  const double factors[3] = {2, 2.5, 2};
  for (int i = 0; range / step > most && i < 60; ++i) step *= factors[i % 3];
  return step;
}

struct RouteFigure {
  std::string label;
  double value = 0, u95 = 0;  ///< [kJ]
  bool taken = false;
};

std::vector<RouteFigure> route_figures(const balance::Ledger& ledger) {
  std::vector<RouteFigure> figures;
  for (const balance::Route& route : ledger.routes) {
    if (!route.as_written) continue;
    const uncertainty::Quantity scaled = route.as_written->scaled(ledger.basis.factor);
    figures.push_back(
        {route_words(route.name), scaled.value() / 1000, scaled.u95() / 1000, route.name == ledger.taken});
  }
  return figures;
}

/// Names of one side as they stand in the equation: "nitrobenzene + 3 hydrogen".
std::string side_words(const balance::Reaction& reaction, bool product) {
  std::string text;
  for (const balance::ReactionSpecies& entry : reaction.species) {
    if (entry.product != product) continue;
    if (!text.empty()) text += " + ";
    const std::string times = coefficient_text(entry.term.coefficient);
    if (times != "1") text += times + " ";
    text += balance::display_species(entry);
  }
  constexpr std::size_t kLongest = 48;
  return text.size() <= kLongest ? text : (product ? "products" : "reactants");
}

}  // namespace

Drawing routes_drawing(const std::string& id, const balance::Ledger& ledger) {
  Drawing drawing;
  drawing.id = id;
  drawing.title = "What each route says, as written, " + ledger.basis.unit;
  const std::vector<RouteFigure> figures = route_figures(ledger);
  if (figures.empty()) return drawing;

  constexpr double kLeft = 130, kRight = 470, kTop = 16, kPitch = 24;
  double low = std::numeric_limits<double>::max(), high = -low;
  for (const RouteFigure& figure : figures) {
    low = std::min(low, figure.value - figure.u95);
    high = std::max(high, figure.value + figure.u95);
  }
  // A single exact figure still gets an axis around it.
  const double least = std::max(1.0, 0.02 * std::max(std::fabs(low), std::fabs(high)));
  if (high - low < least) {
    const double middle = (low + high) / 2;
    low = middle - least / 2;
    high = middle + least / 2;
  }
  const double step = tick_step(high - low, 5);
  low = std::floor(low / step) * step;
  high = std::ceil(high / step) * step;
  const auto x_of = [&](double kj_value) {
    return kLeft + (kRight - kLeft) * (kj_value - low) / (high - low);
  };

  const double axis = kTop + kPitch * static_cast<double>(figures.size());
  drawing.width = 500;
  drawing.height = axis + 24;
  const int decimals = step >= 1 ? 0 : (step >= 0.1 ? 1 : 3);
  for (int i = 0; low + i * step <= high + step / 2; ++i) {
    const double value = low + i * step;
    drawing.strokes.push_back(line_between(x_of(value), kTop - 8, x_of(value), axis, Ink::Grid, 0.5));
    drawing.words.push_back(
        words_at(x_of(value), axis + 14, display_number(value, decimals), Ink::QuietText, Align::Centre));
  }
  drawing.strokes.push_back(line_between(kLeft, axis, kRight, axis, Ink::Axis));
  double y = kTop;
  for (const RouteFigure& figure : figures) {
    const Ink ink = figure.taken ? Ink::Accent : Ink::Plain;
    drawing.words.push_back(
        words_at(0, y + 3, figure.label + (figure.taken ? ", taken" : ""), Ink::QuietText));
    drawing.strokes.push_back(
        line_between(x_of(figure.value - figure.u95), y, x_of(figure.value + figure.u95), y, ink, 2));
    drawing.fills.push_back(dot(x_of(figure.value), y, 3.5, ink));
    y += kPitch;
  }
  return drawing;
}

Drawing profile_drawing(const std::string& id, const balance::Ledger& ledger) {
  Drawing drawing;
  drawing.id = id;
  drawing.title = "Enthalpy profile through the free atoms, for the equation as written, kJ";
  if (!ledger.broken || !ledger.formed) return drawing;

  const double broken = ledger.broken->value(), formed = ledger.formed->value();
  const double products = broken - formed;
  double lowest = std::min(0.0, products);
  double reactants_written = 0, products_written = products;
  bool known = true;
  for (const balance::Correction& correction : ledger.corrections) {
    if (!correction.value) {
      known = false;
      continue;
    }
    // A reactant's correction leads from its phase to the gas: its level lies that much lower.
    if (ledger.reaction->species[correction.species].product) {
      products_written += correction.value->value();
    } else {
      reactants_written -= correction.value->value();
    }
  }
  if (known) lowest = std::min({lowest, reactants_written, products_written});
  const double highest = std::max(broken, std::max(0.0, products));
  if (!(highest > lowest)) return drawing;

  constexpr double kTop = 22, kBottom = 226, kLeft = 40, kMiddle = 200, kFar = 380;
  drawing.width = 500;
  drawing.height = 268;
  const auto y_of = [&](double joule) {
    return kBottom - (kBottom - kTop) * (joule - lowest) / (highest - lowest);
  };
  const int decimals = ledger_decimals(ledger);
  const balance::Reaction& reaction = *ledger.reaction;

  drawing.strokes.push_back(
      line_between(kMiddle - 20, y_of(broken), kMiddle + 90, y_of(broken), Ink::Plain, 1.5));
  drawing.words.push_back(words_at(kMiddle - 20, y_of(broken) - 6, "free atoms", Ink::QuietText));
  drawing.strokes.push_back(line_between(kLeft, y_of(0), kMiddle, y_of(0), Ink::Plain, 1.5));
  drawing.strokes.push_back(
      line_between(kMiddle + 66, y_of(products), kFar, y_of(products), Ink::Plain, 1.5));
  Stroke up = line_between(kMiddle - 8, y_of(0), kMiddle - 8, y_of(broken), Ink::Broken, 2);
  up.arrow = true;
  drawing.strokes.push_back(std::move(up));
  Stroke down = line_between(kMiddle + 76, y_of(broken), kMiddle + 76, y_of(products), Ink::Formed, 2);
  down.arrow = true;
  drawing.strokes.push_back(std::move(down));
  const double halfway = (y_of(0) + y_of(broken)) / 2;
  drawing.words.push_back(
      words_at(kMiddle - 2, halfway, "broken " + signed_kj(broken, decimals), Ink::Broken));
  drawing.words.push_back(
      words_at(kMiddle + 82, halfway, "formed " + signed_kj(-formed, decimals), Ink::Formed));

  // Levels of the phases as written lie close under those of the gas; labels keep clear of each other.
  const bool phases = known && !ledger.corrections.empty();
  drawing.words.push_back(
      words_at(kLeft, y_of(0) - 5, side_words(reaction, false) + (phases ? ", gas" : ""), Ink::QuietText));
  drawing.words.push_back(words_at(kMiddle + 82, y_of(products) - 5,
                                   side_words(reaction, true) + (phases ? ", gas" : ""), Ink::QuietText));
  if (phases) {
    const auto written_level = [&](double x0, double x1, double joule, double gas) {
      if (joule == gas) return;
      Stroke level = line_between(x0, y_of(joule), x1, y_of(joule), Ink::Plain);
      level.dashed = true;
      drawing.strokes.push_back(std::move(level));
      drawing.words.push_back(
          words_at(x0 + 6, std::max(y_of(joule), y_of(gas)) + 12, "as written", Ink::QuietText));
    };
    written_level(kLeft, kMiddle, reactants_written, 0);
    written_level(kMiddle + 66, kFar, products_written, products);
  }
  return drawing;
}

}  // namespace heatledger::page
