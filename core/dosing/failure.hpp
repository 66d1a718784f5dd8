// What a failure of the cooling does to a dosed charge: adiabatic from that moment on, by the same kinetics.
#pragma once

#include <vector>

#include "core/dosing/run.hpp"

namespace heatledger::dosing {

struct PathPoint {
  double time = 0;         ///< [s] from the failure
  double temperature = 0;  ///< [K]
};

/// The vessel after its cooling has failed. The vessel itself takes up no heat, nothing evaporates.
struct Failure {
  double at = 0;             ///< [s] from the start of the step
  double start = 0;          ///< temperature then [K]
  double highest = 0;        ///< of the whole path [K]
  double reached_after = 0;  ///< [s] 95 % of the way from start to the highest are done; 0: no way to go
  double fastest_after = 0;  ///< [s] the temperature rises fastest
  double fastest = 0;        ///< [K/s]
  bool slow = false;         ///< not done within kFailureHorizon; `highest` is then where it was by then
  std::vector<PathPoint> path;
};

constexpr double kFailureHorizon = 30 * 86400.0;  ///< [s]

/// From a moment of a course. @param feeding  goes on by its profile; else it stops with the cooling
/// @errors dosing.too_steep
Result<Failure> fail(const Course& course, const Moment& moment, bool feeding,
                     const RunOptions& options = {});

}  // namespace heatledger::dosing
