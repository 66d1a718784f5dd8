// Answers of the command line to one question, as JSON or as text for a terminal: `tally` (one equation) and
// `species` (one compound). Whole sheets stand in session.hpp, streams of questions in bulk.hpp.
#pragma once

#include <memory>
#include <string>
#include <string_view>

#include "core/balance/reaction.hpp"
#include "core/base/result.hpp"

namespace heatledger::page {

enum class AnswerShape : std::uint8_t { Text, Json };

/// Whose figures the answer states as gas_298 and as_written. The two columns exist by average bonds only.
enum class BondRoute : std::uint8_t { Average, Context };

struct TallyQuestion {
  std::string_view equation;
  bool smiles = false;  ///< every species is SMILES, as if quoted
  BondRoute route = BondRoute::Average;
  std::string_view set;                        ///< id of a published bond set; empty: the primary one
  std::string_view basis;                      ///< see balance::LedgerOptions::basis
  std::string_view reactants_at, products_at;  ///< temperatures as typed, "80 degC"; empty: 25 °C
  std::string_view site_table;  ///< text of a site table whose species and bonds go first; or empty
};

struct SpeciesQuestion {
  std::string_view species;
  bool smiles = false;         ///< the text is SMILES, as if quoted
  bool estimate_only = false;  ///< leave every tabulated value of this very compound aside
};

/// An answer, and whether the question was sound: an equation that does not balance is answered (with the
/// ways to balance it) but counts as wrong input.
struct Answer {
  std::string text;  ///< ends with a newline
  std::optional<Error> wrong;
};

/// The ledger of one equation. JSON keys, energies in kJ for the written coefficients:
/// balanced, equation, broken, broken_u95, formed, formed_u95, gas_298, corrections, as_written, as_run,
/// per_mole_of, routes (null where a route has no figure; route_reasons says why), rows, cautions.
/// @errors equation.*, species.*, smiles.*, formula.*, bond_set.unknown, ledger.basis_unknown, unit.*, those
/// of file::read_site_table
Result<Answer> answer_tally(const TallyQuestion& question, AnswerShape shape, balance::SpeciesSource& source);

/// The figures of one compound: kJ/mol, J/(mol K), K. JSON keys: name, smiles, formula, molar_mass_g_mol,
/// gas_formation, vaporisation_298, liquid_formation, cp_gas, cp_liquid_298, bonds, bonds_ledger, cautions.
/// A value that cannot be given is null with a `reason`.
/// @errors species.*, smiles.*, formula.*
Result<Answer> answer_species(const SpeciesQuestion& question, AnswerShape shape,
                              balance::SpeciesSource& source);

/// {"error":{"code","message","where","hint"}}, one line.
std::string error_json(const Error& error);
/// "message (where)" and the hint on a line of its own, for a terminal.
std::string error_text(const Error& error);

}  // namespace heatledger::page
