#include "core/facts/completion.hpp"

#include <algorithm>
#include <array>
#include <bit>

#include "core/facts/name_key.hpp"

namespace heatledger::facts {

namespace {

std::uint32_t letters_of(std::string_view key) {
  std::uint32_t bits = 0;
  for (const char c : key) {
    if (c >= 'a' && c <= 'z') bits |= 1u << (c - 'a');
    else if (c >= '0' && c <= '9') bits |= 1u << (26 + (c - '0') % 6);
  }
  return bits;
}

bool begins_word(std::string_view name, std::size_t at) {
  if (at == 0) return true;
  const auto is_letter = [](char c) { return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z') || (c & 0x80) != 0; };
  return is_letter(name[at]) && !is_letter(name[at - 1]);
}

}  // namespace

int prefix_distance(std::string_view pattern, std::string_view text) {
  std::array<std::uint64_t, 256> match{};
  for (std::size_t i = 0; i < pattern.size(); ++i) match[static_cast<unsigned char>(pattern[i])] |= 1ULL << i;
  const std::uint64_t last = 1ULL << (pattern.size() - 1);
  std::uint64_t plus = ~0ULL, minus = 0;
  int score = static_cast<int>(pattern.size()), best = score;
  for (const char c : text) {
    const std::uint64_t equal = match[static_cast<unsigned char>(c)];
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
    const std::string_view name = entries_[i].name;
    Key key;
    key.begin = static_cast<std::uint32_t>(pool_.size());
    // Key of the whole first, then the beginnings of words in it: the key of the name's tail is the tail of its key,
    // save where a spelling is evened out across the cut, which costs a completion and nothing else.
    key.length = static_cast<std::uint32_t>(append_name_key(name, pool_));
    key.letters = letters_of(std::string_view(pool_).substr(key.begin, key.length));
    keys_.push_back(key);
    std::string tail_key;
    for (std::size_t at = 0; at < name.size(); ++at) {
      if (!begins_word(name, at)) continue;
      tail_key.clear();
      const std::size_t length = append_name_key(name.substr(at), tail_key);
      if (length == 0 || length > key.length) continue;
      starts_.push_back({key.begin + key.length - static_cast<std::uint32_t>(length), i, at == 0});
    }
  }
  std::sort(starts_.begin(), starts_.end(), [this](const Start& a, const Start& b) {
    const int order = tail(a).compare(tail(b));
    return order != 0 ? order < 0 : a.entry < b.entry;
  });
}

std::string_view CompletionIndex::key(std::uint32_t entry) const {
  return std::string_view(pool_).substr(keys_[entry].begin, keys_[entry].length);
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
    std::uint32_t row, length, entry;
    bool operator<(const Hit& other) const {
      if (group != other.group) return group < other.group;
      if (row != other.row) return row < other.row;
      return length != other.length ? length < other.length : entry < other.entry;
    }
  };
  std::vector<Hit> hits;
  const auto from = std::lower_bound(starts_.begin(), starts_.end(), wanted,
                                     [this](const Start& start, const std::string& key) { return tail(start) < key; });
  for (auto at = from; at != starts_.end() && tail(*at).substr(0, wanted.size()) == wanted; ++at) {
    const std::uint32_t length = keys_[at->entry].length;
    const int group = at->first_word ? (length == wanted.size() ? 0 : 1) : 2;
    hits.push_back({group, entries_[at->entry].row, length, at->entry});
  }
  const std::size_t allowed = wanted.size() < 4 ? 0 : wanted.size() < 6 ? 1 : 2;
  if (hits.size() < limit && allowed > 0 && wanted.size() <= 64) {
    const std::uint32_t letters = letters_of(wanted);
    for (std::uint32_t i = 0; i < keys_.size(); ++i) {
      // An edit brings at most one letter that the name does not have.
      if (static_cast<std::size_t>(std::popcount(letters & ~keys_[i].letters)) > allowed) continue;
      if (keys_[i].length + allowed < wanted.size()) continue;
      const std::string_view near = key(i).substr(0, wanted.size() + allowed);
      const int distance = prefix_distance(wanted, near);
      if (distance == 0 || static_cast<std::size_t>(distance) > allowed) continue;
      hits.push_back({2 + distance, entries_[i].row, keys_[i].length, i});
    }
  }
  std::sort(hits.begin(), hits.end());
  for (const Hit& hit : hits) {
    const bool seen = std::any_of(out.begin(), out.end(), [&](const NameEntry& e) { return e.row == hit.row; });
    if (seen) continue;
    out.push_back(entries_[hit.entry]);
    if (out.size() == limit) break;
  }
  return out;
}

}  // namespace heatledger::facts
