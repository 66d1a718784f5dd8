// Where answers and complaints go.
#pragma once

#include <string_view>

#include "core/base/result.hpp"

namespace heatledger::cli {

/// Writes to standard output. A reader that went away ends the program quietly (SIGPIPE is left at its
/// default).
/// @return false when it cannot be written (disk full); the complaint is made here
bool print(std::string_view text);

/// "heatledger: message (where)" with the hint on the next line, on standard error.
void complain(const Error& error);

/// The same for `--json`: the error object on standard output, so that a program that reads answers finds it
/// there.
void complain_json(const Error& error);

}  // namespace heatledger::cli
