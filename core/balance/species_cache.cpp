#include <unordered_map>

#include "core/balance/reaction.hpp"
#include "core/base/check.hpp"

namespace heatledger::balance {

struct CachedSpecies::Store {
  using Held = std::unordered_map<std::string, std::shared_ptr<const facts::Species>>;
  std::size_t capacity = 1;
  Held newer, older;
  std::string key;  // memory reused between look-ups

  void keep(std::shared_ptr<const facts::Species> species) {
    if (newer.size() >= capacity) {
      older = std::move(newer);
      newer.clear();
    }
    newer.emplace(key, std::move(species));
  }
};

CachedSpecies::CachedSpecies(std::size_t capacity) : store_(std::make_unique<Store>()) {
  CHECK(capacity > 0, "a cache holds something");
  store_->capacity = capacity;
}

CachedSpecies::~CachedSpecies() = default;

Result<std::shared_ptr<const facts::Species>> CachedSpecies::species(std::string_view text, bool quoted) {
  Store& store = *store_;
  store.key.assign(1, quoted ? '"' : ' ')
      .append(text);  // a quoted text means something else than the bare one
  if (const auto found = store.newer.find(store.key); found != store.newer.end()) return found->second;
  if (const auto found = store.older.find(store.key); found != store.older.end()) {
    std::shared_ptr<const facts::Species> species = found->second;
    store.keep(species);
    return species;
  }
  Result<std::shared_ptr<const facts::Species>> read = facts::resolve_species(text, quoted);
  if (read.ok()) store.keep(*read);
  return read;
}

}  // namespace heatledger::balance
