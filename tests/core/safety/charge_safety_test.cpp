#include "core/safety/charge_safety.hpp"

#include <gtest/gtest.h>

#include "tests/core/step/steps.hpp"

namespace heatledger::safety {
namespace {

using namespace step::test_steps;
using molecule::Phase;
using step::Finding;
using step::Typed;

const Finding* find(const step::Findings& findings, const std::string& id) {
  for (const step::FindingGroup& group : findings.groups) {
    for (const Finding& finding : group.findings) {
      if (finding.id == id) return &finding;
    }
  }
  return nullptr;
}

/// 10 mol A to B in 1 kg of a mass of 2 kJ/(kg K): 10 × `heat` / 2000 K of rise.
step::test_steps::Writer charge(double heat, const std::string& equation = "A(l) -> B(l)") {
  step::test_steps::Writer w;
  w.source.add("A", 0.1);
  w.source.add("B", 0.1);
  w.input.kind = step::StepKind::Charge;
  w.feed("charge", 333.15);
  w.part("A", Phase::Liquid, 10);
  w.reaction(equation, step::ProgressKind::Conversion, 1, "A");
  w.typed_heat(-heat);
  w.input.mass_heat_capacity = Typed{2000, 0};
  w.input.outlet.temperature = Typed{333.15, 0};
  return w;
}

TEST(ChargeSafety, ClassFollowsFromTheStep) {
  // A rise of 60 K from 60 °C: MTSR 120 °C.
  const step::StepResult r = solved(charge(12e3));
  SafetyInput typed;
  typed.technical_limit = Typed{373.15, 0};
  typed.td24 = Typed{423.15, 0};
  const step::Findings findings = charge_safety(r, typed);
  ASSERT_NE(find(findings, "mtsr"), nullptr);
  EXPECT_NEAR(find(findings, "mtsr")->value.value(), 393.15, 1e-9);
  EXPECT_EQ(find(findings, "criticality")->text, "class 3");
  EXPECT_EQ(find(findings, "severity")->text, "medium");
  typed.td24 = Typed{393.15, 0};  // equal to MTSR: the worse class
  EXPECT_EQ(find(charge_safety(r, typed), "criticality")->text, "class 4");
  typed.td24.reset();
  EXPECT_EQ(find(charge_safety(r, typed), "criticality")->text, "class needs T_D24");
  EXPECT_FALSE(find(charge_safety(r, typed), "td24")->why_missing.empty());
  typed.td24 = Typed{423.15, 0};
  typed.technical_limit.reset();  // code names have no vapour pressure
  EXPECT_EQ(find(charge_safety(r, typed), "criticality")->text,
            "class needs a maximum technical temperature");
}

TEST(ChargeSafety, ClassUnderSpreadIsTheWorstThatHoldsEnough) {
  // MTSR 115 ± 10 °C against 120 °C: z = 0.98.
  Writer w = charge(11e3);
  w.typed_heat(-11e3, 2e3);
  SafetyInput typed;
  typed.technical_limit = Typed{393.15, 0};
  typed.td24 = Typed{423.15, 0};
  const Finding* row = nullptr;
  const step::Findings findings = charge_safety(solved(w), typed);
  row = find(findings, "criticality");
  ASSERT_NE(row, nullptr);
  EXPECT_EQ(row->text, "class 3");
  EXPECT_NE(row->working[row->working.size() - 2].find("class 1"), std::string::npos);
  const Finding* mtsr = find(findings, "mtsr");
  ASSERT_TRUE(mtsr->unfavourable);
  EXPECT_NEAR(*mtsr->unfavourable, 388.15 + 10, 1e-6);
}

TEST(ChargeSafety, OpenVesselIsHeldByItsBoilingPoint) {
  Writer w = charge(12e3);
  w.part("toluene", Phase::Liquid, 1000);
  const step::Findings findings = charge_safety(solved(w), {});
  // Nearly all toluene: CRC Handbook, 95th edition: 110.63 °C; 1 % of the involatile lifts it by 0.35 K.
  EXPECT_NEAR(find(findings, "mtt")->value.value(), 383.78 + 0.35, 0.4);
  EXPECT_NE(find(findings, "mtt")->mark.find("open"), std::string::npos);
}

TEST(ChargeSafety, ClosedVesselReachesItsPermissiblePressureByGas) {
  // Nothing volatile: n R T / V beside the 101.325 kPa that were there at 60 °C.
  Writer w = charge(12e3, "A(l) -> B(l) + CO2(g)");
  SafetyInput typed;
  typed.permissible_pressure = Typed{6e5, 0};
  const step::StepResult r = solved(w);
  EXPECT_FALSE(find(charge_safety(r, typed), "mtt")->why_missing.empty());
  typed.free_volume = Typed{0.08, 0};
  const step::Findings findings = charge_safety(r, typed);
  const double slope = 101325 / 333.15 + 10 * 8.314462618 / 0.08;
  EXPECT_NEAR(find(findings, "mtt")->value.value(), 6e5 / slope, 1e-6);
  EXPECT_NEAR(find(findings, "gas.amount")->value.value(), 10, 1e-9);
  EXPECT_NEAR(find(findings, "gas.volume")->value.value(), 10 * 8.314462618 * 333.15 / 101325, 1e-9);
  EXPECT_NEAR(find(findings, "gas.pressure")->value.value(), slope * find(findings, "mtsr")->value.value(),
              1e-3);
  EXPECT_EQ(find(findings, "gas.peak_rate")->why_missing, "no rate law");
}

TEST(ChargeSafety, ThroughFlowHasNone) {
  Writer w = charge(12e3);
  w.input.kind = step::StepKind::ThroughFlow;
  EXPECT_TRUE(charge_safety(solved(w), {}).groups.empty());
}

TEST(ChargeSafety, AverageBondsAskForAMeasurement) {
  Writer w = charge(12e3);
  EXPECT_TRUE(charge_safety(solved(w), {}).cautions.empty());
  w.input.reactions[0].heat.typed = false;
  w.input.reactions[0].heat.source = "average";
  const step::Findings findings = charge_safety(solved(w), {});
  ASSERT_EQ(findings.cautions.size(), 1u);
  EXPECT_EQ(findings.cautions[0].compare(0, 12, "Measure this"), 0);
}

TEST(SubstanceFindings, ListGroupsWithTheirRanges) {
  Writer w;
  w.input.kind = step::StepKind::Charge;
  w.feed("charge", 298.15);
  w.part("benzene", Phase::Liquid, 1).part("nitric acid", Phase::Liquid, 1);
  w.reaction("benzene(l) + nitric acid(l) -> nitrobenzene(l) + water(l)", step::ProgressKind::Conversion, 0.9,
             "benzene");
  w.input.outlet.temperature = Typed{298.15, 0};
  const step::Findings findings = substance_findings(solved(w), false);
  ASSERT_EQ(findings.groups.size(), 1u);
  EXPECT_EQ(findings.groups[0].findings[0].text, "nitro group, 310 to 360 kJ/mol");
  EXPECT_NEAR(findings.groups[0].findings[1].value.value(), -1600 * (12 + 2.5 - 2) / 123.11 / 100, 1e-3);
  EXPECT_FALSE(findings.cautions.empty());
}

}  // namespace
}  // namespace heatledger::safety
