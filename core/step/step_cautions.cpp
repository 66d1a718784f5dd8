#include "core/step/step_cautions.hpp"

#include <algorithm>
#include <cmath>

#include "core/base/number_text.hpp"
#include "core/step/equilibrium.hpp"
#include "core/step/words.hpp"
#include "core/thermo/saturation.hpp"
#include "core/units/constants.hpp"

namespace heatledger::step {
namespace {

using molecule::Phase;

std::string range_text(const Curve& curve) {
  return display_number(curve.from(), 0) + " to " + display_number(curve.to(), 0) + " K";
}

void caution_ranges(StepResult& result, const std::vector<StreamLine>& lines) {
  for (const StreamLine& line : lines) {
    if (line.amount == 0) continue;
    for (const StateCurve& state : result.model->states()) {
      if (state.substance != line.substance || state.state.phase != line.state.phase || !state.curve)
        continue;
      if (state.curve->covers(line.temperature)) continue;
      result.cautions.push_back(result.model->input().substances[line.substance].name + " at " +
                                celsius(line.temperature) + " is outside the range of its heat capacity, " +
                                range_text(*state.curve) +
                                "; the value at the end of the range is carried on.");
    }
  }
}

/// Gas that would condense, liquid that would boil, gas that is no longer ideal.
void caution_phases(StepResult& result, const std::vector<StreamLine>& lines, bool leaving) {
  const StepInput& input = result.model->input();
  for (std::size_t s = 0; s < (leaving ? 1 : input.feeds.size()); ++s) {
    const double pressure = result.values[*result.model->slot(
        leaving ? std::string("outlet.pressure") : "feed." + std::to_string(s) + ".pressure")];
    double gas = 0;
    for (const StreamLine& line : lines) {
      if ((leaving || line.stream == s) && line.state.phase == Phase::Gas) gas += line.amount;
    }
    for (const StreamLine& line : lines) {
      if ((!leaving && line.stream != s) || line.amount == 0) continue;
      const SubstanceInput& substance = input.substances[line.substance];
      if (substance.species == nullptr || substance.species->coded) continue;
      const std::string at = substance.name + " at " + celsius(line.temperature);
      const bool split = leaving && result.model->vapour_state(line.substance).has_value() &&
                         input.kind == StepKind::ThroughFlow;
      if (line.state.phase == Phase::Gas) {
        const double partial = pressure * line.amount / gas;
        if (const std::string text = thermo::ideal_gas_caution(*substance.species, line.temperature, partial);
            !text.empty())
          result.cautions.push_back(text);
        const Result<thermo::Saturation> over = thermo::vapour_pressure(*substance.species, line.temperature);
        if (!split && over.ok() && partial > 1.02 * over->value) {
          result.cautions.push_back(
              at + " is kept as gas although it would condense: " + display_number(partial / 1000, 1) +
              " kPa against a saturation pressure of " + display_number(over->value / 1000, 1) + " kPa.");
        }
      } else if (line.state.phase == Phase::Liquid && !split) {
        const Result<thermo::Saturation> boils = thermo::boiling_temperature(*substance.species, pressure);
        if (boils.ok() && line.temperature > boils->value + 0.05) {
          result.cautions.push_back(at + " is kept liquid above its boiling point of " +
                                    celsius(boils->value) + " at " + display_number(pressure / 1000, 0) +
                                    " kPa.");
        }
      }
    }
  }
}

void caution_heats(StepResult& result) {
  for (const StepReaction& reaction : result.model->input().reactions) {
    const ReactionHeat& heat = reaction.heat;
    if (!heat.typed) continue;
    if (heat.includes_mixing == Includes::Unknown) {
      result.cautions.push_back(
          "The typed heat of " + reaction.name +
          " does not say whether it holds mixing, dilution, evaporation and loss of gas.");
    } else if (heat.includes_mixing == Includes::Yes) {
      result.notes.push_back("Mixing and dilution are in the measured heat of " + reaction.name + ".");
    }
    if (!reaction.reaction->checkable) {
      result.notes.push_back("The element balance of " + reaction.name + " is not checkable.");
    }
  }
}

/// Limits, measured heats and states that the heat of dilution rests on.
void caution_solutions(StepResult& result, const Work& work) {
  const SolutionPlan& plan = result.model->solution();
  const Dissolving& solution = work.dissolving;
  const bool flow = result.model->input().kind == StepKind::ThroughFlow;
  if (plan.solutes.empty()) return;
  result.notes.push_back(
      "An amount of a solution brings its water along: by mass it is the solution, by moles what is "
      "dissolved.");
  if (plan.typed) {
    result.notes.push_back("The typed heat of mixing takes the place of the tables, which give " +
                           heat_text(-solution.tables, flow) + ".");
  } else if (plan.in_measured == Includes::Yes && solution.tables != 0) {
    result.notes.push_back("Heat of dilution is in the measured figure; by the tables it would be " +
                           heat_text(-solution.tables, flow) + ".");
  } else if (plan.in_measured == Includes::Unknown && solution.tables != 0) {
    result.cautions.push_back(
        "The measured heat does not say whether it holds dilution: with it by the tables " +
        heat_text(-solution.tables, flow) + " are added, without none; the larger heat is used.");
  }
  if (solution.share.two_limits && !plan.typed) {
    result.cautions.push_back(
        "Several solutes share the water. Shared by moles their heats of solution are " +
        heat_text(solution.share.by_mole, flow) + ", with all water to the stronger " +
        heat_text(solution.share.to_stronger, flow) +
        "; the larger heat release is used, and the heat of mixing the solutes themselves is left out. Type "
        "a "
        "measured heat of the mixture where it matters.");
  }
  if (std::fabs(result.values[result.model->outlet_temperature_slot()] - units::kReferenceTemperature) > 1 &&
      solution.taken != 0) {
    result.notes.push_back(
        "Heats of solution are those of 25 °C, carried to other temperatures by the heat capacity of the "
        "solution.");
  }
}

/// Partial molar heat capacities of ions are no bulk heat capacity.
void caution_ions(StepResult& result) {
  double ions = 0, all = 0;
  std::string names;
  for (const StreamLine& line : result.out) {
    const bool at_infinite_dilution = line.state.phase == Phase::Aqueous && !line.state.strength;
    for (const StateCurve& known : result.model->states()) {
      if (known.substance != line.substance || known.state.phase != line.state.phase || !known.curve)
        continue;
      const double capacity = std::fabs(line.amount * known.curve->heat_capacity(line.temperature));
      all += capacity;
      if (at_infinite_dilution) {
        ions += capacity;
        names += (names.empty() ? "" : ", ") + result.model->input().substances[line.substance].name;
      }
      break;
    }
  }
  if (!(ions > 0.1 * all) || result.model->input().mass_heat_capacity) return;
  result.cautions.push_back(
      "Over 10 % of the heat capacity of what leaves is that of " + names +
      " at infinite dilution, partial molar figures that are no bulk heat capacity. Type "
      "the cp of the mass.");
}

void caution_charge(StepResult& result) {
  const StepInput& input = result.model->input();
  if (input.kind != StepKind::Charge || input.reactions.empty() || input.charge.followed) return;
  if (!input.charge.rate_constant) result.notes.push_back("Peak heat rate unknown: no rate law.");
  result.notes.push_back("A mean heat rate is not the duty to design for.");
  for (const Answer& answer : result.answers) {
    if (answer.id != FigureId::BoiledOff || answer.value.value() == 0) continue;
    double there = 0;
    for (const StreamLine& line : result.out) {
      if (line.substance == *input.charge.solvent) there += line.mass;
    }
    if (answer.value.value() > there) {
      result.cautions.push_back("The solvent boils dry: " + mass_text(answer.value.value(), false) +
                                " to boil off, " + mass_text(there, false) + " there.");
    }
    result.cautions.push_back(
        "Reflux holds only while the condenser has cooling and solvent remains; swelling is not assessed.");
  }
}

double lowest_limit(const StepResult& result) {
  double limit = 1e9;
  if (result.model->input().charge.limit_temperature)
    limit = result.model->input().charge.limit_temperature->value;
  const double pressure = result.values[*result.model->slot("outlet.pressure")];
  for (const StreamLine& line : result.out) {
    const SubstanceInput& substance = result.model->input().substances[line.substance];
    if (line.state.phase == Phase::Liquid && substance.species != nullptr && !substance.species->coded) {
      const Result<thermo::Saturation> boils = thermo::boiling_temperature(*substance.species, pressure);
      if (boils.ok()) limit = std::min(limit, boils->value);
    }
    for (const StateCurve& state : result.model->states()) {
      if (state.substance == line.substance && state.state.phase == line.state.phase && state.curve)
        limit = std::min(limit, state.curve->to());
    }
  }
  return limit;
}

/// One log mean over the whole way does not see where something condenses or boils between the two ends.
void caution_conductance(StepResult& result) {
  const bool asked = std::any_of(result.answers.begin(), result.answers.end(),
                                 [](const Answer& answer) { return answer.id == FigureId::Conductance; });
  bool splits = false;
  for (std::size_t s = 0; s < result.model->input().substances.size(); ++s)
    splits = splits || result.model->vapour_state(s).has_value();
  const StepInput& input = result.model->input();
  const bool end_to_end = input.kind == StepKind::ThroughFlow && input.reactions.empty();
  if (!asked || !splits || !end_to_end) return;
  result.cautions.push_back(
      "Something condenses or boils on the way, so one log mean from end to end misses the real course of "
      "temperature: reckon UA zone by zone. Its ± does not cover this.");
}

}  // namespace

void add_cautions(StepResult& result, const Work& work) {
  result.cautions.insert(result.cautions.end(), result.model->cautions().begin(),
                         result.model->cautions().end());
  caution_ranges(result, result.in);
  caution_ranges(result, result.out);
  caution_phases(result, result.in, false);
  caution_phases(result, result.out, true);
  caution_heats(result);
  for (std::size_t j = 0; j < result.reactions.size(); ++j) {
    const std::optional<EquilibriumCheck> check = equilibrium_check(result, j);
    if (!check || !check->beyond()) continue;
    result.cautions.push_back("The progress typed for " + result.model->input().reactions[j].name +
                              " lies beyond equilibrium at " +
                              celsius(result.values[result.model->outlet_temperature_slot()]) +
                              " by entropies of the tables: what leaves would react back.");
  }
  caution_solutions(result, work);
  caution_ions(result);
  caution_charge(result);
  caution_conductance(result);
  if (result.closure.duty_by_formation) {
    const double other = *result.closure.duty_by_formation,
                 scale =
                     std::fabs(work.outlet_heat) + std::fabs(work.inlet_heat) + std::fabs(work.reaction_heat);
    if (std::fabs(other - result.duty) > 1e-6 * scale) {
      const bool flow = result.model->input().kind == StepKind::ThroughFlow;
      result.notes.push_back("By formation enthalpies alone the duty is " + heat_text(other, flow) +
                             "; the heats taken give " + heat_text(result.duty, flow) + ".");
    }
  }
  if (result.exact_inputs > 0)
    result.notes.push_back(std::to_string(result.exact_inputs) + " typed inputs taken as exact.");
  std::vector<std::string> once;
  for (std::string& caution : result.cautions) {
    if (std::find(once.begin(), once.end(), caution) == once.end()) once.push_back(std::move(caution));
  }
  result.cautions = std::move(once);
}

std::string why_no_figure(const Model& model, FigureId id, const std::vector<double>& v) {
  switch (id) {
    case FigureId::Conductance:
      return "the medium is not " + std::string(v[model.duty_slot()] > 0 ? "warmer" : "colder") +
             " than the process on its whole way.";
    case FigureId::Time:
      return "no heat is set free.";
    case FigureId::BoilingPoint:
    case FigureId::BoiledOff:
      return "the mixture has no boiling point by the data at hand.";
    default:
      return "it does not exist at these figures.";
  }
}

std::vector<std::string> figure_working(const StepResult& result, const Work& work, FigureId id) {
  const Model& model = *result.model;
  const std::vector<double>& v = result.values;
  const double held = process_temperature(model, v);
  const auto find = [&](FigureId which) {
    for (const Answer& answer : result.answers) {
      if (answer.id == which) return answer.value.value();
    }
    return 0.0;
  };
  const bool flow = model.input().kind == StepKind::ThroughFlow;
  const bool reacts = !model.input().reactions.empty(), dissolves = !model.solution().solutes.empty();
  const double free =
      (reacts ? find(FigureId::HeatSetFree) : 0) + (dissolves ? find(FigureId::HeatOfDilution) : 0);
  switch (id) {
    case FigureId::HeatOfDilution: {
      std::vector<std::string> lines;
      for (const DilutionLine& line : result.dilutions) {
        lines.push_back(line.words + ": " + heat_text(line.set_free, flow));
        lines.insert(lines.end(), line.working.begin(), line.working.end());
      }
      return lines;
    }
    case FigureId::Conductance: {
      const bool along = flow && model.input().reactions.empty();
      return {
          along
              ? "duty ÷ log mean temperature difference of the two ends, counter-flow"
              : "heat ÷ log mean temperature difference between the medium and the mixed process at its end"};
    }
    case FigureId::HeatPerMass:
      return {heat_text(free, flow) + " ÷ " + mass_text(mass_fed(model, work), flow)};
    case FigureId::MeanDuty:
      return {heat_text(free, false) + " ÷ " + display_number(model.input().time->value / 3600, 2) + " h"};
    case FigureId::Time:
      return {heat_text(free, false) + " ÷ " + heat_text(model.input().charge.cooling->value, true) +
              " of cooling"};
    case FigureId::PeakDuty:
      return {heat_text(free, false) + " × " + digits(model.input().charge.rate_constant->value * 3600) +
              " /h, first order, held at " + celsius(held)};
    case FigureId::AdiabaticRise: {
      const double capacity = charge_heat_capacity(model, work, v, held), mass = mass_fed(model, work);
      return {"heat set free at " + celsius(held) + ": " + heat_text(free, false),
              "÷ (" + mass_text(mass, false) + " × " + digits(capacity / mass / 1000) + " kJ/(kg K))"};
    }
    case FigureId::AdiabaticEnd:
      return {celsius(held) + " + " + digits(find(FigureId::AdiabaticRise)) + " K"};
    case FigureId::ThermalInertia: {
      const double capacity = charge_heat_capacity(model, work, v, held);
      return {"1 + " + digits(v[*model.slot("vessel.heat_capacity")] / 1000) + " kJ/K ÷ " +
              digits(capacity / 1000) + " kJ/K"};
    }
    default:
      return {};
  }
}

std::string figure_mark(const StepResult& result, FigureId id, double value) {
  switch (id) {
    case FigureId::AdiabaticEnd:
    case FigureId::EndByEnthalpy:
    case FigureId::EndWithVessel:
      return value > lowest_limit(result) ? "notional" : "";
    case FigureId::AdiabaticRise:
      return process_temperature(*result.model, result.values) + value > lowest_limit(result) ? "notional"
                                                                                              : "";
    default:
      return {};
  }
}

}  // namespace heatledger::step
