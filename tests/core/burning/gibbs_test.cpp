#include "core/burning/gibbs.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>

#include "tests/core/burning/random_flames.hpp"

namespace heatledger::burning {
namespace {

using namespace test_flames;

const std::vector<Gas>& gases() {
  return combustion_gases();
}

double share(const Equilibrium& e, std::string_view formula) {
  for (std::size_t j = 0; j < gases().size(); ++j) {
    if (gases()[j].formula == formula) return e.moles[j] / e.total;
  }
  ADD_FAILURE() << formula;
  return 0;
}

/// Moles of atoms of C, H, O, N, S, Cl, Ar.
Equilibrium at(const Atoms& atoms, double temperature, double pressure = 100000) {
  Result<Equilibrium> e = equilibrium_at(gases(), atoms, temperature, pressure);
  EXPECT_TRUE(e.ok()) << (e.ok() ? "" : e.error().message);
  return *e;
}

TEST(Gibbs, ConvergesOnAGridOfFlames) {
  const std::vector<FuelGas> fuels = fuel_gases();
  ASSERT_GE(fuels.size(), 60u);
  ASSERT_GE(gases().size(), 25u);
  Random random;
  RecordProperty("seed", std::to_string(random.state));
  int failures = 0;
  double closure = 0;
  for (std::size_t i = 0; i < 20160; ++i) {
    const Flame f = flame(fuels, random, i);
    const Result<Equilibrium> e = equilibrium_burnt(gases(), f.atoms, f.enthalpy, f.pressure);
    if (!e.ok()) {
      if (++failures < 5) ADD_FAILURE() << f.text << ": " << e.error().message;
      continue;
    }
    closure = std::max(closure, e->closure);
    // The last step of the temperature is below 1e-9 of it.
    if (std::abs(e->enthalpy - f.enthalpy) > 2e-9 * e->heat_capacity * e->temperature)
      ADD_FAILURE() << f.text << ": energy does not close";
  }
  EXPECT_EQ(failures, 0);
  EXPECT_LT(closure, 1e-9);
}

TEST(Gibbs, DoesNotDependOnTheStartOrTheOrderOfSpecies) {
  const std::vector<FuelGas> fuels = fuel_gases();
  Random random;
  std::vector<Gas> other = gases();
  for (std::size_t i = 0; i < 600; ++i) {
    const Flame f = flame(fuels, random, i);
    const Result<Equilibrium> first = equilibrium_burnt(gases(), f.atoms, f.enthalpy, f.pressure);
    ASSERT_TRUE(first.ok()) << f.text;
    EquilibriumOptions options;
    options.start_temperature = 400 + 5400 * random.next();
    for (std::size_t k = other.size(); k-- > 1;)
      std::swap(other[k], other[static_cast<std::size_t>(random.next() * static_cast<double>(k + 1))]);
    const Result<Equilibrium> second = equilibrium_burnt(other, f.atoms, f.enthalpy, f.pressure, options);
    ASSERT_TRUE(second.ok()) << f.text << " from " << *options.start_temperature << ": "
                             << second.error().message;
    // Both searches end below 1e-9 of the temperature.
    EXPECT_NEAR(second->temperature, first->temperature, 1e-8 * first->temperature) << f.text;
    for (std::size_t k = 0; k < other.size(); ++k) {
      for (std::size_t j = 0; j < gases().size(); ++j) {
        if (gases()[j].formula != other[k].formula) continue;
        EXPECT_NEAR(second->moles[k], first->moles[j], 1e-6 * first->moles[j] + 1e-12 * first->total)
            << f.text;
      }
    }
  }
}

TEST(Gibbs, ObeysTheLawOfMassAction) {
  // CO2 = CO + O2/2 and the water-gas shift, from the enthalpies and entropies of the same table.
  Atoms atoms{};
  of(atoms, Element::C) = 1, of(atoms, Element::H) = 4, of(atoms, Element::O) = 4.4,
            of(atoms, Element::N) = 16;
  for (const double t : {900.0, 1500.0, 2300.0, 3500.0}) {
    for (const double p : {10000.0, 100000.0, 5e6}) {
      const Equilibrium e = at(atoms, t, p);
      const auto gibbs = [&](const char* formula) {
        const GasFigures f = combustion_gas(formula).at(t, std::log(t));
        return f.h_rt - f.s_r;
      };
      const double log_k = gibbs("CO2") - gibbs("CO") - gibbs("O2") / 2;
      const double log_q =
          std::log(share(e, "CO") / share(e, "CO2")) + std::log(share(e, "O2") * p / 1e5) / 2;
      EXPECT_NEAR(log_q, log_k, 1e-9) << t << " K, " << p << " Pa";
      const double shift = gibbs("CO") + gibbs("H2O") - gibbs("CO2") - gibbs("H2");
      EXPECT_NEAR(std::log(share(e, "CO2") * share(e, "H2") / share(e, "CO") / share(e, "H2O")), shift, 1e-9);
    }
  }
}

TEST(Gibbs, HasTheLeastGibbsEnergy) {
  // Moving along a reaction either way from the answer raises G: CO + O2/2 = CO2 with traces at work.
  Atoms atoms{};
  of(atoms, Element::C) = 1, of(atoms, Element::H) = 1, of(atoms, Element::O) = 3,
            of(atoms, Element::S) = 0.2;
  of(atoms, Element::Cl) = 0.5, of(atoms, Element::N) = 2;
  const double t = 1800;
  const Equilibrium e = at(atoms, t);
  const auto energy = [&](const std::vector<double>& moles) {
    double sum = 0, total = 0;
    for (const double n : moles) total += n;
    for (std::size_t j = 0; j < moles.size(); ++j) {
      if (moles[j] <= 0) continue;
      const GasFigures f = gases()[j].at(t, std::log(t));
      sum += moles[j] * (f.h_rt - f.s_r + std::log(moles[j] / total));
    }
    return sum;
  };
  const auto index = [](std::string_view formula) {
    std::size_t j = 0;
    while (gases()[j].formula != formula) ++j;
    return j;
  };
  for (const double way : {1.0, -1.0}) {
    std::vector<double> moved = e.moles;
    const double d = way * 0.01 * e.moles[index("CO")];
    moved[index("CO")] += d;
    moved[index("O2")] += d / 2;
    moved[index("CO2")] -= d;
    EXPECT_GT(energy(moved), energy(e.moles));
  }
}

TEST(Gibbs, HeatCapacityFollowsTheComposition) {
  Atoms atoms{};
  of(atoms, Element::C) = 1, of(atoms, Element::H) = 4, of(atoms, Element::O) = 4, of(atoms, Element::N) = 15;
  const double t = 2600, d = 0.5;
  const double difference = (at(atoms, t + d).enthalpy - at(atoms, t - d).enthalpy) / (2 * d);
  const Equilibrium e = at(atoms, t);
  EXPECT_NEAR(e.heat_capacity, difference, 1e-5 * difference);  // central difference, second order
  EXPECT_GT(e.heat_capacity, 1.2 * e.frozen_heat_capacity);     // dissociation takes up heat
}

TEST(Gibbs, AbsentElementsStayAbsent) {
  // Tetrachloromethane has no hydrogen: all chlorine is Cl2, Cl and traces.
  Atoms atoms{};
  of(atoms, Element::C) = 1, of(atoms, Element::Cl) = 4, of(atoms, Element::O) = 2.4,
            of(atoms, Element::N) = 9;
  const Equilibrium e = at(atoms, 1200);
  EXPECT_EQ(share(e, "HCl"), 0);
  EXPECT_EQ(share(e, "H2O"), 0);
  EXPECT_EQ(share(e, "SO2"), 0);
  EXPECT_NEAR(share(e, "Cl2") + share(e, "Cl") / 2, 2 / e.total, 0.01 * 2 / e.total);
  // Argon alone, and one atom sort alone.
  Atoms argon{};
  of(argon, Element::Ar) = 2;
  EXPECT_NEAR(at(argon, 5000).total, 2, 1e-12);
}

TEST(Gibbs, NamesWhenSootWouldForm) {
  // Methane with a third of its oxygen, cold: carbon over graphite; lean: none. The Boudouard reaction 2 CO =
  // C + CO2 turns round near 973 K at 1 bar (K = 1; JANAF 1998: log Kf of CO2 less twice that of CO is zero
  // there).
  Atoms rich{}, lean{};
  of(rich, Element::C) = 1, of(rich, Element::H) = 4, of(rich, Element::O) = 0.6;
  of(lean, Element::C) = 1, of(lean, Element::H) = 4, of(lean, Element::O) = 5;
  EXPECT_GT(at(rich, 1000).carbon_activity, 1);
  EXPECT_LT(at(lean, 1000).carbon_activity, 1e-6);
  Atoms boudouard{};
  of(boudouard, Element::C) = 1.5,
                of(boudouard, Element::O) = 2;  // near equal parts of CO and CO2 before soot
  const Equilibrium cold = at(boudouard, 850), hot = at(boudouard, 1150);
  EXPECT_GT(cold.carbon_activity, 1);
  EXPECT_LT(hot.carbon_activity, 1);
}

TEST(Gibbs, RefusesWhatHasNoAnswer) {
  const Atoms none{};
  EXPECT_EQ(equilibrium_at(gases(), none, 1000, 1e5).error().code, "burning.no_atoms");
  Atoms nitrogen{};
  of(nitrogen, Element::N) = 1;
  EXPECT_EQ(equilibrium_at(gases(), nitrogen, 100, 1e5).error().code, "burning.temperature_range");
  EXPECT_EQ(equilibrium_at(gases(), nitrogen, 1000, 0).error().code, "burning.pressure");
  EXPECT_EQ(equilibrium_burnt(gases(), nitrogen, 1e9, 1e5).error().code, "burning.enthalpy_range");
  of(nitrogen, Element::N) = -1;
  EXPECT_EQ(equilibrium_at(gases(), nitrogen, 1000, 1e5).error().code, "burning.no_atoms");
}

}  // namespace
}  // namespace heatledger::burning
