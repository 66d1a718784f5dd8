// The worksheet: what a person typed, nothing derived. Parts are shared between states, so that copying a
// sheet for an edit is cheap. Edits and undo stand in history.hpp, results in computation.hpp, the file in
// core/file.
#pragma once

#include <map>
#include <string>
#include <vector>

#include "core/document/shared.hpp"
#include "core/document/step_sheet.hpp"

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
  std::string from;  ///< name of the site table it was copied from; empty: typed here
  std::string unknown;
};

/// One thing the sheet says of a species itself: a figure, or what it is (molar mass, formula, structure). It
/// goes before whatever is published.
struct TypedFigure {
  std::string species;  ///< as the equations write it; SMILES in double quotes
  std::string figure;   ///< name of the figure, see typed_species.hpp: "formation_liquid"
  std::string value;    ///< text with unit, "-412 ± 6 kJ/mol"
  std::string source;
  std::string from;  ///< name of the site table it was copied from; empty: typed here
  std::string unknown;
};

/// A quantity that other cells may call by its name.
struct NamedQuantity {
  std::string name;   ///< "feed_ratio", see units::usable_name
  std::string value;  ///< a quantity or arithmetic over quantities and other names
  std::string unit;   ///< that it is shown in; empty: one that suits
  std::string note;
  std::string unknown;
};

/// A measured enthalpy of a reaction, as typed.
struct TypedHeat {
  std::string value;     ///< text with unit and ±: "-545 ± 8 kJ/mol"; empty: none was measured
  std::string per;       ///< species it is stated per mole of; empty: for the coefficients written
  std::string at;        ///< temperature of the measurement; empty: 25 °C
  std::string medium;    ///< "in methanol"
  std::string includes;  ///< mixing, dilution, evaporation, gas loss: "yes", "no" or "unknown"
  std::string source;    ///< who measured it, with what and when
  std::string from;      ///< name of the site table it was copied from; empty: typed here
  std::string unknown;

  bool blank() const {
    return value.empty() && per.empty() && at.empty() && medium.empty() && includes.empty() &&
           source.empty() && from.empty() && unknown.empty();
  }
};

/// A figure that the second engineer found on the sheet under review, keyed by the figure it is held against.
using CheckerEntries = std::map<std::string, std::string>;

/// ReactionSheet::bond_set of a ledger whose rows are bonds in context.
inline constexpr const char* kContextSet = "context";

struct ReactionSheet {
  std::string id;  ///< "r1", stable through edits and files
  std::string title;
  std::string equation;                   ///< as typed
  std::string basis;                      ///< see balance::LedgerOptions::basis
  std::string bond_set;                   ///< set id; "context": bonds in context; empty: the primary
  std::string pinned_route;               ///< name of a route; empty: the best
  std::string reactants_at, products_at;  ///< temperatures as typed; empty: 25 °C
  std::string pressure;                   ///< of the gases, as typed; empty: not asked
  TypedHeat measured;
  std::string note;
  bool show_profile = false;
  bool show_checker = false;
  bool show_measured = false;  ///< blanks for a measured heat; shown anyway once one is filled
  CheckerEntries checker;      ///< figure ("gas_298", "row.2.per_mole", …) to text as typed
  std::string unknown;
};

using TypedBonds = std::vector<TypedBond>;
using TypedFigures = std::vector<TypedFigure>;
using NamedQuantities = std::vector<NamedQuantity>;
using Lines = std::vector<std::string>;

/// An entry of a list in the file that no such list can hold (a number among texts): kept as it came and
/// written back to its place.
struct Misfit {
  std::string list;       ///< key of the list at the top level of the file
  std::size_t place = 0;  ///< index it had there
  std::string json;
};
using Misfits = std::vector<Misfit>;

struct Worksheet {
  Shared<Header> header;
  std::vector<Shared<ReactionSheet>> reactions;
  std::vector<Shared<StepSheet>> steps;
  Shared<TypedBonds> typed_bonds;
  Shared<TypedFigures> typed_figures;
  Shared<NamedQuantities> quantities;
  Shared<Lines> notes;        ///< free notes
  Shared<Lines> assumptions;  ///< numbered on the sheet
  Shared<Misfits> misfits;
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
/// The same for steps: "s1", "s2", …
std::size_t find_step(const Worksheet& sheet, const std::string& id);
std::string free_step_id(const Worksheet& sheet);

}  // namespace heatledger::document
