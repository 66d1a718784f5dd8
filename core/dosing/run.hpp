// A dosed charge followed in time: the whole course, its moments at any time, and where something is highest.
#pragma once

#include <memory>
#include <optional>
#include <vector>

#include "core/base/result.hpp"
#include "core/dosing/system.hpp"

namespace heatledger::dosing {

/// The course of one system. The times at which it is asked have no part in its integration.
class Course {
 public:
  /// Integrates to system.end.
  /// @param stop  asked at the end of every step; true ends the course there
  /// @errors dosing.too_steep: no step is small enough (a rate beyond all measure)
  static Result<Course> follow(std::shared_ptr<const DosedSystem> system, const RunOptions& options = {},
                               const std::function<bool(const Moment&)>& stop = {});

  double end() const { return pieces_.back().step.to(); }  ///< [s]
  /// The state at a time; at a bend of a profile the one just before or just after.
  /// @param t  [s] 0 .. end()
  Moment at(double t, bool before = false) const;
  /// Times that show the whole course: `count` even ones, with both sides of every bend.
  struct Sample {
    double time = 0;
    bool before = false;
  };
  std::vector<Sample> samples(std::size_t count) const;

  struct Peak {
    double time = 0, value = 0;
    bool before = false;  ///< reached just before a bend
  };
  /// Highest value of a figure over the course, wherever in a step it lies.
  /// @param figure  of the moment; the first of equal ones counts
  template <typename Figure>
  Peak highest(const Figure& figure) const;

  const Kettle& kettle() const { return *kettle_; }
  const DosedSystem& system() const { return *system_; }
  long steps() const { return static_cast<long>(pieces_.size()); }

 private:
  struct Piece {
    DenseStep step;
    std::size_t stretch = 0;  ///< between two bends of the profiles
    std::vector<std::size_t> limiting;
    std::vector<Pivot> pivots;
  };
  void look(const Piece& piece, double t, Moment& out) const;
  /// Moments at the ends and at the middle of every step, kept for the search of peaks.
  const std::vector<Moment>& looked() const;

  std::shared_ptr<const DosedSystem> system_;
  std::shared_ptr<Kettle> kettle_;
  std::vector<Piece> pieces_;
  std::vector<double> bends_;  ///< [s] the end of each stretch that was passed
  mutable std::vector<Moment> looked_;
};

/// Best of a function of one number between two points, by golden section. Shared with the search of peaks.
struct Best {
  double x = 0, y = 0;
};
Best golden(const std::function<double(double)>& f, double a, double b, int steps);

template <typename Figure>
Course::Peak Course::highest(const Figure& figure) const {
  const std::vector<Moment>& moments = looked();
  std::size_t best = 0;
  double value = figure(moments[0]);
  for (std::size_t i = 1; i < moments.size(); ++i) {
    const double here = figure(moments[i]);
    // Rounding does not make a later moment of a flat stretch the peak.
    if (here > value + 1e-12 * (here < 0 ? -here : here)) {
      value = here;
      best = i;
    }
  }
  const Piece& piece = pieces_[best / 3];
  Peak peak{moments[best].time, value, best % 3 == 2};
  Moment moment;
  const auto refine = [&](const Piece& of) {
    const Best found = golden(
        [&](double t) {
          look(of, t, moment);
          return figure(moment);
        },
        of.step.from, of.step.to(), 24);
    if (found.y > peak.value + 1e-9 * (found.y < 0 ? -found.y : found.y)) peak = {found.x, found.y, false};
  };
  refine(piece);
  // At the end of a step the peak may lie in the next, at its start in the one before.
  if (best % 3 == 2 && best / 3 + 1 < pieces_.size()) refine(pieces_[best / 3 + 1]);
  if (best % 3 == 0 && best / 3 > 0) refine(pieces_[best / 3 - 1]);
  return peak;
}

}  // namespace heatledger::dosing
