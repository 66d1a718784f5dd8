// The worksheet: what a person typed, nothing derived. Parts are shared between states, so that copying a
// sheet for an edit is cheap. Edits and undo stand in history.hpp, results in computation.hpp, the file in
// core/file.
#pragma once

#include <map>
#include <string>
#include <vector>

#include "core/document/shared.hpp"

namespace heatledger::document {

/// Title block of the sheet.
struct Header {
  std::string title, subtitle, sheet_number, revision, prepared, prepared_date, checked, checked_date;
  std::string unknown;  ///< see Worksheet::unknown
};

/// A user's own bond value, with its source.
struct TypedBond {
  std::string bond;   ///< spelling, "C-Cl", or with setting "C=O (CO2)"
  std::string value;  ///< text with unit, "340 kJ/mol"
  std::string source;
  std::string unknown;
};

/// A figure that the second engineer found on the sheet under review, keyed by the figure it is held against.
using CheckerEntries = std::map<std::string, std::string>;

struct ReactionSheet {
  std::string id;  ///< "r1", stable through edits and files
  std::string title;
  std::string equation;      ///< as typed
  std::string basis;         ///< see balance::LedgerOptions::basis
  std::string bond_set;      ///< set id; empty: the primary
  std::string pinned_route;  ///< name of a route; empty: the best
  std::string note;
  bool show_profile = false;
  bool show_checker = false;
  CheckerEntries checker;  ///< figure ("gas_298", "row.2.per_mole", …) to text as typed
  std::string unknown;
};

using TypedBonds = std::vector<TypedBond>;
using Lines = std::vector<std::string>;

struct Worksheet {
  Shared<Header> header;
  std::vector<Shared<ReactionSheet>> reactions;
  Shared<TypedBonds> typed_bonds;
  Shared<Lines> notes;        ///< free notes
  Shared<Lines> assumptions;  ///< numbered on the sheet
  /// JSON object text of the keys of this level that this version does not know, kept for the round trip; or
  /// empty.
  Shared<std::string> unknown;
};

/// A sheet with one empty reaction.
Worksheet empty_worksheet();
/// Index of the reaction with this id; the number of reactions when there is none.
std::size_t find_reaction(const Worksheet& sheet, const std::string& id);
/// "r1", "r2", …: the lowest id that no reaction has.
std::string free_reaction_id(const Worksheet& sheet);

}  // namespace heatledger::document
