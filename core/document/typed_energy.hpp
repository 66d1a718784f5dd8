// A molar energy as people type it: "340 kJ/mol", "81 ± 2 kcal/mol", "−518".
#pragma once

#include <string_view>

#include "core/base/result.hpp"
#include "core/uncertainty/quantity.hpp"

namespace heatledger::document {

/// Reads a number, an optional ± and an optional unit: kJ/mol (when none is given), J/mol, kcal/mol, cal/mol,
/// eV. Thin spaces between thousands and the true minus sign are understood, so that a printed figure reads
/// back.
/// @return [J/mol] value and ± (zero when none is typed: taken as exact)
/// @errors typed_energy.not_a_number, typed_energy.unit, typed_energy.out_of_range; `where` is "offset N"
Result<uncertainty::Figure> parse_molar_energy(std::string_view text);

}  // namespace heatledger::document
