#include "core/facts/structure_match.hpp"

#include "core/molecule/formula.hpp"
#include "core/molecule/smiles.hpp"

namespace heatledger::facts {

const std::string& StructureMatcher::canonical(const Compound& compound) const {
  const std::lock_guard<std::mutex> lock(mutex_);
  const auto [at, is_new] = known_.try_emplace(compound.id);
  if (is_new && !compound.smiles.empty()) {
    if (const Result<molecule::Graph> graph = molecule::parse_smiles(compound.smiles)) {
      at->second = molecule::canonical_smiles(*graph);
    }
  }
  return at->second;
}

std::optional<std::string> hill_text(std::string_view formula) {
  const Result<molecule::Composition> composition = molecule::parse_formula(formula);
  if (!composition) return std::nullopt;
  return molecule::hill_formula(*composition);
}

std::string hill_of_smiles(std::string_view smiles) {
  const Result<molecule::Graph> graph = molecule::parse_smiles(smiles);
  return graph ? molecule::hill_formula(molecule::composition(*graph)) : std::string();
}

}  // namespace heatledger::facts
