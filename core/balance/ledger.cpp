#include "core/balance/ledger.hpp"
