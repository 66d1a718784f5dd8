#include "core/thermo/species_enthalpy.hpp"
