// The page as it prints: without buttons, empty lines to type into, choices of view and headings over nothing.
#pragma once

#include "core/page/page.hpp"

namespace heatledger::page {

Page print_view(const Page& page);

}  // namespace heatledger::page
