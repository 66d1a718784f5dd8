#include "core/facts/solution_heats.hpp"

#include <algorithm>
#include <cmath>
#include <string>

#include "core/base/check.hpp"
#include "core/facts/embedded_tables.hpp"
#include "core/facts/structure_match.hpp"
#include "core/facts/table_reader.hpp"

namespace heatledger::facts {

namespace {

std::string_view source_text(std::string_view key) {
  if (key == "f") return "NBS Circular 500 (1952) and NBS tables, as reprinted in textbooks";
  if (key == "h") return "CRC Handbook 95, after Parker, NSRDS-NBS 2 (1965)";
  CHECK(key == "p", "solution_heats.tsv uses the sources named at its head");
  return "CRC Handbook 95, enthalpy of dilution of acids, after Parker, NSRDS-NBS 2 (1965)";
}

struct Table {
  std::vector<SolutionHeats> curves;
  std::vector<std::string> hills;  ///< of each curve's solute

  Table() {
    TableReader table(tables::solution_heats);
    const std::size_t solute = table.column("solute"), phase = table.column("phase"), r = table.column("r"),
                      heat = table.column("heat"), u95 = table.column("u95"), source = table.column("source"),
                      note = table.column("note");
    while (table.next()) {
      const std::string_view text = source_text(table.cell(source));
      const char state = table.cell(phase).front();
      if (curves.empty() || curves.back().solute != table.cell(solute) || curves.back().source != text) {
        SolutionHeats& curve = curves.emplace_back();
        curve.solute = table.cell(solute);
        curve.phase = state;
        curve.source = text;
        const std::optional<std::string> hill = hill_text(curve.solute);
        CHECK(hill.has_value(), "solution_heats.tsv holds formulas that can be read");
        hills.push_back(*hill);
      }
      SolutionHeats& curve = curves.back();
      curve.from_memory = curve.from_memory || table.cell(note) == "m";
      SolutionHeatPoint point;
      point.heat = table.number(heat) * 1000;
      point.u95 = table.number(u95) * 1000;
      if (table.cell(r) == "inf") {
        curve.infinite = point;
      } else {
        point.ratio = table.number(r);
        CHECK(curve.points.empty() || curve.points.back().ratio < point.ratio,
              "a curve of solution heats rises in dilution");
        curve.points.push_back(point);
      }
    }
  }
};

const Table& table() {
  static const Table all;
  return all;
}

/// A point of a curve on the axis that interpolation runs along.
struct Node {
  double x, heat, u95;
};

std::vector<Node> nodes_of(const SolutionHeats& curve) {
  std::vector<Node> nodes;
  for (const SolutionHeatPoint& p : curve.points) nodes.push_back({p.ratio / (p.ratio + 1), p.heat, p.u95});
  if (curve.infinite) nodes.push_back({1.0, curve.infinite->heat, curve.infinite->u95});
  return nodes;
}

/// Slopes of monotone cubic pieces: no overshoot between two points.
std::vector<double> slopes_of(const std::vector<Node>& nodes) {
  const std::size_t n = nodes.size();
  std::vector<double> secant(n - 1), slope(n);
  for (std::size_t i = 0; i + 1 < n; ++i)
    secant[i] = (nodes[i + 1].heat - nodes[i].heat) / (nodes[i + 1].x - nodes[i].x);
  slope[0] = secant[0];
  slope[n - 1] = secant[n - 2];
  for (std::size_t i = 1; i + 1 < n; ++i) {
    slope[i] =
        secant[i - 1] * secant[i] <= 0 ? 0 : 2 * secant[i - 1] * secant[i] / (secant[i - 1] + secant[i]);
  }
  for (std::size_t i = 0; i + 1 < n; ++i) {
    if (secant[i] == 0) {
      slope[i] = slope[i + 1] = 0;
      continue;
    }
    const double a = slope[i] / secant[i], b = slope[i + 1] / secant[i];
    const double square = a * a + b * b;
    if (square > 9) {
      const double factor = 3 / std::sqrt(square);
      slope[i] = factor * a * secant[i];
      slope[i + 1] = factor * b * secant[i];
    }
  }
  return slope;
}

/// A liquid in no water has no heat of solution: a point of the curve that needs no table. Bridged only where
/// the table begins close to it.
bool starts_at_pure_liquid(const SolutionHeats& curve) {
  constexpr double kNear = 1;  // mole of water per mole
  return curve.phase == 'l' && curve.points.size() >= 2 && curve.points.front().ratio <= kNear;
}

/// The parabola through the pure liquid and the first two points. Its distance from the straight line to the
/// first point is what the choice of the curve may be wrong by.
SolutionHeatPoint near_pure_liquid(const SolutionHeats& curve, double ratio) {
  const SolutionHeatPoint& first = curve.points[0];
  const SolutionHeatPoint& second = curve.points[1];
  const double chord = first.heat / first.ratio;
  const double bend = (second.heat / second.ratio - chord) / (second.ratio - first.ratio);
  const double bow = bend * ratio * (ratio - first.ratio);
  return {ratio, chord * ratio + bow, first.u95, std::fabs(bow)};
}

}  // namespace

const std::vector<SolutionHeats>& solution_heats() {
  return table().curves;
}

const SolutionHeats* find_solution_heats(std::string_view formula, char phase) {
  const std::optional<std::string> hill = hill_text(formula);
  if (!hill) return nullptr;
  for (std::size_t i = 0; i < table().curves.size(); ++i) {
    if (table().hills[i] == *hill && table().curves[i].phase == phase) return &table().curves[i];
  }
  return nullptr;
}

double least_ratio(const SolutionHeats& curve) {
  if (curve.points.empty()) return HUGE_VAL;
  return starts_at_pure_liquid(curve) ? 0 : curve.points.front().ratio;
}

std::optional<SolutionHeatPoint> solution_heat_at(const SolutionHeats& curve, double ratio) {
  if (curve.points.empty() || !(ratio >= least_ratio(curve))) return std::nullopt;
  if (ratio < curve.points.front().ratio) return near_pure_liquid(curve, ratio);
  if (!curve.infinite && ratio > curve.points.back().ratio) return std::nullopt;
  const std::vector<Node> nodes = nodes_of(curve);
  if (nodes.size() == 1) return curve.points.front();
  const std::vector<double> slope = slopes_of(nodes);
  const double x = std::isinf(ratio) ? 1.0 : ratio / (ratio + 1);
  std::size_t i = 0;
  while (i + 2 < nodes.size() && x > nodes[i + 1].x) ++i;
  const Node& a = nodes[i];
  const Node& b = nodes[i + 1];
  const double width = b.x - a.x, t = (x - a.x) / width, rest = 1 - t;
  SolutionHeatPoint out;
  out.ratio = ratio;
  out.heat = a.heat * (1 + 2 * t) * rest * rest + b.heat * (3 - 2 * t) * t * t +
             width * t * rest * (slope[i] * rest - slope[i + 1] * t);
  out.u95 = std::max(a.u95, b.u95);
  return out;
}

}  // namespace heatledger::facts
