#include "core/mixing/mixing.hpp"

#include <algorithm>
#include <cmath>

#include "core/base/number_text.hpp"
#include "core/mixing/figure_spread.hpp"
#include "core/mixing/mixing_cautions.hpp"
#include "core/mixing/solution_chart.hpp"
#include "core/step/words.hpp"
#include "core/units/constants.hpp"

namespace heatledger::mixing {
namespace {

using molecule::Phase;
using step::Finding;
using step::Model;
using step::StepInput;
using step::StepResult;
using step::Typed;
using step::Work;

namespace d = units::dimension;

/// A strength that every table of heats of solution covers: the state from which what leaves is reckoned.
constexpr double kMiddleRatio = 10;

bool has_heats(const facts::Species& species) {
  if (species.compound == nullptr) return false;
  return std::any_of(facts::solution_heats().begin(), facts::solution_heats().end(),
                     [&](const facts::SolutionHeats& heats) {
                       return facts::find_solution_heats(species.compound->formula, heats.phase) == &heats;
                     });
}

/// Whether its heats are known against strength, so that a strength may be written.
bool has_curve(const facts::Species& species) {
  for (const char phase : {'s', 'l', 'g'}) {
    const facts::SolutionHeats* heats = facts::find_solution_heats(species.compound->formula, phase);
    if (heats != nullptr && (!heats->points.empty() || heats->symmetrical)) return true;
  }
  return false;
}

/// What is fed undissolved leaves dissolved.
void let_dissolve(StepInput& input) {
  for (std::size_t i = 0; i < input.substances.size(); ++i) {
    const std::shared_ptr<const facts::Species>& species = input.substances[i].species;
    if (species == nullptr || !has_heats(*species)) continue;
    const bool said = std::any_of(input.outlet.leaving.begin(), input.outlet.leaving.end(),
                                  [&](const step::Leaving& leaving) { return leaving.substance == i; });
    bool reacts = false, fed = false, dissolved = false;
    for (const step::StepReaction& reaction : input.reactions)
      reacts = reacts || std::find(reaction.substances.begin(), reaction.substances.end(), i) !=
                             reaction.substances.end();
    for (const step::Feed& feed : input.feeds) {
      for (const step::FeedPart& part : feed.parts) {
        if (part.substance != i) continue;
        fed = true;
        dissolved = dissolved || part.state.phase == Phase::Aqueous;
      }
    }
    if (said || reacts || !fed || dissolved) continue;  // as the reaction writes it, or as it is fed
    step::Leaving leaving;
    leaving.substance = i;
    leaving.state.phase = Phase::Aqueous;
    if (has_curve(*species))
      leaving.state.strength = molecule::Strength{molecule::Strength::Kind::WaterRatio, kMiddleRatio};
    input.outlet.leaving.push_back(std::move(leaving));
  }
}

void adiabatic(StepInput& input) {
  input.duty = Typed{0, 0};
  input.outlet.temperature.reset();
  input.sought = "outlet.temperature";
}

Finding finding(std::string id, std::string label, const units::Dimension& dimension,
                std::optional<uncertainty::Quantity> value) {
  Finding made;
  made.id = std::move(id);
  made.label = std::move(label);
  made.dimension = dimension;
  if (value) {
    made.value = *std::move(value);
  } else {
    made.why_missing = "It does not exist at these figures.";
  }
  return made;
}

/// What holding the temperature takes, line by line; minus signs are heat to be removed.
step::FindingGroup heats(const StepResult& result) {
  const Model& model = *result.model;
  step::FindingGroup group{"heats", "Heat of mixing", "at 25 °C; < 0 is set free", {}};
  for (std::size_t k = 0; k < result.dilutions.size(); ++k) {
    const step::DilutionLine& line = result.dilutions[k];
    const std::size_t substance = line.substance;
    Finding made = finding("dilution." + std::to_string(k), line.words, d::kEnergy,
                           spread_of(model, result.values,
                                     [substance](const Model& m, const std::vector<double>&, const Work& w) {
                                       const step::Dissolving& solution = w.dissolving;
                                       const double part =
                                           solution.tables != 0 ? solution.taken / solution.tables : 0;
                                       for (std::size_t s = 0; s < m.solution().solutes.size(); ++s) {
                                         if (m.solution().solutes[s].substance == substance)
                                           return std::optional<double>(-solution.set_free[s] * part);
                                       }
                                       return std::optional<double>();
                                     }));
    made.working = line.working;
    made.sources = {line.source};
    made.mark = line.set_free > 0 ? "set free" : line.set_free < 0 ? "taken up" : "";
    group.findings.push_back(std::move(made));
  }
  for (std::size_t j = 0; j < result.reactions.size(); ++j) {
    const step::ReactionLine& line = result.reactions[j];
    Finding made = finding(
        "reaction." + std::to_string(j), model.input().reactions[j].name, d::kEnergy,
        spread_of(model, result.values, [j](const Model& m, const std::vector<double>& v, const Work& w) {
          return std::optional<double>(w.extents[j] * m.reaction_heat_at(v, j, units::kReferenceTemperature));
        }));
    made.working = {step::amount_text(line.extent, false) + " × " +
                    display_signed(line.heat_25.value() / 1000, 2) + " ± " +
                    display_number(line.heat_25.u95() / 1000, 2) +
                    " kJ/mol, solutions as the reaction writes them"};
    made.sources = {model.input().reactions[j].heat.source};
    made.mark = line.set_free > 0 ? "set free" : line.set_free < 0 ? "taken up" : "";
    group.findings.push_back(std::move(made));
  }
  return group;
}

/// cp of the mixture as it leaves [J/K].
double mixture_capacity(const Model& model, const std::vector<double>& v, const Work& work) {
  const double t = v[model.outlet_temperature_slot()];
  double sum = 0;
  for (std::size_t i = 0; i < work.leaving.size(); ++i) {
    if (work.leaving[i] == 0) continue;
    sum += work.leaving[i] *
           (model.leaving_enthalpy(v, work, i, t + 0.5) - model.leaving_enthalpy(v, work, i, t - 0.5));
  }
  return sum;
}

step::FindingGroup strengths(const StepResult& result) {
  const Model& model = *result.model;
  step::FindingGroup group{"strengths", "Strength before and after", "", {}};
  for (std::size_t k = 0; k < result.dilutions.size(); ++k) {
    const step::DilutionLine& line = result.dilutions[k];
    const std::string name = model.input().substances[line.substance].name, id = std::to_string(k);
    const std::size_t substance = line.substance;
    Finding before =
        finding("before." + id, name + " as fed", d::kMassFraction, uncertainty::Quantity(line.before));
    if (line.before >= 1) before.text = "undissolved";
    group.findings.push_back(std::move(before));
    Finding after = finding(
        "after." + id, name + " in the mixture", d::kMassFraction,
        spread_of(
            model, result.values, [substance](const Model& m, const std::vector<double>&, const Work& w) {
              const double ratio = w.dissolving.ratio[substance];
              return ratio >= 0 ? std::optional<double>(thermo::mass_fraction(ratio, m.molar_mass(substance)))
                                : std::nullopt;
            }));
    if (!after.why_missing.empty()) {
      after.why_missing.clear();
      after.text = "none left";
    } else {
      after.working = {
          "by mass of it and the water given to it, " +
          step::digits((1 - line.after) / line.after * model.molar_mass(substance) / kWaterMolarMass) +
          " mol of water per mole"};
    }
    group.findings.push_back(std::move(after));
  }
  const FigureOf mass = [](const Model& m, const std::vector<double>&, const Work& w) {
    double sum = 0;
    for (std::size_t i = 0; i < w.leaving.size(); ++i) sum += w.leaving[i] * m.molar_mass(i);
    return std::optional<double>(sum);
  };
  group.findings.push_back(
      finding("mass", "mass of the mixture", d::kMass, spread_of(model, result.values, mass)));
  Finding cp = finding(
      "cp", "its heat capacity", d::kMassHeatCapacity,
      spread_of(model, result.values, [&](const Model& m, const std::vector<double>& v, const Work& w) {
        const double all = *mass(m, v, w);
        return all > 0 ? std::optional<double>(mixture_capacity(m, v, w) / all) : std::nullopt;
      }));
  cp.working = {
      "of the solution by its table where one is known, of everything else by its own heat capacity"};
  group.findings.push_back(std::move(cp));
  return group;
}

step::FindingGroup adiabatic_group(const StepResult& result) {
  const Model& model = *result.model;
  step::FindingGroup group{"adiabatic", "When no heat is taken away", "", {}};
  const std::size_t slot = model.outlet_temperature_slot();
  Finding end = finding(
      "adiabatic.temperature", "adiabatic mixing temperature", d::kTemperature,
      spread_of(model, result.values, [slot](const Model&, const std::vector<double>& v, const Work&) {
        return std::optional<double>(v[slot]);
      }));
  if (end.why_missing.empty()) {
    end.unfavourable = end.value.value() + end.value.u95();
    if (const std::optional<double> boiling = water_boils(result); boiling && end.value.value() > *boiling)
      end.mark = "notional: it boils before";
  }
  for (const step::Answer& answer : result.answers) {
    if (answer.id == step::FigureId::Sought) end.working = answer.working;
  }
  const double cold = mean_feed_temperature(result);
  Finding rise = finding("adiabatic.rise", "rise above the feeds mixed without it", d::kTemperatureDifference,
                         uncertainty::Quantity(result.values[slot] - cold, end.value.parts()));
  rise.working = {"feeds mixed by their heat capacities alone: " + step::celsius(cold)};
  group.findings.push_back(std::move(end));
  group.findings.push_back(std::move(rise));
  return group;
}

}  // namespace

Result<Mixed> mix(StepInput input, step::Lookups& lookups, const step::SolveOptions& options) {
  let_dissolve(input);
  if (input.sought == "duty" && !input.outlet.temperature) adiabatic(input);
  StepInput free = input;
  adiabatic(free);
  Result<StepResult> solved = step::solve_step(std::move(input), lookups, options);
  if (!solved.ok()) return solved.error();
  Mixed mixed{std::move(solved).value(), {}};
  // Rises from a process temperature belong to a vessel that is held; here the feeds meet, each at its own.
  std::vector<step::Answer>& answers = mixed.result.answers;
  answers.erase(std::remove_if(answers.begin(), answers.end(),
                               [](const step::Answer& answer) {
                                 return answer.id == step::FigureId::AdiabaticRise ||
                                        answer.id == step::FigureId::AdiabaticEnd ||
                                        answer.id == step::FigureId::EndByEnthalpy ||
                                        answer.id == step::FigureId::EndWithVessel ||
                                        answer.id == step::FigureId::ThermalInertia;
                               }),
                answers.end());
  const StepResult& result = mixed.result;
  step::Findings& findings = mixed.findings;
  findings.groups.push_back(heats(result));
  const bool already = result.model->outlet_sought() && result.duty == 0;
  std::optional<StepResult> alone;
  if (!already) {
    // With the amounts as they came out, should one of them be the blank that was sought.
    fix_sought(free, result);
    Result<StepResult> unheated = step::solve_step(std::move(free), lookups);
    if (unheated.ok()) {
      alone = std::move(unheated).value();
    } else {
      findings.notes.push_back("No adiabatic mixing temperature: " + unheated.error().message);
    }
  }
  const StepResult* unheated = already ? &result : alone ? &*alone : nullptr;
  if (unheated != nullptr) findings.groups.push_back(adiabatic_group(*unheated));
  findings.groups.push_back(strengths(result));
  add_charts(findings, result);
  add_mixing_cautions(findings, result, unheated);
  findings.closure = result.closure.sentence;
  findings.closes = result.closure.heat_closes;
  return mixed;
}

}  // namespace heatledger::mixing
