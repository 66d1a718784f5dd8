// Edits as values: a new state for each edit, the old one kept; a new edit clears redo.
#pragma once

#include <cstddef>
#include <memory>
#include <string>
#include <vector>

#include "core/document/worksheet.hpp"

namespace heatledger::document {

using State = std::shared_ptr<const Worksheet>;

class History {
 public:
  explicit History(State first, std::size_t depth = 20000);

  const State& current() const { return states_[at_]; }
  void push(State next, std::string label);
  bool undo();
  bool redo();
  bool can_undo() const { return at_ > 0; }
  bool can_redo() const { return at_ + 1 < states_.size(); }
  std::string undo_label() const;
  std::string redo_label() const;

 private:
  std::vector<State> states_;
  std::vector<std::string> labels_;  ///< labels_[i] led from states_[i] to states_[i + 1]
  std::size_t at_ = 0, depth_ = 0;
};

}  // namespace heatledger::document
