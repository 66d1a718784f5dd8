// Curves of a dosed charge against time.
#pragma once

#include "core/dosing/answers.hpp"
#include "core/step/findings.hpp"

namespace heatledger::dosing {

/// Temperature (where it moves), heat rate and cooling, accumulation and conversion, MTSR over the dosing
/// with the moment of failure, and the temperature after it. What needs kinetics is left out where none is
/// typed.
std::vector<step::Chart> dosed_charts(const Answers& answers);

}  // namespace heatledger::dosing
