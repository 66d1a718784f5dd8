#include "core/step/slip_sheet.hpp"

#include <cmath>

#include "core/step/sought.hpp"
#include "core/units/constants.hpp"

namespace heatledger::step {
namespace {

using Sensible = Variation::Sensible;

double factor(const std::map<std::size_t, double>& factors, std::size_t which) {
  const auto found = factors.find(which);
  return found == factors.end() ? 1 : found->second;
}

class Sheet {
 public:
  Sheet(const StepResult& result, const Variation& variation)
      : result_(result),
        variation_(variation),
        model_(variation.model ? *variation.model : *result.model),
        v_(variation.model ? variation.model->values() : result.values) {
    if (variation.model) {  // the sought figure starts from the right one
      v_[model_.sought()] = result.values[result.model->sought()];
    }
  }

  std::map<std::string, double> figures() {
    std::map<std::string, double> out;
    if (!solve()) return out;
    const StepInput& input = model_.input();
    double free = 0;
    for (std::size_t j = 0; j < work_.extents.size(); ++j) {
      const std::string id = "reaction." + std::to_string(j);
      const double heat = heat_of(j);
      const double each = -work_.extents[j] * heat * factor(variation_.free_only, j);
      out[id + ".extent"] = work_.extents[j];
      out[id + ".heat"] = heat;
      out[id + ".free"] = each;
      free += each;
    }
    if (!work_.extents.empty()) out["heat_set_free"] = free;
    out["inlet"] = inlet_;
    out["outlet"] = outlet_;
    std::size_t part = 0;
    for (std::size_t f = 0; f < input.feeds.size(); ++f) {
      for (std::size_t p = 0; p < input.feeds[f].parts.size(); ++p, ++part) {
        const std::string id = "in." + std::to_string(part);
        out[id + ".amount"] = work_.parts[part];
        out[id + ".mass"] = work_.parts[part] * model_.molar_mass(input.feeds[f].parts[p].substance);
        out[id + ".heat"] = part_heat(f, part);
      }
    }
    for (std::size_t i = 0; i < result_.out.size(); ++i) {
      const StreamLine& line = result_.out[i];
      const std::string id = "out." + std::to_string(i);
      const bool vapour = model_.vapour_state(line.substance) && line.state.phase == molecule::Phase::Gas;
      const double amount =
          vapour ? work_.vapour[line.substance]
                 : work_.leaving[line.substance] -
                       (model_.vapour_state(line.substance) ? work_.vapour[line.substance] : 0);
      out[id + ".amount"] = amount;
      out[id + ".heat"] =
          amount *
          (vapour ? sensible(*model_.vapour_state(line.substance), v_[model_.outlet_temperature_slot()])
                  : leaving_heat(line.substance, v_[model_.outlet_temperature_slot()])) *
          factor(variation_.out_heat, line.substance);
    }
    out["sought"] = v_[model_.sought()] * variation_.answer_factor;
    return out;
  }

 private:
  double sensible(std::size_t state, double temperature) const {
    const StateCurve& of = model_.states()[state];
    const double shift = of.shift ? v_[*of.shift] : 0;
    if (!of.curve) return shift;
    const double span = temperature - units::kReferenceTemperature;
    switch (variation_.sensible) {
      case Sensible::Right:
        return model_.enthalpy(v_, state, temperature);
      case Sensible::CelsiusAsKelvin:
        return shift + of.curve->at(temperature - 273.15).h - of.curve->at(25).h;
      case Sensible::AtReference:
        return shift + of.curve->heat_capacity(units::kReferenceTemperature) * span;
      case Sensible::AtTemperature:
        return shift + of.curve->heat_capacity(temperature) * span;
    }
    return shift;
  }

  /// As it leaves in water where it does, whose heat capacity the variations leave alone.
  double leaving_heat(std::size_t substance, double temperature) const {
    const std::vector<double>& ratio = work_.dissolving.ratio;
    if (!ratio.empty() && ratio[substance] >= 0)
      return model_.leaving_enthalpy(v_, work_, substance, temperature);
    return sensible(model_.leaving_state(substance), temperature);
  }

  double heat_of(std::size_t j) const {
    const double at =
        variation_.heat_at_outlet ? v_[model_.outlet_temperature_slot()] : units::kReferenceTemperature;
    const auto added = variation_.heat_added.find(j);
    return model_.reaction_heat_at(v_, j, at) + (added == variation_.heat_added.end() ? 0 : added->second);
  }

  /// From the heat at 25 °C in the phases written to the reference states.
  double reference_heat(std::size_t j) const {
    return heat_of(j) + model_.reaction_heat(v_, j) -
           model_.reaction_heat_at(v_, j, units::kReferenceTemperature);
  }

  double part_heat(std::size_t feed, std::size_t part) const {
    return work_.parts[part] * sensible(model_.part_state(part), v_[model_.feed_temperature_slot(feed)]) *
           factor(variation_.in_heat, part);
  }

  std::optional<double> needed() {
    if (model_.amounts(v_, work_) != Trouble::None) return std::nullopt;
    scale_amounts();
    inlet_ = outlet_ = 0;
    std::size_t part = 0;
    for (std::size_t f = 0; f < model_.input().feeds.size(); ++f) {
      for (std::size_t p = 0; p < model_.input().feeds[f].parts.size(); ++p, ++part)
        inlet_ += part_heat(f, part);
    }
    double reaction = 0;
    for (std::size_t j = 0; j < work_.extents.size(); ++j)
      reaction += work_.extents[j] * reference_heat(j) * factor(variation_.free_only, j);
    const double temperature = v_[model_.outlet_temperature_slot()];
    model_.downstream(v_, work_);  // for what dissolves, and the vessel
    const Dissolving& solution = work_.dissolving;
    for (std::size_t i = 0; i < work_.leaving.size(); ++i) {
      const double vapour = model_.vapour_state(i) ? work_.vapour[i] : 0;
      double heat = (work_.leaving[i] - vapour) * leaving_heat(i, temperature);
      if (vapour != 0) heat += vapour * sensible(*model_.vapour_state(i), temperature);
      outlet_ += heat * factor(variation_.out_heat, i);
    }
    return outlet_ - inlet_ + reaction + work_.vessel_heat + work_.departure + solution.tables -
           solution.taken + v_[*model_.slot("loss")] * variation_.loss_factor - v_[*model_.slot("shaft")];
  }

  /// Feeds and extents scaled, what leaves made up anew.
  void scale_amounts() {
    const StepInput& input = model_.input();
    std::vector<double> more(input.substances.size(), 0);
    std::size_t part = 0;
    for (std::size_t f = 0; f < input.feeds.size(); ++f) {
      for (const FeedPart& of : input.feeds[f].parts) {
        const double added = (factor(variation_.feeds, f) - 1) * work_.parts[part];
        work_.parts[part++] += added;
        more[of.substance] += added;
      }
    }
    // A feed that was read wrongly carries its reactions along.
    double grown = 1;
    for (const auto& feed : variation_.feeds) grown = feed.second;
    for (std::size_t j = 0; j < work_.extents.size(); ++j) {
      const double was = work_.extents[j];
      const bool follows = !variation_.feeds.empty() &&
                           input.reactions[j].progress.kind != ProgressKind::Extent &&
                           more[input.reactions[j].progress.of] != 0;
      work_.extents[j] = was * factor(variation_.extents, j) * (follows ? grown : 1);
      for (std::size_t i = 0; i < more.size(); ++i)
        more[i] += model_.coefficient_of(j, i) * (work_.extents[j] - was);
    }
    for (std::size_t i = 0; i < more.size(); ++i) {
      work_.leaving[i] += more[i];
      work_.fed[i] = 0;
    }
  }

  bool solve() {
    const std::size_t sought = model_.sought(), duty = model_.duty_slot();
    if (sought == duty) {
      const std::optional<double> heat = needed();
      if (!heat) return false;
      v_[duty] = *heat;
      return true;
    }
    const auto missing = [&](double x) -> std::optional<double> {
      v_[sought] = x;
      const std::optional<double> heat = needed();
      return heat ? std::optional<double>(*heat - v_[duty]) : std::nullopt;
    };
    double a = v_[sought], b = a != 0 ? a * 1.001 : 1e-3;
    std::optional<double> fa = missing(a), fb = missing(b);
    for (int turn = 0; turn < 50 && fa && fb; ++turn) {
      if (std::fabs(*fb) <=
          1e-10 * (std::fabs(inlet_) + std::fabs(outlet_) + std::fabs(work_.reaction_heat) + 1))
        return true;
      if (*fb == *fa) return false;
      const double next = b - *fb * (b - a) / (*fb - *fa);
      if (!(next > model_.slots()[sought].low && next < model_.slots()[sought].high)) return false;
      a = b, fa = fb;
      b = next, fb = missing(b);
    }
    return false;
  }

  const StepResult& result_;
  const Variation& variation_;
  const Model& model_;
  std::vector<double> v_;
  Work work_;
  double inlet_ = 0, outlet_ = 0;
};

class Slips {
 public:
  Slips(const StepResult& result, Lookups& lookups)
      : result_(result), input_(result.model->input()), lookups_(lookups) {}

  std::vector<Variation> all() {
    lines();
    reactions();
    whole();
    feeds();
    return std::move(list_);
  }

 private:
  Variation& add(StepSlip kind, std::string words) {
    list_.emplace_back();
    list_.back().slip = {kind, std::move(words)};
    return list_.back();
  }

  const std::string& name(std::size_t substance) const { return input_.substances[substance].name; }

  void lines() {
    std::vector<std::size_t> leaving;
    for (const StreamLine& line : result_.out) {
      if (leaving.empty() || leaving.back() != line.substance) leaving.push_back(line.substance);
    }
    for (const std::size_t i : leaving)
      add(StepSlip::HeatCapacityLeftOut, "the heat capacity of " + name(i) + " is left out of what leaves")
          .out_heat[i] = 0;
    std::size_t part = 0;
    for (std::size_t f = 0; f < input_.feeds.size(); ++f) {
      Variation cold;
      cold.slip = {StepSlip::InletHeatLeftOut,
                   "the heat of " + input_.feeds[f].name + " above 25 °C is left out"};
      for (std::size_t p = 0; p < input_.feeds[f].parts.size(); ++p) cold.in_heat[part++] = 0;
      list_.push_back(std::move(cold));
    }
    for (const std::size_t i : leaving) {
      const double grams = 1000 * result_.model->molar_mass(i);
      if (!(grams > 0)) continue;
      add(StepSlip::MolarForMass, "the molar heat capacity of " + name(i) + " is used on its kilograms")
          .out_heat[i] = grams;
      add(StepSlip::MolarForMass, "the heat capacity of " + name(i) + " per kilogram is used on its moles")
          .out_heat[i] = 1 / grams;
    }
  }

  void reactions() {
    for (std::size_t j = 0; j < input_.reactions.size(); ++j) {
      const StepReaction& reaction = input_.reactions[j];
      const Progress& progress = reaction.progress;
      add(StepSlip::ReactionLeftOut, "the heat of " + reaction.name + " is left out").free_only[j] = 0;
      if (progress.kind != ProgressKind::Extent) {
        const double times = std::fabs(result_.model->coefficient_of(j, progress.of));
        if (times != 1 && times != 0)
          add(StepSlip::ExtentAsMoles,
              "the moles of " + name(progress.of) + " are taken as the extent of " + reaction.name)
              .free_only[j] = times;
      }
      const double figure =
          result_.values[*result_.model->slot("reaction." + std::to_string(j) + ".progress")];
      double consumed = 0, fed = 0;
      for (std::size_t k = 0; k < input_.reactions.size(); ++k)
        consumed +=
            std::max(0.0, -result_.model->coefficient_of(k, progress.of)) * result_.reactions[k].extent;
      for (const StreamLine& line : result_.in) fed += line.substance == progress.of ? line.amount : 0;
      if (progress.kind == ProgressKind::Selectivity && consumed > 0 && fed > 0) {
        add(StepSlip::ConversionTwice, "the conversion is applied twice in " + reaction.name).extents[j] =
            consumed / fed;
        add(StepSlip::ConversionTwice, "the selectivity is applied twice in " + reaction.name).extents[j] =
            figure;
        add(StepSlip::YieldAsSelectivity, "the selectivity of " + reaction.name + " is taken as a yield")
            .extents[j] = fed / consumed;
      } else if (progress.kind == ProgressKind::Yield && consumed > 0 && fed > 0 && consumed < fed) {
        add(StepSlip::YieldAsSelectivity, "the yield of " + reaction.name + " is taken as a selectivity")
            .extents[j] = consumed / fed;
      } else if (progress.kind == ProgressKind::Conversion && figure > 0 && figure < 1) {
        add(StepSlip::ConversionTwice, "the conversion is applied twice in " + reaction.name).extents[j] =
            figure;
      }
      water(j);
    }
  }

  /// Gross for net: the water of the reaction in the other phase.
  void water(std::size_t j) {
    for (std::size_t i = 0; i < input_.reactions[j].substances.size(); ++i) {
      const balance::ReactionSpecies& species = input_.reactions[j].reaction->species[i];
      if (!species.product || species.species->compound == nullptr ||
          species.species->compound->cas != "7732-18-5")
        continue;
      const std::shared_ptr<const StateFacts> liquid =
          lookups_.state(species.species, State{molecule::Phase::Liquid, {}});
      if (!liquid->from_gas.ok()) continue;
      const bool vapour =
          thermo::phase_taken(*species.species, species.term.phase).phase == molecule::Phase::Gas;
      const double change = liquid->from_gas->value.value() * species.coefficient();
      add(StepSlip::GrossForNet,
          vapour ? "the heat of " + input_.reactions[j].name + " is the gross one, water as liquid"
                 : "the heat of " + input_.reactions[j].name + " is the net one, water as vapour")
          .heat_added[j] = vapour ? change : -change;
    }
  }

  void whole() {
    if (!input_.reactions.empty())
      add(StepSlip::SensibleTwice,
          "the heats of reaction are those at outlet temperature, and the heat to there is added again")
          .heat_at_outlet = true;
    add(StepSlip::CelsiusInPolynomial, "degrees Celsius are put into heat capacities that want kelvin")
        .sensible = Sensible::CelsiusAsKelvin;
    add(StepSlip::MeanOverWrongLimits, "the heat capacities at 25 °C stand for the mean up to temperature")
        .sensible = Sensible::AtReference;
    add(StepSlip::MeanOverWrongLimits, "the heat capacities at temperature stand for the mean from 25 °C")
        .sensible = Sensible::AtTemperature;
    const bool duty = result_.model->sought() == result_.model->duty_slot();
    if (duty) {
      add(StepSlip::PerHourForPerSecond, "the duty is per hour, not per second").answer_factor = 3600;
      add(StepSlip::PerHourForPerSecond, "the duty was divided by 3600 once too often").answer_factor =
          1 / 3600.0;
      add(StepSlip::Sign, "the sign of the duty is turned round").answer_factor = -1;
    }
    if (result_.values[*result_.model->slot("loss")] != 0) {
      add(StepSlip::LossLeftOut, "the heat loss is left out").loss_factor = 0;
      add(StepSlip::Sign, "the heat loss is added with the wrong sign").loss_factor = -1;
    }
  }

  void feeds() {
    for (std::size_t f = 0; f < input_.feeds.size(); ++f) {
      const Feed& feed = input_.feeds[f];
      bool all_gas = true, by_volume = feed.shares != ShareKind::None && feed.measure == Measure::Volume;
      for (const FeedPart& part : feed.parts) {
        all_gas = all_gas && (part.state.phase == molecule::Phase::Gas);
        by_volume = by_volume || part.measure == Measure::Volume;
      }
      if (feed.shares != ShareKind::None && !feed.excess && feed.parts.size() > 1) shares(f);
      if (!all_gas || feed.excess) continue;
      const struct {
        double factor;
        const char* words;
      } metres[] = {{273.15 / 288.15, "m³ at 15 °C"},
                    {273.15 / 293.15, "m³ at 20 °C"},
                    {273.15 / 288.706, "m³ at 60 °F"}};
      for (const auto& metre : metres) {
        add(StepSlip::OtherCubicMetre, std::string(metre.words) + " are taken for normal m³ in " + feed.name,
            f, metre.factor);
        add(StepSlip::OtherCubicMetre,
            "normal m³ are taken for " + std::string(metre.words) + " in " + feed.name, f, 1 / metre.factor);
      }
      if (!by_volume) continue;
      const double pressure = result_.values[*result_.model->slot("feed." + std::to_string(f) + ".pressure")];
      const double atmosphere = units::kStandardAtmosphere;
      add(StepSlip::GaugeForAbsolute, "the gauge pressure of " + feed.name + " is taken as absolute", f,
          (pressure - atmosphere) / pressure);
      add(StepSlip::GaugeForAbsolute, "the absolute pressure of " + feed.name + " is taken as gauge", f,
          (pressure + atmosphere) / pressure);
      add(StepSlip::BarForAtmosphere, "100 kPa stand for 101.325 kPa in " + feed.name, f, 1e5 / atmosphere);
      add(StepSlip::BarForAtmosphere, "101.325 kPa stand for 100 kPa in " + feed.name, f, atmosphere / 1e5);
    }
  }

  void add(StepSlip kind, std::string words, std::size_t feed, double times) {
    if (times > 0) add(kind, std::move(words)).feeds[feed] = times;
  }

  void shares(std::size_t f) {
    StepInput other = input_;
    Feed& feed = other.feeds[f];
    const bool by_mole = feed.shares == ShareKind::MoleShare;
    feed.shares = by_mole ? ShareKind::MassShare : ShareKind::MoleShare;
    Result<Model> model = Model::of(std::move(other), lookups_);
    if (!model.ok()) return;
    add(StepSlip::MoleForMassShare, by_mole ? "the mol % of " + input_.feeds[f].name + " are taken as mass %"
                                            : "the mass % of " + input_.feeds[f].name + " are taken as mol %")
        .model = std::make_shared<const Model>(std::move(model).value());
  }

  const StepResult& result_;
  const StepInput& input_;
  Lookups& lookups_;
  std::vector<Variation> list_;
};

}  // namespace

std::map<std::string, double> slip_sheet(const StepResult& result, const Variation& variation) {
  return Sheet(result, variation).figures();
}

std::vector<Variation> single_slips(const StepResult& result, Lookups& lookups) {
  return Slips(result, lookups).all();
}

}  // namespace heatledger::step
