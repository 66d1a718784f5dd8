#include <gtest/gtest.h>

#include <nlohmann/json.hpp>

#include "run.hpp"

namespace heatledger::test {
namespace {

using nlohmann::json;

json species_json(const std::string& text, std::vector<std::string> more = {}) {
  std::vector<std::string> arguments{"species", text, "--json"};
  arguments.insert(arguments.end(), more.begin(), more.end());
  const Ran ran = heatledger(arguments);
  EXPECT_EQ(ran.status, 0) << ran.out << ran.err;
  return json::parse(ran.out);
}

TEST(Species, HasEveryKeyOfTheContract) {
  const json answer = species_json("ethyl acetate");
  for (const char* key :
       {"name", "smiles", "formula", "molar_mass_g_mol", "gas_formation", "vaporisation_298",
        "liquid_formation", "cp_gas", "cp_liquid_298", "bonds", "bonds_ledger", "cautions"}) {
    EXPECT_TRUE(answer.contains(key)) << key;
  }
  EXPECT_EQ(answer["formula"], "C4H8O2");
  // Ethyl acetate: 88.106 g/mol from IUPAC atomic weights 2021; the tolerance is the last digit of that
  // figure.
  EXPECT_NEAR(answer["molar_mass_g_mol"].get<double>(), 88.106, 0.001);
  const std::vector<double> temperatures{298.15, 400, 500, 600, 800, 1000, 1500};
  ASSERT_EQ(answer["cp_gas"].size(), temperatures.size());
  for (std::size_t i = 0; i < temperatures.size(); ++i)
    EXPECT_EQ(answer["cp_gas"][i]["T"].get<double>(), temperatures[i]);
}

TEST(Species, AValueIsGivenWithRouteAndSourceOrNullWithAReason) {
  for (const char* name : {"ethyl acetate", "water", "sodium chloride", "nitrobenzene"}) {
    const json answer = species_json(name);
    for (const char* key : {"gas_formation", "vaporisation_298", "liquid_formation", "cp_liquid_298"}) {
      const json& figure = answer[key];
      if (figure["value"].is_null()) {
        EXPECT_FALSE(figure["reason"].get<std::string>().empty()) << name << " " << key;
      } else {
        EXPECT_FALSE(figure["route"].get<std::string>().empty()) << name << " " << key;
        EXPECT_FALSE(figure["source"].get<std::string>().empty()) << name << " " << key;
        EXPECT_GE(figure["u95"].get<double>(), 0) << name << " " << key;
      }
    }
  }
}

TEST(Species, BondsAreThoseOfTheKekuleStructure) {
  // Counted by hand; nitro is one N-O and one N=O.
  const json answer = species_json("nitrobenzene");
  const json expected =
      json::parse(R"([{"bond":"C-C","count":3},{"bond":"C=C","count":3},{"bond":"C-H","count":5},
                                        {"bond":"C-N","count":1},{"bond":"N-O","count":1},{"bond":"N=O","count":1}])");
  ASSERT_EQ(answer["bonds"].size(), expected.size());
  for (const json& bond : expected) {
    EXPECT_NE(std::find(answer["bonds"].begin(), answer["bonds"].end(), bond), answer["bonds"].end()) << bond;
  }
}

TEST(Species, AStructureGivesTheSameFiguresAsItsName) {
  json by_name = species_json("ethyl acetate"), by_structure = species_json("CCOC(C)=O"),
       by_cas = species_json("141-78-6");
  for (const char* key : {"formula", "smiles", "gas_formation", "liquid_formation", "bonds"}) {
    EXPECT_EQ(by_name[key], by_structure[key]) << key;
    EXPECT_EQ(by_name[key], by_cas[key]) << key;
  }
}

TEST(Species, EstimateOnlyLeavesTheTablesAside) {
  const json tabulated = species_json("ethyl acetate"),
             estimated = species_json("ethyl acetate", {"--estimate-only"});
  EXPECT_EQ(tabulated["gas_formation"]["route"], "table");
  EXPECT_NE(estimated["gas_formation"]["route"], "table");
  EXPECT_NE(estimated["liquid_formation"]["route"], "table");
  EXPECT_NE(estimated["gas_formation"]["value"], tabulated["gas_formation"]["value"]);
  // -444.5 kJ/mol (Pedley 1994); the estimate's own 95 % interval must reach it.
  EXPECT_NEAR(estimated["gas_formation"]["value"].get<double>(), -444.5,
              estimated["gas_formation"]["u95"].get<double>());
}

TEST(Species, HeatCapacityOfAGasRisesAlongItsPolynomial) {
  const json nitrogen = species_json("nitrogen");
  const json& points = nitrogen["cp_gas"];
  // NIST-JANAF, 4th ed. (1998), N2: 298.15 K 29.124, 1000 K 32.697, 1500 K 34.852 J/(mol K), from memory; the
  // tolerance is the 1 per cent that the table of polynomials claims.
  EXPECT_NEAR(points[0]["value"].get<double>(), 29.124, 0.29);
  EXPECT_NEAR(points[5]["value"].get<double>(), 32.697, 0.33);
  EXPECT_NEAR(points[6]["value"].get<double>(), 34.852, 0.35);
  // Above its critical temperature there is no liquid to estimate.
  EXPECT_TRUE(nitrogen["cp_liquid_298"]["value"].is_null());
}

TEST(Species, SmilesOptionDecidesBetweenTwoReadings) {
  EXPECT_EQ(species_json("CO")["formula"], "CO");
  EXPECT_EQ(species_json("CO", {"--smiles"})["formula"], "CH4O");
}

TEST(Species, SeveralIsomersAreOfferedNotGuessed) {
  const Ran ran = heatledger({"species", "C3H8O"});
  EXPECT_EQ(ran.status, 1);
  EXPECT_NE((ran.err).find("propan"), std::string::npos) << ran.err;
}

TEST(Species, AMisspeltNameOffersTheNearest) {
  const Ran ran = heatledger({"species", "ethyl acetat"});
  EXPECT_EQ(ran.status, 1);
  EXPECT_NE(ran.err.find("ethyl acetate"), std::string::npos) << ran.err;
}

TEST(Species, TextShowsFiguresWithSources) {
  const Ran ran = heatledger({"species", "ethyl acetate"});
  EXPECT_EQ(ran.status, 0);
  for (const char* piece : {"C₄H₈O₂", "88.1", "141-78-6", "kJ/mol", "C=O"})
    EXPECT_NE(ran.out.find(piece), std::string::npos) << piece;
}

}  // namespace
}  // namespace heatledger::test
