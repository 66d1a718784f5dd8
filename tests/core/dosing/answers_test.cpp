// A dosed charge put down by names, answered with figures, ± and words.
#include "core/dosing/answers.hpp"

#include <cmath>

#include "core/dosing/dosed_findings.hpp"
#include "tests/core/step/steps.hpp"

namespace heatledger::dosing {
namespace {

using molecule::Phase;
using step::Measure;
using step::Typed;
using step::test_steps::kZeroCelsius;

/// Acetic anhydride dosed to methanol, both liquid: acetate and acetic acid.
DosedInput esterification() {
  step::test_steps::Writer w;
  w.feed("methanol", kZeroCelsius + 50);
  w.part("methanol", Phase::Liquid, 12000);
  w.feed("anhydride", kZeroCelsius + 20);
  w.part("acetic anhydride", Phase::Liquid, 5000);
  w.reaction("acetic anhydride(l) + methanol(l) -> methyl acetate(l) + acetic acid(l)",
             step::ProgressKind::Extent, 0);
  w.typed_heat(-60e3, 3e3);
  DosedInput input;
  input.step = w.input;
  input.dosed = {false, true};
  input.kinetics.resize(1);
  input.kinetics[0].speed = Speed::ByRateLaw;
  input.kinetics[0].constant = Typed{2e-8, 3e-9};  // m³/(mol s)
  input.kinetics[0].reference = kZeroCelsius + 50;
  input.kinetics[0].activation_energy = Typed{65e3, 4e3};
  input.temperature = Typed{kZeroCelsius + 50, 0};
  input.dosing_time = Typed{3 * 3600, 0};
  return input;
}

DosedModel model_of(DosedInput input) {
  Result<DosedModel> model = DosedModel::of(std::move(input), step::test_steps::lookups());
  EXPECT_TRUE(model.ok()) << (model.ok() ? "" : model.error().message);
  CHECK(model.ok(), "the step of the suite can be read");
  return std::move(model).value();
}
Answers answered(const DosedModel& model) {
  Result<Answers> answers = answer(model);
  EXPECT_TRUE(answers.ok()) << (answers.ok() ? "" : answers.error().message);
  CHECK(answers.ok(), "the step of the suite can be worked out");
  return std::move(answers).value();
}
double value(const Answers& answers, FigureId id) {
  EXPECT_TRUE(figure(answers, id).has_value());
  return figure(answers, id).value_or(0);
}

TEST(DosedAnswers, MtsrIsTheTemperaturePlusTheOpenHeat) {
  const Answers a = answered(model_of(esterification()));
  const Moment& m = a.worst;
  // By hand from the amounts at that moment: the anhydride limits, the heat is at 25 °C plus the way from
  // there by the heat capacities of the species.
  EXPECT_NEAR(m.open[0], std::min(m.amounts[0], m.amounts[1]), 1e-9 * 5000);
  const Kettle& kettle = a.course->kettle();
  EXPECT_NEAR(value(a, FigureId::Mtsr),
              m.temperature - m.open[0] * kettle.reaction_heat(0, m.temperature) /
                                  kettle.heat_capacity(m.amounts, m.temperature),
              1e-9);
  EXPECT_GT(value(a, FigureId::AllAtOnce), value(a, FigureId::Mtsr));
  // The worst moment of this slow reaction is the end of dosing, when nothing is left to be stopped; with the
  // feed going on it is an early one, when the cooling has taken out nothing yet.
  EXPECT_NEAR(m.time, 3 * 3600, 1);
  EXPECT_GT(value(a, FigureId::FeedNotStopped), value(a, FigureId::Mtsr));
  EXPECT_LT(a.feeding.at, 0.2 * 3600);
  // The path goes to 99.9 % of the open heat; heat capacities that rise on the way end it lower.
  EXPECT_NEAR(a.failure.highest, value(a, FigureId::MtsrByEnthalpy), 0.1);
  EXPECT_LT(value(a, FigureId::MtsrByEnthalpy), value(a, FigureId::Mtsr));
  EXPECT_GT(value(a, FigureId::TimeToMtsr), value(a, FigureId::TimeToFastest));
}

TEST(DosedAnswers, SpreadIsThatOfTheInputs) {
  DosedInput input = esterification();
  const Answers a = answered(model_of(input));
  // All reacted, the heat set free moves with the heat of reaction: 3 of 60 kJ/mol, and a little with the
  // heat capacities that carry it from 25 to 50 °C.
  DosedInput fast = esterification();
  fast.kinetics[0].speed = Speed::AsFastAsDosed;
  const uncertainty::Figure heat = quantity(answered(model_of(fast)), FigureId::HeatSetFree).figure();
  EXPECT_NEAR(heat.u95 / heat.value, 0.05, 0.005);
  // Largest MTSR: by moving every typed figure in turn and adding squares.
  double sum = 0;
  const auto moved = [&](auto change, double part) {
    DosedInput other = esterification();
    change(other);
    const double slope = (value(answered(model_of(other)), FigureId::Mtsr) - value(a, FigureId::Mtsr)) / part;
    sum += slope * slope;
  };
  moved([](DosedInput& i) { i.kinetics[0].constant.value += 0.1 * 3e-9; }, 0.1);
  moved([](DosedInput& i) { i.step.reactions[0].heat.as_written.add(uncertainty::Quantity(-300), 1); }, 0.1);
  // Held at the reference temperature the activation energy has no part; the heat capacities have.
  EXPECT_GT(quantity(a, FigureId::Mtsr).u95(), std::sqrt(sum));
  EXPECT_LT(quantity(a, FigureId::Mtsr).u95(), 1.5 * std::sqrt(sum));
}

TEST(DosedAnswers, DosingTimeForACoolingCapacity) {
  DosedInput input = esterification();
  input.cooling = Typed{18e3, 0};
  const Answers a = answered(model_of(input));
  const double time = value(a, FigureId::DosingTime);
  EXPECT_GT(time, 0);
  input.dosing_time = Typed{time, 0};
  EXPECT_NEAR(value(answered(model_of(input)), FigureId::PeakCooling), 18e3, 1);
}

TEST(DosedAnswers, WithoutKineticsEverythingCountsAsChargedAtOnce) {
  DosedInput input = esterification();
  input.kinetics[0].speed = Speed::Unknown;
  const DosedModel model = model_of(input);
  const Answers a = answered(model);
  EXPECT_TRUE(a.nothing_known);
  EXPECT_FALSE(figure(a, FigureId::Mtsr).has_value());
  EXPECT_FALSE(figure(a, FigureId::PeakHeat).has_value());
  EXPECT_GT(value(a, FigureId::MeanDuty), 0);
  EXPECT_GT(value(a, FigureId::AllAtOnce), kZeroCelsius + 60);
  bool said = false;
  for (const step::FindingGroup& group : findings_of(model, a).groups) {
    for (const step::Finding& finding : group.findings)
      said = said || finding.why_missing.find("peak unknown: no rate law") == 0;
  }
  EXPECT_TRUE(said);
}

TEST(DosedAnswers, EveryFindingHasAFigureWordsOrAReason) {
  for (const Thermal thermal : {Thermal::Held, Thermal::Jacket, Thermal::Adiabatic}) {
    DosedInput input = esterification();
    input.thermal = thermal;
    input.jacket = Typed{kZeroCelsius + 20, 0};
    input.conductance_start = Typed{900, 50};
    const DosedModel model = model_of(input);
    const step::Findings findings = findings_of(model, answered(model));
    EXPECT_TRUE(findings.closes) << findings.closure;
    EXPECT_GE(findings.charts.size(), 4u);
    for (const step::FindingGroup& group : findings.groups) {
      for (const step::Finding& finding : group.findings) {
        EXPECT_TRUE(std::isfinite(finding.value.value())) << finding.id;
        EXPECT_TRUE(!finding.why_missing.empty() || !finding.label.empty()) << finding.id;
      }
    }
    for (const step::Chart& chart : findings.charts) {
      for (const step::ChartCurve& curve : chart.curves) {
        ASSERT_EQ(curve.x.size(), curve.y.size());
        for (std::size_t i = 0; i + 1 < curve.x.size(); ++i)
          EXPECT_LE(curve.x[i], curve.x[i + 1]) << chart.id;
      }
    }
  }
}

TEST(DosedAnswers, RefusesWhatIsMissing) {
  const auto code = [](DosedInput input) {
    const Result<DosedModel> model = DosedModel::of(std::move(input), step::test_steps::lookups());
    return model.ok() ? std::string() : model.error().code;
  };
  DosedInput input = esterification();
  input.dosed = {false, false};
  EXPECT_EQ(code(input), "dosing.nothing_dosed");
  input = esterification();
  input.dosing_time = Typed{0, 0};
  EXPECT_EQ(code(input), "dosing.no_time");
  input = esterification();
  input.thermal = Thermal::Jacket;
  EXPECT_EQ(code(input), "dosing.no_jacket");
  input = esterification();
  input.profile = {{0, 0}, {10, 0.5}};
  EXPECT_EQ(code(input), "dosing.profile");
}

}  // namespace
}  // namespace heatledger::dosing
