#include "core/mixing/mixing_cautions.hpp"

#include <algorithm>
#include <cmath>

#include "core/base/number_text.hpp"
#include "core/step/words.hpp"
#include "core/thermo/saturation.hpp"

namespace heatledger::mixing {
namespace {

using molecule::Phase;
using step::StepResult;

std::string_view formula_of(const StepResult& result, std::size_t substance) {
  const std::shared_ptr<const facts::Species>& species = result.model->input().substances[substance].species;
  return species == nullptr || species->compound == nullptr ? std::string_view() : species->compound->formula;
}

bool fed_as(const StepResult& result, std::string_view formula, bool as_base) {
  for (const step::StreamLine& line : result.in) {
    const std::string_view fed = formula_of(result, line.substance);
    const bool base =
        fed == "HNaO" || fed == "NaOH" || fed == "HKO" || fed == "KOH" || fed == "H3N" || fed == "NH3";
    if (line.amount > 0 && (as_base ? base : fed == formula)) return true;
  }
  return false;
}

bool is_acid(std::string_view formula) {
  for (const std::string_view acid :
       {"H2O4S", "H2SO4", "HNO3", "ClH", "HCl", "BrH", "HBr", "HClO4", "ClHO4"}) {
    if (formula == acid) return true;
  }
  return false;
}

/// "NaOH" whatever order of elements the library keeps.
bool is_strong_base(std::string_view formula) {
  return formula == "NaOH" || formula == "HNaO" || formula == "KOH" || formula == "HKO";
}

void caution_boiling(step::Findings& findings, const StepResult& unheated) {
  const std::optional<double> boils = water_boils(unheated);
  if (!boils) return;
  constexpr double kClose = 15;  // [K] local overheating where the streams meet
  const double end = unheated.values[unheated.model->outlet_temperature_slot()];
  if (end <= *boils - kClose) return;
  findings.cautions.push_back("Without cooling the mixture reaches " + step::celsius(end) +
                              (end > *boils ? ", above" : ", close to") +
                              " the boiling point of water at this pressure, " + step::celsius(*boils) +
                              ": it can boil and spit where the streams meet. What is dissolved raises the "
                              "boiling point; measure it, "
                              "add slowly, stir and cool.");
}

void caution_order(step::Findings& findings, const StepResult& result) {
  bool strong = false;
  double acid = 0, water = 0;
  for (const step::DilutionLine& line : result.dilutions) {
    const std::string_view formula = formula_of(result, line.substance);
    strong = strong || (is_acid(formula) && line.before > 0.5 && line.set_free > 0) ||
             (is_strong_base(formula) && line.before > 0.3 && line.set_free > 0);
    acid += line.set_free;
  }
  for (const step::StreamLine& line : result.in) {
    if (formula_of(result, line.substance) == "H2O") water += line.mass;
  }
  if (strong && water > 0 && acid > 0)
    findings.cautions.push_back(
        "Acid or caustic into water, never water into strong acid or caustic, stirred and at a rate that the "
        "cooling holds; local rules and licensed practice come first.");
}

/// Heats at infinite dilution in a mixture that is not.
void caution_salts(step::Findings& findings, const StepResult& result) {
  double water = 0;
  for (const step::StreamLine& line : result.out) {
    if (formula_of(result, line.substance) == "H2O" && line.state.phase != Phase::Gas) water += line.amount;
  }
  std::string names;
  for (const step::StreamLine& line : result.out) {
    const bool infinite = line.state.phase == Phase::Aqueous && !line.state.strength;
    if (!infinite || !(line.amount > 0) || water > 500 * line.amount) continue;
    names += (names.empty() ? "" : ", ") + result.model->input().substances[line.substance].name;
  }
  if (names.empty()) return;
  findings.cautions.push_back("What leaves dissolved without a table of strengths (" + names +
                              ") is reckoned at infinite dilution; a strong solution of it may give some "
                              "kilojoules per mole more or less, "
                              "and may crystallise, which is not looked at.");
}

void explain_neutralisation(step::Findings& findings, const StepResult& result) {
  bool acid = false;
  for (const step::StreamLine& line : result.in) acid = acid || is_acid(formula_of(result, line.substance));
  if (!acid || !fed_as(result, "", true) || result.reactions.empty()) return;
  findings.notes.push_back(
      "Strong acid and strong base: published heats of neutralisation are 55.8 kJ/mol of water at infinite "
      "dilution "
      "and 25 °C; 56.6 to 57.3 kJ/mol are of solutions of about 1 mol/L, diluting included, or of 18 to 20 "
      "°C. Here "
      "the reaction is at the strength it is written with and the diluting stands on its own lines, so that "
      "nothing counts twice.");
}

void caution_gases(step::Findings& findings, const StepResult& result, const StepResult* unheated) {
  const double end =
      (unheated != nullptr ? *unheated : result).values[result.model->outlet_temperature_slot()];
  constexpr double kFuming = 323.15;
  for (const step::DilutionLine& line : result.dilutions) {
    const std::string_view formula = formula_of(result, line.substance);
    const bool volatile_one = formula == "HCl" || formula == "ClH" || formula == "HNO3" || formula == "NH3" ||
                              formula == "H3N" || formula == "HBr" || formula == "BrH" || formula == "HF" ||
                              formula == "FH";
    if (volatile_one && line.after > 0.2 && end > kFuming) {
      findings.cautions.push_back(result.model->input().substances[line.substance].name +
                                  " at this strength and " + step::celsius(end) +
                                  " gives off vapour, whose heat is not in these figures.");
    }
  }
}

}  // namespace

std::optional<double> water_boils(const StepResult& result) {
  const double pressure = result.values[*result.model->slot("outlet.pressure")];
  for (const step::SubstanceInput& substance : result.model->input().substances) {
    if (substance.species == nullptr || substance.species->compound == nullptr ||
        substance.species->compound->formula != "H2O")
      continue;
    const Result<thermo::Saturation> boils = thermo::boiling_temperature(*substance.species, pressure);
    if (boils.ok()) return boils->value;
  }
  return std::nullopt;
}

double mean_feed_temperature(const StepResult& result) {
  const step::Model& model = *result.model;
  double sum = 0, capacity = 0;
  for (std::size_t p = 0; p < result.in.size(); ++p) {
    const step::StreamLine& line = result.in[p];
    const double here =
        line.amount * model.heat_capacity(result.values, model.part_state(p), line.temperature);
    capacity += here;
    sum += here * line.temperature;
  }
  return capacity > 0 ? sum / capacity : result.values[model.feed_temperature_slot(0)];
}

void fix_sought(step::StepInput& input, const StepResult& result) {
  const step::Model& model = *result.model;
  const std::string& id = model.slots()[model.sought()].id;
  const step::Typed found{result.values[model.sought()], 0};
  for (std::size_t f = 0; f < input.feeds.size(); ++f) {
    const std::string feed = "feed." + std::to_string(f);
    if (id == feed + ".temperature") input.feeds[f].temperature = found;
    if (id == feed + ".total") input.feeds[f].total = found;
    for (std::size_t p = 0; p < input.feeds[f].parts.size(); ++p) {
      if (id == feed + ".part." + std::to_string(p)) input.feeds[f].parts[p].figure = found;
    }
  }
  for (std::size_t j = 0; j < input.reactions.size(); ++j) {
    if (id == "reaction." + std::to_string(j) + ".progress") input.reactions[j].progress.figure = found;
  }
}

void add_mixing_cautions(step::Findings& findings, const StepResult& result, const StepResult* unheated) {
  if (unheated != nullptr) caution_boiling(findings, *unheated);
  caution_order(findings, result);
  caution_salts(findings, result);
  caution_gases(findings, result, unheated);
  explain_neutralisation(findings, result);
}

}  // namespace heatledger::mixing
