// Results of a worksheet: recomputed where an edit reaches, shared elsewhere.
#pragma once

#include <memory>
#include <optional>
#include <string>
#include <vector>

#include "core/balance/ledger.hpp"
#include "core/document/history.hpp"
#include "core/document/named_quantities.hpp"
#include "core/document/step_computation.hpp"
#include "core/document/typed_species.hpp"

namespace heatledger::document {

/// A reaction of the sheet computed: a ledger, or the error that stands in its place. Immutable: the same
/// inputs give the same object, so that a page can tell by identity what an edit reached.
struct ReactionResult {
  std::shared_ptr<const balance::Reaction>
      reaction;                                   ///< null when the equation is empty or could not be read
  std::shared_ptr<const balance::Ledger> ledger;  ///< null when not balanced or not readable
  std::shared_ptr<const balance::Ledger>
      rows;                    ///< rows alone of an equation that does not balance, else null
  std::optional<Error> error;  ///< of the equation or the ledger
  /// Of basis, bond set, route, temperatures, pressure, measured heat: `where` begins with the field. The
  /// ledger then stands on the default.
  std::vector<Error> option_errors;
  std::shared_ptr<const SheetLibrary> library;  ///< that the species of `reaction` point into

  /// The ledger or, while the equation does not balance, its rows; null when there is neither.
  const balance::Ledger* shown() const { return ledger != nullptr ? ledger.get() : rows.get(); }
};

struct Results {
  std::vector<std::shared_ptr<const StepOutcome>> steps;         ///< one for each Worksheet::steps entry
  std::vector<std::shared_ptr<const ReactionResult>> reactions;  ///< one for each Worksheet::reactions entry
  std::vector<Error> errors;  ///< typed bonds that cannot be read, and the like; `where` is a field path
  std::shared_ptr<const SheetLibrary> library;       ///< species as this sheet knows them; never null
  std::shared_ptr<const ReadQuantities> quantities;  ///< named ones, worked out; never null
  std::vector<std::string> exact;  ///< field paths of figures typed without ±: "bonds[0].value"
};

/// Keeps species, equations, bond sets and ledgers between edits, so that one edit recomputes one ledger.
class Calculator {
 public:
  Calculator();
  ~Calculator();
  Calculator(Calculator&&) noexcept;
  Calculator& operator=(Calculator&&) noexcept;

  Results compute(const Worksheet& sheet);

 private:
  struct Memory;
  std::unique_ptr<Memory> memory_;
};

}  // namespace heatledger::document
