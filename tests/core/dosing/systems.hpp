// Short ways to write a dosed charge for the suites of this room.
#pragma once

#include <gtest/gtest.h>

#include <memory>

#include "core/dosing/run.hpp"

namespace heatledger::dosing::test_systems {

/// A + B → C, A in the vessel, B fed at a constant rate; all of one density and heat capacity.
struct Charge {
  double a = 5000, b = 5000;            ///< [mol]
  double volume_a = 1, volume_b = 0.5;  ///< [m³] of the charge and of the feed
  double dosing = 7200, end = 7200;     ///< [s]
  double heat = -180e3;                 ///< [J/mol]
  double k = 2e-7;                      ///< [m³/(mol s)]
  double activation_energy = 0;         ///< [J/mol]
  double temperature = 333.15, feed_temperature = 333.15, jacket = 333.15;  ///< [K]
  double cp = 2000;                                                         ///< [J/(kg K)]
  double ua = 0, ua_end = 0;                                                ///< [W/K]
  Speed speed = Speed::ByRateLaw;
  Thermal thermal = Thermal::Held;

  /// 1000 kg/m³: what is not A or B is solvent S of 0.1 kg/mol. A, B weigh 0.1 kg/mol, C 0.2 kg/mol.
  std::shared_ptr<DosedSystem> system() const {
    constexpr double density = 1000, molar_mass = 0.1;
    auto made = std::make_shared<DosedSystem>();
    const auto substance = [&](const char* name, double mass) {
      made->substances.push_back({name, mass, mass / density, Enthalpy::constant(0, cp * mass)});
    };
    substance("A", molar_mass);
    substance("B", molar_mass);
    substance("C", 2 * molar_mass);
    substance("S", molar_mass);
    made->start = {a, 0, 0, volume_a * density / molar_mass - a};
    made->start_temperature = temperature;
    DosedFeed feed;
    feed.name = "B";
    feed.amounts = {0, b, 0, volume_b * density / molar_mass - b};
    feed.enthalpy = volume_b * density * cp * (feed_temperature - 298.15);
    feed.profile = Profile::constant(0, dosing);
    made->feeds.push_back(feed);
    DosedReaction reaction;
    reaction.name = "reaction 1";
    reaction.terms = {{0, -1}, {1, -1}, {2, 1}};
    reaction.heat = heat;
    reaction.speed = speed;
    reaction.law.constant = k;
    reaction.law.reference = temperature;
    reaction.law.activation_energy = activation_energy;
    reaction.law.factors = {{0, 1}, {1, 1}};
    made->reactions.push_back(reaction);
    made->thermal = thermal;
    made->jacket_temperature = jacket;
    made->conductance_start = ua;
    made->conductance_end = ua_end;
    made->end = end;
    return made;
  }
};

inline Course followed(std::shared_ptr<const DosedSystem> system, const RunOptions& options = {}) {
  Result<Course> course = Course::follow(std::move(system), options);
  EXPECT_TRUE(course.ok()) << (course.ok() ? "" : course.error().message);
  CHECK(course.ok(), "the course of a suite can be followed");
  return std::move(course).value();
}

}  // namespace heatledger::dosing::test_systems
