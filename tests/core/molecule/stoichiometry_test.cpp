#include "core/molecule/stoichiometry.hpp"

#include <gtest/gtest.h>

namespace heatledger::molecule {
namespace {

std::vector<Composition> read(const std::vector<std::string>& formulas) {
  std::vector<Composition> result;
  for (const std::string& text : formulas) {
    const Result<Composition> one = parse_formula(text);
    EXPECT_TRUE(one.ok()) << text;
    if (one) result.push_back(*one);
  }
  return result;
}

using Ways = std::vector<std::vector<std::int64_t>>;

Ways ways(const std::vector<std::string>& left, const std::vector<std::string>& right) {
  const Result<Ways> result = balance(read(left), read(right));
  EXPECT_TRUE(result.ok()) << (result.ok() ? "" : result.error().message);
  return result.ok() ? *result : Ways{};
}

Error refused(const std::vector<std::string>& left, const std::vector<std::string>& right) {
  const Result<Ways> result = balance(read(left), read(right));
  EXPECT_FALSE(result.ok());
  return result.ok() ? Error{} : result.error();
}

TEST(Stoichiometry, BalancesUniquely) {
  EXPECT_EQ(ways({"C6H5NO2", "H2"}, {"C6H7N", "H2O"}), (Ways{{1, 3, 1, 2}}));
  EXPECT_EQ(ways({"C3H8", "O2"}, {"CO2", "H2O"}), (Ways{{1, 5, 3, 4}}));
  EXPECT_EQ(ways({"KMnO4", "HCl"}, {"KCl", "MnCl2", "H2O", "Cl2"}), (Ways{{2, 16, 2, 2, 8, 5}}));
  // Ions: charge is a row of its own, without it this has two ways.
  EXPECT_EQ(ways({"Cr2O7^2-", "Fe^2+", "H+"}, {"Cr^3+", "Fe^3+", "H2O"}), (Ways{{1, 6, 14, 2, 6, 7}}));
  EXPECT_EQ(ways({"K4[Fe(CN)6]", "H2SO4", "H2O"}, {"K2SO4", "FeSO4", "(NH4)2SO4", "CO"}),
            (Ways{{1, 6, 6, 2, 1, 3, 6}}));
}

TEST(Stoichiometry, ScalesFractionalHydrates) {
  EXPECT_EQ(ways({"CaSO4*0.5H2O", "H2O"}, {"CaSO4*2H2O"}), (Ways{{2, 3, 2}}));
}

TEST(Stoichiometry, ListsIndependentWays) {
  EXPECT_EQ(ways({"C", "O2"}, {"CO", "CO2"}), (Ways{{1, 1, 0, 1}, {2, 1, 2, 0}}));
  EXPECT_EQ(ways({"CH4", "O2"}, {"CO", "CO2", "H2O"}), (Ways{{1, 2, 0, 1, 2}, {2, 3, 2, 0, 4}}));
  EXPECT_EQ(ways({"H2O2", "KMnO4", "H2SO4"}, {"K2SO4", "MnSO4", "H2O", "O2"}).size(), 2u);
}

TEST(Stoichiometry, PutsInertsLast) {
  EXPECT_EQ(ways({"CH4", "O2", "N2"}, {"CO2", "H2O", "N2"}), (Ways{{1, 2, 0, 1, 2, 0}, {0, 0, 1, 0, 0, 1}}));
  EXPECT_EQ(ways({"C4H10"}, {"C4H10"}), (Ways{{1, 1}}));
}

TEST(Stoichiometry, NamesTheElementThatStandsOnOneSideOnly) {
  const Error chlorine = refused({"CH4", "Cl2"}, {"CH4"});
  EXPECT_EQ(chlorine.code, "balance.missing_element");
  EXPECT_EQ(chlorine.message, "Chlorine stands only on the left.");
  EXPECT_EQ(refused({"CH4", "O2"}, {"CO2", "N2"}).message,
            "Hydrogen stands only on the left and nitrogen stands only on the right.");
  EXPECT_EQ(refused({"D2", "O2"}, {"H2O"}).message,
            "Deuterium stands only on the left and hydrogen stands only on the right.");
  EXPECT_EQ(refused({"Na"}, {"Na+"}).code, "balance.missing_element");
}

TEST(Stoichiometry, SaysWhenNoPositiveCoefficientsExist) {
  const Error sulfur = refused({"SO3"}, {"S", "SO2"});
  EXPECT_EQ(sulfur.code, "balance.impossible");
  EXPECT_EQ(sulfur.message,
            "Every element stands on both sides, yet no positive coefficients balance this: S would have to "
            "stand on the other side.");
  EXPECT_EQ(refused({"CH4"}, {"C2H6", "C2H2"}).code, "balance.impossible");
  EXPECT_EQ(refused({"CH4", "CO2"}, {"C2H6", "CO"}).code, "balance.impossible");
}

TEST(Stoichiometry, RefusesWhatOutgrowsItsArithmetic) {
  std::vector<std::string> left(45, "CH4"), right(1, "CH4");
  EXPECT_EQ(refused(left, right).code, "balance.too_large");
}

TEST(Stoichiometry, ChecksElementsAndChargeSideBySide) {
  const std::vector<Composition> c = read({"MnO4-", "Fe^2+", "H+", "Mn^2+", "Fe^3+", "H2O"});
  const BalanceCheck good =
      check_balance({{1, c[0]}, {5, c[1]}, {8, c[2]}}, {{1, c[3]}, {5, c[4]}, {4, c[5]}});
  EXPECT_TRUE(good.balanced);
  ASSERT_EQ(good.elements.size(), 5u);
  EXPECT_EQ(good.elements[0].key, 1);
  EXPECT_EQ(good.elements.back().key, -1);
  EXPECT_EQ(good.elements.back().left, 17);
  EXPECT_EQ(describe_imbalance(good), "");
  const BalanceCheck bad =
      check_balance({{1, c[0]}, {1, c[1]}, {8, c[2]}}, {{1, c[3]}, {1, c[4]}, {4, c[5]}});
  EXPECT_FALSE(bad.balanced);
  EXPECT_EQ(describe_imbalance(bad), "The charge on the left is higher by 4.");
}

TEST(Stoichiometry, PutsCarbonAndHydrogenFirst) {
  const std::vector<Composition> c = read({"CaC2", "H2O", "C2H2", "Ca(OH)2"});
  const BalanceCheck check = check_balance({{1, c[0]}, {2, c[1]}}, {{1, c[2]}, {1, c[3]}});
  ASSERT_EQ(check.elements.size(), 4u);
  EXPECT_EQ(check.elements[0].key, 6);
  EXPECT_EQ(check.elements[1].key, 1);
  EXPECT_EQ(check.elements[2].key, 20);
  EXPECT_EQ(check.elements[3].key, 8);
  EXPECT_TRUE(check.balanced);
}

TEST(Stoichiometry, SaysWhatIsMissing) {
  const std::vector<Composition> c = read({"C6H6", "HNO3", "C6H5NO2", "O2", "CO2", "H2O"});
  EXPECT_EQ(describe_imbalance(check_balance({{1, c[0]}, {1, c[1]}}, {{1, c[2]}})),
            "2 H and 1 O more on the left: perhaps one H2O on the right is missing.");
  EXPECT_EQ(describe_imbalance(check_balance({{1, c[0]}, {7, c[3]}}, {{6, c[4]}, {3, c[5]}})),
            "1 O more on the right: perhaps 0.5 O2 on the left is missing.");
  EXPECT_EQ(describe_imbalance(check_balance({{1, c[0]}}, {{1, c[1]}})),
            "6 C and 5 H more on the left and 1 N and 3 O more on the right.");
}

}  // namespace
}  // namespace heatledger::molecule
