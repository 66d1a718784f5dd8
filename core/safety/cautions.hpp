// Customary cautions: what a process chemist would say on seeing these substances together. Each is one plain
// sentence; none replaces a measurement, local codes or licensed practice.
#pragma once

#include <memory>
#include <string>
#include <vector>

#include "core/facts/resolve.hpp"

namespace heatledger::safety {

/// A substance of a step and what it does there.
struct Presence {
  std::string name;  ///< as the sheet shows it
  std::shared_ptr<const facts::Species> species;
  bool fed = false;
  bool formed = false;
  bool gas = false;  ///< leaves as gas
};

struct Setting {
  bool dosed = false;     ///< something is fed while it reacts
  bool vessel = false;    ///< charge or dosed charge
  bool quenched = false;  ///< something hot or reacting is run into a quench
};

/// Those that apply, in a fixed order; at the end, if there is any, the sentence that defers to measurement.
/// @example Cautions.NameWhatStandsTogether
std::vector<std::string> customary_cautions(const std::vector<Presence>& substances, const Setting& setting);

/// "The ± is the 95 % interval of the data of what is written; not covered are …": stands under every figure
/// that a safety file uses.
const char* what_spread_covers();

}  // namespace heatledger::safety
