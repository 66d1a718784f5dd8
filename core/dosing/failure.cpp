#include "core/dosing/failure.hpp"

#include <algorithm>
#include <cmath>

namespace heatledger::dosing {
namespace {

constexpr double kDone = 0.999;  ///< of the heat that was open: the path goes no further
constexpr double kReached = 0.95;
constexpr std::size_t kPathPoints = 81;

/// When a path passes a temperature that it has passed `by` then [s].
double passed(const Course& course, double temperature, double by) {
  double low = 0, high = by;
  for (int i = 0; i < 60; ++i) {
    const double middle = low + (high - low) / 2;
    (course.at(middle).temperature < temperature ? low : high) = middle;
  }
  return high;
}

}  // namespace

Result<Failure> fail(const Course& course, const Moment& moment, bool feeding, const RunOptions& options) {
  const DosedSystem& before = course.system();
  auto system = std::make_shared<DosedSystem>(before);
  system->thermal = Thermal::Adiabatic;
  system->vessel_heat_capacity = 0;
  system->start = moment.amounts;
  system->start_temperature = moment.temperature;
  system->feeds.clear();
  double last = 0;
  for (const DosedFeed& feed : before.feeds) {
    if (!feeding || moment.time >= feed.profile.last()) continue;
    const double rest = 1 - feed.profile.share(moment.time);
    DosedFeed left = feed;
    for (double& amount : left.amounts) amount *= rest;
    left.enthalpy *= rest;
    left.profile = feed.profile.after(moment.time);
    last = std::max(last, left.profile.last());
    system->feeds.push_back(std::move(left));
  }
  system->end = last + kFailureHorizon;

  Kettle whole(*system);
  const double open = whole.set_free(whole.whole_extents(), moment.temperature);
  const auto done = [&](const Moment& now) {
    return now.time >= last && std::fabs(now.open_heat) <= (1 - kDone) * std::fabs(open);
  };
  Failure failure;
  failure.at = moment.time;
  failure.start = moment.temperature;
  if (open == 0 && last == 0) {
    failure.highest = moment.temperature;
    failure.path = {{0, moment.temperature}};
    return failure;
  }
  const Result<Course> followed = Course::follow(system, options, done);
  if (!followed.ok()) return followed.error();
  const Course& path = followed.value();
  const Course::Peak top = path.highest([](const Moment& m) { return m.temperature; });
  const Course::Peak fastest = path.highest([](const Moment& m) {
    return m.heat_capacity > 0 ? (m.heat_rate - m.cold_feed) / m.heat_capacity : 0;
  });
  failure.highest = top.value;
  failure.fastest = fastest.value;
  failure.fastest_after = fastest.time;
  failure.slow = !done(path.at(path.end()));
  if (top.value > moment.temperature)
    failure.reached_after =
        passed(path, moment.temperature + kReached * (top.value - moment.temperature), top.time);
  // Drawn up to a little after it is over.
  const double shown = std::min(path.end(), std::max({1.25 * failure.reached_after, last, 1.0}));
  for (std::size_t i = 0; i < kPathPoints; ++i) {
    const double t = shown * static_cast<double>(i) / static_cast<double>(kPathPoints - 1);
    failure.path.push_back({t, path.at(t).temperature});
  }
  return failure;
}

}  // namespace heatledger::dosing
