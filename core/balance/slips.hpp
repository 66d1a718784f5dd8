// Every single slip that the checker tries on a sheet, as changes to its model.
#pragma once

#include <vector>

#include "core/balance/checker.hpp"
#include "core/balance/sheet_model.hpp"

namespace heatledger::balance {

struct Candidate {
  Slip slip;
  std::vector<Change> changes;
  bool only_here = false;  ///< the figure was written down wrongly and nothing was computed from it
};

/// A typed figure next to the node it is held against.
struct TypedCell {
  std::string cell;
  Node node = 0;
  double theirs = 0;     ///< kJ, kJ/mol, kJ/kg or a count
  double tolerance = 0;  ///< what the digits typed leave open
};

/// All candidates, the kinds met most often first.
/// @param base   the sheet without a slip
/// @param typed  figures whose own digits suggest a slip (transposition, a price of unknown origin)
std::vector<Candidate> candidate_slips(const Ledger& ledger, const SheetModel& model,
                                       const std::vector<double>& base, const std::vector<TypedCell>& typed);

/// Prices of one bond type taken from another published table: no slip, but what mixing tables does.
std::vector<Candidate> mixed_tables(const Ledger& ledger, const SheetModel& model);

}  // namespace heatledger::balance
