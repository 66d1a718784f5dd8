// Air as one entry of a feed: its named compositions, spread over the parts that the balance counts.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "core/base/result.hpp"

namespace heatledger::document {

struct AirPart {
  std::string name;  ///< of the library
  double mole_share = 0;
  double mass_share = 0;
};
struct AirRow {
  std::string note;  ///< which air it is, for the sheet
  std::vector<AirPart> parts;
};

/// "air" and "dry air": the dry air of the conventions. "O2 + 3.76 N2": that. "humid air": with the moisture
/// of the conventions, or "humid air, 40 % at 30 °C".
/// @return empty when the text names no air
/// @errors air.humidity and those of quantities, thermo.temperature_range
Result<std::optional<AirRow>> read_air(const std::string& text);

}  // namespace heatledger::document
