// The page as it prints: without buttons, empty lines to type into, choices of view and headings over
// nothing.
#pragma once

#include "core/page/page.hpp"

namespace heatledger::page {

/// @param drawings  false: without them, for a terminal
Page print_view(const Page& page, bool drawings = true);

}  // namespace heatledger::page
