#include "core/estimate/bond_set.hpp"
