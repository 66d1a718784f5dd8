// A dosed charge as plain numbers: what is in the vessel, what is fed when, what reacts how fast, what the
// wall does; and its state at one moment. How it moves in time stands in run.hpp.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "core/dosing/enthalpy.hpp"
#include "core/dosing/profile.hpp"
#include "core/dosing/rosenbrock.hpp"

namespace heatledger::dosing {

struct DosedSubstance {
  std::string name;
  double molar_mass = 0;    ///< [kg/mol]
  double molar_volume = 0;  ///< [m³/mol] of the liquid; 0 when no rate law needs it
  Enthalpy enthalpy;  ///< from 25 °C in the phase in which the heats of reaction hold, liquid held liquid
};

struct DosedFeed {
  std::string name;
  std::vector<double> amounts;  ///< one for each substance, all that is fed [mol]
  double enthalpy = 0;          ///< of all that is fed, as it enters, from 25 °C [J]
  Profile profile = Profile::constant(0, 1);
};

/// r = k V Π c^order, k = k(T_ref) exp(−E/R (1/T − 1/T_ref)), per volume of the content, one phase.
struct RateLaw {
  struct Factor {
    std::size_t substance = 0;
    double order = 1;  ///< >= 0
  };
  double constant = 0;           ///< k(T_ref) in mol, m³ and s: (mol/m³)^(1 − Σ order) / s
  double reference = 298.15;     ///< T_ref [K]
  double activation_energy = 0;  ///< [J/mol]
  std::vector<Factor> factors;
};

enum class Speed : unsigned char {
  Unknown,        ///< no kinetics typed: duties as if as fast as dosed, nothing said about accumulation
  AsFastAsDosed,  ///< said to be so: nothing accumulates
  ByRateLaw,
};

struct DosedReaction {
  struct Term {
    std::size_t substance = 0;
    double coefficient = 0;  ///< < 0 consumed
  };
  std::string name;
  std::vector<Term> terms;
  double heat = 0;  ///< at 25 °C, for the coefficients written [J/mol of extent], < 0 exothermic
  Speed speed = Speed::Unknown;
  RateLaw law;
};

enum class Thermal : unsigned char {
  Held,       ///< vessel held at its temperature, whatever cooling that takes
  Jacket,     ///< jacket held at a temperature
  Adiabatic,  ///< nothing crosses the wall
};

struct DosedSystem {
  std::vector<DosedSubstance> substances;
  std::vector<double> start;          ///< in the vessel before dosing, one for each substance [mol]
  double start_temperature = 298.15;  ///< of the content [K]
  std::vector<DosedFeed> feeds;
  std::vector<DosedReaction> reactions;
  Thermal thermal = Thermal::Held;
  double jacket_temperature = 298.15;  ///< [K]
  double conductance_start = 0;        ///< UA before dosing [W/K]
  double conductance_end = 0;          ///< UA when all is in; in between in proportion to what is in, by mass
  double vessel_heat_capacity = 0;     ///< moves with the content [J/K]
  double end = 0;                      ///< of the step [s]
};

/// What stands in the vessel at one moment, and what follows from it.
struct Moment {
  double time = 0;              ///< [s]
  double temperature = 0;       ///< [K]
  double mass = 0;              ///< [kg]
  double volume = 0;            ///< [m³]; 0 when no rate law needs it
  double heat_capacity = 0;     ///< m cp of the content at its temperature, vessel excluded [J/K]
  std::vector<double> amounts;  ///< [mol]
  std::vector<double> extents;  ///< of each reaction [mol]
  std::vector<double> rates;    ///< of each reaction [mol/s]
  double heat_rate = 0;         ///< set free by the reactions at the temperature of the content [W]
  double cold_feed = 0;         ///< taken up by what is fed on its way to that temperature [W]
  double cooling = 0;           ///< taken out through the wall, or asked for [W]; < 0: heating
  double wall_heat = 0;         ///< brought in through the wall so far [J]
  std::vector<double> open;     ///< extents still possible if feeding stops here [mol]
  double open_heat = 0;         ///< that they would set free at the temperature of the content [J]
  double mtsr = 0;              ///< temperature + open_heat / heat_capacity [K]
  double accumulation = 0;      ///< of the extent of the whole step; several reactions: of its heat
  double conversion = 0;        ///< of the charged or fed substance that limits the first reaction
};

/// Error that a step of the integration may make.
struct RunOptions {
  double relative = 1e-6;   ///< of an extent: to what is left of the scarcest reactant, so that rates are as
                            ///< sharp as amounts; of the heat through the wall: to itself
  double absolute = 1e-14;  ///< the same to the size over the whole step
};

/// What is integrated for each reaction with a rate law: the amount of its scarcest reactant, where that can
/// be told from the others, so that a trace of a reactant that is consumed as it comes in keeps its digits;
/// else the extent. Which one it is changes in the course of a step.
struct Pivot {
  bool amount = true;     ///< of a substance, before what is as fast as dosed; else an extent
  std::size_t index = 0;  ///< of the substance, or within the reactions with a rate law
  friend bool operator==(const Pivot& a, const Pivot& b) {
    return a.amount == b.amount && a.index == b.index;
  }
};

/// A system in one stretch of its feed profiles: the right-hand side of its equations.
/// The unknowns are the pivots, and with a jacket the heat brought in through the wall. All amounts and the
/// enthalpy follow from these without integration, so elements and energy are closed at every moment,
/// whatever the length of the steps.
class Kettle : public Equations {
 public:
  explicit Kettle(const DosedSystem& system, const RunOptions& options = {});

  std::size_t size() const override { return slow_.size() + (system_.thermal == Thermal::Jacket ? 1 : 0); }
  void rates(double t, const double* y, double* dydt) const override;
  void tolerances(double t, const double* y, double* allowed) const override;

  /// Takes the straight pieces of the profiles that hold just after `t`.
  void enter(double t);
  /// Times at which a profile bends, rising, without 0 and the end.
  std::vector<double> corners() const;
  /// Everything at a time within the stretch entered. @param y  the unknowns there
  void moment(double t, const double* y, Moment& out) const;

  /// The pivots for the state at a time, and the unknowns moved to them.
  void choose_pivots(double t, std::vector<double>& y);
  /// Whether others would serve much better.
  bool pivots_outrun(double t, const double* y) const;
  const std::vector<Pivot>& pivots() const { return pivots_; }
  void set_pivots(const std::vector<Pivot>& pivots);

  /// Which reactant is used up by each reaction that is as fast as dosed: where this changes, rates jump.
  const std::vector<std::size_t>& limiting() const { return limiting_; }
  void set_limiting(std::vector<std::size_t> limiting) { limiting_ = std::move(limiting); }
  /// The reactants used up at a time; where two are, the one that was so before.
  std::vector<std::size_t> limiting_at(double t, const double* y) const;

  /// Extents still possible from some amounts, the reactions run to the end in the order written; the
  /// amounts become those at the end.
  std::vector<double> run_out(std::vector<double>& amounts) const;
  /// Heat set free by extents at a temperature [J].
  double set_free(const std::vector<double>& extents, double temperature) const;
  /// ΔrH at a temperature [J/mol].
  double reaction_heat(std::size_t reaction, double temperature) const;
  /// Σ n h(T) [J], and m cp [J/K].
  double enthalpy(const std::vector<double>& amounts, double temperature) const;
  double heat_capacity(const std::vector<double>& amounts, double temperature) const;
  double mass(const std::vector<double>& amounts) const;
  /// Temperature at which some amounts have an enthalpy, `vessel` [J/K] moving with them [K].
  double temperature_of(const std::vector<double>& amounts, double enthalpy, double vessel,
                        double guess) const;

  const DosedSystem& system() const { return system_; }
  const std::vector<double>& all_charged() const { return all_; }      ///< start and all feeds [mol]
  const std::vector<double>& whole_extents() const { return whole_; }  ///< of the step run to the end [mol]
  bool has_rate_law() const { return !slow_.empty(); }
  bool has_unknown_speed() const;

 private:
  struct Scratch {
    std::vector<double> amounts, extents, change, offsets, rates;
    double temperature = 0;
  };
  void fill(double t, const double* y, Scratch& s) const;
  void slow_part(double t, const double* y, Scratch& s) const;
  double stoichiometry(std::size_t substance, std::size_t slow) const;
  double scarcity(std::size_t slow, std::size_t substance, const Scratch& s) const;
  std::vector<Pivot> best_pivots(const Scratch& s) const;
  void put_back(double t, const double* y, Scratch& s) const;
  void slow_rates(const Scratch& s, double* rates) const;
  double content_enthalpy(double t, const double* y, const Scratch& s) const;
  double conductance(double t) const;
  double fed_mass(double t) const;

  std::vector<double> scales() const;

  const DosedSystem& system_;
  RunOptions options_;
  std::vector<double> scales_;              ///< of each unknown over the whole step
  std::vector<std::size_t> slow_, fast_;    ///< reactions by rate law, and the others
  std::vector<double> slow_stoichiometry_;  ///< of each substance in each of slow_
  std::vector<Pivot> pivots_;               ///< one for each of slow_
  std::vector<double> to_extents_;          ///< inverse of the pivots' rows
  std::vector<ProfileLine> lines_;          ///< of each feed, in the stretch entered
  std::vector<std::size_t> limiting_;       ///< substance for each of fast_
  std::vector<double> all_, whole_;
  double start_enthalpy_ = 0;  ///< content and vessel [J]
  double whole_mass_fed_ = 0;
  std::size_t key_ = 0;  ///< substance whose conversion is told
  mutable Scratch scratch_;
};

}  // namespace heatledger::dosing
