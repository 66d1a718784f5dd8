#include "core/dosing/dosed_step.hpp"

#include <algorithm>
#include <cmath>

#include "core/step/words.hpp"

namespace heatledger::dosing {
namespace {

using step::Typed;

std::uint64_t text_hash(const std::string& text) {
  std::uint64_t hash = 14695981039346656037ULL;
  for (const char c : text) hash = (hash ^ static_cast<unsigned char>(c)) * 1099511628211ULL;
  return hash;
}

constexpr double kHoldShare = 0.25;

}  // namespace

bool DosedModel::gas(std::size_t substance) const {
  return balance_->states()[balance_->leaving_state(substance)].state.phase == molecule::Phase::Gas;
}

std::size_t DosedModel::add(std::string label, const Typed& typed, const char* id) {
  DosedNumber number;
  number.label = std::move(label);
  number.value = typed.value;
  if (typed.u95 > 0) {
    number.spread = uncertainty::Quantity(
        0, typed.u95,
        uncertainty::source_key(uncertainty::SourceKind::Typed, text_hash(input_.step.title + '|' + id)));
  }
  numbers_.push_back(std::move(number));
  return numbers_.size() - 1;
}

Result<DosedModel> DosedModel::of(DosedInput input, step::Lookups& lookups) {
  CHECK(input.dosed.size() == input.step.feeds.size() && input.kinetics.size() == input.step.reactions.size(),
        "one entry for each feed and reaction");
  if (std::find(input.dosed.begin(), input.dosed.end(), true) == input.dosed.end()) {
    return Error{"dosing.nothing_dosed", "No feed of this step is dosed.", "feeds",
                 "Mark a feed as dosed, or make it a charge step."};
  }
  if (input.profile.empty() && !(input.dosing_time.value > 0)) {
    return Error{"dosing.no_time", "Over what time is dosed?", "dosing.time",
                 "Type the dosing time, or a profile of time and amount."};
  }
  if (input.thermal == Thermal::Jacket && !input.conductance_start) {
    return Error{"dosing.no_jacket", "The jacket has no UA.", "jacket.ua_start",
                 "Type UA before dosing, such as 2.4 kW/K, fouling included."};
  }
  DosedModel model;
  for (step::StepReaction& reaction : input.step.reactions) {
    // How far the reactions go is what is worked out here.
    reaction.progress = step::Progress{};
    reaction.progress.kind = step::ProgressKind::Extent;
    reaction.progress.figure = Typed{0, 0};
  }
  input.step.kind = step::StepKind::Charge;
  input.step.sought = "duty";
  input.step.outlet.temperature = input.temperature;
  input.step.charge = step::ChargeInput{};
  input.step.charge.followed = true;
  Result<step::Model> balance = step::Model::of(input.step, lookups);
  if (!balance.ok()) return balance.error();
  model.input_ = std::move(input);
  model.balance_ = std::make_shared<const step::Model>(std::move(balance).value());
  const DosedInput& in = model.input_;

  for (const step::Slot& slot : model.balance_->slots()) {
    DosedNumber number{slot.label, slot.value, slot.spread};
    // The end of the balance is not a number of this step.
    if (slot.id == "outlet.temperature") number.spread = {};
    model.numbers_.push_back(std::move(number));
  }
  Own& own = model.own_;
  own.temperature = model.add("temperature at the start", in.temperature, "process_temperature");
  own.jacket = model.add("temperature of the jacket", in.jacket, "jacket.temperature");
  own.conductance_start =
      model.add("UA before dosing", in.conductance_start.value_or(Typed{}), "jacket.ua_start");
  own.conductance_end = model.add("UA when all is in", in.conductance_end.value_or(Typed{}), "jacket.ua_end");
  own.dosing_time = model.add("dosing time", in.dosing_time, "dosing.time");
  own.hold = model.add("time after dosing", in.hold.value_or(Typed{}), "dosing.hold");
  model.has_density_ = in.density.has_value();
  own.density = model.add("density of the mass", in.density.value_or(Typed{}), "density");
  own.first_law = model.numbers_.size();
  for (std::size_t j = 0; j < in.kinetics.size(); ++j) {
    const std::string id = "kinetics." + std::to_string(j);
    model.add("rate constant of " + in.step.reactions[j].name, in.kinetics[j].constant, (id + ".k").c_str());
    model.add("activation energy of " + in.step.reactions[j].name, in.kinetics[j].activation_energy,
              (id + ".e").c_str());
  }

  for (std::size_t i = 0; i < in.step.substances.size(); ++i) {
    const step::StateCurve& state = model.balance_->states()[model.balance_->leaving_state(i)];
    if (!state.curve) {
      return Error{"step.no_heat_capacity", state.why_no_curve, "",
                   "Type its heat capacity, or cp of the mass, under \"Figures for this step\"."};
    }
    if (model.gas(i)) {
      model.notes_.push_back(in.step.substances[i].name +
                             " is gas: it counts neither in the mass of the content nor in its heat "
                             "capacity, and leaves at the temperature of the start.");
    }
  }
  if (const Status volumes = model.look_up_volumes(); !volumes.ok()) return volumes.error();
  // A profile that is none is told before anything is followed.
  const Result<std::shared_ptr<const DosedSystem>> made = model.system(model.values());
  if (!made.ok()) return made.error();
  return model;
}

Status DosedModel::look_up_volumes() {
  const std::vector<step::SubstanceInput>& substances = input_.step.substances;
  densities_.assign(substances.size(), 0);
  const bool needed = std::any_of(input_.kinetics.begin(), input_.kinetics.end(),
                                  [](const RateLawInput& law) { return law.speed == Speed::ByRateLaw; });
  if (!needed || has_density_) return success();
  for (std::size_t i = 0; i < substances.size(); ++i) {
    const step::SubstanceInput& substance = substances[i];
    if (gas(i)) continue;
    if (substance.density) {
      densities_[i] = substance.density->value;
    } else if (substance.species != nullptr && substance.species->compound != nullptr &&
               substance.species->compound->liquid_density) {
      densities_[i] = substance.species->compound->liquid_density->value;
    } else {
      return Error{"step.no_density",
                   "The rate law needs volumes, and no density of " + substance.name + " is known.",
                   "density", "Type the density of the mass, or that of " + substance.name + "."};
    }
  }
  notes_.push_back(
      "Concentrations in the rate law are per volume of the content, its parts added up by their "
      "densities near 25 °C.");
  return success();
}

std::vector<double> DosedModel::values() const {
  std::vector<double> values;
  for (const DosedNumber& number : numbers_) values.push_back(number.value);
  return values;
}

Result<std::shared_ptr<const DosedSystem>> DosedModel::system(const std::vector<double>& values,
                                                              double stretch) const {
  const step::Model& balance = *balance_;
  const std::vector<double> v(values.begin(),
                              values.begin() + static_cast<std::ptrdiff_t>(balance.slots().size()));
  step::Work work;
  if (const step::Trouble trouble = balance.amounts(v, work); trouble != step::Trouble::None) {
    return Error{"step.shares", "The amounts fed cannot be worked out from these shares.", "feeds",
                 "Look at the shares and totals of the feeds."};
  }
  auto system = std::make_shared<DosedSystem>();
  const std::vector<step::SubstanceInput>& substances = input_.step.substances;
  system->start_temperature = values[own_.temperature];
  for (std::size_t i = 0; i < substances.size(); ++i) {
    const std::size_t state = balance.leaving_state(i);
    DosedSubstance made;
    made.name = substances[i].name;
    if (gas(i)) {
      made.enthalpy = Enthalpy::constant(balance.enthalpy(v, state, system->start_temperature), 0);
    } else {
      made.molar_mass = balance.molar_mass(i);
      made.molar_volume = has_density_        ? made.molar_mass / values[own_.density]
                          : densities_[i] > 0 ? made.molar_mass / densities_[i]
                                              : 0;
      made.enthalpy = Enthalpy::tabulated([&](double t) { return balance.enthalpy(v, state, t); },
                                          [&](double t) { return balance.heat_capacity(v, state, t); });
    }
    system->substances.push_back(std::move(made));
  }
  system->start.assign(substances.size(), 0);
  Profile profile = Profile::constant(input_.dosing_start, std::max(1e-3, values[own_.dosing_time]));
  if (!input_.profile.empty()) {
    Result<Profile> typed = Profile::of(input_.profile);
    if (!typed.ok()) return typed.error();
    profile = std::move(typed).value();
  }
  if (stretch != 1) profile = profile.stretched(stretch);
  std::size_t part = 0;
  for (std::size_t f = 0; f < input_.step.feeds.size(); ++f) {
    DosedFeed feed;
    feed.name = input_.step.feeds[f].name;
    feed.amounts.assign(substances.size(), 0);
    feed.profile = profile;
    const double temperature = v[balance.feed_temperature_slot(f)];
    for (const step::FeedPart& fed : input_.step.feeds[f].parts) {
      const double amount = work.parts[part];
      feed.amounts[fed.substance] += amount;
      if (amount != 0) feed.enthalpy += amount * balance.enthalpy(v, balance.part_state(part), temperature);
      ++part;
    }
    if (input_.dosed[f]) {
      system->feeds.push_back(std::move(feed));
    } else {
      for (std::size_t i = 0; i < substances.size(); ++i) system->start[i] += feed.amounts[i];
    }
  }
  for (std::size_t j = 0; j < input_.step.reactions.size(); ++j) {
    const RateLawInput& kinetics = input_.kinetics[j];
    DosedReaction reaction;
    reaction.name = input_.step.reactions[j].name;
    for (std::size_t i = 0; i < substances.size(); ++i) {
      if (const double coefficient = balance.coefficient_of(j, i); coefficient != 0)
        reaction.terms.push_back({i, coefficient});
    }
    reaction.heat = balance.reaction_heat(v, j);
    reaction.speed = kinetics.speed;
    reaction.law.constant = values[own_.first_law + 2 * j];
    reaction.law.activation_energy = values[own_.first_law + 2 * j + 1];
    reaction.law.reference = kinetics.reference;
    reaction.law.factors = kinetics.factors;
    if (kinetics.factors.empty()) {
      for (const DosedReaction::Term& term : reaction.terms) {
        if (term.coefficient < 0) reaction.law.factors.push_back({term.substance, 1});
      }
    }
    system->reactions.push_back(std::move(reaction));
  }
  system->thermal = input_.thermal;
  system->jacket_temperature = values[own_.jacket];
  system->conductance_start = values[own_.conductance_start];
  system->conductance_end = values[own_.conductance_end];
  if (!input_.conductance_end) {
    double start = 0, all = 0;
    for (std::size_t i = 0; i < substances.size(); ++i) {
      start += system->start[i] * system->substances[i].molar_mass;
      for (const DosedFeed& feed : system->feeds) all += feed.amounts[i] * system->substances[i].molar_mass;
    }
    system->conductance_end = system->conductance_start * (start > 0 ? (start + all) / start : 1);
  }
  if (const std::optional<std::size_t> vessel = balance.slot("vessel.heat_capacity"))
    system->vessel_heat_capacity = v[*vessel];
  const double dosed = profile.last();
  system->end = dosed + (input_.hold ? values[own_.hold] : kHoldShare * dosed);
  return std::shared_ptr<const DosedSystem>(std::move(system));
}

}  // namespace heatledger::dosing
