// Errors that point into a text. The shape of Error itself stands in result.hpp.
#pragma once

#include <cstddef>
#include <string>
#include <utility>

#include "core/base/result.hpp"

namespace heatledger {

/// An Error whose `where` is "offset N".
/// @param offset  bytes from the start of the text that the user typed
inline Error error_at(std::string code, std::string message, std::size_t offset, std::string hint) {
  return Error{std::move(code), std::move(message), "offset " + std::to_string(offset), std::move(hint)};
}

}  // namespace heatledger
