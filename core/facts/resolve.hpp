// What a species text of an equation means: library name, then formula, then SMILES (shared rule of the sheet).
#pragma once

#include <memory>
#include <optional>
#include <string>
#include <string_view>

#include "core/base/result.hpp"
#include "core/facts/compound.hpp"
#include "core/molecule/bonds.hpp"
#include "core/molecule/formula.hpp"
#include "core/molecule/graph.hpp"

namespace heatledger::facts {

/// A species once read: everything that does not depend on the reaction it stands in. Immutable and shared.
struct Species {
  std::string text;               ///< as typed
  std::string name;               ///< library name, else display formula, else the SMILES
  const Compound* compound = nullptr;
  std::optional<molecule::Graph> graph;  ///< aromaticity perceived; empty: no structure (salt, mixture, code name)
  std::string canonical;          ///< canonical SMILES, empty without structure
  molecule::BondTally bonds;      ///< empty without structure
  std::optional<molecule::Composition> composition;  ///< empty: not known (code name with a molar mass)
  double molar_mass = 0;          ///< [kg/mol]; 0 when unknown
  std::string note;               ///< "read as formula: carbon monoxide; \"CO\" in quotes is methanol", empty when plain
};

/// Reads one species text. Unquoted: library name, then formula (condensed or plain; one library isomer or a
/// structure that the condensed text fixes), then SMILES; quoted: SMILES. When two readings differ the formula wins
/// and `note` says so. A formula with several isomers in the library is an error that lists them by name.
/// @errors species.unknown (hint: nearest names), species.several_isomers, smiles.*, formula.*
Result<std::shared_ptr<const Species>> resolve_species(std::string_view text, bool quoted);

}  // namespace heatledger::facts
