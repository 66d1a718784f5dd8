#include "core/dosing/dosed_charts.hpp"

#include <algorithm>

#include "core/dosing/dosed_findings.hpp"
#include "core/step/words.hpp"

namespace heatledger::dosing {
namespace {

namespace d = units::dimension;
using step::Chart;
using step::ChartCurve;
using step::CurveRole;

constexpr std::size_t kEven = 97;  ///< even points beside the bends

class Drawer {
 public:
  explicit Drawer(const Answers& answers) : answers_(answers), course_(*answers.course) {
    for (const Course::Sample& sample : course_.samples(kEven))
      moments_.push_back(course_.at(sample.time, sample.before));
  }

  std::vector<Chart> draw() {
    const Thermal thermal = course_.system().thermal;
    if (answers_.nothing_known) return {};
    if (thermal != Thermal::Held) temperature(thermal);
    heat(thermal);
    accumulation();
    mtsr();
    failure();
    return std::move(charts_);
  }

 private:
  template <typename Figure>
  ChartCurve curve(const char* label, CurveRole role, const Figure& figure) const {
    ChartCurve made{label, role, {}, {}};
    for (const Moment& moment : moments_) {
      made.x.push_back(moment.time);
      made.y.push_back(figure(moment));
    }
    return made;
  }
  static Chart chart(const char* id, const char* title, const char* y_label, const units::Dimension& y) {
    Chart made;
    made.id = id;
    made.title = title;
    made.x_label = "time";
    made.x_dimension = d::kTime;
    made.y_label = y_label;
    made.y_dimension = y;
    return made;
  }
  double figure_of(FigureId id) const { return figure(answers_, id).value_or(0); }

  void temperature(Thermal thermal) {
    Chart made = chart("temperature", "Temperature of the content over time", "temperature", d::kTemperature);
    made.curves.push_back(curve("content", CurveRole::Main, [](const Moment& m) { return m.temperature; }));
    if (thermal == Thermal::Jacket) {
      const double jacket = course_.system().jacket_temperature;
      made.curves.push_back(curve("jacket", CurveRole::Limit, [&](const Moment&) { return jacket; }));
    }
    made.described = "The content goes from " + step::celsius(moments_.front().temperature) + " to " +
                     step::celsius(moments_.back().temperature) + "; it is highest at " +
                     duration_text(answers_.times.highest) + ", " +
                     step::celsius(figure_of(FigureId::Highest)) + ".";
    charts_.push_back(std::move(made));
  }

  void heat(Thermal thermal) {
    const bool held = thermal == Thermal::Held;
    Chart made = chart("heat", held ? "Heat set free and cooling asked for" : "Heat set free and cooling",
                       "power", d::kPower);
    made.curves.push_back(curve("set free", CurveRole::Main, [](const Moment& m) { return m.heat_rate; }));
    if (thermal != Thermal::Adiabatic) {
      made.curves.push_back(curve(held ? "cooling asked for" : "cooling", CurveRole::Second,
                                  [](const Moment& m) { return m.cooling; }));
    }
    made.described = "The reactions set free " + step::heat_text(figure_of(FigureId::PeakHeat), true) +
                     " at most, at " + duration_text(answers_.times.peak_heat) + ".";
    charts_.push_back(std::move(made));
  }

  void accumulation() {
    Chart made = chart("accumulation", "Accumulation and conversion", "share", d::kNumber);
    made.curves.push_back(
        curve("accumulation", CurveRole::Main, [](const Moment& m) { return m.accumulation; }));
    made.curves.push_back(
        curve("conversion", CurveRole::Second, [](const Moment& m) { return m.conversion; }));
    made.described = "Accumulation is largest at " + duration_text(answers_.times.accumulation) + ", " +
                     step::digits(100 * figure_of(FigureId::Accumulation)) +
                     " % of the extent of the whole step; conversion ends at " +
                     step::digits(100 * figure_of(FigureId::Conversion)) + " %.";
    charts_.push_back(std::move(made));
  }

  void mtsr() {
    Chart made = chart("mtsr", "MTSR, were the cooling to fail at that time", "temperature", d::kTemperature);
    made.curves.push_back(curve("MTSR", CurveRole::Main, [](const Moment& m) { return m.mtsr; }));
    made.curves.push_back(curve("content", CurveRole::Second, [](const Moment& m) { return m.temperature; }));
    made.marks.push_back({answers_.worst.time, answers_.worst.mtsr, "worst moment to fail"});
    made.described = "MTSR is highest for a failure at " + duration_text(answers_.worst.time) + ": " +
                     step::celsius(answers_.worst.mtsr) + ".";
    charts_.push_back(std::move(made));
  }

  void failure() {
    if (answers_.failure.path.size() < 2 && answers_.feeding.path.size() < 2) return;
    Chart made = chart("failure", "After a failure of the cooling, at the worst moment", "temperature",
                       d::kTemperature);
    made.x_label = "time from the failure";
    const auto add = [&](const Failure& from, const char* label, CurveRole role) {
      if (from.path.size() < 2) return;
      ChartCurve path{label, role, {}, {}};
      for (const PathPoint& point : from.path) {
        path.x.push_back(point.time);
        path.y.push_back(point.temperature);
      }
      made.curves.push_back(std::move(path));
    };
    add(answers_.failure, "feed stopped", CurveRole::Main);
    add(answers_.feeding, "feed goes on", CurveRole::Second);
    made.described = "Without cooling the content goes from " + step::celsius(answers_.failure.start) +
                     " to " + step::celsius(answers_.failure.highest) +
                     " when the feed stops; when it goes on, to " + step::celsius(answers_.feeding.highest) +
                     " after a failure at " + duration_text(answers_.feeding.at) + ".";
    charts_.push_back(std::move(made));
  }

  const Answers& answers_;
  const Course& course_;
  std::vector<Moment> moments_;
  std::vector<Chart> charts_;
};

}  // namespace

std::vector<Chart> dosed_charts(const Answers& answers) {
  return Drawer(answers).draw();
}

}  // namespace heatledger::dosing
