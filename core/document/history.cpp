#include "core/document/history.hpp"

#include "core/base/check.hpp"

namespace heatledger::document {

History::History(State first, std::size_t depth) : depth_(depth) {
  CHECK(first != nullptr, "a history begins with a sheet");
  CHECK(depth >= 1, "at least one edit can be undone");
  entries_.push_back(Entry{std::move(first), {}});
}

void History::push(State next, std::string label) {
  CHECK(next != nullptr, "an edit leads to a sheet");
  while (entries_.size() > at_ + 1) entries_.pop_back();
  entries_.push_back(Entry{std::move(next), std::move(label)});
  ++at_;
  if (at_ > depth_) {
    entries_.pop_front();
    --at_;
  }
}

bool History::undo() {
  if (!can_undo()) return false;
  --at_;
  return true;
}

bool History::redo() {
  if (!can_redo()) return false;
  ++at_;
  return true;
}

std::string History::undo_label() const {
  return can_undo() ? entries_[at_].label : std::string();
}
std::string History::redo_label() const {
  return can_redo() ? entries_[at_ + 1].label : std::string();
}

}  // namespace heatledger::document
