#include "core/units/constants.hpp"
