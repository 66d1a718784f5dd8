#include "core/dosing/answers.hpp"

#include <algorithm>
#include <cmath>

namespace heatledger::dosing {
namespace {

using uncertainty::Quantity;

double& at(Figures& figures, FigureId id) {
  std::optional<double>& figure = figures[static_cast<std::size_t>(id)];
  if (!figure) figure = 0;
  return *figure;
}

double dosing_end(const DosedSystem& system) {
  double end = 0;
  for (const DosedFeed& feed : system.feeds) end = std::max(end, feed.profile.last());
  return end;
}

double peak_cooling(const Course& course) {
  return course.highest([](const Moment& m) { return m.cooling; }).value;
}

/// The moment from which the content ends hottest when all the rest is fed and reacts without cooling: as a
/// rule an early one, since what the cooling has taken out by then is least.
Moment worst_while_feeding(const Course& course) {
  constexpr std::size_t kTried = 41;
  const Kettle& kettle = course.kettle();
  Moment worst;
  double hottest = 0;
  for (const Course::Sample& sample : course.samples(kTried)) {
    Moment moment = course.at(sample.time, sample.before);
    std::vector<double> all = moment.amounts;
    double enthalpy = kettle.enthalpy(moment.amounts, moment.temperature);
    for (const DosedFeed& feed : course.system().feeds) {
      const double rest = 1 - feed.profile.share(moment.time);
      for (std::size_t i = 0; i < all.size(); ++i) all[i] += rest * feed.amounts[i];
      enthalpy += rest * feed.enthalpy;
    }
    const std::vector<double> extents = kettle.run_out(all);
    for (std::size_t j = 0; j < extents.size(); ++j)
      enthalpy -= extents[j] * course.system().reactions[j].heat;
    const double end = kettle.temperature_of(all, enthalpy, 0, moment.temperature);
    // Rounding does not make a later moment the worst.
    if (!worst.amounts.empty() && end <= hottest + 1e-6) continue;
    hottest = end;
    worst = std::move(moment);
  }
  return worst;
}

/// One evaluation of everything at some numbers.
Result<Answers> evaluate(const DosedModel& model, const std::vector<double>& values,
                         const RunOptions& options) {
  const Result<std::shared_ptr<const DosedSystem>> made = model.system(values);
  if (!made.ok()) return made.error();
  const DosedSystem& system = **made;
  Result<Course> followed = Course::follow(*made, options);
  if (!followed.ok()) return followed.error();
  Answers answers;
  answers.course = std::make_shared<const Course>(std::move(followed).value());
  const Course& course = *answers.course;
  const Kettle& kettle = course.kettle();
  answers.nothing_known = kettle.has_unknown_speed();
  answers.dosing_end = dosing_end(system);
  const Moment end_of_dosing = course.at(answers.dosing_end, true), last = course.at(course.end());
  const double start = system.start_temperature;
  Figures& f = answers.figures;

  at(f, FigureId::HeatSetFree) = kettle.set_free(last.extents, start);
  double cold = 0, first = course.end();
  for (const DosedFeed& feed : system.feeds) {
    cold += kettle.enthalpy(feed.amounts, start) - feed.enthalpy;
    first = std::min(first, feed.profile.first());
  }
  at(f, FigureId::ColdFeed) = cold;
  const Moment before = course.at(first, true);
  at(f, FigureId::MeanDuty) = (before.wall_heat - end_of_dosing.wall_heat) / (answers.dosing_end - first);
  const auto peak = [&](FigureId id, double& time, auto figure_of) {
    const Course::Peak found = course.highest(figure_of);
    at(f, id) = found.value;
    time = found.time;
    return found;
  };
  peak(FigureId::Highest, answers.times.highest, [](const Moment& m) { return m.temperature; });
  at(f, FigureId::ConversionAtEnd) = end_of_dosing.conversion;
  at(f, FigureId::Conversion) = last.conversion;

  // The whole step run to the end: by the final mass, at the temperature of the start.
  const std::vector<double>& all = kettle.all_charged();
  const double whole = kettle.set_free(kettle.whole_extents(), start);
  const double heat_capacity = kettle.heat_capacity(all, start);
  if (heat_capacity > 0) {
    at(f, FigureId::AdiabaticRise) = whole / heat_capacity;
    at(f, FigureId::AllAtOnce) = start + whole / heat_capacity;
  }
  if (answers.nothing_known) return answers;

  peak(FigureId::PeakHeat, answers.times.peak_heat, [](const Moment& m) { return m.heat_rate; });
  if (system.thermal != Thermal::Adiabatic)
    peak(FigureId::PeakCooling, answers.times.peak_cooling, [](const Moment& m) { return m.cooling; });
  peak(FigureId::Accumulation, answers.times.accumulation, [](const Moment& m) { return m.accumulation; });
  at(f, FigureId::AccumulationAtEnd) = end_of_dosing.accumulation;
  const Course::Peak worst = peak(FigureId::Mtsr, answers.times.mtsr, [](const Moment& m) { return m.mtsr; });
  answers.worst = course.at(worst.time, worst.before);
  std::vector<double> ended = answers.worst.amounts;
  double enthalpy = kettle.enthalpy(ended, answers.worst.temperature);
  const std::vector<double> open = kettle.run_out(ended);
  for (std::size_t j = 0; j < open.size(); ++j) enthalpy -= open[j] * system.reactions[j].heat;
  at(f, FigureId::MtsrByEnthalpy) = kettle.temperature_of(ended, enthalpy, 0, worst.value);
  at(f, FigureId::TemperatureThen) = answers.worst.temperature;
  at(f, FigureId::ColdFeedThen) = answers.worst.cold_feed;
  Result<Failure> failure = fail(course, answers.worst, false, options),
                  feeding = fail(course, worst_while_feeding(course), true, options);
  if (!failure.ok()) return failure.error();
  if (!feeding.ok()) return feeding.error();
  answers.failure = std::move(failure).value();
  answers.feeding = std::move(feeding).value();
  if (answers.failure.reached_after > 0 && !answers.failure.slow) {
    at(f, FigureId::TimeToMtsr) = answers.failure.reached_after;
    at(f, FigureId::TimeToFastest) = answers.failure.fastest_after;
  }
  at(f, FigureId::FeedNotStopped) = answers.feeding.highest;
  return answers;
}

/// Stretches the profile until the peak of the cooling is what can be had.
void seek_dosing_time(const DosedModel& model, const RunOptions& options, Answers& answers) {
  const step::Blank& capacity = model.input().cooling;
  if (!capacity) return;
  if (model.input().thermal != Thermal::Held) {
    answers.why_no_dosing_time =
        "A cooling capacity gives a dosing time where the vessel is held at its "
        "temperature.";
    return;
  }
  const std::vector<double> values = model.values();
  const auto excess = [&](double log_factor) -> std::optional<double> {
    const auto system = model.system(values, std::exp(log_factor));
    if (!system.ok()) return std::nullopt;
    const Result<Course> course = Course::follow(*system, options);
    if (!course.ok()) return std::nullopt;
    return peak_cooling(*course) / capacity->value - 1;
  };
  // A hundredth to a hundred times the dosing time typed; the longer, the lower the peak.
  double low = std::log(0.01), high = std::log(100.0);
  const std::optional<double> at_low = excess(low), at_high = excess(high);
  if (!at_low || !at_high) return;
  if (*at_high > 0) {
    answers.why_no_dosing_time = "Even a hundred times this dosing time asks for more than this cooling.";
    return;
  }
  if (*at_low < 0) {
    answers.why_no_dosing_time = "A hundredth of this dosing time asks for less than this cooling.";
    return;
  }
  // Regula falsi with the end that stays halved, on the logarithm of the time (Illinois).
  double f_low = *at_low, f_high = *at_high;
  double x = low;
  for (int i = 0; i < 60; ++i) {
    x = (low * f_high - high * f_low) / (f_high - f_low);
    const std::optional<double> here = excess(x);
    if (!here) return;
    if (std::fabs(*here) < 1e-6) break;
    if (*here > 0) {
      low = x;
      f_low = *here;
      f_high /= 2;
    } else {
      high = x;
      f_high = *here;
      f_low /= 2;
    }
    if (high - low < 1e-7) break;
  }
  double first = answers.dosing_end;
  for (const DosedFeed& feed : answers.course->system().feeds) first = std::min(first, feed.profile.first());
  at(answers.figures, FigureId::DosingTime) = (answers.dosing_end - first) * std::exp(x);
}

/// A number moves by a part of its ±: far above the noise of the integration, near enough for a first order.
constexpr double kPart = 0.25;

void spread(const DosedModel& model, const RunOptions& options, Answers& answers) {
  const std::vector<double> nominal = model.values();
  for (std::size_t i = 0; i < kFigures; ++i) {
    if (answers.figures[i]) answers.with_spread[i] = Quantity(*answers.figures[i]);
  }
  const std::size_t mtsr =
      static_cast<std::size_t>(answers.nothing_known ? FigureId::AllAtOnce : FigureId::Mtsr);
  std::vector<std::pair<std::string, double>> carried;
  for (std::size_t n = 0; n < nominal.size(); ++n) {
    const DosedNumber& number = model.numbers()[n];
    const double u95 = number.spread.u95();
    if (!(u95 > 0)) continue;
    std::vector<double> moved = nominal;
    moved[n] += kPart * u95;
    const Result<Answers> other = evaluate(model, moved, options);
    if (!other.ok()) continue;
    for (std::size_t i = 0; i < kFigures; ++i) {
      if (!answers.figures[i] || !other->figures[i]) continue;
      const double slope = (*other->figures[i] - *answers.figures[i]) / (kPart * u95);
      if (slope == 0) continue;
      answers.with_spread[i].add(Quantity(0, number.spread.parts()), slope);
      if (i == mtsr) carried.push_back({number.label, slope * u95 * slope * u95});
    }
  }
  double sum = 0;
  for (const auto& entry : carried) sum += entry.second;
  for (auto& entry : carried) entry.second /= sum;
  std::stable_sort(carried.begin(), carried.end(),
                   [](const auto& a, const auto& b) { return a.second > b.second; });
  answers.shares = std::move(carried);
}

}  // namespace

Result<Answers> answer(const DosedModel& model, const AnswerOptions& options) {
  Result<Answers> answers = evaluate(model, model.values(), options.run);
  if (!answers.ok()) return answers;
  seek_dosing_time(model, options.run, *answers);
  if (options.spread) spread(model, options.run, *answers);
  return answers;
}

}  // namespace heatledger::dosing
