// Short answers for a great many equations: the figures of make_ledger by the average set and by formation,
// without rows and texts. Reading and writing the lines of a bulk run stands with the command line.
#pragma once

#include <memory>
#include <optional>
#include <string_view>

#include "core/balance/ledger.hpp"

namespace heatledger::balance {

/// The figures of one equation for the coefficients written [J]; each the very digits that make_ledger gives.
struct QuickAnswer {
  std::optional<uncertainty::Figure> broken, formed, gas_298, as_written;  ///< average bonds
  std::optional<uncertainty::Figure> formation_gas_298, formation;  ///< formation enthalpies; as written
  std::optional<uncertainty::Figure> context_broken, context_formed, context_gas_298,
      context;             ///< bonds in context (ContextUse::Always)
  std::string_view taken;  ///< name of the route whose figure goes on; empty when there is none
};

/// Remembers terms of equations ("3 H2(g)") with their figures; memory stays bounded. Not for use by two
/// threads at once.
class QuickTally {
 public:
  /// @param capacity  terms kept in each half of the memory, at least 1
  explicit QuickTally(std::shared_ptr<const estimate::BondSet> set,
                      ContextUse context = ContextUse::WhereNeeded, std::size_t capacity = 8192);
  ~QuickTally();

  /// Parts of ± kept in each half of the memory before it is renewed [16 bytes each]: an estimate brings a
  /// thousand with each of its figures, a figure of a table one.
  static constexpr std::size_t most_parts = std::size_t{1} << 20;
  /// Parts of ± held now: at most twice most_parts and the terms of one equation.
  std::size_t remembered_parts() const;

  /// @errors as read_reaction and make_ledger without basis: equation.*, species.*, smiles.*, formula.*,
  /// ledger.not_balanced
  /// @example QuickTally, GivesTheDigitsOfTheLedger
  Result<QuickAnswer> tally(std::string_view equation);

 private:
  struct State;
  std::unique_ptr<State> state_;
};

}  // namespace heatledger::balance
