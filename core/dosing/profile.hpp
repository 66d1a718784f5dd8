// How much of a dosed feed has gone in by when: straight lines between points in time.
#pragma once

#include <string>
#include <vector>

#include "core/base/result.hpp"

namespace heatledger::dosing {

struct ProfilePoint {
  double time = 0;   ///< [s] from the start of the step
  double share = 0;  ///< of the whole feed that is in by then, 0 .. 1
};

/// The share in and its rate on one straight stretch, also a little beyond its ends.
struct ProfileLine {
  double from = 0;   ///< [s]
  double share = 0;  ///< at `from`
  double rate = 0;   ///< [1/s]
  double at(double t) const { return share + rate * (t - from); }
};

class Profile {
 public:
  /// Nothing before `start`, then at a constant rate. @param start [s] >= 0; @param duration [s] > 0
  static Profile constant(double start, double duration);
  /// Straight lines between points; before the first point nothing happens, after the last all is in.
  /// @param points  times rising from 0 or later, shares from 0 to 1 never falling
  /// @param where   what the error points to
  /// @errors dosing.profile: fewer than two points, times that do not rise, a share that falls, or a first
  ///         share that is not 0 or a last that is not 1
  static Result<Profile> of(std::vector<ProfilePoint> points, const std::string& where = "profile");

  const std::vector<ProfilePoint>& points() const { return points_; }
  double first() const { return points_.front().time; }  ///< [s] dosing begins
  double last() const { return points_.back().time; }    ///< [s] all is in
  double share(double t) const;
  /// The stretch that holds at and just after `t`.
  ProfileLine line(double t) const;
  /// What is still to come after `t`, with times counted from there. @param t  before last()
  Profile after(double t) const;
  /// The same shape over another time: every time times `factor` > 0 (a delay stays in proportion).
  Profile stretched(double factor) const;

 private:
  std::vector<ProfilePoint> points_;
};

}  // namespace heatledger::dosing
