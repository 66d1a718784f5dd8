// What engineers type every day has to be found under the names they use.
#include <gtest/gtest.h>

#include "core/facts/resolve.hpp"
#include "tests/core/support/test_files.hpp"

namespace heatledger::facts {
namespace {

TEST(EverydayNames, ResolveToTheirCompound) {
  const test::Table table = test::read_table("tests/data/facts/everyday_names.tsv");
  const std::size_t typed = table.column("typed"), name = table.column("name");
  EXPECT_GE(table.rows.size(), 250u);
  for (const auto& row : table.rows) {
    const auto species = resolve_species(row[typed], false);
    ASSERT_TRUE(species.ok()) << row[typed] << ": " << species.error().message;
    EXPECT_EQ((*species)->name, row[name]) << row[typed];
    EXPECT_TRUE((*species)->composition.has_value()) << row[typed];
  }
}

}  // namespace
}  // namespace heatledger::facts
