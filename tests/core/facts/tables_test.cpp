// Every row of the compound table against itself: structure against formula, phases against phase changes,
// heat capacities against what a body of so many atoms can hold. No outside value is needed.
#include <gtest/gtest.h>

#include <cmath>
#include <map>
#include <string>

#include "core/base/number_text.hpp"
#include "core/facts/figures.hpp"
#include "core/facts/ions.hpp"
#include "core/facts/library.hpp"
#include "core/facts/name_key.hpp"
#include "core/facts/sources.hpp"
#include "core/molecule/formula.hpp"
#include "core/molecule/smiles.hpp"

namespace heatledger::facts {
namespace {

constexpr double kR = 8.314462618;  // J/(mol K)

template <typename Check>
void for_each_row(Check check) {
  const EmbeddedLibrary& library = Library::embedded();
  for (std::size_t row = 0; row < library.size(); ++row) check(library.at(row));
}

double atoms_in(const Compound& c) {
  const Result<molecule::Composition> composition = molecule::parse_formula(c.formula);
  double n = 0;
  if (composition) {
    for (const auto& [key, count] : composition->atoms) n += count;
  }
  return n;
}

double squares(const std::optional<Datum>& a, const std::optional<Datum>& b, const std::optional<Datum>& c) {
  return std::sqrt(a->u95 * a->u95 + b->u95 * b->u95 + c->u95 * c->u95);
}

TEST(CompoundTable, HoldsEnoughRows) {
  EXPECT_GE(Library::embedded().size(), 2000u);
}

TEST(CompoundTable, EveryStructureGivesTheStatedFormulaAndMass) {
  std::size_t structures = 0;
  for_each_row([&](const Compound& c) {
    const Result<molecule::Composition> stated = molecule::parse_formula(c.formula);
    ASSERT_TRUE(stated.ok()) << c.name << " " << c.formula;
    EXPECT_EQ(molecule::hill_formula(*stated), c.formula) << c.name;
    EXPECT_EQ(c.structure == Structure::None, c.smiles.empty()) << c.name;
    if (c.smiles.empty()) return;
    ++structures;
    const Result<molecule::Graph> graph = molecule::parse_smiles(c.smiles);
    ASSERT_TRUE(graph.ok()) << c.name << " " << c.smiles;
    const molecule::Composition drawn = molecule::composition(*graph);
    EXPECT_EQ(molecule::hill_formula(drawn), c.formula) << c.name << " " << c.smiles;
    EXPECT_DOUBLE_EQ(molecule::molar_mass(drawn), molecule::molar_mass(*stated)) << c.name;
    EXPECT_EQ(drawn.charge, 0) << c.name;
  });
  EXPECT_GE(structures, 2000u);
}

TEST(CompoundTable, FiguresAreFiniteAndCarryTheirUncertaintyAndSource) {
  for_each_row([](const Compound& c) {
    for (const FigureColumn& column : kFigureColumns) {
      const std::optional<Datum>& datum = figure(c, column.kind);
      if (!datum) continue;
      EXPECT_TRUE(std::isfinite(datum->value)) << c.name << " " << column.column;
      EXPECT_TRUE(datum->u95 > 0 || c.reference_element) << c.name << " " << column.column;
      EXPECT_FALSE(datum->source.empty()) << c.name << " " << column.column;
      EXPECT_EQ(datum->rivals.empty(), datum->why_taken.empty()) << c.name << " " << column.column;
      for (const Rival& rival : datum->rivals) {
        EXPECT_GT(std::abs(rival.value - datum->value), 0) << c.name << " " << column.column;
        EXPECT_NE(rival.source, datum->source) << c.name << " " << column.column;
      }
    }
  });
}

TEST(CompoundTable, GasAndLiquidDifferByTheVaporisationEnthalpyOrTheRowSaysWhyNot) {
  std::size_t compared = 0;
  for_each_row([&](const Compound& c) {
    const auto& gas = c.gas.formation_enthalpy;
    const auto& liquid = c.liquid.formation_enthalpy;
    if (!gas || !liquid) return;
    EXPECT_GT(gas->value, liquid->value) << c.name;
    if (!c.vaporisation_enthalpy_298 || c.vapour_associates || !c.remark.empty()) return;
    ++compared;
    EXPECT_LE(std::abs(gas->value - liquid->value - c.vaporisation_enthalpy_298->value),
              squares(gas, liquid, c.vaporisation_enthalpy_298))
        << c.name;
  });
  EXPECT_GE(compared, 400u);
}

TEST(CompoundTable, LiquidAndSolidDifferByTheFusionEnthalpyOrTheRowSaysWhyNot) {
  std::size_t compared = 0;
  for_each_row([&](const Compound& c) {
    const auto& liquid = c.liquid.formation_enthalpy;
    const auto& solid = c.solid.formation_enthalpy;
    if (!liquid || !solid) return;
    if (c.remark.empty()) {
      EXPECT_GT(liquid->value, solid->value - 500) << c.name;
    }
    const bool extrapolated = !liquid->remark.empty();  // a glass or melt carried down to 298 K
    if (!c.fusion_enthalpy || extrapolated || !c.remark.empty()) return;
    ++compared;
    double shift = 0, slack = 0;
    if (c.melting_point) {
      const double away = c.melting_point->value - 298.15;
      const bool both = c.liquid.heat_capacity && c.solid.heat_capacity;
      if (both) shift = -(c.liquid.heat_capacity->value - c.solid.heat_capacity->value) * away;
      // Heat capacities at 298 K stand for the whole way (10 J/(mol K)), or are not there at all (20).
      slack = std::abs(away) * (both ? 10 : 20);
    }
    EXPECT_LE(std::abs(liquid->value - solid->value - c.fusion_enthalpy->value - shift),
              squares(liquid, solid, c.fusion_enthalpy) + slack)
        << c.name;
  });
  EXPECT_GE(compared, 10u);
}

TEST(CompoundTable, SublimationTakesHeat) {
  for_each_row([](const Compound& c) {
    if (c.gas.formation_enthalpy && c.solid.formation_enthalpy) {
      // 15 kJ/mol is below every sublimation enthalpy at 298 K of a solid that is stable there.
      EXPECT_GT(c.gas.formation_enthalpy->value - c.solid.formation_enthalpy->value, 15000) << c.name;
    }
  });
}

TEST(CompoundTable, HeatCapacitiesArePlausible) {
  for_each_row([](const Compound& c) {
    const double n = atoms_in(c);
    if (c.gas.heat_capacity) {
      // Translation and rotation at least; every vibration fully excited, electronic levels and hindered
      // rotors at most.
      const double modes = n < 2 ? 0 : 3 * n - 5;
      EXPECT_GE(c.gas.heat_capacity->value, 2.49 * kR) << c.name;
      EXPECT_LE(c.gas.heat_capacity->value, (3.5 + modes) * kR + 4) << c.name;
    }
    // Three oscillators an atom are 24.9 J/(mol K); molecular crystals with C-H excite a third of them at 298
    // K.
    if (c.solid.heat_capacity) {
      EXPECT_GE(c.solid.heat_capacity->value, 6.0 * n) << c.name;
      EXPECT_LE(c.solid.heat_capacity->value, 31.5 * n + 6) << c.name;
    }
    if (c.liquid.heat_capacity) {
      EXPECT_GE(c.liquid.heat_capacity->value, 6.0 * n) << c.name;
      EXPECT_LE(c.liquid.heat_capacity->value, 46.0 * n + 20) << c.name;
    }
  });
}

TEST(CompoundTable, EntropiesArePlausible) {
  for_each_row([](const Compound& c) {
    if (c.gas.entropy) {
      EXPECT_GT(c.gas.entropy->value, 100) << c.name;  // hydrogen atom: 114.7
    }
    for (const auto* entropy : {&c.liquid.entropy, &c.solid.entropy}) {
      if (*entropy) {
        EXPECT_GT((*entropy)->value, 1.5) << c.name;  // diamond: 2.4
      }
      if (*entropy && c.gas.entropy) {
        EXPECT_LT((*entropy)->value, c.gas.entropy->value) << c.name;
      }
    }
  });
}

TEST(CompoundTable, TransitionsStandInTheirOrder) {
  for_each_row([](const Compound& c) {
    if (c.melting_point && c.boiling_point) {
      EXPECT_LT(c.melting_point->value, c.boiling_point->value) << c.name;
    }
    if (c.boiling_point && c.critical_temperature) {
      const double reduced = c.boiling_point->value / c.critical_temperature->value;
      // Guldberg: about two thirds; mercury 0.36, helium 0.81.
      EXPECT_GT(reduced, 0.35) << c.name;
      EXPECT_LT(reduced, 0.86) << c.name;
    }
    if (c.boiling_point && c.vaporisation_enthalpy_boiling) {
      const double trouton = c.vaporisation_enthalpy_boiling->value / c.boiling_point->value;
      // 75 to 115 J/(mol K) for most; helium 19 and hydrogen 44 are quantum liquids, chlorides that
      // dissociate reach 141.
      EXPECT_GT(trouton, 18) << c.name;
      EXPECT_LT(trouton, 145) << c.name;
    }
  });
}

TEST(CompoundTable, ElementsInTheirReferenceStateAreZero) {
  std::map<std::string, std::string> seen;
  for_each_row([&](const Compound& c) {
    if (!c.reference_element) return;
    const PhaseFacts& phase = c.reference_phase == 'g'   ? c.gas
                              : c.reference_phase == 'l' ? c.liquid
                                                         : c.solid;
    ASSERT_TRUE(phase.formation_enthalpy.has_value()) << c.name;
    EXPECT_EQ(phase.formation_enthalpy->value, 0) << c.name;
    EXPECT_EQ(phase.formation_enthalpy->u95, 0) << c.name;
    const Result<molecule::Composition> composition = molecule::parse_formula(c.formula);
    ASSERT_TRUE(composition.ok());
    EXPECT_EQ(composition->atoms.size(), 1u) << c.name;
    const std::string element = machine_number(composition->atoms.begin()->first);
    EXPECT_TRUE(seen.emplace(element, c.name).second) << c.name << " and " << seen[element];
  });
  EXPECT_GE(seen.size(), 85u);
}

TEST(CompoundTable, NoNameMeansTwoCompounds) {
  std::map<std::string, const Compound*> owner;
  const auto claim = [&](std::string_view name, const Compound& c) {
    const std::string key = name_key(name);
    ASSERT_FALSE(key.empty()) << c.name;
    const auto [at, fresh] = owner.emplace(key, &c);
    EXPECT_TRUE(fresh || at->second == &c) << name << ": " << at->second->name << " and " << c.name;
  };
  for_each_row([&](const Compound& c) {
    claim(c.name, c);
    if (!c.cas.empty()) claim(c.cas, c);
    for (const std::string_view synonym : c.synonyms) claim(synonym, c);
    EXPECT_EQ(Library::embedded().find_name(c.name), &c) << c.name;
  });
}

TEST(CompoundTable, CasNumbersHaveTheirCheckDigit) {
  for_each_row([](const Compound& c) {
    if (c.cas.empty()) return;
    int sum = 0, weight = 0;
    std::string digits;
    for (const char ch : c.cas) {
      if (ch != '-') digits += ch;
    }
    ASSERT_GE(digits.size(), 5u) << c.name;
    for (std::size_t i = digits.size() - 1; i-- > 0;) sum += (digits[i] - '0') * ++weight;
    EXPECT_EQ(sum % 10, digits.back() - '0') << c.name << " " << c.cas;
    EXPECT_EQ(c.cas[c.cas.size() - 2], '-') << c.cas;
    EXPECT_EQ(c.cas[c.cas.size() - 5], '-') << c.cas;
  });
}

TEST(Sources, AreSpeltOut) {
  for (const Source& source : sources()) {
    EXPECT_EQ(source.key.size(), 1u);
    EXPECT_GT(source.reference.size(), 30u) << source.name;
    EXPECT_FALSE(source.standing.empty()) << source.name;
    EXPECT_EQ(source_reference(source.name), source.reference);
    EXPECT_EQ(find_source(source.key), &source);
  }
  EXPECT_EQ(source_reference("own measurement"), "own measurement");
  EXPECT_EQ(find_source("?"), nullptr);
}

}  // namespace
}  // namespace heatledger::facts
