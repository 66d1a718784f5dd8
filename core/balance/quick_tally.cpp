#include "core/balance/quick_tally.hpp"

#include <array>
#include <string>
#include <unordered_map>
#include <utility>
#include <vector>

#include "core/balance/figures.hpp"
#include "core/balance/proposals.hpp"
#include "core/base/check.hpp"

namespace heatledger::balance {
namespace {

using uncertainty::Figure;
using uncertainty::Quantity;

/// A term of an equation with everything that a sum needs.
struct KnownTerm {
  double coefficient = 1;
  SpeciesFigures figures;
  PricedSpecies priced;
  std::vector<std::pair<int, double>> atoms;  ///< times the coefficient; charge under key -1
  bool whole = false;     ///< all counts are whole numbers, so that sums of them are exact
  std::size_t parts = 0;  ///< of the ± of all figures: what the term takes in memory
};

std::size_t parts_of(const KnownTerm& term) {
  const SpeciesFigures& figures = term.figures;
  std::size_t parts = 0;
  for (const std::optional<Quantity>* figure :
       {&term.priced.per_mole, &figures.to_phase, &figures.formation, &figures.formation_row,
        &figures.context, &figures.context_row}) {
    if (*figure) parts += (*figure)->parts().size();
  }
  return parts;
}

std::optional<Figure> figure_of(const std::optional<Quantity>& quantity) {
  if (!quantity) return std::nullopt;
  return quantity->figure();
}

struct TextHash {
  using is_transparent = void;
  std::size_t operator()(std::string_view text) const { return std::hash<std::string_view>{}(text); }
};
struct TextEqual {
  using is_transparent = void;
  bool operator()(std::string_view a, std::string_view b) const { return a == b; }
};
using Terms = std::unordered_map<std::string, std::shared_ptr<const KnownTerm>, TextHash, TextEqual>;

struct Piece {
  std::string_view text;
  bool product = false;
};

/// Cuts at " + " and at arrows between blanks, as equations are nearly always written.
/// @return false when the text has another shape; the full reader decides then
bool cut(std::string_view text, std::vector<Piece>& pieces) {
  constexpr std::string_view kArrows[] = {"->", "=", "→", "<=>", "⇌"};
  pieces.clear();
  bool product = false, quoted = false;
  std::size_t start = 0;
  for (std::size_t i = 0; i < text.size(); ++i) {
    if (text[i] == '"') quoted = !quoted;
    if (quoted || text[i] != ' ') continue;
    const std::size_t end = text.find(' ', i + 1);
    if (end == std::string_view::npos) break;
    const std::string_view word = text.substr(i + 1, end - i - 1);
    bool arrow = false;
    for (const std::string_view known : kArrows) arrow = arrow || word == known;
    if (!arrow && word != "+") continue;
    if (arrow && product) return false;
    pieces.push_back({text.substr(start, i - start), product});
    product = product || arrow;
    start = end + 1;
    i = end;
  }
  if (quoted || !product) return false;
  pieces.push_back({text.substr(start), product});
  return true;
}

/// Whether whole counts of every element agree on both sides.
bool balanced_in_whole_numbers(const std::vector<const KnownTerm*>& terms, const std::vector<Piece>& pieces) {
  std::array<std::pair<int, double>, 16> sums;
  std::size_t used = 0;
  for (std::size_t i = 0; i < terms.size(); ++i) {
    if (!terms[i]->whole) return false;
    for (const auto& atom : terms[i]->atoms) {
      std::size_t at = 0;
      while (at < used && sums[at].first != atom.first) ++at;
      if (at == used) {
        if (used == sums.size()) return false;
        sums[used++] = {atom.first, 0.0};
      }
      sums[at].second += pieces[i].product ? -atom.second : atom.second;
    }
  }
  for (std::size_t i = 0; i < used; ++i) {
    if (sums[i].second != 0) return false;
  }
  return true;
}

}  // namespace

struct QuickTally::State {
  std::shared_ptr<const estimate::BondSet> set;
  ContextUse context = ContextUse::WhereNeeded;
  std::size_t capacity = 1;
  CachedSpecies species;
  Terms newer, older;
  std::size_t newer_parts = 0, older_parts = 0;
  std::vector<Piece> pieces;
  std::vector<const KnownTerm*> terms;
  std::vector<Entry> entries;

  const KnownTerm* find(std::string_view text) {
    if (const auto found = newer.find(text); found != newer.end()) return found->second.get();
    const auto found = older.find(text);
    if (found == older.end()) return nullptr;
    std::shared_ptr<const KnownTerm> term = found->second;
    if (full()) return term.get();  // renewing would drop the half that this equation is read from
    newer_parts += term->parts;
    return newer.emplace(std::string(text), std::move(term)).first->second.get();
  }

  bool full() const { return newer.size() >= capacity || newer_parts >= QuickTally::most_parts; }

  void remember(std::string_view text, std::shared_ptr<const KnownTerm> term) {
    if (full()) {
      older = std::move(newer);
      newer.clear();
      older_parts = std::exchange(newer_parts, 0);
    }
    newer_parts += term->parts;
    newer.insert_or_assign(std::string(text), std::move(term));
  }

  QuickAnswer answer() {
    const BondSums bonds = bond_sums(entries);
    const OtherSums sums = other_sums(entries);
    QuickAnswer result;
    result.broken = figure_of(bonds.broken);
    result.formed = figure_of(bonds.formed);
    result.gas_298 = figure_of(bonds.gas_298);
    result.as_written = figure_of(bonds.as_written);
    result.formation_gas_298 = figure_of(sums.formation_gas_298);
    result.formation = figure_of(sums.formation_as_written);
    result.context_broken = figure_of(sums.context_broken);
    result.context_formed = figure_of(sums.context_formed);
    result.context_gas_298 = figure_of(sums.context_gas_298);
    result.context = figure_of(sums.context_as_written);
    if (result.formation) {
      result.taken = kFormationRoute;
    } else if (result.context) {
      result.taken = kContextRoute;
    } else if (result.as_written) {
      result.taken = kAverageRoute;
    }
    return result;
  }

  bool by_known_terms(std::string_view equation) {
    if (!cut(equation, pieces)) return false;
    terms.clear();
    entries.clear();
    for (const Piece& piece : pieces) {
      const KnownTerm* term = find(piece.text);
      if (term == nullptr) return false;
      terms.push_back(term);
      Entry entry;
      entry.coefficient = term->coefficient;
      entry.product = piece.product;
      entry.figures = &term->figures;
      entry.priced = &term->priced;
      entries.push_back(entry);
    }
    return balanced_in_whole_numbers(terms, pieces);
  }

  Result<QuickAnswer> by_full_reading(std::string_view equation) {
    Result<Reaction> read = read_reaction(equation, species);
    if (!read.ok()) return read.error();
    const Reaction& reaction = *read;
    if (reaction.checkable && !reaction.balance.balanced) return not_balanced(reaction);
    std::vector<std::shared_ptr<const KnownTerm>> known;
    entries.clear();
    for (const ReactionSpecies& entry : reaction.species) {
      auto term = std::make_shared<KnownTerm>();
      term->coefficient = entry.coefficient();
      term->figures = species_figures(*entry.species, entry.term, context);
      term->priced = price_species(*entry.species, entry.term, *set);
      term->parts = parts_of(*term);
      term->whole = entry.term.coefficient.denominator == 1 && entry.species->composition.has_value();
      if (entry.species->composition) {
        for (const auto& atom : entry.species->composition->atoms) {
          const double count = atom.second * term->coefficient;
          term->whole = term->whole && count == static_cast<double>(static_cast<long long>(count));
          term->atoms.emplace_back(atom.first, count);
        }
        if (entry.species->composition->charge != 0)
          term->atoms.emplace_back(-1, entry.species->composition->charge * term->coefficient);
      }
      Entry sum;
      sum.coefficient = term->coefficient;
      sum.product = entry.product;
      sum.figures = &term->figures;
      sum.priced = &term->priced;
      entries.push_back(sum);
      known.push_back(std::move(term));
    }
    const QuickAnswer result = answer();
    for (std::size_t i = 0; i < known.size(); ++i) {
      const molecule::Term& term = reaction.species[i].term;
      remember(equation.substr(term.offset, term.length), std::move(known[i]));
    }
    return result;
  }
};

QuickTally::QuickTally(std::shared_ptr<const estimate::BondSet> set, ContextUse context, std::size_t capacity)
    : state_(std::make_unique<State>()) {
  CHECK(set != nullptr && capacity > 0, "a quick tally has a bond set and a memory");
  state_->set = std::move(set);
  state_->context = context;
  state_->capacity = capacity;
}

QuickTally::~QuickTally() = default;

std::size_t QuickTally::remembered_parts() const {
  return state_->newer_parts + state_->older_parts;
}

Result<QuickAnswer> QuickTally::tally(std::string_view equation) {
  if (state_->by_known_terms(equation)) return state_->answer();
  return state_->by_full_reading(equation);
}

}  // namespace heatledger::balance
