// What no bond set changes in a ledger: estimates, corrections, the routes by formation enthalpies and by
// bonds in context, and their notes. Kept with the ledger, so that the next one of the same equation takes it
// over.
#pragma once

#include <memory>
#include <optional>
#include <string>
#include <vector>

#include "core/balance/figures.hpp"
#include "core/balance/ledger.hpp"

namespace heatledger::balance {

/// The estimates of the species of one equation taken apart, each made when it is first asked for. Remembers
/// while const: not for several threads at once.
class Explanations {
 public:
  /// @return null where the model does not reach the structure
  const estimate::Explanation* of(const Reaction& reaction, std::size_t index,
                                  const estimate::Observations* observations) const;

 private:
  mutable std::vector<std::optional<Result<estimate::Explanation>>> made_;
};

struct Background {
  // What it was made from.
  std::shared_ptr<const Reaction> reaction;
  std::shared_ptr<const estimate::Observations> observations;
  ContextUse context = ContextUse::WhereNeeded;
  bool context_rows = false;
  std::optional<double> reactants_at, products_at;

  // One for each species.
  std::vector<SpeciesFigures> figures;
  std::vector<PricedSpecies> priced;  ///< of a species that bonds reach only the phase is filled in
  std::vector<std::optional<double>> gas_atoms;  ///< formation enthalpy of the free atoms [J/mol]
  std::vector<LedgerRow> rows;                   ///< see start_row; whole in a ledger by bonds in context
  Explanations explanations;

  std::vector<Correction> corrections;     ///< to the phases written
  std::vector<Correction> to_temperature;  ///< from there to the temperatures asked for
  OtherSums sums;
  Route formation;
  std::optional<Route> by_context;  ///< ContextUse::Always only
  std::string estimated_note;       ///< which figures of the formation route no table has
  std::string context_apart;        ///< where context and formation route part beyond their ±
  std::vector<std::string> opening_notes, table_notes, temperature_notes;
  std::vector<std::string> phase_cautions, table_cautions, temperature_cautions;

  /// Whether a ledger of this reaction with these options stands on it.
  bool fits(const std::shared_ptr<const Reaction>& of, const LedgerOptions& options) const;
};

/// @param reaction  balanced or not checkable
std::shared_ptr<const Background> make_background(std::shared_ptr<const Reaction> reaction,
                                                  const LedgerOptions& options);

/// The species of the equation with what they were priced at.
/// @param priced  one for each species; kept by the caller
std::vector<Entry> entries_of(const Background& background, const std::vector<PricedSpecies>& priced);

}  // namespace heatledger::balance
