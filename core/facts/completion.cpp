#include "core/facts/completion.hpp"

#include <algorithm>
#include <bit>

#include "core/base/check.hpp"
#include "core/facts/name_key.hpp"

namespace heatledger::facts {

namespace {

std::uint32_t letters_of(std::string_view key) {
  std::uint32_t bits = 0;
  for (const char c : key) {
    if (c >= 'a' && c <= 'z')
      bits |= 1u << (c - 'a');
    else if (c >= '0' && c <= '9')
      bits |= 1u << (26 + (c - '0') % 6);
  }
  return bits;
}

/// First eight bytes, the first highest; shorter texts are filled up with zero.
std::uint64_t head_of(std::string_view text) {
  std::uint64_t head = 0;
  for (std::size_t i = 0; i < 8; ++i)
    head = (head << 8) | (i < text.size() ? static_cast<unsigned char>(text[i]) : 0u);
  return head;
}

bool begins_word(std::string_view name, std::size_t at) {
  if (at == 0) return true;
  const auto is_letter = [](char c) {
    return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z') || (c & 0x80) != 0;
  };
  return is_letter(name[at]) && !is_letter(name[at - 1]);
}

}  // namespace

EditPattern::EditPattern(std::string_view pattern) : length_(static_cast<int>(pattern.size())) {
  CHECK(!pattern.empty() && pattern.size() <= 64, "a pattern of one machine word");
  for (std::size_t i = 0; i < pattern.size(); ++i)
    match_[static_cast<unsigned char>(pattern[i])] |= 1ULL << i;
}

int EditPattern::distance_to_beginning(std::string_view text) const {
  const std::uint64_t last = 1ULL << (length_ - 1);
  std::uint64_t plus = ~0ULL, minus = 0;
  int score = length_, best = score;
  for (const char c : text) {
    const std::uint64_t equal = match_[static_cast<unsigned char>(c)];
    const std::uint64_t vertical = equal | minus;
    const std::uint64_t horizontal = (((equal & plus) + plus) ^ plus) | equal;
    std::uint64_t up = minus | ~(horizontal | plus);
    std::uint64_t down = plus & horizontal;
    if ((up & last) != 0) ++score;
    if ((down & last) != 0) --score;
    up = (up << 1) | 1;  // the text's beginning is anchored: every byte skipped there costs one
    down <<= 1;
    plus = down | ~(vertical | up);
    minus = up & vertical;
    best = std::min(best, score);
  }
  return best;
}

CompletionIndex::CompletionIndex(std::vector<NameEntry> entries) : entries_(std::move(entries)) {
  pool_.reserve(entries_.size() * 20);
  for (std::uint32_t i = 0; i < entries_.size(); ++i) {
    // Word by word: a key is the row of its words' keys, so that a completion can begin at any of them.
    const std::string_view name = entries_[i].name;
    Key key;
    key.begin = static_cast<std::uint32_t>(pool_.size());
    for (std::size_t at = 0; at < name.size();) {
      std::size_t end = at + 1;
      while (end < name.size() && !begins_word(name, end)) ++end;
      starts_.push_back({0, static_cast<std::uint32_t>(pool_.size()), i, at == 0});
      if (append_name_key(name.substr(at, end - at), pool_) == 0 && at > 0) starts_.pop_back();
      at = end;
    }
    key.length = static_cast<std::uint32_t>(pool_.size()) - key.begin;
    key.letters = letters_of(std::string_view(pool_).substr(key.begin, key.length));
    keys_.push_back(key);
  }
  for (Start& start : starts_) start.head = head_of(tail(start));
  std::sort(starts_.begin(), starts_.end(), [this](const Start& a, const Start& b) {
    if (a.head != b.head) return a.head < b.head;
    const int order = tail(a).compare(tail(b));
    return order != 0 ? order < 0 : a.entry < b.entry;
  });
}

std::string_view CompletionIndex::tail(const Start& start) const {
  const Key& whole = keys_[start.entry];
  return std::string_view(pool_).substr(start.begin, whole.begin + whole.length - start.begin);
}

std::vector<NameEntry> CompletionIndex::complete(std::string_view text, std::size_t limit) const {
  const std::string wanted = name_key(text);
  std::vector<NameEntry> out;
  if (wanted.empty() || limit == 0) return out;

  struct Hit {
    int group;
    std::uint32_t row, entry;
    bool operator<(const Hit& other) const {
      if (group != other.group) return group < other.group;
      if (row != other.row) return row < other.row;
      return entry < other.entry;  // a row's own name stands before its synonyms
    }
  };
  std::vector<Hit> hits;
  const auto from =
      std::lower_bound(starts_.begin(), starts_.end(), wanted,
                       [this](const Start& start, const std::string& key) { return tail(start) < key; });
  for (auto at = from; at != starts_.end() && tail(*at).substr(0, wanted.size()) == wanted; ++at) {
    const std::uint32_t length = keys_[at->entry].length;
    const int group = at->first_word ? (length == wanted.size() ? 0 : 1) : 2;
    hits.push_back({group, entries_[at->entry].row, at->entry});
  }
  const std::size_t allowed = wanted.size() < 4 ? 0 : wanted.size() < 6 ? 1 : 2;
  if (hits.size() < limit && allowed > 0 && wanted.size() <= 64) {
    // The first letter is hardly ever the wrong one; words that begin with it stand side by side.
    const EditPattern pattern(wanted);
    const std::uint32_t letters = letters_of(wanted);
    const auto first =
        std::lower_bound(starts_.begin(), starts_.end(), wanted.substr(0, 1),
                         [this](const Start& start, const std::string& key) { return tail(start) < key; });
    for (auto at = first; at != starts_.end() && tail(*at).substr(0, 1) == wanted.substr(0, 1); ++at) {
      // An edit brings at most one letter that the name does not have.
      const Key& whole = keys_[at->entry];
      if (static_cast<std::size_t>(std::popcount(letters & ~whole.letters)) > allowed) continue;
      const std::string_view near = tail(*at).substr(0, wanted.size() + allowed);
      if (near.size() + allowed < wanted.size()) continue;
      const int distance = pattern.distance_to_beginning(near);
      if (distance == 0 || static_cast<std::size_t>(distance) > allowed) continue;
      hits.push_back({2 + distance, entries_[at->entry].row, at->entry});
    }
  }
  std::sort(hits.begin(), hits.end());
  for (const Hit& hit : hits) {
    const bool seen =
        std::any_of(out.begin(), out.end(), [&](const NameEntry& e) { return e.row == hit.row; });
    if (seen) continue;
    out.push_back(entries_[hit.entry]);
    if (out.size() == limit) break;
  }
  return out;
}

}  // namespace heatledger::facts
