// The part of the JSON encoding that only requests use: what changed since a revision. Whole pages:
// writers.hpp.
#pragma once

#include <cstdint>
#include <string>

#include "core/page/page.hpp"

namespace heatledger::page {

/// Blocks that changed after revision `since`, as requests.hpp describes.
/// @param same_order  no block came, went or moved since then: the order is left out
std::string write_changes(const Page& page, std::uint64_t since, bool same_order);

}  // namespace heatledger::page
