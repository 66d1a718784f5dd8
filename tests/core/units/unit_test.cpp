#include "core/units/unit.hpp"

#include <gtest/gtest.h>

#include "tests/core/support/test_files.hpp"

namespace heatledger::units {
namespace {

Unit read(std::string_view text) {
  const Result<Unit> unit = parse_unit(text);
  EXPECT_TRUE(unit.ok()) << text << ": " << (unit.ok() ? "" : unit.error().message);
  return unit.ok() ? *unit : Unit{};
}

TEST(Units, ReadsEverySpellingOfProducts) {
  for (const char* text : {"J/(mol K)", "J/mol K", "J/mol/K", "J/(mol\u00B7K)", "J/(mol*K)", "J mol-1 K-1",
                           "J\u00B7mol\u207B\u00B9\u00B7K\u207B\u00B9", "J mol^-1 K^-1", "J/(mol \u00B0C)"}) {
    EXPECT_EQ(read(text).dimension, dimension::kMolarHeatCapacity) << text;
    EXPECT_EQ(read(text).factor, 1) << text;
    EXPECT_EQ(read(text).offset, 0) << text;
  }
  EXPECT_EQ(read("J/mol K").display, "J/(mol\u00B7K)");
  EXPECT_EQ(read("W/m2 K").display, "W/(m\u00B2\u00B7K)");
  EXPECT_EQ(read("kg m-3").display, "kg\u00B7m\u207B\u00B3");
  EXPECT_EQ(read("m^3/h").display, "m\u00B3/h");
  EXPECT_EQ(read("1/h").dimension, dimension::kRate);
  EXPECT_EQ(read("").dimension, dimension::kNumber);
}

TEST(Units, KnowsTheDimensionsOfTheTrade) {
  struct Case {
    const char* text;
    Dimension dimension;
  };
  for (const Case& c : {Case{"kJ/mol", dimension::kEnergyPerMole},
                        Case{"kWh/t", dimension::kEnergyPerMass},
                        Case{"Btu/lb", dimension::kEnergyPerMass},
                        Case{"kJ/h", dimension::kPower},
                        Case{"Btu/h", dimension::kPower},
                        Case{"kcal/h", dimension::kPower},
                        Case{"t/h", dimension::kMassFlow},
                        Case{"kmol/h", dimension::kMolarFlow},
                        Case{"Nm3/h", dimension::kMolarFlow},
                        Case{"m3(n)/h", dimension::kMolarFlow},
                        Case{"m3/h", dimension::kVolumeFlow},
                        Case{"L/min", dimension::kVolumeFlow},
                        Case{"kg/m3", dimension::kDensity},
                        Case{"g/cm3", dimension::kDensity},
                        Case{"kJ/(kg K)", dimension::kMassHeatCapacity},
                        Case{"W/(m2 K)", dimension::kHeatTransferCoefficient},
                        Case{"kW/K", dimension::kHeatTransferPerKelvin},
                        Case{"mol/L", dimension::kConcentration},
                        Case{"g/mol", dimension::kMolarMass},
                        Case{"mol%", dimension::kMoleFraction},
                        Case{"wt%", dimension::kMassFraction},
                        Case{"barg", dimension::kGaugePressure},
                        Case{"bar g", dimension::kGaugePressure},
                        Case{"psig", dimension::kGaugePressure},
                        Case{"bar", dimension::kPressure},
                        Case{"bar a", dimension::kPressure},
                        Case{"\u00B0C", dimension::kTemperature},
                        Case{"mol/kg", dimension::kMolality}}) {
    EXPECT_EQ(read(c.text).dimension, c.dimension) << c.text << " is " << describe(read(c.text).dimension);
  }
}

TEST(Units, ConvertsByPublishedFactors) {
  struct Case {
    const char* text;
    double si;
    double
        relative;  // half a unit in the last digit that the source prints; zero where the definition is exact
  };
  for (const Case& c : {
           Case{"kcal/mol", 4184, 0},        // ISO 80000-5:2019, thermochemical calorie
           Case{"cal_IT", 4.1868, 0},        // ISO 80000-5:2019, International Table calorie
           Case{"Btu/lb", 2326, 1e-12},      // NIST SP 811 (2008) B.8: Btu(IT)/lb = 2.326 E+03 J/kg, exact
           Case{"Btu/h", 0.2930711, 2e-7},   // NIST SP 811 (2008) B.8
           Case{"kWh", 3.6e6, 0},            // SI brochure, table 8
           Case{"psi", 6894.757, 8e-8},      // NIST SP 811 (2008) B.8
           Case{"mmHg", 133.3224, 4e-7},     // NIST SP 811 (2008) B.8
           Case{"atm", 101325, 0},           // NIST SP 811 (2008) B.8
           Case{"torr", 133.3224, 4e-7},     // NIST SP 811 (2008) B.8
           Case{"lb/h", 1.259979e-4, 4e-7},  // NIST SP 811 (2008) B.8
           Case{"ft3", 2.831685e-2, 2e-7},   // NIST SP 811 (2008) B.8
           Case{"Btu/(lb \u00B0F)", 4186.8, 1e-12},  // NIST SP 811 (2008) B.8: 4.1868 E+03, exact
           Case{"Nm3", 44.615, 2e-5},                // 1000/22.414 mol
           Case{"scf", 1.1953, 5e-5},  // 379.48 scf per lbmol, the figure of the gas trade: 453.592/379.48
       }) {
    EXPECT_NEAR(read(c.text).factor, c.si, c.relative * c.si + 1e-15 * c.si) << c.text;
  }
  EXPECT_NEAR(read("degF").to_si(77), 298.15, 1e-10);  // 77 °F is 25 °C
  EXPECT_NEAR(read("\u00B0C").to_si(25), 298.15, 1e-12);
  EXPECT_NEAR(read("m3(15C)").factor, read("Nm3").factor * 273.15 / 288.15, 1e-12);
}

TEST(Units, RefusesBadTextWithCodeAndOffset) {
  const std::string folder = "tests/data/unit/bad";
  const std::vector<std::string> names = test::list_source_folder(folder);
  ASSERT_GE(names.size(), 15u);
  for (const std::string& name : names) {
    const test::BadCase bad = test::read_bad_case(folder + "/" + name);
    const Result<Unit> result = parse_unit(bad.text);
    ASSERT_FALSE(result.ok()) << name;
    EXPECT_EQ(result.error().code, bad.code) << name;
    EXPECT_EQ(result.error().where, "offset " + bad.offset) << name;
    EXPECT_FALSE(result.error().hint.empty()) << name;
  }
  EXPECT_EQ(parse_unit("KJ/mol").error().hint, "Did you mean kJ?");
  EXPECT_NE(parse_unit("standard m3").error().hint.find("Nm3"), std::string::npos);
}

}  // namespace
}  // namespace heatledger::units
