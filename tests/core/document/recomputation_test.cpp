// What a calculator keeps between edits must not show: every figure, ± and word of a ledger is the one that a
// calculator without memory gives, over all example worksheets and the bench sheet's reactions under edits
// drawn at random.
#include <gtest/gtest.h>

#include <cstdio>

#include "core/document/computation.hpp"
#include "core/file/worksheet_file.hpp"
#include "tests/bench/twenty_reactions.hpp"
#include "tests/core/support/test_files.hpp"

namespace heatledger::document {
namespace {

using uncertainty::Quantity;

/// Every digit a double holds.
std::string exact(double value) {
  char text[40];
  std::snprintf(text, sizeof text, "%a", value);
  return text;
}

/// A ledger spelled out, so that two of them can be compared and a difference can be read.
class Spelling {
 public:
  void word(const std::string& text) { text_ += text + "\n"; }
  void words(const std::vector<std::string>& lines) {
    word(std::to_string(lines.size()) + " lines");
    for (const std::string& line : lines) word(line);
  }
  void quantity(const char* name, const std::optional<Quantity>& value) {
    if (!value) return word(std::string(name) + " none");
    std::string line = std::string(name) + " " + exact(value->value());
    for (const uncertainty::Part& part : value->parts())
      line += " " + std::to_string(part.source) + ":" + exact(part.u95);
    word(line);
  }
  void price(const estimate::BondValue* price, const estimate::BondSet& set) {
    if (price == nullptr) return word("no price");
    // The pointer must be into the set of this very ledger, which keeps it alive.
    const auto& values = set.values();
    EXPECT_TRUE(price >= values.data() && price < values.data() + values.size());
    word(exact(price->value) + " ± " + exact(price->u95) + " " + price->source + " " + price->remark);
  }
  void row(const balance::LedgerRow& row, const estimate::BondSet& set) {
    word("row " + std::to_string(row.species) + " route " + std::to_string(static_cast<int>(row.route)) +
         " phase " + std::to_string(static_cast<int>(row.phase)) + " missing " +
         std::to_string(row.missing.size()));
    for (const balance::BondLine& line : row.lines) {
      word(line.label + " " + line.count_text + " " + line.price_text + " " + exact(line.per_mole) + " " +
           line.source + " " + line.remark);
      price(line.price, set);
      if (line.second) price(line.second->price, set);
    }
    if (row.context != nullptr) {
      for (const estimate::ContextLine& line : row.context->lines)
        word(line.bond + " " + line.text + " " + exact(line.total));
    }
    quantity("per mole", row.per_mole);
    quantity("in equation", row.in_equation);
    quantity("table", row.table);
    word(row.table_source + " | " + row.remark);
    words(row.strains);
    words(row.working);
  }
  void corrections(const std::vector<balance::Correction>& list) {
    for (const balance::Correction& one : list) {
      word(one.what + " | " + one.source + " | " + one.why_not + " " + exact(one.times));
      quantity("correction", one.value);
      words(one.working);
    }
  }
  void ledger(const balance::Ledger& ledger) {
    for (const balance::LedgerRow& one : ledger.rows) row(one, *ledger.set);
    quantity("broken", ledger.broken);
    quantity("formed", ledger.formed);
    quantity("gas", ledger.gas_298);
    corrections(ledger.corrections);
    quantity("as written", ledger.as_written);
    for (const balance::Route& route : ledger.routes) {
      word(route.name + " " + route.why_not);
      quantity("gas", route.gas_298);
      quantity("as written", route.as_written);
      words(route.working);
    }
    word(ledger.taken + " " + ledger.basis.text + " " + exact(ledger.basis.factor));
    corrections(ledger.to_temperature);
    quantity("as run", ledger.as_run);
    words(ledger.notes);
    words(ledger.cautions);
  }
  const std::string& text() const { return text_; }

 private:
  std::string text_;
};

std::string spelled(const Results& results) {
  Spelling spelling;
  for (const auto& result : results.reactions) {
    if (result->error) spelling.word(result->error->message);
    for (const Error& error : result->option_errors) spelling.word(error.where + " " + error.message);
    if (result->shown() != nullptr) spelling.ledger(*result->shown());
  }
  return spelling.text();
}

/// Says where two long texts part first.
void expect_same(const std::string& kept, const std::string& fresh, const std::string& where) {
  if (kept == fresh) return;
  std::size_t at = 0;
  while (at < kept.size() && at < fresh.size() && kept[at] == fresh[at]) ++at;
  const std::size_t from = kept.rfind('\n', at == 0 ? 0 : at - 1) + 1;
  ADD_FAILURE() << where << "\nkept:  " << kept.substr(from, 300) << "\nfresh: " << fresh.substr(from, 300);
}

/// Park and Miller's generator: the same draws everywhere.
class Draw {
 public:
  explicit Draw(std::uint64_t seed) : state_(seed) {}
  std::size_t below(std::size_t count) {
    state_ = state_ * 48271 % 2147483647;
    return static_cast<std::size_t>(state_) % count;
  }

 private:
  std::uint64_t state_;
};

template <std::size_t N>
std::string one_of(Draw& draw, const char* const (&list)[N]) {
  return list[draw.below(N)];
}

/// One edit of a person: mostly bond values, for these are what a background outlives.
void edit(Worksheet& sheet, Draw& draw) {
  ReactionSheet reaction = *sheet.reactions[draw.below(sheet.reactions.size())];
  const std::size_t at = find_reaction(sheet, reaction.id);
  TypedBonds bonds = *sheet.typed_bonds;
  switch (draw.below(12)) {
    case 0:
      reaction.basis = one_of(draw, {"", "kg reactants", "no such species"});
      break;
    case 1:
      reaction.bond_set = one_of(draw, {"", "context", "no such set"});
      break;
    case 2:
      reaction.pinned_route = one_of(draw, {"", "average", "context", "formation"});
      break;
    case 3:
      reaction.reactants_at = one_of(draw, {"", "60 degC", "9000 degC"});
      break;
    case 4:
      reaction.products_at = one_of(draw, {"", "80 degC"});
      break;
    case 5:
      if (!bonds.empty()) bonds.pop_back();
      break;
    default: {
      TypedBond bond;
      bond.bond = one_of(
          draw, {"C-H", "O-H", "C-C", "C=O", "H-H", "C-O", "C=C", "N-H", "C-Cl", "H-Cl", "C-N", "N=O"});
      bond.value =
          std::to_string(300 + draw.below(500)) + one_of(draw, {"", " kJ/mol", " ± 9 kJ/mol", " kg"});
      if (bonds.size() < 4) {
        bonds.push_back(bond);
      } else {
        bonds[draw.below(bonds.size())] = bond;
      }
    }
  }
  sheet.typed_bonds = Shared<TypedBonds>(std::move(bonds));
  sheet.reactions[at] = Shared<ReactionSheet>(std::move(reaction));
}

void edit_and_take_back(const Worksheet& start, std::uint64_t seed, int edits, const std::string& name) {
  Draw draw(seed);
  Calculator calculator;
  std::vector<Worksheet> states{start};
  std::vector<std::string> texts{spelled(calculator.compute(start))};
  for (int i = 0; i < edits; ++i) {
    Worksheet next = states.back();
    edit(next, draw);
    texts.push_back(spelled(calculator.compute(next)));
    states.push_back(std::move(next));
    expect_same(texts.back(), spelled(Calculator().compute(states.back())),
                name + ", seed " + std::to_string(seed) + ", edit " + std::to_string(i + 1));
    if (::testing::Test::HasFailure()) return;
  }
  // Beyond what is remembered as a whole, undo computes again on a background made for another state.
  while (states.size() > 1) {
    states.pop_back();
    texts.pop_back();
    expect_same(spelled(calculator.compute(states.back())), texts.back(),
                name + ", undo to edit " + std::to_string(states.size() - 1));
  }
}

TEST(Recomputation, ExamplesGiveTheFiguresOfACalculatorWithoutMemory) {
  int sheets = 0;
  for (const std::string& name : test::list_source_folder("worksheets")) {
    if (name.find(".heatledger.json") == std::string::npos) continue;
    const Result<file::Opened> opened = file::read_worksheet(test::read_source_file("worksheets/" + name));
    ASSERT_TRUE(opened.ok()) << name;
    if (opened->sheet.reactions.empty()) continue;
    ++sheets;
    edit_and_take_back(opened->sheet, 20260700 + static_cast<std::uint64_t>(sheets), 12, name);
  }
  EXPECT_GE(sheets, 5);
}

Worksheet twenty() {
  Worksheet sheet;
  for (const char* equation : bench::twenty_reactions) {
    ReactionSheet reaction;
    reaction.id = free_reaction_id(sheet);
    reaction.equation = equation;
    sheet.reactions.push_back(Shared<ReactionSheet>(std::move(reaction)));
  }
  return sheet;
}

TEST(Recomputation, TwentyReactionsGiveTheFiguresOfACalculatorWithoutMemory) {
  // 28 edits are more than the 25 states of 20 reactions that are remembered whole.
  edit_and_take_back(twenty(), 424242, 28, "twenty reactions");
}

TEST(Recomputation, AnEquationChangedStandsOnNothingOld) {
  Worksheet sheet = twenty();
  sheet.reactions.resize(2);
  Calculator calculator;
  calculator.compute(sheet);
  // Ids and conditions stay, the equations change places.
  ReactionSheet first = *sheet.reactions[0], second = *sheet.reactions[1];
  std::swap(first.equation, second.equation);
  sheet.reactions[0] = Shared<ReactionSheet>(first);
  sheet.reactions[1] = Shared<ReactionSheet>(second);
  expect_same(spelled(calculator.compute(sheet)), spelled(Calculator().compute(sheet)), "equations swapped");
}

TEST(Recomputation, ABondEditSharesWhatItDoesNotChange) {
  Worksheet sheet = twenty();
  Calculator calculator;
  const Results before = calculator.compute(sheet);
  TypedBond bond;
  bond.bond = "C-H";
  bond.value = "400";
  sheet.typed_bonds = Shared<TypedBonds>(TypedBonds{bond});
  const Results after = calculator.compute(sheet);
  for (std::size_t i = 0; i < sheet.reactions.size(); ++i) {
    EXPECT_NE(before.reactions[i], after.reactions[i]);
    EXPECT_EQ(before.reactions[i]->ledger->background, after.reactions[i]->ledger->background);
  }
}

}  // namespace
}  // namespace heatledger::document
