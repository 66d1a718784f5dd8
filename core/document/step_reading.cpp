#include "core/document/step_reading.hpp"

#include <algorithm>
#include <cmath>
#include <optional>

#include "core/base/number_text.hpp"
#include "core/document/air_row.hpp"
#include "core/document/step_kinds.hpp"
#include "core/document/typed_rows.hpp"
#include "core/units/quantity_text.hpp"

namespace heatledger::document {
namespace {

namespace d = units::dimension;
using step::Blank;
using step::Typed;

/// "82 ± 1.5 %" beside a share means (82 ± 1.5) %, not 82 within 1.5 % of itself.
std::string per_cent_of_both(const std::string& text) {
  const std::string t = trimmed(text);
  const std::size_t sign = t.find("±") != std::string::npos    ? t.find("±")
                           : t.find("+-") != std::string::npos ? t.find("+-")
                                                               : t.find("+/-");
  if (sign == std::string::npos || t.back() != '%' || t.find('%') != t.size() - 1 || t.front() == '(')
    return text;
  return "(" + t.substr(0, t.size() - 1) + ") %";
}

/// FNV-1a: names the error of a typed figure.
std::uint64_t text_key(const std::string& text) {
  std::uint64_t key = 14695981039346656037ULL;
  for (const char c : text) key = (key ^ static_cast<unsigned char>(c)) * 1099511628211ULL;
  return key;
}

bool begins(const std::string& text, const std::string& with) {
  return text.compare(0, with.size(), with) == 0;
}

class Reader {
 public:
  Reader(const StepSheet& sheet, const StepContext& context) : sheet_(sheet), context_(context) {}

  StepReading read() {
    input().title = sheet_.id + " " + sheet_.title;
    input().kind = kind_of(sheet_).per_time ? step::StepKind::ThroughFlow : step::StepKind::Charge;
    if (!sheet_.sought.empty()) input().sought = sheet_.sought;
    code_names();
    reactions();
    for (std::size_t i = 0; i < sheet_.feeds.size(); ++i) feed(i);
    species_figures();
    for (std::size_t i = 0; i < sheet_.leaving.size(); ++i) leaving(i);
    for (std::size_t i = 0; i < sheet_.reactions.size(); ++i) progress(i);
    excesses();
    blanks();
    sought_part();
    return std::move(reading_);
  }

 private:
  step::StepInput& input() { return reading_.input; }
  bool flow() { return input().kind == step::StepKind::ThroughFlow; }

  void refuse(Error error, const std::string& where) {
    error.where = error.where.empty() ? where : where + ", " + error.where;
    reading_.errors.push_back(std::move(error));
  }

  /// A typed quantity of one dimension; empty when nothing or nothing readable is written.
  Blank quantity(const std::string& text, const units::Dimension& dimension, const std::string& where) {
    if (trimmed(text).empty()) return std::nullopt;
    const Result<units::TypedValue> read = units::evaluate_quantity(
        dimension == d::kNumber ? per_cent_of_both(text) : text, dimension, *context_.names);
    if (!read.ok()) {
      refuse(read.error(), where);
      return std::nullopt;
    }
    return Typed{read->value, read->u95.value_or(0)};
  }

  Blank pressure(const std::string& text, const std::string& where) {
    if (trimmed(text).empty()) return std::nullopt;
    const Result<units::TypedValue> read = units::evaluate_quantity(text, *context_.names);
    if (!read.ok()) {
      refuse(read.error(), where);
      return std::nullopt;
    }
    const Result<double> absolute = units::absolute_pressure(*read);
    if (!absolute.ok()) {
      refuse(absolute.error(), where);
      return std::nullopt;
    }
    return Typed{*absolute, read->u95.value_or(0)};
  }

  // Species.

  struct Named {
    std::size_t substance;
    step::State state;
  };

  void code_names() {
    for (std::size_t i = 0; i < sheet_.species.size(); ++i) {
      const SpeciesRow& row = sheet_.species[i];
      if (trimmed(row.molar_mass).empty()) continue;
      const std::string where = "species[" + std::to_string(i) + "]";
      const Blank mass = quantity(row.molar_mass, d::kMolarMass, where + ".molar_mass");
      if (!mass) continue;
      Result<std::shared_ptr<const facts::Species>> coded =
          facts::make_coded_species(row.species, mass->value);
      if (!coded.ok()) {
        refuse(coded.error(), where);
        continue;
      }
      codes_.push_back(std::move(coded).value());
    }
  }

  Result<std::shared_ptr<const facts::Species>> find(const std::string& name, bool quoted) {
    for (const auto& code : codes_) {
      if (code->name == name || code->text == name) return code;
    }
    return context_.species->species(name, quoted);
  }

  std::size_t substance(const std::string& name, const std::shared_ptr<const facts::Species>& species) {
    for (std::size_t i = 0; i < input().substances.size(); ++i) {
      const facts::Species& known = *input().substances[i].species;
      const bool same =
          species.get() == &known || (species->compound != nullptr && species->compound == known.compound) ||
          (!species->canonical.empty() && species->canonical == known.canonical &&
           species->compound == known.compound) ||
          (species->coded && species->name == known.name) ||
          (species->compound == nullptr && known.compound == nullptr && species->name == known.name);
      if (same) return i;
    }
    step::SubstanceInput added;
    added.name = name;
    added.species = species;
    input().substances.push_back(std::move(added));
    return input().substances.size() - 1;
  }

  /// "ethene(g)", "NaOH(aq, 50 wt%)".
  std::optional<Named> named(const std::string& text, const std::string& where) {
    const Result<molecule::EquationText> read = molecule::parse_equation(text + " -> x");
    if (!read.ok() || read->reactants.size() != 1 || !read->reactants[0].coefficient.typed.empty()) {
      refuse(read.ok() ? Error{"species.unknown", "One species is written here, without a coefficient.", "",
                               "Write it as in an equation: ethene(g)."}
                       : read.error(),
             where);
      return std::nullopt;
    }
    const molecule::Term& term = read->reactants[0];
    const Result<std::shared_ptr<const facts::Species>> species = find(term.species, term.quoted);
    if (!species.ok()) {
      refuse(species.error(), where);
      return std::nullopt;
    }
    return Named{substance(shown(term, **species), *species), step::State{term.phase, term.strength}};
  }

  static std::string shown(const molecule::Term& term, const facts::Species& species) {
    return term.quoted ? species.name : molecule::typeset_formula(term.species);
  }

  // Reactions.

  void reactions() {
    for (std::size_t i = 0; i < sheet_.reactions.size(); ++i) {
      const ProgressSheet& typed = sheet_.reactions[i];
      const std::string where = "reactions[" + std::to_string(i) + "]";
      const std::shared_ptr<const balance::Ledger> ledger = context_.ledger(typed.reaction);
      if (ledger == nullptr) {
        refuse(Error{"step.no_reaction", "The reaction " + typed.reaction + " gives no figure that goes on.",
                     "", "Write and balance it above, or take it out of this step."},
               where + ".reaction");
        place_.push_back(std::nullopt);
        continue;
      }
      step::StepReaction reaction;
      reaction.name = "reaction " + (typed.reaction.size() > 1 ? typed.reaction.substr(1) : typed.reaction);
      reaction.reaction = ledger->reaction;
      for (const balance::ReactionSpecies& species : ledger->reaction->species)
        reaction.substances.push_back(substance(balance::display_species(species), species.species));
      if (!heat(reaction, *ledger, typed, where)) {
        place_.push_back(std::nullopt);
        continue;
      }
      place_.push_back(input().reactions.size());
      input().reactions.push_back(std::move(reaction));
    }
  }

  bool heat(step::StepReaction& reaction, const balance::Ledger& ledger, const ProgressSheet& typed,
            const std::string& where) {
    if (trimmed(typed.heat).empty()) {
      const balance::Route* taken = balance::find_route(ledger, ledger.taken);
      if (taken == nullptr || !taken->as_written) {
        refuse(Error{"step.no_reaction", "The ledger of " + reaction.name + " has no figure to take.", "",
                     "Type a heat for this step."},
               where + ".heat");
        return false;
      }
      reaction.heat.as_written = *taken->as_written;
      reaction.heat.source = ledger.taken;
      return true;
    }
    const Blank figure = quantity(typed.heat, d::kEnergyPerMole, where + ".heat");
    if (!figure) return false;
    double times = 1;
    if (!trimmed(typed.heat_per).empty()) {
      const std::optional<Named> per = named(typed.heat_per, where + ".heat_per");
      if (!per) return false;
      times = 0;
      for (std::size_t i = 0; i < reaction.substances.size(); ++i) {
        if (reaction.substances[i] == per->substance) times += reaction.reaction->species[i].coefficient();
      }
      if (times == 0) {
        refuse(Error{"step.key_not_consumed",
                     "The heat is stated per mole of a species that is not in the reaction.", "",
                     "Choose one of its species."},
               where + ".heat_per");
        return false;
      }
    }
    reaction.heat.as_written = uncertainty::Quantity(
        figure->value * times, figure->u95 * times,
        uncertainty::source_key(uncertainty::SourceKind::Measurement, text_key(sheet_.id + typed.reaction)));
    if (const Blank at = quantity(typed.heat_at, d::kTemperature, where + ".heat_at"))
      reaction.heat.temperature = at->value;
    reaction.heat.typed = true;
    reaction.heat.source = "typed";
    reaction.heat.includes_mixing = typed.includes == "yes"  ? step::Includes::Yes
                                    : typed.includes == "no" ? step::Includes::No
                                                             : step::Includes::Unknown;
    return true;
  }

  /// "conversion of A", "conversion of what arrives of A", "total conversion of A", "yield of B from A",
  /// "selectivity to B from A", "extent".
  void progress(std::size_t index) {
    if (!place_[index]) return;
    const ProgressSheet& typed = sheet_.reactions[index];
    const std::string where = "reactions[" + std::to_string(index) + "]";
    step::Progress progress;
    const std::string how = trimmed(typed.how);
    const struct {
      const char* words;
      step::ProgressKind kind;
    } ways[] = {{"conversion of what arrives of ", step::ProgressKind::ConversionOfArriving},
                {"conversion of ", step::ProgressKind::Conversion},
                {"total conversion of ", step::ProgressKind::TotalConversion},
                {"yield of ", step::ProgressKind::Yield},
                {"selectivity to ", step::ProgressKind::Selectivity}};
    bool known = how == "extent";
    progress.kind = step::ProgressKind::Extent;
    for (const auto& way : ways) {
      if (known || !begins(how, way.words)) continue;
      known = true;
      progress.kind = way.kind;
      std::string name = how.substr(std::string(way.words).size());
      if (way.kind == step::ProgressKind::Yield || way.kind == step::ProgressKind::Selectivity) {
        const std::size_t from = name.find(" from ");
        known = from != std::string::npos;
        if (!known) break;
        const std::optional<Named> product = named(name.substr(0, from), where + ".how");
        if (!product) return;
        progress.product = product->substance;
        name = name.substr(from + 6);
      }
      const std::optional<Named> of = named(name, where + ".how");
      if (!of) return;
      progress.of = of->substance;
    }
    if (!known) {
      refuse(
          Error{
              "step.how", "How far the reaction goes is not understood: \"" + how + "\".", "",
              "Write: conversion of A, total conversion of A, yield of B from A, selectivity to B from A, or "
              "extent."},
          where + ".how");
      return;
    }
    if (progress.kind != step::ProgressKind::Extent) {
      progress.figure = quantity(typed.figure, d::kNumber, where + ".figure");
    } else {
      progress.figure = quantity(typed.figure, flow() ? d::kMolarFlow : d::kAmount, where + ".figure");
    }
    input().reactions[*place_[index]].progress = progress;
  }

  // Feeds.

  void feed(std::size_t index) {
    const FeedSheet& typed = sheet_.feeds[index];
    const std::string where = "feeds[" + std::to_string(index) + "]";
    step::Feed feed;
    mass_share_ = mole_share_ = false;
    feed.name = typed.name.empty() ? "feed " + std::to_string(index + 1) : typed.name;
    feed.temperature = quantity(typed.at, d::kTemperature, where + ".at");
    feed.pressure = pressure(typed.pressure, where + ".pressure");
    if (!trimmed(typed.from).empty()) {
      from_above(feed, trimmed(typed.from), where);
    } else {
      for (std::size_t r = 0; r < typed.rows.size(); ++r)
        feed_row(feed, typed.rows[r], where + ".rows[" + std::to_string(r) + "]", r);
      total(feed, index, where);
    }
    input().feeds.push_back(std::move(feed));
  }

  void from_above(step::Feed& feed, const std::string& id, const std::string& where) {
    const step::StepResult* above = context_.above(id);
    if (above == nullptr) {
      refuse(Error{"step.no_step", "The step " + id + " stands not above this one, or has no result.", "",
                   "Choose a step above that is worked out."},
             where + ".from");
      return;
    }
    if (!feed.temperature && !above->out.empty()) {
      feed.temperature = Typed{above->out.front().temperature, 0};
      feed.carried_temperature = above->model->slots()[above->model->outlet_temperature_slot()].spread;
      for (const step::Answer& answer : above->answers) {
        if (answer.id == step::FigureId::Sought && above->model->outlet_sought())
          feed.carried_temperature = answer.value;
      }
    }
    const step::LeavingSpread spread = step::leaving_spread(*above->model, above->values);
    if (!feed.pressure) feed.pressure = Typed{above->values[*above->model->slot("outlet.pressure")], 0};
    for (const step::StreamLine& line : above->out) {
      const step::SubstanceInput& from = above->model->input().substances[line.substance];
      step::FeedPart part;
      part.substance = substance(from.name, from.species);
      step::SubstanceInput& here = input().substances[part.substance];
      if (!here.heat_capacity) here.heat_capacity = from.heat_capacity;
      if (!here.mass_heat_capacity) here.mass_heat_capacity = from.mass_heat_capacity;
      part.state = line.state;
      part.without_water = true;
      part.figure = Typed{line.amount, 0};
      part.derived = true;
      part.row = feed.parts.size();
      // One line of a substance that leaves split carries the vapour, the other the rest.
      const bool as_vapour =
          above->model->vapour_state(line.substance).has_value() && line.state.phase == molecule::Phase::Gas;
      part.shared = as_vapour ? spread.vapour[line.substance] : spread.total[line.substance];
      if (!as_vapour) part.shared->add(spread.vapour[line.substance], -1);
      feed.parts.push_back(std::move(part));
    }
    reading_.notes.push_back("The amounts of " + feed.name + " come from step " + id + " with their ±.");
  }

  /// Air goes in as its parts: one entry, one ±. Without an amount it is the whole of its feed.
  void air_row(step::Feed& feed, const AirRow& air, const FeedRow& typed, const std::string& where,
               std::size_t row) {
    const std::string text = trimmed(typed.amount);
    const std::string whole = text.empty() || text == "rest" ? "100 mol%" : text;
    const Result<units::TypedValue> read = units::evaluate_quantity(whole, *context_.names);
    if (!read.ok()) {
      refuse(read.error(), where + ".amount");
      return;
    }
    const units::Dimension& dimension = read->dimension();
    const std::optional<step::Measure> measure = measure_of(dimension);
    const bool by_mass = dimension == d::kMassFraction || measure == step::Measure::Mass;
    if (dimension == d::kMoleFraction || dimension == d::kVolumeFraction) {
      share(feed, step::ShareKind::MoleShare, where);
    } else if (dimension == d::kMassFraction) {
      share(feed, step::ShareKind::MassShare, where);
    } else if (!measure) {
      refuse(Error{"step.figure", "An amount here is " + amount_kinds() + ".", "", amount_examples()},
             where + ".amount");
      return;
    }
    const double u95 = read->u95.value_or(0);
    for (const AirPart& one : air.parts) {
      const std::optional<Named> species = named(one.name, where + ".species");
      if (!species) return;
      step::FeedPart part;
      part.substance = species->substance;
      part.state.phase = molecule::Phase::Gas;
      part.row = row;
      part.derived = !feed.parts.empty() && feed.parts.back().row == row;
      part.measure = measure.value_or(step::Measure::Mole);
      const double of_air = by_mass ? one.mass_share : one.mole_share;
      part.figure = Typed{read->value * of_air, 0};
      part.shared = uncertainty::Quantity(
          read->value * of_air, u95 * of_air,
          uncertainty::source_key(uncertainty::SourceKind::Typed, text_key(sheet_.id + "|" + where)));
      feed.parts.push_back(std::move(part));
    }
    reading_.notes.push_back(feed.name + ": " + air.note + ".");
  }

  void feed_row(step::Feed& feed, const FeedRow& typed, const std::string& where, std::size_t row) {
    if (trimmed(typed.species).empty() && trimmed(typed.amount).empty()) return;
    const Result<std::optional<AirRow>> air = read_air(trimmed(typed.species));
    if (!air.ok()) {
      refuse(air.error(), where + ".species");
      return;
    }
    if (*air) {
      air_row(feed, **air, typed, where, row);
      return;
    }
    const std::optional<Named> species = named(typed.species, where + ".species");
    if (!species) return;
    step::FeedPart part;
    part.substance = species->substance;
    part.state = species->state;
    part.row = row;
    const std::string text = trimmed(typed.amount);
    if (text == "rest") {
      if (feed.shares == step::ShareKind::None) feed.shares = step::ShareKind::MoleShare;
    } else if (!text.empty()) {
      const Result<units::TypedValue> read = units::evaluate_quantity(text, *context_.names);
      if (!read.ok()) {
        refuse(read.error(), where + ".amount");
        return;
      }
      part.figure = Typed{read->value, read->u95.value_or(0)};
      const units::Dimension& dimension = read->dimension();
      if (dimension == d::kMoleFraction || dimension == d::kVolumeFraction) {
        share(feed, step::ShareKind::MoleShare, where);
      } else if (dimension == d::kMassFraction) {
        share(feed, step::ShareKind::MassShare, where);
      } else if (const std::optional<step::Measure> measure = measure_of(dimension)) {
        part.measure = *measure;
      } else {
        refuse(Error{"step.figure", "An amount here is " + amount_kinds() + ".", "", amount_examples()},
               where + ".amount");
        return;
      }
    }
    feed.parts.push_back(std::move(part));
  }

  void share(step::Feed& feed, step::ShareKind kind, const std::string& where) {
    const bool mixed = (mass_share_ && kind == step::ShareKind::MoleShare) ||
                       (mole_share_ && kind == step::ShareKind::MassShare);
    if (feed.parts.empty()) mass_share_ = mole_share_ = false;
    if (!feed.parts.empty() && mixed) {
      refuse(Error{"step.shares", "The shares of one feed are all by mole or all by mass.", "",
                   "Convert one of them."},
             where + ".amount");
    }
    (kind == step::ShareKind::MassShare ? mass_share_ : mole_share_) = true;
    feed.shares = kind;
  }

  std::optional<step::Measure> measure_of(const units::Dimension& dimension) {
    if (dimension == (flow() ? d::kMolarFlow : d::kAmount)) return step::Measure::Mole;
    if (dimension == (flow() ? d::kMassFlow : d::kMass)) return step::Measure::Mass;
    if (dimension == (flow() ? d::kVolumeFlow : d::kVolume)) return step::Measure::Volume;
    return std::nullopt;
  }

  std::string amount_kinds() {
    return flow() ? "a flow (of moles, mass or volume) or a share"
                  : "an amount (of moles, mass or volume) or a share";
  }
  std::string amount_examples() {
    return flow() ? "Type such as 12 kmol/h, 340 kg/h, 21 mol% or 8 wt%."
                  : "Type such as 12 kmol, 340 kg, 21 mol% or 8 wt%.";
  }

  void total(step::Feed& feed, std::size_t index, const std::string& where) {
    const std::string text = trimmed(sheet_.feeds[index].total);
    if (feed.shares == step::ShareKind::None || text.empty()) return;
    const std::size_t excess = text.find("excess ");
    if (excess != std::string::npos) {
      feed.total = quantity(text.substr(0, excess), d::kNumber, where + ".total");
      excesses_.push_back({index, text.substr(excess + 7), where + ".total"});
      return;
    }
    const Result<units::TypedValue> read = units::evaluate_quantity(text, *context_.names);
    if (!read.ok()) {
      refuse(read.error(), where + ".total");
      return;
    }
    const std::optional<step::Measure> measure = measure_of(read->dimension());
    if (!measure) {
      refuse(Error{"step.figure", "The amount of a feed is " + amount_kinds() + ".", "", amount_examples()},
             where + ".total");
      return;
    }
    feed.measure = *measure;
    feed.total = Typed{read->value, read->u95.value_or(0)};
  }

  struct Excess {
    std::size_t feed;
    std::string words;  ///< "oxygen over methane"
    std::string where;
  };

  void excesses() {
    for (const Excess& excess : excesses_) {
      const std::size_t over = excess.words.find(" over ");
      std::optional<Named> brought, key;
      if (over != std::string::npos) {
        brought = named(excess.words.substr(0, over), excess.where);
        key = named(excess.words.substr(over + 6), excess.where);
      }
      std::optional<std::size_t> reaction;
      for (std::size_t j = 0; brought && key && j < input().reactions.size() && !reaction; ++j) {
        bool has_brought = false, has_key = false;
        for (std::size_t i = 0; i < input().reactions[j].substances.size(); ++i) {
          if (input().reactions[j].reaction->species[i].product) continue;
          has_brought = has_brought || input().reactions[j].substances[i] == brought->substance;
          has_key = has_key || input().reactions[j].substances[i] == key->substance;
        }
        if (has_brought && has_key) reaction = j;
      }
      if (!reaction) {
        refuse(Error{"step.excess", "An excess names two reactants of one reaction of this step.", "",
                     "Write: 20 % excess oxygen over methane."},
               excess.where);
        continue;
      }
      input().feeds[excess.feed].excess = step::ExcessOver{*reaction, brought->substance, key->substance};
    }
  }

  // What is left.

  void species_figures() {
    for (std::size_t i = 0; i < sheet_.species.size(); ++i) {
      const SpeciesRow& row = sheet_.species[i];
      const std::string where = "species[" + std::to_string(i) + "]";
      if (trimmed(row.species).empty()) continue;
      const std::optional<Named> species = named(row.species, where + ".species");
      if (!species) continue;
      step::SubstanceInput& substance = input().substances[species->substance];
      if (!trimmed(row.heat_capacity).empty()) {
        const Result<units::TypedValue> read = units::evaluate_quantity(row.heat_capacity, *context_.names);
        if (!read.ok()) {
          refuse(read.error(), where + ".heat_capacity");
        } else if (read->dimension() == d::kMolarHeatCapacity && read->value > 0) {
          substance.heat_capacity = Typed{read->value, read->u95.value_or(0)};
        } else if (read->dimension() == d::kMassHeatCapacity && read->value > 0) {
          substance.mass_heat_capacity = Typed{read->value, read->u95.value_or(0)};
        } else {
          refuse(Error{"step.figure", "A heat capacity is positive, per mole or per kilogram and kelvin.", "",
                       "Type such as 2.1 kJ/(kg K)."},
                 where + ".heat_capacity");
        }
      }
      substance.density =
          positive(quantity(row.density, d::kDensity, where + ".density"), where + ".density");
      substance.vapour_pressure =
          positive(pressure(row.vapour_pressure, where + ".vapour_pressure"), where + ".vapour_pressure");
    }
  }

  Blank positive(Blank figure, const std::string& where) {
    if (!figure || figure->value > 0) return figure;
    refuse(Error{"step.out_of_range", "This figure is above zero.", "", "Look at the figure and its unit."},
           where);
    return std::nullopt;
  }

  void leaving(std::size_t index) {
    const LeavingRow& row = sheet_.leaving[index];
    const std::string where = "leaving[" + std::to_string(index) + "]";
    if (trimmed(row.species).empty()) return;
    const std::optional<Named> species = named(row.species, where + ".species");
    if (!species) return;
    step::Leaving leaving;
    leaving.substance = species->substance;
    std::string how = trimmed(row.how);
    const struct {
      const char* words;
      molecule::Phase phase;
    } phases[] = {{"gas", molecule::Phase::Gas},
                  {"liquid", molecule::Phase::Liquid},
                  {"solid", molecule::Phase::Solid}};
    bool known = how == "saturation";
    leaving.by_saturation = known;
    for (const auto& phase : phases) {
      if (how != phase.words) continue;
      leaving.state.phase = phase.phase;
      known = true;
    }
    const std::size_t vapour = how.find(" vapour");
    if (!known && vapour != std::string::npos) {
      leaving.vapour_share = quantity(how.substr(0, vapour), d::kNumber, where + ".how");
      known = true;
    }
    if (!known) {
      refuse(Error{"step.how", "How " + row.species + " leaves is not understood: \"" + how + "\".", "",
                   "Write: gas, liquid, solid, saturation, or 30 % vapour."},
             where + ".how");
      return;
    }
    input().outlet.leaving.push_back(leaving);
  }

  std::string text_of(const char* id) const {
    const auto found = sheet_.blanks.find(id);
    return found == sheet_.blanks.end() ? std::string() : found->second;
  }

  Blank blank(const char* id, const units::Dimension& dimension) {
    return quantity(text_of(id), dimension, std::string("blanks.") + id);
  }

  /// As heat, or as a share of what the gases carry out.
  void departure(const units::Dimension& heat) {
    const std::string text = trimmed(text_of("departure"));
    if (!text.empty() && text.back() == '%') {
      input().departure_share = blank("departure", d::kNumber);
    } else {
      input().departure = blank("departure", heat);
    }
  }

  /// The sheet counts rows, the balance parts: air is one row and several parts.
  void sought_part() {
    const std::string& sought = sheet_.sought;
    if (sought.empty()) return;
    const std::optional<std::string> slot = slot_of_row(input(), sought);
    if (slot) {
      input().sought = *slot;
      return;
    }
    refuse(Error{"step.not_a_blank", "Air is several parts at once and cannot be sought.", "",
                 "Give the feed its shares, and seek its amount."},
           "sought");
  }

  void blanks() {
    const units::Dimension heat = flow() ? d::kPower : d::kEnergy;
    step::StepInput& in = input();
    in.outlet.temperature = blank("outlet.temperature", d::kTemperature);
    in.outlet.pressure = pressure(text_of("outlet.pressure"), "blanks.outlet.pressure");
    in.duty = blank("duty", heat);
    in.loss = blank("loss", heat);
    in.shaft_work = blank("shaft", heat);
    departure(heat);
    in.mass_heat_capacity =
        positive(blank("mass_heat_capacity", d::kMassHeatCapacity), "blanks.mass_heat_capacity");
    in.mixing_heat = blank("mixing_heat", heat);
    in.surface.medium_in = blank("medium_in", d::kTemperature);
    in.surface.medium_out = blank("medium_out", d::kTemperature);
    if (flow()) return;
    in.time = positive(blank("time", d::kTime), "blanks.time");
    in.vessel.heat_capacity = blank("vessel.heat_capacity", d::kHeatCapacity);
    in.vessel.temperature = blank("vessel.temperature", d::kTemperature);
    in.charge.process_temperature = blank("process_temperature", d::kTemperature);
    in.charge.limit_temperature = blank("limit_temperature", d::kTemperature);
    in.charge.cooling = positive(blank("cooling", d::kPower), "blanks.cooling");
    in.charge.rate_constant = positive(blank("rate_constant", d::kRate), "blanks.rate_constant");
    if (const std::string solvent = trimmed(text_of("solvent")); !solvent.empty()) {
      if (const std::optional<Named> species = named(solvent, "blanks.solvent"))
        in.charge.solvent = species->substance;
    }
  }

  const StepSheet& sheet_;
  const StepContext& context_;
  StepReading reading_;
  std::vector<std::shared_ptr<const facts::Species>> codes_;
  std::vector<std::optional<std::size_t>> place_;  ///< of each progress among the reactions read
  std::vector<Excess> excesses_;
  bool mass_share_ = false, mole_share_ = false;
};

}  // namespace

std::optional<std::string> slot_of_row(const step::StepInput& input, const std::string& id) {
  const std::size_t at = id.find(".part.");
  if (!begins(id, "feed.") || at == std::string::npos) return id;
  const std::optional<double> feed = parse_number(id.substr(5, at - 5)),
                              row = parse_number(id.substr(at + 6));
  if (!feed || !row || !(*feed >= 0) || !(*feed < static_cast<double>(input.feeds.size()))) return id;
  std::optional<std::size_t> found;
  const std::vector<step::FeedPart>& parts = input.feeds[static_cast<std::size_t>(*feed)].parts;
  for (std::size_t p = 0; p < parts.size(); ++p) {
    if (static_cast<double>(parts[p].row) != *row) continue;
    if (found) return std::nullopt;
    found = p;
  }
  return found ? id.substr(0, at + 6) + std::to_string(*found) : id;
}

StepReading read_step(const StepSheet& sheet, const StepContext& context) {
  return Reader(sheet, context).read();
}

std::vector<std::string> progress_choices(const balance::Reaction& reaction) {
  std::vector<std::string> choices;
  for (const balance::ReactionSpecies& species : reaction.species) {
    if (species.product) continue;
    choices.push_back("conversion of " + species.term.species);
    choices.push_back("total conversion of " + species.term.species);
    for (const balance::ReactionSpecies& product : reaction.species) {
      if (product.product)
        choices.push_back("selectivity to " + product.term.species + " from " + species.term.species);
    }
  }
  choices.push_back("extent");
  return choices;
}

}  // namespace heatledger::document
