// A stiff initial-value problem of few unknowns, integrated with error control and dense output. What is
// integrated stands in system.hpp.
#pragma once

#include <cstddef>
#include <functional>
#include <vector>

namespace heatledger::dosing {

/// dy/dt = f(t, y).
class Equations {
 public:
  virtual ~Equations() = default;
  virtual std::size_t size() const = 0;
  /// @param dydt  `size()` rates, in the unit of y per second
  virtual void rates(double t, const double* y, double* dydt) const = 0;
  /// Error that one step may make in each unknown, > 0.
  virtual void tolerances(double t, const double* y, double* allowed) const = 0;
};

/// One accepted step with a polynomial of third degree inside.
struct DenseStep {
  double from = 0, length = 0;                ///< [s]
  double span = 0;                            ///< [s] of the polynomial; longer than a step that was cut
  std::vector<double> start, end, bow, skew;  ///< one for each unknown, at both ends of the span, and what
                                              ///< bends the line between

  double to() const { return from + length; }
  /// The unknowns at a time within the step. @param y  as many as unknowns
  void at(double t, double* y) const;
};

/// How an integration came to its end.
enum class Ending : unsigned char {
  Reached,   ///< the time asked for
  Stopped,   ///< `after` said so
  TooSteep,  ///< no step is small enough, or far too many are needed
};

struct Progress {
  double length = 0;  ///< [s] of the step to try next; 0: found by itself
  long steps = 0;     ///< accepted so far
};

/// Integrates from `from` to `to`; the right-hand side must be smooth in between.
/// Rodasp: six linearly implicit stages, order 4 with an embedded order 3, stiffly accurate, of full order
/// also where a fast reaction has long settled and is only carried along. Jacobian and time derivative by
/// differences.
/// The right-hand side must be defined a hundredth of a step before `from` too.
/// @param y         in: at `from`; out: at the end
/// @param after     called after each accepted step, which it may cut by making `length` smaller; a cut step
///                  is the last, and so is one for which false comes back
/// @param progress  carries the length of the step from one stretch to the next
/// @source G. Steinebach, Order reduction of ROW methods for DAEs and method of lines applications, Preprint
///         1741, TH Darmstadt 1995; E. Hairer, G. Wanner, Solving Ordinary Differential Equations II, 2nd
///         ed., Springer 1996, IV.7 and VI.4
Ending integrate(const Equations& equations, double from, double to, std::vector<double>& y, double longest,
                 Progress& progress, const std::function<bool(DenseStep&)>& after);

}  // namespace heatledger::dosing
