#include "core/molecule/kekule_choice.hpp"

#include <algorithm>
#include <bit>
#include <cstddef>
#include <tuple>
#include <utility>

#include "core/molecule/matching.hpp"
#include "core/molecule/rings.hpp"

namespace heatledger::molecule {
namespace {

using Edge = std::pair<std::uint32_t, std::uint32_t>;

bool hetero_pair(const Graph& graph, const Bond& bond) {
  return graph.atoms[bond.a].element != 6 && graph.atoms[bond.b].element != 6;
}

bool has_double_hetero_pair(const Graph& graph) {
  return std::any_of(graph.bonds.begin(), graph.bonds.end(), [&](const Bond& bond) {
    return bond.order == Order::Double && hetero_pair(graph, bond);
  });
}

std::uint32_t root_of(std::vector<std::uint32_t>& parent, std::uint32_t atom) {
  while (parent[atom] != atom) {
    parent[atom] = parent[parent[atom]];
    atom = parent[atom];
  }
  return atom;
}

// One connected set of mobile bonds.
struct System {
  std::vector<std::uint32_t> atoms;
  std::vector<Edge> hetero_pairs;
  bool joined_pair = false;  // one of the pairs has the double bond now
};

std::vector<System> mobile_systems(const Graph& graph, const std::vector<std::uint8_t>& mobile) {
  std::vector<std::uint32_t> parent(graph.atoms.size());
  std::vector<std::uint8_t> member(graph.atoms.size(), 0);
  for (std::uint32_t i = 0; i < graph.atoms.size(); ++i) parent[i] = i;
  for (std::size_t i = 0; i < graph.bonds.size(); ++i) {
    if (!mobile[i]) continue;
    const Bond& bond = graph.bonds[i];
    member[bond.a] = member[bond.b] = 1;
    parent[root_of(parent, bond.a)] = root_of(parent, bond.b);
  }
  std::vector<System> systems;
  std::vector<std::uint32_t> number(graph.atoms.size(), Matching::none);
  for (std::uint32_t i = 0; i < graph.atoms.size(); ++i) {
    if (!member[i]) continue;
    std::uint32_t& at = number[root_of(parent, i)];
    if (at == Matching::none) {
      at = static_cast<std::uint32_t>(systems.size());
      systems.emplace_back();
    }
    systems[at].atoms.push_back(i);
  }
  for (std::size_t i = 0; i < graph.bonds.size(); ++i) {
    const Bond& bond = graph.bonds[i];
    if (!mobile[i] || !hetero_pair(graph, bond)) continue;
    System& system = systems[number[root_of(parent, bond.a)]];
    system.hetero_pairs.emplace_back(bond.a, bond.b);
    system.joined_pair |= bond.order == Order::Double;
  }
  return systems;
}

// Matches every free atom of the list again; false when some stay free.
bool rematch(Matching& matching, const std::vector<std::uint32_t>& atoms) {
  for (const std::uint32_t atom : atoms) {
    if (matching.mate(atom) == Matching::none && !matching.augment(atom, false)) return false;
  }
  return true;
}

// One digit of base 13 per kind of pair (its two elements), holding how many pairs of that kind the set
// joins; 12 pairs at most make 12 kinds.
std::vector<std::uint64_t> kind_weights(const Graph& graph, const std::vector<Edge>& pairs) {
  const auto kind = [&](const Edge& pair) {
    const int a = graph.atoms[pair.first].element;
    const int b = graph.atoms[pair.second].element;
    return std::pair{std::min(a, b), std::max(a, b)};
  };
  std::vector<std::pair<int, int>> kinds;
  for (const Edge& pair : pairs) kinds.push_back(kind(pair));
  std::sort(kinds.begin(), kinds.end());
  kinds.erase(std::unique(kinds.begin(), kinds.end()), kinds.end());
  std::vector<std::uint64_t> weights;
  for (const Edge& pair : pairs) {
    std::uint64_t weight = 1;
    for (std::size_t k = 0; kinds[k] != kind(pair); ++k) weight *= 13;
    weights.push_back(weight);
  }
  return weights;
}

// Leaves as few hetero pairs joined as any Kekulé structure of this system needs; the others are forbidden
// after it. Of several sets with that number one with the lightest kinds of pairs is taken, so that the bonds
// counted do not depend on the numbering, and of those the first in the order of the pairs.
void thin_out(const Graph& graph, Matching& matching, const System& system) {
  constexpr std::size_t exhaustive = 12;
  const std::vector<Edge>& pairs = system.hetero_pairs;
  if (pairs.size() > exhaustive) {
    for (const Edge& pair : pairs) {
      matching.set_forbidden(pair.first, pair.second, true);
      if (rematch(matching, system.atoms)) continue;
      matching.set_forbidden(pair.first, pair.second, false);
      rematch(matching, system.atoms);
    }
    return;
  }
  const std::vector<std::uint64_t> weights = kind_weights(graph, pairs);
  struct Choice {
    int joined;
    std::uint64_t weight;
    unsigned set;
  };
  std::vector<Choice> choices(std::size_t{1} << pairs.size());
  for (unsigned set = 0; set < choices.size(); ++set) {
    choices[set] = {std::popcount(set), 0, set};
    for (std::size_t p = 0; p < pairs.size(); ++p) {
      if ((set >> p) & 1u) choices[set].weight += weights[p];
    }
  }
  std::sort(choices.begin(), choices.end(), [](const Choice& a, const Choice& b) {
    return std::tie(a.joined, a.weight, a.set) < std::tie(b.joined, b.weight, b.set);
  });
  for (const Choice& choice : choices) {
    for (std::size_t p = 0; p < pairs.size(); ++p) {
      matching.set_forbidden(pairs[p].first, pairs[p].second, ((choice.set >> p) & 1u) == 0);
    }
    if (rematch(matching, system.atoms)) return;
  }
}

// Fixes partners one atom after the other: lowest rank first, with the lowest partner that still lets all be
// matched.
void match_by_rank(Matching& matching, const System& system) {
  for (const std::uint32_t atom : system.atoms) {
    if (matching.removed(atom)) continue;
    for (const std::uint32_t partner : matching.allowed_neighbours(atom)) {
      if (matching.removed(partner)) continue;
      const std::uint32_t left = matching.mate(atom);
      const std::uint32_t right = matching.mate(partner);
      if (left != partner) {
        matching.part(atom);
        matching.part(partner);
        matching.set_removed(atom, true);
        matching.set_removed(partner, true);
        const bool possible = matching.augment(left, false);
        matching.set_removed(atom, false);
        matching.set_removed(partner, false);
        if (!possible) {
          matching.join(atom, left);
          matching.join(partner, right);
          continue;
        }
        matching.join(atom, partner);
      }
      matching.set_removed(atom, true);
      matching.set_removed(partner, true);
      break;
    }
  }
}

void choose(Graph& graph, const std::vector<std::uint32_t>* ranks) {
  std::vector<std::uint8_t> mobile;
  find_mobile_bonds(graph, mobile);
  const auto rank = [&](std::uint32_t atom) { return ranks == nullptr ? atom : (*ranks)[atom]; };
  std::vector<Edge> edges;
  std::vector<std::size_t> edge_bond;
  for (std::size_t i = 0; i < graph.bonds.size(); ++i) {
    if (mobile[i]) edge_bond.push_back(i);
  }
  const auto ends = [&](const Bond& bond) {
    return Edge{std::min(rank(bond.a), rank(bond.b)), std::max(rank(bond.a), rank(bond.b))};
  };
  std::sort(edge_bond.begin(), edge_bond.end(),
            [&](std::size_t a, std::size_t b) { return ends(graph.bonds[a]) < ends(graph.bonds[b]); });
  for (const std::size_t at : edge_bond) edges.emplace_back(graph.bonds[at].a, graph.bonds[at].b);
  Matching matching(static_cast<std::uint32_t>(graph.atoms.size()), edges);
  for (const std::size_t at : edge_bond) {
    if (graph.bonds[at].order == Order::Double) matching.join(graph.bonds[at].a, graph.bonds[at].b);
  }
  std::vector<System> systems = mobile_systems(graph, mobile);
  for (System& system : systems) {
    std::sort(system.atoms.begin(), system.atoms.end(),
              [&](std::uint32_t a, std::uint32_t b) { return rank(a) < rank(b); });
    std::sort(system.hetero_pairs.begin(), system.hetero_pairs.end(), [&](const Edge& a, const Edge& b) {
      return Edge{std::min(rank(a.first), rank(a.second)), std::max(rank(a.first), rank(a.second))} <
             Edge{std::min(rank(b.first), rank(b.second)), std::max(rank(b.first), rank(b.second))};
    });
    // Without a joined pair the number is lowest already; the ranks still want the others kept out.
    if (system.joined_pair || (ranks != nullptr && !system.hetero_pairs.empty()))
      thin_out(graph, matching, system);
    if (ranks != nullptr) match_by_rank(matching, system);
  }
  for (const std::size_t at : edge_bond) {
    Bond& bond = graph.bonds[at];
    bond.order = matching.mate(bond.a) == bond.b ? Order::Double : Order::Single;
  }
}

}  // namespace

void find_mobile_bonds(const Graph& graph, std::vector<std::uint8_t>& mobile) {
  find_ring_bonds(graph, mobile);
  // Per atom: double bonds in rings, with a multiple bond beside the ring or a triple one counted as two.
  std::vector<std::uint8_t> doubles(graph.atoms.size(), 0);
  for (std::size_t i = 0; i < graph.bonds.size(); ++i) {
    const Bond& bond = graph.bonds[i];
    if (bond.order < Order::Double) continue;
    const int weight = bond.order == Order::Double && mobile[i] ? 1 : 2;
    for (const std::uint32_t end : {bond.a, bond.b}) {
      doubles[end] = static_cast<std::uint8_t>(std::min(2, doubles[end] + weight));
    }
  }
  // An atom whose partner is fixed is fixed too.
  for (std::size_t i = 0; i < graph.bonds.size(); ++i) {
    const Bond& bond = graph.bonds[i];
    if (bond.order != Order::Double || !mobile[i]) continue;
    const std::uint8_t worst = std::max(doubles[bond.a], doubles[bond.b]);
    if (worst != 1) doubles[bond.a] = doubles[bond.b] = worst;
  }
  for (std::size_t i = 0; i < graph.bonds.size(); ++i) {
    const Bond& bond = graph.bonds[i];
    if (doubles[bond.a] != 1 || doubles[bond.b] != 1 || bond.order < Order::Single) mobile[i] = 0;
  }
}

void choose_kekule_bonds(Graph& graph) {
  if (has_double_hetero_pair(graph)) choose(graph, nullptr);
}

void choose_kekule_bonds(Graph& graph, const std::vector<std::uint32_t>& ranks) {
  choose(graph, &ranks);
}

}  // namespace heatledger::molecule
