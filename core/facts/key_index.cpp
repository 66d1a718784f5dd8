#include "core/facts/key_index.hpp"

#include "core/base/check.hpp"

namespace heatledger::facts {

void KeyIndex::reserve(std::size_t expected) {
  CHECK(slots_.empty(), "an index is sized once, before anything is put in");
  std::size_t size = 16;
  while (size < expected * 2) size *= 2;
  slots_.assign(size, Slot());
  mask_ = size - 1;
}

void KeyIndex::put(std::uint64_t hash, std::uint32_t row) {
  std::size_t at = hash & mask_;
  while (slots_[at].row != kFree) at = (at + 1) & mask_;
  slots_[at] = {hash, row};
}

}  // namespace heatledger::facts
