#include "core/dosing/dosed_findings.hpp"

#include <algorithm>
#include <cmath>

#include "core/base/number_text.hpp"
#include "core/dosing/dosed_charts.hpp"
#include "core/step/words.hpp"
#include "core/units/constants.hpp"

namespace heatledger::dosing {
namespace {

namespace d = units::dimension;
using step::celsius;
using step::digits;
using step::Finding;
using step::FindingGroup;

constexpr const char* kMethod =
    "F. Stoessel, Thermal Safety of Chemical Processes, Wiley-VCH 2008: accumulation and MTSR of the "
    "semi-batch reactor";

std::string power(double watt) {
  return step::heat_text(watt, true);
}
std::string heat(double joule) {
  return step::heat_text(joule, false);
}
std::string share(double part) {
  return display_number(100 * part, 1) + " %";
}
std::string joules_per_kelvin(double value) {
  return digits(value / 1000) + " kJ/K";
}

class Writer {
 public:
  Writer(const DosedModel& model, const Answers& answers) : model_(model), answers_(answers) {}

  step::Findings write() {
    dosing();
    failure();
    findings_.charts = dosed_charts(answers_);
    remarks();
    return std::move(findings_);
  }

 private:
  const DosedSystem& system() const { return answers_.course->system(); }
  const Kettle& kettle() const { return answers_.course->kettle(); }

  Finding* add(FindingGroup& group, const char* id, const char* label, const units::Dimension& dimension,
               FigureId which, std::string mark = {}) {
    if (!figure(answers_, which)) return nullptr;
    Finding finding;
    finding.id = id;
    finding.label = label;
    finding.dimension = dimension;
    finding.value = quantity(answers_, which);
    finding.mark = std::move(mark);
    group.findings.push_back(std::move(finding));
    return &group.findings.back();
  }
  void missing(FindingGroup& group, const char* id, const char* label, std::string why) {
    Finding finding;
    finding.id = id;
    finding.label = label;
    finding.why_missing = std::move(why);
    group.findings.push_back(std::move(finding));
  }
  static void unfavourable(Finding* finding, double sign = 1) {
    if (finding != nullptr && finding->value.u95() > 0)
      finding->unfavourable = finding->value.value() + sign * finding->value.u95();
  }
  double value(FigureId id) const { return *figure(answers_, id); }
  static std::string at(double time) { return "at " + duration_text(time); }

  std::string held_words() const {
    switch (system().thermal) {
      case Thermal::Held:
        return "held at " + celsius(system().start_temperature);
      case Thermal::Jacket:
        return "jacket at " + celsius(system().jacket_temperature);
      case Thermal::Adiabatic:
        return "nothing through the wall";
    }
    return {};
  }

  void dosing() {
    FindingGroup group{"dosing", "Dosing", held_words(), {}};
    const bool unknown = answers_.nothing_known;
    if (Finding* f = add(group, "heat", "heat set free over the course", d::kEnergy, FigureId::HeatSetFree))
      heat_working(*f);
    if (unknown) {
      missing(group, "peak_cooling", "peak duty",
              "peak unknown: no rate law. Type one, or write \"as fast as "
              "dosed\" where that is known.");
    } else {
      if (Finding* f = add(group, "peak_heat", "highest rate of heat set free", d::kPower, FigureId::PeakHeat,
                           at(answers_.times.peak_heat))) {
        rate_working(*f, answers_.times.peak_heat);
        unfavourable(f);
      }
      const bool held = system().thermal == Thermal::Held;
      if (Finding* f =
              add(group, "peak_cooling", held ? "peak of the cooling asked for" : "peak of the cooling",
                  d::kPower, FigureId::PeakCooling,
                  (value_or(FigureId::PeakCooling) > 0 ? "remove, " : "supply, ") +
                      at(answers_.times.peak_cooling))) {
        cooling_working(*f, answers_.times.peak_cooling);
        unfavourable(f);
      }
    }
    if (system().thermal != Thermal::Adiabatic) {
      if (Finding* f = add(group, "mean_duty", "mean duty over the dosing", d::kPower, FigureId::MeanDuty,
                           unknown ? "as if as fast as dosed, not design duty" : "not design duty")) {
        f->working = {"heat through the wall while dosing / time of dosing = " + power(f->value.value())};
      }
    }
    if (system().thermal != Thermal::Held && !unknown) {
      unfavourable(add(group, "highest", "highest temperature", d::kTemperature, FigureId::Highest,
                       at(answers_.times.highest)));
    }
    if (Finding* f =
            add(group, "cold_feed", "taken up by the feed on its way to the temperature of the start",
                d::kEnergy, FigureId::ColdFeed)) {
      f->working = {"enthalpy of all that is dosed at " + celsius(system().start_temperature) +
                    " less as it enters = " + heat(f->value.value())};
    }
    if (!unknown) {
      accumulation_lines(group);
      add(group, "conversion_end_of_dosing", "conversion when dosing ends", d::kNumber,
          FigureId::ConversionAtEnd, at(answers_.dosing_end));
      add(group, "conversion", "conversion at the end", d::kNumber, FigureId::Conversion,
          at(answers_.course->end()));
      capacity_line(group);
    }
    findings_.groups.push_back(std::move(group));
  }

  double value_or(FigureId id) const { return figure(answers_, id).value_or(0); }

  void heat_working(Finding& f) const {
    const Moment last = answers_.course->at(answers_.course->end());
    for (std::size_t j = 0; j < last.extents.size(); ++j) {
      f.working.push_back(system().reactions[j].name + ": " + step::amount_text(last.extents[j], false) +
                          " × (" +
                          display_number(kettle().reaction_heat(j, system().start_temperature) / 1000, 2) +
                          " kJ/mol at " + celsius(system().start_temperature) + ")");
    }
    f.working.push_back("set free in all: " + heat(f.value.value()));
  }

  void rate_working(Finding& f, double time) const {
    const Moment m = answers_.course->at(time, true);
    for (std::size_t j = 0; j < m.rates.size(); ++j) {
      f.working.push_back(system().reactions[j].name + " at " + duration_text(time) + ": " +
                          step::amount_text(m.rates[j], true) + " × (" +
                          display_number(kettle().reaction_heat(j, m.temperature) / 1000, 2) + " kJ/mol at " +
                          celsius(m.temperature) + ")");
    }
    f.working.push_back("= " + power(f.value.value()));
  }

  void cooling_working(Finding& f, double time) const {
    const Moment before = answers_.course->at(time, true), after = answers_.course->at(time);
    const Moment& m = before.cooling >= after.cooling ? before : after;
    if (system().thermal == Thermal::Jacket) {
      f.working = {
          "UA × (T − jacket) = " + digits(m.cooling / (m.temperature - system().jacket_temperature)) +
          " W/K × (" + celsius(m.temperature) + " − " + celsius(system().jacket_temperature) +
          ") = " + power(m.cooling)};
      return;
    }
    f.working = {"heat set free by the reactions: " + power(m.heat_rate),
                 "less what the feed takes up: " + power(m.cold_feed), "= " + power(m.cooling)};
  }

  void accumulation_lines(FindingGroup& group) {
    const std::string several =
        system().reactions.size() > 1 ? "several reactions: shares of the heat of the whole step" : "";
    if (Finding* f = add(group, "accumulation", "largest accumulation", d::kNumber, FigureId::Accumulation,
                         at(answers_.times.accumulation))) {
      const Moment m = answers_.course->at(answers_.times.accumulation, true);
      f->working = open_working(m);
      f->working.push_back("of the extent of the whole step, " +
                           step::amount_text(kettle().whole_extents()[0], false) + ": " +
                           share(m.accumulation));
      if (!several.empty()) f->working.push_back(several);
      f->sources = {kMethod};
      unfavourable(f);
    }
    add(group, "accumulation_end_of_dosing", "accumulation when dosing ends", d::kNumber,
        FigureId::AccumulationAtEnd);
  }

  /// n_ac with the reactants put in.
  std::vector<std::string> open_working(const Moment& m) const {
    std::vector<std::string> lines;
    for (std::size_t j = 0; j < system().reactions.size(); ++j) {
      std::string line = system().reactions[j].name + ": extent still possible = least of ";
      bool first = true;
      for (const DosedReaction::Term& term : system().reactions[j].terms) {
        if (!(term.coefficient < 0)) continue;
        line += (first ? "" : ", ") + system().substances[term.substance].name + " " +
                step::amount_text(m.amounts[term.substance], false) + " / " + digits(-term.coefficient);
        first = false;
      }
      lines.push_back(line + " = " + step::amount_text(m.open[j], false));
    }
    return lines;
  }

  void capacity_line(FindingGroup& group) {
    if (!model_.input().cooling) return;
    if (!answers_.why_no_dosing_time.empty()) {
      missing(group, "dosing_time", "dosing time for the cooling capacity", answers_.why_no_dosing_time);
      return;
    }
    if (Finding* f = add(group, "dosing_time", "dosing time for the cooling capacity", d::kTime,
                         FigureId::DosingTime)) {
      f->working = {"the profile stretched until the peak of the cooling asked for is " +
                    power(model_.input().cooling->value)};
      f->mark = "without ±";
    }
  }

  void failure() {
    FindingGroup group{"failure", "Cooling failure", "", {}};
    const double start = system().start_temperature;
    if (!answers_.nothing_known) {
      group.aside = "adiabatic from the worst moment, stirring goes on, nothing evaporates, vessel left out";
      worst_lines(group);
    }
    if (Finding* f =
            add(group, "all_at_once", "everything charged at once", d::kTemperature, FigureId::AllAtOnce,
                answers_.nothing_known ? "taken as MTSR: no kinetics is typed" : "")) {
      const double heat_capacity = kettle().heat_capacity(kettle().all_charged(), start);
      f->working = {"heat of the whole step at " + celsius(start) + ": " +
                        heat(value(FigureId::AdiabaticRise) * heat_capacity),
                    "m cp of all that is charged: " + joules_per_kelvin(heat_capacity),
                    celsius(start) + " + " + digits(value(FigureId::AdiabaticRise)) +
                        " K = " + celsius(f->value.value())};
      f->sources = {kMethod};
      if (answers_.nothing_known) carried(*f);
      unfavourable(f);
    }
    if (Finding* f = add(group, "adiabatic_rise", "adiabatic temperature rise", d::kTemperatureDifference,
                         FigureId::AdiabaticRise)) {
      f->working = {"heat of the whole step / (m cp) = " + digits(f->value.value()) + " K, final mass " +
                    step::mass_text(kettle().mass(kettle().all_charged()), false)};
      unfavourable(f);
    }
    findings_.groups.push_back(std::move(group));
  }

  void carried(Finding& f) const {
    constexpr std::size_t kMost = 5;
    for (std::size_t i = 0; i < std::min(kMost, answers_.shares.size()); ++i) {
      if (answers_.shares[i].second < 0.005) break;
      f.working.push_back("± carried by " + answers_.shares[i].first + ": " +
                          display_number(100 * answers_.shares[i].second, 0) + " %");
    }
  }

  void worst_lines(FindingGroup& group) {
    const Moment& m = answers_.worst;
    if (Finding* f = add(group, "mtsr", "maximum temperature of the synthesis reaction", d::kTemperature,
                         FigureId::Mtsr, "feed stopped, failure " + at(m.time))) {
      f->working = open_working(m);
      f->working.push_back("heat still open at " + celsius(m.temperature) + ": " + heat(m.open_heat));
      f->working.push_back("m cp of the " + step::mass_text(m.mass, false) +
                           " then in the vessel: " + joules_per_kelvin(m.heat_capacity));
      f->working.push_back(celsius(m.temperature) + " + " + heat(m.open_heat) + " / " +
                           joules_per_kelvin(m.heat_capacity) + " = " + celsius(m.mtsr));
      carried(*f);
      f->sources = {kMethod};
      unfavourable(f);
    }
    add(group, "mtsr_by_enthalpy", "the same by h(T)", d::kTemperature, FigureId::MtsrByEnthalpy,
        "cp changing on the way");
    add(group, "temperature_then", "temperature at that moment", d::kTemperature, FigureId::TemperatureThen);
    if (Finding* f = add(group, "cold_feed_then", "cooling by cold feed that a failure takes away", d::kPower,
                         FigureId::ColdFeedThen)) {
      f->working = {"what is fed at that moment, from its own temperature to " + celsius(m.temperature) +
                    ": " + power(m.cold_feed)};
    }
    if (answers_.failure.slow) {
      missing(group, "time_to_mtsr", "time to 95 % of the rise",
              "more than 30 days: what has accumulated reacts hardly at all at this temperature");
    } else if (Finding* f = add(group, "time_to_mtsr", "time from the failure to 95 % of the rise", d::kTime,
                                FigureId::TimeToMtsr)) {
      f->working = {"the rate law followed adiabatically from " + celsius(m.temperature) + " to " +
                    celsius(answers_.failure.highest)};
      unfavourable(f, -1);
    }
    add(group, "time_to_fastest", "time to the fastest rise", d::kTime, FigureId::TimeToFastest);
    if (Finding* f = add(group, "feed_not_stopped", "highest temperature when the feed goes on",
                         d::kTemperature, FigureId::FeedNotStopped, "failure " + at(answers_.feeding.at))) {
      f->working = {"adiabatic from " + duration_text(answers_.feeding.at) + " and " +
                    celsius(answers_.feeding.start) +
                    ", the rest fed by its profile: the moment of failure that " + "ends hottest"};
      unfavourable(f);
    }
  }

  void remarks() {
    std::vector<std::string>&notes = findings_.notes, &cautions = findings_.cautions;
    notes = model_.notes();
    bool law = false, fast = false;
    for (const DosedReaction& reaction : system().reactions) {
      law = law || reaction.speed == Speed::ByRateLaw;
      fast = fast || reaction.speed == Speed::AsFastAsDosed;
    }
    if (system().reactions.size() > 1)
      notes.push_back(
          "What is still open is run to the end in the order in which the reactions are written.");
    if (answers_.nothing_known) {
      cautions.push_back(
          "No kinetics is typed for every reaction: the cooling by dosing is not known, and "
          "everything is taken as charged at once.");
    }
    if (law) {
      cautions.push_back(
          "The rate law holds in one phase: layers, and stirring that stops, are not covered.");
      cautions.push_back(
          "A rate law outside the range in which it was measured is no knowledge; accumulation "
          "is to be confirmed by reaction calorimetry.");
    }
    if (fast && !answers_.nothing_known) {
      cautions.push_back(
          "\"As fast as dosed\" says that nothing accumulates; that is to be shown by reaction "
          "calorimetry at this temperature and stirring.");
    }
    if (figure(answers_, FigureId::FeedNotStopped) &&
        value(FigureId::FeedNotStopped) > answers_.failure.highest + 1) {
      cautions.push_back(
          "MTSR takes the feed as stopped: an interlock has to stop it on loss of cooling or of "
          "stirring.");
    }
    bool at_once = false;
    const Moment first = answers_.course->at(0);
    for (std::size_t j = 0; j < first.extents.size(); ++j)
      at_once = at_once || (system().reactions[j].speed != Speed::ByRateLaw &&
                            first.extents[j] > 1e-9 * kettle().whole_extents()[j]);
    if (at_once) {
      cautions.push_back(
          "Reactants that stand in the vessel before dosing are taken to have reacted at the "
          "start; that heat is in no rate here.");
    }
    cautions.push_back(
        "Figures for safety: they defer to measurement (reaction calorimetry, DSC), to local "
        "codes and to licensed practice. Not in the ±: reactions that are not listed, "
        "decomposition, mixing that is not listed, a rate law outside its range, human error.");
    closure();
  }

  /// Enthalpy of what is there at the end, by its own amounts and temperature, against all that came in.
  void closure() {
    const Course& course = *answers_.course;
    const Moment last = course.at(course.end());
    double came =
        kettle().enthalpy(system().start, system().start_temperature) +
        system().vessel_heat_capacity * (system().start_temperature - units::kReferenceTemperature) +
        last.wall_heat;
    double size = std::fabs(last.wall_heat);
    for (const DosedFeed& feed : system().feeds) {
      came += feed.enthalpy * feed.profile.share(last.time);
      size += std::fabs(feed.enthalpy);
    }
    for (std::size_t j = 0; j < last.extents.size(); ++j) {
      came -= last.extents[j] * system().reactions[j].heat;
      size += std::fabs(last.extents[j] * system().reactions[j].heat);
    }
    const double there = kettle().enthalpy(last.amounts, last.temperature) +
                         system().vessel_heat_capacity * (last.temperature - units::kReferenceTemperature);
    const double left = size > 0 ? std::fabs(there - came) / size : 0;
    findings_.closes = left < 1e-9;
    findings_.closure = findings_.closes ? "Heat closes over the whole course, to better than 1e-9."
                                         : "Heat does not close over the course: " + digits(left) + ".";
  }

  const DosedModel& model_;
  const Answers& answers_;
  step::Findings findings_;
};

}  // namespace

std::string duration_text(double seconds) {
  if (seconds >= 3600) return display_number(seconds / 3600, 2) + " h";
  if (seconds >= 60) return display_number(seconds / 60, 0) + " min";
  return display_number(seconds, 0) + " s";
}

step::Findings findings_of(const DosedModel& model, const Answers& answers) {
  return Writer(model, answers).write();
}

std::vector<std::string> dosed_conventions() {
  return {
      "Accumulation is the extent still possible if feeding stops: the least of n / |ν| over the reactants "
      "present, as a share of the extent of the whole step.",
      "MTSR(t) = T(t) + open heat / (m cp), with the mass then in the vessel; vessel left out, no "
      "evaporation; MTSR is its largest value over the course. Feed stopped, stirring goes on.",
      "Everything charged at once: temperature at the start plus the adiabatic rise; it stands for MTSR when "
      "no kinetics is typed.",
      "Held: the content stays at its temperature and the cooling is the answer. UA grows with the mass in "
      "the vessel unless its end is typed."};
}

}  // namespace heatledger::dosing
