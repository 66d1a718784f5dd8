#include "core/facts/layered_library.hpp"

#include <algorithm>
#include <deque>
#include <unordered_map>

#include "core/facts/completion.hpp"
#include "core/facts/name_key.hpp"
#include "core/facts/structure_match.hpp"

namespace heatledger::facts {

struct LayeredLibrary::State {
  const Library* base = nullptr;
  std::vector<SiteRecord> records;  ///< own the texts that compounds_ points to
  std::string layer;
  std::deque<Compound> compounds;
  std::deque<std::vector<Rival>> rivals;
  std::unordered_map<const Compound*, const Compound*> over;   ///< layer to base
  std::unordered_map<const Compound*, const Compound*> under;  ///< base to layer
  std::unordered_map<std::string, const Compound*> names;
  std::unique_ptr<CompletionIndex> completion;
  StructureMatcher structures;

  const Compound* top(const Compound* compound) const {
    const auto at = under.find(compound);
    return at == under.end() ? compound : at->second;
  }
  Compound& compound_of(const SiteRecord& record);
  void lay(const SiteRecord& record);
  void index(const Compound& compound, std::vector<NameEntry>& entries, std::uint32_t row);
};

namespace {

void replace_text(std::string_view& text, const std::string& by) {
  if (!by.empty()) text = by;
}

}  // namespace

Compound& LayeredLibrary::State::compound_of(const SiteRecord& record) {
  const Compound* below = record.cas.empty() ? nullptr : base->find_name(record.cas);
  if (below == nullptr) below = base->find_name(record.name);
  for (Compound& mine : compounds) {
    if (below != nullptr ? over[&mine] == below : name_key(mine.name) == name_key(record.name)) return mine;
  }
  Compound& fresh = compounds.emplace_back();
  if (below != nullptr) {
    fresh = *below;
    over[&fresh] = below;
    under[below] = &fresh;
  }
  // Ids of this layer never meet those of the base: sources of error are told apart by them.
  fresh.id = (1u << 30) + static_cast<std::uint32_t>(compounds.size() - 1);
  return fresh;
}

void LayeredLibrary::State::lay(const SiteRecord& record) {
  Compound& compound = compound_of(record);
  replace_text(compound.name, record.name);
  replace_text(compound.cas, record.cas);
  replace_text(compound.formula, record.formula);
  if (!record.smiles.empty()) {
    compound.smiles = record.smiles;
    compound.structure = Structure::Molecule;
  }
  for (const std::string& synonym : record.synonyms) compound.synonyms.push_back(synonym);
  for (const SiteFigure& typed : record.figures) {
    std::optional<Datum>& place = figure(compound, typed.kind);
    Datum datum;
    datum.value = typed.value;
    datum.u95 = typed.u95;
    datum.source = typed.source;
    datum.remark = typed.remark;
    datum.typed = true;
    if (place) {
      std::vector<Rival> others = {{place->value, place->source}};
      others.insert(others.end(), place->rivals.begin(), place->rivals.end());
      rivals.push_back(std::move(others));
      datum.rivals = rivals.back();
      datum.why_taken = layer;
    }
    place = datum;
  }
}

void LayeredLibrary::State::index(const Compound& compound, std::vector<NameEntry>& entries,
                                  std::uint32_t row) {
  const auto add = [&](std::string_view name) {
    if (name.empty()) return;
    names[name_key(name)] = &compound;
    entries.push_back({name, row});
  };
  for (const std::string_view synonym : compound.synonyms) add(synonym);
  add(compound.cas);
  add(compound.name);
}

LayeredLibrary::LayeredLibrary(const Library& base, std::vector<SiteRecord> records, std::string layer)
    : state_(std::make_unique<State>()) {
  State& s = *state_;
  s.base = &base;
  s.records = std::move(records);
  s.layer = std::move(layer);
  for (const SiteRecord& record : s.records) s.lay(record);
  std::vector<NameEntry> entries;
  std::uint32_t row = 0;
  for (const Compound& compound : s.compounds) s.index(compound, entries, row++);
  s.completion = std::make_unique<CompletionIndex>(std::move(entries));
}

LayeredLibrary::~LayeredLibrary() = default;

const Compound* LayeredLibrary::find_name(std::string_view text) const {
  const auto at = state_->names.find(name_key(text));
  if (at != state_->names.end()) return at->second;
  const Compound* below = state_->base->find_name(text);
  return below == nullptr ? nullptr : state_->top(below);
}

std::vector<const Compound*> LayeredLibrary::find_formula(std::string_view hill) const {
  std::vector<const Compound*> found;
  for (const Compound& mine : state_->compounds) {
    if (mine.formula.empty()) continue;
    const std::optional<std::string> own = hill_text(mine.formula);
    if (own && *own == hill) found.push_back(&mine);
  }
  for (const Compound* below : state_->base->find_formula(hill)) {
    const Compound* shown = state_->top(below);
    if (std::find(found.begin(), found.end(), shown) == found.end()) found.push_back(shown);
  }
  return found;
}

std::vector<const Compound*> LayeredLibrary::find_structures(std::string_view canonical_smiles,
                                                             std::string_view hill) const {
  std::vector<const Compound*> found;
  for (const Compound& mine : state_->compounds) {
    if (state_->structures.canonical(mine) == canonical_smiles && !canonical_smiles.empty())
      found.push_back(&mine);
  }
  for (const Compound* below : state_->base->find_structures(canonical_smiles, hill)) {
    const Compound* shown = state_->top(below);
    if (std::find(found.begin(), found.end(), shown) == found.end()) found.push_back(shown);
  }
  return found;
}

std::vector<Library::Completion> LayeredLibrary::complete(std::string_view text, std::size_t limit) const {
  std::vector<Completion> out;
  for (const NameEntry& entry : state_->completion->complete(text, limit)) {
    out.push_back({&state_->compounds[entry.row], entry.name});
  }
  for (Completion& below : state_->base->complete(text, limit)) {
    below.compound = state_->top(below.compound);
    const bool seen = std::any_of(out.begin(), out.end(),
                                  [&](const Completion& c) { return c.compound == below.compound; });
    if (!seen && out.size() < limit) out.push_back(below);
  }
  return out;
}

const Compound* LayeredLibrary::covered(const Compound& compound) const {
  const auto at = state_->over.find(&compound);
  return at == state_->over.end() ? nullptr : at->second;
}

}  // namespace heatledger::facts
