// Older worksheet files brought up to date, one version at a time, before anything reads them.
#pragma once

#include "core/file/json.hpp"

namespace heatledger::file {

/// Brings the object of a worksheet file from `version` to the present version.
/// Version 0, the draft format: one reaction at the top level ("equation", "per"), the title block as plain
/// keys
/// ("title", "by", "date"), bond values as an object {"C-Cl": "340 kJ/mol"}.
/// @param version  0 to the present version
void migrate_worksheet(Json& root, int version);

}  // namespace heatledger::file
