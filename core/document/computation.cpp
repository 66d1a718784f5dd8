#include "core/document/computation.hpp"

#include <map>
#include <tuple>
#include <utility>

#include "core/document/typed_energy.hpp"

namespace heatledger::document {
namespace {

/// Remembered results beyond those on the sheet: enough for undo and redo over the last edits without
/// recomputing.
constexpr std::size_t kSpareResults = 512;

/// The inputs of one ledger; typed bonds enter by the identity of their list.
struct LedgerKey {
  std::string equation, basis, bond_set, pinned_route;
  const TypedBonds* typed_bonds = nullptr;

  friend bool operator<(const LedgerKey& a, const LedgerKey& b) {
    return std::tie(a.equation, a.basis, a.bond_set, a.pinned_route, a.typed_bonds) <
           std::tie(b.equation, b.basis, b.bond_set, b.pinned_route, b.typed_bonds);
  }
};

struct Remembered {
  std::shared_ptr<const ReactionResult> result;
  std::shared_ptr<const TypedBonds> typed_bonds;  ///< keeps the identity in the key from being used again
  std::size_t last_used = 0;
};

/// The typed bonds of a sheet, read once.
struct Overlay {
  std::vector<estimate::BondValue> values;
  std::vector<Error> errors;
};

Overlay read_typed_bonds(const TypedBonds& typed) {
  Overlay overlay;
  for (std::size_t i = 0; i < typed.size(); ++i) {
    const TypedBond& entry = typed[i];
    const std::string path = "bonds[" + std::to_string(i) + "]";
    if (entry.bond.empty() && entry.value.empty()) continue;
    const Result<molecule::BondType> type = molecule::parse_bond_type(entry.bond);
    if (!type) {
      Error error = type.error();
      error.where = path + ".bond" + (error.where.empty() ? "" : ", " + error.where);
      overlay.errors.push_back(std::move(error));
      continue;
    }
    const Result<uncertainty::Figure> figure = parse_molar_energy(entry.value);
    if (!figure) {
      Error error = figure.error();
      error.where = path + ".value, " + error.where;
      overlay.errors.push_back(std::move(error));
      continue;
    }
    if (figure->value <= 0) {
      overlay.errors.push_back({"typed_bond.not_positive", "A bond enthalpy is a positive figure.",
                                path + ".value",
                                "Breaking a bond takes heat: type the figure without a sign."});
      continue;
    }
    estimate::BondValue value;
    value.type = *type;
    value.value = figure->value;
    value.u95 = figure->u95;
    value.origin = estimate::BondOrigin::User;
    value.source = entry.source.empty() ? "typed on this sheet, no source given" : entry.source;
    overlay.values.push_back(std::move(value));
  }
  return overlay;
}

using SetResult = Result<std::shared_ptr<const estimate::BondSet>>;

SetResult build_set(const std::string& id, const Overlay& overlay) {
  const std::string name = id.empty() ? estimate::BondSet::names().front() : id;
  Result<estimate::BondSet> published = estimate::BondSet::published(name);
  if (!published) return published.error();
  for (const estimate::BondValue& value : overlay.values) published->lay_over(value);
  return std::make_shared<const estimate::BondSet>(std::move(published).value());
}

}  // namespace

struct Calculator::Memory {
  balance::CachedSpecies species;
  std::map<std::string, Result<std::shared_ptr<const balance::Reaction>>> equations;
  std::map<LedgerKey, Remembered> ledgers;
  std::shared_ptr<const TypedBonds> overlay_of;  ///< what `overlay` and `sets` were made from
  Overlay overlay;
  std::map<std::string, SetResult> sets;
  std::size_t clock = 0;

  const Result<std::shared_ptr<const balance::Reaction>>& equation(const std::string& text) {
    const auto found = equations.find(text);
    if (found != equations.end()) return found->second;
    if (equations.size() > 2 * kSpareResults) equations.clear();
    Result<balance::Reaction> read = balance::read_reaction(text, species);
    Result<std::shared_ptr<const balance::Reaction>> kept =
        read ? Result<std::shared_ptr<const balance::Reaction>>(
                   std::make_shared<const balance::Reaction>(std::move(read).value()))
             : Result<std::shared_ptr<const balance::Reaction>>(read.error());
    return equations.emplace(text, std::move(kept)).first->second;
  }

  const SetResult& set(const std::string& id) {
    const auto found = sets.find(id);
    if (found != sets.end()) return found->second;
    return sets.emplace(id, build_set(id, overlay)).first->second;
  }

  ReactionResult compute(const ReactionSheet& sheet) {
    ReactionResult result;
    if (sheet.equation.find_first_not_of(" \t\r\n") == std::string::npos) return result;
    const auto& reaction = equation(sheet.equation);
    if (!reaction) {
      result.error = reaction.error();
      return result;
    }
    result.reaction = *reaction;
    balance::LedgerOptions options;
    const SetResult* chosen = &set(sheet.bond_set);
    if (!*chosen) {
      result.option_error = chosen->error();
      result.option_error->where = "bond_set";
      chosen = &set(std::string());
    }
    if (!*chosen) {
      result.error = chosen->error();
      return result;
    }
    options.set = **chosen;
    options.basis = sheet.basis;
    options.pinned_route = sheet.pinned_route;
    Result<balance::Ledger> ledger = balance::make_ledger(result.reaction, options);
    // An option that cannot be followed is reported beside a ledger on the default, not instead of one.
    for (std::string* option : {&options.basis, &options.pinned_route}) {
      const char* field = option == &options.basis ? "basis" : "pinned_route";
      if (ledger.ok() || option->empty() || ledger.error().where != field) continue;
      result.option_error = ledger.error();
      option->clear();
      ledger = balance::make_ledger(result.reaction, options);
    }
    if (!ledger) {
      result.error = ledger.error();
      if (!result.reaction->balance.balanced) {
        result.rows = std::make_shared<const balance::Ledger>(balance::ledger_rows(result.reaction, options));
      }
      return result;
    }
    result.ledger = std::make_shared<const balance::Ledger>(std::move(ledger).value());
    return result;
  }

  /// Forgets the results that were not used for longest, half of them at a time so that this is rare.
  void forget_old(std::size_t in_use) {
    if (ledgers.size() <= in_use + kSpareResults) return;
    const std::size_t oldest_kept = clock > kSpareResults / 2 ? clock - kSpareResults / 2 : 0;
    for (auto entry = ledgers.begin(); entry != ledgers.end();) {
      entry = entry->second.last_used < oldest_kept ? ledgers.erase(entry) : std::next(entry);
    }
  }
};

Calculator::Calculator() : memory_(std::make_unique<Memory>()) {}
Calculator::~Calculator() = default;
Calculator::Calculator(Calculator&&) noexcept = default;
Calculator& Calculator::operator=(Calculator&&) noexcept = default;

Results Calculator::compute(const Worksheet& sheet) {
  Memory& memory = *memory_;
  ++memory.clock;
  if (memory.overlay_of != sheet.typed_bonds.handle()) {
    memory.overlay_of = sheet.typed_bonds.handle();
    memory.overlay = read_typed_bonds(*sheet.typed_bonds);
    memory.sets.clear();
  }
  Results results;
  results.errors = memory.overlay.errors;
  results.reactions.reserve(sheet.reactions.size());
  for (const Shared<ReactionSheet>& reaction : sheet.reactions) {
    LedgerKey key{reaction->equation, reaction->basis, reaction->bond_set, reaction->pinned_route,
                  memory.overlay_of.get()};
    Remembered& entry = memory.ledgers[std::move(key)];
    if (entry.result == nullptr) {
      entry.result = std::make_shared<const ReactionResult>(memory.compute(*reaction));
      entry.typed_bonds = memory.overlay_of;
    }
    entry.last_used = memory.clock;
    results.reactions.push_back(entry.result);
  }
  memory.forget_old(sheet.reactions.size());
  return results;
}

}  // namespace heatledger::document
