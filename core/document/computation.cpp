#include "core/document/computation.hpp"

#include <list>
#include <map>
#include <tuple>
#include <utility>

#include "core/balance/measured.hpp"
#include "core/document/observations.hpp"
#include "core/document/typed_bonds.hpp"
#include "core/document/typed_conditions.hpp"

namespace heatledger::document {
namespace {

/// Remembered results beyond those on the sheet: enough for undo and redo over the last edits without
/// recomputing.
constexpr std::size_t kSpareResults = 512;

/// The inputs of one ledger; typed bonds, species and observations enter by identity.
struct LedgerKey {
  std::string texts;
  const TypedBonds* typed_bonds = nullptr;
  const SheetLibrary* library = nullptr;
  const estimate::Observations* observations = nullptr;
  const NamedQuantities* quantities = nullptr;

  friend bool operator<(const LedgerKey& a, const LedgerKey& b) {
    // Identities first: they tell nearly all keys apart without a look at the texts.
    return std::tie(a.typed_bonds, a.library, a.observations, a.quantities, a.texts) <
           std::tie(b.typed_bonds, b.library, b.observations, b.quantities, b.texts);
  }
};

/// Every text of a reaction that its ledger depends on.
std::string texts_of(const ReactionSheet& sheet) {
  std::string out;
  const TypedHeat& heat = sheet.measured;
  for (const std::string* text :
       {&sheet.equation, &sheet.basis, &sheet.bond_set, &sheet.pinned_route, &sheet.reactants_at,
        &sheet.products_at, &sheet.pressure, &heat.value, &heat.per, &heat.at, &heat.medium, &heat.includes,
        &heat.source, &heat.from}) {
    out += *text;
    out += '\0';
  }
  // A measured heat is a source of error of its own in each reaction.
  if (!heat.value.empty()) out += sheet.id;
  return out;
}

struct Remembered {
  std::shared_ptr<const ReactionResult> result;
  std::shared_ptr<const void> typed_bonds, observations,
      quantities;  ///< keep the identities in the key from being used again
  std::list<const LedgerKey*>::iterator used;
};

/// Results by their inputs; those not used for longest are let go, a few with each edit.
class Remembrance {
 public:
  /// The entry of a key, from now on the one used last; without a result when it is new.
  Remembered& at(LedgerKey key) {
    const auto found = entries_.try_emplace(std::move(key));
    Remembered& entry = found.first->second;
    if (found.second) {
      entry.used = by_use_.insert(by_use_.begin(), &found.first->first);
    } else {
      by_use_.splice(by_use_.begin(), by_use_, entry.used);
    }
    return entry;
  }

  void keep_at_most(std::size_t count) {
    while (by_use_.size() > count) {
      entries_.erase(entries_.find(*by_use_.back()));
      by_use_.pop_back();
    }
  }

 private:
  std::map<LedgerKey, Remembered> entries_;
  std::list<const LedgerKey*> by_use_;  ///< latest first
};

using SetResult = Result<std::shared_ptr<const estimate::BondSet>>;

SetResult build_set(const std::string& id, const ReadBonds& overlay) {
  const std::string name = id.empty() ? estimate::BondSet::names().front() : id;
  Result<estimate::BondSet> published = estimate::BondSet::published(name);
  if (!published) return published.error();
  for (const estimate::BondValue& value : overlay.values) published->lay_over(value);
  return std::make_shared<const estimate::BondSet>(std::move(published).value());
}

}  // namespace

struct Calculator::Memory {
  StepCalculator steps;
  std::map<std::string, Result<std::shared_ptr<const balance::Reaction>>> equations;
  Remembrance ledgers;
  std::map<std::string, std::shared_ptr<const balance::Background>> backgrounds;  ///< latest, by reaction id
  std::map<std::string, std::shared_ptr<const estimate::Measurement>> measurements;  ///< null: says nothing
  ObservationStore observations;
  std::shared_ptr<const TypedBonds> overlay_of;  ///< what `overlay` and `sets` were made from
  ReadBonds overlay;
  std::shared_ptr<const TypedFigures> library_of;  ///< what `library` was made from
  std::shared_ptr<SheetLibrary> library;
  std::vector<estimate::Measurement> measured_species;
  std::shared_ptr<const NamedQuantities> quantities_of;  ///< what `quantities` was read from
  std::shared_ptr<const ReadQuantities> quantities;
  std::map<std::string, SetResult> sets;

  const Result<std::shared_ptr<const balance::Reaction>>& equation(const std::string& text) {
    const auto found = equations.find(text);
    if (found != equations.end()) return found->second;
    if (equations.size() > 2 * kSpareResults) equations.clear();
    Result<balance::Reaction> read = balance::read_reaction(text, *library);
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

  void take_over(const Worksheet& sheet) {
    if (overlay_of != sheet.typed_bonds.handle()) {
      overlay_of = sheet.typed_bonds.handle();
      overlay = read_typed_bonds(*sheet.typed_bonds);
      sets.clear();
    }
    if (library_of != sheet.typed_figures.handle()) {
      library_of = sheet.typed_figures.handle();
      library = std::make_shared<SheetLibrary>(*sheet.typed_figures);
      measured_species = observations_of(*library);
      equations.clear();
      measurements.clear();
    }
    if (quantities_of != sheet.quantities.handle() || quantities == nullptr) {
      quantities_of = sheet.quantities.handle();
      quantities = std::make_shared<const ReadQuantities>(read_quantities(*sheet.quantities));
      measurements.clear();
    }
  }

  /// What the measured heat of a reaction says of other estimates; null where it says nothing.
  std::shared_ptr<const estimate::Measurement> measurement(const ReactionSheet& sheet) {
    if (sheet.measured.value.empty()) return nullptr;
    const std::string key = texts_of(sheet);
    const auto found = measurements.find(key);
    if (found != measurements.end()) return found->second;
    if (measurements.size() > kSpareResults) measurements.clear();
    std::shared_ptr<const estimate::Measurement> said;
    const auto& reaction = equation(sheet.equation);
    const SetResult& primary = set(std::string());
    if (reaction.ok() && primary.ok()) {
      balance::LedgerOptions options;
      options.set = *primary;
      options.measured = read_conditions(sheet, quantities->names).measured;
      const Result<balance::Ledger> ledger = balance::make_ledger(*reaction, options);
      if (ledger.ok()) {
        Result<estimate::Measurement> one = balance::observation_of(*ledger);
        if (one.ok()) said = std::make_shared<const estimate::Measurement>(std::move(one).value());
      }
    }
    return measurements.emplace(key, std::move(said)).first->second;
  }

  std::shared_ptr<const estimate::Observations> observe(const Worksheet& sheet) {
    std::vector<estimate::Measurement> list = measured_species;
    for (const Shared<ReactionSheet>& reaction : sheet.reactions) {
      if (const auto one = measurement(*reaction)) list.push_back(*one);
    }
    return observations.of(list);
  }

  ReactionResult compute(const ReactionSheet& sheet,
                         const std::shared_ptr<const estimate::Observations>& observed) {
    ReactionResult result;
    result.library = library;
    if (sheet.equation.find_first_not_of(" \t\r\n") == std::string::npos) return result;
    const auto& reaction = equation(sheet.equation);
    if (!reaction) {
      result.error = reaction.error();
      return result;
    }
    result.reaction = *reaction;
    balance::LedgerOptions options;
    options.context = balance::ContextUse::Always;
    options.context_rows = sheet.bond_set == kContextSet;
    options.observations = observed;
    std::shared_ptr<const balance::Background>& background = backgrounds[sheet.id];
    options.background = background;
    const SetResult* chosen = &set(options.context_rows ? std::string() : sheet.bond_set);
    if (!*chosen) {
      result.option_errors.push_back(chosen->error());
      result.option_errors.back().where = "bond_set";
      chosen = &set(std::string());
    }
    if (!*chosen) {
      result.error = chosen->error();
      return result;
    }
    options.set = **chosen;
    options.basis = sheet.basis;
    options.pinned_route = sheet.pinned_route;
    Conditions conditions = read_conditions(sheet, quantities->names);
    options.reactants_at = conditions.reactants_at;
    options.products_at = conditions.products_at;
    options.pressure = conditions.pressure;
    options.measured = std::move(conditions.measured);
    for (Error& error : conditions.errors) result.option_errors.push_back(std::move(error));
    Result<balance::Ledger> ledger = balance::make_ledger(result.reaction, options);
    // An option that cannot be followed is reported beside a ledger on the default, not instead of one.
    for (const char* field : {"basis", "pinned_route", "measured.per"}) {
      if (ledger.ok() || ledger.error().where != field) continue;
      result.option_errors.push_back(ledger.error());
      const std::string_view which = field;
      if (which == "basis") options.basis.clear();
      if (which == "pinned_route") options.pinned_route.clear();
      if (which == "measured.per") options.measured.reset();
      ledger = balance::make_ledger(result.reaction, options);
    }
    if (!ledger) {
      result.error = ledger.error();
      if (!result.reaction->balance.balanced) {
        result.rows = std::make_shared<const balance::Ledger>(balance::ledger_rows(result.reaction, options));
      }
      return result;
    }
    background = ledger->background;
    result.ledger = std::make_shared<const balance::Ledger>(std::move(ledger).value());
    return result;
  }
};

Calculator::Calculator() : memory_(std::make_unique<Memory>()) {}
Calculator::~Calculator() = default;
Calculator::Calculator(Calculator&&) noexcept = default;
Calculator& Calculator::operator=(Calculator&&) noexcept = default;

Results Calculator::compute(const Worksheet& sheet) {
  Memory& memory = *memory_;
  memory.take_over(sheet);
  const std::shared_ptr<const estimate::Observations> observed = memory.observe(sheet);
  Results results;
  results.library = memory.library;
  results.errors = memory.overlay.errors;
  results.errors.insert(results.errors.end(), memory.library->errors().begin(),
                        memory.library->errors().end());
  results.errors.insert(results.errors.end(), memory.quantities->errors.begin(),
                        memory.quantities->errors.end());
  results.quantities = memory.quantities;
  results.exact = memory.overlay.exact;
  for (std::size_t i = 0; i < memory.library->figures().size(); ++i) {
    if (memory.library->figures()[i].exact)
      results.exact.push_back("species[" + std::to_string(i) + "].value");
  }
  results.reactions.reserve(sheet.reactions.size());
  for (std::size_t i = 0; i < sheet.reactions.size(); ++i) {
    const Shared<ReactionSheet>& reaction = sheet.reactions[i];
    LedgerKey key{texts_of(*reaction), memory.overlay_of.get(), memory.library.get(), observed.get(),
                  memory.quantities_of.get()};
    Remembered& entry = memory.ledgers.at(std::move(key));
    if (entry.result == nullptr) {
      entry.result = std::make_shared<const ReactionResult>(memory.compute(*reaction, observed));
      entry.typed_bonds = memory.overlay_of;
      entry.observations = observed;
      entry.quantities = memory.quantities_of;
    }
    if (!reaction->measured.value.empty() &&
        read_conditions(*reaction, memory.quantities->names).measured_exact)
      results.exact.push_back("reactions[" + std::to_string(i) + "].measured.value");
    results.reactions.push_back(entry.result);
  }
  memory.ledgers.keep_at_most(sheet.reactions.size() + kSpareResults);
  if (memory.backgrounds.size() > sheet.reactions.size() + kSpareResults) memory.backgrounds.clear();
  std::map<std::string, std::shared_ptr<const balance::Ledger>> ledgers;
  for (std::size_t i = 0; i < sheet.reactions.size() && !sheet.steps.empty(); ++i) {
    if (results.reactions[i]->ledger != nullptr)
      ledgers[sheet.reactions[i]->id] = results.reactions[i]->ledger;
  }
  results.steps = memory.steps.compute(sheet.steps, memory.library, ledgers, memory.quantities);
  return results;
}

}  // namespace heatledger::document
