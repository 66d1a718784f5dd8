#include "core/document/dosed_reading.hpp"

#include <algorithm>
#include <cmath>

#include "core/base/number_text.hpp"
#include "core/document/typed_rows.hpp"
#include "core/dosing/dosed_findings.hpp"
#include "core/safety/criticality.hpp"
#include "core/step/words.hpp"
#include "core/units/expression.hpp"

namespace heatledger::document {
namespace {

namespace d = units::dimension;
using step::Blank;
using step::Typed;

class Reader {
 public:
  Reader(const StepSheet& sheet, const StepContext& context, StepOutcome& outcome)
      : sheet_(sheet), context_(context), outcome_(outcome) {}

  /// Complete only when the outcome has no errors afterwards.
  dosing::DosedInput read() {
    balance();
    temperatures();
    wall();
    dosing_times();
    input_.density = positive("density", d::kDensity);
    input_.cooling = positive("cooling", d::kPower);
    if (outcome_.errors.empty()) kinetics();
    return std::move(input_);
  }

  /// Typed limits that the class is built on.
  Blank mtt() { return blank("technical_limit", d::kTemperature); }
  Blank td24() { return blank("td24", d::kTemperature); }
  std::string text_of(const char* id) const {
    const auto found = sheet_.blanks.find(id);
    return found == sheet_.blanks.end() ? std::string() : trimmed(found->second);
  }

 private:
  void refuse(Error error, const std::string& where) {
    error.where = error.where.empty() ? where : where + ", " + error.where;
    outcome_.errors.push_back(std::move(error));
  }
  Blank quantity(const std::string& text, const units::Dimension& dimension, const std::string& where) {
    if (trimmed(text).empty()) return std::nullopt;
    const Result<units::TypedValue> read = units::evaluate_quantity(text, dimension, *context_.names);
    if (!read.ok()) {
      refuse(read.error(), where);
      return std::nullopt;
    }
    return Typed{read->value, read->u95.value_or(0)};
  }
  Blank blank(const char* id, const units::Dimension& dimension) {
    return quantity(text_of(id), dimension, std::string("blanks.") + id);
  }
  Blank positive(const char* id, const units::Dimension& dimension) {
    Blank figure = blank(id, dimension);
    if (!figure || figure->value > 0) return figure;
    refuse(Error{"step.out_of_range", "This figure is above zero.", "", "Look at the figure and its unit."},
           std::string("blanks.") + id);
    return std::nullopt;
  }

  /// Feeds, reactions, heats and figures of species are those of a charge; how far the reactions go is not
  /// asked.
  void balance() {
    StepSheet charge = sheet_;
    charge.kind = "charge";
    charge.sought.clear();
    for (ProgressSheet& progress : charge.reactions) {
      progress.how = "extent";
      progress.figure = "0 mol";
    }
    for (const char* id : {"duty", "loss", "shaft", "time", "medium_in", "medium_out", "rate_constant",
                           "cooling", "solvent", "limit_temperature", "outlet.temperature"})
      charge.blanks.erase(id);
    StepReading reading = read_step(charge, context_);
    input_.step = std::move(reading.input);
    for (Error& error : reading.errors) outcome_.errors.push_back(std::move(error));
    outcome_.notes = std::move(reading.notes);
    for (const FeedSheet& feed : sheet_.feeds) input_.dosed.push_back(feed.role == "dosed");
  }

  void temperatures() {
    Blank start = input_.step.charge.process_temperature;
    std::vector<step::Feed>& feeds = input_.step.feeds;
    for (std::size_t f = 0; f < feeds.size(); ++f) {
      if (input_.dosed[f]) continue;
      if (!start) start = feeds[f].temperature;
    }
    if (!start) {
      refuse(Error{"step.blank", "The process temperature is not filled in.", "",
                   "Type the temperature of the content when dosing begins."},
             "blanks.process_temperature");
      return;
    }
    input_.temperature = *start;
    for (std::size_t f = 0; f < feeds.size(); ++f) {
      if (input_.dosed[f]) continue;
      if (feeds[f].temperature && std::fabs(feeds[f].temperature->value - start->value) > 0.05) {
        outcome_.notes.push_back(
            feeds[f].name + " is brought from " + step::celsius(feeds[f].temperature->value) + " to " +
            step::celsius(start->value) + " before dosing begins; that heat is not in this step.");
      }
      feeds[f].temperature = start;
    }
    input_.step.vessel.temperature = start;
  }

  void wall() {
    const std::string text = text_of("thermal");
    const Blank jacket = blank("jacket.temperature", d::kTemperature);
    input_.conductance_start = positive("jacket.ua_start", d::kHeatTransferPerKelvin);
    input_.conductance_end = positive("jacket.ua_end", d::kHeatTransferPerKelvin);
    if (text.compare(0, 4, "held") == 0 || (text.empty() && !jacket)) {
      input_.thermal = dosing::Thermal::Held;
    } else if (text.compare(0, 4, "adia") == 0) {
      input_.thermal = dosing::Thermal::Adiabatic;
    } else if (text.compare(0, 6, "jacket") == 0 || text.empty()) {
      input_.thermal = dosing::Thermal::Jacket;
      if (jacket) {
        input_.jacket = *jacket;
      } else {
        refuse(Error{"dosing.no_jacket", "The temperature of the jacket is not filled in.", "",
                     "Type it, or hold the vessel at its temperature."},
               "blanks.jacket.temperature");
      }
    } else {
      refuse(Error{"dosing.thermal", "How the vessel is cooled is not understood: \"" + text + "\".", "",
                   "Write: held, jacket, or adiabatic."},
             "blanks.thermal");
    }
  }

  void dosing_times() {
    if (const Blank time = positive("dosing.time", d::kTime)) input_.dosing_time = *time;
    if (const Blank start = blank("dosing.start", d::kTime))
      input_.dosing_start = std::max(0.0, start->value);
    input_.hold = blank("dosing.hold", d::kTime);
    if (input_.hold && input_.hold->value < 0) {
      refuse(Error{"step.out_of_range", "A time is not below zero.", "", "Look at the figure and its unit."},
             "blanks.dosing.hold");
    }
    for (std::size_t i = 0; i < sheet_.profile.size(); ++i) {
      const ProfileRow& row = sheet_.profile[i];
      const std::string where = "profile[" + std::to_string(i) + "]";
      const Blank time = quantity(row.time, d::kTime, where + ".time"),
                  share = quantity(row.amount, d::kNumber, where + ".amount");
      if (!time || !share) {
        if (outcome_.errors.empty()) {
          refuse(Error{"step.blank", "A row of the dosing profile has a time and a share.", "",
                       "Type both, such as 1.5 h and 40 %."},
                 where + (time ? ".amount" : ".time"));
        }
        continue;
      }
      if (input_.profile.empty() && share->value > 0 && time->value > input_.dosing_start)
        input_.profile.push_back({input_.dosing_start, 0});
      input_.profile.push_back({time->value, share->value});
    }
    if (input_.profile.empty()) return;
    if (const Result<dosing::Profile> profile = dosing::Profile::of(input_.profile, "profile[0].time");
        !profile.ok())
      outcome_.errors.push_back(profile.error());
  }

  // Kinetics.

  void kinetics() {
    input_.kinetics.resize(input_.step.reactions.size());
    // Nothing was refused, so every row of the sheet has become a reaction.
    for (std::size_t j = 0; j < input_.step.reactions.size(); ++j) {
      const ProgressSheet& typed = sheet_.reactions[j];
      dosing::RateLawInput& law = input_.kinetics[j];
      const std::string where = "reactions[" + std::to_string(j) + "]";
      const std::string text = trimmed(typed.rate_constant);
      if (text.empty()) continue;
      if (text == "as fast as dosed" || text == "fast") {
        law.speed = dosing::Speed::AsFastAsDosed;
        continue;
      }
      law.speed = dosing::Speed::ByRateLaw;
      orders(j, law, where + ".orders");
      rate_constant(j, law, where + ".rate_constant");
      if (const Blank at = quantity(typed.rate_at, d::kTemperature, where + ".rate_at"))
        law.reference = at->value;
      if (const Blank energy = quantity(typed.activation, d::kEnergyPerMole, where + ".activation"))
        law.activation_energy = *energy;
    }
  }

  std::optional<std::size_t> substance(const std::string& name) {
    const std::vector<step::SubstanceInput>& substances = input_.step.substances;
    for (std::size_t i = 0; i < substances.size(); ++i) {
      if (substances[i].name == name || substances[i].species->name == name) return i;
    }
    const Result<std::shared_ptr<const facts::Species>> species = context_.species->species(name, false);
    if (!species.ok()) return std::nullopt;
    for (std::size_t i = 0; i < substances.size(); ++i) {
      const facts::Species& known = *substances[i].species;
      if (species->get() == &known ||
          ((*species)->compound != nullptr && (*species)->compound == known.compound) ||
          (!(*species)->canonical.empty() && (*species)->canonical == known.canonical))
        return i;
    }
    return std::nullopt;
  }

  /// "1 in toluene, 0.5 in nitric acid".
  void orders(std::size_t reaction, dosing::RateLawInput& law, const std::string& where) {
    const std::string text = trimmed(sheet_.reactions[reaction].orders);
    std::size_t from = 0;
    while (from < text.size()) {
      const std::size_t comma = std::min(text.find(", ", from), text.size());
      const std::string part = trimmed(text.substr(from, comma - from));
      from = comma + 2;
      if (part.empty()) continue;
      const std::size_t in = part.find(" in ");
      const std::optional<double> order =
          in == std::string::npos ? std::nullopt : parse_number(trimmed(part.substr(0, in)));
      const std::optional<std::size_t> species =
          in == std::string::npos ? std::nullopt : substance(trimmed(part.substr(in + 4)));
      if (!order || !species || *order < 0 || *order > 5) {
        refuse(
            Error{"dosing.orders", "The order \"" + part + "\" is not understood.", "",
                  "Write such as: 1 in toluene, 0.5 in nitric acid; with species of this step, orders from "
                  "0 to 5."},
            where);
        return;
      }
      law.factors.push_back({*species, *order});
    }
  }

  /// The unit follows from the orders: with n in all, (m³/mol)^(n − 1) per second.
  void rate_constant(std::size_t reaction, dosing::RateLawInput& law, const std::string& where) {
    double order = 0;
    for (const dosing::RateLaw::Factor& factor : law.factors) order += factor.order;
    if (law.factors.empty()) {
      const step::StepReaction& of = input_.step.reactions[reaction];
      std::vector<std::size_t> reactants;
      for (std::size_t i = 0; i < of.substances.size(); ++i) {
        if (!of.reaction->species[i].product &&
            std::find(reactants.begin(), reactants.end(), of.substances[i]) == reactants.end())
          reactants.push_back(of.substances[i]);
      }
      order = static_cast<double>(reactants.size());
    }
    const std::string text = trimmed(sheet_.reactions[reaction].rate_constant);
    const double powers = order - 1;
    if (std::fabs(powers - std::round(powers)) > 1e-9) {
      broken_order(text, powers, law, where);
      return;
    }
    units::Dimension dimension = d::kRate;
    dimension.m = static_cast<std::int8_t>(3 * std::lround(powers));
    dimension.mol = static_cast<std::int8_t>(-std::lround(powers));
    const Blank constant = quantity(text, dimension, where);
    if (!constant) return;
    if (!(constant->value > 0)) {
      refuse(Error{"step.out_of_range", "A rate constant is above zero.", "", "Look at it and its unit."},
             where);
      return;
    }
    law.constant = *constant;
  }

  /// With a broken order in all the unit has no exponents of its own: the figure is one in mol, L and s,
  /// typed as a rate at 1 mol/L.
  void broken_order(const std::string& text, double powers, dosing::RateLawInput& law,
                    const std::string& where) {
    units::Dimension rate = d::kConcentration;
    rate.s = -1;
    const Blank at_one = quantity(text, rate, where);
    if (!at_one) {
      outcome_.errors.back().hint =
          "With a broken order in all, type the rate at 1 mol/L of everything, such as 2e-4 mol/(L s).";
      return;
    }
    // 1 mol/L is 1000 mol/m³.
    const double factor = std::pow(1000, -(powers + 1));
    law.constant = Typed{at_one->value * factor, at_one->u95 * factor};
  }

  const StepSheet& sheet_;
  const StepContext& context_;
  StepOutcome& outcome_;
  dosing::DosedInput input_;
};

/// The balance over the whole course, with the extents that were reached.
void add_balance(const dosing::DosedModel& model, const dosing::Answers& answers, step::Lookups& lookups,
                 StepOutcome& outcome) {
  const dosing::Moment last = answers.course->at(answers.course->end());
  step::StepInput input = model.input().step;
  for (std::size_t j = 0; j < input.reactions.size(); ++j)
    input.reactions[j].progress.figure = Typed{std::max(0.0, last.extents[j]), 0};
  input.outlet.temperature = Typed{last.temperature, 0};
  Result<step::StepResult> solved = step::solve_step(std::move(input), lookups);
  if (!solved.ok()) {
    outcome.errors.push_back(solved.error());
    return;
  }
  // The figures of this kind of step stand in the findings; the balance shows the duty over the course.
  solved->answers.resize(std::min<std::size_t>(1, solved->answers.size()));
  if (!solved->answers.empty()) solved->answers[0].label = "duty over the whole course";
  outcome.result = std::make_shared<const step::StepResult>(std::move(solved).value());
}

step::Finding typed_temperature(const char* id, const char* label, const Blank& typed, const char* missing,
                                const std::string& title) {
  step::Finding finding;
  finding.id = id;
  finding.label = label;
  finding.dimension = d::kTemperature;
  if (!typed) {
    finding.why_missing = missing;
    return finding;
  }
  std::uint64_t key = 14695981039346656037ULL;
  for (const char c : title + '|' + id) key = (key ^ static_cast<unsigned char>(c)) * 1099511628211ULL;
  finding.value = uncertainty::Quantity(typed->value, typed->u95,
                                        uncertainty::source_key(uncertainty::SourceKind::Typed, key));
  return finding;
}

void add_class(Reader& reader, const dosing::DosedModel& model, const dosing::Answers& answers,
               step::Findings& findings) {
  const std::string& title = model.input().step.title;
  step::FindingGroup group{"class", "Criticality of a cooling failure", "", {}};
  step::Finding mtt = typed_temperature("mtt", "maximum technical temperature", reader.mtt(),
                                        "type the boiling point at the set pressure (open vessel) or the "
                                        "temperature at the permissible pressure (closed)",
                                        title),
                td24 = typed_temperature("td24", "T_D24, typed", reader.td24(),
                                         "measured only, never estimated: type it with its source", title);
  const std::string source = reader.text_of("td24_source");
  if (td24.why_missing.empty()) {
    if (source.empty()) {
      td24.mark = "source not given";
    } else {
      td24.sources = {source};
    }
  }
  safety::UncertainFailure failure;
  const dosing::DosedNumber& start = model.start_temperature();
  failure.process = uncertainty::Quantity(start.value, start.spread.parts());
  const dosing::FigureId which = answers.nothing_known ? dosing::FigureId::AllAtOnce : dosing::FigureId::Mtsr;
  failure.mtsr = quantity(answers, which);
  if (mtt.why_missing.empty()) failure.mtt = mtt.value;
  if (td24.why_missing.empty()) failure.td24 = td24.value;
  const safety::Assessment assessment = safety::assess(failure);
  step::Finding verdict;
  verdict.id = "criticality";
  verdict.label = answers.nothing_known ? "criticality class, everything charged at once"
                                        : "criticality class, MTSR by the dosing";
  verdict.text = assessment.words;
  verdict.working = assessment.working;
  if (!assessment.meaning.empty()) verdict.working.push_back(assessment.meaning);
  verdict.sources = {safety::criticality_source()};
  group.findings = {std::move(mtt), std::move(td24), std::move(verdict)};
  if (figure(answers, dosing::FigureId::AdiabaticRise)) {
    step::Finding severity;
    severity.id = "severity";
    severity.label = "severity by adiabatic rise";
    severity.text = safety::band_word(safety::severity(*figure(answers, dosing::FigureId::AdiabaticRise)));
    severity.working = {"below 50 K low, 50 to 200 K medium, above 200 K high"};
    severity.sources = {safety::criticality_source()};
    group.findings.push_back(std::move(severity));
  }
  findings.groups.push_back(std::move(group));
}

/// Heats of dissolving and diluting enter the balance over the course, not the course in time.
void caution_of_dilution(const step::StepResult& balance, step::Findings& findings) {
  double heat = 0;
  for (const step::DilutionLine& line : balance.dilutions) heat += line.set_free;
  if (!(heat > 0)) return;
  findings.cautions.insert(findings.cautions.begin(),
                           "Mixing and dilution set free " + step::heat_text(heat, false) +
                               " that the balance counts and the course in time does not: heat rate, MTSR "
                               "and class leave it out and "
                               "are too low by it. Type the heat measured in this mixture, with mixing in "
                               "it, before any of them is "
                               "used.");
}

}  // namespace

void compute_dosed(const StepSheet& sheet, const StepContext& context, step::Lookups& lookups,
                   StepOutcome& outcome) {
  if (sheet.feeds.empty()) return;
  Reader reader(sheet, context, outcome);
  dosing::DosedInput input = reader.read();
  if (!outcome.errors.empty()) return;
  const Result<dosing::DosedModel> model = dosing::DosedModel::of(std::move(input), lookups);
  if (!model.ok()) {
    Error error = model.error();
    // The balance below knows the temperature of the start as that of its end.
    if (error.where == "outlet.temperature") error.where = "process_temperature";
    outcome.errors.push_back(std::move(error));
    return;
  }
  const Result<dosing::Answers> answers = dosing::answer(*model);
  if (!answers.ok()) {
    outcome.errors.push_back(answers.error());
    return;
  }
  add_balance(*model, *answers, lookups, outcome);
  step::Findings findings = dosing::findings_of(*model, *answers);
  add_class(reader, *model, *answers, findings);
  if (outcome.result != nullptr) caution_of_dilution(*outcome.result, findings);
  outcome.findings = std::make_shared<const step::Findings>(std::move(findings));
}

}  // namespace heatledger::document
