// Canonical structures of compounds, worked out when first asked for: most sheets touch a few formulas only.
#pragma once

#include <cstdint>
#include <mutex>
#include <optional>
#include <string>
#include <string_view>
#include <unordered_map>

#include "core/facts/compound.hpp"

namespace heatledger::facts {

class StructureMatcher {
 public:
  /// Canonical SMILES of a compound of one library; empty when it has no structure. May be called from
  /// several threads.
  const std::string& canonical(const Compound& compound) const;

 private:
  mutable std::mutex mutex_;
  mutable std::unordered_map<std::uint32_t, std::string> known_;  ///< by compound id
};

/// Hill text of any formula text; empty when it is no formula.
std::optional<std::string> hill_text(std::string_view formula);
/// Hill text of a structure; empty when the text is no SMILES.
std::string hill_of_smiles(std::string_view smiles);

}  // namespace heatledger::facts
