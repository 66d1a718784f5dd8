// Slips seeded by script: a sheet is worked out here by its own arithmetic, with one slip, two or none in it,
// and typed into the checker's column in three degrees of detail. Rates are printed.
#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <cstdio>
#include <random>

#include "core/balance/checker.hpp"
#include "core/base/number_text.hpp"
#include "tests/core/balance/sheets.hpp"
#include "tests/core/support/test_files.hpp"

namespace heatledger::balance {
namespace {

struct Example {
  std::string equation;
  std::string basis;
};

const Example kOwnExamples[] = {
    {"nitrobenzene(l) + 3 H2(g) -> aniline(l) + 2 H2O(l)", "nitrobenzene"},
    {"methane(g) + 2 O2(g) -> CO2(g) + 2 H2O(g)", "methane"},
    {"CO(g) + H2O(g) -> CO2(g) + H2(g)", "CO"},
    {"2 CO(g) + O2(g) -> 2 CO2(g)", "CO"},
    {"toluene(l) + 9 O2(g) -> 7 CO2(g) + 4 H2O(l)", "toluene"},
    {"acetone(g) + 4 O2(g) -> 3 CO2(g) + 3 H2O(g)", "acetone"},
    {"toluene(l) + Cl2(g) -> benzyl chloride(l) + HCl(g)", "toluene"},
    {"methane(g) + 3 Cl2(g) -> chloroform(l) + 3 HCl(g)", "chloroform"},
    {"acetic acid(l) + ethanol(l) -> ethyl acetate(l) + water(l)", "ethyl acetate"},
    {"benzene(l) + nitric acid(l) -> nitrobenzene(l) + water(l)", "nitrobenzene"},
    {"N2(g) + 3 H2(g) -> 2 NH3(g)", "NH3"},
    {"ethene(g) + Cl2(g) -> 1,2-dichloroethane(l)", "ethene"},
    {"2 NO(g) + O2(g) -> 2 NO2(g)", "NO"},
    {"propene(g) + water(g) -> 2-propanol(l)", "propene"},
    {"acetonitrile(l) + 2 H2(g) -> ethylamine(g)", "acetonitrile"},
    {"4 NH3(g) + 5 O2(g) -> 4 NO(g) + 6 H2O(g)", "NH3"},
};

/// The equations above and those of every example worksheet, as written there.
std::vector<Example> examples() {
  std::vector<Example> all(std::begin(kOwnExamples), std::end(kOwnExamples));
  const std::string key = "\"equation\": \"";
  for (const std::string& name : test::list_source_folder("worksheets")) {
    if (name.find(".heatledger.json") == std::string::npos) continue;
    const std::string text = test::read_source_file("worksheets/" + name);
    // A sheet with species of its own cannot be read without them, and that room stands above this one.
    if (text.find("\"species\": [") != std::string::npos) continue;
    // A burning step writes no equations.
    if (text.find("\"kind\": \"burning\"") != std::string::npos) continue;
    std::size_t found = 0;
    for (std::size_t at = text.find(key); at != std::string::npos; at = text.find(key, at)) {
      Example example;
      for (at += key.size(); at < text.size() && text[at] != '"'; ++at) {
        if (text[at] == '\\') ++at;
        example.equation += text[at];
      }
      all.push_back(example);
      ++found;
    }
    EXPECT_GT(found, 0u) << name << " holds no equation";
  }
  return all;
}

/// The sheet on paper, kJ. `Ledger` gives counts and prices only; all sums are made here.
struct Paper {
  struct Line {
    double count, price, count2, price2, sum;
  };
  struct Row {
    std::vector<Line> lines;
    double coefficient, per_mole, in_equation, given;
    bool product;
  };
  struct Phase {
    double per_mole, times, value;
  };
  std::vector<Row> rows;
  std::vector<Phase> phases;
  double basis = 1;
  double broken = 0, formed = 0, gas = 0, as_written = 0;

  explicit Paper(const Ledger& ledger) : basis(ledger.basis.factor) {
    for (const LedgerRow& from : ledger.rows) {
      Row row{};
      for (const BondLine& bond : from.lines) {
        row.lines.push_back({double(bond.count), bond.price->value / 1000,
                             bond.second ? double(bond.second->count) : 0,
                             bond.second ? bond.second->price->value / 1000 : 0, 0});
      }
      // An element in its reference state has no bonds to add up: its atoms are taken as the sheet gives
      // them.
      if (from.lines.empty()) row.given = from.per_mole->value() / 1000;
      row.coefficient = ledger.reaction->species[from.species].coefficient();
      row.product = ledger.reaction->species[from.species].product;
      rows.push_back(row);
    }
    for (const Correction& c : ledger.corrections)
      phases.push_back({c.value->value() / 1000 / c.times, c.times, 0});
  }

  std::size_t row_in_joules = SIZE_MAX;
  bool formed_minus_broken = false, exchanged = false;

  void add_up() {
    broken = formed = 0;
    for (std::size_t r = 0; r < rows.size(); ++r) {
      Row& row = rows[r];
      row.per_mole = row.given;
      for (Line& line : row.lines) {
        line.sum = line.count * line.price + line.count2 * line.price2;
        row.per_mole += line.sum;
      }
      if (r == row_in_joules) row.per_mole *= 1000;
      row.in_equation = row.coefficient * row.per_mole;
      (row.product ? formed : broken) += row.in_equation;
    }
    if (exchanged) std::swap(broken, formed);
    gas = formed_minus_broken ? formed - broken : broken - formed;
    as_written = gas;
    for (Phase& phase : phases) {
      phase.value = phase.per_mole * phase.times;
      as_written += phase.value;
    }
  }
};

enum class Detail { WholeSheet, RowsAndTotals, Totals };

std::string text(double value, int decimals) {
  return display_number(value, decimals);
}

std::map<std::string, std::string> typed(const Paper& paper, Detail detail) {
  std::map<std::string, std::string> entries;
  for (std::size_t r = 0; r < paper.rows.size() && detail != Detail::Totals; ++r) {
    const std::string row = "row." + std::to_string(r);
    entries[row + ".per_mole"] = text(paper.rows[r].per_mole, 1);
    entries[row + ".in_equation"] = text(paper.rows[r].in_equation, 1);
    for (std::size_t l = 0; l < paper.rows[r].lines.size() && detail == Detail::WholeSheet; ++l) {
      const Paper::Line& line = paper.rows[r].lines[l];
      const std::string cell = row + ".line." + std::to_string(l);
      entries[cell + ".per_mole"] = text(line.sum, 1);
      if (line.count2 > 0) continue;  // two prices stand in one cell of a nitro line
      entries[cell + ".count"] = text(line.count, 0);
      entries[cell + ".price"] = text(line.price, 1);
    }
  }
  entries["broken"] = text(paper.broken, 1);
  entries["formed"] = text(paper.formed, 1);
  entries["gas_298"] = text(paper.gas, 1);
  for (std::size_t p = 0; p < paper.phases.size() && detail != Detail::Totals; ++p) {
    entries["correction." + std::to_string(p)] = text(paper.phases[p].value, 1);
  }
  entries["as_written"] = text(paper.as_written, 1);
  entries["as_written.on_basis"] = text(paper.as_written * paper.basis, 1);
  return entries;
}

struct Seed {
  SlipKind kind;
  std::size_t row = 0, line = 0;
  bool anywhere = false;  ///< the place is not part of the answer
};

double transposed(double value) {
  std::string digits = std::to_string(static_cast<long long>(std::llround(std::fabs(value))));
  for (std::size_t i = digits.size() - 1; i > 0; --i) {
    if (digits[i] != digits[i - 1]) {
      std::swap(digits[i], digits[i - 1]);
      break;
    }
  }
  return std::copysign(std::stod(digits), value);
}

/// Puts one slip of a kind into the paper where the sheet has room for it.
bool seed(Paper& paper, const Ledger& ledger, SlipKind kind, std::mt19937& random, Seed& out) {
  const auto pick = [&random](std::size_t n) { return static_cast<std::size_t>(random() % n); };
  out = Seed{kind, 0, 0, false};
  out.row = pick(paper.rows.size());
  Paper::Row& row = paper.rows[out.row];
  if (row.lines.empty()) return false;
  out.line = pick(row.lines.size());
  Paper::Line& line = row.lines[out.line];
  const BondLine& bond = ledger.rows[out.row].lines[out.line];
  switch (kind) {
    case SlipKind::BondMissed:
      line.count -= 1;
      return true;
    case SlipKind::BondTwice:
      line.count += 1;
      return true;
    case SlipKind::CoefficientLeftOut:
      if (row.coefficient == 1) return false;
      row.coefficient = 1;
      return true;
    case SlipKind::CarbonDioxideAsKetone:
      if (bond.type.setting != molecule::Setting::CarbonDioxide) return false;
      line.price = 745;
      return true;
    case SlipKind::AverageForSpecific:
      if (bond.type.setting == molecule::Setting::CarbonMonoxide)
        line.price = 745;
      else if (bond.type.setting == molecule::Setting::NitricOxide)
        line.price = 607;
      else if (bond.type.setting == molecule::Setting::NitrogenDioxide)
        line.price = (607 + 201) / 2.0;
      else
        return false;
      return true;
    case SlipKind::NitroAsTwoDouble:
      if (line.count2 == 0) return false;
      line.price = line.price2;
      return true;
    case SlipKind::PhaseLeftOut: {
      if (paper.phases.empty()) return false;
      const std::size_t p = pick(paper.phases.size());
      paper.phases[p].times = 0;
      out.row = ledger.corrections[p].species;
      out.line = 0;
      return true;
    }
    case SlipKind::WrongBasis: {
      const double other = 1 / row.coefficient;
      if (other == paper.basis) return false;
      paper.basis = other;
      out.anywhere = true;
      return true;
    }
    case SlipKind::JouleForKilojoule:
      paper.row_in_joules = out.row;
      out.line = 0;
      return true;
    case SlipKind::CalorieForJoule:
      if (line.count2 > 0) return false;
      line.price /= 4.184;
      return true;
    case SlipKind::Sign:
      paper.formed_minus_broken = true;
      out.anywhere = true;
      return true;
    case SlipKind::SidesExchanged:
      paper.exchanged = true;
      out.anywhere = true;
      return true;
    case SlipKind::DigitsTransposed: {
      if (line.count2 > 0) return false;
      const double wrong = transposed(line.price);
      if (wrong == line.price) return false;
      line.price = wrong;
      out.anywhere = true;
      return true;
    }
    default:
      return false;
  }
}

const SlipKind kSeeded[] = {SlipKind::BondMissed,
                            SlipKind::BondTwice,
                            SlipKind::CoefficientLeftOut,
                            SlipKind::CarbonDioxideAsKetone,
                            SlipKind::AverageForSpecific,
                            SlipKind::NitroAsTwoDouble,
                            SlipKind::PhaseLeftOut,
                            SlipKind::WrongBasis,
                            SlipKind::JouleForKilojoule,
                            SlipKind::CalorieForJoule,
                            SlipKind::Sign,
                            SlipKind::SidesExchanged,
                            SlipKind::DigitsTransposed};

bool names(const Review& review, const Seed& slip) {
  if (review.slips.size() != 1 || review.more_than_one || review.different_table) return false;
  const Slip& first = review.slips[0];
  return first.kind == slip.kind && (slip.anywhere || (first.row == slip.row && first.line == slip.line));
}

std::vector<Ledger> sheets() {
  std::vector<Ledger> result;
  for (const Example& example : examples())
    result.push_back(test_sheets::ledger(example.equation, example.basis));
  return result;
}

const char* detail_text(Detail detail) {
  return detail == Detail::WholeSheet      ? "whole sheet"
         : detail == Detail::RowsAndTotals ? "rows and totals"
                                           : "totals only";
}

constexpr unsigned kSeed = 20240917;

TEST(SeededSlips, SingleOnesAreNamedFirst) {
  const std::vector<Ledger> ledgers = sheets();
  for (const Detail detail : {Detail::WholeSheet, Detail::RowsAndTotals, Detail::Totals}) {
    std::mt19937 random(kSeed);
    int tried = 0, named = 0, among = 0, shown = 0;
    while (tried < 400) {
      const Ledger& ledger = ledgers[random() % ledgers.size()];
      const SlipKind kind = kSeeded[random() % std::size(kSeeded)];
      Paper paper(ledger);
      Seed slip{};
      if (!seed(paper, ledger, kind, random, slip)) continue;
      paper.add_up();
      Paper correct(ledger);
      correct.add_up();
      if (typed(paper, detail) == typed(correct, detail)) continue;  // leaves no trace (the sign of a zero)
      const Review review = review_sheet(ledger, typed(paper, detail));
      ++tried;
      if (names(review, slip)) {
        ++named;
      } else {
        const bool other =
            std::any_of(review.alternatives.begin(), review.alternatives.end(), [&slip](const Slip& s) {
              return s.kind == slip.kind && (slip.anywhere || (s.row == slip.row && s.line == slip.line));
            });
        among += other ? 1 : 0;
        if (++shown <= 5) {
          std::printf("    missed: kind %d row %zu line %zu of %s: %s\n", static_cast<int>(slip.kind),
                      slip.row, slip.line, ledger.reaction->text.c_str(), review.summary.c_str());
        }
      }
    }
    std::printf("  %s: %d of %d single slips named first, %d more among those that fit (seed %u)\n",
                detail_text(detail), named, tried, among, kSeed);
    EXPECT_GE(named, tried * 9 / 10) << detail_text(detail);
  }
}

TEST(SeededSlips, TwoAreReportedAsMoreThanOne) {
  const std::vector<Ledger> ledgers = sheets();
  for (const Detail detail : {Detail::WholeSheet, Detail::RowsAndTotals, Detail::Totals}) {
    std::mt19937 random(kSeed);
    int tried = 0, reported = 0, shown = 0;
    while (tried < 100) {
      const Ledger& ledger = ledgers[random() % ledgers.size()];
      Paper paper(ledger);
      Seed first{}, second{};
      if (!seed(paper, ledger, kSeeded[random() % std::size(kSeeded)], random, first)) continue;
      if (!seed(paper, ledger, kSeeded[random() % std::size(kSeeded)], random, second)) continue;
      // Two slips that undo each other, or of which one hides the other, are one or none on paper.
      if (first.kind == second.kind || (first.row == second.row && first.line == second.line)) continue;
      const bool signs = (first.kind == SlipKind::Sign && second.kind == SlipKind::SidesExchanged) ||
                         (second.kind == SlipKind::Sign && first.kind == SlipKind::SidesExchanged);
      if (signs) continue;
      paper.add_up();
      const Review review = review_sheet(ledger, typed(paper, detail));
      ++tried;
      if (review.more_than_one) {
        ++reported;
      } else if (++shown <= 4) {
        std::printf("    taken for one: kinds %d and %d of %s: %s\n", static_cast<int>(first.kind),
                    static_cast<int>(second.kind), ledger.reaction->text.c_str(), review.summary.c_str());
      }
    }
    std::printf("  %s: %d of %d double slips reported as more than one\n", detail_text(detail), reported,
                tried);
    EXPECT_GE(reported, tried * 9 / 10) << detail_text(detail);
  }
}

TEST(SeededSlips, NoCorrectSheetIsAccused) {
  for (const Ledger& ledger : sheets()) {
    for (const Detail detail : {Detail::WholeSheet, Detail::RowsAndTotals, Detail::Totals}) {
      Paper paper(ledger);
      paper.add_up();
      const Review review = review_sheet(ledger, typed(paper, detail));
      EXPECT_TRUE(review.agrees) << ledger.reaction->text << ": " << review.summary;
      EXPECT_TRUE(review.slips.empty());
    }
  }
}

TEST(SeededSlips, ACorrectSheetByAnotherTableIsNotAccused) {
  int compared = 0;
  for (const Example& example : examples()) {
    const Ledger ours = test_sheets::ledger(example.equation, example.basis);
    for (const char* set : {"atkins", "huheey", "reusch"}) {
      const Ledger theirs = test_sheets::ledger(example.equation, example.basis, set);
      if (!theirs.gas_298) continue;
      // A table with an aromatic value has other bond lines than ours; its rows and totals can be compared.
      bool same_lines = true;
      for (std::size_t r = 0; r < ours.rows.size(); ++r) {
        same_lines = same_lines && ours.rows[r].lines.size() == theirs.rows[r].lines.size();
        for (std::size_t l = 0; same_lines && l < ours.rows[r].lines.size(); ++l)
          same_lines = ours.rows[r].lines[l].type == theirs.rows[r].lines[l].type;
      }
      for (const Detail detail : {Detail::WholeSheet, Detail::RowsAndTotals, Detail::Totals}) {
        if (detail == Detail::WholeSheet && !same_lines) continue;
        Paper paper(theirs);
        paper.add_up();
        const Review review = review_sheet(ours, typed(paper, detail));
        ++compared;
        EXPECT_TRUE(review.agrees || review.different_table)
            << set << ", " << detail_text(detail) << ", " << example.equation << ": " << review.summary;
      }
    }
  }
  std::printf("  %d correct sheets by another table\n", compared);
  EXPECT_GE(compared, 60);
}

}  // namespace
}  // namespace heatledger::balance
