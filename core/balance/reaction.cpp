// Equation text to a Reaction: species resolved, balance checked, proposals where it does not balance.
#include "core/balance/reaction.hpp"

#include <cmath>

#include "core/balance/proposals.hpp"
#include "core/base/number_text.hpp"

namespace heatledger::balance {
namespace {

using molecule::EquationText;
using molecule::Term;

/// Moves an error inside a species text to its place in the whole equation.
Error placed(Error error, std::string_view equation, const Term& term) {
  std::size_t start = equation.find(term.species, term.offset);
  if (start == std::string_view::npos) start = term.offset;
  std::size_t inside = 0;
  constexpr std::string_view kOffset = "offset ";
  if (error.where.compare(0, kOffset.size(), kOffset) == 0) {
    if (const std::optional<double> number =
            parse_number(std::string_view(error.where).substr(kOffset.size()))) {
      inside = static_cast<std::size_t>(*number);
    }
  }
  error.where = "offset " + std::to_string(start + inside);
  return error;
}

Status add_side(std::vector<Term>& terms, bool product, SpeciesSource& source, Reaction& reaction) {
  for (Term& term : terms) {
    Result<std::shared_ptr<const facts::Species>> read = source.species(term.species, term.quoted);
    if (!read.ok()) return placed(read.error(), reaction.text, term);
    ReactionSpecies entry;
    entry.species = std::move(read).value();
    entry.product = product;
    if (!entry.species->composition) reaction.checkable = false;
    entry.term = std::move(term);
    reaction.species.push_back(std::move(entry));
  }
  return success();
}

void check(Reaction& reaction) {
  std::vector<std::pair<double, molecule::Composition>> left, right;
  for (const ReactionSpecies& entry : reaction.species) {
    (entry.product ? right : left).emplace_back(entry.coefficient(), *entry.species->composition);
  }
  reaction.balance = molecule::check_balance(left, right);
}

}  // namespace

Result<Reaction> read_reaction(std::string_view text, SpeciesSource& source) {
  Result<EquationText> read = molecule::parse_equation(text);
  if (!read.ok()) return read.error();
  EquationText equation = std::move(read).value();
  Reaction reaction;
  reaction.text = text;
  reaction.reversible = equation.reversible;
  reaction.species.reserve(equation.reactants.size() + equation.products.size());
  if (Status status = add_side(equation.reactants, false, source, reaction); !status.ok())
    return status.error();
  if (Status status = add_side(equation.products, true, source, reaction); !status.ok())
    return status.error();
  if (reaction.checkable) {
    check(reaction);
    if (!reaction.balance.balanced) explain_imbalance(reaction);
  }
  return reaction;
}

}  // namespace heatledger::balance
