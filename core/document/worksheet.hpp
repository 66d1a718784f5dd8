// The worksheet: what a person typed, nothing derived. Edits and undo stand in history.hpp, results in
// computation.hpp, the file in core/file.
#pragma once

#include <map>
#include <string>
#include <vector>

namespace heatledger::document {

/// Title block of the sheet.
struct Header {
  std::string title, subtitle, sheet_number, revision, prepared, prepared_date, checked, checked_date;
};

/// A user's own bond value, with its source.
struct TypedBond {
  std::string bond;    ///< spelling, "C-Cl", or with setting "C=O (CO2)"
  std::string value;   ///< text with unit, "340 kJ/mol"
  std::string source;
};

/// A figure that the second engineer found on the sheet under review, keyed by the cell it is held against.
using CheckerEntries = std::map<std::string, std::string>;

struct ReactionSheet {
  std::string id;        ///< "r1", stable through edits and files
  std::string title;
  std::string equation;  ///< as typed
  std::string basis;     ///< see balance::LedgerOptions::basis
  std::string bond_set;  ///< set id; empty: the primary
  std::string pinned_route;
  std::string note;
  bool show_profile = false;
  CheckerEntries checker;  ///< cell suffix ("gas_298", "row.2.per_mole", …) to text as typed
};

struct Worksheet {
  Header header;
  std::vector<ReactionSheet> reactions;
  std::vector<TypedBond> typed_bonds;
  std::vector<std::string> notes;        ///< free notes
  std::vector<std::string> assumptions;  ///< numbered on the sheet
  std::string unknown;  ///< JSON object of keys that this version does not know, kept for the round trip; or empty
};

}  // namespace heatledger::document
