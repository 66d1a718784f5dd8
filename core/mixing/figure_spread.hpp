// The ± of any figure of a solved step.
#pragma once

#include <functional>

#include "core/step/model.hpp"

namespace heatledger::mixing {

/// A figure of one evaluation. @return empty where it does not exist
using FigureOf =
    std::function<std::optional<double>(const step::Model&, const std::vector<double>&, const step::Work&)>;

/// To first order in every number that has a ±, the sought blank moving along so that the balance stays
/// closed.
/// @param v  numbers at the solution
/// @return empty where the figure does not exist
std::optional<uncertainty::Quantity> spread_of(const step::Model& model, const std::vector<double>& v,
                                               const FigureOf& figure);

}  // namespace heatledger::mixing
