#include "core/step/step.hpp"

#include <algorithm>
#include <cmath>

#include "core/base/number_text.hpp"
#include "core/molecule/elements.hpp"
#include "core/step/closure.hpp"
#include "core/step/sought.hpp"
#include "core/step/step_cautions.hpp"
#include "core/step/words.hpp"
#include "core/units/constants.hpp"

namespace heatledger::step {
namespace {

bool is_flow(const Model& model) {
  return model.input().kind == StepKind::ThroughFlow;
}

std::optional<double> formation(const Model& model, Lookups& lookups, std::size_t substance,
                                const State& state) {
  const std::shared_ptr<const facts::Species>& species = model.input().substances[substance].species;
  if (species == nullptr) return std::nullopt;
  const std::shared_ptr<const StateFacts> facts = lookups.state(species, state);
  return facts->formation.ok() ? std::optional<double>(facts->formation->value.value()) : std::nullopt;
}

/// The strength of a substance in one part of the feeds: mass fraction, 1 for what is not dissolved.
double strength_of(const Model& model, const StateCurve& state) {
  if (state.state.phase != molecule::Phase::Aqueous) return 1;
  const double mass = model.molar_mass(state.substance);
  const std::optional<double> ratio =
      state.state.strength ? thermo::water_ratio(*state.state.strength, mass) : std::nullopt;
  return ratio ? thermo::mass_fraction(*ratio, mass) : 0;
}

std::string per_cent(double fraction) {
  return display_number(100 * fraction, fraction > 0.0995 ? 0 : fraction > 0.00995 ? 1 : 2);
}

/// "dilution of sulfuric acid, 96 to 78 wt%".
std::string dilution_words(const DilutionLine& line, const std::string& name, bool included) {
  const std::string after = line.after > 0 ? per_cent(line.after) + " wt%" : "that of the reaction";
  std::string words;
  if (line.before >= 1) {
    words = "dissolving of " + name + " to " + after;
  } else if (line.before == 0) {
    words = "concentration of " + name + " from infinite dilution to " + after;
  } else {
    words = (line.after > line.before ? "concentration of " : "dilution of ") + name + ", " +
            per_cent(line.before) + (line.after > 0 ? " to " : " wt% to ") + after;
  }
  return words + (included ? ": in the measured figure" : "");
}

void add_dilutions(StepResult& result, const Work& work) {
  const Model& model = *result.model;
  const SolutionPlan& plan = model.solution();
  const Dissolving& solution = work.dissolving;
  const bool flow = is_flow(model);
  for (std::size_t s = 0; s < plan.solutes.size(); ++s) {
    const SolutePlan& solute = plan.solutes[s];
    DilutionLine line;
    line.substance = solute.substance;
    double fed = 0, mass = 0, with_water = 0;
    for (std::size_t p = 0; p < work.parts.size(); ++p) {
      const StateCurve& state = model.states()[model.part_state(p)];
      if (state.substance != solute.substance || !(work.parts[p] > 0)) continue;
      const double fraction = strength_of(model, state),
                   here = work.parts[p] * model.molar_mass(solute.substance);
      fed += work.parts[p];
      mass += here;
      with_water += fraction > 0 ? here / fraction : 0;
    }
    line.by_tables = solution.set_free[s];
    if (!(fed > 0) && line.by_tables == 0) continue;
    line.before = with_water > 0 ? mass / with_water : fed > 0 ? 0 : 1;
    const double ratio = solution.ratio[solute.substance];
    line.after = ratio >= 0 ? thermo::mass_fraction(ratio, model.molar_mass(solute.substance)) : 0;
    if (ratio < 0 && line.by_tables == 0) continue;
    // A typed heat or a measured one takes the place of all tables; each line keeps its share.
    line.set_free = solution.tables != 0 ? line.by_tables * (solution.taken / solution.tables) : 0;
    line.source = solute.source;
    const bool included = plan.in_measured != Includes::No && !plan.typed && solution.taken == 0;
    line.words = dilution_words(line, model.input().substances[solute.substance].name, included);
    if (ratio >= 0) {
      const std::size_t place = static_cast<std::size_t>(
          std::find(solution.active.begin(), solution.active.end(), s) - solution.active.begin());
      line.working.push_back(
          amount_text(solution.pool[place].amount, flow) + " leaves in " + digits(ratio) +
          " mol of water per mole: heat of solution " + display_number(solution.share.heat[place] / 1000, 2) +
          " ± " +
          display_number(std::hypot(solution.share.u95[place], solution.share.bridge[place]) / 1000, 2) +
          " kJ/mol");
    }
    line.working.push_back("set free at 25 °C on the way from how it is fed: " +
                           heat_text(line.by_tables, flow) + ", " + solute.source);
    result.dilutions.push_back(std::move(line));
  }
}

StreamLine stream_line(const Model& model, Lookups& lookups, const std::vector<double>& v, std::size_t state,
                       double amount, double temperature) {
  const StateCurve& of = model.states()[state];
  StreamLine line;
  line.substance = of.substance;
  line.state = of.state;
  line.amount = amount;
  line.mass = amount * model.molar_mass(of.substance);
  line.temperature = temperature;
  line.heat = amount * model.enthalpy(v, state, temperature);
  if (const std::optional<double> standard = formation(model, lookups, of.substance, of.state)) {
    const double shift = of.shift ? v[*of.shift] : 0;
    line.enthalpy = amount * (*standard - shift) + line.heat;
  }
  return line;
}

/// What leaves in water leaves as strong as the water makes it.
void as_dissolved(StreamLine& line, const Model& model, const std::vector<double>& v, const Work& work) {
  const StateCurve& state = model.states()[model.leaving_state(line.substance)];
  const std::vector<double>& ratio = work.dissolving.ratio;
  const double shift = state.dissolves ? v[*state.shift] : 0;
  if (ratio.empty() || ratio[line.substance] < 0) {
    line.heat -= line.amount * shift;
    return;
  }
  const double whole = model.leaving_enthalpy(v, work, line.substance, line.temperature),
               plain = model.enthalpy(v, model.leaving_state(line.substance), line.temperature);
  if (line.enthalpy) *line.enthalpy += line.amount * (whole - plain);
  line.heat = line.amount * (whole - shift - work.dissolving.above_leaving[line.substance]);
  if (ratio[line.substance] > 0)
    line.state = State{molecule::Phase::Aqueous,
                       molecule::Strength{molecule::Strength::Kind::WaterRatio, ratio[line.substance]}};
}

void add_streams(StepResult& result, const Work& work, Lookups& lookups) {
  const Model& model = *result.model;
  const std::vector<double>& v = result.values;
  std::size_t part = 0;
  for (std::size_t f = 0; f < model.input().feeds.size(); ++f) {
    for (std::size_t p = 0; p < model.input().feeds[f].parts.size(); ++p, ++part) {
      StreamLine line = stream_line(model, lookups, v, model.part_state(part), work.parts[part],
                                    v[model.feed_temperature_slot(f)]);
      const StateCurve& state = model.states()[model.part_state(part)];
      if (state.dissolves) line.heat -= work.parts[part] * v[*state.shift];
      line.stream = f;
      result.in.push_back(std::move(line));
    }
  }
  const double temperature = v[model.outlet_temperature_slot()];
  for (std::size_t i = 0; i < work.leaving.size(); ++i) {
    const std::optional<std::size_t> vapour_state = model.vapour_state(i);
    const double vapour = vapour_state ? work.vapour[i] : 0;
    if (vapour > 0) result.out.push_back(stream_line(model, lookups, v, *vapour_state, vapour, temperature));
    if (work.leaving[i] - vapour > 0) {
      StreamLine line =
          stream_line(model, lookups, v, model.leaving_state(i), work.leaving[i] - vapour, temperature);
      as_dissolved(line, model, v, work);
      result.out.push_back(std::move(line));
    }
  }
}

void add_reactions(StepResult& result, const Work& work) {
  const Model& model = *result.model;
  for (std::size_t j = 0; j < work.extents.size(); ++j) {
    ReactionLine line;
    line.extent = work.extents[j];
    const double at_25 = model.reaction_heat_at(result.values, j, units::kReferenceTemperature);
    const uncertainty::Quantity& typed = model.input().reactions[j].heat.as_written;
    line.heat_25 = uncertainty::Quantity(at_25, typed.parts());
    line.heat_at_end =
        model.reaction_heat_at(result.values, j, result.values[model.outlet_temperature_slot()]);
    line.set_free = -line.extent * at_25;
    result.reactions.push_back(std::move(line));
  }
}

void add_heats(StepResult& result, const Work& work) {
  const Model& model = *result.model;
  const StepInput& input = model.input();
  const auto add = [&](HeatLine::Kind kind, std::string label, double in) {
    if (in != 0) result.heats.push_back({kind, std::move(label), in});
  };
  for (std::size_t f = 0; f < input.feeds.size(); ++f) {
    double heat = 0;
    for (const StreamLine& line : result.in) {
      if (line.stream == f) heat += line.heat;
    }
    add(HeatLine::Kind::Stream, input.feeds[f].name, heat);
  }
  for (std::size_t j = 0; j < input.reactions.size(); ++j)
    add(HeatLine::Kind::Reaction, input.reactions[j].name,
        -work.extents[j] * model.reaction_heat(result.values, j));
  double dilution = 0;
  for (const DilutionLine& line : result.dilutions) {
    dilution += line.set_free;
    add(HeatLine::Kind::Dilution, line.words, line.set_free);
  }
  // A typed heat of mixing where the tables have none to share it out by.
  add(HeatLine::Kind::Dilution, "heat of mixing, typed", work.dissolving.taken - dilution);
  add(HeatLine::Kind::Work, "shaft work", result.values[*model.slot("shaft")]);
  add(HeatLine::Kind::Duty, "duty", result.duty);
  add(HeatLine::Kind::Loss, "departure from ideal gas", -work.departure);
  add(HeatLine::Kind::Loss, "heat loss", -result.values[*model.slot("loss")]);
  double vapour = 0, rest = 0;
  for (const StreamLine& line : result.out)
    (line.state.phase == molecule::Phase::Gas ? vapour : rest) += line.heat;
  if (vapour != 0 && rest != 0) {
    add(HeatLine::Kind::Stream, "what leaves as gas", -vapour);
    add(HeatLine::Kind::Stream, "what leaves as liquid or solid", -rest);
  } else {
    add(HeatLine::Kind::Stream, "what leaves", -(vapour + rest));
  }
  add(HeatLine::Kind::Vessel, "vessel", -work.vessel_heat);
}

std::vector<std::string> duty_working(const StepResult& result, const Work& work) {
  const bool flow = is_flow(*result.model);
  const auto heat = [&](double value) { return heat_text(value, flow); };
  std::vector<std::string> lines;
  double in = 0, out = 0;
  for (const StreamLine& line : result.in) in += line.heat;
  for (const StreamLine& line : result.out) out += line.heat;
  lines.push_back("what leaves, from 25 °C: " + heat(out));
  lines.push_back("less what enters, from 25 °C: " + heat(in));
  for (std::size_t j = 0; j < result.reactions.size(); ++j) {
    const ReactionLine& line = result.reactions[j];
    lines.push_back("plus " + result.model->input().reactions[j].name + ": " +
                    amount_text(line.extent, flow) + " × (" + display_number(line.heat_25.value() / 1000, 2) +
                    " kJ/mol) = " + heat(-line.set_free));
  }
  for (const DilutionLine& line : result.dilutions)
    lines.push_back("less " + line.words + ": " + heat(line.set_free));
  if (work.vessel_heat != 0) lines.push_back("plus the vessel: " + heat(work.vessel_heat));
  const double loss = result.values[*result.model->slot("loss")],
               shaft = result.values[*result.model->slot("shaft")];
  if (work.departure != 0) lines.push_back("plus departure from ideal gas: " + heat(work.departure));
  if (loss != 0) lines.push_back("plus heat loss: " + heat(loss));
  if (shaft != 0) lines.push_back("less shaft work: " + heat(shaft));
  lines.push_back("= duty " + heat(result.duty) +
                  (result.duty == 0 ? ", adiabatic" : ", " + duty_word(result.duty)));
  return lines;
}

void add_answers(StepResult& result, Work& work, const SolveOptions& options) {
  const Model& model = *result.model;
  const std::vector<FigureId> ids = figures_of(model);
  const std::vector<std::optional<FigureSpread>> spreads = first_order(model, ids, result.values);
  std::vector<std::optional<DrawnFigure>> drawn(ids.size());
  if (options.draws) drawn = draw_figures(model, ids, result.values, options.draw);
  for (std::size_t i = 0; i < ids.size(); ++i) {
    if (!spreads[i]) {
      result.notes.push_back("No " + figure_label(model, ids[i]) + ": " +
                             why_no_figure(model, ids[i], result.values));
      continue;
    }
    Answer answer;
    answer.id = ids[i];
    answer.label = figure_label(model, ids[i]);
    answer.dimension = figure_dimension(model, ids[i]);
    answer.value = spreads[i]->value;
    answer.shares = spreads[i]->shares;
    answer.drawn = drawn[i];
    if (ids[i] == FigureId::Sought) {
      answer.working = duty_working(result, work);
      if (model.sought() == model.duty_slot()) answer.mark = duty_word(result.duty);
    } else {
      answer.working = figure_working(result, work, ids[i]);
      answer.mark = figure_mark(result, ids[i], answer.value.value());
    }
    result.answers.push_back(std::move(answer));
  }
}

}  // namespace

std::string duty_word(double duty) {
  return duty > 0 ? "supply" : duty < 0 ? "remove" : "";
}

Result<StepResult> solve_step(StepInput input, Lookups& lookups, const SolveOptions& options) {
  Result<Model> built = Model::of(std::move(input), lookups);
  if (!built.ok()) return built.error();
  StepResult result;
  result.model = std::make_shared<const Model>(std::move(built).value());
  const Model& model = *result.model;
  result.values = model.values();
  Work work;
  if (const Status solved = solve_sought(model, result.values, work); !solved.ok()) return solved.error();
  if (const Status present = model.curves_present(result.values, work); !present.ok()) return present.error();
  result.duty = result.values[model.duty_slot()];
  for (const Slot& slot : model.slots()) {
    if (slot.blank && slot.typed && slot.spread.parts().empty() &&
        slot.id != model.slots()[model.sought()].id)
      ++result.exact_inputs;
  }
  if (const Status present = model.solutions_present(work); !present.ok()) return present.error();
  add_streams(result, work, lookups);
  add_dilutions(result, work);
  add_reactions(result, work);
  add_heats(result, work);
  result.closure = close(result, work);
  add_answers(result, work, options);
  add_cautions(result, work);
  return result;
}

std::vector<std::string> step_conventions(StepKind kind) {
  std::vector<std::string> list = {
      "Q > 0 is heat to the process; heats of reaction below zero are exothermic. Streams count from 25 °C "
      "and 100 kPa.",
      "The phase written governs: nothing changes its phase unless it is said to. Gases and mixtures are "
      "ideal.",
      "Conversion is consumed / fed, selectivity turned into the product / consumed, yield their product.",
      "± is the 95 % interval of the data of what is written; reactions that are not listed, decomposition, "
      "mixing that "
      "is not listed, a rate law outside its range and human error are not in it."};
  if (kind == StepKind::Charge) {
    list.push_back(
        "Adiabatic rise = heat set free / (m cp): all that is charged, at process temperature, liquid held "
        "liquid, "
        "vessel left out.");
    list.push_back(
        "Cooling failure: classes after Stoessel (1993), a tie to the worse class; T_D24 is typed, never "
        "estimated; under ± the worst class that holds 2.5 % of the draws.");
  }
  return list;
}

}  // namespace heatledger::step
