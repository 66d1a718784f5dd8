// What a person has put down for one process step, in SI: what goes in, what reacts and how far, how it
// leaves, what crosses the wall. Reading the typed texts is the worksheet's; what follows from them is in
// step.hpp.
#pragma once

#include <cstdint>
#include <memory>
#include <optional>
#include <string>
#include <vector>

#include "core/balance/reaction.hpp"
#include "core/facts/resolve.hpp"
#include "core/molecule/equation.hpp"
#include "core/uncertainty/quantity.hpp"

namespace heatledger::step {

/// Through-flow: amounts are per second, heats are power. Charge: amounts are what is put into the vessel,
/// heats are energy.
enum class StepKind : std::uint8_t { ThroughFlow, Charge };

/// A typed figure [SI] with its ± as typed; no ± counts as exact and is counted.
struct Typed {
  double value = 0;
  double u95 = 0;  ///< half width of the 95 % interval, >= 0
};
using Blank = std::optional<Typed>;  ///< empty: nothing is written there

/// A phase, and for solutions how strong.
struct State {
  molecule::Phase phase = molecule::Phase::Unstated;  ///< Unstated: the phase that the reactions write
  std::optional<molecule::Strength> strength;
};

/// A species or mixture of the step, named once.
struct SubstanceInput {
  std::string name;  ///< as the sheet shows it
  std::shared_ptr<const facts::Species> species;
  Blank heat_capacity;       ///< typed, any phase [J/(mol K)]
  Blank mass_heat_capacity;  ///< typed, any phase [J/(kg K)]
  Blank density;             ///< of the liquid [kg/m³]
  Blank
      vapour_pressure;  ///< at the outlet temperature [Pa]; the enthalpy of vaporisation carries it elsewhere
  bool by_mass = false;  ///< no molar mass: counted in kilograms, in no reaction
};

/// How an amount is written.
enum class Measure : std::uint8_t {
  Mole,    ///< [mol], also normal m³ and the other named cubic metres of gas
  Mass,    ///< [kg]
  Volume,  ///< [m³] at temperature and pressure of the feed: gases ideal, liquids by their density
};
enum class ShareKind : std::uint8_t { None, MoleShare, MassShare };

/// Water that a solution brings along: so many moles for each mole of another part of the feed.
struct CarriedWater {
  std::size_t part = 0;
  double ratio = 0;
};

struct FeedPart {
  std::size_t substance = 0;
  State state;
  Blank figure;  ///< an amount, or with a total a share 0 .. 1; one empty share is the rest
  Measure measure = Measure::Mole;
  /// The figure with the sources of its ± when they are not its own: carried from a step above, or one of
  /// several parts of an entry such as air.
  std::optional<uncertainty::Quantity> shared;
  bool derived = false;  ///< not typed itself: carried, or a further part of an entry
  std::size_t row = 0;   ///< entry of the sheet that it comes from
  /// The water of a solution stands in a part of its own; else an amount of a solution brings its water
  /// along: by mass it is the mass of the solution, by mole the moles of what is dissolved.
  bool without_water = false;
  std::optional<CarriedWater> carried;  ///< laid out by the model, without a figure
};

/// A feed that brings so much of a species that `excess` is left over when the key of a reaction is all gone.
struct ExcessOver {
  std::size_t reaction = 0;
  std::size_t substance = 0;  ///< what is brought
  std::size_t key = 0;        ///< what it is reckoned against
};

struct Feed {
  std::string name;
  Blank temperature;                                         ///< [K]
  std::optional<uncertainty::Quantity> carried_temperature;  ///< of a step above, with the sources of its ±
  Blank pressure;                                            ///< [Pa], for volumes of gas
  ShareKind shares = ShareKind::None;
  Blank total;  ///< with shares: [mol], [kg] or [m³] by `measure`; with `excess`: the excess itself (0.2 is
                ///< 20 %)
  Measure measure = Measure::Mole;
  std::optional<ExcessOver> excess;
  std::vector<FeedPart> parts;
};

enum class ProgressKind : std::uint8_t {
  Extent,                ///< [mol]
  Conversion,            ///< of `of`, consumed by this reaction / fed
  ConversionOfArriving,  ///< the same, of what is fed and what the reactions above have made or left
  TotalConversion,  ///< of `of` by all reactions together; this reaction takes what the others leave of it
  Yield,            ///< `of` turned into `product` by this reaction / fed
  Selectivity,      ///< `of` turned into `product` by this reaction / consumed by all
};

struct Progress {
  ProgressKind kind = ProgressKind::Conversion;
  std::size_t of = 0;       ///< a substance consumed; not used by Extent
  std::size_t product = 0;  ///< Yield, Selectivity
  Blank figure;
};

/// Whether a measured heat holds mixing, dilution, evaporation and loss of gas.
enum class Includes : std::uint8_t { No, Yes, Unknown };

/// The heat of a reaction as the step takes it.
struct ReactionHeat {
  uncertainty::Quantity as_written;  ///< for the coefficients written [J]
  double temperature = 298.15;       ///< at which it holds, species in the phases written [K]
  bool typed = false;
  Includes includes_mixing = Includes::No;
  std::string source;  ///< route and set, or who measured it with what and when
};

struct StepReaction {
  std::string name;  ///< "reaction 1"
  std::shared_ptr<const balance::Reaction> reaction;
  std::vector<std::size_t> substances;  ///< one for each species of the reaction
  ReactionHeat heat;
  Progress progress;
};

/// How one substance leaves. Not named: in the phase of the reactions or of its feed.
struct Leaving {
  std::size_t substance = 0;
  State state;                 ///< when not split
  Blank vapour_share;          ///< 0 .. 1 leaves as vapour, the rest as liquid
  bool by_saturation = false;  ///< vapour and liquid by the ideal mixture's saturation
};

struct Outlet {
  Blank temperature;  ///< [K]
  Blank pressure;     ///< [Pa]
  std::vector<Leaving> leaving;
};

/// The vessel itself: jacket, internals, agitator.
struct Vessel {
  Blank heat_capacity;  ///< [J/K]
  Blank temperature;    ///< at the start [K]; empty: of the first feed
};

/// What a charge step asks beyond the balance.
struct ChargeInput {
  Blank process_temperature;           ///< [K]; empty: that of the outlet, else of the first feed
  std::optional<std::size_t> solvent;  ///< boils under reflux
  Blank limit_temperature;             ///< typed decomposition limit or other limit [K]
  Blank cooling;                       ///< capacity of the cooling [W]: gives the time it needs
  Blank rate_constant;                 ///< first order, held at temperature [1/s]: gives the peak
  bool followed = false;  ///< its course in time is worked out elsewhere: nothing is said of peaks
};

/// The cooled or heated surface.
struct Surface {
  Blank medium_in, medium_out;  ///< [K]; one alone: held at that temperature
  Blank conductance;            ///< UA [W/K]
};

struct StepInput {
  StepKind kind = StepKind::ThroughFlow;
  std::string title;
  std::vector<SubstanceInput> substances;
  std::vector<Feed> feeds;
  std::vector<StepReaction> reactions;
  Outlet outlet;
  Blank duty;             ///< heat to the process [W] or [J]
  Blank loss;             ///< heat lost to the surroundings, > 0 [W] or [J]
  Blank shaft_work;       ///< done on the process, > 0 [W] or [J]
  Blank departure;        ///< departure from ideal gas: heat beyond that of ideal gases [W] or [J]
  Blank departure_share;  ///< the same as a share of what the gases carry out from 25 °C
  Blank mixing_heat;      ///< typed heat of all dissolving and diluting, < 0 is set free [J] or [W]; replaces
                          ///< the tables
  Blank time;             ///< charge: over which the heat is set free [s]
  Blank mass_heat_capacity;  ///< "cp of the mass" [J/(kg K)]: takes the place of all liquids and solids
  Vessel vessel;
  ChargeInput charge;
  Surface surface;
  /// Id of the blank that is sought. "conductance" and "time" follow from the balance: then of duty and
  /// outlet temperature one is typed and the other sought.
  std::string sought = "duty";
};

}  // namespace heatledger::step
