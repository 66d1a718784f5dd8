#include <gtest/gtest.h>

#include "core/thermo/species_enthalpy.hpp"

namespace heatledger::thermo {
namespace {

using molecule::Phase;

std::shared_ptr<const facts::Species> species(const char* name) {
  Result<std::shared_ptr<const facts::Species>> read = facts::resolve_species(name, false);
  EXPECT_TRUE(read.ok()) << name;
  return *read;
}

double to_liquid(const char* name) {
  const Result<Sourced> change = gas_to_phase(*species(name), Phase::Liquid);
  EXPECT_TRUE(change.ok()) << name;
  return change.ok() ? change->value.value() / 1000 : 0;
}

// Majer and Svoboda, Enthalpies of Vaporization of Organic Compounds (1985), and CODATA for water: at 298.15
// K. 0.6 kJ/mol: formation enthalpies of two phases from two tables differ by that much from the direct
// measurement.
TEST(GasToPhase, IsMinusTheVaporisationEnthalpy) {
  EXPECT_NEAR(to_liquid("water"), -44.0, 0.05);
  EXPECT_NEAR(to_liquid("nitrobenzene"), -55.0, 1.2);  // CRC formation enthalpies differ by 56.0
  EXPECT_NEAR(to_liquid("aniline"), -55.8, 0.6);
  EXPECT_NEAR(to_liquid("ethanol"), -42.3, 0.6);
  EXPECT_NEAR(to_liquid("bromine"), -30.9, 0.1);
}

TEST(GasToPhase, IsNothingForGas) {
  const Result<Sourced> change = gas_to_phase(*species("water"), Phase::Gas);
  ASSERT_TRUE(change.ok());
  EXPECT_EQ(change->value.value(), 0);
  EXPECT_EQ(change->value.u95(), 0);
}

TEST(GasToPhase, SaysWhenTheVapourAssociates) {
  const Result<Sourced> change = gas_to_phase(*species("acetic acid"), Phase::Liquid);
  ASSERT_TRUE(change.ok());
  EXPECT_FALSE(change->cautions.empty());
}

TEST(GasToPhase, HasNoFigureForAStructureThatNobodyTabulated) {
  Result<std::shared_ptr<const facts::Species>> unknown = facts::resolve_species("CCCC(C)(Cl)CC(F)CO", true);
  ASSERT_TRUE(unknown.ok());
  const Result<Sourced> change = gas_to_phase(**unknown, Phase::Liquid);
  ASSERT_FALSE(change.ok());
  EXPECT_EQ(change.error().code, "thermo.no_phase_change_data");
}

TEST(TabulatedFormation, IsZeroForElementsInTheirReferenceState) {
  const struct {
    const char* name;
    Phase phase;
  } cases[] = {{"hydrogen", Phase::Gas},
               {"graphite", Phase::Solid},
               {"bromine", Phase::Liquid},
               {"sulfur", Phase::Solid}};
  for (const auto& c : cases) {
    const Result<Sourced> formation = tabulated_formation(*species(c.name), c.phase);
    ASSERT_TRUE(formation.ok()) << c.name;
    EXPECT_EQ(formation->value.value(), 0) << c.name;
  }
}

// CODATA Key Values 1989: bromine gas 30.91 ± 0.11 kJ/mol, not an element in its reference state.
TEST(TabulatedFormation, TellsBromineGasFromLiquid) {
  const Result<Sourced> formation = tabulated_formation(*species("bromine"), Phase::Gas);
  ASSERT_TRUE(formation.ok());
  EXPECT_NEAR(formation->value.value() / 1000, 30.9, 0.15);
}

TEST(PhaseTaken, LeavesAWrittenPhaseAndFillsAMissingOne) {
  EXPECT_EQ(phase_taken(*species("water"), Phase::Liquid).phase, Phase::Liquid);
  EXPECT_FALSE(phase_taken(*species("water"), Phase::Liquid).assumed);
  EXPECT_EQ(phase_taken(*species("water"), Phase::Unstated).phase, Phase::Gas);
  EXPECT_TRUE(phase_taken(*species("water"), Phase::Unstated).assumed);
  EXPECT_EQ(phase_taken(*species("graphite"), Phase::Unstated).phase, Phase::Solid);
}

TEST(FigureKey, IsOneForOneCompoundUnderTwoNames) {
  const auto a = species("water"), b = species("H2O");
  EXPECT_EQ(figure_key(uncertainty::SourceKind::Compound, *a, Phase::Gas),
            figure_key(uncertainty::SourceKind::Compound, *b, Phase::Gas));
  EXPECT_NE(figure_key(uncertainty::SourceKind::Compound, *a, Phase::Gas),
            figure_key(uncertainty::SourceKind::Compound, *a, Phase::Liquid));
}

}  // namespace
}  // namespace heatledger::thermo
