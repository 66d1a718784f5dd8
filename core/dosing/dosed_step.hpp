// A dosed charge as a person puts it down, laid out as one flat list of numbers on top of the balance of the
// step: data and typed figures, each with its ±. Answers stand in answers.hpp.
#pragma once

#include <memory>
#include <string>
#include <vector>

#include "core/dosing/system.hpp"
#include "core/step/model.hpp"

namespace heatledger::dosing {

struct RateLawInput {
  Speed speed = Speed::Unknown;
  step::Typed constant;                  ///< in mol, m³ and s, at `reference`
  double reference = 298.15;             ///< [K]
  step::Typed activation_energy;         ///< [J/mol]
  std::vector<RateLaw::Factor> factors;  ///< empty: first order in each reactant
};

struct DosedInput {
  /// Feeds, reactions, heats, vessel, cp of the mass. Progress, outlet and what is sought are not read.
  step::StepInput step;
  std::vector<bool> dosed;             ///< for each feed; the others are in the vessel at the start
  std::vector<RateLawInput> kinetics;  ///< for each reaction
  step::Typed temperature;             ///< of the content at the start, and held there [K]
  Thermal thermal = Thermal::Held;
  step::Typed jacket;                 ///< [K]
  step::Blank conductance_start;      ///< UA before dosing [W/K]
  step::Blank conductance_end;        ///< empty: grows with the mass in the vessel
  step::Typed dosing_time;            ///< [s]; not used with a profile
  double dosing_start = 0;            ///< [s]
  std::vector<ProfilePoint> profile;  ///< empty: constant over the dosing time
  step::Blank hold;                   ///< after dosing [s]; empty: a quarter of the time that dosing ends
  step::Blank density;                ///< of the mass, for a rate law [kg/m³]; empty: of the species
  step::Blank cooling;                ///< capacity [W]: gives the dosing time that it allows
};

/// One number that the answers depend on.
struct DosedNumber {
  std::string label;
  double value = 0;
  uncertainty::Quantity spread;  ///< its ± as independent parts; its own value is not used
};

class DosedModel {
 public:
  /// @errors those of step::Model::of, step.no_heat_capacity, step.no_density (a rate law needs volumes),
  ///         dosing.nothing_dosed, dosing.no_time, dosing.no_jacket, dosing.profile; `where` is the id of the
  ///         blank
  static Result<DosedModel> of(DosedInput input, step::Lookups& lookups);

  const DosedInput& input() const { return input_; }
  const step::Model& balance() const { return *balance_; }
  const std::vector<DosedNumber>& numbers() const { return numbers_; }
  std::vector<double> values() const;
  /// Of the content when dosing begins, with its ± [K].
  const DosedNumber& start_temperature() const { return numbers_[own_.temperature]; }

  /// The system at some numbers. @param stretch  factor on every time of the profile
  /// @errors step.exhausted and other troubles of the amounts fed
  Result<std::shared_ptr<const DosedSystem>> system(const std::vector<double>& values,
                                                    double stretch = 1) const;
  const std::vector<std::string>& notes() const { return notes_; }

 private:
  struct Own {  ///< places of the numbers that the balance does not know
    std::size_t temperature = 0, jacket = 0, conductance_start = 0, conductance_end = 0, dosing_time = 0,
                hold = 0, density = 0, first_law = 0;
  };
  Status look_up_volumes();
  std::size_t add(std::string label, const step::Typed& typed, const char* id);
  bool gas(std::size_t substance) const;

  DosedInput input_;
  std::shared_ptr<const step::Model> balance_;
  std::vector<DosedNumber> numbers_;
  Own own_;
  bool has_density_ = false;
  std::vector<double> densities_;  ///< of the species [kg/m³]; 0: not needed
  std::vector<std::string> notes_;
};

}  // namespace heatledger::dosing
