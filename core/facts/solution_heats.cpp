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
  if (key == "o")
    return "NBS Circular 500 (1952) and NBS tables, as reprinted in textbooks; above 42 wt% Olsson, "
           "Jernqvist, "
           "Aly, Int. J. Thermophys. 18 (1997) 779";
  if (key == "h") return "CRC Handbook 95, after Parker, NSRDS-NBS 2 (1965)";
  if (key == "n")
    return "CRC Handbook 95, enthalpy of dilution of acids, after Parker, NSRDS-NBS 2 (1965); above 56 wt% "
           "NBS "
           "Technical Note 270-3 (1968)";
  if (key == "g") return "Giguère, Morissette, Olmos, Knop, Can. J. Chem. 33 (1955) 804";
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
      curve.symmetrical = curve.symmetrical || table.cell(note) == "s";
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

/// A liquid in no water has no heat of solution: a point of the curve that needs no table. Bridged only where
/// the table begins close to it.
bool starts_at_pure_liquid(const SolutionHeats& curve) {
  constexpr double kNear = 1;  // mole of water per mole
  return curve.phase == 'l' && curve.points.size() >= 2 && curve.points.front().ratio <= kNear;
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
  if (curve.symmetrical) return 0;
  if (curve.points.empty()) return HUGE_VAL;
  return starts_at_pure_liquid(curve) ? 0 : curve.points.front().ratio;
}

SolutionHeatCurve::SolutionHeatCurve(const SolutionHeats& curve)
    : points_(curve.points),
      constant_(curve.phase == 'l' ? 2 : 1),
      least_(least_ratio(curve)),
      symmetrical_(curve.symmetrical) {
  std::vector<double> x, y;
  for (const SolutionHeatPoint& p : curve.points) {
    x.push_back(p.ratio / (p.ratio + constant_));
    y.push_back(p.heat);
    most_ = p.ratio;
  }
  if (curve.infinite) {
    x.push_back(1.0);
    y.push_back(curve.infinite->heat);
    points_.push_back(*curve.infinite);
    points_.back().ratio = HUGE_VAL;
    most_ = HUGE_VAL;
  }
  for (const double heat : y) span_ = std::max(span_, std::fabs(heat));
  if (!y.empty()) heat_ = MonotoneCurve(std::move(x), std::move(y));
}

/// The parabola through the pure liquid and the first two points. Its distance from the straight line to the
/// first point is what the choice of the curve may be wrong by.
SolutionHeatPoint SolutionHeatCurve::strong(double ratio) const {
  const SolutionHeatPoint& first = points_[0];
  const SolutionHeatPoint& second = points_[1];
  const double chord = first.heat / first.ratio;
  const double bend = (second.heat / second.ratio - chord) / (second.ratio - first.ratio);
  const double bow = bend * ratio * (ratio - first.ratio);
  return {ratio, chord * ratio + bow, first.u95, std::fabs(bow)};
}

std::optional<SolutionHeatPoint> SolutionHeatCurve::at(double ratio) const {
  if (!(ratio >= least_ && ratio <= most_)) return std::nullopt;
  const double x = std::isinf(ratio) ? 1.0 : ratio / (ratio + constant_);
  if (symmetrical_) {
    const double share = std::isinf(ratio) ? 1.0 : ratio / (ratio + 1), limit = points_.back().heat;
    return SolutionHeatPoint{ratio, limit * share, points_.back().u95 * share,
                             std::fabs(limit) * share * (1 - share)};
  }
  if (ratio < points_.front().ratio) return strong(ratio);
  std::size_t i = 0;
  while (i + 2 < points_.size() && ratio > points_[i + 1].ratio) ++i;
  const double u95 = points_.size() == 1 ? points_[0].u95 : std::max(points_[i].u95, points_[i + 1].u95);
  return SolutionHeatPoint{ratio, heat_.at(x), u95, 0};
}

std::optional<SolutionHeatPoint> solution_heat_at(const SolutionHeats& curve, double ratio) {
  if (curve.points.empty() && !curve.symmetrical) return std::nullopt;
  return SolutionHeatCurve(curve).at(ratio);
}

}  // namespace heatledger::facts
