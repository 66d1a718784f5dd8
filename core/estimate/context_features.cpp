#include "core/estimate/context_features.hpp"

#include <algorithm>
#include <cmath>
#include <cstdlib>

#include "core/estimate/ring_features.hpp"

namespace heatledger::estimate {
namespace {

using Where = FeatureSite::Where;

FeatureSite at_bond(std::uint32_t bond) {
  return {Where::Bond, bond, 0};
}
FeatureSite at_atom(std::uint32_t atom) {
  return {Where::Atom, atom, 0};
}
FeatureSite at_hydrogens(std::uint32_t atom) {
  return {Where::Hydrogens, atom, 0};
}

unsigned code(Kind kind) {
  return static_cast<unsigned>(kind);
}
bool is_hetero(Kind kind) {
  return kind != Kind::C && kind != Kind::H;
}

/// "one further step" list of an atom without the neighbour `except`: hydrogens, then heavy neighbours
/// sorted.
struct Environment {
  FeatureCode bytes{FeatureClass::K0};
  std::array<std::uint16_t, 16> heavy{};
  unsigned count = 0, root = 0, hydrogens = 0, elements = 0;

  Environment(const ContextGraph& graph, std::uint32_t atom, std::uint32_t except) {
    const ContextAtom& centre = graph.atoms[atom];
    root = signed_type(short_type(centre.kind, Unsaturation::None), centre.sign);
    hydrogens = centre.hydrogens;
    elements = 1u << code(centre.kind);
    for (const auto& next : around(graph, atom)) {
      if (next.atom == except) continue;
      const ContextAtom& other = graph.atoms[next.atom];
      heavy[count++] = static_cast<std::uint16_t>(graph.bonds[next.bond].order << 8 |
                                                  signed_type(other.type(), other.sign));
      elements |= 1u << code(other.kind);
    }
    std::sort(heavy.begin(), heavy.begin() + count);
  }
  bool before(const Environment& other) const {
    if (root != other.root) return root < other.root;
    if (hydrogens != other.hydrogens) return hydrogens < other.hydrogens;
    return std::lexicographical_compare(heavy.begin(), heavy.begin() + count, other.heavy.begin(),
                                        other.heavy.begin() + other.count);
  }
  void write(FeatureCode& out) const {
    out.byte(root).byte(hydrogens).byte(count).names_all(elements);
    for (unsigned i = 0; i < count; ++i) out.pair(heavy[i]);
  }
};

void count_hydrogen_bonds(const ContextGraph& graph, FeatureSink& sink) {
  if (graph.hydrogen_bonds != 0) {
    sink.add(FeatureCode(FeatureClass::B).sorted(code(Kind::H), code(Kind::H)).byte(1), graph.hydrogen_bonds);
  }
  for (std::uint32_t i = 0; i < graph.atoms.size(); ++i) {
    const ContextAtom& atom = graph.atoms[i];
    if (atom.hydrogens == 0) continue;
    sink.add(FeatureCode(FeatureClass::B).sorted(code(atom.kind), code(Kind::H)).byte(1), atom.hydrogens,
             at_hydrogens(i));
    sink.add(FeatureCode(FeatureClass::B1c).pair(atom.full()).byte(1).byte(code(Kind::H)).names(atom.kind),
             atom.hydrogens, at_hydrogens(i));
  }
}

void count_bonds(const ContextGraph& graph, FeatureSink& sink) {
  for (std::uint32_t k = 0; k < graph.bonds.size(); ++k) {
    const ContextBond& bond = graph.bonds[k];
    const ContextAtom &a = graph.atoms[bond.a], &b = graph.atoms[bond.b];
    sink.add(FeatureCode(FeatureClass::B).sorted(code(a.kind), code(b.kind)).byte(bond.order), 1, at_bond(k));
    sink.add(FeatureCode(FeatureClass::B1c)
                 .pair(a.full())
                 .byte(bond.order)
                 .byte(code(b.kind))
                 .names(a.kind)
                 .names(b.kind),
             1, at_bond(k));
    sink.add(FeatureCode(FeatureClass::B1c)
                 .pair(b.full())
                 .byte(bond.order)
                 .byte(code(a.kind))
                 .names(a.kind)
                 .names(b.kind),
             1, at_bond(k));
    sink.add(FeatureCode(FeatureClass::B2c)
                 .sorted_pairs(a.full(), b.full())
                 .byte(bond.order)
                 .names(a.kind)
                 .names(b.kind),
             1, at_bond(k));
    const Environment x(graph, bond.a, bond.b), y(graph, bond.b, bond.a);
    FeatureCode both(FeatureClass::B3c);
    both.byte(bond.order);
    const bool turned = y.before(x);
    (turned ? y : x).write(both);
    (turned ? x : y).write(both);
    sink.add(both, 1, at_bond(k));
  }
}

void count_atoms(const ContextGraph& graph, FeatureSink& sink) {
  for (std::uint32_t i = 0; i < graph.atoms.size(); ++i) {
    const ContextAtom& atom = graph.atoms[i];
    sink.add(FeatureCode(FeatureClass::Ac).pair(atom.full()).names(atom.kind), 1, at_atom(i));
    FeatureCode group(FeatureClass::G1c);
    group.pair(atom.full()).byte(atom.hydrogens).names(atom.kind);
    std::array<std::uint16_t, 16> types{};
    unsigned count = 0;
    for (const auto& next : around(graph, i)) {
      const ContextAtom& other = graph.atoms[next.atom];
      types[count++] = static_cast<std::uint16_t>(graph.bonds[next.bond].order << 8 | other.type());
      group.names(other.kind);
    }
    std::sort(types.begin(), types.begin() + count);
    for (unsigned t = 0; t < count; ++t) group.pair(types[t]);
    sink.add(group, 1, at_atom(i));
  }
}

/// Pairs of neighbours of one atom: 1,3 contacts and 1,5 crowding.
void count_around_atoms(const ContextGraph& graph, FeatureSink& sink, DeviationMeasures& measures) {
  for (std::uint32_t j = 0; j < graph.atoms.size(); ++j) {
    const ContextAtom& middle = graph.atoms[j];
    for (const auto& x : around(graph, j)) {
      for (const auto& y : around(graph, j)) {
        if (&y == &x) break;  // each pair once
        const ContextAtom &a = graph.atoms[x.atom], &b = graph.atoms[y.atom];
        const FeatureSite both{Where::TwoBonds, x.bond, y.bond};
        sink.add(FeatureCode(FeatureClass::P2).sorted(a.type(), b.type()).byte(middle.type()), 1, both);
        if (is_hetero(a.kind) && is_hetero(b.kind)) {
          sink.add(FeatureCode(FeatureClass::P2h).sorted(code(a.kind), code(b.kind)), 1, both);
        }
        if (a.degree != 4 || b.degree != 4 || middle.unsaturation != Unsaturation::None) continue;
        if (a.in_ring && middle.in_ring && b.in_ring) continue;
        const unsigned low = std::min(a.heavy, b.heavy) - 1u, high = std::max(a.heavy, b.heavy) - 1u;
        if (low < 2) continue;
        sink.add(FeatureCode(FeatureClass::P5).byte(low).byte(high), 1);
        sink.add(FeatureCode(FeatureClass::P5m).byte(low).byte(high).byte(code(middle.kind)), 1);
        measures.crowding += 1;
      }
    }
  }
}

/// Pairs of neighbours at the two ends of a bond: 1,4 contacts and gauche turns.
void count_along_bonds(const ContextGraph& graph, FeatureSink& sink) {
  for (std::uint32_t k = 0; k < graph.bonds.size(); ++k) {
    const ContextBond& bond = graph.bonds[k];
    const ContextAtom &a = graph.atoms[bond.a], &b = graph.atoms[bond.b];
    if (bond.order == 1 && a.degree == 4 && b.degree == 4 && bond.rings == 0) {
      const int m = a.heavy - 1, n = b.heavy - 1, gauche = m * n - std::min(m, n);
      if (gauche != 0) sink.add(FeatureCode(FeatureClass::GA), gauche);
    }
    for (const auto& x : around(graph, bond.a)) {
      if (x.atom == bond.b) continue;
      const ContextAtom& p = graph.atoms[x.atom];
      const bool p_hetero = is_hetero(p.kind);
      for (const auto& y : around(graph, bond.b)) {
        if (y.atom == bond.a || y.atom == x.atom) continue;
        const ContextAtom& q = graph.atoms[y.atom];
        const bool q_hetero = is_hetero(q.kind);
        if (p_hetero || q_hetero || p.unsaturation != Unsaturation::None ||
            q.unsaturation != Unsaturation::None) {
          sink.add(FeatureCode(FeatureClass::P3)
                       .sorted(p.type(), q.type())
                       .sorted(a.type(), b.type())
                       .byte(bond.order),
                   1, at_bond(k));
        }
        if (p_hetero && q_hetero) {
          sink.add(FeatureCode(FeatureClass::P3h).sorted(code(p.kind), code(q.kind)).byte(bond.order), 1,
                   at_bond(k));
        }
      }
    }
  }
}

/// Contacts across a single bond between, or inside, aromatic rings.
void count_bays(const ContextGraph& graph, FeatureSink& sink, DeviationMeasures& measures) {
  const auto share_a_ring = [&](std::uint32_t p, std::uint32_t q) {
    return std::any_of(graph.rings.begin(), graph.rings.end(), [&](const ContextRing& ring) {
      return std::find(ring.atoms.begin(), ring.atoms.end(), p) != ring.atoms.end() &&
             std::find(ring.atoms.begin(), ring.atoms.end(), q) != ring.atoms.end();
    });
  };
  constexpr unsigned kLonePair = 15;
  const auto outside = [&](std::uint32_t atom, std::uint32_t from) {
    for (const auto& next : around(graph, atom)) {
      if (next.atom != from && !graph.atoms[next.atom].aromatic) return code(graph.atoms[next.atom].kind);
    }
    return graph.atoms[atom].hydrogens != 0 ? code(Kind::H) : kLonePair;
  };
  for (const ContextBond& bond : graph.bonds) {
    if (!graph.atoms[bond.a].aromatic || !graph.atoms[bond.b].aromatic) continue;
    for (const auto& x : around(graph, bond.a)) {
      if (x.atom == bond.b || !graph.atoms[x.atom].aromatic) continue;
      for (const auto& y : around(graph, bond.b)) {
        if (y.atom == bond.a || y.atom == x.atom || !graph.atoms[y.atom].aromatic ||
            share_a_ring(x.atom, y.atom))
          continue;
        sink.add(FeatureCode(FeatureClass::BAY)
                     .byte(bond.order != aromatic_order)
                     .sorted(outside(x.atom, bond.a), outside(y.atom, bond.b)),
                 1);
        measures.crowding += 1;
      }
    }
  }
}

/// Cis contacts at double bonds outside rings; without given stereo the ones that no turning can avoid.
void count_cis(const ContextGraph& graph, FeatureSink& sink) {
  for (std::uint32_t k = 0; k < graph.bonds.size(); ++k) {
    const ContextBond& bond = graph.bonds[k];
    if (bond.order != 2 || bond.rings != 0) continue;
    const unsigned at_a = graph.atoms[bond.a].heavy - 1u, at_b = graph.atoms[bond.b].heavy - 1u;
    if (!has_stereo(graph, k)) {
      const unsigned forced = at_a == 2 && at_b == 2                                 ? 2
                              : (at_a == 2 && at_b == 1) || (at_a == 1 && at_b == 2) ? 1
                                                                                     : 0;
      if (forced != 0) sink.add(FeatureCode(FeatureClass::CT0), forced);
      continue;
    }
    for (const auto& x : around(graph, bond.a)) {
      for (const auto& y : around(graph, bond.b)) {
        if (x.bond == k || y.bond == k) continue;
        if (side_of(graph, bond.a, x.atom, k) != side_of(graph, bond.b, y.atom, k)) continue;
        const ContextAtom &p = graph.atoms[x.atom], &q = graph.atoms[y.atom];
        sink.add(FeatureCode(FeatureClass::CT0), 1);
        sink.add(FeatureCode(FeatureClass::CT).byte(0).sorted(code(p.kind), code(q.kind)), 1);
        sink.add(FeatureCode(FeatureClass::CT).byte(1).sorted(p.heavy - 1u, q.heavy - 1u), 1);
      }
    }
  }
}

bool accepts(Kind kind) {
  return kind == Kind::O || kind == Kind::N || kind == Kind::F || kind == Kind::S || kind == Kind::Cl;
}

/// Pairs by number of bonds between them: hydrogen bonds that could close, hetero atoms four bonds apart.
void count_distances(const ContextGraph& graph, FeatureSink& sink) {
  constexpr unsigned kFarthest = 5;
  std::vector<std::uint8_t> distance(graph.atoms.size(), 0xff);
  std::vector<std::uint32_t> reached;
  for (std::uint32_t i = 0; i < graph.atoms.size(); ++i) {
    const ContextAtom& from = graph.atoms[i];
    if (!is_hetero(from.kind)) continue;
    const bool donor = (from.kind == Kind::O || from.kind == Kind::N) && from.hydrogens != 0;
    reached.assign(1, i);
    distance[i] = 0;
    for (std::size_t at = 0; at < reached.size(); ++at) {
      const std::uint32_t j = reached[at];
      const ContextAtom& to = graph.atoms[j];
      const unsigned d = distance[j];
      if (d == 4 && j < i && is_hetero(to.kind)) {
        sink.add(FeatureCode(FeatureClass::P4h).sorted(code(from.kind), code(to.kind)), 1);
      }
      if (donor && d >= 3 && accepts(to.kind)) {
        sink.add(FeatureCode(FeatureClass::HB).byte(from.type()).byte(to.type()).byte(d), 1);
        sink.add(FeatureCode(FeatureClass::HB0).byte(code(from.kind)).byte(d), 1);
      }
      if (d == kFarthest) continue;
      for (const auto& next : around(graph, j)) {
        if (distance[next.atom] != 0xff) continue;
        distance[next.atom] = static_cast<std::uint8_t>(d + 1);
        reached.push_back(next.atom);
      }
    }
    for (const std::uint32_t j : reached) distance[j] = 0xff;
  }
}

bool is_polar(Kind kind) {
  return kind == Kind::N || kind == Kind::O || kind == Kind::S || kind == Kind::P;
}

/// Clusters of N, O, S, P that are bonded to each other or sit on one carbon.
unsigned polar_clusters(const ContextGraph& graph) {
  std::vector<std::uint32_t> parent(graph.atoms.size());
  for (std::uint32_t i = 0; i < parent.size(); ++i) parent[i] = i;
  const auto root = [&](std::uint32_t i) {
    while (parent[i] != i) i = parent[i] = parent[parent[i]];
    return i;
  };
  for (const ContextBond& bond : graph.bonds) {
    if (is_polar(graph.atoms[bond.a].kind) && is_polar(graph.atoms[bond.b].kind))
      parent[root(bond.a)] = root(bond.b);
  }
  unsigned clusters = 0;
  for (std::uint32_t i = 0; i < graph.atoms.size(); ++i) {
    if (graph.atoms[i].kind != Kind::C) continue;
    const ContextGraph::Neighbour* before = nullptr;
    for (const auto& next : around(graph, i)) {
      if (!is_polar(graph.atoms[next.atom].kind)) continue;
      if (before != nullptr) parent[root(next.atom)] = root(before->atom);
      before = &next;
    }
  }
  for (std::uint32_t i = 0; i < graph.atoms.size(); ++i) {
    clusters += is_polar(graph.atoms[i].kind) && root(i) == i;
  }
  return clusters;
}

double beyond_first(unsigned count) {
  return count > 1 ? count - 1.0 : 0.0;
}

void measure(const ContextGraph& graph, DeviationMeasures& measures) {
  const auto count = [&](Kind kind) { return graph.elements[static_cast<std::size_t>(kind)]; };
  measures.heavy = static_cast<double>(graph.atoms.size());
  measures.polar = beyond_first(polar_clusters(graph));
  measures.hetero = beyond_first(count(Kind::N) + count(Kind::O) + count(Kind::S) + count(Kind::P));
  measures.halogen = beyond_first(count(Kind::F) + count(Kind::Cl) + count(Kind::Br) + count(Kind::I));
  const bool odd = count(Kind::C) == 0 || count(Kind::B) + count(Kind::P) + count(Kind::Si) != 0;
  measures.inorganic = odd ? 1 : 0;
  for (const ContextAtom& atom : graph.atoms) {
    if (atom.kind == Kind::O || atom.kind == Kind::N) measures.donors += atom.hydrogens;
  }
}

}  // namespace

FeatureSink::FeatureSink() : slots_(256, 0) {
  counts_.reserve(slots_.size() / 2);  // a molecule of ten heavy atoms has some fifty features
}

void FeatureSink::grow() {
  slots_.assign(slots_.size() * 2, 0);
  for (std::uint32_t i = 0; i < counts_.size(); ++i) {
    std::size_t slot = counts_[i].key & (slots_.size() - 1);
    while (slots_[slot] != 0) slot = (slot + 1) & (slots_.size() - 1);
    slots_[slot] = i + 1;
  }
}

void FeatureSink::add(const FeatureCode& feature, double amount, FeatureSite site) {
  const std::uint64_t key = feature.key();
  if (instances_ != nullptr) instances_->push_back({key, feature.family(), amount, site, feature});
  std::size_t slot = key & (slots_.size() - 1);
  while (slots_[slot] != 0) {
    FeatureCount& known = counts_[slots_[slot] - 1];
    if (known.key == key) {
      known.count += amount;
      return;
    }
    slot = (slot + 1) & (slots_.size() - 1);
  }
  counts_.push_back({key, feature.family(), amount});
  slots_[slot] = static_cast<std::uint32_t>(counts_.size());
  if (counts_.size() * 2 > slots_.size()) grow();
}

std::vector<FeatureCount> FeatureSink::take() {
  std::vector<FeatureCount> taken;
  taken.reserve(counts_.size());
  for (const FeatureCount& count : counts_) {
    if (count.count != 0) taken.push_back(count);
  }
  std::sort(taken.begin(), taken.end(),
            [](const FeatureCount& a, const FeatureCount& b) { return a.key < b.key; });
  counts_.clear();
  std::fill(slots_.begin(), slots_.end(), 0);
  return taken;
}

void count_features(const ContextGraph& graph, FeatureSink& sink, DeviationMeasures& measures) {
  sink.add(FeatureCode(FeatureClass::K0), 1);
  count_hydrogen_bonds(graph, sink);
  count_bonds(graph, sink);
  count_atoms(graph, sink);
  count_around_atoms(graph, sink, measures);
  count_along_bonds(graph, sink);
  count_ring_features(graph, sink, measures);
  count_bays(graph, sink, measures);
  count_cis(graph, sink);
  count_distances(graph, sink);
  measure(graph, measures);
}

}  // namespace heatledger::estimate
