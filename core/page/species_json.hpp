// The JSON keys of one compound, the same for `species --json` and for the lines of `bulk`.
#pragma once

#include "core/page/json_text.hpp"
#include "core/page/species_figures.hpp"

namespace heatledger::page {

/// Writes the keys into an object that is open: kJ/mol, J/(mol K), K.
void write_species_keys(JsonText& json, const SpeciesFigures& figures);

}  // namespace heatledger::page
