// Published heat capacities, enthalpy increments and phase changes: tests/data/checks/.
#include <gtest/gtest.h>

#include <cmath>
#include <cstdio>

#include "core/base/number_text.hpp"
#include "core/thermo/heating_path.hpp"
#include "core/thermo/phase_enthalpy.hpp"
#include "core/thermo/saturation.hpp"
#include "tests/core/support/test_files.hpp"

namespace heatledger::thermo {
namespace {

using molecule::Phase;

Phase phase_of(const std::string& letter) {
  return letter == "g" ? Phase::Gas : letter == "l" ? Phase::Liquid : Phase::Solid;
}

/// By structure where there is one; minerals and metals by name.
std::shared_ptr<const facts::Species> species_of(const std::string& name, const std::string& smiles) {
  Result<std::shared_ptr<const facts::Species>> read =
      facts::resolve_species(smiles.empty() ? name : smiles, !smiles.empty());
  EXPECT_TRUE(read.ok()) << name;
  return read.ok() ? *read : nullptr;
}

/// Enthalpy that saturated vapour has less than the ideal gas, kJ/mol, at the boiling point and, where that
/// lies below it, at 298.15 K: pc-reduced second virial coefficient after Pitzer and Curl in the form of
/// Abbott (Smith, Van Ness, Introduction to Chemical Engineering Thermodynamics, section on residual
/// properties).
double departure(const facts::Species& species, double boiling) {
  const std::optional<CriticalPoint> critical = critical_point(species);
  if (!critical) return 0;
  const double tc = critical->temperature, ratio = tc / boiling - 1;
  const double acentric = 3.0 / 7 * std::log10(critical->pressure / 101325) / ratio - 1;
  const auto at = [&](double t) {
    const Result<Saturation> pressure = vapour_pressure(species, t);
    if (!pressure.ok()) return 0.0;
    const double tr = t / tc,
                 factor = 0.083 - 1.097 / std::pow(tr, 1.6) + acentric * (0.139 - 0.894 / std::pow(tr, 4.2));
    return std::fabs(factor * pressure->value / critical->pressure * 8.314462618 * tc) / 1000;
  };
  return at(boiling) + (boiling < 298.15 ? at(298.15) : 0);
}

TEST(Published, HeatCapacitiesAt298) {
  const test::Table table = test::read_table("tests/data/checks/heat_capacities.tsv");
  ASSERT_EQ(table.rows.size(), 61u);
  for (const auto& row : table.rows) {
    const auto species = species_of(row[0], row[1]);
    if (species == nullptr) continue;
    const Result<PhaseEnthalpy> curve = PhaseEnthalpy::of(*species, phase_of(row[2]));
    ASSERT_TRUE(curve.ok()) << row[0] << ' ' << curve.error().message;
    EXPECT_NEAR(curve->heat_capacity(298.15), *parse_number(row[3]), *parse_number(row[4]))
        << row[0] << " (" << row[2] << "), " << row[5];
  }
}

TEST(Published, EnthalpyIncrementsOfGases) {
  const test::Table table = test::read_table("tests/data/checks/enthalpy_increments.tsv");
  ASSERT_EQ(table.rows.size(), 160u);
  for (const auto& row : table.rows) {
    const auto species = species_of(row[0], row[1]);
    if (species == nullptr) continue;
    const Result<PhaseEnthalpy> curve = PhaseEnthalpy::of(*species, phase_of(row[2]));
    ASSERT_TRUE(curve.ok()) << row[0];
    const double t = *parse_number(row[3]);
    ASSERT_TRUE(curve->increment_with_error(t).ok()) << row[0] << ' ' << t;
    EXPECT_NEAR(curve->increment(t) / 1000, *parse_number(row[4]), *parse_number(row[5]))
        << row[0] << " at " << row[3] << " K, " << row[8];
    // The heat capacity of the same source, to its last digit and half a per cent of rounding on the way.
    EXPECT_NEAR(curve->heat_capacity(t), *parse_number(row[6]), 0.005 * *parse_number(row[6])) << row[0];
  }
}

TEST(Published, PhaseChanges) {
  const test::Table table = test::read_table("tests/data/checks/phase_changes.tsv");
  ASSERT_EQ(table.rows.size(), 32u);
  int at_boiling = 0, at_298 = 0, fused = 0;
  for (const auto& row : table.rows) {
    const auto species = species_of(row[0], row[1]);
    if (species == nullptr || species->compound == nullptr) {
      ADD_FAILURE() << row[0] << " is not in the library";
      continue;
    }
    const double tolerance = *parse_number(row[7]);
    const std::optional<double> boiling = parse_number(row[2]), there = parse_number(row[3]),
                                here = parse_number(row[4]), fusion = parse_number(row[5]);
    // Single molecules are not what the table has of vapours that associate (carboxylic acids).
    if (species->compound->vapour_associates) continue;
    if (here) {
      const Result<Sourced> change = vaporisation_enthalpy(*species, 298.15);
      ASSERT_TRUE(change.ok()) << row[0] << ": " << change.error().message;
      // Formation enthalpies win over the vaporisation enthalpy, and then a caution says so.
      if (std::fabs(change->value.value() / 1000 - *here) > tolerance) {
        const double apart = change->value.value() / 1000 - *here;
        if (std::fabs(apart) > std::hypot(tolerance, change->value.u95() / 1000)) {
          EXPECT_FALSE(change->cautions.empty()) << row[0];
        }
        std::printf("  %s at 298.15 K: %.2f by formation enthalpies, table %.2f\n", row[0].c_str(),
                    change->value.value() / 1000, *here);
      }
      ++at_298;
    }
    if (there && boiling) {
      const Result<Sourced> change = vaporisation_enthalpy(*species, *boiling);
      ASSERT_TRUE(change.ok()) << row[0] << ": " << change.error().message;
      // Kirchhoff from 298.15 K: within the ± stated, on top of what the formation enthalpies differ there
      // and of what the real vapour departs from the ideal gas that is reckoned with.
      const Result<Sourced> start = vaporisation_enthalpy(*species, 298.15);
      const double apart = here && start.ok() ? std::fabs(start->value.value() / 1000 - *here) : 0;
      EXPECT_NEAR(change->value.value() / 1000, *there,
                  std::hypot(tolerance, change->value.u95() / 1000) + apart + departure(*species, *boiling))
          << row[0] << " at its boiling point";
      ++at_boiling;
    }
    if (fusion && species->compound->melting_point && species->compound->fusion_enthalpy) {
      const Result<Sourced> change = fusion_enthalpy(*species, species->compound->melting_point->value);
      ASSERT_TRUE(change.ok()) << row[0];
      EXPECT_NEAR(change->value.value() / 1000, *fusion, tolerance) << row[0] << " melts";
      ++fused;
    }
  }
  std::printf("phase changes: %d at the boiling point, %d at 298.15 K, %d of fusion\n", at_boiling, at_298,
              fused);
  EXPECT_GE(at_boiling, 24);
  EXPECT_GE(at_298, 20);
  EXPECT_GE(fused, 20);
}

}  // namespace
}  // namespace heatledger::thermo
