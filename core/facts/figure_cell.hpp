// One figure cell of the tables: `-109.16±0.11~7.3 a; -115.9 j (remark)`: value, ±, spread of all tables,
// source; figures of other tables that were not taken; remark. Source keys: tables/sources.tsv.
#pragma once

#include <deque>
#include <memory>
#include <string>
#include <string_view>
#include <unordered_map>
#include <vector>

#include "core/facts/compound.hpp"
#include "core/facts/figures.hpp"

namespace heatledger::facts {

/// Reads figure cells and owns what their data point to.
class FigureCells {
 public:
  FigureCells();
  /// CHECKs that the cell is well formed: embedded tables are part of the program.
  Datum read(std::string_view cell, const FigureColumn& column);

 private:
  std::string_view source_name(std::string_view keys);
  double default_u95(const FigureColumn& column, std::string_view source_keys, double value) const;

  struct Default {
    std::string_view figure, source;
    double absolute = 0, relative = 0;
  };
  std::vector<Default> defaults_;
  std::unordered_map<std::string_view, std::string>
      names_;  ///< of evaluations from several tables, by key text
  std::deque<std::vector<Rival>> rivals_;
  std::deque<std::string> texts_;
};

}  // namespace heatledger::facts
