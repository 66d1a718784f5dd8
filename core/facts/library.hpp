// The library of compounds: exact and forgiving search by name, synonym, CAS number, formula, structure.
// Site tables laid over it stand in layered_library.hpp.
#pragma once

#include <memory>
#include <string>
#include <string_view>
#include <vector>

#include "core/facts/compound.hpp"

namespace heatledger::facts {

class EmbeddedLibrary;

class Library {
 public:
  /// The embedded library, read at first use.
  static const EmbeddedLibrary& embedded();

  virtual ~Library() = default;

  /// By name, synonym or CAS number; case, hyphens, blanks, commas, brackets and accents forgiven ("Ethyl
  /// Acetate", "n butanol", "2-propanol"). nullptr when no entry has that name.
  virtual const Compound* find_name(std::string_view text) const = 0;
  /// All compounds of one composition, commonest first.
  /// @param hill  Hill text as molecule::hill_formula writes it ("C2H6O"); any other formula text is brought
  /// into it
  virtual std::vector<const Compound*> find_formula(std::string_view hill) const = 0;
  /// By structure; equal structures match whatever the spelling. Stereo isomers share one canonical text: the
  /// commonest of them comes first.
  /// @param hill  composition of the structure if the caller knows it, saves reading the text
  virtual std::vector<const Compound*> find_structures(std::string_view canonical_smiles,
                                                       std::string_view hill = {}) const = 0;
  /// The first of find_structures; nullptr when there is none.
  const Compound* find_structure(std::string_view canonical_smiles, std::string_view hill = {}) const;

  struct Completion {
    const Compound* compound = nullptr;
    std::string_view matched;  ///< the name or synonym that matched
  };
  /// Names that begin with the text, then names with a word that does, then names within a small edit
  /// distance; commonest first inside each group; a compound comes once. For completion and for "did you
  /// mean".
  virtual std::vector<Completion> complete(std::string_view text, std::size_t limit) const = 0;

  /// The published record that a site record lies over; nullptr when it lies over none.
  virtual const Compound* covered(const Compound& compound) const;
};

/// The tables as compiled in. Names are indexed at first use; the figures of a compound are read when it is
/// first asked for. May be used from several threads.
class EmbeddedLibrary final : public Library {
 public:
  ~EmbeddedLibrary() override;

  /// Number of rows; the table stands in order of commonness.
  std::size_t size() const;
  /// @param row  0 .. size() - 1; also the id of the compound
  const Compound& at(std::size_t row) const;

  const Compound* find_name(std::string_view text) const override;
  std::vector<const Compound*> find_formula(std::string_view hill) const override;
  std::vector<const Compound*> find_structures(std::string_view canonical_smiles,
                                               std::string_view hill = {}) const override;
  std::vector<Completion> complete(std::string_view text, std::size_t limit) const override;

 private:
  friend class Library;
  EmbeddedLibrary();
  struct State;
  std::unique_ptr<State> state_;
};

}  // namespace heatledger::facts
