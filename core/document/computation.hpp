// Results of a worksheet: recomputed where an edit reaches, shared elsewhere.
#pragma once

#include <map>
#include <memory>
#include <string>
#include <vector>

#include "core/balance/ledger.hpp"
#include "core/document/history.hpp"

namespace heatledger::document {

/// A reaction of the sheet computed: a ledger, or the error that stands in its place.
struct ReactionResult {
  std::shared_ptr<const balance::Reaction> reaction;  ///< null when the equation could not be read
  std::shared_ptr<const balance::Ledger> ledger;      ///< null when not balanced or not readable
  std::optional<Error> error;
};

struct Results {
  std::vector<std::shared_ptr<const ReactionResult>> reactions;  ///< one for each Worksheet::reactions entry
  std::vector<Error> errors;  ///< typed bonds that cannot be read, and the like; `where` is a field path
};

/// Keeps species and ledgers between edits, so that one edit recomputes one ledger.
class Calculator {
 public:
  Calculator();
  ~Calculator();
  Results compute(const Worksheet& sheet);

 private:
  struct Memory;
  std::unique_ptr<Memory> memory_;
};

}  // namespace heatledger::document
