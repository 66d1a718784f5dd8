// The commands of `heatledger`: each adds itself to the parser and runs in a file of its own.
#pragma once

#include <CLI/CLI.hpp>
#include <functional>

namespace heatledger::cli {

/// Exit status of every command.
enum ExitStatus : int { kDone = 0, kWrongInput = 1, kUsage = 2 };

/// What the parser found: the chosen command, to be run once everything is parsed. The answer is the exit
/// status.
using Chosen = std::function<int()>;

void add_tally(CLI::App& app, Chosen& chosen);
void add_species(CLI::App& app, Chosen& chosen);
void add_work(CLI::App& app, Chosen& chosen);
void add_bulk(CLI::App& app, Chosen& chosen);
void add_compare(CLI::App& app, Chosen& chosen);
void add_window(CLI::App& app, Chosen& chosen);

}  // namespace heatledger::cli
