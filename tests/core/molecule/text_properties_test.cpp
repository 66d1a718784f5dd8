// Properties of formulas, condensed formulas, equations and balancing on random input (RapidCheck).
#include <gtest/gtest.h>
#include <rapidcheck/gtest.h>

#include <algorithm>
#include <array>
#include <cstdlib>
#include <map>
#include <numeric>
#include <string>
#include <utility>
#include <vector>

#include "core/molecule/equation.hpp"
#include "core/molecule/formula.hpp"
#include "core/molecule/line_formula.hpp"
#include "core/molecule/smiles.hpp"
#include "core/molecule/stoichiometry.hpp"

namespace heatledger::molecule {
namespace {

/// The same cases in every run; RC_PARAMS in the environment overrides it. RapidCheck prints what it uses.
[[maybe_unused]] const int seeded = setenv("RC_PARAMS", "seed=20240229 max_success=1000", 0);

using Counts = std::map<int, double>;

/// A formula text with nested brackets, and what it holds, counted while it is written.
std::pair<std::string, Counts> random_formula(int depth) {
  const std::array<std::pair<const char*, int>, 8> elements = {
      {{"C", 6}, {"H", 1}, {"N", 7}, {"O", 8}, {"Cl", 17}, {"Co", 27}, {"S", 16}, {"D", 2001}}};
  std::pair<std::string, Counts> result;
  const int parts = *rc::gen::inRange(1, 5);
  for (int i = 0; i < parts; ++i) {
    const int count = *rc::gen::inRange(1, 13);
    const std::string number = count == 1 ? "" : std::to_string(count);
    if (depth > 0 && *rc::gen::inRange(0, 3) == 0) {
      const auto [text, counts] = random_formula(depth - 1);
      result.first += *rc::gen::element<std::string>("(", "[") + text;
      result.first += result.first[result.first.size() - text.size() - 1] == '(' ? ")" : "]";
      result.first += number;
      for (const auto& [key, atoms] : counts) result.second[key] += atoms * count;
    } else {
      const auto& [symbol, key] = elements[static_cast<std::size_t>(*rc::gen::inRange(0, 8))];
      result.first += symbol + number;
      result.second[key] += count;
    }
  }
  return result;
}

RC_GTEST_PROP(FormulaProperties, CountsNestedBracketsAsTheyAreWritten, ()) {
  const auto [text, counts] = random_formula(4);
  const Result<Composition> read = parse_formula(text);
  RC_LOG() << text;
  RC_ASSERT(read.ok());
  RC_ASSERT(read->atoms == counts);
  RC_ASSERT(*parse_formula(hill_formula(*read)) == *read);
  RC_ASSERT(*parse_formula(display_formula(*read)) == *read);
  RC_ASSERT(*parse_formula(typeset_formula(text)) == *read);
}

/// A random saturated branch as condensed text and as SMILES, both from the same choices.
std::pair<std::string, std::string> random_branch(int depth) {
  if (depth == 0 || *rc::gen::inRange(0, 3) == 0) {
    const std::array<std::pair<std::string, std::string>, 10> ends = {{{"CH3", "C"},
                                                                       {"OH", "O"},
                                                                       {"NH2", "N"},
                                                                       {"Cl", "Cl"},
                                                                       {"COOH", "C(=O)O"},
                                                                       {"CN", "C#N"},
                                                                       {"C6H5", "c1ccccc1"},
                                                                       {"NO2", "[N+](=O)[O-]"},
                                                                       {"CHO", "C=O"},
                                                                       {"SO3H", "S(=O)(=O)O"}}};
    return ends[static_cast<std::size_t>(*rc::gen::inRange(0, 10))];
  }
  const auto [first, first_smiles] = random_branch(depth - 1);
  switch (*rc::gen::inRange(0, 5)) {
    case 0:
      return {"CH2" + first, "C" + first_smiles};
    case 1:
      return {"COCH2" + first, "C(=O)C" + first_smiles};
    case 2:
      return {"OCH2" + first, "OC" + first_smiles};
    case 3: {
      const auto [second, second_smiles] = random_branch(depth - 1);
      return {"CH(" + first + ")CH2" + second, "C(" + first_smiles + ")C" + second_smiles};
    }
    default: {
      const int links = *rc::gen::inRange(2, 5);
      std::string chain;
      for (int i = 0; i < links; ++i) chain += "C";
      return {"(CH2)" + std::to_string(links) + first, chain + first_smiles};
    }
  }
}

RC_GTEST_PROP(LineFormulaProperties, ReadsTheSameMoleculeAsSmiles, ()) {
  const auto [text, smiles] = random_branch(5);
  const std::string line = "CH3CH2" + text;
  RC_LOG() << line << "  CC" << smiles;
  const Result<Graph> condensed = parse_line_formula(line);
  const Result<Graph> written = parse_smiles("CC" + smiles);
  RC_ASSERT(written.ok());
  RC_ASSERT(condensed.ok());
  RC_ASSERT(canonical_smiles(*condensed) == canonical_smiles(*written));
  RC_ASSERT(*parse_formula(line) == composition(*condensed));
}

RC_GTEST_PROP(EquationProperties, ReadsBackWhatItWrote, ()) {
  const auto term = [] {
    const auto species =
        rc::gen::element<std::string>("H2", "2-propanol", "Na+", "SO4^2-", "\"CC(=O)O\"", "1,4-dioxane",
                                      "ethyl acetate", "iron(III) oxide", "C=C", "Fe+3", "(+)-limonene");
    const auto number = rc::gen::element<std::string>("", "2 ", "1/2 ", "0.5 ", "1 1/2 ", "\u00BD ", "12 ");
    const auto phase =
        rc::gen::element<std::string>("", "(g)", "(l)", " (s)", "(aq)", "(aq, 20 wt%)", "(diss)");
    return std::make_pair(*species, std::make_pair(*number, *phase));
  };
  std::vector<std::string> species;
  std::string text;
  const int left = *rc::gen::inRange(1, 4), right = *rc::gen::inRange(1, 4);
  for (int i = 0; i < left + right; ++i) {
    const auto [name, around] = term();
    if (i > 0) text += i == left ? *rc::gen::element<std::string>(" -> ", " = ", " \u2192 ", " <=> ") : " + ";
    text += around.first + name + around.second;
    species.push_back(name[0] == '"' ? name.substr(1, name.size() - 2) : name);
  }
  RC_LOG() << text;
  const Result<EquationText> read = parse_equation(text);
  RC_ASSERT(read.ok());
  RC_ASSERT(read->reactants.size() == static_cast<std::size_t>(left));
  RC_ASSERT(read->products.size() == static_cast<std::size_t>(right));
  for (int i = 0; i < left + right; ++i) {
    const Term& one = i < left ? read->reactants[static_cast<std::size_t>(i)]
                               : read->products[static_cast<std::size_t>(i - left)];
    RC_ASSERT(one.species == species[static_cast<std::size_t>(i)]);
  }
}

Composition random_composition() {
  Composition result;
  for (const int element : {1, 6, 8}) {
    const int count = *rc::gen::inRange(0, 4);
    if (count > 0) result.atoms[element] = count;
  }
  if (result.atoms.empty()) result.atoms[1] = 2;
  return result;
}

/// Whether any coefficients from 0 to `most`, not all zero, balance: by trying them all.
bool balances_somehow(const std::vector<Composition>& left, const std::vector<Composition>& right, int most) {
  const std::size_t count = left.size() + right.size();
  std::vector<int> numbers(count, 0);
  for (;;) {
    std::size_t at = 0;
    while (at < count && numbers[at] == most) numbers[at++] = 0;
    if (at == count) return false;
    ++numbers[at];
    std::map<int, double> sum;
    for (std::size_t i = 0; i < count; ++i) {
      const Composition& one = i < left.size() ? left[i] : right[i - left.size()];
      for (const auto& [key, atoms] : one.atoms) sum[key] += (i < left.size() ? 1 : -1) * numbers[i] * atoms;
    }
    if (std::all_of(sum.begin(), sum.end(), [](const auto& entry) { return entry.second == 0; })) return true;
  }
}

RC_GTEST_PROP(BalanceProperties, FindsWaysThatBalanceAndMissesNone, ()) {
  std::vector<Composition> left, right;
  for (int i = *rc::gen::inRange(1, 3); i > 0; --i) left.push_back(random_composition());
  for (int i = *rc::gen::inRange(1, 4); i > 0; --i) right.push_back(random_composition());
  const auto ways = balance(left, right);
  // Compositions of three atoms at most balance with small numbers where they do; 4^5 trials stay quick.
  const bool somehow = balances_somehow(left, right, 3);
  if (!ways) {
    RC_ASSERT(ways.error().code == "balance.impossible" || ways.error().code == "balance.missing_element");
    if (ways.error().code == "balance.impossible") RC_ASSERT(!somehow);
    return;
  }
  RC_ASSERT(!ways->empty());
  for (const std::vector<std::int64_t>& way : *ways) {
    std::vector<std::pair<double, Composition>> a, b;
    std::int64_t divisor = 0;
    for (std::size_t i = 0; i < way.size(); ++i) {
      RC_ASSERT(way[i] >= 0);
      divisor = std::gcd(divisor, way[i]);
      (i < left.size() ? a : b)
          .emplace_back(static_cast<double>(way[i]), i < left.size() ? left[i] : right[i - left.size()]);
    }
    RC_ASSERT(divisor == 1);
    RC_ASSERT(check_balance(a, b).balanced);
  }
}

}  // namespace
}  // namespace heatledger::molecule
