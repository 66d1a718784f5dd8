// Short ways to write a step for the suites of this room.
#pragma once

#include <gtest/gtest.h>

#include <string>

#include "core/balance/ledger.hpp"
#include "core/base/check.hpp"
#include "core/step/step.hpp"

namespace heatledger::step::test_steps {

constexpr double kZeroCelsius = 273.15;

inline Lookups& lookups() {
  static Lookups shared;
  return shared;
}

/// A species source that also knows code names.
class CodedSpecies : public balance::SpeciesSource {
 public:
  void add(const std::string& name, double molar_mass, const std::string& formula = "") {
    Result<std::shared_ptr<const facts::Species>> made = facts::make_coded_species(name, molar_mass, formula);
    EXPECT_TRUE(made.ok()) << name;
    if (made.ok()) coded_[name] = *made;
  }
  Result<std::shared_ptr<const facts::Species>> species(std::string_view text, bool quoted) override {
    const auto found = coded_.find(std::string(text));
    if (found != coded_.end()) return found->second;
    return library().species(text, quoted);
  }

 private:
  static balance::CachedSpecies& library() {
    static balance::CachedSpecies shared;
    return shared;
  }

  std::map<std::string, std::shared_ptr<const facts::Species>> coded_;
};

/// Builds a StepInput from names; a species is added when it is first named.
class Writer {
 public:
  StepInput input;
  CodedSpecies source;

  std::size_t substance(const std::string& name) {
    for (std::size_t i = 0; i < input.substances.size(); ++i) {
      if (input.substances[i].name == name) return i;
    }
    Result<std::shared_ptr<const facts::Species>> species = source.species(name, false);
    EXPECT_TRUE(species.ok()) << name << ": " << (species.ok() ? "" : species.error().message);
    CHECK(species.ok(), "a suite names species that exist");
    for (std::size_t i = 0; i < input.substances.size(); ++i) {
      if (input.substances[i].species == *species || input.substances[i].species->name == (*species)->name)
        return i;
    }
    SubstanceInput added;
    added.name = name;
    added.species = *species;
    input.substances.push_back(std::move(added));
    return input.substances.size() - 1;
  }

  std::size_t feed(const std::string& name, double temperature) {
    Feed feed;
    feed.name = name;
    feed.temperature = Typed{temperature, 0};
    input.feeds.push_back(std::move(feed));
    return input.feeds.size() - 1;
  }
  /// One more part of the last feed.
  Writer& part(const std::string& name, molecule::Phase phase, double figure,
               Measure measure = Measure::Mole) {
    FeedPart part;
    part.substance = substance(name);
    part.state.phase = phase;
    part.figure = Typed{figure, 0};
    part.measure = measure;
    input.feeds.back().parts.push_back(part);
    return *this;
  }

  /// A reaction with the heat that its formation enthalpies give.
  std::size_t reaction(const std::string& equation, ProgressKind kind, double figure,
                       const std::string& of = "", const std::string& product = "") {
    Result<balance::Reaction> read = balance::read_reaction(equation, source);
    EXPECT_TRUE(read.ok()) << equation << ": " << (read.ok() ? "" : read.error().message);
    CHECK(read.ok(), "a suite writes equations that can be read");
    StepReaction reaction;
    reaction.name = "reaction " + std::to_string(input.reactions.size() + 1);
    reaction.reaction = std::make_shared<const balance::Reaction>(std::move(read).value());
    uncertainty::Quantity heat;
    for (const balance::ReactionSpecies& species : reaction.reaction->species) {
      reaction.substances.push_back(substance(species.term.species));
      const molecule::Phase phase = thermo::phase_taken(*species.species, species.term.phase).phase;
      const std::shared_ptr<const StateFacts> facts =
          lookups().state(species.species, State{phase, species.term.strength});
      if (facts->formation.ok())
        heat.add(facts->formation->value, species.product ? species.coefficient() : -species.coefficient());
    }
    reaction.heat.as_written = heat;
    reaction.heat.source = "formation";
    reaction.progress.kind = kind;
    reaction.progress.figure = Typed{figure, 0};
    if (!of.empty()) reaction.progress.of = substance(of);
    if (!product.empty()) reaction.progress.product = substance(product);
    input.reactions.push_back(std::move(reaction));
    return input.reactions.size() - 1;
  }
  /// Types the heat of the last reaction instead [J for the coefficients written].
  void typed_heat(double heat, double u95 = 0, double temperature = 298.15) {
    ReactionHeat& typed = input.reactions.back().heat;
    typed.as_written = uncertainty::Quantity(
        heat, u95, uncertainty::source_key(uncertainty::SourceKind::Measurement, input.reactions.size()));
    typed.temperature = temperature;
    typed.typed = true;
  }

  Result<StepResult> solve(const SolveOptions& options = {}) const {
    return solve_step(input, lookups(), options);
  }
};

/// A step that must solve.
inline StepResult solved(const Writer& writer, const SolveOptions& options = {}) {
  Result<StepResult> result = writer.solve(options);
  EXPECT_TRUE(result.ok()) << (result.ok() ? "" : result.error().code + ": " + result.error().message);
  CHECK(result.ok(), "the step solves");
  return std::move(result).value();
}

inline double answer(const StepResult& result, FigureId id) {
  for (const Answer& answer : result.answers) {
    if (answer.id == id) return answer.value.value();
  }
  ADD_FAILURE() << "no such figure";
  return 0;
}

}  // namespace heatledger::step::test_steps
