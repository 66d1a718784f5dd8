#include <gtest/gtest.h>

#include <cmath>
#include <nlohmann/json.hpp>

#include "run.hpp"

namespace heatledger::test {
namespace {

using nlohmann::json;

constexpr const char* kHydrogenation = "nitrobenzene(l) + 3 H2 -> aniline(l) + 2 H2O(l)";

json tally_json(const std::string& equation, std::vector<std::string> more = {}) {
  std::vector<std::string> arguments{"tally", equation, "--json"};
  arguments.insert(arguments.end(), more.begin(), more.end());
  const Ran ran = heatledger(arguments);
  EXPECT_EQ(ran.status, 0) << ran.out << ran.err;
  return json::parse(ran.out);
}

TEST(Tally, HasEveryKeyOfTheContract) {
  const json answer = tally_json(kHydrogenation);
  for (const char* key : {"balanced", "equation", "broken", "formed", "gas_298", "corrections", "as_written",
                          "as_run", "per_mole_of", "routes", "rows"}) {
    EXPECT_TRUE(answer.contains(key)) << key;
  }
  for (const char* route : {"average", "context", "formation", "taken"})
    EXPECT_TRUE(answer["routes"].contains(route)) << route;
  EXPECT_TRUE(answer["balanced"].get<bool>());
  EXPECT_EQ(answer["rows"].size(), 4u);
  EXPECT_EQ(answer["corrections"].size(), 3u);  // nitrobenzene, aniline and water are liquids
}

TEST(Tally, FormationRouteAgreesWithPublishedHydrogenation) {
  const json answer = tally_json(kHydrogenation);
  const json& taken = answer["routes"]["taken"];
  EXPECT_EQ(taken["route"], "formation");
  // -552.6 kJ/mol from CRC formation enthalpies; other tables give -544 to -560, half of that span is the
  // tolerance.
  EXPECT_NEAR(taken["value"].get<double>(), -552.6, 8.0);
  EXPECT_GT(taken["u95"].get<double>(), 0);
}

TEST(Tally, TheDifferenceIsBrokenMinusFormedAndTheLinesAddUp) {
  const json answer = tally_json(kHydrogenation);
  const double broken = answer["broken"].get<double>(), formed = answer["formed"].get<double>();
  // Printed numbers carry ten digits: sums of a few of them agree to a few units of the ninth.
  EXPECT_NEAR(answer["gas_298"]["value"].get<double>(), broken - formed, 1e-5);
  double sum = answer["gas_298"]["value"].get<double>();
  for (const json& line : answer["corrections"]) sum += line["value"].get<double>();
  EXPECT_NEAR(answer["as_written"]["value"].get<double>(), sum, 1e-5);
  double of_rows = 0;
  for (const json& row : answer["rows"]) {
    double bonds = 0;
    for (const json& bond : row["bonds"]) bonds += bond["subtotal"].get<double>();
    EXPECT_NEAR(bonds, row["per_mole"]["value"].get<double>(), 1e-5) << row["species"];
    of_rows += (row["side"] == "reactant" ? 1 : -1) * row["in_equation"]["value"].get<double>();
  }
  EXPECT_NEAR(of_rows, answer["gas_298"]["value"].get<double>(), 1e-5);
}

TEST(Tally, SharedBondsCancelInTheInterval) {
  const json answer = tally_json("CH3OH(g) -> CH3OH(g)");
  EXPECT_EQ(answer["gas_298"]["value"].get<double>(), 0);
  EXPECT_EQ(answer["gas_298"]["u95"].get<double>(), 0);
  EXPECT_GT(answer["broken_u95"].get<double>(), 0);
}

TEST(Tally, BasisDividesTheFigureTaken) {
  const json whole = tally_json(kHydrogenation);
  const json per_water = tally_json(kHydrogenation, {"--basis", "water"});
  const double taken = whole["routes"]["taken"]["value"].get<double>();
  EXPECT_NEAR(per_water["per_mole_of"]["value"].get<double>(), taken / 2, 1e-5);
  EXPECT_EQ(per_water["per_mole_of"]["species"], "water");
  const Ran wrong = heatledger({"tally", kHydrogenation, "--basis", "toluene", "--json"});
  EXPECT_EQ(wrong.status, 1);
  EXPECT_EQ(json::parse(wrong.out)["error"]["code"], "ledger.basis_unknown");
}

TEST(Tally, QuotedTextAndTheSmilesOptionReadSmiles) {
  const json quoted = tally_json("\"CC(=O)O\"(l) + \"CCO\"(l) -> \"CCOC(C)=O\"(l) + water(l)");
  const json option = tally_json("CC(=O)O(l) + CCO(l) -> CCOC(C)=O(l) + O(l)", {"--smiles"});
  EXPECT_EQ(quoted["gas_298"], option["gas_298"]);
  EXPECT_EQ(quoted["as_written"], option["as_written"]);
  // CO is carbon monoxide as a formula and methanol as SMILES.
  EXPECT_EQ(tally_json("CO + 2 H2 -> CH3OH")["rows"][0]["formula"], "CO");
  EXPECT_EQ(tally_json("CO -> CO", {"--smiles"})["rows"][0]["formula"], "CH4O");
}

TEST(Tally, AnUnbalancedEquationIsAnsweredWithTheWaysToBalanceIt) {
  const Ran ran = heatledger({"tally", "CH4 + O2 -> CO2 + H2O", "--json"});
  EXPECT_EQ(ran.status, 1);
  const json answer = json::parse(ran.out);
  EXPECT_FALSE(answer["balanced"].get<bool>());
  EXPECT_EQ(answer["error"]["code"], "ledger.not_balanced");
  ASSERT_EQ(answer["proposals"].size(), 1u);
  EXPECT_EQ(answer["proposals"][0], "CH4 + 2 O2 -> CO2 + 2 H2O");
  const Ran text = heatledger({"tally", "CH4 + O2 -> CO2 + H2O"});
  EXPECT_EQ(text.status, 1);
  EXPECT_NE(text.out.find("CH4 + 2 O2 -> CO2 + 2 H2O"), std::string::npos) << text.out;
}

TEST(Tally, WrongInputNamesThePlace) {
  const Ran unknown = heatledger({"tally", "H2 + unobtainium -> water"});
  EXPECT_EQ(unknown.status, 1);
  EXPECT_TRUE(unknown.out.empty());
  EXPECT_NE(unknown.err.find("offset 5"), std::string::npos) << unknown.err;
  const Ran as_json = heatledger({"tally", "H2 + unobtainium -> water", "--json"});
  EXPECT_EQ(as_json.status, 1);
  const json error = json::parse(as_json.out)["error"];
  for (const char* key : {"code", "message", "where", "hint"}) EXPECT_TRUE(error.contains(key)) << key;
  EXPECT_EQ(heatledger({"tally", ""}).status, 1);
}

TEST(Tally, ReadsTheEquationFromStandardInput) {
  const Ran direct = heatledger({"tally", kHydrogenation, "--json"});
  const Ran piped = heatledger({"tally", "-", "--json"}, std::string(kHydrogenation) + "\n");
  EXPECT_EQ(piped.status, 0);
  EXPECT_EQ(piped.out, direct.out);
  const Ran two = heatledger({"tally", "-"}, "H2 -> H2\nO2 -> O2\n");
  EXPECT_EQ(two.status, 1);
  EXPECT_NE(two.err.find("bulk"), std::string::npos);
}

TEST(Tally, TextIsTheSameLedger) {
  const Ran ran = heatledger({"tally", kHydrogenation});
  EXPECT_EQ(ran.status, 0);
  EXPECT_TRUE(ran.err.empty()) << ran.err;
  for (const char* piece : {"nitrobenzene", "3 H₂", "→", "Sum of bonds", "As written", "formation", "±"}) {
    EXPECT_NE(ran.out.find(piece), std::string::npos) << piece;
  }
}

TEST(Tally, ContextStatesItsOwnFigures) {
  const json answer = tally_json(kHydrogenation, {"--set", "context"});
  ASSERT_FALSE(answer["routes"]["context"].is_null());
  EXPECT_EQ(answer["as_written"]["value"], answer["routes"]["context"]["value"]);
  // The columns are those of the bonds in context, and every row shows its lines.
  EXPECT_NEAR(answer["broken"].get<double>() - answer["formed"].get<double>(),
              answer["gas_298"]["value"].get<double>(), 1e-4);  // ten digits of 6 000 kJ
  for (const json& row : answer["rows"]) {
    double lines = 0;
    for (const json& line : row["bonds"]) lines += line["subtotal"].get<double>();
    EXPECT_NEAR(lines, row["per_mole"]["value"].get<double>(), 1e-4) << row["species"];
    EXPECT_TRUE(row.contains("carried_by"));
  }
  // -552.6 kJ/mol from CRC formation enthalpies; the estimate's own 95 % interval must reach it.
  EXPECT_NEAR(answer["as_written"]["value"].get<double>(), -552.6, answer["as_written"]["u95"].get<double>());
}

TEST(Tally, TemperaturesGiveTheFigureAsRun) {
  const json cold = tally_json("CH4 + 2 O2 -> CO2 + 2 H2O");
  EXPECT_TRUE(cold["as_run"]["value"].is_null());
  EXPECT_FALSE(cold["as_run"]["reason"].get<std::string>().empty());
  const json hot = tally_json("CH4 + 2 O2 -> CO2 + 2 H2O", {"--products-at", "1000 K"});
  double sum = hot["routes"]["taken"]["value"].get<double>();
  for (const json& line : hot["to_temperature"]) sum += line["value"].get<double>();
  EXPECT_NEAR(hot["as_run"]["value"].get<double>(), sum, 1e-5);
  // NIST-JANAF, 4th ed.: H(1000 K) - H(298.15 K) of CO2 33.397, of H2O 26.000 kJ/mol; together 85.40 with two
  // of water. The tolerance is the 1 per cent between that table and the polynomials.
  EXPECT_NEAR(hot["as_run"]["value"].get<double>() - hot["routes"]["taken"]["value"].get<double>(), 85.40,
              0.9);
  const Ran bare = heatledger({"tally", "H2 -> H2", "--products-at", "80"});
  EXPECT_EQ(bare.status, 1);
}

}  // namespace
}  // namespace heatledger::test
