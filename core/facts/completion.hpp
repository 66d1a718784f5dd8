// Completion of half-typed names over a fixed list: by beginning, by beginning of a word, by edit distance.
#pragma once

#include <array>
#include <cstdint>
#include <string>
#include <string_view>
#include <vector>

namespace heatledger::facts {

/// A name and the row it belongs to. Rows with smaller numbers are commoner.
struct NameEntry {
  std::string_view name;
  std::uint32_t row = 0;
};

class CompletionIndex {
 public:
  /// @complexity sorting: n log n in the words of all names
  explicit CompletionIndex(std::vector<NameEntry> entries);

  /// Entries that match, best first, each row once.
  std::vector<NameEntry> complete(std::string_view text, std::size_t limit) const;

 private:
  struct Key {
    std::uint32_t begin = 0, length = 0;  ///< the key's bytes in pool_
    std::uint32_t letters = 0;            ///< which letters occur, one bit each; digits share bits
  };
  struct Start {
    std::uint64_t head =
        0;  ///< the eight bytes that begin there as one number, so that most comparisons are one step
    std::uint32_t begin = 0;  ///< byte of pool_ where a word of a key begins
    std::uint32_t entry = 0;
    bool first_word = false;
  };
  std::string_view tail(const Start& start) const;

  std::vector<NameEntry> entries_;
  std::string pool_;
  std::vector<Key> keys_;
  std::vector<Start> starts_;  ///< sorted by the text that begins there
};

/// A text that others are compared with by edit distance (insert, delete, change).
/// @validity 1 to 64 bytes
/// @source G. Myers, J. ACM 46 (1999) 395: bit-parallel computation, one word
class EditPattern {
 public:
  explicit EditPattern(std::string_view pattern);
  /// Distance to the nearest beginning of `text`, the whole of it included.
  /// @complexity linear in the text
  int distance_to_beginning(std::string_view text) const;

 private:
  std::array<std::uint64_t, 256> match_{};  ///< by byte: where it stands in the pattern
  int length_;
};

}  // namespace heatledger::facts
