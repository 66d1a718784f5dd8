#include "core/dosing/run.hpp"

#include <algorithm>
#include <cmath>

namespace heatledger::dosing {
namespace {

/// A stretch is cut into this many steps at least, so that no change between two of its ends is overlooked.
constexpr double kStepsAtLeast = 12;

}  // namespace

Best golden(const std::function<double(double)>& f, double a, double b, int steps) {
  constexpr double kSection = 0.6180339887498949;
  double left = b - kSection * (b - a), right = a + kSection * (b - a);
  double at_left = f(left), at_right = f(right);
  for (int i = 0; i < steps; ++i) {
    if (at_left >= at_right) {
      b = right;
      right = left;
      at_right = at_left;
      left = b - kSection * (b - a);
      at_left = f(left);
    } else {
      a = left;
      left = right;
      at_left = at_right;
      right = a + kSection * (b - a);
      at_right = f(right);
    }
  }
  return at_left >= at_right ? Best{left, at_left} : Best{right, at_right};
}

Result<Course> Course::follow(std::shared_ptr<const DosedSystem> system, const RunOptions& options,
                              const std::function<bool(const Moment&)>& stop) {
  CHECK(system->end > 0, "a step takes some time");
  Course course;
  course.system_ = std::move(system);
  course.kettle_ = std::make_shared<Kettle>(*course.system_, options);
  Kettle& kettle = *course.kettle_;
  std::vector<double> bends = kettle.corners();
  bends.push_back(course.system_->end);
  std::vector<double> y(kettle.size(), 0), there(kettle.size(), 0);
  Moment moment;
  bool stopped = false;
  const auto after = [&](DenseStep& step) {
    step.at(step.to(), there.data());
    if (kettle.limiting_at(step.to(), there.data()) != kettle.limiting()) {
      // The reactant that was used up no longer is: the step ends where that began.
      double same = step.from, other = step.to();
      for (int i = 0; i < 60 && other - same > 1e-13 * other; ++i) {
        const double middle = same + (other - same) / 2;
        step.at(middle, there.data());
        (kettle.limiting_at(middle, there.data()) == kettle.limiting() ? same : other) = middle;
      }
      step.length = other - step.from;
      step.at(other, there.data());
    }
    course.pieces_.push_back(Piece{step, course.bends_.size(), kettle.limiting(), kettle.pivots()});
    if (stop) {
      kettle.moment(step.to(), there.data(), moment);
      stopped = stop(moment);
    }
    return !stopped && !kettle.pivots_outrun(step.to(), there.data());
  };
  double from = 0;
  for (const double to : bends) {
    kettle.enter(from);
    const double longest = (to - from) / kStepsAtLeast;
    Progress progress;
    while (from < to && !stopped) {
      kettle.choose_pivots(from, y);
      // What is used up from the very start on shows a moment later.
      kettle.set_limiting(kettle.limiting_at(from + 1e-9 * (to - from), y.data()));
      const Ending ending = integrate(kettle, from, to, y, longest, progress, after);
      if (ending == Ending::TooSteep) {
        return Error{"dosing.too_steep", "A rate in this step changes faster than can be followed.",
                     "reactions", "Look at the rate constant, its unit and its activation energy."};
      }
      from = ending == Ending::Reached ? to : course.pieces_.back().step.to();
    }
    if (stopped) break;
    course.bends_.push_back(to);
  }
  return course;
}

void Course::look(const Piece& piece, double t, Moment& out) const {
  // The straight pieces of the profiles are those of the stretch, also at its very end.
  kettle_->enter(piece.stretch == 0 ? 0 : bends_[piece.stretch - 1]);
  kettle_->set_limiting(piece.limiting);
  kettle_->set_pivots(piece.pivots);
  std::vector<double> y(kettle_->size());
  piece.step.at(t, y.data());
  kettle_->moment(t, y.data(), out);
}

Moment Course::at(double t, bool before) const {
  std::size_t i = 0;
  if (before) {
    while (i + 1 < pieces_.size() && pieces_[i].step.to() < t) ++i;
  } else {
    while (i + 1 < pieces_.size() && pieces_[i].step.to() <= t) ++i;
  }
  Moment moment;
  look(pieces_[i], t, moment);
  return moment;
}

std::vector<Course::Sample> Course::samples(std::size_t count) const {
  CHECK(count >= 2, "a course has a beginning and an end");
  std::vector<Sample> samples;
  for (std::size_t i = 0; i < count; ++i)
    samples.push_back({end() * static_cast<double>(i) / static_cast<double>(count - 1), false});
  for (std::size_t p = 0; p + 1 < pieces_.size(); ++p) {
    const bool bend =
        pieces_[p].stretch != pieces_[p + 1].stretch || pieces_[p].limiting != pieces_[p + 1].limiting;
    if (!bend) continue;
    const double t = pieces_[p].step.to();
    samples.push_back({t, true});
    samples.push_back({t, false});
  }
  std::sort(samples.begin(), samples.end(), [](const Sample& a, const Sample& b) {
    return a.time != b.time ? a.time < b.time : a.before && !b.before;
  });
  samples.erase(
      std::unique(samples.begin(), samples.end(),
                  [](const Sample& a, const Sample& b) { return a.time == b.time && a.before == b.before; }),
      samples.end());
  return samples;
}

const std::vector<Moment>& Course::looked() const {
  if (looked_.empty()) {
    looked_.resize(3 * pieces_.size());
    for (std::size_t p = 0; p < pieces_.size(); ++p) {
      const DenseStep& step = pieces_[p].step;
      look(pieces_[p], step.from, looked_[3 * p]);
      look(pieces_[p], step.from + step.length / 2, looked_[3 * p + 1]);
      look(pieces_[p], step.to(), looked_[3 * p + 2]);
    }
  }
  return looked_;
}

}  // namespace heatledger::dosing
