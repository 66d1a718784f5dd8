// What the readers of typed rows have in common: where an error stands, and what a figure rests on. Not for
// callers outside this room.
#pragma once

#include <string>

#include "core/base/result.hpp"

namespace heatledger::document {

/// A typed text without blanks and tabs at its ends.
inline std::string trimmed(const std::string& text) {
  const std::size_t first = text.find_first_not_of(" \t");
  return first == std::string::npos ? std::string()
                                    : text.substr(first, text.find_last_not_of(" \t") - first + 1);
}

/// The error with the path of its field in front of its offset: "bonds[0].value, offset 3".
inline Error placed(Error error, const std::string& field) {
  const bool offset = error.where.compare(0, 7, "offset ") == 0;
  error.where = field + (offset ? ", " + error.where : std::string());
  return error;
}

/// The source of a typed figure and the site table it was copied from.
/// @param unstated  where no source was typed
inline std::string stated_source(const std::string& source, const std::string& from,
                                 const char* unstated = "typed on this sheet, no source given") {
  return (source.empty() ? unstated : source) + (from.empty() ? std::string() : ", site table " + from);
}

}  // namespace heatledger::document
