// Published standard reaction enthalpies against the formation route: tests/data/checks/reactions.tsv.
#include <gtest/gtest.h>

#include <cmath>
#include <cstdio>

#include "core/base/number_text.hpp"
#include "tests/core/balance/sheets.hpp"
#include "tests/core/support/test_files.hpp"

namespace heatledger::balance {
namespace {

/// How far the tables of the species of a reaction lie apart [kJ]: what the row taken may differ by from the
/// row behind the published value.
double table_spread(const Ledger& sheet) {
  double sum = 0;
  for (const LedgerRow& row : sheet.rows) {
    const ReactionSpecies& entry = sheet.reaction->species[row.species];
    if (entry.species->compound == nullptr) continue;
    const facts::Compound& compound = *entry.species->compound;
    const facts::PhaseFacts& facts = row.phase == molecule::Phase::Gas      ? compound.gas
                                     : row.phase == molecule::Phase::Liquid ? compound.liquid
                                                                            : compound.solid;
    if (facts.formation_enthalpy) sum += entry.coefficient() * facts.formation_enthalpy->spread / 1000;
  }
  return sum;
}

TEST(FormationRoute, ReproducesPublishedReactionEnthalpies) {
  const test::Table table = test::read_table("tests/data/checks/reactions.tsv");
  CachedSpecies species;
  int compared = 0, without_data = 0, doubtful_off = 0, other_table = 0;
  for (const auto& row : table.rows) {
    Result<Reaction> read = read_reaction(row[1], species);
    if (!read.ok()) {
      ++without_data;
      std::printf("  not read: %s: %s\n", row[0].c_str(), read.error().message.c_str());
      continue;
    }
    LedgerOptions options;
    options.set = test_sheets::bond_set();
    const Result<Ledger> made =
        make_ledger(std::make_shared<const Reaction>(std::move(read).value()), options);
    ASSERT_TRUE(made.ok()) << row[0] << ": " << made.error().message;
    const Route* formation = find_route(*made, kFormationRoute);
    ASSERT_NE(formation, nullptr);
    if (!formation->as_written) {
      ++without_data;
      std::printf("  no figure: %s: %s\n", row[0].c_str(), formation->why_not.c_str());
      continue;
    }
    ++compared;
    const double ours = formation->as_written->value() / 1000, value = *parse_number(row[2]),
                 tolerance = *parse_number(row[3]);
    if (row[4] == "yes") {
      if (std::fabs(ours - value) > tolerance) {
        ++doubtful_off;
        std::printf("  doubtful: %s: %.2f, published %.2f\n", row[0].c_str(), ours, value);
      }
      continue;
    }
    if (std::fabs(ours - value) > tolerance && std::fabs(ours - value) <= tolerance + table_spread(*made)) {
      ++other_table;
      std::printf("  tables part: %s: %.2f, published %.2f, spread of the tables %.2f\n", row[0].c_str(),
                  ours, value, table_spread(*made));
      continue;
    }
    EXPECT_NEAR(ours, value, tolerance) << row[0] << ", " << row[5];
  }
  std::printf("formation route: %d reactions compared, %d without data, %d doubtful ones differ\n", compared,
              without_data, doubtful_off);
  EXPECT_GE(compared, 60);
  EXPECT_LE(other_table, 4);  // the oxides of nitrogen, whose tables part by up to 1 kJ/mol
}

}  // namespace
}  // namespace heatledger::balance
