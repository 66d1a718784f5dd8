// The figures of a step with something done wrong in the middle.
#pragma once

#include <map>
#include <string>

#include "core/step/step_checker.hpp"

namespace heatledger::step {

/// What is done wrong.
struct Variation {
  FoundSlip slip;
  std::shared_ptr<const Model> model;       ///< laid out differently (shares, measures); null: the step's own
  std::map<std::size_t, double> feeds;      ///< factor on the amounts of a feed
  std::map<std::size_t, double> extents;    ///< factor on the extent of a reaction
  std::map<std::size_t, double> free_only;  ///< factor on the heat set free by a reaction, amounts untouched
  std::map<std::size_t, double> heat_added;  ///< to the heat of a reaction at 25 °C [J as written]
  std::map<std::size_t, double> in_heat,
      out_heat;  ///< factor on the sensible heat of a line, by part and substance
  /// How sensible heats are taken: as they are, °C as kelvin, with the heat capacity at 25 °C or at the
  /// temperature.
  enum class Sensible : std::uint8_t {
    Right,
    CelsiusAsKelvin,
    AtReference,
    AtTemperature
  } sensible = Sensible::Right;
  bool heat_at_outlet = false;  ///< heats of reaction at outlet temperature
  double answer_factor = 1;     ///< on the sought figure alone
  double loss_factor = 1;
};

/// Figures by cell, as StepReview names them; those that cannot be computed are missing.
std::map<std::string, double> slip_sheet(const StepResult& result, const Variation& variation);

/// Every single slip that a step can have.
std::vector<Variation> single_slips(const StepResult& result, Lookups& lookups);

}  // namespace heatledger::step
