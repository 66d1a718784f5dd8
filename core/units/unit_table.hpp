// The table of unit names, each factor with its source.
#pragma once

#include <string_view>

#include "core/units/dimension.hpp"

namespace heatledger::units {

struct UnitName {
  std::string_view text;
  std::string_view display;
  double factor, offset;
  Dimension dimension;
};

/// The longest name that stands at the beginning of the text and ends at a boundary; nullptr when there is
/// none.
const UnitName* find_unit_name(std::string_view text);

/// Names that have two meanings in use, with what to write instead; empty when the text begins with none.
struct AmbiguousName {
  std::string_view text;
  std::string_view hint;
};
const AmbiguousName* find_ambiguous_name(std::string_view text);

/// A name that differs from the text in upper and lower case only; empty when there is none.
std::string_view nearest_unit_name(std::string_view text);

}  // namespace heatledger::units
