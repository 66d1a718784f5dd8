// The library of compounds: exact and forgiving search by name, synonym, CAS number, formula, structure.
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "core/facts/compound.hpp"

namespace heatledger::facts {

class Library {
 public:
  /// The embedded library, read at first use.
  static const Library& embedded();

  const std::vector<Compound>& compounds() const;

  /// By name, synonym or CAS number; case, hyphens, blanks, commas and accents forgiven ("Ethyl Acetate",
  /// "n butanol", "2-propanol"). nullptr when no entry has that name.
  const Compound* find_name(std::string_view text) const;
  /// All compounds of one composition (Hill text or any formula text), commonest first.
  std::vector<const Compound*> find_formula(std::string_view hill) const;
  /// By structure; equal structures match whatever the spelling (canonical SMILES, stereo ignored when absent).
  const Compound* find_structure(std::string_view canonical_smiles) const;

  struct Completion {
    const Compound* compound = nullptr;
    std::string_view matched;  ///< the name or synonym that matched
  };
  /// Names that begin with the text, then names with a word that does, then names within a small edit distance;
  /// commonest first inside each group. For completion and for "did you mean".
  std::vector<Completion> complete(std::string_view text, std::size_t limit) const;
};

}  // namespace heatledger::facts
