// A step as plain arithmetic: one flat list of numbers in, amounts and heats out. The sought unknown, the ±,
// the curves and the checker's slips all ask the same arithmetic with some numbers changed.
#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "core/base/result.hpp"
#include "core/step/lookups.hpp"
#include "core/step/solution_plan.hpp"
#include "core/step/step_input.hpp"
#include "core/units/dimension.hpp"

namespace heatledger::step {

/// One number that the step is computed from: a blank of the sheet or a figure of the data.
struct Slot {
  std::string id;     ///< "feed.0.temperature", "reaction.1.progress", "outlet.temperature", "duty",
                      ///< "reaction.0.heat", …
  std::string label;  ///< "temperature of the feed air"
  units::Dimension dimension;
  double value = 0;              ///< SI; of a sought blank the start of the search
  uncertainty::Quantity spread;  ///< the ± of the value as independent parts; its own value is not used
  double low = 0, high = 0;      ///< where a search may look
  bool blank = false;            ///< a person types it, so it may be sought
  bool typed = false;            ///< a person has typed it
};

/// What may be wrong with a set of numbers.
enum class Trouble : std::uint8_t {
  None,
  Exhausted,     ///< a reaction takes more of a substance than there is (Work::culprit)
  Undetermined,  ///< the progress figures do not fix every extent, or contradict each other
  Backwards,  ///< selectivities or conversions add up to more than 100 %: a reaction would have to run back
  BadShare,   ///< shares of a feed above one
};

/// Amounts and heats of one evaluation; memory kept between evaluations. Amounts [mol], heats [J], for
/// through-flow per second.
struct Work {
  std::vector<double> parts;    ///< fed, one for each part of each feed
  std::vector<double> fed;      ///< one for each substance
  std::vector<double> extents;  ///< one for each reaction
  std::vector<double> leaving;  ///< one for each substance
  std::vector<double> gross;    ///< fed and formed, before anything is consumed
  std::vector<double> vapour;   ///< of that, as vapour where the substance leaves split
  double inlet_heat = 0;        ///< Σ n e over the parts, e from 25 °C in the reference phase
  double reaction_heat = 0;     ///< Σ ξ ΔrH(25 °C, reference phases)
  double outlet_heat = 0;
  double vessel_heat = 0;
  double departure = 0;   ///< from ideal gas
  Dissolving dissolving;  ///< what is dissolved and diluted, and its heat
  double needed = 0;      ///< heat to the process that closes the balance
  std::size_t culprit = 0;
  std::vector<double> matrix;  ///< of the progress equations
  std::vector<double> saturation;
};

/// A substance in one state with its place in the list of numbers.
struct StateCurve {
  std::size_t substance = 0;
  State state;
  std::optional<Curve> curve;  ///< empty: no heat capacity; the state only occurs at 25 °C
  std::string why_no_curve;
  bool dissolves = false;                ///< its distance from the reference state is heat of solution
  std::optional<std::size_t> shift;      ///< slot of h(25 °C) less that of the reference state [J/mol]
  std::optional<std::size_t> deviation;  ///< slot of the heat capacity's error, in units of its ±
};

class Model {
 public:
  /// Looks up what the step needs and lays out its numbers.
  /// @errors step.nothing_fed, step.blank, step.over_specified, step.no_heat_capacity, step.no_molar_mass,
  ///         step.no_density, step.key_not_consumed, step.not_a_blank and those of core/thermo; `where` is
  ///         the id of the blank
  static Result<Model> of(StepInput input, Lookups& lookups);

  const StepInput& input() const { return input_; }
  const std::vector<Slot>& slots() const { return slots_; }
  const std::vector<StateCurve>& states() const { return states_; }
  std::optional<std::size_t> slot(std::string_view id) const;
  std::vector<double> values() const;
  /// Slot of the blank sought.
  std::size_t sought() const { return sought_; }
  bool outlet_sought() const { return sought_ == outlet_temperature_; }
  std::size_t duty_slot() const { return duty_; }
  std::size_t outlet_temperature_slot() const { return outlet_temperature_; }
  std::size_t feed_temperature_slot(std::size_t feed) const { return feeds_[feed].temperature; }
  /// States by part of the feeds (flat), by substance when it leaves unsplit or as liquid, and as vapour.
  std::size_t part_state(std::size_t part) const { return part_states_[part]; }
  std::size_t leaving_state(std::size_t substance) const { return leaving_[substance].state; }
  std::optional<std::size_t> vapour_state(std::size_t substance) const { return leaving_[substance].vapour; }
  std::size_t reference_state(std::size_t substance) const { return reference_[substance]; }
  /// Numbers beside the balance, where they are typed.
  struct Side {
    std::optional<std::size_t> process_temperature, time, cooling, rate_constant, medium_in, medium_out,
        vessel;
  };
  const Side& side() const { return side_; }
  const std::vector<std::string>& cautions() const { return cautions_; }

  /// Amounts from the numbers.
  Trouble amounts(const std::vector<double>& v, Work& work) const;
  /// All but the outlet, after `amounts`.
  void upstream(const std::vector<double>& v, Work& work) const;
  /// Outlet and the sum, after `upstream`.
  void downstream(const std::vector<double>& v, Work& work) const;
  /// Whether every state that is heated or cooled has a heat capacity, after `evaluate`.
  /// @errors step.no_heat_capacity
  Status curves_present(const std::vector<double>& v, const Work& work) const;
  /// The three after each other.
  Trouble evaluate(const std::vector<double>& v, Work& work) const;

  /// Enthalpy of one mole that leaves unsplit or as liquid, from 25 °C in the reference state [J/mol]: as
  /// strong as it leaves where it is dissolved. After `downstream`.
  double leaving_enthalpy(const std::vector<double>& v, const Work& work, std::size_t substance,
                          double temperature) const;
  const SolutionPlan& solution() const { return solution_; }
  /// Whether every solution that leaves is within its table, after `evaluate`.
  /// @errors step.solution_range
  Status solutions_present(const Work& work) const;

  /// Enthalpy of one mole in a state from 25 °C in the reference state [J/mol].
  double enthalpy(const std::vector<double>& v, std::size_t state, double temperature) const;
  /// Heat of reaction at 25 °C for the reference states [J], and at a temperature in the phases written.
  double reaction_heat(const std::vector<double>& v, std::size_t reaction) const;
  double reaction_heat_at(const std::vector<double>& v, std::size_t reaction, double temperature) const;
  /// [J/(mol K)]; the error of the heat capacity moves it as far as it moves the increment.
  double heat_capacity(const std::vector<double>& v, std::size_t state, double temperature) const;
  /// Of the pure liquid [Pa]; 0 for what is taken not to evaporate. Only in a charge.
  double vapour_pressure(const std::vector<double>& v, std::size_t substance, double temperature) const;
  /// Leaves as liquid (or dissolved) when it is not vapour.
  bool is_liquid(std::size_t substance) const;
  /// Stoichiometric number of a substance in a reaction, negative for what is consumed.
  double coefficient_of(std::size_t reaction, std::size_t substance) const;
  double molar_mass(std::size_t substance) const { return molar_mass_[substance]; }
  /// Splits what leaves at a temperature into vapour and the rest (Work::vapour).
  void split(const std::vector<double>& v, double temperature, Work& work) const;

 private:
  friend class ModelBuilder;
  Trouble feed_amounts(const std::vector<double>& v, Work& work) const;
  Trouble parts_by_amount(const std::vector<double>& v, std::size_t feed, Work& work) const;
  Trouble parts_by_share(const std::vector<double>& v, std::size_t feed, Work& work) const;
  double moles(const std::vector<double>& v, std::size_t feed, std::size_t part, Measure measure,
               double amount) const;
  void dissolve(const std::vector<double>& v, Work& work) const;
  Trouble react(const std::vector<double>& v, Work& work) const;
  void progress_equations(const std::vector<double>& v, Work& work) const;

  struct FeedPlan {
    std::size_t temperature = 0;
    std::optional<std::size_t> pressure, total;
    std::size_t first_part = 0, parts = 0;
    std::optional<std::size_t> rest;  ///< the part without a figure
  };
  struct FigurePlan {
    std::optional<std::size_t> figure;
    bool gas = false;
    double density = 0;    ///< liquid [kg/m³]; 0 when not needed
    double mole_mass = 0;  ///< of one mole with the water it brings along [kg/mol]
  };
  struct LeavingPlan {
    std::size_t state = 0;                      ///< unsplit, or as liquid
    std::optional<std::size_t> vapour;          ///< state as vapour when split
    std::optional<std::size_t> share;           ///< slot of a typed share
    bool by_saturation = false;                 ///< leaves split by saturation
    std::optional<SaturationCurve> saturation;  ///< known
    std::optional<std::size_t> saturation_slot;
  };
  struct Term {
    std::size_t substance, state;
    double coefficient;
  };
  struct ReactionPlan {
    std::vector<Term> terms;
    std::size_t heat = 0, progress = 0;
    std::vector<CurvePoint> at_heat;  ///< increments at the temperature of the heat, per term; empty: none
  };

  StepInput input_;
  std::vector<Slot> slots_;
  std::vector<StateCurve> states_;
  std::vector<std::size_t> reference_, part_states_;
  std::vector<double> molar_mass_;
  std::vector<FeedPlan> feeds_;
  std::vector<FigurePlan> figures_;
  std::vector<LeavingPlan> leaving_;
  std::vector<ReactionPlan> reactions_;
  std::vector<std::string> cautions_;
  std::size_t sought_ = 0, duty_ = 0, loss_ = 0, shaft_ = 0, outlet_temperature_ = 0;
  std::optional<std::size_t> outlet_pressure_, vessel_, vessel_temperature_, departure_, departure_share_;
  Side side_;
  bool splits_ = false, saturates_ = false;
  SolutionPlan solution_;
};

}  // namespace heatledger::step
