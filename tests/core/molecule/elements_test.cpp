#include "core/molecule/elements.hpp"

#include <gtest/gtest.h>

namespace heatledger::molecule {
namespace {

TEST(Elements, EverySymbolReadsBackToItsNumber) {
  for (int z = 0; z <= 118; ++z) EXPECT_EQ(atomic_number(symbol(z)), z);
}

TEST(Elements, RefusesWhatIsNoSymbol) {
  for (const char* text : {"", "X", "cl", "CL", "Cll", "D", "A1", "é"})
    EXPECT_FALSE(atomic_number(text)) << text;
}

TEST(Elements, MassesAreTheAbridgedStandardOnes) {
  // IUPAC CIAAW, abridged standard atomic weights 2021.
  EXPECT_EQ(atomic_mass(1), 1.008);
  EXPECT_EQ(atomic_mass(6), 12.011);
  EXPECT_EQ(atomic_mass(8), 15.999);
  EXPECT_EQ(atomic_mass(17), 35.45);
  EXPECT_EQ(atomic_mass(92), 238.03);
  EXPECT_EQ(isotope_mass(1, 2), 2.014101778);
  EXPECT_EQ(isotope_mass(6, 13), 13);
}

TEST(Elements, MassesRiseWithTheNumberButForTheKnownPairs) {
  // Ar/K, Co/Ni, Te/I and Th/Pa are the inversions of the table; beyond uranium mass numbers take over.
  for (int z = 2; z <= 92; ++z) {
    const bool inverted = z == 19 || z == 28 || z == 53 || z == 91;
    EXPECT_EQ(atomic_mass(z) < atomic_mass(z - 1), inverted) << symbol(z);
  }
}

}  // namespace
}  // namespace heatledger::molecule
