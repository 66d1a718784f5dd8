#include "core/dosing/rosenbrock.hpp"

#include <algorithm>
#include <cmath>

namespace heatledger::dosing {
namespace {

constexpr std::size_t kStages = 6;
constexpr double kGamma = 0.25;
/// Of the time derivative, and where in the step the first four stages stand.
constexpr double kTime[4] = {0.25, -0.5, -0.023504, -0.0362};
constexpr double kAt[kStages] = {0, 0.75, 0.21, 0.63, 1, 1};
/// Stage i starts from y + Σ kStart[i][j] k_j; the last stage starts from the fifth's own result.
constexpr double kStart[kStages][kStages - 1] = {
    {0, 0, 0, 0, 0},
    {3, 0, 0, 0, 0},
    {1.831036793486759, 0.4955183967433795, 0, 0, 0},
    {2.304376582692669, -0.05249275245743001, -1.176798761832782, 0, 0},
    {-7.170454962423024, -4.741636671481785, -16.31002631330971, -1.062004044111401, 0},
    {-7.170454962423024, -4.741636671481785, -16.31002631330971, -1.062004044111401, 1}};
constexpr double kMix[kStages][kStages - 1] = {
    {0, 0, 0, 0, 0},
    {-12, 0, 0, 0, 0},
    {-8.791795173947035, -2.207865586973518, 0, 0, 0},
    {10.81793056857153, 6.780270611428266, 19.53485944642410, 0, 0},
    {34.19095006749676, 15.49671153725963, 54.74760875964130, 14.16005392148534, 0},
    {34.62605830930532, 15.30084976114473, 56.99955578662667, 18.40807009793095, -5.714285714285717}};
constexpr double kBow[kStages - 1] = {25.09876703708589, 11.62013104361867, 28.49148307714626,
                                      -5.664021568594133, 0};
constexpr double kSkew[kStages - 1] = {1.638054557396973, -0.7373619806678748, 8.477918219238990,
                                       15.99253148779520, -1.882352941176471};

constexpr long kMostSteps = 200000;

/// LU factors of a small dense matrix with row exchange.
class Factors {
 public:
  /// @return false when the matrix is singular
  bool factor(std::vector<double>& matrix, std::size_t n) {
    n_ = n;
    rows_.resize(n);
    m_ = &matrix;
    for (std::size_t k = 0; k < n; ++k) {
      std::size_t best = k;
      for (std::size_t i = k + 1; i < n; ++i) {
        if (std::fabs(matrix[i * n + k]) > std::fabs(matrix[best * n + k])) best = i;
      }
      rows_[k] = best;
      if (!(std::fabs(matrix[best * n + k]) > 0)) return false;
      for (std::size_t j = 0; j < n; ++j) std::swap(matrix[k * n + j], matrix[best * n + j]);
      for (std::size_t i = k + 1; i < n; ++i) {
        const double factor = matrix[i * n + k] /= matrix[k * n + k];
        for (std::size_t j = k + 1; j < n; ++j) matrix[i * n + j] -= factor * matrix[k * n + j];
      }
    }
    return true;
  }
  void solve(double* b) const {
    for (std::size_t k = 0; k < n_; ++k) std::swap(b[k], b[rows_[k]]);
    for (std::size_t i = 1; i < n_; ++i) {
      for (std::size_t j = 0; j < i; ++j) b[i] -= (*m_)[i * n_ + j] * b[j];
    }
    for (std::size_t i = n_; i-- > 0;) {
      for (std::size_t j = i + 1; j < n_; ++j) b[i] -= (*m_)[i * n_ + j] * b[j];
      b[i] /= (*m_)[i * n_ + i];
    }
  }

 private:
  std::size_t n_ = 0;
  std::vector<std::size_t> rows_;
  std::vector<double>* m_ = nullptr;
};

class Integrator {
 public:
  Integrator(const Equations& equations, std::vector<double>& y)
      : equations_(equations), y_(y), n_(y.size()) {
    for (std::vector<double>* each : {&f_, &slope_, &moved_, &trial_, &rate_, &allowed_}) each->resize(n_);
    for (std::vector<double>& stage : stages_) stage.resize(n_);
    jacobian_.resize(n_ * n_);
  }

  void look(double t) {
    equations_.rates(t, y_.data(), f_.data());
    equations_.tolerances(t, y_.data(), allowed_.data());
  }

  /// Jacobian and time derivative at (t, y), the latter over a small part of the step to come: amounts that
  /// cancel leave noise, which a shorter difference would blow up.
  void differentiate(double t, double h) {
    const double earlier = t - 0.01 * h, later = t + 0.01 * h;
    equations_.rates(later, y_.data(), slope_.data());
    equations_.rates(earlier, y_.data(), rate_.data());
    for (std::size_t i = 0; i < n_; ++i)
      slope_[i] = later > earlier ? (slope_[i] - rate_[i]) / (later - earlier) : 0;
    moved_ = y_;
    for (std::size_t j = 0; j < n_; ++j) {
      moved_[j] = y_[j] + std::max(1e-6 * std::fabs(y_[j]), allowed_[j]);
      equations_.rates(t, moved_.data(), rate_.data());
      for (std::size_t i = 0; i < n_; ++i) jacobian_[i * n_ + j] = (rate_[i] - f_[i]) / (moved_[j] - y_[j]);
      moved_[j] = y_[j];
    }
  }

  /// First length: moves no unknown by more than a hundredth of its size or a thousand times its tolerance.
  double first_length(double longest) const {
    double length = longest;
    for (std::size_t i = 0; i < n_; ++i) {
      if (f_[i] != 0) {
        const double size = std::fabs(y_[i]) + 1e5 * allowed_[i];
        length = std::min(length, 0.01 * size / std::fabs(f_[i]));
      }
    }
    return length;
  }

  /// One step of length h; the new value stands in trial(). @return error over tolerance; < 0: no solution
  double attempt(double t, double h) {
    matrix_ = jacobian_;
    for (double& each : matrix_) each = -each;
    for (std::size_t i = 0; i < n_; ++i) matrix_[i * n_ + i] += 1 / (h * kGamma);
    if (!factors_.factor(matrix_, n_)) return -1;
    for (std::size_t s = 0; s < kStages; ++s) {
      for (std::size_t i = 0; i < n_; ++i) {
        trial_[i] = y_[i];
        for (std::size_t j = 0; j < s; ++j) trial_[i] += kStart[s][j] * stages_[j][i];
      }
      if (s == 0) {
        rate_ = f_;
      } else {
        equations_.rates(t + kAt[s] * h, trial_.data(), rate_.data());
      }
      for (std::size_t i = 0; i < n_; ++i) {
        double mixed = 0;
        for (std::size_t j = 0; j < s; ++j) mixed += kMix[s][j] * stages_[j][i];
        stages_[s][i] = rate_[i] + mixed / h + (s < 4 ? kTime[s] * h * slope_[i] : 0);
      }
      factors_.solve(stages_[s].data());
    }
    double error = 0;
    for (std::size_t i = 0; i < n_; ++i) {
      trial_[i] += stages_[kStages - 1][i];
      const double share = stages_[kStages - 1][i] / allowed_[i];
      error += share * share;
    }
    return n_ == 0 ? 0 : std::sqrt(error / static_cast<double>(n_));
  }

  DenseStep accepted(double t, double h) const {
    DenseStep step;
    step.from = t;
    step.length = step.span = h;
    step.start = y_;
    step.end = trial_;
    step.bow.assign(n_, 0);
    step.skew.assign(n_, 0);
    for (std::size_t j = 0; j + 1 < kStages; ++j) {
      for (std::size_t i = 0; i < n_; ++i) {
        step.bow[i] += kBow[j] * stages_[j][i];
        step.skew[i] += kSkew[j] * stages_[j][i];
      }
    }
    return step;
  }

 private:
  const Equations& equations_;
  std::vector<double>& y_;
  std::size_t n_;
  std::vector<double> f_, slope_, moved_, trial_, rate_, allowed_, jacobian_, matrix_;
  std::vector<double> stages_[kStages];
  Factors factors_;
};

}  // namespace

void DenseStep::at(double t, double* y) const {
  const double s = std::min(1.0, std::max(0.0, (t - from) / span)), rest = 1 - s;
  for (std::size_t i = 0; i < start.size(); ++i)
    y[i] = rest * start[i] + s * (end[i] + rest * (bow[i] + s * skew[i]));
}

Ending integrate(const Equations& equations, double from, double to, std::vector<double>& y, double longest,
                 Progress& progress, const std::function<bool(DenseStep&)>& after) {
  Integrator integrator(equations, y);
  double t = from;
  double h = progress.length;
  bool rejected = false;
  while (t < to) {
    integrator.look(t);
    if (!(h > 0)) h = integrator.first_length(longest);
    integrator.differentiate(t, std::min(h, to - t));
    for (;;) {
      h = std::min(h, longest);
      // What would be left beyond this step is too little for a step of its own.
      if (t + 1.01 * h >= to) h = to - t;
      if (!(t + h > t) || progress.steps > kMostSteps) return Ending::TooSteep;
      const double error = integrator.attempt(t, h);
      const bool usable = error >= 0 && std::isfinite(error);
      // Order of the embedded formula plus one is 4; between a fifth and six times the length.
      const double factor =
          !usable ? 0.2 : std::min(6.0, std::max(0.2, 0.9 / std::sqrt(std::sqrt(std::max(error, 1e-12)))));
      if (!usable || error > 1) {
        h *= factor;
        rejected = true;
        continue;
      }
      DenseStep step = integrator.accepted(t, h);
      const bool last = t + h >= to;
      ++progress.steps;
      const double taken = h;
      h *= rejected ? std::min(1.0, factor) : factor;
      rejected = false;
      // A step cut short by the end of the stretch says nothing against longer ones.
      progress.length = last ? std::max(h, progress.length) : h;
      const bool go_on = after(step);
      if (step.length < taken) {
        step.at(step.to(), y.data());
        return Ending::Stopped;
      }
      y = step.end;
      if (!go_on) return Ending::Stopped;
      t = last ? to : t + taken;
      break;
    }
  }
  return Ending::Reached;
}

}  // namespace heatledger::dosing
