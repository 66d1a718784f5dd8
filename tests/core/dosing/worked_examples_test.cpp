// Worked dosed charges, from tests/data/checks/dosing.tsv.
#include <cmath>
#include <functional>
#include <map>

#include "core/dosing/answers.hpp"
#include "tests/core/dosing/systems.hpp"
#include "tests/core/step/steps.hpp"
#include "tests/core/support/test_files.hpp"

namespace heatledger::dosing {
namespace {

using molecule::Phase;
using step::Measure;
using step::Typed;
using step::test_steps::kZeroCelsius;
using Figures = std::map<std::string, double>;

Figures second_order() {
  const Course course = test_systems::followed(test_systems::Charge{}.system());
  const Moment end = course.at(7200);
  return {
      {"accumulated_B_end_of_feed_kmol", end.amounts[1] / 1000},
      {"max_accumulated_B_kmol", course.highest([](const Moment& m) { return m.amounts[1]; }).value / 1000},
      {"heat_rate_end_of_feed_kW", end.heat_rate / 1000},
      {"conversion_end_of_feed", end.conversion}};
}

/// A moment with a part of the feed in and a part of the extent of the whole step still open.
Figures mtsr(double accumulation, double mass) {
  DosedSystem system;
  for (const char* name : {"A", "B", "C", "S"}) {
    const double molar_mass = name[0] == 'C' ? 0.2 : 0.1;
    system.substances.push_back(
        {name, molar_mass, molar_mass / 1000, Enthalpy::constant(0, 2000 * molar_mass)});
  }
  // Of 1000 kg in all, `mass` is in; of an extent of 1 kmol `accumulation` is open.
  system.start = {1000 * accumulation, 1000 * accumulation, 0, 10000 * mass - 2000 * accumulation};
  system.start_temperature = kZeroCelsius + 60;
  DosedFeed rest;
  rest.amounts = {1000 * (1 - accumulation), 1000 * (1 - accumulation), 0,
                  10000 * (1 - mass) - 2000 * (1 - accumulation)};
  system.feeds = {rest};
  DosedReaction reaction;
  reaction.terms = {{0, -1}, {1, -1}, {2, 1}};
  reaction.heat = -150 * 1000 * 2000 / 1000.0;  // 150 K of 1000 kg at 2 kJ/(kg K), for 1 kmol
  reaction.speed = Speed::ByRateLaw;
  reaction.law.constant = 1e-30;
  reaction.law.factors = {{0, 1}, {1, 1}};
  system.reactions = {reaction};
  system.end = 10;
  Kettle kettle(system);
  std::vector<double> y(1, 0);
  kettle.choose_pivots(0, y);
  Moment moment;
  kettle.moment(0, y.data(), moment);
  EXPECT_NEAR(moment.accumulation, accumulation, 1e-12);
  return {{"MTSR_C", moment.mtsr - kZeroCelsius}};
}

/// A charge at 60 °C, something dosed to it as fast as it reacts.
Figures constant_rate(const char* charged, double kilograms, const char* dosed, Phase phase, double times,
                      const char* equation, double heat, double hours) {
  step::test_steps::Writer w;
  w.feed("charge", kZeroCelsius + 60);
  w.part(charged, Phase::Liquid, kilograms, Measure::Mass);
  const double molar_mass = w.input.substances[w.substance(charged)].species->molar_mass;
  w.feed("feed", kZeroCelsius + 60);
  w.part(dosed, phase, times * kilograms / molar_mass);
  w.reaction(equation, step::ProgressKind::Extent, 0);
  w.typed_heat(heat, 0, kZeroCelsius + 60);
  DosedInput input;
  input.step = w.input;
  input.dosed = {false, true};
  input.kinetics.resize(1);
  input.kinetics[0].speed = Speed::AsFastAsDosed;
  input.temperature = Typed{kZeroCelsius + 60, 0};
  input.dosing_time = Typed{hours * 3600, 0};
  const Result<DosedModel> model = DosedModel::of(std::move(input), step::test_steps::lookups());
  CHECK(model.ok(), "the step of the suite can be read");
  const Result<Answers> answers = answer(*model);
  CHECK(answers.ok(), "the step of the suite can be worked out");
  EXPECT_NEAR(figure(*answers, FigureId::Accumulation).value_or(1), 0, 1e-12);  // what rounding leaves
  EXPECT_NEAR(figure(*answers, FigureId::Mtsr).value_or(0), kZeroCelsius + 60, 1e-9);
  return {{"Q_kW", figure(*answers, FigureId::PeakHeat).value_or(0) / 1000},
          {"total_GJ", figure(*answers, FigureId::HeatSetFree).value_or(0) / 1e9},
          {"H2_kmol", times * kilograms / molar_mass / 1000}};
}

const std::map<std::string, std::function<Figures()>>& cases() {
  static const std::map<std::string, std::function<Figures()>> all = {
      {"semibatch-second-order", second_order},
      {"mtsr-accumulation", [] { return mtsr(0.3, 0.85); }},
      {"mtsr-accumulation-final", [] { return mtsr(0.12, 1); }},
      {"nitrobenzene-hydrogenation",
       [] {
         return constant_rate("nitrobenzene", 1000, "hydrogen", Phase::Gas, 3,
                              "nitrobenzene(l) + 3 H2(g) -> aniline(l) + 2 H2O(l)", -552.6e3, 4);
       }},
      {"benzene-nitration-semibatch",
       [] {
         return constant_rate("benzene", 780, "nitric acid", Phase::Liquid, 1,
                              "benzene(l) + HNO3(l) -> nitrobenzene(l) + H2O(l)", -117e3, 3);
       }},
  };
  return all;
}

TEST(DosedWorkedExamples, AgreeWithTheirAnswers) {
  const test::Table table = test::read_table("tests/data/checks/dosing.tsv");
  const std::size_t id = table.column("id"), figure = table.column("figure"), value = table.column("value"),
                    tolerance = table.column("tolerance");
  std::map<std::string, Figures> computed;
  std::size_t compared = 0;
  for (const std::vector<std::string>& row : table.rows) {
    const auto known = cases().find(row[id]);
    ASSERT_NE(known, cases().end()) << row[id];
    if (computed.count(row[id]) == 0) computed[row[id]] = known->second();
    const auto found = computed[row[id]].find(row[figure]);
    ASSERT_NE(found, computed[row[id]].end()) << row[id] << " " << row[figure];
    EXPECT_NEAR(found->second, std::stod(row[value]), std::stod(row[tolerance]))
        << row[id] << " " << row[figure];
    ++compared;
  }
  EXPECT_GE(compared, cases().size());
}

}  // namespace
}  // namespace heatledger::dosing
