#include "core/facts/library.hpp"

#include <mutex>
#include <optional>

#include "core/base/check.hpp"
#include "core/facts/completion.hpp"
#include "core/facts/compound_rows.hpp"
#include "core/facts/key_index.hpp"
#include "core/facts/name_key.hpp"
#include "core/facts/structure_match.hpp"

namespace heatledger::facts {

struct EmbeddedLibrary::State {
  CompoundRows rows;
  KeyIndex names, formulas;
  std::vector<NameEntry> entries;  ///< every name, synonym and CAS number
  std::once_flag completion_once;
  std::unique_ptr<CompletionIndex> completion;
  StructureMatcher structures;
};

EmbeddedLibrary::EmbeddedLibrary() : state_(std::make_unique<State>()) {
  State& s = *state_;
  s.formulas.reserve(s.rows.size());
  s.entries.reserve(s.rows.size() * 5);
  for (std::uint32_t row = 0; row < s.rows.size(); ++row) {
    s.formulas.put(key_hash(s.rows.formula(row)), row);
    s.rows.each_name(row, [&](std::string_view name) { s.entries.push_back({name, row}); });
  }
  s.names.reserve(s.entries.size());
  std::string key;
  for (std::uint32_t i = 0; i < s.entries.size(); ++i) {
    key.clear();
    append_name_key(s.entries[i].name, key);
    s.names.put(key_hash(key), i);
  }
}

EmbeddedLibrary::~EmbeddedLibrary() = default;

const EmbeddedLibrary& Library::embedded() {
  static const EmbeddedLibrary library;
  return library;
}

const Compound* Library::find_structure(std::string_view canonical_smiles, std::string_view hill) const {
  const std::vector<const Compound*> found = find_structures(canonical_smiles, hill);
  return found.empty() ? nullptr : found.front();
}

const Compound* Library::covered(const Compound&) const {
  return nullptr;
}

std::size_t EmbeddedLibrary::size() const {
  return state_->rows.size();
}

const Compound& EmbeddedLibrary::at(std::size_t row) const {
  CHECK(row < size(), "a row of the library");
  return state_->rows.compound(static_cast<std::uint32_t>(row));
}

const Compound* EmbeddedLibrary::find_name(std::string_view text) const {
  const std::string key = name_key(text);
  if (key.empty()) return nullptr;
  const Compound* found = nullptr;
  state_->names.each(key_hash(key), [&](std::uint32_t entry) {
    found = &state_->rows.compound(state_->entries[entry].row);
    return false;
  });
  return found;
}

std::vector<const Compound*> EmbeddedLibrary::find_formula(std::string_view hill) const {
  std::vector<const Compound*> found;
  const auto collect = [&](std::string_view text) {
    state_->formulas.each(key_hash(text), [&](std::uint32_t row) {
      if (state_->rows.formula(row) == text) found.push_back(&state_->rows.compound(row));
      return true;
    });
  };
  collect(hill);
  if (found.empty()) {
    if (const std::optional<std::string> brought = hill_text(hill); brought.has_value() && *brought != hill)
      collect(*brought);
  }
  return found;
}

std::vector<const Compound*> EmbeddedLibrary::find_structures(std::string_view canonical_smiles,
                                                              std::string_view hill) const {
  std::string own;
  if (hill.empty()) {
    own = hill_of_smiles(canonical_smiles);
    hill = own;
  }
  std::vector<const Compound*> found;
  if (hill.empty()) return found;
  for (const Compound* candidate : find_formula(hill)) {
    if (state_->structures.canonical(*candidate) == canonical_smiles) found.push_back(candidate);
  }
  return found;
}

std::vector<Library::Completion> EmbeddedLibrary::complete(std::string_view text, std::size_t limit) const {
  std::call_once(state_->completion_once,
                 [this] { state_->completion = std::make_unique<CompletionIndex>(state_->entries); });
  std::vector<Completion> out;
  for (const NameEntry& entry : state_->completion->complete(text, limit)) {
    out.push_back({&state_->rows.compound(entry.row), entry.name});
  }
  return out;
}

}  // namespace heatledger::facts
