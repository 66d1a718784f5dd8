// What a heat duty asks of the utilities: flow of a medium that warms or cools, condensing steam, coolant
// that evaporates, surface of a jacket.
#pragma once

#include <memory>

#include "core/step/findings.hpp"
#include "core/step/step_input.hpp"

namespace heatledger::safety {

struct UtilityInput {
  uncertainty::Quantity heat;  ///< [W] to the process > 0, from it < 0
  std::string heat_words;      ///< "duty", "peak heat rate", "mean heat rate, not the one to design for"
  std::string medium;          ///< "cooling water" (also when empty), "brine", "thermal oil"
  step::Blank medium_in, medium_out;                 ///< [K]
  step::Blank medium_heat_capacity;                  ///< [J/(kg K)]; empty: that of water, for water alone
  step::Blank steam_pressure;                        ///< [Pa] of saturated steam that condenses
  std::shared_ptr<const facts::Species> coolant;     ///< evaporates; null: none
  step::Blank coolant_pressure;                      ///< [Pa]; empty: 101.325 kPa
  step::Blank heat_transfer_coefficient;             ///< U, fouling included [W/(m² K)]
  std::optional<uncertainty::Quantity> conductance;  ///< UA that the step asks for [W/K]
  std::string mean_difference;  ///< how its temperature difference is taken: "log mean of the two ends"
};

/// Figures for what is typed; a figure that a further blank would give says which.
/// @source condensing and boiling water: IAPWS SR1-86 (1992)
/// @example Utilities.SteamThatCondensesAtOneAtmosphere
step::FindingGroup utilities(const UtilityInput& input);

}  // namespace heatledger::safety
