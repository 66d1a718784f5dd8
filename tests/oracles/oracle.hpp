// Bonds as two other toolkits count them. Each stands in its own file: their headers are slow to compile.
#pragma once

#include <map>
#include <optional>
#include <string>

namespace heatledger::test {

/// Plain spelling ("C=O", symbols in alphabetical order) to count.
using OracleTally = std::map<std::string, int>;

/// Kekulé structure with all hydrogens; empty where the toolkit refuses the text.
std::optional<OracleTally> rdkit_tally(const std::string& smiles);
std::optional<OracleTally> open_babel_tally(const std::string& smiles);

/// For the benchmark: the least work that reads, sanitises and counts, with aromatic bonds left as they are
/// and hydrogens as counts. Gives the number of bonds, 0 where the text is refused.
int rdkit_quick_count(const std::string& smiles);
int open_babel_quick_count(const std::string& smiles);

/// Silences what the toolkits print about texts they refuse.
void silence_rdkit();
void silence_open_babel();

}  // namespace heatledger::test
