// What holds for every dosed charge.
#include <cmath>

#include "tests/core/dosing/systems.hpp"

namespace heatledger::dosing {
namespace {

using namespace test_systems;

/// Three feeds with profiles of their own, three reactions of all speeds, a vessel that takes up heat.
std::shared_ptr<DosedSystem> crowded(Thermal thermal) {
  Charge charge;
  charge.thermal = thermal;
  charge.ua = 800;
  charge.ua_end = 1300;
  charge.activation_energy = 60e3;
  charge.feed_temperature = 288.15;
  charge.jacket = 318.15;
  charge.end = 20000;
  auto system = charge.system();
  system->vessel_heat_capacity = 4e5;
  system->substances.push_back(
      {"D", 0.3, 0.3e-3,
       Enthalpy::tabulated([](double t) { return 450 * (t - 298.15) + 0.3 * (t * t - 298.15 * 298.15); },
                           [](double t) { return 450 + 0.6 * t; })});
  system->start.push_back(0);
  system->feeds[0].amounts.push_back(0);
  Result<Profile> steps = Profile::of({{0, 0}, {600, 0.2}, {3000, 0.2}, {3600, 0.7}, {9000, 1}});
  EXPECT_TRUE(steps.ok());
  system->feeds[0].profile = *steps;
  DosedFeed second;
  second.name = "more A";
  second.amounts = {800, 0, 0, 0, 0};
  second.enthalpy = 800 * 0.1 * 2000 * -10.0;
  second.profile = Profile::constant(4000, 3000);
  system->feeds.push_back(second);
  DosedReaction consecutive;  // C + B → D, half an order in B
  consecutive.name = "reaction 2";
  consecutive.terms = {{2, -1}, {1, -1}, {4, 1}};
  consecutive.heat = -90e3;
  consecutive.speed = Speed::ByRateLaw;
  consecutive.law.constant = 2e-6;
  consecutive.law.reference = 333.15;
  consecutive.law.factors = {{2, 1}, {1, 0.5}};
  system->reactions.push_back(consecutive);
  return system;
}

class Closure : public ::testing::TestWithParam<Thermal> {};

TEST_P(Closure, ElementsAndEnergyAtEveryMoment) {
  const auto system = crowded(GetParam());
  const Course course = followed(system);
  // C is A + B, D is A + 2 B: atoms of A and of B stand for elements.
  for (int i = 0; i <= 200; ++i) {
    const double t = 100.0 * i;
    const Moment m = course.at(t);
    double a = 5000, b = 0, enthalpy_fed = 0;
    for (const DosedFeed& feed : system->feeds) {
      const double share = feed.profile.share(t);
      a += share * feed.amounts[0];
      b += share * feed.amounts[1];
      enthalpy_fed += share * feed.enthalpy;
    }
    EXPECT_NEAR(m.amounts[0] + m.amounts[2] + m.amounts[4], a, 1e-9 * 5800);
    EXPECT_NEAR(m.amounts[1] + m.amounts[2] + 2 * m.amounts[4], b, 1e-9 * 5000);
    // Enthalpy of what is there from its own amounts and temperature, against all that came in.
    double there = 4e5 * (m.temperature - 298.15);
    for (std::size_t s = 0; s < 5; ++s)
      there += m.amounts[s] * system->substances[s].enthalpy.at(m.temperature);
    const double start = (4e5 + 1000 * 2000) * (333.15 - 298.15);
    const double came = start + enthalpy_fed + m.wall_heat + 180e3 * m.extents[0] + 90e3 * m.extents[1];
    EXPECT_NEAR(there, came, 1e-9 * (std::fabs(came) + 180e3 * 5000));
    for (const double amount : m.amounts) EXPECT_GE(amount, 0);
  }
}

TEST_P(Closure, WallHeatIsWhatTheCoolingAddsUpTo) {
  const Course course = followed(crowded(GetParam()));
  // Simpson's rule between the bends at 600, 3000, 3600, 4000, 7000, 9000 s.
  double sum = 0, from = 0;
  for (const double to : {600.0, 3000.0, 3600.0, 4000.0, 7000.0, 9000.0, 20000.0}) {
    constexpr int kParts = 2000;
    for (int i = 0; i <= kParts; ++i) {
      const double t = from + (to - from) * i / kParts;
      const double weight = i == 0 || i == kParts ? 1 : i % 2 == 1 ? 4 : 2;
      sum -= weight * course.at(t, i == kParts).cooling * (to - from) / kParts / 3;
    }
    from = to;
  }
  // Adiabatic: both are nothing at all. Else the integration is to 1e-7 a step.
  EXPECT_NEAR(course.at(20000).wall_heat, sum, 2e-6 * 1e9);
}

INSTANTIATE_TEST_SUITE_P(AllWays, Closure,
                         ::testing::Values(Thermal::Held, Thermal::Jacket, Thermal::Adiabatic));

TEST(DosedInvariants, GridOfTheAnswersHasNoPartInThem) {
  const auto system = crowded(Thermal::Jacket);
  const Course one = followed(system), other = followed(system);
  std::vector<double> coarse, fine;
  for (int i = 0; i <= 10; ++i) coarse.push_back(one.at(2000.0 * i).temperature);
  for (int i = 0; i <= 1000; ++i) {
    const double temperature = other.at(20.0 * i).temperature;
    if (i % 100 == 0) fine.push_back(temperature);
  }
  for (std::size_t i = 0; i < coarse.size(); ++i) EXPECT_NEAR(coarse[i], fine[i], 1e-9);
  const auto mtsr = [](const Moment& m) { return m.mtsr; };
  EXPECT_EQ(one.highest(mtsr).value, other.highest(mtsr).value);
}

TEST(DosedInvariants, OrderOfSubstancesHasNoPartInThem) {
  Charge charge;
  charge.thermal = Thermal::Jacket;
  charge.ua = charge.ua_end = 1000;
  const auto system = charge.system();
  const auto turned = std::make_shared<DosedSystem>(*system);
  const std::vector<std::size_t> place = {2, 3, 0, 1};
  for (std::size_t i = 0; i < 4; ++i) {
    turned->substances[place[i]] = system->substances[i];
    turned->start[place[i]] = system->start[i];
    turned->feeds[0].amounts[place[i]] = system->feeds[0].amounts[i];
  }
  for (DosedReaction::Term& term : turned->reactions[0].terms) term.substance = place[term.substance];
  for (RateLaw::Factor& factor : turned->reactions[0].law.factors) factor.substance = place[factor.substance];
  const Course a = followed(system), b = followed(turned);
  EXPECT_NEAR(a.at(7200).temperature, b.at(7200).temperature, 1e-6);
}

TEST(DosedInvariants, TwiceTheChargeIsTwiceTheHeat) {
  Charge charge;
  charge.activation_energy = 60e3;
  const auto one = charge.system(), two = std::make_shared<DosedSystem>(*one);
  for (double& amount : two->start) amount *= 2;
  for (double& amount : two->feeds[0].amounts) amount *= 2;
  two->feeds[0].enthalpy *= 2;
  const Moment a = followed(one).at(5000), b = followed(two).at(5000);
  EXPECT_NEAR(b.cooling, 2 * a.cooling, 1e-6 * b.cooling);
  EXPECT_NEAR(b.mtsr, a.mtsr, 1e-6);
}

// A later tolerance decides nothing: ten times sharper moves the answers by less than is printed.
TEST(DosedInvariants, SharperToleranceMovesNothing) {
  const auto system = crowded(Thermal::Jacket);
  RunOptions sharp;
  sharp.relative = 1e-10;
  sharp.absolute = 1e-12;
  const Course usual = followed(system), sharper = followed(system, sharp);
  for (int i = 1; i <= 20; ++i)
    EXPECT_NEAR(usual.at(1000.0 * i).temperature, sharper.at(1000.0 * i).temperature, 1e-3) << i;
}

TEST(DosedProfile, RefusesWhatIsNoProfile) {
  const std::vector<std::vector<ProfilePoint>> bad = {
      {},
      {{0, 0}},
      {{0, 0}, {0, 1}},
      {{10, 0}, {5, 1}},
      {{0, 0}, {5, 0.7}, {6, 0.6}, {7, 1}},
      {{0, 0.1}, {5, 1}},
      {{0, 0}, {5, 0.9}},
      {{-1, 0}, {5, 1}},
      {{0, 0}, {std::nan(""), 1}},
  };
  for (const std::vector<ProfilePoint>& points : bad) {
    const Result<Profile> profile = Profile::of(points, "here");
    ASSERT_FALSE(profile.ok()) << points.size();
    EXPECT_EQ(profile.error().code, "dosing.profile");
    EXPECT_EQ(profile.error().where, "here");
  }
}

TEST(DosedProfile, WhatIsLeftAfterAMoment) {
  const Result<Profile> profile = Profile::of({{100, 0}, {200, 0.5}, {400, 1}});
  ASSERT_TRUE(profile.ok());
  EXPECT_EQ(profile->share(50), 0);
  EXPECT_NEAR(profile->share(300), 0.75, 1e-15);
  const Profile rest = profile->after(150);
  EXPECT_NEAR(rest.share(50), 0.25 / 0.75, 1e-15);
  EXPECT_EQ(rest.last(), 250);
  EXPECT_EQ(profile->after(50).first(), 50);
}

// Order zero goes on at full rate until nothing is left, and takes no more.
TEST(DosedRateLaw, OrderZeroStopsWhereNothingIsLeft) {
  Charge charge;
  charge.end = 40000;
  const auto system = charge.system();
  system->reactions[0].law.factors = {};
  system->reactions[0].law.constant = 0.3;  // mol/(m³ s): 4500 to 7200 s at 1 to 1.5 m³
  const Course course = followed(system);
  const Moment end = course.at(40000);
  EXPECT_NEAR(end.conversion, 1, 1e-5);
  EXPECT_NEAR(course.at(5000).rates[0], 0.3 * course.at(5000).volume, 1e-3);
  for (const double t : {10.0, 100.0, 12000.0, 14000.0, 20000.0}) EXPECT_GE(course.at(t).amounts[0], 0) << t;
}

}  // namespace
}  // namespace heatledger::dosing
