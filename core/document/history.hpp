// Edits as values: a new state for each edit, the old one kept; a new edit clears redo.
#pragma once

#include <cstddef>
#include <deque>
#include <memory>
#include <string>

#include "core/document/worksheet.hpp"

namespace heatledger::document {

using State = std::shared_ptr<const Worksheet>;

class History {
 public:
  /// @param depth  edits that can be undone, at least 1; the oldest are forgotten beyond it
  explicit History(State first, std::size_t depth = 20000);

  const State& current() const { return entries_[at_].state; }
  /// @param label  what the edit did, for "Undo …" ("edit equation")
  void push(State next, std::string label);
  bool undo();
  bool redo();
  bool can_undo() const { return at_ > 0; }
  bool can_redo() const { return at_ + 1 < entries_.size(); }
  std::size_t undo_depth() const { return at_; }
  /// Label of the edit that undo (redo) would take back (repeat); empty when there is none.
  std::string undo_label() const;
  std::string redo_label() const;

 private:
  struct Entry {
    State state;
    std::string label;  ///< the edit that led here
  };
  std::deque<Entry> entries_;
  std::size_t at_ = 0, depth_ = 0;
};

}  // namespace heatledger::document
