// The checker's column: figures typed from a sheet under review, held against this ledger line by line, and
// the slip that explains a difference when one does. How a sheet is recomputed with a slip in it stands in
// sheet_model.hpp, the slips that are tried in slips.hpp.
#pragma once

#include <map>
#include <string>
#include <vector>

#include "core/balance/ledger.hpp"

namespace heatledger::balance {

/// What a typed figure turned out to be.
enum class Verdict : std::uint8_t {
  Agrees,           ///< equal within the digits typed
  Follows,          ///< differs, but only because of the slip named above it
  DifferentTable,   ///< equal with another published table, or within the spread of the tables: no slip
  Slip,             ///< one slip explains it
  MoreThanOneSlip,  ///< no single slip does; two together may
  NotComparable,    ///< this ledger has no such figure
  Unreadable        ///< not a figure
};

/// Kinds of slip, the ones met most often first.
enum class SlipKind : std::uint8_t {
  CoefficientLeftOut,
  CarbonDioxideAsKetone,  ///< CO2's bonds priced as a ketone's
  AverageForSpecific,     ///< the average in place of one molecule's own value
  NitroAsTwoDouble,
  BondMissed,
  BondTwice,
  LineLeftOut,
  PhaseLeftOut,  ///< the gas value for a liquid, solid or solution
  WrongBasis,    ///< per mole of the wrong species
  JouleForKilojoule,
  CalorieForJoule,
  Sign,
  SidesExchanged,
  DigitsTransposed,
  LineTwice,
  OtherPrice  ///< a price that is in no published table
};

struct Slip {
  SlipKind kind = SlipKind::BondMissed;
  std::size_t row = 0, line = 0;  ///< where that has a meaning
  std::string words;              ///< "one C–H of methane missed: 3 instead of 4"
};

struct CheckedLine {
  std::string cell;  ///< as in the entries
  Verdict verdict = Verdict::Agrees;
  double ours = 0;    ///< [kJ, kJ/mol or a count]; 0 when not comparable
  double theirs = 0;  ///< the same unit; 0 when unreadable
  std::string ours_text, difference_text;
  std::string finding;  ///< one sentence
};

struct Review {
  std::vector<CheckedLine> lines;  ///< in the order of the sheet
  bool agrees = true;              ///< every figure agrees
  bool different_table = false;
  std::string table;  ///< id of the other table when one explains the sheet
  std::vector<Slip>
      slips;  ///< what explains the sheet; several entries of `alternatives` may do so equally well
  std::vector<Slip> alternatives;  ///< other single slips with the same effect on the figures typed
  bool more_than_one = false;
  std::string summary;  ///< one sentence for the whole column
};

/// Cells that can be compared, by suffix of the cell id:
/// "row.N.line.M.count", "row.N.line.M.price", "row.N.line.M.per_mole", "row.N.per_mole",
/// "row.N.in_equation", "broken", "formed", "gas_298", "correction.N", "as_written", "gas_298.on_basis",
/// "as_written.on_basis". Figures are kJ unless a unit is typed (J, kJ, MJ, cal, kcal); thin spaces, commas
/// between thousands and a true minus are read.
/// @param entries  cell suffix to text as typed; empty texts are left aside
/// @complexity single slips linear in the bond lines; pairs, tried only where no single slip explains the
/// sheet, quadratic
Review review_sheet(const Ledger& ledger, const std::map<std::string, std::string>& entries);

}  // namespace heatledger::balance
