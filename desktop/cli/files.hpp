// Files in and out for both native faces.
#pragma once

#include <string>
#include <string_view>

#include "core/base/result.hpp"

namespace heatledger::cli {

/// Whole file; "-" is standard input. @errors file.cannot_read
Result<std::string> read_file(const std::string& path);

/// Writes a file whole or not at all: into a neighbour first, flushed to disk, then renamed over the old one.
/// A link is followed, the permissions of an existing file are kept. "-" is standard output.
/// @errors file.cannot_write
Status write_file(const std::string& path, std::string_view text);

}  // namespace heatledger::cli
