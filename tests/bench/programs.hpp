// Figures that are taken from whole programs rather than from functions: memory, and what happens once.
#pragma once

#include <string>
#include <vector>

namespace heatledger::bench {

/// One run of `heatledger bulk`, the real program reading a file of lines and writing to nowhere.
struct BulkFigure {
  std::string what;
  int lines = 0;
  double per_second = 0;       ///< median over the runs, start of the program included
  double least = 0, most = 0;  ///< of the runs
  double per_cpu_second = 0;   ///< best of the runs, processor time only
  long kilobytes = 0;          ///< peak memory
};
/// Equations of four species by either set, short answers, some thousand to a million lines. Empty when the
/// program was not built.
std::vector<BulkFigure> bulk_figures();

/// A line that sheet_times printed.
struct SheetTime {
  std::string name;
  double median = 0, least = 0;  ///< [ms]
};
/// @param command  program with its arguments; empty when it failed
std::vector<SheetTime> sheet_times(const std::string& command);

}  // namespace heatledger::bench
