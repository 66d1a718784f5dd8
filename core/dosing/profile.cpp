#include "core/dosing/profile.hpp"

#include <cmath>

namespace heatledger::dosing {

Profile Profile::constant(double start, double duration) {
  CHECK(start >= 0 && duration > 0, "a dosing time is above zero");
  Profile profile;
  profile.points_ = {{start, 0}, {start + duration, 1}};
  return profile;
}

Result<Profile> Profile::of(std::vector<ProfilePoint> points, const std::string& where) {
  const auto refuse = [&](const char* message, const char* hint) {
    return Error{"dosing.profile", message, where, hint};
  };
  if (points.size() < 2)
    return refuse("A dosing profile needs two points at least.", "Type when dosing begins and when it ends.");
  for (std::size_t i = 0; i < points.size(); ++i) {
    const ProfilePoint& point = points[i];
    if (!std::isfinite(point.time) || !std::isfinite(point.share) || point.time < 0)
      return refuse("A time of the dosing profile is below zero.", "Count times from the start of the step.");
    if (i > 0 && !(point.time > points[i - 1].time))
      return refuse("The times of the dosing profile do not rise.", "Put the rows in order of time.");
    if (i > 0 && point.share < points[i - 1].share)
      return refuse("The dosing profile takes back what is in.", "Type how much is in by then, in all.");
  }
  // A share is a quotient of typed amounts: whole within rounding.
  if (std::fabs(points.front().share) > 1e-12 || std::fabs(points.back().share - 1) > 1e-12)
    return refuse("The dosing profile does not go from nothing to all of the feed.",
                  "Begin with 0 and end with the whole amount.");
  points.front().share = 0;
  points.back().share = 1;
  Profile profile;
  profile.points_ = std::move(points);
  return profile;
}

ProfileLine Profile::line(double t) const {
  if (t < first()) return {t, 0, 0};
  if (t >= last()) return {t, 1, 0};
  std::size_t i = 0;
  while (t >= points_[i + 1].time) ++i;
  const ProfilePoint &a = points_[i], &b = points_[i + 1];
  return {a.time, a.share, (b.share - a.share) / (b.time - a.time)};
}

double Profile::share(double t) const {
  return line(t).at(t);
}

Profile Profile::after(double t) const {
  CHECK(t < last(), "something is still to come");
  const double in = share(t);
  Profile rest;
  if (t < first()) {
    rest.points_ = points_;
    for (ProfilePoint& point : rest.points_) point.time -= t;
    return rest;
  }
  rest.points_.push_back({0, 0});
  for (const ProfilePoint& point : points_) {
    if (point.time > t) rest.points_.push_back({point.time - t, (point.share - in) / (1 - in)});
  }
  return rest;
}

Profile Profile::stretched(double factor) const {
  Profile profile = *this;
  for (ProfilePoint& point : profile.points_) point.time *= factor;
  return profile;
}

}  // namespace heatledger::dosing
