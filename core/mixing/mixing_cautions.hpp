// What an engineer is warned of when solutions are mixed, and the temperatures that these warnings rest on.
#pragma once

#include "core/step/findings.hpp"
#include "core/step/step.hpp"

namespace heatledger::mixing {

constexpr double kWaterMolarMass = 0.018015;  ///< [kg/mol] IUPAC 2021, abridged

/// Boiling point of water at the pressure of the step [K]: the least temperature at which a mixture of water
/// boils, since what is dissolved raises it.
std::optional<double> water_boils(const step::StepResult& result);
/// Temperature of the feeds mixed by their heat capacities alone [K].
double mean_feed_temperature(const step::StepResult& result);
/// Types the sought blank of a feed as it came out, so that another one can be sought.
void fix_sought(step::StepInput& input, const step::StepResult& result);

/// @param unheated  the same mixture without duty; nullptr when it has no end
void add_mixing_cautions(step::Findings& findings, const step::StepResult& result,
                         const step::StepResult* unheated);

}  // namespace heatledger::mixing
