// Names of esters, trade and systematic, as structures: so that any pair of a common alcohol and acid is
// found, whichever of its names the library holds, and estimated where it holds none.
#pragma once

#include <optional>
#include <string>
#include <string_view>

namespace heatledger::facts {

/// The structure of "methyl isobutyrate", "isopropyl 2-methylpropanoate", "dibutyl phthalate"; forgiving as
/// Library::find_name.
/// @return SMILES; empty for any other name, and for acids and alkyls that the tables of this file do not
/// hold
/// @source trade names: IUPAC recommendations 2013, P-65.1.1 and P-29.6 (retained names)
std::optional<std::string> smiles_of_ester(std::string_view name);

}  // namespace heatledger::facts
