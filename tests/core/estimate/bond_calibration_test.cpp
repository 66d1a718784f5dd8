#include "core/estimate/bond_calibration.hpp"

#include <gtest/gtest.h>

#include "core/estimate/bond_set.hpp"
#include "tests/core/support/test_files.hpp"

namespace heatledger::estimate {
namespace {

TEST(BondCalibration, IsWhatTheShippedTableSays) {
  EXPECT_EQ(bond_spread_table(), test::read_source_file("core/estimate/tables/bond_spread_factors.tsv"))
      << "Run `heatledger_refit bonds > core/estimate/tables/bond_spread_factors.tsv` after a change of the "
         "bond tables.";
}

TEST(BondCalibration, CoversCompoundsLeftOutByEverySet) {
  for (const std::string& name : BondSet::names()) {
    const std::vector<PricedCompound> compounds = priced_compounds(name);
    EXPECT_GT(compounds.size(), 900u) << name;
    // 95 % of a thousand has a sampling error of 0.7 %; twice that and a little is allowed each way.
    EXPECT_NEAR(bond_coverage_left_out(compounds, 5), 0.95, 0.02) << name;
  }
}

TEST(BondCalibration, BareSpreadOfTablesCoversFarTooLittle) {
  const std::vector<PricedCompound> compounds = priced_compounds();
  std::vector<BondSpread> spreads = fit_bond_spreads(compounds);
  EXPECT_NEAR(bond_coverage(compounds, spreads), 0.95, 0.005);  // set on these very compounds
  for (BondSpread& spread : spreads) spread.u95 = spread.table_u95;
  EXPECT_LT(bond_coverage(compounds, spreads), 0.7);
}

}  // namespace
}  // namespace heatledger::estimate
