#include "core/page/findings_blocks.hpp"

#include <algorithm>
#include <cmath>

#include "core/page/cells.hpp"
#include "core/page/plot.hpp"
#include "core/page/step_figures.hpp"

namespace heatledger::page {
namespace {

using step::Finding;

std::string label_of(const Finding& finding) {
  return finding.mark.empty() ? finding.label : finding.label + ", " + finding.mark;
}

Row finding_row(const std::string& id, const Finding& finding) {
  const std::string cell = id + ".find." + finding.id;
  Row row = row_of(cell + ".row");
  row.cells = {label_cell(label_of(finding), Tone::Quiet)};
  if (!finding.why_missing.empty()) {
    row.cells.push_back(label_cell(finding.why_missing, Tone::Quiet, 3));
    return row;
  }
  if (!finding.text.empty()) {
    Cell words = figure_cell(cell, finding.text, Tone::Strong);
    words.kind = CellKind::Label;
    words.has_working = !finding.working.empty();
    words.span = 3;
    row.cells.push_back(std::move(words));
    return row;
  }
  const ShownFigure shown = shown_figure(finding.value.figure(), finding.dimension, finding.ratio);
  std::string beside = shown.u95;
  if (finding.unfavourable) {
    beside += beside.empty() ? "" : "; ";
    beside +=
        "unfavourable end " +
        shown_figure({*finding.unfavourable, finding.value.u95()}, finding.dimension, finding.ratio).value;
  }
  row.cells.push_back(figure_cell(cell, shown.value, Tone::Strong));
  row.cells.push_back(label_cell(shown.unit));
  row.cells.push_back(label_cell(std::move(beside), Tone::Quiet));
  return row;
}

Ink ink_of(step::CurveRole role) {
  switch (role) {
    case step::CurveRole::Main:
      return Ink::Broken;
    case step::CurveRole::Second:
      return Ink::Formed;
    case step::CurveRole::Third:
      return Ink::Accent;
    case step::CurveRole::Limit:
      return Ink::Axis;
  }
  return Ink::Plain;
}

/// Largest size on an axis decides its unit, so that every curve is drawn in the same.
struct AxisUnit {
  units::Dimension dimension;
  double largest = 0;
  bool ratio = false;

  double shown(double in_si) const { return in_shown_unit(in_si, dimension, largest, ratio); }
  std::string unit() const { return shown_figure({largest, 0}, dimension, ratio).unit; }
};

std::string axis_words(const std::string& label, const std::string& unit) {
  return unit.empty() ? label : label + ", " + unit;
}

Drawing chart_drawing(const std::string& id, const step::Chart& chart) {
  Drawing drawing;
  drawing.id = id;
  drawing.title = chart.described;
  AxisUnit x{chart.x_dimension, 0, chart.x_ratio}, y{chart.y_dimension, 0, chart.y_ratio};
  std::size_t points = 0;
  for (const step::ChartCurve& curve : chart.curves) {
    points = std::max(points, curve.x.size());
    for (const double at : curve.x) x.largest = std::max(x.largest, std::fabs(at));
    for (const double at : curve.y) y.largest = std::max(y.largest, std::fabs(at));
  }
  if (points < 2) return drawing;
  PlotSpan span{
      1e300, -1e300, 1e300, -1e300, axis_words(chart.x_label, x.unit()), axis_words(chart.y_label, y.unit())};
  for (const step::ChartCurve& curve : chart.curves) {
    for (const double at : curve.x) {
      span.left = std::min(span.left, x.shown(at));
      span.right = std::max(span.right, x.shown(at));
    }
    for (const double at : curve.y) {
      span.low = std::min(span.low, y.shown(at));
      span.high = std::max(span.high, y.shown(at));
    }
  }
  if (!(span.right > span.left)) return drawing;
  const Plot plot(drawing, span);
  // Labels stand at the right end of the curve they name and keep a line's distance from one another.
  constexpr double kPitch = 11;
  struct End {
    double y;
    std::string label;
    Ink ink;
  };
  std::vector<End> ends;
  for (const step::ChartCurve& curve : chart.curves) {
    if (curve.x.size() < 2) continue;
    Stroke stroke;
    stroke.ink = ink_of(curve.role);
    stroke.width = curve.role == step::CurveRole::Limit ? 0.75 : 1.5;
    stroke.dashed = curve.role == step::CurveRole::Limit || curve.role == step::CurveRole::Third;
    for (std::size_t i = 0; i < curve.x.size(); ++i) {
      stroke.xy.push_back(plot.x(x.shown(curve.x[i])));
      stroke.xy.push_back(plot.y(y.shown(curve.y[i])));
    }
    ends.push_back({stroke.xy.back(), curve.label, stroke.ink});
    drawing.strokes.push_back(std::move(stroke));
  }
  if (ends.size() > 1) {
    std::stable_sort(ends.begin(), ends.end(), [](const End& a, const End& b) { return a.y < b.y; });
    double free = 0;
    for (End& end : ends) {
      end.y = std::max(end.y, free);
      free = end.y + kPitch;
      drawing.words.push_back(words_at(plot.right() + 6, end.y + 3, end.label, end.ink));
      drawing.width = std::max(drawing.width, plot.right() + 12 + 5 * static_cast<double>(end.label.size()));
    }
    drawing.height = std::max(drawing.height, free + 4);
  }
  for (const step::ChartMark& mark : chart.marks) {
    const double at_x = plot.x(x.shown(mark.x)), at_y = plot.y(y.shown(mark.y));
    drawing.fills.push_back(box_between(at_x - 3, at_y - 3, at_x + 3, at_y + 3, Ink::Typed));
    const bool to_the_left = at_x > plot.right() - 120;
    drawing.words.push_back(words_at(to_the_left ? at_x - 6 : at_x + 6, at_y - 6, mark.label, Ink::Typed,
                                     to_the_left ? Align::Right : Align::Left));
  }
  return drawing;
}

}  // namespace

std::vector<Block> findings_groups(const std::string& id, const step::Findings& findings) {
  std::vector<Block> blocks;
  for (const step::FindingGroup& group : findings.groups) {
    if (group.findings.empty()) continue;
    if (!group.heading.empty()) {
      Heading heading = heading_block(id + "." + group.id + ".heading", group.heading, group.aside);
      heading.level = 3;
      blocks.push_back(std::move(heading));
    }
    Table table;
    table.id = id + "." + group.id;
    table.look = TableLook::Boxes;
    table.columns = {column("what", ""), column("figure", "", Align::Right), column("unit", ""),
                     column("u95", "")};
    for (const Finding& finding : group.findings) table.rows.push_back(finding_row(id, finding));
    blocks.push_back(std::move(table));
  }
  if (!findings.closure.empty())
    blocks.push_back(
        note_block(id + ".closure", findings.closes ? NoteKind::Info : NoteKind::Caution, findings.closure));
  return blocks;
}

std::vector<Block> findings_charts(const std::string& id, const step::Findings& findings) {
  std::vector<Block> blocks;
  for (const step::Chart& chart : findings.charts) {
    Drawing drawing = chart_drawing(id + ".chart." + chart.id, chart);
    if (drawing.strokes.empty()) continue;
    Heading heading = heading_block(id + ".chart." + chart.id + ".heading", chart.title);
    heading.level = 3;
    blocks.push_back(std::move(heading));
    blocks.push_back(std::move(drawing));
  }
  return blocks;
}

std::string finding_sentence(const Finding& finding) {
  if (!finding.why_missing.empty()) return finding.label + ": " + finding.why_missing;
  if (!finding.text.empty()) return label_of(finding) + " " + finding.text;
  const ShownFigure shown = shown_figure(finding.value.figure(), finding.dimension, finding.ratio);
  return label_of(finding) + " " + shown.value + (shown.u95.empty() ? "" : " " + shown.u95) +
         (shown.unit.empty() ? "" : " " + shown.unit);
}

std::optional<Margin> findings_margin(const std::string& id, const step::Findings& findings,
                                      const std::string& cell) {
  const std::string stem = id + ".find.";
  if (cell.compare(0, stem.size(), stem) != 0) return std::nullopt;
  const std::string which = cell.substr(stem.size());
  for (const step::FindingGroup& group : findings.groups) {
    for (const Finding& finding : group.findings) {
      if (finding.id != which) continue;
      Margin margin;
      margin.cell = cell;
      margin.subject = label_of(finding);
      if (!finding.text.empty()) {
        margin.value = finding.text;
      } else {
        const ShownFigure shown = shown_figure(finding.value.figure(), finding.dimension, finding.ratio);
        margin.value = shown.value + (shown.u95.empty() ? "" : " " + shown.u95) +
                       (shown.unit.empty() ? "" : " " + shown.unit);
      }
      margin.steps = finding.working;
      margin.sources = finding.sources;
      return margin;
    }
  }
  return std::nullopt;
}

}  // namespace heatledger::page
