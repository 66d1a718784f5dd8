// A hash index from keys to row numbers, built once and then only read.
#pragma once

#include <cstdint>
#include <string_view>
#include <vector>

namespace heatledger::facts {

/// Several rows may share a key; they come out in the order in which they were put in.
class KeyIndex {
 public:
  /// Sizes the index, once, for the number of entries that will be put in.
  void reserve(std::size_t expected);
  void put(std::uint64_t hash, std::uint32_t row);

  /// Calls visit(row) for the rows of a hash; stops when it answers false.
  template <typename Visit>
  void each(std::uint64_t hash, Visit visit) const {
    if (slots_.empty()) return;
    for (std::size_t at = hash & mask_; slots_[at].row != kFree; at = (at + 1) & mask_) {
      if (slots_[at].hash == hash && !visit(slots_[at].row)) return;
    }
  }

 private:
  static constexpr std::uint32_t kFree = 0xffffffffu;
  struct Slot {
    std::uint64_t hash = 0;
    std::uint32_t row = kFree;
  };
  std::vector<Slot> slots_;
  std::size_t mask_ = 0;
};

}  // namespace heatledger::facts
