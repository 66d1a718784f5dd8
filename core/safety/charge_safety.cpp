#include "core/safety/charge_safety.hpp"

#include <algorithm>
#include <cmath>

#include "core/base/number_text.hpp"
#include "core/safety/criticality.hpp"
#include "core/step/words.hpp"
#include "core/uncertainty/normal_draws.hpp"
#include "core/units/constants.hpp"

namespace heatledger::safety {
namespace {

namespace d = units::dimension;
using step::FigureId;
using step::Finding;
using step::Model;
using step::Work;
using uncertainty::Quantity;

/// What is asked of the step's numbers, in this order.
enum Asked : std::size_t { Process, Mtsr, Mtt, GasMoles, GasVolume, ClosedPressure, kAsked };

/// Substances that are formed and leave as gas, [mol] in all.
double gas_formed(const Model& model, const Work& work) {
  double moles = 0;
  for (std::size_t i = 0; i < work.leaving.size(); ++i) {
    const bool gas = model.states()[model.leaving_state(i)].state.phase == molecule::Phase::Gas;
    if (gas) moles += std::max(0.0, work.leaving[i] - work.fed[i]);
  }
  return moles;
}

class Scenario {
 public:
  Scenario(const step::StepResult& result, const SafetyInput& input)
      : model_(*result.model), typed_(input), pressure_(*model_.slot("outlet.pressure")) {}

  bool closed() const { return typed_.permissible_pressure.has_value(); }

  void numbers(const std::vector<double>& v, Work& work, std::vector<std::optional<double>>& out) const {
    static const std::vector<FigureId> ids{FigureId::AdiabaticEnd};
    std::vector<std::optional<double>> end;
    step::compute_figures(model_, ids, v, work, end);
    out.assign(kAsked, std::nullopt);
    out[Process] = step::process_temperature(model_, v);
    out[Mtsr] = end[0];
    const double gas = gas_formed(model_, work);
    out[GasMoles] = gas;
    out[GasVolume] = gas * units::kGasConstant * *out[Process] / v[pressure_];
    if (closed()) {
      out[Mtt] = closed_limit(v, work, gas, *out[Process]);
    } else {
      out[Mtt] = step::mixture_boiling_point(model_, v, work, v[pressure_]);
    }
    if (typed_.free_volume && end[0])
      out[ClosedPressure] = closed_pressure(v, work, gas, *out[Process], *end[0]);
  }

 private:
  /// What was there, warmed; vapour; gas formed, in the free volume.
  double closed_pressure(const std::vector<double>& v, const Work& work, double gas, double start,
                         double temperature) const {
    double pressure = v[pressure_] * temperature / start;
    pressure += step::vapour_over_mixture(model_, v, work, temperature);
    if (typed_.free_volume) pressure += gas * units::kGasConstant * temperature / typed_.free_volume->value;
    return pressure;
  }

  /// Temperature at which the closed vessel reaches its permissible pressure.
  std::optional<double> closed_limit(const std::vector<double>& v, const Work& work, double gas,
                                     double start) const {
    if (gas > 0 && !typed_.free_volume) return std::nullopt;
    const double limit = typed_.permissible_pressure->value;
    const auto over = [&](double temperature) {
      return std::log(closed_pressure(v, work, gas, start, temperature) / limit);
    };
    // The pressure only grows with temperature: halve between cold and hot.
    double cold = 150, hot = 1500;
    if (over(cold) > 0 || over(hot) < 0) return std::nullopt;
    for (int turn = 0; turn < 60 && hot - cold > 1e-9; ++turn) {
      const double middle = (cold + hot) / 2;
      (over(middle) > 0 ? hot : cold) = middle;
    }
    return (cold + hot) / 2;
  }

  const Model& model_;
  const SafetyInput& typed_;
  std::size_t pressure_;
};

class Figures {
 public:
  Figures(const step::StepResult& result, const SafetyInput& typed)
      : result_(result), model_(*result.model), typed_(typed), scenario_(result, typed) {
    values_ = step::first_order_of(
        model_,
        [this](const std::vector<double>& v, Work& work, std::vector<std::optional<double>>& out) {
          scenario_.numbers(v, work, out);
        },
        result.values);
  }

  step::Findings all() {
    failure();
    gas();
    measure_this();
    return std::move(findings_);
  }

 private:
  static Finding finding(const char* id, const char* label, const units::Dimension& dimension) {
    Finding made;
    made.id = id;
    made.label = label;
    made.dimension = dimension;
    return made;
  }

  std::optional<Quantity> quantity(Asked which) const {
    return values_[which] ? std::optional<Quantity>(values_[which]->value) : std::nullopt;
  }

  /// @param worse  +1: more is worse, −1: less is
  static void take(Finding& of, const Quantity& value, int worse) {
    of.value = value;
    if (value.u95() > 0) of.unfavourable = value.value() + worse * value.u95();
  }

  std::optional<Quantity> technical_limit(Finding& row) const {
    if (typed_.technical_limit) {
      row.mark = "typed";
      return Quantity(typed_.technical_limit->value, typed_.technical_limit->u95, own_source(1));
    }
    const std::optional<Quantity> found = quantity(Mtt);
    if (!scenario_.closed()) {
      row.mark = "open: boiling point of the mixture at the pressure set";
      if (!found) row.why_missing = "no liquid here has a vapour pressure; type the limit";
      row.working = {"ideal mixture of the liquids at the end: Σ x p° = pressure set"};
    } else {
      row.mark = "closed: permissible pressure reached";
      if (!found)
        row.why_missing =
            "type the free volume that the gas has, or a permissible pressure that can be reached";
      row.working = {
          "vapour of the liquids at the end + gas set free in the free volume + what was there, warmed"};
    }
    return found;
  }

  /// Of a figure that is typed for these rows alone.
  static uncertainty::SourceKey own_source(std::uint64_t which) {
    constexpr std::uint64_t kFirst = 0x5afe0000;
    return uncertainty::source_key(uncertainty::SourceKind::Typed, kFirst + which);
  }

  void failure() {
    step::FindingGroup group{"failure", "After a cooling failure", "everything charged at once", {}};
    const std::optional<Quantity> mtsr = quantity(Mtsr), process = quantity(Process);
    if (!mtsr || !process) return;
    group.findings.push_back(severity_row(mtsr->value() - process->value()));

    Finding top = finding("mtsr", "maximum temperature of the synthesis reaction", d::kTemperature);
    take(top, *mtsr, 1);
    top.working = {"process temperature " + step::celsius(process->value()) + " + adiabatic rise " +
                   step::digits(mtsr->value() - process->value()) + " K"};
    group.findings.push_back(std::move(top));

    Finding limit = finding("mtt", "maximum technical temperature", d::kTemperature);
    const std::optional<Quantity> mtt = technical_limit(limit);
    if (mtt) take(limit, *mtt, -1);
    group.findings.push_back(std::move(limit));

    Finding decomposition = finding("td24", "T_D24", d::kTemperature);
    std::optional<Quantity> td24;
    if (typed_.td24) {
      td24 = Quantity(typed_.td24->value, typed_.td24->u95, own_source(2));
      take(decomposition, *td24, -1);
      decomposition.mark = typed_.td24_source.empty() ? "typed without source or mass tested" : "typed";
      if (!typed_.td24_source.empty()) decomposition.sources = {typed_.td24_source};
    } else {
      decomposition.why_missing = "type it with its source and the mass tested; it is never estimated";
    }
    group.findings.push_back(std::move(decomposition));

    group.findings.push_back(class_row(*process, *mtsr, mtt, td24));
    if (typed_.time_to_maximum) group.findings.push_back(likelihood_row());
    findings_.groups.push_back(std::move(group));
  }

  static Finding severity_row(double rise) {
    Finding row = finding("severity", "severity by the adiabatic rise", d::kNumber);
    row.text = band_word(severity(rise));
    row.working = {"rise " + step::digits(rise) + " K: below 50 K low, 50 to 200 K medium, above 200 K high"};
    row.sources = {criticality_source()};
    return row;
  }

  Finding likelihood_row() const {
    Finding row = finding("likelihood", "likelihood by the time to maximum rate", d::kNumber);
    const double time = typed_.time_to_maximum->value;
    row.text = band_word(likelihood(time));
    row.working = {"time to maximum rate " + step::digits(time / 3600) +
                   " h: above 24 h low, 8 to 24 h medium, below 8 h high"};
    row.sources = {criticality_source()};
    return row;
  }

  /// By draws through the step itself: MTSR and boiling point bend with what they come from.
  Assessment assessment(const Quantity& process, const Quantity& mtsr, const std::optional<Quantity>& mtt,
                        const std::optional<Quantity>& td24) const {
    CoolingFailure means{process.value(), mtsr.value(), {}, {}};
    if (mtt) means.mtt = mtt->value();
    if (td24) means.td24 = td24->value();
    const bool spread =
        process.u95() > 0 || mtsr.u95() > 0 || (mtt && mtt->u95() > 0) || (td24 && td24->u95() > 0);
    if (!mtt || !td24 || !spread) return assess(means, {});
    const step::DrawOptions options;
    uncertainty::Random own(options.seed + 1);
    const double td24_s = td24->u95() / uncertainty::kHalfWidth,
                 limit_s = mtt->u95() / uncertainty::kHalfWidth;
    std::vector<CoolingFailure> draws;
    draws.reserve(options.draws);
    std::vector<std::optional<double>> out;
    step::for_each_draw(model_, result_.values, options, [&](const std::vector<double>& v, Work& work) {
      scenario_.numbers(v, work, out);
      const double off = own.normal(), limit_off = own.normal();
      if (!out[Mtsr]) return;
      CoolingFailure draw{*out[Process], *out[Mtsr], out[Mtt], td24->value() + td24_s * off};
      if (typed_.technical_limit) draw.mtt = mtt->value() + limit_s * limit_off;
      if (draw.mtt) draws.push_back(draw);
    });
    return assess(means, draws);
  }

  Finding class_row(const Quantity& process, const Quantity& mtsr, const std::optional<Quantity>& mtt,
                    const std::optional<Quantity>& td24) {
    const Assessment assessed = assessment(process, mtsr, mtt, td24);
    Finding row = finding("criticality", "class of the cooling failure", d::kNumber);
    row.text = assessed.words;
    row.working = assessed.working;
    row.sources = {criticality_source()};
    if (!assessed.meaning.empty()) findings_.notes.push_back(assessed.words + ": " + assessed.meaning);
    return row;
  }

  void gas() {
    const std::optional<Quantity> moles = quantity(GasMoles), volume = quantity(GasVolume);
    if (!moles || !(moles->value() > 0)) return;
    step::FindingGroup group{"gas", "Gas set free", "", {}};
    Finding amount = finding("gas.amount", "gas set free by reaction", d::kAmount);
    take(amount, *moles, 1);
    amount.working = gas_lines();
    group.findings.push_back(std::move(amount));
    if (volume) {
      Finding space = finding("gas.volume", "the same at process temperature and pressure set", d::kVolume);
      take(space, *volume, 1);
      space.working = {"n R T / p at " + step::celsius(values_[Process]->value.value()) + " and " +
                       step::digits(result_.values[*model_.slot("outlet.pressure")] / 1000) + " kPa, ideal"};
      group.findings.push_back(std::move(space));
      rates(group, *volume);
    }
    if (const std::optional<Quantity> pressure = quantity(ClosedPressure)) {
      Finding closed = finding("gas.pressure", "pressure of the closed vessel at MTSR", d::kPressure);
      take(closed, *pressure, 1);
      closed.working = {"gas set free and vapour in the free volume, and what was there, warmed"};
      group.findings.push_back(std::move(closed));
    }
    findings_.groups.push_back(std::move(group));
  }

  void rates(step::FindingGroup& group, const Quantity& volume) const {
    const step::StepInput& input = model_.input();
    if (input.time) {
      Finding mean = finding("gas.mean_rate", "mean rate of gas, not the one to design for", d::kVolumeFlow);
      take(mean, volume.scaled(1 / input.time->value), 1);
      group.findings.push_back(std::move(mean));
    }
    Finding peak = finding("gas.peak_rate", "peak rate of gas at process temperature", d::kVolumeFlow);
    if (input.charge.rate_constant) {
      take(peak, volume.scaled(input.charge.rate_constant->value), 1);
      peak.working = {"first order, held at process temperature: volume × rate constant"};
      const double warmer =
          values_[Mtsr] ? values_[Mtsr]->value.value() / values_[Process]->value.value() : 1;
      peak.working.push_back("at MTSR the same amount of gas is " + step::digits(warmer) +
                             " times as large, and faster by an activation energy that is not typed");
    } else {
      peak.why_missing = "no rate law";
    }
    if (typed_.free_section && peak.why_missing.empty()) {
      Finding velocity = finding("gas.velocity", "velocity of the gas in the free section",
                                 units::Dimension{0, 1, -1, 0, 0, units::Kind::Plain});
      take(velocity, peak.value.scaled(1 / typed_.free_section->value), 1);
      velocity.working = {"peak rate ÷ " + step::digits(typed_.free_section->value) + " m²"};
      group.findings.push_back(std::move(peak));
      group.findings.push_back(std::move(velocity));
      return;
    }
    group.findings.push_back(std::move(peak));
  }

  std::vector<std::string> gas_lines() const {
    std::vector<std::string> lines;
    for (const step::StreamLine& line : result_.out) {
      if (line.state.phase != molecule::Phase::Gas) continue;
      double fed = 0;
      for (const step::StreamLine& in : result_.in) fed += in.substance == line.substance ? in.amount : 0;
      if (line.amount > fed)
        lines.push_back(model_.input().substances[line.substance].name + ": " +
                        step::amount_text(line.amount - fed, false));
    }
    return lines;
  }

  /// Wide estimates and average bonds feed a class only with a plain word.
  void measure_this() {
    constexpr double kWide = 15e3 * uncertainty::kHalfWidth;  // s above 15 kJ/mol, as u95
    for (const step::StepReaction& reaction : model_.input().reactions) {
      const bool average = reaction.heat.source == "average";
      if (!average && (reaction.heat.typed || reaction.heat.as_written.u95() <= kWide)) continue;
      findings_.cautions.push_back("Measure this: the heat of " + reaction.name +
                                   (average ? " comes from average bonds"
                                            : " is an estimate with a standard deviation above 15 kJ/mol") +
                                   ", and maximum temperature, class and gas stand on it.");
    }
  }

  const step::StepResult& result_;
  const Model& model_;
  const SafetyInput& typed_;
  Scenario scenario_;
  std::vector<std::optional<step::FigureSpread>> values_;
  step::Findings findings_;
};

}  // namespace

step::Findings charge_safety(const step::StepResult& result, const SafetyInput& input) {
  const step::StepInput& step = result.model->input();
  if (step.kind != step::StepKind::Charge || step.reactions.empty()) return {};
  return Figures(result, input).all();
}

}  // namespace heatledger::safety
