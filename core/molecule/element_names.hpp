// English names of the elements for sentences. Symbols and masses stand in elements.hpp.
#pragma once

#include <string_view>

namespace heatledger::molecule {

/// Lower-case IUPAC name of element 1 to 118 ("hydrogen", "aluminium"); empty elsewhere.
/// @source IUPAC Periodic Table of the Elements, 4 May 2022
std::string_view element_name(int atomic_number);

}  // namespace heatledger::molecule
