// The table of named quantities of a sheet, worked out in the order in which they call each other.
#pragma once

#include <optional>
#include <vector>

#include "core/document/worksheet.hpp"
#include "core/units/expression.hpp"

namespace heatledger::document {

struct ReadQuantity {
  std::optional<units::Evaluated> figure;  ///< empty: blank, or an error says why
  std::optional<units::Unit> shown_in;     ///< as asked for; empty: the unit of the figure
};

struct ReadQuantities {
  std::vector<ReadQuantity> rows;  ///< one for each entry
  units::NamedFigures names;       ///< what cells may call
  std::vector<Error> errors;       ///< `where` is "quantities[I].FIELD"
};

/// A row that cannot be worked out is no name; what calls it says so.
/// Codes: those of units::evaluate and usable_name, quantity.twice (a name given again), quantity.circle
/// (names that call each other, all spelled out), unit.dimension (the unit it is to be shown in).
ReadQuantities read_quantities(const NamedQuantities& typed);

}  // namespace heatledger::document
