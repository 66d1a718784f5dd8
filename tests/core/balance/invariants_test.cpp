// Identities that hold for every equation.
#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <ostream>

#include "tests/core/balance/sheets.hpp"

namespace heatledger::balance {
namespace {

using test_sheets::kj;
using test_sheets::ledger;

struct Sides {
  const char* name;
  std::vector<const char*> left, right;
  const char* set = "";
};

/// Keeps the names of the tests free of memory addresses.
void PrintTo(const Sides& sides, std::ostream* out) {
  *out << sides.name;
}

std::string join(const std::vector<std::string>& terms) {
  std::string text;
  for (const std::string& term : terms) text += (text.empty() ? "" : " + ") + term;
  return text;
}

std::string equation(const std::vector<const char*>& left, const std::vector<const char*>& right) {
  return join({left.begin(), left.end()}) + " -> " + join({right.begin(), right.end()});
}

const Sides kSides[] = {
    {"HydrogenationOfNitrobenzene", {"nitrobenzene(l)", "3 H2(g)"}, {"aniline(l)", "2 water(l)"}},
    {"BurningOfMethane", {"methane(g)", "2 O2(g)"}, {"CO2(g)", "2 water(g)"}},
    {"Esterification", {"acetic acid(l)", "ethanol(l)"}, {"ethyl acetate(l)", "water(l)"}},
    {"ChlorinationOfToluene", {"toluene(l)", "chlorine(g)"}, {"benzyl chloride(l)", "hydrogen chloride(g)"}},
    {"WaterGas", {"graphite(s)", "water(g)"}, {"CO(g)", "H2(g)"}},
    {"Claus",
     {"2 hydrogen sulfide(g)", "SO2(g)"},
     {"3 sulfur(s)", "2 water(g)"},
     "huheey"},  // the primary set has no S=O
    {"NitricOxide", {"2 NO(g)", "O2(g)"}, {"2 NO2(g)"}},
};

class Invariant : public testing::TestWithParam<Sides> {};

// 1e-6 J: sums of some ten terms of 1e7 J, rounded differently when the order changes (1e7 × 2⁻⁵² × 10).
constexpr double kOrderOfSum = 1e-6;

void expect_equal(const std::optional<uncertainty::Quantity>& a,
                  const std::optional<uncertainty::Quantity>& b, double factor) {
  ASSERT_EQ(a.has_value(), b.has_value());
  if (!a) return;
  EXPECT_NEAR(a->value(), factor * b->value(), kOrderOfSum * std::max(1.0, std::fabs(factor)));
  EXPECT_NEAR(a->u95(), std::fabs(factor) * b->u95(), kOrderOfSum * std::max(1.0, std::fabs(factor)));
}

void expect_scaled(const Ledger& a, const Ledger& b, double factor) {
  expect_equal(a.gas_298, b.gas_298, factor);
  expect_equal(a.as_written, b.as_written, factor);
  for (const Route& route : a.routes) {
    const Route* other = find_route(b, route.name);
    ASSERT_NE(other, nullptr);
    expect_equal(route.gas_298, other->gas_298, factor);
    expect_equal(route.as_written, other->as_written, factor);
  }
}

TEST_P(Invariant, ReversalChangesTheSignOnly) {
  const Sides& s = GetParam();
  const Ledger forward = ledger(equation(s.left, s.right), "", s.set),
               backward = ledger(equation(s.right, s.left), "", s.set);
  expect_scaled(backward, forward, -1);
  expect_equal(backward.broken, forward.formed, 1);
}

TEST_P(Invariant, OrderOfSpeciesIsIrrelevant) {
  const Sides& s = GetParam();
  Sides turned = s;
  std::reverse(turned.left.begin(), turned.left.end());
  std::reverse(turned.right.begin(), turned.right.end());
  expect_scaled(ledger(equation(turned.left, turned.right), "", s.set),
                ledger(equation(s.left, s.right), "", s.set), 1);
}

TEST_P(Invariant, CoefficientsScaleTheFigures) {
  const Sides& s = GetParam();
  const auto doubled = [](const std::vector<const char*>& terms) {
    std::vector<std::string> result;
    for (const std::string term : terms) {
      const bool counted = term.size() > 1 && term[0] >= '1' && term[0] <= '9' && term[1] == ' ';
      result.push_back(counted ? std::to_string(2 * (term[0] - '0')) + term.substr(1) : "2 " + term);
    }
    return join(result);
  };
  expect_scaled(ledger(doubled(s.left) + " -> " + doubled(s.right), "", s.set),
                ledger(equation(s.left, s.right), "", s.set), 2);
}

TEST_P(Invariant, NothingHappensWhenBothSidesAreTheSame) {
  const Sides& s = GetParam();
  const Ledger sheet = ledger(equation(s.left, s.left), "", s.set);
  for (const auto* figure : {&sheet.gas_298, &sheet.as_written}) {
    ASSERT_TRUE(figure->has_value());
    EXPECT_EQ((*figure)->value(), 0);
    EXPECT_EQ((*figure)->u95(), 0);
  }
}

TEST_P(Invariant, CatalystOnBothSidesHasNoEffect) {
  Sides with = GetParam();
  const Ledger without = ledger(equation(with.left, with.right), "", with.set);
  with.left.push_back("ammonia(g)");
  with.right.push_back("ammonia(g)");
  expect_scaled(ledger(equation(with.left, with.right), "", with.set), without, 1);
}

TEST_P(Invariant, BasesAgreeWithEachOther) {
  const Sides& s = GetParam();
  const std::string text = equation(s.left, s.right);
  const Ledger written = ledger(text, "", s.set);
  ASSERT_TRUE(written.gas_298.has_value());
  for (const BasisChoice& choice : basis_choices(*written.reaction)) {
    const Ledger based = ledger(text, choice.name, s.set);
    const double figure = on_basis(*based.gas_298, based.basis).value();
    double amount = 1;  // mol or kg that the figure is per
    if (based.basis.kind == Basis::Kind::KilogramOfReactants) {
      amount = 0;
      for (const ReactionSpecies& entry : based.reaction->species)
        amount += entry.product ? 0 : entry.coefficient() * entry.species->molar_mass;
    } else if (based.basis.kind != Basis::Kind::AsWritten) {
      const ReactionSpecies& entry = based.reaction->species[based.basis.species];
      amount =
          entry.coefficient() * (based.basis.kind == Basis::Kind::KilogramOf ? entry.species->molar_mass : 1);
    }
    EXPECT_NEAR(figure * amount, written.gas_298->value(), kOrderOfSum) << choice.text;
  }
}

TEST_P(Invariant, LinesAddUpToTheRowAndRowsToTheTotals) {
  const Sides& s = GetParam();
  const Ledger sheet = ledger(equation(s.left, s.right), "", s.set);
  ASSERT_TRUE(sheet.as_written.has_value());
  double broken = 0, formed = 0;
  for (const LedgerRow& row : sheet.rows) {
    const ReactionSpecies& entry = sheet.reaction->species[row.species];
    if (row.route == RowRoute::Bonds) {
      double sum = 0;
      for (const BondLine& line : row.lines) sum += line.per_mole;
      EXPECT_NEAR(sum, row.per_mole->value(), kOrderOfSum);
    }
    (entry.product ? formed : broken) += row.in_equation->value();
  }
  EXPECT_NEAR(broken, sheet.broken->value(), kOrderOfSum);
  EXPECT_NEAR(formed, sheet.formed->value(), kOrderOfSum);
  double written = sheet.gas_298->value();
  for (const Correction& correction : sheet.corrections) written += correction.value->value();
  EXPECT_NEAR(written, sheet.as_written->value(), kOrderOfSum);
}

INSTANTIATE_TEST_SUITE_P(Equations, Invariant, testing::ValuesIn(kSides),
                         [](const auto& row) { return std::string(row.param.name); });

TEST(Splitting, AddsUp) {
  const Ledger first = ledger("methane(g) + H2O(g) -> CO(g) + 3 H2(g)"),
               second = ledger("CO(g) + H2O(g) -> CO2(g) + H2(g)"),
               whole = ledger("methane(g) + 2 H2O(g) -> CO2(g) + 4 H2(g)");
  uncertainty::Quantity sum = *first.gas_298;
  sum.add(*second.gas_298);
  EXPECT_NEAR(sum.value(), whole.gas_298->value(), kOrderOfSum);
  EXPECT_NEAR(sum.u95(), whole.gas_298->u95(),
              kOrderOfSum);  // carbon monoxide stands on both sides and cancels
  uncertainty::Quantity formation = *find_route(first, kFormationRoute)->as_written;
  formation.add(*find_route(second, kFormationRoute)->as_written);
  EXPECT_NEAR(formation.value(), find_route(whole, kFormationRoute)->as_written->value(), kOrderOfSum);
  EXPECT_NEAR(formation.u95(), find_route(whole, kFormationRoute)->as_written->u95(), kOrderOfSum);
}

}  // namespace
}  // namespace heatledger::balance
