// What a species text of an equation means: library name, then formula, then SMILES (shared rule of the
// sheet).
#pragma once

#include <memory>
#include <optional>
#include <string>
#include <string_view>

#include "core/base/result.hpp"
#include "core/facts/compound.hpp"
#include "core/facts/ions.hpp"
#include "core/facts/library.hpp"
#include "core/molecule/bonds.hpp"
#include "core/molecule/formula.hpp"
#include "core/molecule/graph.hpp"

namespace heatledger::facts {

/// A species once read: everything that does not depend on the reaction it stands in. Immutable and shared.
struct Species {
  std::string text;  ///< as typed
  std::string name;  ///< library name, else display formula, else the SMILES
  const Compound* compound = nullptr;
  std::optional<molecule::Graph>
      graph;                  ///< aromaticity perceived; empty: no structure (salt, mixture, code name)
  std::string canonical;      ///< canonical SMILES, empty without structure
  molecule::BondTally bonds;  ///< empty without structure
  std::optional<molecule::Composition> composition;  ///< empty: not known (code name with a molar mass)
  double molar_mass = 0;                             ///< [kg/mol]; 0 when unknown
  const AqueousSubstance* aqueous =
      nullptr;               ///< figures in water at infinite dilution; for an ion they are all there is
  bool repeat_unit = false;  ///< structure with '*' at both ends: one unit of a long chain
  bool coded = false;        ///< known by a code name and a molar mass only (make_coded_species)
  std::string note;  ///< "read as formula: carbon monoxide; \"CO\" in quotes is methanol", empty when plain
};

/// Reads one species text.
/// Quoted: SMILES. Unquoted, in this order:
///   name      of the library or of an ion ("sulfate ion"). Where the text is also the formula of another
///   compound of
///             the library, the formula wins and the note says so.
///   formula   plain or condensed ("CH3CH2OH"), ions with their charge. One compound of that composition, or
///   the
///             structure that condensed text fixes; of several isomers the one that a bare formula means in
///             practice (C6H6), an element's reference state, or the commonest crystal form, and the note
///             names the others. Where the text is SMILES of something else as well (CO, NO, COS), the
///             formula wins and the note says so; a text that writes one element symbol twice in a row (OO,
///             CCO) is SMILES.
///   SMILES    compounds of the library are found by structure; any other structure stands for itself.
/// @errors species.empty; species.unknown (hint: nearest names); species.several_isomers (lists them by
/// name);
///         smiles.* for quoted text and for text that can only be SMILES
/// @example Resolve.FormulaWinsWhereTwoReadingsDiffer
Result<std::shared_ptr<const Species>> resolve_species(std::string_view text, bool quoted);
/// The same against a library with site tables laid over it.
Result<std::shared_ptr<const Species>> resolve_species(std::string_view text, bool quoted,
                                                       const Library& library);

/// A species known by a name and a molar mass, for sheets that hide what it is.
/// @param molar_mass  [kg/mol] > 0; 0 if a formula is given, which then sets it
/// @param formula     empty: composition unknown, so that no element balance can be checked
/// @errors species.empty, species.molar_mass (not positive, or differs from the formula's by more than 0.5
/// %), formula.*
Result<std::shared_ptr<const Species>> make_coded_species(std::string_view name, double molar_mass,
                                                          std::string_view formula = {});

}  // namespace heatledger::facts
