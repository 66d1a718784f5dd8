// The checker's column of a step: figures typed from a balance under review, held against this one, and the
// slip that explains a difference when one does. What a slip does to the arithmetic stands in slip_sheet.hpp.
#pragma once

#include <map>
#include <string>

#include "core/step/step.hpp"

namespace heatledger::step {

enum class StepVerdict : std::uint8_t {
  Agrees,
  Follows,        ///< differs, but only because of the slip named
  WithinData,     ///< differs by less than the ± of the data: another table, no slip
  Slip,           ///< one slip explains it
  Unexplained,    ///< no single slip known here does
  NotComparable,  ///< this step has no such figure
  Unreadable
};

/// Slips that are known, those met most often first.
enum class StepSlip : std::uint8_t {
  HeatCapacityLeftOut,  ///< of a product or an inert in what leaves
  InletHeatLeftOut,     ///< a feed counted as if it came at 25 °C
  SensibleTwice,  ///< heat of reaction at outlet temperature, and the sensible heat to there added again
  CelsiusInPolynomial,  ///< °C put into a polynomial in kelvin
  MolarForMass,         ///< molar heat capacity on kilograms, or the mass one on moles
  MeanOverWrongLimits,  ///< heat capacity at one end of the range in place of the mean
  ConversionTwice,      ///< conversion times selectivity applied twice
  YieldAsSelectivity,
  ExtentAsMoles,
  MoleForMassShare,
  OtherCubicMetre,      ///< 15 °C, 20 °C or 60 °F for the normal cubic metre, or the reverse
  GrossForNet,          ///< water formed taken as liquid instead of vapour, or the reverse
  PerHourForPerSecond,  ///< kJ/h and kW
  GaugeForAbsolute,
  BarForAtmosphere,  ///< 100 and 101.325 kPa
  ReactionLeftOut,
  LossLeftOut,
  Sign,
};

struct FoundSlip {
  StepSlip kind = StepSlip::Sign;
  std::string words;  ///< "heat capacity of nitrogen left out of what leaves"
};

struct StepCheckedLine {
  std::string cell;
  StepVerdict verdict = StepVerdict::Agrees;
  double ours = 0, theirs = 0;  ///< SI
  std::string finding;          ///< one sentence
};

struct StepReview {
  std::vector<StepCheckedLine> lines;
  bool agrees = true;
  std::vector<FoundSlip> slips;  ///< one when a slip explains the sheet; others with the same effect follow
  std::string summary;
};

/// Figures that can be compared, with the dimension they are read in: "sought", "heat_set_free", "inlet",
/// "outlet" (sensible heats from 25 °C), "reaction.N.extent", "reaction.N.heat" (per mole as written, 25 °C),
/// "reaction.N.free", "in.N.amount", "in.N.mass", "in.N.heat", "out.N.amount", "out.N.heat" (N as in
/// StepResult).
std::optional<units::Dimension> check_dimension(const StepResult& result, const std::string& cell);

/// "With the sheet's own data": their heats of reaction and heat capacities in place of ours.
struct OwnData {
  std::map<std::size_t, double> reaction_heats;   ///< [J] as written at 25 °C, by reaction
  std::map<std::size_t, double> heat_capacities;  ///< [J/(mol K)] constant, by substance
};

/// @param entries  cell to text as typed with its unit; empty texts are left aside
/// @param lookups  those the result was made with
StepReview review_step(const StepResult& result, Lookups& lookups,
                       const std::map<std::string, std::string>& entries);

/// The step again with the data of the sheet under review: same method, their data.
/// @errors those of solve_step
Result<StepResult> with_own_data(const StepResult& result, Lookups& lookups, const OwnData& data);

}  // namespace heatledger::step
