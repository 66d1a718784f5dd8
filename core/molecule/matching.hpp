// Maximum matching in a general graph: which atoms of a conjugated system share a double bond.
#pragma once

#include <cstdint>
#include <utility>
#include <vector>

namespace heatledger::molecule {

/// A matching that grows by augmenting paths. Odd rings make the graphs non-bipartite, so blossoms are
/// contracted.
/// @source J. Edmonds, Can. J. Math. 17 (1965) 449
/// @complexity one augmentation is linear in the component it runs in, times the number of nested odd rings
class Matching {
 public:
  static constexpr std::uint32_t none = 0xFFFFFFFF;

  /// @param vertices  number of vertices
  /// @param edges     pairs of vertices; parallel edges are allowed, loops are not
  Matching(std::uint32_t vertices, const std::vector<std::pair<std::uint32_t, std::uint32_t>>& edges);

  std::uint32_t mate(std::uint32_t vertex) const { return mate_[vertex]; }
  /// Joins two free vertices: the starting matching.
  void join(std::uint32_t a, std::uint32_t b);
  /// Allows augmentation to leave this vertex free again (it may be matched, but need not be).
  void set_optional(std::uint32_t vertex) { optional_[vertex] = 1; }
  /// Frees a vertex and its mate.
  void part(std::uint32_t vertex);
  /// Hides a vertex from augmentation, or shows it again; its mate stays as it is.
  void set_removed(std::uint32_t vertex, bool removed) { removed_[vertex] = removed ? 1 : 0; }
  bool removed(std::uint32_t vertex) const { return removed_[vertex] != 0; }
  /// Neighbours over allowed edges, in the order in which the edges were given.
  std::vector<std::uint32_t> allowed_neighbours(std::uint32_t vertex) const;
  /// Forbids or allows an edge; a matched one is parted.
  void set_forbidden(std::uint32_t a, std::uint32_t b, bool forbidden);

  /// Matches a free vertex by one augmenting path that keeps all others matched, except that an optional
  /// vertex may be freed instead if `displace_optional`. False, and nothing changed, when there is none.
  bool augment(std::uint32_t root, bool displace_optional);

 private:
  void touch(std::uint32_t vertex);
  std::uint32_t common_base(std::uint32_t a, std::uint32_t b);
  void mark_blossom(std::uint32_t from, std::uint32_t base, std::uint32_t child);
  void flip(std::uint32_t end);
  bool search(std::uint32_t root, bool displace_optional);

  std::vector<std::uint32_t> first_, neighbours_;
  std::vector<std::uint8_t> forbidden_;  // one per neighbour entry
  std::vector<std::uint32_t> mate_, parent_, base_, visit_;
  std::vector<std::uint8_t> optional_, removed_, outer_, in_blossom_, touched_flag_;
  std::vector<std::uint32_t> queue_, touched_;
  std::uint32_t visit_count_ = 0;
};

}  // namespace heatledger::molecule
