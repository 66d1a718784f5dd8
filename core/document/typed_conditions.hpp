// What is typed beside an equation, read: temperatures, pressure, a measured heat.
#pragma once

#include <vector>

#include "core/balance/ledger.hpp"
#include "core/document/worksheet.hpp"
#include "core/units/expression.hpp"

namespace heatledger::document {

/// The blanks of one reaction as the ledger takes them; what cannot be read is left empty.
struct Conditions {
  std::optional<double> reactants_at, products_at;  ///< [K]
  std::optional<double> pressure;                   ///< [Pa]
  std::optional<balance::MeasuredHeat> measured;
  bool measured_exact = false;  ///< typed without ±
  std::vector<Error> errors;    ///< `where` begins with the field: "reactants_at", "measured.value, offset 3"
};

/// @param names  what the cells may call
Conditions read_conditions(const ReactionSheet& sheet, const units::NamedFigures& names);

}  // namespace heatledger::document
