// The sheet that speed is measured on.
#pragma once

#include <array>

namespace heatledger::bench {

/// Twenty reactions over sixty species, of the library and of plain SMILES; three of them new in each
/// reaction.
inline constexpr std::array<const char*, 20> twenty_reactions{
    "nitrobenzene(l) + 3 H2(g) -> aniline(l) + 2 H2O(l)",
    "toluene(l) + Cl2(g) -> benzyl chloride(l) + HCl(g)",
    "acetic acid(l) + ethanol(l) -> ethyl acetate(l) + water(l)",
    "methanol(g) + 3/2 O2(g) -> CO2(g) + 2 H2O(g)",
    "acetone(l) + H2(g) -> 2-propanol(l)",
    "ethylene(g) + HBr(g) -> \"CCBr\"(g)",
    "propane(g) -> propylene(g) + H2(g)",
    "\"CCCC=C\"(l) + H2(g) -> \"CCCCC\"(l)",
    "benzene(l) + 3 H2(g) -> cyclohexane(l)",
    "phenol(l) + \"CC(=O)Cl\"(l) -> \"CC(=O)Oc1ccccc1\"(l) + HCl(g)",
    "\"CCC=O\"(l) + H2(g) -> \"CCCO\"(l)",
    "\"C1CC1\"(g) -> \"CC=C\"(g)",
    "\"CCN\"(g) + \"CC(=O)O\"(l) -> \"CCNC(C)=O\"(l) + H2O(l)",
    "\"C=CC=C\"(g) + \"C=C\"(g) -> \"C1=CCCCC1\"(l)",
    "\"CC#N\"(l) + 2 H2(g) -> \"CCN\"(g)",
    "\"C1CO1\"(g) + H2O(l) -> \"OCCO\"(l)",
    "\"CS\"(g) + \"CO\"(l) -> \"CSC\"(l) + H2O(l)",
    "\"Clc1ccccc1\"(l) + \"O\"(l) -> \"Oc1ccccc1\"(s) + HCl(g)",
    "\"CC(C)O\"(l) + \"CCC(=O)O\"(l) -> \"CCC(=O)OC(C)C\"(l) + H2O(l)",
    "\"COC(C)(C)C\"(l) -> \"CC(C)=C\"(g) + \"CO\"(l)"};

}  // namespace heatledger::bench
