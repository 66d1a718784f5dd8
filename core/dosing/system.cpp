#include "core/dosing/system.hpp"

#include <algorithm>
#include <cmath>

#include "core/units/constants.hpp"

namespace heatledger::dosing {
namespace {

using units::kGasConstant;
using units::kReferenceTemperature;

/// c^order. With an order below one the rate falls to zero over the last part of the reactant, so that
/// nothing is consumed that is not there; below zero it pulls back.
double power(double c, double order, double small) {
  if (order == 1) return c;
  if (order >= 1) return c * std::pow(std::fabs(c), order - 1);
  return c * std::pow(c * c + small * small, (order - 1) / 2);
}

/// Of the whole amount: below that concentration a reaction of order below one dies out.
constexpr double kLastPart = 1e-6;
/// Two reactants count as used up together within this part of the extent of the step.
constexpr double kTogether = 1e-9;

}  // namespace

Kettle::Kettle(const DosedSystem& system, const RunOptions& options) : system_(system), options_(options) {
  const std::size_t substances = system.substances.size();
  for (std::size_t j = 0; j < system.reactions.size(); ++j)
    (system.reactions[j].speed == Speed::ByRateLaw ? slow_ : fast_).push_back(j);
  all_ = system.start;
  for (const DosedFeed& feed : system.feeds) {
    for (std::size_t i = 0; i < substances; ++i) all_[i] += feed.amounts[i];
    whole_mass_fed_ += mass(feed.amounts);
  }
  start_enthalpy_ = enthalpy(system.start, system.start_temperature) +
                    system.vessel_heat_capacity * (system.start_temperature - kReferenceTemperature);
  scratch_.temperature = system.start_temperature;
  std::vector<double> rest = all_;
  whole_ = run_out(rest);
  if (!system.reactions.empty()) {
    double least = -1;
    for (const DosedReaction::Term& term : system.reactions[0].terms) {
      if (!(term.coefficient < 0)) continue;
      const double extent = all_[term.substance] / -term.coefficient;
      if (least < 0 || extent < least) {
        least = extent;
        key_ = term.substance;
      }
    }
  }
  limiting_.assign(fast_.size(), substances);
  scales_ = scales();
  slow_stoichiometry_.assign(substances * slow_.size(), 0);
  for (std::size_t k = 0; k < slow_.size(); ++k) {
    for (const DosedReaction::Term& term : system.reactions[slow_[k]].terms)
      slow_stoichiometry_[term.substance * slow_.size() + k] += term.coefficient;
  }
  std::vector<Pivot> extents;
  for (std::size_t k = 0; k < slow_.size(); ++k) extents.push_back({false, k});
  set_pivots(extents);
  enter(0);
}

void Kettle::enter(double t) {
  lines_.clear();
  for (const DosedFeed& feed : system_.feeds) lines_.push_back(feed.profile.line(t));
}

std::vector<double> Kettle::corners() const {
  std::vector<double> times;
  for (const DosedFeed& feed : system_.feeds) {
    for (const ProfilePoint& point : feed.profile.points()) {
      if (point.time > 0 && point.time < system_.end) times.push_back(point.time);
    }
  }
  std::sort(times.begin(), times.end());
  times.erase(std::unique(times.begin(), times.end()), times.end());
  return times;
}

bool Kettle::has_unknown_speed() const {
  return std::any_of(system_.reactions.begin(), system_.reactions.end(),
                     [](const DosedReaction& reaction) { return reaction.speed == Speed::Unknown; });
}

double Kettle::mass(const std::vector<double>& amounts) const {
  double sum = 0;
  for (std::size_t i = 0; i < amounts.size(); ++i) sum += amounts[i] * system_.substances[i].molar_mass;
  return sum;
}

double Kettle::enthalpy(const std::vector<double>& amounts, double temperature) const {
  double sum = 0;
  for (std::size_t i = 0; i < amounts.size(); ++i) {
    if (amounts[i] != 0) sum += amounts[i] * system_.substances[i].enthalpy.at(temperature);
  }
  return sum;
}

double Kettle::heat_capacity(const std::vector<double>& amounts, double temperature) const {
  double sum = 0;
  for (std::size_t i = 0; i < amounts.size(); ++i) {
    if (amounts[i] != 0) sum += amounts[i] * system_.substances[i].enthalpy.heat_capacity(temperature);
  }
  return sum;
}

double Kettle::reaction_heat(std::size_t reaction, double temperature) const {
  double sum = system_.reactions[reaction].heat;
  for (const DosedReaction::Term& term : system_.reactions[reaction].terms)
    sum += term.coefficient * system_.substances[term.substance].enthalpy.at(temperature);
  return sum;
}

double Kettle::set_free(const std::vector<double>& extents, double temperature) const {
  double sum = 0;
  for (std::size_t j = 0; j < extents.size(); ++j) {
    if (extents[j] != 0) sum -= extents[j] * reaction_heat(j, temperature);
  }
  return sum;
}

double Kettle::temperature_of(const std::vector<double>& amounts, double enthalpy_wanted, double vessel,
                              double guess) const {
  // The enthalpy rises with temperature everywhere, nearly in a straight line: Newton's method.
  double temperature = guess;
  for (int i = 0; i < 60; ++i) {
    const double missing =
        enthalpy_wanted - enthalpy(amounts, temperature) - vessel * (temperature - kReferenceTemperature);
    const double slope = heat_capacity(amounts, temperature) + vessel;
    if (!(slope > 0)) return temperature;  // nothing there to be heated
    const double step = missing / slope;
    temperature += step;
    if (std::fabs(step) < 1e-11 * std::fabs(temperature)) break;
  }
  return temperature;
}

std::vector<double> Kettle::run_out(std::vector<double>& amounts) const {
  std::vector<double> extents(system_.reactions.size(), 0);
  for (std::size_t j = 0; j < system_.reactions.size(); ++j) {
    double least = -1;
    for (const DosedReaction::Term& term : system_.reactions[j].terms) {
      if (!(term.coefficient < 0)) continue;
      const double possible = std::max(0.0, amounts[term.substance]) / -term.coefficient;
      if (least < 0 || possible < least) least = possible;
    }
    if (!(least > 0)) continue;
    extents[j] = least;
    for (const DosedReaction::Term& term : system_.reactions[j].terms)
      amounts[term.substance] += term.coefficient * least;
  }
  return extents;
}

double Kettle::stoichiometry(std::size_t substance, std::size_t slow) const {
  return slow_stoichiometry_[substance * slow_.size() + slow];
}

void Kettle::slow_part(double t, const double* y, Scratch& s) const {
  s.amounts = system_.start;
  for (std::size_t f = 0; f < lines_.size(); ++f) {
    const double share = lines_[f].at(t);
    if (share == 0) continue;
    for (std::size_t i = 0; i < s.amounts.size(); ++i) s.amounts[i] += share * system_.feeds[f].amounts[i];
  }
  const std::size_t n = slow_.size();
  s.offsets.resize(n);
  for (std::size_t k = 0; k < n; ++k)
    s.offsets[k] = pivots_[k].amount ? y[k] - s.amounts[pivots_[k].index] : y[k];
  s.extents.assign(system_.reactions.size(), 0);
  for (std::size_t k = 0; k < n; ++k) {
    double extent = 0;
    for (std::size_t i = 0; i < n; ++i) extent += to_extents_[k * n + i] * s.offsets[i];
    s.extents[slow_[k]] = extent;
    for (const DosedReaction::Term& term : system_.reactions[slow_[k]].terms)
      s.amounts[term.substance] += term.coefficient * extent;
  }
  for (std::size_t k = 0; k < n; ++k) {
    if (pivots_[k].amount) s.amounts[pivots_[k].index] = y[k];
  }
}

void Kettle::fill(double t, const double* y, Scratch& s) const {
  slow_part(t, y, s);
  for (const std::size_t j : fast_) {
    bool first = true;
    double least = 0;
    for (const DosedReaction::Term& term : system_.reactions[j].terms) {
      if (!(term.coefficient < 0)) continue;
      const double possible = s.amounts[term.substance] / -term.coefficient;
      if (first || possible < least) least = possible;
      first = false;
    }
    s.extents[j] = least;
    for (const DosedReaction::Term& term : system_.reactions[j].terms)
      s.amounts[term.substance] += term.coefficient * least;
  }
  if (system_.thermal == Thermal::Held) {
    s.temperature = system_.start_temperature;
  } else {
    s.temperature =
        temperature_of(s.amounts, content_enthalpy(t, y, s), system_.vessel_heat_capacity, s.temperature);
  }
}

/// The integration may have taken a trace more of a reactant than there was, within its tolerance: the
/// reaction is taken back by that trace, so that amounts are never below zero and elements stay closed.
void Kettle::put_back(double t, const double* y, Scratch& s) const {
  bool moved = false;
  for (std::size_t i = 0; i < s.amounts.size(); ++i) {
    for (const std::size_t j : slow_) {
      if (!(s.amounts[i] < 0)) break;
      for (const DosedReaction::Term& term : system_.reactions[j].terms) {
        if (term.substance != i || !(term.coefficient < 0)) continue;
        const double back = std::min(s.extents[j], s.amounts[i] / term.coefficient);
        s.extents[j] -= back;
        for (const DosedReaction::Term& each : system_.reactions[j].terms)
          s.amounts[each.substance] -= each.coefficient * back;
        moved = true;
        break;
      }
    }
    // What is left is rounding of sums that cancel.
    s.amounts[i] = std::max(0.0, s.amounts[i]);
  }
  if (moved && system_.thermal != Thermal::Held) {
    s.temperature =
        temperature_of(s.amounts, content_enthalpy(t, y, s), system_.vessel_heat_capacity, s.temperature);
  }
}

/// Content and vessel, from what has gone in: nothing is integrated but the heat through the wall.
double Kettle::content_enthalpy(double t, const double* y, const Scratch& s) const {
  double sum = start_enthalpy_;
  for (std::size_t f = 0; f < lines_.size(); ++f) sum += lines_[f].at(t) * system_.feeds[f].enthalpy;
  for (std::size_t j = 0; j < s.extents.size(); ++j) sum -= s.extents[j] * system_.reactions[j].heat;
  if (system_.thermal == Thermal::Jacket) sum += y[slow_.size()];
  return sum;
}

void Kettle::slow_rates(const Scratch& s, double* rates) const {
  double volume = 0, whole = 0;
  for (std::size_t i = 0; i < s.amounts.size(); ++i) {
    volume += s.amounts[i] * system_.substances[i].molar_volume;
    whole += all_[i];
  }
  if (!(volume > 0)) {  // nothing is in yet
    std::fill(rates, rates + slow_.size(), 0.0);
    return;
  }
  for (std::size_t k = 0; k < slow_.size(); ++k) {
    const RateLaw& law = system_.reactions[slow_[k]].law;
    double rate = law.constant * volume *
                  std::exp(-law.activation_energy / kGasConstant * (1 / s.temperature - 1 / law.reference));
    for (const RateLaw::Factor& factor : law.factors)
      rate *= power(s.amounts[factor.substance] / volume, factor.order, kLastPart * whole / volume);
    // A reactant that the law does not name still has to be there.
    for (const DosedReaction::Term& term : system_.reactions[slow_[k]].terms) {
      if (!(term.coefficient < 0)) continue;
      const bool named =
          std::any_of(law.factors.begin(), law.factors.end(),
                      [&](const RateLaw::Factor& factor) { return factor.substance == term.substance; });
      if (!named) rate *= power(s.amounts[term.substance] / volume, 0, kLastPart * whole / volume);
    }
    rates[k] = rate;
  }
}

double Kettle::fed_mass(double t) const {
  double sum = 0;
  for (std::size_t f = 0; f < lines_.size(); ++f) sum += lines_[f].at(t) * mass(system_.feeds[f].amounts);
  return sum;
}

double Kettle::conductance(double t) const {
  const double share = whole_mass_fed_ > 0 ? fed_mass(t) / whole_mass_fed_ : 0;
  return system_.conductance_start + share * (system_.conductance_end - system_.conductance_start);
}

void Kettle::rates(double t, const double* y, double* dydt) const {
  fill(t, y, scratch_);
  const std::size_t n = slow_.size();
  scratch_.rates.resize(n);
  slow_rates(scratch_, scratch_.rates.data());
  for (std::size_t k = 0; k < n; ++k) {
    if (!pivots_[k].amount) {
      dydt[k] = scratch_.rates[pivots_[k].index];
      continue;
    }
    double change = 0;
    for (std::size_t f = 0; f < lines_.size(); ++f)
      change += lines_[f].rate * system_.feeds[f].amounts[pivots_[k].index];
    for (std::size_t i = 0; i < n; ++i) change += stoichiometry(pivots_[k].index, i) * scratch_.rates[i];
    dydt[k] = change;
  }
  if (system_.thermal == Thermal::Jacket)
    dydt[n] = conductance(t) * (system_.jacket_temperature - scratch_.temperature);
}

double Kettle::scarcity(std::size_t slow, std::size_t substance, const Scratch& s) const {
  return std::fabs(s.amounts[substance] / stoichiometry(substance, slow));
}

std::vector<Pivot> Kettle::best_pivots(const Scratch& s) const {
  const std::size_t n = slow_.size();
  std::vector<Pivot> pivots;
  std::vector<std::vector<double>> rows;  // reduced, each with a one of its own
  std::vector<std::size_t> ones;
  const auto independent = [&](const Pivot& pivot) {
    std::vector<double> row(n, 0);
    for (std::size_t k = 0; k < n; ++k)
      row[k] = pivot.amount ? stoichiometry(pivot.index, k) : k == pivot.index ? 1 : 0;
    for (std::size_t r = 0; r < rows.size(); ++r) {
      const double factor = row[ones[r]];
      for (std::size_t k = 0; k < n; ++k) row[k] -= factor * rows[r][k];
    }
    std::size_t largest = 0;
    for (std::size_t k = 1; k < n; ++k) {
      if (std::fabs(row[k]) > std::fabs(row[largest])) largest = k;
    }
    if (!(std::fabs(row[largest]) > 1e-6)) return false;
    const double one = row[largest];
    for (double& each : row) each /= one;
    rows.push_back(std::move(row));
    ones.push_back(largest);
    return true;
  };
  for (std::size_t k = 0; k < n; ++k) {
    std::vector<std::size_t> reactants;
    for (const DosedReaction::Term& term : system_.reactions[slow_[k]].terms) {
      if (stoichiometry(term.substance, k) < 0) reactants.push_back(term.substance);
    }
    std::stable_sort(reactants.begin(), reactants.end(),
                     [&](std::size_t a, std::size_t b) { return scarcity(k, a, s) < scarcity(k, b, s); });
    std::vector<Pivot> candidates;
    for (const std::size_t reactant : reactants) candidates.push_back({true, reactant});
    candidates.push_back({false, k});
    for (std::size_t i = 0; i < n; ++i) candidates.push_back({false, i});
    for (const Pivot& candidate : candidates) {
      if (!independent(candidate)) continue;
      pivots.push_back(candidate);
      break;
    }
  }
  return pivots;
}

void Kettle::set_pivots(const std::vector<Pivot>& pivots) {
  if (pivots == pivots_) return;
  pivots_ = pivots;
  const std::size_t n = slow_.size();
  // Gauss–Jordan on the few rows beside the unit matrix.
  std::vector<double> m(n * n);
  to_extents_.assign(n * n, 0);
  for (std::size_t k = 0; k < n; ++k) {
    to_extents_[k * n + k] = 1;
    for (std::size_t i = 0; i < n; ++i)
      m[k * n + i] = pivots[k].amount ? stoichiometry(pivots[k].index, i) : i == pivots[k].index ? 1 : 0;
  }
  for (std::size_t k = 0; k < n; ++k) {
    std::size_t best = k;
    for (std::size_t i = k + 1; i < n; ++i) {
      if (std::fabs(m[i * n + k]) > std::fabs(m[best * n + k])) best = i;
    }
    CHECK(m[best * n + k] != 0, "pivots are independent");
    for (std::size_t j = 0; j < n; ++j) {
      std::swap(m[k * n + j], m[best * n + j]);
      std::swap(to_extents_[k * n + j], to_extents_[best * n + j]);
    }
    const double one = m[k * n + k];
    for (std::size_t j = 0; j < n; ++j) {
      m[k * n + j] /= one;
      to_extents_[k * n + j] /= one;
    }
    for (std::size_t i = 0; i < n; ++i) {
      if (i == k) continue;
      const double factor = m[i * n + k];
      for (std::size_t j = 0; j < n; ++j) {
        m[i * n + j] -= factor * m[k * n + j];
        to_extents_[i * n + j] -= factor * to_extents_[k * n + j];
      }
    }
  }
}

void Kettle::choose_pivots(double t, std::vector<double>& y) {
  slow_part(t, y.data(), scratch_);
  set_pivots(best_pivots(scratch_));
  for (std::size_t k = 0; k < slow_.size(); ++k)
    y[k] = pivots_[k].amount ? scratch_.amounts[pivots_[k].index] : scratch_.extents[slow_[pivots_[k].index]];
}

bool Kettle::pivots_outrun(double t, const double* y) const {
  constexpr double kMuch = 4;
  slow_part(t, y, scratch_);
  for (std::size_t k = 0; k < slow_.size(); ++k) {
    if (!pivots_[k].amount) continue;
    const double held = scarcity(k, pivots_[k].index, scratch_);
    for (const DosedReaction::Term& term : system_.reactions[slow_[k]].terms) {
      if (stoichiometry(term.substance, k) < 0 && kMuch * scarcity(k, term.substance, scratch_) < held)
        return !(best_pivots(scratch_) == pivots_);
    }
  }
  return false;
}

std::vector<double> Kettle::scales() const {
  std::vector<double> scales;
  double heat = 0;
  for (std::size_t j = 0; j < whole_.size(); ++j) heat += std::fabs(whole_[j] * system_.reactions[j].heat);
  double largest = 0;
  for (const double amount : all_) largest = std::max(largest, amount);
  for (const std::size_t j : slow_) scales.push_back(whole_[j] > 0 ? whole_[j] : largest);
  if (system_.thermal == Thermal::Jacket) {
    // A kelvin of the whole content at least, also where nothing reacts.
    scales.push_back(
        std::max(heat, heat_capacity(all_, system_.start_temperature) + system_.vessel_heat_capacity));
  }
  return scales;
}

void Kettle::tolerances(double t, const double* y, double* allowed) const {
  slow_part(t, y, scratch_);
  for (std::size_t k = 0; k < slow_.size(); ++k) {
    double least = std::fabs(y[k]);
    if (!pivots_[k].amount) {
      for (const DosedReaction::Term& term : system_.reactions[slow_[pivots_[k].index]].terms) {
        if (term.coefficient < 0)
          least = std::min(least, scarcity(pivots_[k].index, term.substance, scratch_));
      }
    }
    allowed[k] = options_.absolute * scales_[k] + options_.relative * least;
  }
  for (std::size_t k = slow_.size(); k < scales_.size(); ++k)
    allowed[k] = 1e3 * options_.absolute * scales_[k] + options_.relative * std::fabs(y[k]);
}

std::vector<std::size_t> Kettle::limiting_at(double t, const double* y) const {
  fill(t, y, scratch_);
  std::vector<std::size_t> limiting = limiting_;
  for (std::size_t k = 0; k < fast_.size(); ++k) {
    std::size_t least = system_.substances.size();
    double smallest = 0, held = 0;
    bool was_there = false;
    for (const DosedReaction::Term& term : system_.reactions[fast_[k]].terms) {
      if (!(term.coefficient < 0)) continue;
      const double left = scratch_.amounts[term.substance] / -term.coefficient;
      if (least == system_.substances.size() || left < smallest) {
        smallest = left;
        least = term.substance;
      }
      if (term.substance == limiting_[k]) {
        held = left;
        was_there = true;
      }
    }
    if (!was_there || held > smallest + kTogether * whole_[fast_[k]]) limiting[k] = least;
  }
  return limiting;
}

void Kettle::moment(double t, const double* y, Moment& out) const {
  Scratch& s = scratch_;
  fill(t, y, s);
  put_back(t, y, s);
  out.time = t;
  out.temperature = s.temperature;
  out.amounts = s.amounts;
  out.extents = s.extents;
  out.mass = mass(s.amounts);
  out.heat_capacity = heat_capacity(s.amounts, s.temperature);
  out.volume = 0;
  for (std::size_t i = 0; i < s.amounts.size(); ++i)
    out.volume += s.amounts[i] * system_.substances[i].molar_volume;

  // Rates: by law, and for the rest as fast as the reactant that is used up comes in.
  std::vector<double>& change = s.change;
  change.assign(s.amounts.size(), 0);
  double fed_enthalpy = 0, warmed = 0;
  for (std::size_t f = 0; f < lines_.size(); ++f) {
    if (lines_[f].rate == 0) continue;
    const std::vector<double>& amounts = system_.feeds[f].amounts;
    for (std::size_t i = 0; i < change.size(); ++i) change[i] += lines_[f].rate * amounts[i];
    fed_enthalpy += lines_[f].rate * system_.feeds[f].enthalpy;
    warmed += lines_[f].rate * enthalpy(amounts, s.temperature);
  }
  out.rates.assign(system_.reactions.size(), 0);
  std::vector<double>& slow = out.open;  // room for the rates until the open extents are known
  slow.assign(std::max(slow_.size(), system_.reactions.size()), 0);
  slow_rates(s, slow.data());
  const auto take = [&](std::size_t j, double rate) {
    out.rates[j] = rate;
    for (const DosedReaction::Term& term : system_.reactions[j].terms)
      change[term.substance] += term.coefficient * rate;
  };
  for (std::size_t k = 0; k < slow_.size(); ++k) take(slow_[k], slow[k]);
  for (std::size_t k = 0; k < fast_.size(); ++k) {
    for (const DosedReaction::Term& term : system_.reactions[fast_[k]].terms) {
      if (term.substance == limiting_[k] && term.coefficient < 0) {
        take(fast_[k], change[term.substance] / -term.coefficient);
        break;
      }
    }
  }
  out.heat_rate = set_free(out.rates, s.temperature);
  out.cold_feed = warmed - fed_enthalpy;
  switch (system_.thermal) {
    case Thermal::Held: {
      out.cooling = out.heat_rate - out.cold_feed;
      const double held = enthalpy(s.amounts, s.temperature) +
                          system_.vessel_heat_capacity * (s.temperature - kReferenceTemperature);
      out.wall_heat = held - content_enthalpy(t, y, s);
      break;
    }
    case Thermal::Jacket:
      out.cooling = conductance(t) * (s.temperature - system_.jacket_temperature);
      out.wall_heat = y[slow_.size()];
      break;
    case Thermal::Adiabatic:
      out.cooling = 0;
      out.wall_heat = 0;
      break;
  }

  change = s.amounts;
  out.open = run_out(change);
  out.open_heat = set_free(out.open, s.temperature);
  out.mtsr = s.temperature + (out.heat_capacity > 0 ? out.open_heat / out.heat_capacity : 0);
  const double whole_heat = set_free(whole_, s.temperature);
  if (whole_.size() == 1) {
    out.accumulation = whole_[0] > 0 ? out.open[0] / whole_[0] : 0;
  } else {
    out.accumulation = whole_heat != 0 ? out.open_heat / whole_heat : 0;
  }
  double consumed = 0;
  for (std::size_t j = 0; j < system_.reactions.size(); ++j) {
    for (const DosedReaction::Term& term : system_.reactions[j].terms) {
      if (term.substance == key_ && term.coefficient < 0) consumed -= term.coefficient * s.extents[j];
    }
  }
  out.conversion = !all_.empty() && all_[key_] > 0 ? consumed / all_[key_] : 0;
}

}  // namespace heatledger::dosing
