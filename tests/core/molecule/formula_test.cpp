#include "core/molecule/formula.hpp"

#include <gtest/gtest.h>

#include "core/molecule/elements.hpp"
#include "tests/core/support/test_files.hpp"

namespace heatledger::molecule {
namespace {

Composition read(std::string_view text) {
  const Result<Composition> result = parse_formula(text);
  EXPECT_TRUE(result.ok()) << text << ": " << (result.ok() ? "" : result.error().message);
  return result.ok() ? *result : Composition{};
}

std::string hill(std::string_view text) {
  return hill_formula(read(text));
}

TEST(Formula, ReadsPlainAndNestedFormulas) {
  EXPECT_EQ(hill("H2O"), "H2O");
  EXPECT_EQ(hill("C6H5NO2"), "C6H5NO2");
  EXPECT_EQ(hill("CH3CH2OH"), "C2H6O");
  EXPECT_EQ(hill("(CH3)2CO"), "C3H6O");
  EXPECT_EQ(hill("Ca(OH)2"), "CaH2O2");
  EXPECT_EQ(hill("Al2(SO4)3"), "Al2O12S3");
  EXPECT_EQ(hill("K4[Fe(CN)6]"), "C6FeK4N6");
  EXPECT_EQ(hill("[Co(NH3)6]Cl3"), "Cl3CoH18N6");
  EXPECT_EQ(hill("{[(CH3)2N]2P}2O"), "C8H24N4OP2");
  EXPECT_EQ(hill("H\u2082SO\u2084"), "H2O4S");
  EXPECT_EQ(hill("CO"), "CO");
  EXPECT_EQ(hill("Co"), "Co");
  EXPECT_EQ(hill("NaCl"), "ClNa");
  EXPECT_EQ(hill("C12H22O11"), "C12H22O11");
}

TEST(Formula, ReadsHydratesWithEveryDotAndNumber) {
  for (const char* text :
       {"CuSO4\u00B75H2O", "CuSO4*5H2O", "CuSO4.5H2O", "CuSO4 \u00B7 5 H2O", "CuSO4\u20225H\u2082O"}) {
    EXPECT_EQ(hill(text), "CuH10O9S") << text;
  }
  const Composition half = read("CaSO4\u00B70.5H2O");
  EXPECT_EQ(half.atoms.at(8), 4.5);
  for (const char* text : {"CaSO4.0.5H2O", "CaSO4*1/2H2O", "CaSO4\u00B7\u00BDH2O"})
    EXPECT_TRUE(read(text) == half) << text;
  EXPECT_EQ(hill("MgCl2\u00B7KCl\u00B76H2O"), "Cl3H12KMgO6");
  EXPECT_EQ(read("Fe0.95O").atoms.at(26), 0.95);
}

TEST(Formula, ReadsEverySpellingOfACharge) {
  struct Case {
    const char* text;
    const char* hill;
  };
  for (const Case& c : {Case{"NH4+", "H4N^+"},
                        Case{"SO4^2-", "O4S^2-"},
                        Case{"SO4^-2", "O4S^2-"},
                        Case{"SO4-2", "O4S^2-"},
                        Case{"SO4 2-", "O4S^2-"},
                        Case{"SO42-", "O4S^2-"},
                        Case{"SO\u2084\u00B2\u207B", "O4S^2-"},
                        Case{"SO4--", "O4S^2-"},
                        Case{"SO4^{2-}", "O4S^2-"},
                        Case{"PO43-", "O4P^3-"},
                        Case{"Cr2O72-", "Cr2O7^2-"},
                        Case{"NO3-", "NO3^-"},
                        Case{"NO3\u2212", "NO3^-"},
                        Case{"Fe3+", "Fe^3+"},
                        Case{"Fe+3", "Fe^3+"},
                        Case{"Fe+++", "Fe^3+"},
                        Case{"Na+", "Na^+"},
                        Case{"Hg2+2", "Hg2^2+"},
                        Case{"Hg2^2+", "Hg2^2+"},
                        Case{"[Fe(CN)6]3-", "C6FeN6^3-"},
                        Case{"[Cu(NH3)4]2+", "CuH12N4^2+"},
                        Case{"I3^-", "I3^-"},
                        Case{"S^2-", "S^2-"},
                        Case{"OH-", "HO^-"},
                        Case{"HCO3-", "CHO3^-"},
                        Case{"Fe(CN)6-3", "C6FeN6^3-"},
                        Case{"Th(OH)2+2", "H2O2Th^2+"},
                        Case{"C10H16+", "C10H16^+"},
                        Case{"Fe\u00B3\u207A", "Fe^3+"}}) {
    EXPECT_EQ(hill(c.text), c.hill) << c.text;
  }
}

TEST(Formula, RefusesChargesWithTwoReadings) {
  for (const char* text : {"S2-", "I3-", "N3-", "O2-", "H2+", "PtCl62-", "Fe(CN)63-", "NH42+"}) {
    const Result<Composition> result = parse_formula(text);
    ASSERT_FALSE(result.ok()) << text;
    EXPECT_EQ(result.error().code, "formula.ambiguous_charge") << text;
  }
  EXPECT_EQ(parse_formula("S2-").error().hint, "Write S2^- or S^2-.");
}

TEST(Formula, KeepsIsotopesApart) {
  EXPECT_EQ(hill("D2O"), "D2O");
  EXPECT_EQ(hill("HDO"), "HDO");
  EXPECT_EQ(hill("[13C]H4"), "[13C]H4");
  EXPECT_EQ(hill("\u00B9\u00B3CO\u2082"), "[13C]O2");
  EXPECT_EQ(hill("CD3OD"), "CD4O");
  EXPECT_EQ(hill("Dy2O3"), "Dy2O3");
  // 2 x 2.014101778 + 15.999 (CIAAW 2021 abridged O; AME 2020 mass of deuterium)
  EXPECT_NEAR(molar_mass(read("D2O")), 20.0272, 0.0005);
}

TEST(Formula, WeighsMolecules) {
  // Sums of CIAAW 2021 abridged standard atomic weights: H 1.008, C 12.011, N 14.007, O 15.999, S 32.06,
  // Cu 63.546.
  EXPECT_NEAR(molar_mass(read("H2O")), 18.015, 1e-9);
  EXPECT_NEAR(molar_mass(read("C6H5NO2")), 6 * 12.011 + 5 * 1.008 + 14.007 + 2 * 15.999, 1e-9);
  EXPECT_NEAR(molar_mass(read("CuSO4\u00B75H2O")), 63.546 + 32.06 + 9 * 15.999 + 10 * 1.008, 1e-9);
}

TEST(Formula, DisplaysLoweredDigitsAndRaisedCharges) {
  EXPECT_EQ(display_formula(read("C6H5NO2")), "C\u2086H\u2085NO\u2082");
  EXPECT_EQ(display_formula(read("SO4^2-")), "O\u2084S\u00B2\u207B");
  EXPECT_EQ(display_formula(read("NH4+")), "H\u2084N\u207A");
}

TEST(Formula, HillTextReadsBackToTheSameComposition) {
  for (const char* text : {"CaSO4\u00B70.5H2O", "Fe0.95O", "NaB(C6H5)4", "[13C]2H6", "PO4^3-", "I3^-", "H2^+",
                           "UO2^2+", "T2O", "CuSO4.5H2O"}) {
    const Composition first = read(text);
    const Composition again = read(hill_formula(first));
    EXPECT_EQ(first.charge, again.charge) << text;
    ASSERT_EQ(first.atoms.size(), again.atoms.size()) << text;
    // A fraction such as 0.95 comes back as 19/20: equal up to the last bit or two.
    for (const auto& [key, count] : first.atoms)
      EXPECT_NEAR(again.atoms.at(key), count, 1e-12 * count) << text;
  }
}

TEST(Formula, SetsTypedTextInItsOwnOrder) {
  EXPECT_EQ(typeset_formula("CH3CH2OH"), "CH\u2083CH\u2082OH");
  EXPECT_EQ(typeset_formula("Ca(OH)2"), "Ca(OH)\u2082");
  EXPECT_EQ(typeset_formula("CuSO4.5H2O"), "CuSO\u2084\u00B75H\u2082O");
  EXPECT_EQ(typeset_formula("CaSO4*0.5H2O"), "CaSO\u2084\u00B70.5H\u2082O");
  EXPECT_EQ(typeset_formula("SO42-"), "SO\u2084\u00B2\u207B");
  EXPECT_EQ(typeset_formula("SO4^2-"), "SO\u2084\u00B2\u207B");
  EXPECT_EQ(typeset_formula("Fe3+"), "Fe\u00B3\u207A");
  EXPECT_EQ(typeset_formula("[Fe(CN)6]3-"), "[Fe(CN)\u2086]\u00B3\u207B");
  EXPECT_EQ(typeset_formula("C\u2086H\u2086"), "C\u2086H\u2086");
  EXPECT_EQ(typeset_formula("nitrobenzene"), "nitrobenzene");
}

TEST(Formula, RefusesBadTextWithCodeAndOffset) {
  const std::string folder = "tests/data/formula/bad";
  const std::vector<std::string> names = test::list_source_folder(folder);
  ASSERT_GE(names.size(), 20u);
  for (const std::string& name : names) {
    const test::BadCase bad = test::read_bad_case(folder + "/" + name);
    const Result<Composition> result = parse_formula(bad.text);
    ASSERT_FALSE(result.ok()) << name;
    EXPECT_EQ(result.error().code, bad.code) << name;
    EXPECT_EQ(result.error().where, "offset " + bad.offset) << name;
    EXPECT_FALSE(result.error().message.empty()) << name;
    EXPECT_FALSE(result.error().hint.empty()) << name;
  }
}

TEST(Formula, ReadsLongTextInLinearTime) {
  // A quadratic reader would need minutes for these.
  std::string chain;
  for (int i = 0; i < 200000; ++i) chain += "CH2";
  EXPECT_EQ(read(chain).atoms.at(6), 200000);
  EXPECT_FALSE(parse_formula(std::string(500000, '(')).ok());
  EXPECT_FALSE(parse_formula("C" + std::string(500000, '9')).ok());
  EXPECT_FALSE(parse_formula("C" + std::string(500000, '+')).ok());
}

}  // namespace
}  // namespace heatledger::molecule
