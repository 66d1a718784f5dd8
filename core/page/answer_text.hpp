// Answers of the command line set for a terminal: the blocks of a small page, written as text.
#pragma once

#include <string>

#include "core/balance/ledger.hpp"
#include "core/balance/reaction.hpp"
#include "core/page/species_figures.hpp"

namespace heatledger::page {

/// The ledger with every bond line, totals, corrections, routes, sources and notes; ends with a newline.
std::string ledger_text(const balance::Ledger& ledger);
/// What is on each side of an equation that does not balance, and the ways to balance it.
std::string unbalanced_text(const balance::Reaction& reaction);
/// The figures of one compound with their sources.
std::string species_text(const SpeciesFigures& figures);

/// "C", "D", "13C", "charge": name of a key of molecule::ElementBalance.
std::string element_text(int key);

}  // namespace heatledger::page
