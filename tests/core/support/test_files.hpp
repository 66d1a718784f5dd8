// Files of the source tree for the suites, natively and under node.
#pragma once

#include <string>
#include <vector>

namespace heatledger::test {

/// Whole text of a file named from the repository root ("tests/data/x.tsv"); fails the test when it cannot be
/// read.
std::string read_source_file(const std::string& path);
/// Names of the files in a folder named from the repository root, sorted.
std::vector<std::string> list_source_folder(const std::string& path);
/// Rows of a tab-separated table: first line the column names; lines that begin with '#' are comments.
struct Table {
  std::vector<std::string> columns;
  std::vector<std::vector<std::string>> rows;
  std::size_t column(const std::string& name) const;  ///< index; aborts the test program when there is none
};
Table read_table(const std::string& path);

/// One piece of bad input: first line "code offset", then the text up to the last line end.
struct BadCase {
  std::string code, offset, text;
};
BadCase read_bad_case(const std::string& path);

}  // namespace heatledger::test
