// From what a person has put down to the list of numbers and the plans that the arithmetic walks.
#include <algorithm>
#include <cmath>

#include "core/base/check.hpp"
#include "core/step/model.hpp"
#include "core/units/constants.hpp"

namespace heatledger::step {

namespace {

using molecule::Phase;
using uncertainty::Quantity;
using uncertainty::SourceKind;

// Where a search may look [SI]. Temperatures: from where air is liquid to beyond any flame.
constexpr double kColdest = 100, kHottest = 5000;
constexpr double kLeastPressure = 1e2, kMostPressure = 1e8;
constexpr double kFar = 1e15;  ///< amounts, heats: the search widens from the scale of the step up to here

/// FNV-1a: blanks of different steps keep different errors through their title and id.
std::uint64_t text_hash(const std::string& text) {
  std::uint64_t hash = 14695981039346656037ULL;
  for (const char c : text) hash = (hash ^ static_cast<unsigned char>(c)) * 1099511628211ULL;
  return hash;
}

Error blank_error(const std::string& id, const std::string& what) {
  return Error{"step.blank", "The " + what + " is not filled in.", id,
               "Type it, or mark it as the figure that is sought."};
}

bool same_strength(const std::optional<molecule::Strength>& a, const std::optional<molecule::Strength>& b) {
  if (a.has_value() != b.has_value()) return false;
  return !a || (a->kind == b->kind && a->value == b->value);
}

bool condensed(Phase phase) {
  return phase != Phase::Gas;
}

}  // namespace

class ModelBuilder {
 public:
  ModelBuilder(StepInput input, Lookups& lookups) : lookups_(lookups) { model_.input_ = std::move(input); }

  Result<Model> build() {
    if (const Status chosen = choose_sought(); !chosen.ok()) return chosen.error();
    for (const auto stage :
         {&ModelBuilder::substances, &ModelBuilder::reactions, &ModelBuilder::feeds, &ModelBuilder::outlet,
          &ModelBuilder::reflux, &ModelBuilder::wall, &ModelBuilder::solutions, &ModelBuilder::sought}) {
      if (const Status done = (this->*stage)(); !done.ok()) return done.error();
    }
    return std::move(model_);
  }

 private:
  const StepInput& input() const { return model_.input_; }

  /// Lays out a number. An empty blank is only allowed where it is sought.
  Result<std::size_t> blank(const std::string& id, const std::string& label,
                            const units::Dimension& dimension, const Blank& typed, double low, double high,
                            std::optional<double> otherwise = {}) {
    const bool is_sought = id == sought_;
    if (!typed && !is_sought && !otherwise) return blank_error(id, label);
    Slot slot;
    slot.id = id;
    slot.label = label;
    slot.dimension = dimension;
    slot.low = low;
    slot.high = high;
    slot.blank = true;
    slot.typed = typed.has_value();
    slot.value = typed ? typed->value : otherwise.value_or(0);
    if (!is_sought && typed &&
        !(std::isfinite(typed->value) && typed->value >= low && typed->value <= high)) {
      return Error{"step.out_of_range", "The " + label + " is outside what it can be.", id,
                   "Look at the figure and its unit."};
    }
    if (typed && !is_sought) {
      slot.spread = Quantity(0, typed->u95,
                             uncertainty::source_key(SourceKind::Typed, text_hash(input().title + '|' + id)));
    }
    return add(std::move(slot));
  }

  /// A number from the data.
  std::size_t datum(const std::string& id, const std::string& label, const units::Dimension& dimension,
                    double value, Quantity spread) {
    Slot slot;
    slot.id = id;
    slot.label = label;
    slot.dimension = dimension;
    slot.value = value;
    slot.spread = std::move(spread);
    return add(std::move(slot));
  }

  std::size_t add(Slot slot) {
    model_.slots_.push_back(std::move(slot));
    return model_.slots_.size() - 1;
  }

  /// Amounts of solutions bring their water along: a part of its own behind the typed ones.
  Status water_of_solutions() {
    for (std::size_t f = 0; f < input().feeds.size(); ++f) {
      const std::size_t typed_parts = input().feeds[f].parts.size();
      for (std::size_t p = 0; p < typed_parts; ++p) {
        const FeedPart part = input().feeds[f].parts[p];
        const std::optional<double> ratio = brought_water(part);
        if (!ratio) continue;
        if (input().feeds[f].shares == ShareKind::MoleShare) {
          return Error{"step.solution_share",
                       "A share by moles of a solution does not say whether its water counts.",
                       "feed." + std::to_string(f) + ".part." + std::to_string(p),
                       "Give the shares by mass, or the solute and its water in rows of their own."};
        }
        const Result<std::size_t> water = water_substance();
        if (!water.ok()) return water.error();
        FeedPart brought;
        brought.substance = *water;
        brought.state.phase = Phase::Liquid;
        brought.carried = CarriedWater{p, *ratio};
        brought.derived = true;
        brought.row = part.row;
        model_.input_.feeds[f].parts.push_back(std::move(brought));
      }
    }
    return success();
  }

  /// Moles of water per mole of a part that is a solution of some strength.
  std::optional<double> brought_water(const FeedPart& part) const {
    const std::shared_ptr<const facts::Species>& species = input().substances[part.substance].species;
    if (part.without_water || part.carried || species == nullptr || !(species->molar_mass > 0))
      return std::nullopt;
    State state = part.state;
    if (state.phase == Phase::Unstated) {
      for (const StepReaction& reaction : input().reactions) {
        for (std::size_t i = 0; i < reaction.substances.size() && state.phase == Phase::Unstated; ++i) {
          const molecule::Term& term = reaction.reaction->species[i].term;
          if (reaction.substances[i] == part.substance) state = State{term.phase, term.strength};
        }
      }
    }
    if (state.phase != Phase::Aqueous || !state.strength) return std::nullopt;
    return thermo::water_ratio(*state.strength, species->molar_mass);
  }

  std::optional<std::size_t> find_water() const {
    for (std::size_t i = 0; i < input().substances.size(); ++i) {
      const std::shared_ptr<const facts::Species>& species = input().substances[i].species;
      if (species != nullptr && species->compound != nullptr && species->compound->formula == "H2O") return i;
    }
    return std::nullopt;
  }

  Result<std::size_t> water_substance() {
    if (const std::optional<std::size_t> known = find_water()) return *known;
    Result<std::shared_ptr<const facts::Species>> species = facts::resolve_species("water", false);
    if (!species.ok()) return species.error();
    SubstanceInput water;
    water.name = "water";
    water.species = std::move(species).value();
    model_.input_.substances.push_back(std::move(water));
    return input().substances.size() - 1;
  }

  Status substances() {
    if (const Status laid = water_of_solutions(); !laid.ok()) return laid;
    for (const SubstanceInput& substance : input().substances) {
      CHECK(substance.species != nullptr || substance.by_mass,
            "a substance is a species or a mixture by mass");
      // Kilograms stand in for moles where there is no molar mass.
      double molar_mass = substance.by_mass ? 1 : substance.species->molar_mass;
      if (!(molar_mass > 0)) molar_mass = 0;
      model_.molar_mass_.push_back(molar_mass);
    }
    // The reference state of a substance: as the reactions write it, else as it is fed.
    std::vector<std::optional<State>> first(input().substances.size());
    for (const StepReaction& reaction : input().reactions) {
      CHECK(reaction.substances.size() == reaction.reaction->species.size(),
            "one substance for each species");
      for (std::size_t i = 0; i < reaction.substances.size(); ++i) {
        std::optional<State>& state = first[reaction.substances[i]];
        if (!state) state = written_state(reaction, i);
      }
    }
    for (const Feed& feed : input().feeds) {
      for (const FeedPart& part : feed.parts) {
        std::optional<State>& state = first[part.substance];
        if (!state) state = taken(part.substance, part.state);
      }
    }
    for (std::size_t i = 0; i < first.size(); ++i) {
      reference_states_.push_back(first[i].value_or(taken(i, State{})));
      StateCurve curve;
      curve.substance = i;
      curve.state = reference_states_[i];
      model_.reference_.push_back(add_state(std::move(curve)));
    }
    return success();
  }

  State taken(std::size_t substance, State state) const {
    const std::shared_ptr<const facts::Species>& species = input().substances[substance].species;
    if (state.phase == Phase::Unstated) {
      state.phase = species == nullptr ? Phase::Liquid : thermo::phase_taken(*species, state.phase).phase;
      if (species != nullptr && species->coded) state.phase = Phase::Liquid;
    }
    return state;
  }

  State written_state(const StepReaction& reaction, std::size_t i) const {
    const molecule::Term& term = reaction.reaction->species[i].term;
    return taken(reaction.substances[i], State{term.phase, term.strength});
  }

  std::size_t add_state(StateCurve curve) {
    const SubstanceInput& substance = input().substances[curve.substance];
    const std::string at = "substance." + std::to_string(curve.substance) + '.' +
                           std::string(molecule::phase_text(curve.state.phase));
    const Blank& mass_cp = substance.mass_heat_capacity;
    const Blank& whole_cp = input().mass_heat_capacity;
    const double molar_mass = model_.molar_mass_[curve.substance];
    std::optional<Quantity> deviation;
    if (whole_cp && condensed(curve.state.phase) && molar_mass > 0) {
      // One typed figure for the whole mass: one error that all its parts share.
      curve.curve =
          Curve::constant(whole_cp->value * molar_mass, whole_cp->u95 * molar_mass, "cp of the mass, typed");
      if (!mass_deviation_) {
        mass_deviation_ = datum(
            "cp", "typed heat capacity of the mass", units::dimension::kNumber, 0,
            Quantity(0, 1, uncertainty::source_key(SourceKind::Typed, text_hash(input().title + "|cp"))));
      }
      curve.deviation = mass_deviation_;
    } else if (substance.heat_capacity) {
      curve.curve = Curve::constant(substance.heat_capacity->value, substance.heat_capacity->u95, "typed");
    } else if (mass_cp && molar_mass > 0) {
      curve.curve = Curve::constant(mass_cp->value * molar_mass, mass_cp->u95 * molar_mass, "typed");
    } else if (substance.species != nullptr) {
      const std::shared_ptr<const StateFacts> facts = lookups_.state(substance.species, curve.state);
      if (facts->curve.ok()) {
        curve.curve = facts->curve.value();
      } else {
        curve.why_no_curve = facts->curve.error().message;
      }
    } else {
      curve.why_no_curve = "No heat capacity of " + substance.name + " is known.";
    }
    if (curve.curve && !curve.deviation) {
      const uncertainty::SourceKey key =
          substance.species != nullptr
              ? thermo::figure_key(SourceKind::HeatCapacity, *substance.species, curve.state.phase)
              : uncertainty::source_key(SourceKind::Typed, text_hash(substance.name + "|cp"));
      curve.deviation = datum(
          at + ".cp",
          "heat capacity of " + substance.name + ", " + std::string(thermo::phase_word(curve.state.phase)),
          units::dimension::kNumber, 0, Quantity(0, 1, key));
    }
    model_.states_.push_back(std::move(curve));
    return model_.states_.size() - 1;
  }

  /// The state of a substance, looked up once; a state that is not the reference has its distance from it.
  Result<std::size_t> state_of(std::size_t substance, const State& state, const std::string& where) {
    for (std::size_t i = 0; i < model_.states_.size(); ++i) {
      const StateCurve& known = model_.states_[i];
      if (known.substance == substance && known.state.phase == state.phase &&
          same_strength(known.state.strength, state.strength))
        return i;
    }
    const SubstanceInput& of = input().substances[substance];
    if (of.species == nullptr) {
      return Error{"step.one_phase", of.name + " is a mixture by mass and keeps one phase.", where,
                   "Leave its phase blank, or enter it as a species."};
    }
    const State& reference = reference_states_[substance];
    const std::shared_ptr<const StateFacts> here = lookups_.state(of.species, state),
                                            there = lookups_.state(of.species, reference);
    Quantity shift;
    if (const std::optional<Quantity> dissolving = solution_shift(*of.species, reference, state)) {
      shift = *dissolving;
    } else if (here->from_gas.ok() && there->from_gas.ok()) {
      shift = here->from_gas->value;
      shift.add(there->from_gas->value, -1);
    } else if (here->formation.ok() && there->formation.ok()) {
      shift = here->formation->value;
      shift.add(there->formation->value, -1);
    } else {
      Error error = here->from_gas.ok() ? there->from_gas.error() : here->from_gas.error();
      error.where = where;
      return error;
    }
    for (const auto& facts : {here, there}) {
      if (facts->from_gas.ok())
        model_.cautions_.insert(model_.cautions_.end(), facts->from_gas->cautions.begin(),
                                facts->from_gas->cautions.end());
    }
    StateCurve curve;
    curve.substance = substance;
    curve.state = state;
    curve.shift = datum("shift." + std::to_string(model_.states_.size()),
                        "change of " + of.name + " from " + std::string(thermo::phase_word(reference.phase)) +
                            " to " + std::string(thermo::phase_word(state.phase)),
                        units::dimension::kEnergyPerMole, shift.value(), shift);
    return add_state(std::move(curve));
  }

  /// The first table of heats of solution of a species that knows strengths.
  static const facts::SolutionHeats* solution_table(const facts::Species& species) {
    if (species.compound == nullptr) return nullptr;
    for (const char phase : {'s', 'l', 'g'}) {
      const facts::SolutionHeats* heats = facts::find_solution_heats(species.compound->formula, phase);
      if (heats != nullptr && (!heats->points.empty() || heats->symmetrical)) return heats;
    }
    return nullptr;
  }

  /// Heat of solution of a state above the pure solute of its table; empty where the table has none.
  static std::optional<facts::SolutionHeatPoint> solution_height(const facts::SolutionHeats& heats,
                                                                 const State& state, double molar_mass) {
    const Phase pure = heats.phase == 'g' ? Phase::Gas : heats.phase == 'l' ? Phase::Liquid : Phase::Solid;
    if (state.phase == pure) return facts::SolutionHeatPoint{};
    if (state.phase != Phase::Aqueous) return std::nullopt;
    const std::optional<double> ratio =
        state.strength ? thermo::water_ratio(*state.strength, molar_mass) : std::nullopt;
    return ratio ? facts::solution_heat_at(heats, *ratio) : heats.infinite;
  }

  /// From one state of a solute to another by its table alone: formation enthalpies of ions are of another
  /// table, and the distance between two tables is no heat of dilution.
  static std::optional<Quantity> solution_shift(const facts::Species& species, const State& from,
                                                const State& to) {
    const facts::SolutionHeats* heats = solution_table(species);
    if (heats == nullptr || (from.phase != Phase::Aqueous && to.phase != Phase::Aqueous)) return std::nullopt;
    const auto a = solution_height(*heats, from, species.molar_mass),
               b = solution_height(*heats, to, species.molar_mass);
    if (!a || !b) return std::nullopt;
    const double change = b->heat - a->heat;
    return Quantity(change,
                    thermo::dilution_u95(change, std::max(a->u95, b->u95), a->bridge - b->bridge,
                                         facts::SolutionHeatCurve(*heats).span()),
                    thermo::figure_key(SourceKind::Phase, species, Phase::Aqueous));
  }

  Status reactions() {
    for (std::size_t j = 0; j < input().reactions.size(); ++j) {
      const StepReaction& reaction = input().reactions[j];
      const std::string id = "reaction." + std::to_string(j);
      Model::ReactionPlan plan;
      for (std::size_t i = 0; i < reaction.substances.size(); ++i) {
        const Result<std::size_t> state = state_of(reaction.substances[i], written_state(reaction, i), id);
        if (!state.ok()) return state.error();
        const balance::ReactionSpecies& species = reaction.reaction->species[i];
        plan.terms.push_back(Model::Term{reaction.substances[i], *state,
                                         species.product ? species.coefficient() : -species.coefficient()});
      }
      plan.heat = datum(id + ".heat", "heat of " + reaction.name, units::dimension::kEnergy,
                        reaction.heat.as_written.value(), reaction.heat.as_written);
      const double measured_at = reaction.heat.temperature;
      if (measured_at != units::kReferenceTemperature) {
        bool all = true;
        for (const Model::Term& term : plan.terms) all = all && model_.states_[term.state].curve.has_value();
        if (all) {
          for (const Model::Term& term : plan.terms)
            plan.at_heat.push_back(model_.states_[term.state].curve->at(measured_at));
        } else {
          model_.cautions_.push_back("The heat of " + reaction.name +
                                     " is not corrected to other temperatures: a heat capacity is missing.");
        }
      }
      model_.reactions_.push_back(std::move(plan));
      if (const Status done = progress(j); !done.ok()) return done;
    }
    return selectivities();
  }

  /// Selectivities share out what is consumed; something has to say how much that is.
  Status selectivities() const {
    for (std::size_t j = 0; j < input().reactions.size(); ++j) {
      const Progress& progress = input().reactions[j].progress;
      if (progress.kind != ProgressKind::Selectivity) continue;
      bool settled = false;
      for (std::size_t k = 0; k < input().reactions.size(); ++k) {
        settled = settled || (input().reactions[k].progress.kind != ProgressKind::Selectivity &&
                              model_.coefficient_of(k, progress.of) < 0);
      }
      if (!settled) {
        return Error{"step.progress",
                     "A selectivity needs to know how much " + input().substances[progress.of].name +
                         " is consumed in all.",
                     "reaction." + std::to_string(j) + ".progress",
                     "Give the total conversion with the last of its reactions."};
      }
    }
    return success();
  }

  Status progress(std::size_t j) {
    const StepReaction& reaction = input().reactions[j];
    const Progress& progress = reaction.progress;
    const std::string id = "reaction." + std::to_string(j) + ".progress";
    const bool extent = progress.kind == ProgressKind::Extent;
    const char* const words = extent                                       ? "extent of "
                              : progress.kind == ProgressKind::Yield       ? "yield of "
                              : progress.kind == ProgressKind::Selectivity ? "selectivity of "
                                                                           : "conversion by ";
    const Result<std::size_t> slot =
        blank(id, words + reaction.name,
              extent ? (input().kind == StepKind::ThroughFlow ? units::dimension::kMolarFlow
                                                              : units::dimension::kAmount)
                     : units::dimension::kNumber,
              progress.figure, 0, extent ? kFar : 1);
    if (!slot.ok()) return slot.error();
    model_.reactions_[j].progress = *slot;
    if (extent) return success();
    if (!(model_.coefficient_of(j, progress.of) < 0) && progress.kind != ProgressKind::TotalConversion) {
      return Error{"step.key_not_consumed",
                   input().substances[progress.of].name + " is not consumed by " + reaction.name + ".", id,
                   "Choose a reactant of this reaction."};
    }
    if (progress.kind == ProgressKind::Yield || progress.kind == ProgressKind::Selectivity) {
      if (!(model_.coefficient_of(j, progress.product) > 0)) {
        return Error{"step.product_not_formed",
                     input().substances[progress.product].name + " is not formed by " + reaction.name + ".",
                     id, "Choose a product of this reaction."};
      }
    }
    return success();
  }

  Status feeds() {
    if (input().feeds.empty())
      return Error{"step.nothing_fed", "Nothing goes into this step.", "feeds", "Add a feed."};
    const bool flow = input().kind == StepKind::ThroughFlow;
    for (std::size_t f = 0; f < input().feeds.size(); ++f) {
      const Feed& feed = input().feeds[f];
      const std::string id = "feed." + std::to_string(f);
      Model::FeedPlan plan;
      plan.first_part = model_.figures_.size();
      plan.parts = feed.parts.size();
      const Result<std::size_t> temperature =
          blank(id + ".temperature", "temperature of " + feed.name, units::dimension::kTemperature,
                feed.temperature, kColdest, kHottest);
      if (!temperature.ok()) return temperature.error();
      plan.temperature = *temperature;
      if (feed.carried_temperature && sought_ != id + ".temperature") {
        model_.slots_[*temperature].spread = *feed.carried_temperature;
        model_.slots_[*temperature].typed = false;
      }
      const Result<std::size_t> pressure =
          blank(id + ".pressure", "pressure of " + feed.name, units::dimension::kPressure, feed.pressure,
                kLeastPressure, kMostPressure, units::kStandardAtmosphere);
      if (!pressure.ok()) return pressure.error();
      plan.pressure = *pressure;
      if (feed.shares != ShareKind::None) {
        const Result<std::size_t> total =
            feed.excess ? blank(id + ".total", "excess in " + feed.name, units::dimension::kNumber,
                                feed.total, 0, 1000)
                        : blank(id + ".total", "amount of " + feed.name,
                                measure_dimension(feed.measure, flow), feed.total, 0, kFar);
        if (!total.ok()) return total.error();
        plan.total = *total;
        if (feed.excess) {
          const ExcessOver& over = *feed.excess;
          if (!(model_.coefficient_of(over.reaction, over.substance) < 0 &&
                model_.coefficient_of(over.reaction, over.key) < 0)) {
            return Error{"step.key_not_consumed",
                         "An excess is reckoned between two reactants of one reaction.", id + ".total",
                         "Choose two reactants."};
          }
        }
      }
      model_.feeds_.push_back(plan);
      for (std::size_t p = 0; p < feed.parts.size(); ++p) {
        if (const Status done = part(f, p, flow); !done.ok()) return done;
      }
    }
    return success();
  }

  static units::Dimension measure_dimension(Measure measure, bool flow) {
    switch (measure) {
      case Measure::Mole:
        return flow ? units::dimension::kMolarFlow : units::dimension::kAmount;
      case Measure::Mass:
        return flow ? units::dimension::kMassFlow : units::dimension::kMass;
      case Measure::Volume:
        return flow ? units::dimension::kVolumeFlow : units::dimension::kVolume;
    }
    return units::dimension::kNumber;
  }

  Status part(std::size_t f, std::size_t p, bool flow) {
    const Feed& feed = input().feeds[f];
    const FeedPart& part = feed.parts[p];
    const SubstanceInput& substance = input().substances[part.substance];
    Model::FeedPlan& plan = model_.feeds_[f];
    const std::string id = "feed." + std::to_string(f) + ".part." + std::to_string(p);
    const bool shares = feed.shares != ShareKind::None;
    const bool by_volume = (shares ? feed.measure : part.measure) == Measure::Volume;
    const bool by_mass = shares ? feed.shares == ShareKind::MassShare || feed.measure == Measure::Mass
                                : part.measure == Measure::Mass;
    if (substance.by_mass && !(shares ? feed.shares == ShareKind::MassShare : by_mass)) {
      return Error{"step.no_molar_mass", substance.name + " has no molar mass.", id, "Enter it by mass."};
    }
    if ((by_mass || by_volume) && !(model_.molar_mass_[part.substance] > 0)) {
      return Error{"step.no_molar_mass", substance.name + " has no molar mass.", id,
                   "Enter it in moles, or give its molar mass."};
    }
    State state = part.state;
    if (state.phase == Phase::Unstated) state = reference_states_[part.substance];
    const Result<std::size_t> at = state_of(part.substance, state, id);
    if (!at.ok()) return at.error();
    model_.part_states_.push_back(*at);
    Model::FigurePlan figure;
    figure.gas = state.phase == Phase::Gas;
    const double molar_mass = model_.molar_mass_[part.substance];
    const std::optional<double> water = brought_water(part);
    figure.mole_mass = water ? thermo::solution_mass(*water, molar_mass) : molar_mass;
    if (part.carried) {
      model_.figures_.push_back(figure);
      return success();
    }
    if (by_volume && water && !substance.density) {
      return Error{"step.no_density", "No density of this solution of " + substance.name + " is known.", id,
                   "Type the density of the solution, or enter it by mass."};
    }
    if (by_volume && !figure.gas) {
      if (substance.density) {
        figure.density = substance.density->value;
      } else if (substance.species != nullptr && substance.species->compound != nullptr &&
                 substance.species->compound->liquid_density) {
        figure.density = substance.species->compound->liquid_density->value;
      } else {
        return Error{"step.no_density", "No density of " + substance.name + " is known.", id,
                     "Type its density, or enter it by mass."};
      }
    }
    const bool is_sought = id == sought_;
    if (shares && !part.figure && !is_sought) {
      if (plan.rest) {
        return Error{"step.blank", "Two shares of " + feed.name + " are not filled in.", id,
                     "One blank share is the rest; type the other."};
      }
      plan.rest = p;
    } else {
      const Result<std::size_t> slot =
          shares ? blank(id, "share of " + substance.name + " in " + feed.name, units::dimension::kNumber,
                         part.figure, 0, 1)
                 : blank(id, "amount of " + substance.name + " in " + feed.name,
                         measure_dimension(part.measure, flow), part.figure, 0, kFar);
      if (!slot.ok()) return slot.error();
      figure.figure = *slot;
      if (part.shared && !is_sought) model_.slots_[*slot].spread = *part.shared;
      if (part.derived) model_.slots_[*slot].typed = false;
    }
    model_.figures_.push_back(figure);
    return success();
  }

  Status outlet() {
    const Outlet& outlet = input().outlet;
    const Result<std::size_t> temperature =
        blank("outlet.temperature", end_words(), units::dimension::kTemperature, outlet.temperature, kColdest,
              kHottest);
    if (!temperature.ok()) return temperature.error();
    model_.outlet_temperature_ = *temperature;
    const Result<std::size_t> pressure =
        blank("outlet.pressure", "pressure of the outlet", units::dimension::kPressure, outlet.pressure,
              kLeastPressure, kMostPressure, units::kStandardAtmosphere);
    if (!pressure.ok()) return pressure.error();
    model_.outlet_pressure_ = *pressure;
    for (std::size_t i = 0; i < input().substances.size(); ++i) {
      Model::LeavingPlan plan;
      plan.state = model_.reference_[i];
      model_.leaving_.push_back(std::move(plan));
    }
    for (std::size_t l = 0; l < outlet.leaving.size(); ++l) {
      if (const Status done = leaving(l); !done.ok()) return done;
    }
    return success();
  }

  std::string end_words() const {
    return input().kind == StepKind::Charge ? "end temperature" : "outlet temperature";
  }

  Status leaving(std::size_t l) {
    const Leaving& leaving = input().outlet.leaving[l];
    const SubstanceInput& substance = input().substances[leaving.substance];
    const std::string id = "leaving." + std::to_string(l);
    Model::LeavingPlan& plan = model_.leaving_[leaving.substance];
    const bool split = leaving.vapour_share || leaving.by_saturation || sought_ == id + ".vapour_share";
    State state = leaving.state;
    if (split && state.phase != Phase::Liquid) state = State{Phase::Liquid, {}};
    if (state.phase == Phase::Unstated) state = reference_states_[leaving.substance];
    const Result<std::size_t> at = state_of(leaving.substance, state, id);
    if (!at.ok()) return at.error();
    plan.state = *at;
    if (!split) return success();
    model_.splits_ = true;
    const Result<std::size_t> vapour = state_of(leaving.substance, State{Phase::Gas, {}}, id);
    if (!vapour.ok()) return vapour.error();
    plan.vapour = *vapour;
    if (!leaving.by_saturation) {
      const Result<std::size_t> share =
          blank(id + ".vapour_share", "share of " + substance.name + " that leaves as vapour",
                units::dimension::kNumber, leaving.vapour_share, 0, 1);
      if (!share.ok()) return share.error();
      plan.share = *share;
      return success();
    }
    model_.saturates_ = true;
    plan.by_saturation = true;
    return saturation(leaving.substance);
  }

  /// The vapour pressure of a substance, typed or looked up.
  Status saturation(std::size_t index) {
    const SubstanceInput& substance = input().substances[index];
    Model::LeavingPlan& plan = model_.leaving_[index];
    if (plan.saturation) return success();
    const std::string id = "saturation." + std::to_string(index);
    double share = 0;
    uncertainty::SourceKey key = 0;
    if (substance.vapour_pressure) {
      plan.saturation = SaturationCurve::typed(substance.vapour_pressure->value);
      share = substance.vapour_pressure->u95 / substance.vapour_pressure->value;
      key = uncertainty::source_key(SourceKind::Typed, text_hash(substance.name + "|p"));
    } else {
      const std::shared_ptr<const Result<SaturationCurve>> curve = lookups_.saturation(substance.species);
      if (!curve->ok()) {
        Error error = curve->error();
        error.where = id;
        return error;
      }
      plan.saturation = curve->value();
      share = plan.saturation->u95_share();
      key = thermo::figure_key(SourceKind::Other, *substance.species, Phase::Liquid);
    }
    plan.saturation_slot = datum(id, "vapour pressure of " + substance.name, units::dimension::kNumber, 0,
                                 Quantity(0, share, key));
    return success();
  }

  /// Under reflux the liquids of the charge boil together; what has no vapour pressure is taken not to
  /// evaporate.
  Status reflux() {
    if (input().kind != StepKind::Charge) return success();
    const bool boils = input().charge.solvent.has_value();
    if (boils) {
      const std::size_t solvent = *input().charge.solvent;
      const Result<std::size_t> vapour = state_of(solvent, State{Phase::Gas, {}}, "charge.solvent");
      if (!vapour.ok()) return vapour.error();
      model_.leaving_[solvent].vapour = *vapour;
      if (const Status known = saturation(solvent); !known.ok()) return known;
    }
    for (std::size_t i = 0; i < model_.leaving_.size(); ++i) {
      const SubstanceInput& substance = input().substances[i];
      if (!model_.is_liquid(i) || (substance.species == nullptr && !substance.vapour_pressure)) continue;
      if (!saturation(i).ok() && boils) {
        model_.cautions_.push_back(substance.name +
                                   " has no vapour pressure here and is taken not to evaporate.");
      }
    }
    return success();
  }

  Status wall() {
    const bool flow = input().kind == StepKind::ThroughFlow;
    const units::Dimension heat = flow ? units::dimension::kPower : units::dimension::kEnergy;
    const struct {
      const char *id, *label;
      const Blank& typed;
      std::size_t& slot;
    } heats[] = {{"duty", "duty", input().duty, model_.duty_},
                 {"loss", "heat loss", input().loss, model_.loss_},
                 {"shaft", "shaft work", input().shaft_work, model_.shaft_}};
    for (const auto& entry : heats) {
      const Result<std::size_t> slot = blank(entry.id, entry.label, heat, entry.typed, -kFar, kFar, 0.0);
      if (!slot.ok()) return slot.error();
      entry.slot = *slot;
    }
    if (input().departure || sought_ == "departure") {
      const Result<std::size_t> slot =
          blank("departure", "departure from ideal gas", heat, input().departure, -kFar, kFar);
      if (!slot.ok()) return slot.error();
      model_.departure_ = *slot;
    } else if (input().departure_share) {
      const Result<std::size_t> slot = blank("departure", "departure from ideal gas",
                                             units::dimension::kNumber, input().departure_share, -1, 1);
      if (!slot.ok()) return slot.error();
      model_.departure_share_ = *slot;
    }
    if (const Status done = side(); !done.ok()) return done;
    const Vessel& vessel = input().vessel;
    if (vessel.heat_capacity || sought_ == "vessel.heat_capacity") {
      const Result<std::size_t> capacity =
          blank("vessel.heat_capacity", "heat capacity of the vessel", units::dimension::kHeatCapacity,
                vessel.heat_capacity, 0, kFar);
      if (!capacity.ok()) return capacity.error();
      model_.vessel_ = model_.side_.vessel = *capacity;
      if (vessel.temperature || sought_ == "vessel.temperature") {
        const Result<std::size_t> start =
            blank("vessel.temperature", "temperature of the vessel at the start",
                  units::dimension::kTemperature, vessel.temperature, kColdest, kHottest);
        if (!start.ok()) return start.error();
        model_.vessel_temperature_ = *start;
      } else {
        model_.vessel_temperature_ = model_.feeds_.front().temperature;
      }
    }
    return success();
  }

  /// Typed numbers that stand beside the balance: they move figures, never the balance itself.
  Status side() {
    const StepInput& in = input();
    Model::Side& at = model_.side_;
    const struct {
      const char *id, *label;
      const units::Dimension& dimension;
      const Blank& typed;
      double low, high;
      std::optional<std::size_t>& slot;
    } numbers[] = {
        {"process_temperature", "process temperature", units::dimension::kTemperature,
         in.charge.process_temperature, kColdest, kHottest, at.process_temperature},
        {"time", "time over which it reacts", units::dimension::kTime, in.time, 0, kFar, at.time},
        {"cooling", "cooling capacity", units::dimension::kPower, in.charge.cooling, 0, kFar, at.cooling},
        {"rate_constant", "first-order rate constant", units::dimension::kRate, in.charge.rate_constant, 0,
         kFar, at.rate_constant},
        {"medium_in", "temperature of the medium, in", units::dimension::kTemperature, in.surface.medium_in,
         kColdest, kHottest, at.medium_in},
        {"medium_out", "temperature of the medium, out", units::dimension::kTemperature,
         in.surface.medium_out, kColdest, kHottest, at.medium_out}};
    for (const auto& number : numbers) {
      if (!number.typed) continue;
      const Result<std::size_t> slot =
          blank(number.id, number.label, number.dimension, number.typed, number.low, number.high);
      if (!slot.ok()) return slot.error();
      number.slot = *slot;
    }
    return success();
  }

  /// What the balance itself is closed by. UA and time follow once duty and outlet temperature are known.
  Status choose_sought() {
    const StepInput& in = input();
    sought_ = in.sought;
    const bool conductance = in.sought == "conductance", time = in.sought == "time";
    if (!conductance && !time) return success();
    if (conductance && !in.surface.medium_in && !in.surface.medium_out)
      return blank_error("medium_in", "temperature of the cooling or heating medium");
    if (conductance && in.kind == StepKind::Charge && !in.time)
      return blank_error("time", "time over which it reacts");
    if (time && (in.kind != StepKind::Charge || !in.charge.cooling))
      return blank_error("cooling", "cooling capacity");
    if (in.duty && in.outlet.temperature) {
      return Error{"step.over_specified",
                   "Duty and outlet temperature are both typed, and each settles the other.", "duty",
                   "Leave one of them blank."};
    }
    sought_ = in.duty ? "outlet.temperature" : "duty";
    return success();
  }

  /// What leaves in water, with the table of its heats of solution.
  Status solutions() {
    SolutionPlan& plan = model_.solution_;
    plan.water = find_water();
    const bool flow = input().kind == StepKind::ThroughFlow;
    if (plan.water && states_are_liquid(*plan.water)) {
      for (std::size_t i = 0; i < input().substances.size(); ++i) {
        if (std::optional<SolutePlan> solute = solute_of(i)) plan.solutes.push_back(*std::move(solute));
      }
    }
    if (plan.solutes.empty()) return success();
    for (const StepReaction& reaction : input().reactions) {
      if (!reaction.heat.typed || plan.in_measured == Includes::Yes) continue;
      if (reaction.heat.includes_mixing != Includes::No) plan.in_measured = reaction.heat.includes_mixing;
    }
    for (StateCurve& state : model_.states_) {
      const bool solute = std::any_of(plan.solutes.begin(), plan.solutes.end(),
                                      [&](const SolutePlan& of) { return of.substance == state.substance; });
      state.dissolves = solute && state.shift.has_value();
    }
    if (input().mixing_heat || input().sought == "mixing_heat") {
      const Result<std::size_t> typed =
          blank("mixing_heat", "heat of mixing", flow ? units::dimension::kPower : units::dimension::kEnergy,
                input().mixing_heat, -kFar, kFar);
      if (!typed.ok()) return typed.error();
      plan.typed = *typed;
    }
    return success();
  }

  bool states_are_liquid(std::size_t substance) const {
    return model_.leaving_[substance].vapour || model_.is_liquid(substance);
  }

  /// Dissolved in water as it leaves, or a liquid that its table follows down to the pure one.
  std::optional<SolutePlan> solute_of(std::size_t index) {
    const std::shared_ptr<const facts::Species>& species = input().substances[index].species;
    const StateCurve& leaving = model_.states_[model_.leaving_[index].state];
    const bool aqueous = leaving.state.phase == Phase::Aqueous;
    if (species == nullptr || species->compound == nullptr ||
        !(aqueous || leaving.state.phase == Phase::Liquid))
      return std::nullopt;
    const facts::SolutionHeats* heats = solution_table(*species);
    if (heats != nullptr && (aqueous || (heats->phase == 'l' && facts::least_ratio(*heats) == 0))) {
      SolutePlan plan;
      plan.substance = index;
      plan.curve = facts::SolutionHeatCurve(*heats);
      plan.source = std::string(heats->source) + (heats->from_memory ? " (from memory)" : "");
      if (aqueous) {
        const auto height = solution_height(*heats, leaving.state, species->molar_mass);
        if (!height) return std::nullopt;
        plan.from_pure = height->heat;
        plan.bridge = height->bridge;
      }
      const std::string id = "solution." + std::to_string(index);
      plan.error =
          datum(id, "heat of solution of " + input().substances[index].name, units::dimension::kNumber, 0,
                Quantity(0, 1, thermo::figure_key(SourceKind::Other, *species, Phase::Aqueous)));
      const SubstanceInput& typed = input().substances[index];
      if (!typed.heat_capacity && !typed.mass_heat_capacity && !input().mass_heat_capacity)
        plan.heat_capacities = facts::find_solution_heat_capacities(species->compound->formula);
      if (plan.heat_capacities != nullptr) {
        plan.heat_capacity_error =
            datum(id + ".cp", "heat capacity of the solution of " + input().substances[index].name,
                  units::dimension::kNumber, 0,
                  Quantity(0, 1, thermo::figure_key(SourceKind::HeatCapacity, *species, Phase::Aqueous)));
      }
      return plan;
    }
    return std::nullopt;
  }

  Status sought() {
    const std::optional<std::size_t> slot = model_.slot(sought_);
    if (!slot || !model_.slots_[*slot].blank) {
      return Error{"step.not_a_blank", "The blank marked as sought is not on this step.", input().sought,
                   "Mark one of the step's own blanks."};
    }
    model_.sought_ = *slot;
    return success();
  }

  Lookups& lookups_;
  Model model_;
  std::string sought_;  ///< id of the number that closes the balance
  std::vector<State> reference_states_;
  std::optional<std::size_t> mass_deviation_;
};

Result<Model> Model::of(StepInput input, Lookups& lookups) {
  return ModelBuilder(std::move(input), lookups).build();
}

}  // namespace heatledger::step
