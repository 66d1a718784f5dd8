#include "core/burning/gibbs.hpp"

#include <algorithm>
#include <cmath>
#include <string>

#include "core/base/check.hpp"
#include "core/base/number_text.hpp"

namespace heatledger::burning {

namespace {

constexpr double kLowest = 200, kHighest = 6000;  // K, the reach of the polynomials
constexpr double kStandardPressure = 100000;      // Pa, of the polynomials

using Row = std::array<double, kElements>;

/// One search: the species that can be there, the component species, and where the search stands.
class Search {
 public:
  Search(const std::vector<Gas>& gases, const Atoms& atoms, double pressure)
      : gases_(gases), log_pressure_(std::log(pressure / kStandardPressure)) {
    for (std::size_t e = 0; e < kElements; ++e) {
      if (atoms[e] > 0) {
        elements_[components_] = e;
        given_[components_] = atoms[e];
        ++components_;
        all_atoms_ += atoms[e];
      }
    }
    // Molecules have one atom at least and, on the average of a mixture, nine at most.
    log_most_ = std::log(all_atoms_);
    log_fewest_ = std::log(all_atoms_ / 9);
    rank_by_name();
  }

  bool set_components_to_atoms() {
    for (std::size_t j = 0; j < count(); ++j) {
      for (std::size_t c = 0; c < components_; ++c) share_[j][c] = gas(j).atoms[elements_[c]];
    }
    amounts_ = given_;
    exchanges_ = 0;
    std::size_t found = 0;
    for (std::size_t c = 0; c < components_; ++c) {
      for (std::size_t j = 0; j < count(); ++j) {
        double others = 0;
        for (std::size_t k = 0; k < components_; ++k) others += k == c ? 0 : share_[j][k];
        if (others == 0 && share_[j][c] == 1) {
          component_[c] = j;
          ++found;
          break;
        }
      }
    }
    return found == components_;
  }

  void set_temperature(double temperature) {
    temperature_ = temperature;
    const double log_t = std::log(temperature);
    for (std::size_t j = 0; j < count(); ++j) {
      figures_[j] = gas(j).at(temperature, log_t);
      gibbs_[j] = figures_[j].h_rt - figures_[j].s_r + log_pressure_;
    }
    find_constants();
  }

  /// Majority species by linear programming: the simplex method on the sum of n g, from the components as
  /// they are.
  void choose_components() {
    for (int pivots = 0; pivots < 100; ++pivots) {
      std::size_t enter = count();
      double best = 1e-9;
      for (std::size_t j = 0; j < count(); ++j) {
        if (log_k_[j] > best) {
          best = log_k_[j];
          enter = j;
        }
      }
      if (enter == count()) return;
      std::size_t leave = components_;
      double smallest = 0;
      for (std::size_t k = 0; k < components_; ++k) {
        if (share_[enter][k] < 1e-9) continue;
        const double ratio = std::max(amounts_[k], 0.0) / share_[enter][k];
        if (leave == components_ || ratio < smallest) {
          smallest = ratio;
          leave = k;
        }
      }
      if (leave == components_) return;
      exchange(enter, leave);
    }
  }

  /// Begins at the amounts of the linear programme, each at least a small share.
  void start() {
    double sum = 0;
    for (std::size_t k = 0; k < components_; ++k) sum += std::max(amounts_[k], 0.0);
    log_total_ = std::log(sum);
    for (std::size_t k = 0; k < components_; ++k) log_x_[k] = std::log(std::max(amounts_[k] / sum, 1e-5));
    distribute();
  }

  /// Newton on the logarithms; true when the balances are met to rounding.
  bool converge() {
    for (int i = 0; i < 300; ++i) {
      ++iterations_;
      renew_components();
      assemble();
      if (imbalance_ < 1e-12 && std::abs(surplus_) < 1e-12 * std::exp(log_total_)) {
        if (exchanges_ == 0) return true;
        renew_shares();  // each exchange leaves its rounding behind
        continue;
      }
      Row step = remainder_;
      double log_total_step = 0;
      if (imbalance_ > 0.5) {
        // Far away: at a fixed total the balances are the slope of a convex function, so Newton cannot be
        // lost.
        substitute(step);
      } else if (!solve(step, total_remainder_, log_total_step)) {
        return false;
      }
      double largest = std::abs(log_total_step);
      for (std::size_t k = 0; k < components_; ++k) largest = std::max(largest, std::abs(step[k]));
      if (!std::isfinite(largest)) return false;
      // Exponentials: a long step overshoots. Of an overshoot, Newton takes back one unit of the logarithm a
      // step, so where far too much is there in all, the step is made as long as that excess.
      double damping = largest > 2.5 ? 2.5 / largest : 1;
      const double excess = std::log1p(std::max(surplus_, 0.0)) - log_total_;
      if (excess > 2 && largest < 2.5) damping = 0.8 * excess;
      for (std::size_t k = 0; k < components_; ++k) log_x_[k] += damping * step[k];
      log_total_ = std::clamp(log_total_ + damping * log_total_step, log_fewest_, log_most_);
      distribute();
    }
    return false;
  }

  double enthalpy() const {
    double sum = 0;
    for (std::size_t j = 0; j < count(); ++j) sum += moles_[j] * figures_[j].h_rt;
    return sum * kFitGasConstant * temperature_;
  }

  double frozen_heat_capacity() const {
    double sum = 0;
    for (std::size_t j = 0; j < count(); ++j) sum += moles_[j] * figures_[j].cp_r;
    return sum * kFitGasConstant;
  }

  /// dH/dT with the composition following [J/K]; keeps the response of the components to the temperature.
  double heat_capacity() {
    assemble();
    by_temperature_ = {};
    double total = 0;
    for (std::size_t j = 0; j < count(); ++j) {
      const double change = moles_[j] * reaction_heat(j) / temperature_;
      for (std::size_t k = 0; k < components_; ++k) by_temperature_[k] -= share_[j][k] * change;
      total -= change;
    }
    if (!solve(by_temperature_, total, total_by_temperature_)) {
      by_temperature_ = {};
      total_by_temperature_ = 0;
      return frozen_heat_capacity();
    }
    double sum = 0;
    for (std::size_t j = 0; j < count(); ++j) {
      double relative = total_by_temperature_ + reaction_heat(j) / temperature_;
      for (std::size_t k = 0; k < components_; ++k) relative += share_[j][k] * by_temperature_[k];
      sum += moles_[j] * figures_[j].h_rt * relative;
    }
    return frozen_heat_capacity() + sum * kFitGasConstant * temperature_;
  }

  /// Goes to another temperature along the response that heat_capacity() has found.
  void follow(double temperature) {
    const double change = temperature - temperature_;
    for (std::size_t k = 0; k < components_; ++k)
      log_x_[k] += std::clamp(by_temperature_[k] * change, -3.0, 3.0);
    log_total_ += std::clamp(total_by_temperature_ * change, -0.5, 0.5);
    set_temperature(temperature);
    distribute();
  }

  Equilibrium finished(const Atoms& atoms, double pressure) {
    Equilibrium e;
    e.temperature = temperature_;
    e.pressure = pressure;
    e.moles.assign(gases_.size(), 0.0);
    Atoms sum{};
    for (std::size_t j = 0; j < count(); ++j) {
      e.moles[present_[j]] = moles_[j];
      for (std::size_t k = 0; k < kElements; ++k) sum[k] += moles_[j] * gas(j).atoms[k];
    }
    for (const double n : e.moles) e.total += n;
    for (std::size_t k = 0; k < kElements; ++k)
      e.closure = std::max(e.closure, std::abs(sum[k] - atoms[k]) / all_atoms_);
    e.enthalpy = enthalpy();
    e.frozen_heat_capacity = frozen_heat_capacity();
    e.heat_capacity = heat_capacity();
    e.iterations = iterations_;
    for (std::size_t j = 0; j < count(); ++j) {
      if (gas(j).formula == "C") {
        const double potential = gibbs_[j] + log_share(j);
        e.carbon_activity = std::exp(std::min(potential - graphite_gibbs(temperature_), 50.0));
      }
    }
    return e;
  }

 private:
  std::size_t count() const { return present_.size(); }
  const Gas& gas(std::size_t j) const { return gases_[present_[j]]; }
  double reaction_heat(std::size_t j) const {
    double sum = figures_[j].h_rt;
    for (std::size_t k = 0; k < components_; ++k) sum -= share_[j][k] * figures_[component_[k]].h_rt;
    return sum;
  }
  double log_share(std::size_t j) const {
    double sum = log_k_[j];
    for (std::size_t k = 0; k < components_; ++k) sum += share_[j][k] * log_x_[k];
    return sum;
  }

  /// Species that the elements allow, in an order of their own, so that sums do not follow the caller's.
  void rank_by_name() {
    for (std::size_t j = 0; j < gases_.size(); ++j) {
      double absent = 0;
      for (std::size_t e = 0; e < kElements; ++e) absent += gases_[j].atoms[e];
      for (std::size_t c = 0; c < components_; ++c) absent -= gases_[j].atoms[elements_[c]];
      if (absent < 0.5) present_.push_back(j);
    }
    std::sort(present_.begin(), present_.end(),
              [&](std::size_t a, std::size_t b) { return gases_[a].name < gases_[b].name; });
    share_.resize(count());
    figures_.resize(count());
    gibbs_.resize(count());
    log_k_.resize(count());
    moles_.resize(count());
  }

  void find_constants() {
    for (std::size_t j = 0; j < count(); ++j) {
      double sum = -gibbs_[j];
      for (std::size_t k = 0; k < components_; ++k) sum += share_[j][k] * gibbs_[component_[k]];
      log_k_[j] = sum;
    }
  }

  /// Species `enter` becomes component number `leave`.
  void exchange(std::size_t enter, std::size_t leave) {
    const Row pivot = share_[enter];
    const double by = pivot[leave];
    for (std::size_t j = 0; j < count(); ++j) {
      Row& row = share_[j];
      const double factor = row[leave] / by;
      if (factor == 0) continue;
      for (std::size_t k = 0; k < components_; ++k) row[k] = k == leave ? factor : row[k] - pivot[k] * factor;
      for (std::size_t k = 0; k < components_; ++k) {
        // Shares are small fractions; what is left of a cancelled one is rounding.
        if (std::abs(row[k]) < 1e-12) row[k] = 0;
      }
    }
    const double factor = amounts_[leave] / by;
    for (std::size_t k = 0; k < components_; ++k)
      amounts_[k] = k == leave ? factor : amounts_[k] - pivot[k] * factor;
    for (std::size_t k = 0; k < components_; ++k) {
      if (std::abs(amounts_[k]) < 1e-15 * all_atoms_) amounts_[k] = 0;
    }
    component_[leave] = enter;
    ++exchanges_;
    find_constants();
  }

  /// Shares and amounts anew from the atoms, by elimination with row exchange.
  void renew_shares() {
    std::array<Row, kElements> left{};  // row: element; column: component
    for (std::size_t c = 0; c < components_; ++c) {
      for (std::size_t k = 0; k < components_; ++k) left[c][k] = gas(component_[k]).atoms[elements_[c]];
    }
    Row amounts{};
    for (std::size_t c = 0; c < components_; ++c) {
      amounts[c] = given_[c];
      for (std::size_t j = 0; j < count(); ++j) share_[j][c] = gas(j).atoms[elements_[c]];
    }
    for (std::size_t c = 0; c < components_; ++c) {
      std::size_t pivot = c;
      for (std::size_t r = c + 1; r < components_; ++r) {
        if (std::abs(left[r][c]) > std::abs(left[pivot][c])) pivot = r;
      }
      if (pivot != c) {
        std::swap(left[c], left[pivot]);
        std::swap(amounts[c], amounts[pivot]);
        for (std::size_t j = 0; j < count(); ++j) std::swap(share_[j][c], share_[j][pivot]);
      }
      for (std::size_t r = 0; r < components_; ++r) {
        const double factor = r == c ? 0 : left[r][c] / left[c][c];
        if (factor == 0) continue;
        for (std::size_t k = c; k < components_; ++k) left[r][k] -= factor * left[c][k];
        amounts[r] -= factor * amounts[c];
        for (std::size_t j = 0; j < count(); ++j) share_[j][r] -= factor * share_[j][c];
      }
    }
    for (std::size_t c = 0; c < components_; ++c) {
      amounts_[c] = amounts[c] / left[c][c];
      if (std::abs(amounts_[c]) < 1e-15 * all_atoms_) amounts_[c] = 0;
      for (std::size_t j = 0; j < count(); ++j) {
        share_[j][c] /= left[c][c];
        if (std::abs(share_[j][c]) < 1e-12) share_[j][c] = 0;
      }
    }
    exchanges_ = 0;
    find_constants();
    distribute();
  }

  /// A component that another species outgrew gives way to it; the state of the search does not move.
  void renew_components() {
    for (std::size_t again = 0; again < 2 * components_; ++again) {
      std::size_t enter = count(), leave = components_;
      double gain = 2;  // outgrown by less, the equations are as well conditioned as before
      for (std::size_t k = 0; k < components_; ++k) {
        const double held = moles_[component_[k]];
        for (std::size_t j = 0; j < count(); ++j) {
          if (std::abs(share_[j][k]) > 1e-9 && moles_[j] > gain * held) {
            gain = moles_[j] / std::max(held, 1e-300);
            enter = j;
            leave = k;
          }
        }
      }
      if (enter == count()) return;
      const double entering = log_share(enter);
      exchange(enter, leave);
      log_x_[leave] = entering;
    }
  }

  void distribute() {
    for (std::size_t j = 0; j < count(); ++j)
      moles_[j] = std::exp(std::clamp(log_total_ + log_share(j), -690.0, 300.0));
  }

  /// Balances, their derivatives and how far they are from closing.
  void assemble() {
    matrix_ = {};
    totals_ = {};
    Row scale{};
    double sum = 0;
    for (std::size_t k = 0; k < components_; ++k) remainder_[k] = amounts_[k];
    for (std::size_t j = 0; j < count(); ++j) {
      const double n = moles_[j];
      sum += n;
      for (std::size_t k = 0; k < components_; ++k) {
        const double part = share_[j][k] * n;
        if (part == 0) continue;
        remainder_[k] -= part;
        totals_[k] += part;
        scale[k] += std::abs(part);
        for (std::size_t l = k; l < components_; ++l) matrix_[k][l] += part * share_[j][l];
      }
    }
    const double total = std::exp(log_total_);
    surplus_ = sum - total;
    total_remainder_ = -surplus_;
    imbalance_ = 0;
    for (std::size_t k = 0; k < components_; ++k) {
      // A balance whose terms are traces of everything cannot close better than the rounding of the whole.
      imbalance_ = std::max(imbalance_, std::abs(remainder_[k]) / (scale[k] + 1e-4 * all_atoms_));
    }
    factorise();
  }

  /// Cholesky of the scaled matrix of the component balances; the balance of the total is eliminated after
  /// it.
  void factorise() {
    for (std::size_t k = 0; k < components_; ++k)
      diagonal_[k] = 1 / std::sqrt(std::max(matrix_[k][k], 1e-300));
    for (std::size_t k = 0; k < components_; ++k) {
      for (std::size_t l = k; l < components_; ++l) {
        double sum = matrix_[k][l] * diagonal_[k] * diagonal_[l];
        for (std::size_t i = 0; i < k; ++i) sum -= factor_[k][i] * factor_[l][i];
        if (k == l) {
          factor_[k][k] = std::sqrt(std::max(sum, 1e-14));
        } else {
          factor_[l][k] = sum / factor_[k][k];
        }
      }
    }
    by_total_ = totals_;
    substitute(by_total_);
    schur_ = surplus_;
    for (std::size_t k = 0; k < components_; ++k) schur_ -= totals_[k] * by_total_[k];
  }

  void substitute(Row& x) const {
    for (std::size_t k = 0; k < components_; ++k) {
      double sum = x[k] * diagonal_[k];
      for (std::size_t i = 0; i < k; ++i) sum -= factor_[k][i] * x[i];
      x[k] = sum / factor_[k][k];
    }
    for (std::size_t k = components_; k-- > 0;) {
      double sum = x[k];
      for (std::size_t i = k + 1; i < components_; ++i) sum -= factor_[i][k] * x[i];
      x[k] = sum / factor_[k][k];
    }
    for (std::size_t k = 0; k < components_; ++k) x[k] *= diagonal_[k];
  }

  /// [M m; m' s] [step; log_total_step] = [step; total]. False where the matrix is singular.
  bool solve(Row& step, double total, double& log_total_step) const {
    substitute(step);
    double rest = total;
    for (std::size_t k = 0; k < components_; ++k) rest -= totals_[k] * step[k];
    if (schur_ == 0) return false;
    log_total_step = rest / schur_;
    for (std::size_t k = 0; k < components_; ++k) step[k] -= by_total_[k] * log_total_step;
    return true;
  }

  const std::vector<Gas>& gases_;
  double log_pressure_ = 0, temperature_ = 0, all_atoms_ = 0;
  std::size_t components_ = 0;
  std::array<std::size_t, kElements> elements_{};
  std::array<std::size_t, kElements> component_{};  ///< species that is component k
  Row given_{};                                     ///< moles of the elements
  Row amounts_{};                                   ///< of the components, if all were made of them
  std::vector<std::size_t> present_;                ///< place in gases_
  std::vector<Row> share_;                          ///< components per mole of a species
  std::vector<GasFigures> figures_;
  std::vector<double> gibbs_, log_k_, moles_;
  Row log_x_{};
  double log_total_ = 0, log_fewest_ = 0, log_most_ = 0;
  // Of the present state:
  std::array<Row, kElements> matrix_{}, factor_{};
  Row totals_{}, remainder_{}, diagonal_{}, by_total_{};
  double surplus_ = 0, total_remainder_ = 0, imbalance_ = 0, schur_ = 0;
  Row by_temperature_{};
  double total_by_temperature_ = 0;
  int iterations_ = 0, exchanges_ = 0;
};

std::optional<Error> refused(const Atoms& atoms, double pressure) {
  double sum = 0;
  for (const double n : atoms) {
    if (!std::isfinite(n) || n < 0)
      return Error{"burning.no_atoms", "The amount of an element is negative or not a number.", "", ""};
    sum += n;
  }
  if (sum <= 0)
    return Error{"burning.no_atoms", "There is nothing to burn and no air.", "",
                 "Type the fuel and the air."};
  if (!(pressure > 0) || !std::isfinite(pressure)) {
    return Error{"burning.pressure", "The pressure of a flame is above zero.", "",
                 "Type an absolute pressure, such as 101.325 kPa."};
  }
  return {};
}

Error lost(double temperature, double pressure) {
  return Error{"burning.no_equilibrium",
               "The equilibrium at " + machine_number(temperature, 6) + " K and " +
                   machine_number(pressure / 1000, 6) + " kPa did not converge.",
               "", "Please report this mixture; the flame temperature of complete burning stands."};
}

/// From the start: components, amounts, Newton.
bool begin(Search& search, double temperature) {
  if (!search.set_components_to_atoms()) return false;
  search.set_temperature(temperature);
  search.choose_components();
  search.start();
  return search.converge();
}

}  // namespace

Result<Equilibrium> equilibrium_at(const std::vector<Gas>& gases, const Atoms& atoms, double temperature,
                                   double pressure, const EquilibriumOptions& options) {
  if (std::optional<Error> error = refused(atoms, pressure)) return *error;
  if (!(temperature >= kLowest && temperature <= kHighest)) {
    return Error{"burning.temperature_range", "Chemical equilibrium is worked out from 200 to 6000 K.", "",
                 "Choose a temperature in this range."};
  }
  Search search(gases, atoms, pressure);
  const double from = std::clamp(options.start_temperature.value_or(temperature), kLowest, kHighest);
  if (!begin(search, from)) return lost(from, pressure);
  if (from != temperature) {
    search.heat_capacity();
    search.follow(temperature);
    if (!search.converge()) return lost(temperature, pressure);
  }
  return search.finished(atoms, pressure);
}

Result<Equilibrium> equilibrium_burnt(const std::vector<Gas>& gases, const Atoms& atoms, double enthalpy,
                                      double pressure, const EquilibriumOptions& options) {
  if (std::optional<Error> error = refused(atoms, pressure)) return *error;
  Search search(gases, atoms, pressure);
  double temperature = std::clamp(options.start_temperature.value_or(2000), kLowest, kHighest);
  if (!begin(search, temperature)) return lost(temperature, pressure);
  // The enthalpy rises with the temperature everywhere: Newton inside a bracket always arrives.
  double low = kLowest, high = kHighest;
  for (int i = 0; i < 100; ++i) {
    const double excess = search.enthalpy() - enthalpy;
    const double heat_capacity = search.heat_capacity();
    (excess > 0 ? high : low) = temperature;
    double next = temperature - excess / heat_capacity;
    if (std::abs(next - temperature) < 1e-9 * temperature) return search.finished(atoms, pressure);
    if (!(next > low && next < high)) next = low + (high - low) / 2;
    if (high - low < 1e-9) break;
    // Far from the answer the slope says little, and a composition carried far says less than a fresh start.
    next = std::clamp(next, 0.6 * temperature, 1.5 * temperature);
    const bool afresh = std::abs(next - temperature) > 0.1 * temperature;
    temperature = next;
    if (!afresh) search.follow(temperature);
    if ((afresh || !search.converge()) && !begin(search, temperature)) return lost(temperature, pressure);
  }
  return Error{"burning.enthalpy_range", "No temperature from 200 to 6000 K balances the heat of this flame.",
               "", "Check the heat loss, the preheat and the amount of air."};
}

}  // namespace heatledger::burning
