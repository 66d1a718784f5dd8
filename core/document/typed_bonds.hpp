// Bond values typed on a sheet or copied from a site table, read.
#pragma once

#include <string>
#include <vector>

#include "core/document/worksheet.hpp"
#include "core/estimate/bond_set.hpp"

namespace heatledger::document {

/// The typed bonds of a sheet, read once.
struct ReadBonds {
  std::vector<estimate::BondValue> values;
  std::vector<Error> errors;       ///< `where` is a field path: "bonds[2].value, offset 3"
  std::vector<std::string> exact;  ///< field paths of values typed without ±
};

ReadBonds read_typed_bonds(const TypedBonds& typed);

}  // namespace heatledger::document
