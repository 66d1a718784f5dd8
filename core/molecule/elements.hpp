// Elements: symbols, standard atomic masses. Gas-atom formation enthalpies stand in core/facts.
#pragma once

#include <cstdint>
#include <optional>
#include <string_view>

namespace heatledger::molecule {

/// Symbol of element 1 to 118; "*" for 0.
/// @param atomic_number  0 to 118; anything else is a bug in the caller
std::string_view symbol(int atomic_number);
/// Atomic number of a symbol in its usual capitals ("Cl"; 0 for "*"); empty when there is no such element.
std::optional<int> atomic_number(std::string_view symbol);
/// Abridged standard atomic mass [g/mol]; conventional value where the standard gives an interval.
/// @source IUPAC CIAAW, Standard Atomic Weights 2021 (abridged)
double atomic_mass(int atomic_number);
/// Mass of an isotope [g/mol]: exact for 2H and 3H, the mass number elsewhere.
double isotope_mass(int atomic_number, int mass_number);

}  // namespace heatledger::molecule
