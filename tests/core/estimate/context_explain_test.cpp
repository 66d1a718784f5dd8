#include "core/estimate/context_explain.hpp"

#include <algorithm>
#include <cmath>
#include <memory>

#include "core/estimate/context_observations.hpp"
#include "tests/core/estimate/context_support.hpp"

namespace heatledger::estimate {
namespace {

Explanation explained(Property property, const std::string& smiles, const ContextOptions& options = {}) {
  Result<Explanation> result = explain(property, graph_of(smiles), options);
  EXPECT_TRUE(result.ok()) << smiles;
  return result.ok() ? *result : Explanation{};
}

double total(const Explanation& explanation) {
  double sum = 0;
  for (const ContextLine& line : explanation.lines) sum += line.total;
  return sum;
}

const ContextLine* find(const Explanation& explanation, LineKind kind) {
  const auto at = std::find_if(explanation.lines.begin(), explanation.lines.end(),
                               [&](const ContextLine& l) { return l.kind == kind; });
  return at == explanation.lines.end() ? nullptr : &*at;
}

TEST(ContextExplain, LinesAddUpToTheEstimate) {
  for (const char* smiles : {"CCOC(C)=O", "c1ccc2ccccc2c1", "CC(C)CC(C)(C)C", "OCC(O)CO", "C1CC2CCC1C2",
                             "[H][H]", "O", "ClC(Cl)(Cl)Cl", "Cc1ccccc1O", "*CC(*)c1ccccc1", "*CC(*)Cl"}) {
    for (const Property property : {Property::GasFormation, Property::Vaporisation298,
                                    Property::GasHeatCapacity, Property::LiquidHeatCapacity298}) {
      for (const bool estimate_only : {false, true}) {
        const Explanation explanation = explained(property, smiles, {.estimate_only = estimate_only});
        // Rounding of sums of up to 1e7 J/mol.
        EXPECT_NEAR(total(explanation), explanation.sum, 2e-3) << smiles;
        if (property == Property::GasFormation) {
          EXPECT_NEAR(explanation.gas_atoms - explanation.sum, explanation.prediction.value, 2e-3) << smiles;
        }
      }
    }
  }
}

TEST(ContextExplain, NeedsNoDeviationWhereNoRowSpeaksOfTheMolecule) {
  // Without the own row the bonds, rings and contacts alone are the estimate: nothing is left to be explained
  // away.
  for (const char* smiles : {"CCOC(C)=O", "c1ccc2ccccc2c1", "OCC(O)CO", "*CC(*)Cl"}) {
    EXPECT_EQ(
        find(explained(Property::GasFormation, smiles, {.estimate_only = true}), LineKind::OwnDeviation),
        nullptr)
        << smiles;
  }
  EXPECT_NE(find(explained(Property::GasFormation, "CCOC(C)=O"), LineKind::OwnDeviation), nullptr);
}

TEST(ContextExplain, CountsEveryBondOnce) {
  const Explanation ethanol = explained(Property::GasFormation, "CCO");
  double bonds = 0;
  for (const ContextLine& line : ethanol.lines) {
    if (line.kind == LineKind::Bond) bonds += line.count;
  }
  EXPECT_EQ(bonds, 8);
  const auto at = std::find_if(ethanol.lines.begin(), ethanol.lines.end(),
                               [](const ContextLine& l) { return l.text == "in CH₃ on CH₂(O)"; });
  ASSERT_NE(at, ethanol.lines.end());
  EXPECT_EQ(at->bond, "C–H");
  EXPECT_EQ(at->count, 3);
}

TEST(ContextExplain, CountsTheBondsOfOneUnitWithItsLinkOnce) {
  const Explanation unit = explained(Property::GasFormation, "*CC(*)Cl");
  double carbon_carbon = 0, carbon_chlorine = 0, carbon_hydrogen = 0;
  for (const ContextLine& line : unit.lines) {
    if (line.bond == "C–C") carbon_carbon += line.count;
    if (line.bond == "C–Cl") carbon_chlorine += line.count;
    if (line.bond == "C–H") carbon_hydrogen += line.count;
  }
  EXPECT_EQ(carbon_carbon, 2);
  EXPECT_EQ(carbon_chlorine, 1);
  EXPECT_EQ(carbon_hydrogen, 3);
}

TEST(ContextExplain, NamesStrainResonanceAndHydrogenBonds) {
  const Explanation cyclopropane = explained(Property::GasFormation, "C1CC1");
  ASSERT_NE(find(cyclopropane, LineKind::Ring), nullptr);
  // Conventional ring strain 115 kJ/mol: P. v. R. Schleyer and others, J. Am. Chem. Soc. 92 (1970) 2377. The
  // line holds only what the bonds' own surroundings do not carry already, hence the wide band.
  EXPECT_NEAR(find(cyclopropane, LineKind::Ring)->total / 1000, -115, 35);
  EXPECT_EQ(find(cyclopropane, LineKind::Ring)->text, "rings: strain");
  EXPECT_NE(find(explained(Property::GasFormation, "OCCO"), LineKind::HydrogenBond), nullptr);
  EXPECT_EQ(find(explained(Property::GasFormation, "CCCC"), LineKind::Ring), nullptr);
}

TEST(ContextExplain, GivesTheWeightsOfItsRows) {
  // The weight of a row is what the estimate moves by when the row moves: a measurement with the row's own ±
  // added a second time shows the same compound in front.
  const Explanation own = explained(Property::GasFormation, "CCOC(C)=O");
  ASSERT_FALSE(own.rows.empty());
  EXPECT_EQ(own.rows.front().name, "Ethyl acetate");
  EXPECT_GT(own.rows.front().weight, 0.5);
  const Explanation estimate = explained(Property::GasFormation, "CCOC(C)=O", {.estimate_only = true});
  for (const ReferenceRow& row : estimate.rows) EXPECT_NE(row.name, "Ethyl acetate");
  EXPECT_EQ(estimate.rows.size(), 10u);
  EXPECT_FALSE(estimate.rows.front().sources.empty());
}

TEST(ContextExplain, NamesUnseenSurroundings) {
  const Explanation odd = explained(Property::GasFormation, "N1N2N3N1N4N2N34");
  EXPECT_FALSE(odd.unseen.empty());
  EXPECT_TRUE(explained(Property::GasFormation, "CCCCC").unseen.empty());
}

TEST(ContextExplain, TakesMeasurementsIn) {
  Measurement measurement;
  measurement.terms.push_back({1, std::make_shared<const ContextMolecule>(molecule_of("CCCCCC(=O)OCCCl"))});
  measurement.value = -650000;
  measurement.u95 = 2000;
  Observations observations;
  ASSERT_TRUE(observations.add(measurement).ok());
  const Explanation explanation =
      explained(Property::GasFormation, "CCCCCC(=O)OCCCl", {.observations = &observations});
  EXPECT_NEAR(total(explanation), explanation.sum, 2e-3);
  EXPECT_NE(find(explanation, LineKind::OwnDeviation), nullptr);
}

TEST(ContextExplain, RefusesTemperaturesItDoesNotTakeApart) {
  EXPECT_EQ(explain(Property::GasHeatCapacity, graph_of("CCO"), {.temperature = 500}).error().code,
            "estimate.temperature");
  EXPECT_EQ(explain(Property::GasFormation, graph_of("[Na]Cl")).error().code, "estimate.element");
}

}  // namespace
}  // namespace heatledger::estimate
