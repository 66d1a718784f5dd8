// Printed accuracy of the embedded model. accuracy.txt in this folder is the kept output of
// accuracy_report().
#pragma once

#include <cstddef>
#include <string>

namespace heatledger::estimate {

/// All fits, each compound left out exactly: one table per property.
std::string accuracy_report();
/// The table of one property alone, as it stands in accuracy_report(). name: "formation", "vaporisation",
/// "liquid", "gas 298.15 K", "gas 500 K", "gas 1000 K".
std::string accuracy_section(const std::string& name);
/// The same by folds with a refit each.
std::string folds_report(unsigned folds);
/// Rows furthest from their prediction: candidates for a second look at their sources.
std::string worst_report(std::size_t most);

}  // namespace heatledger::estimate
