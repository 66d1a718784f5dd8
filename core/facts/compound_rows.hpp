// Rows of tables/compounds.tsv: names and formulas at once, figures of a row when it is first asked for.
#pragma once

#include <atomic>
#include <cstdint>
#include <deque>
#include <mutex>
#include <string_view>
#include <vector>

#include "core/facts/compound.hpp"
#include "core/facts/figure_cell.hpp"

namespace heatledger::facts {

class CompoundRows {
 public:
  CompoundRows();

  std::uint32_t size() const { return static_cast<std::uint32_t>(heads_.size()); }
  std::string_view formula(std::uint32_t row) const { return heads_[row].formula; }
  /// visit(text) for the name, the CAS number and every synonym of a row.
  template <typename Visit>
  void each_name(std::uint32_t row, Visit visit) const {
    const Head& head = heads_[row];
    visit(head.name);
    if (!head.cas.empty()) visit(head.cas);
    for (std::string_view rest = head.synonyms; !rest.empty();) {
      const std::size_t bar = rest.find('|');
      visit(rest.substr(0, bar));
      rest = bar == std::string_view::npos ? std::string_view() : rest.substr(bar + 1);
    }
  }
  /// The compound of a row, read at the first call; stays where it is. May be called from several threads.
  const Compound& compound(std::uint32_t row) const;

 private:
  struct Head {
    std::string_view name, cas, formula, synonyms, line;
  };
  void read(std::uint32_t row, Compound& out) const;

  std::vector<Head> heads_;
  std::size_t smiles_ = 0, flags_ = 0, remark_ = 0, first_figure_ = 0;  ///< columns
  mutable std::vector<std::atomic<const Compound*>> known_;
  mutable std::mutex mutex_;  ///< guards what follows
  mutable std::deque<Compound> compounds_;
  mutable FigureCells figures_;
};

}  // namespace heatledger::facts
