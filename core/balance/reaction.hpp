// A reaction once its text is read and its species are resolved; balance checked.
#pragma once

#include <memory>
#include <string>
#include <string_view>
#include <vector>

#include "core/base/result.hpp"
#include "core/facts/resolve.hpp"
#include "core/molecule/equation.hpp"
#include "core/molecule/stoichiometry.hpp"

namespace heatledger::balance {

struct ReactionSpecies {
  molecule::Term term;
  std::shared_ptr<const facts::Species> species;
  bool product = false;
  double coefficient() const { return term.coefficient.value(); }
};

struct Reaction {
  std::string text;                      ///< as typed
  std::vector<ReactionSpecies> species;  ///< reactants, then products, in order of writing
  bool reversible = false;
  molecule::BalanceCheck balance;
  bool checkable =
      true;  ///< false when a species has no composition: the element balance reads "not checkable"
  /// When not balanced: every independent way to balance it, as equation texts; empty when there is none.
  std::vector<std::string> proposals;
  std::string why_unbalanced;  ///< which element is short on which side
};

/// Reads species through this: lets a sheet keep those it has resolved.
class SpeciesSource {
 public:
  virtual ~SpeciesSource() = default;
  virtual Result<std::shared_ptr<const facts::Species>> species(std::string_view text, bool quoted) = 0;
};

/// Remembers what it resolved; bounded, so that bulk work stays in constant memory: when `capacity` texts are
/// held they become the older half, which is let go when the newer half is full too. What is used keeps
/// moving to the newer half.
class CachedSpecies : public SpeciesSource {
 public:
  /// @param capacity  texts in each half, at least 1
  explicit CachedSpecies(std::size_t capacity = 4096);
  ~CachedSpecies() override;
  Result<std::shared_ptr<const facts::Species>> species(std::string_view text, bool quoted) override;

 private:
  struct Store;
  std::unique_ptr<Store> store_;
};

/// @errors equation.*, species.*, smiles.*, formula.*; `where` is "offset N" into the equation text
Result<Reaction> read_reaction(std::string_view text, SpeciesSource& source);

/// The name a term goes by on the sheet: as typed, formulas with subscripts, SMILES in quotes; phase not
/// included.
std::string display_species(const ReactionSpecies& species);
/// "(l)", "(aq, 96 wt%)", "" when no phase was written.
std::string phase_suffix(const molecule::Term& term);

/// The equation set in type: "nitrobenzene(l) + 3 H₂ → aniline(l) + 2 H₂O(l)".
std::string display_equation(const Reaction& reaction);
/// Text that reads back to the same reaction, for proposals and files.
std::string plain_equation(const Reaction& reaction);

}  // namespace heatledger::balance
