// Where published figures come from: one-letter keys of the tables, short names for a cell, full references
// for a report.
#pragma once

#include <string_view>
#include <vector>

namespace heatledger::facts {

struct Source {
  std::string_view key;        ///< as the tables write it: "c"
  std::string_view name;       ///< "CRC Handbook 95 (2014)"; the `source` of a Datum
  std::string_view reference;  ///< authors, title, edition, publisher, year
  std::string_view standing;  ///< what kind of table it is; the reason for taking its figure before another's
  int rank = 0;               ///< 1 is taken first when tables disagree
};

/// All sources of the embedded tables, in order of rank.
const std::vector<Source>& sources();
/// By key; nullptr when there is none.
const Source* find_source(std::string_view key);
/// Full reference of a short name; the name itself when it is not one of ours (typed, site tables,
/// evaluations of several tables).
std::string_view source_reference(std::string_view name);

}  // namespace heatledger::facts
