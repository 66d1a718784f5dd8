#include "core/balance/proposals.hpp"

#include <algorithm>
#include <cmath>

#include "core/base/number_text.hpp"
#include "core/molecule/elements.hpp"

namespace heatledger::balance {
namespace {

using molecule::Composition;

/// A count without trailing zeros: "4", "2.5".
std::string count_text(double count) {
  return machine_number(count, 6);
}

std::string element_name(int key) {
  if (key < 0) return "charge";
  if (key == 2001) return "D";
  if (key == 3001) return "T";
  std::string name(molecule::symbol(key % 1000));
  if (key >= 1000) name = std::to_string(key / 1000) + name;
  return name;
}

std::string differences(const molecule::BalanceCheck& balance) {
  std::string text;
  for (const molecule::ElementBalance& e : balance.elements) {
    if (e.left == e.right) continue;
    text += (text.empty() ? "" : "; ") + element_name(e.key) + " " + count_text(e.left) + " on the left, " +
            count_text(e.right) + " on the right";
  }
  return text;
}

/// When all that is missing stands on one side, its formula: what has probably been forgotten.
std::string forgotten(const molecule::BalanceCheck& balance) {
  Composition missing;
  int side = 0;  // +1: missing on the right
  for (const molecule::ElementBalance& e : balance.elements) {
    const double gap = e.left - e.right;
    if (gap == 0) continue;
    if (e.key < 0) return {};
    const int this_side = gap > 0 ? 1 : -1;
    if (side != 0 && side != this_side) return {};
    side = this_side;
    missing.atoms[e.key] = std::fabs(gap);
  }
  if (side == 0) return {};
  return molecule::display_formula(missing) + " is missing on the " + (side > 0 ? "right" : "left");
}

molecule::Coefficient whole(std::int64_t count) {
  molecule::Coefficient coefficient;
  coefficient.numerator = count;
  if (count != 1) coefficient.typed = std::to_string(count);
  return coefficient;
}

/// The same species with other coefficients; zero leaves one out, a negative one changes sides.
std::string with_coefficients(const Reaction& reaction, const std::vector<std::int64_t>& counts) {
  Reaction proposal;
  proposal.reversible = reaction.reversible;
  for (const bool product : {false, true}) {
    for (std::size_t i = 0; i < reaction.species.size(); ++i) {
      if (counts[i] == 0) continue;
      ReactionSpecies entry = reaction.species[i];
      if (counts[i] < 0) entry.product = !entry.product;
      if (entry.product != product) continue;
      entry.term.coefficient = whole(counts[i] < 0 ? -counts[i] : counts[i]);
      proposal.species.push_back(std::move(entry));
    }
  }
  return plain_equation(proposal);
}

}  // namespace

void explain_imbalance(Reaction& reaction) {
  reaction.why_unbalanced = differences(reaction.balance);
  std::vector<Composition> left, right;
  for (const ReactionSpecies& entry : reaction.species) {
    (entry.product ? right : left).push_back(*entry.species->composition);
  }
  const Result<std::vector<std::vector<std::int64_t>>> ways = molecule::balance(left, right);
  if (ways.ok()) {
    for (const std::vector<std::int64_t>& counts : *ways)
      reaction.proposals.push_back(with_coefficients(reaction, counts));
    return;
  }
  if (const std::string what = forgotten(reaction.balance); !what.empty())
    reaction.why_unbalanced += "; " + what;
  reaction.why_unbalanced += ". " + ways.error().message;
}

Error not_balanced(const Reaction& reaction) {
  Error error{"ledger.not_balanced", "The equation does not balance: " + reaction.why_unbalanced + ".",
              "equation", ""};
  if (error.message.size() > 2 && error.message.compare(error.message.size() - 2, 2, "..") == 0)
    error.message.pop_back();
  if (reaction.proposals.size() == 1) {
    error.hint = "Balanced it reads: " + reaction.proposals[0];
  } else if (!reaction.proposals.empty()) {
    error.hint =
        "It can be balanced in independent ways; write the one that is meant, or each as a reaction of its "
        "own: ";
    for (std::size_t i = 0; i < reaction.proposals.size(); ++i)
      error.hint += (i == 0 ? "" : "; ") + reaction.proposals[i];
  } else {
    error.hint = "Write the species that is missing.";
  }
  return error;
}

}  // namespace heatledger::balance
