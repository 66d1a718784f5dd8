// Published bond ledgers with their table stated: tests/data/checks/bond_ledgers.tsv.
#include <gtest/gtest.h>

#include <cmath>
#include <map>
#include <sstream>

#include "core/base/number_text.hpp"
#include "tests/core/balance/sheets.hpp"
#include "tests/core/support/test_files.hpp"

namespace heatledger::balance {
namespace {

using test_sheets::kj;
using test_sheets::ledger;

/// "4 C-H 413; 2 O=O 495" summed, whole kJ.
double sum_of(const std::string& bonds) {
  double sum = 0;
  std::istringstream parts(bonds);
  for (std::string part; std::getline(parts, part, ';');) {
    std::istringstream words(part);
    double count = 0, price = 0;
    std::string bond;
    words >> count >> bond >> price;
    sum += count * price;
  }
  return sum;
}

class PublishedBondLedger : public testing::TestWithParam<std::vector<std::string>> {};

TEST_P(PublishedBondLedger, IsReproducedExactlyOrItsSlipAvoided) {
  const std::vector<std::string>& row = GetParam();
  const Ledger sheet = ledger(row[1]);
  const double published = *parse_number(row[4]);
  EXPECT_DOUBLE_EQ(sum_of(row[2]) - sum_of(row[3]), published);  // the row agrees with itself
  const double ours = kj(sheet.gas_298);
  if (row[7].empty() || row[7].find("ledger is") == 0) {
    EXPECT_NEAR(ours, published, 1e-9);  // whole numbers: only binary rounding is left
  } else {
    EXPECT_GT(std::fabs(ours - published), 50) << row[7];  // the slips of these rows cost 86 and 310 kJ
  }
  // The measured heat that the ledger is held against, and with it how far the ledger misses: tables agree
  // on these small molecules within 1 kJ/mol each, HCN within 6 (stated in its ±).
  const Route* formation = find_route(sheet, kFormationRoute);
  ASSERT_TRUE(formation != nullptr && formation->as_written);
  EXPECT_NEAR(formation->as_written->value() / 1000, *parse_number(row[5]), 1.5) << row[6];
}

std::vector<std::vector<std::string>> rows() {
  return test::read_table("tests/data/checks/bond_ledgers.tsv").rows;
}

INSTANTIATE_TEST_SUITE_P(Zumdahl, PublishedBondLedger, testing::ValuesIn(rows()), [](const auto& row) {
  std::string name = row.param[0];
  for (char& c : name) {
    if (c == '-') c = '_';
  }
  return name;
});

}  // namespace
}  // namespace heatledger::balance
