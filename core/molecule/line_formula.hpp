// Condensed line formulas (CH3CH2OH, (CH3)2CO, C6H5CH3, CH3COOH) to graphs, only where they are unambiguous.
#pragma once

#include <string_view>

#include "core/base/result.hpp"
#include "core/molecule/graph.hpp"

namespace heatledger::molecule {

/// Reads a condensed formula for its structure. What it knows, each by one fixed rule:
///   chain      each atom binds the last one with a free valence (C 4, N P 3, O S 2, H F Cl Br I 1);
///   hydrogens and
///              halogens belong to the atom they follow, at the beginning to the one they precede
///   brackets   after an atom: its substituents; in front: substituents of the next atom; (CH2)4: a chain of
///   four marks      - = # ≡ ; valences left over become multiple bonds where only one way exists (CH3CHO,
///   CH3CN) groups     CO COO CO2 as carbonyl and carboxyl, HOOC in front, NO2 and O2N as nitro, N3 as azide,
///   N2 as diazo, SO SO2 SO3H, (O) as =O,
///              C2H5, C2H3, C6H5; with a prefix n- i- s- t- one alkyl group, with o- m- p- one C6H4
/// Benzene rings come in Kekulé spelling with no atom marked aromatic (aromaticity.hpp does that); nitro as
/// [N+](=O)[O-].
/// @errors line_formula.ambiguous: several structures have this text, the message says why
///         line_formula.not_condensed: a molecular formula, or no chain with complete valences; `where` is
///         "offset N"
/// @complexity linear in the text and the atoms it stands for; at most 10,000 atoms
/// @example LineFormula.ReadsWhatEngineersWrite
Result<Graph> parse_line_formula(std::string_view text);

}  // namespace heatledger::molecule
