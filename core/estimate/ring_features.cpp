#include "core/estimate/ring_features.hpp"

#include <algorithm>
#include <cmath>

namespace heatledger::estimate {
namespace {

unsigned code(Kind kind) {
  return static_cast<unsigned>(kind);
}
unsigned shown_size(const ContextRing& ring) {
  return static_cast<unsigned>(std::min<std::size_t>(ring.atoms.size(), 255));
}
unsigned grouped_size(const ContextRing& ring) {
  return std::min(shown_size(ring), 9u);
}

bool holds(const std::vector<std::uint32_t>& list, std::uint32_t value) {
  return std::find(list.begin(), list.end(), value) != list.end();
}

std::size_t shared(const std::vector<std::uint32_t>& a, const std::vector<std::uint32_t>& b) {
  return static_cast<std::size_t>(
      std::count_if(a.begin(), a.end(), [&](std::uint32_t x) { return holds(b, x); }));
}

/// What one ring is by itself.
void count_ring(const ContextGraph& graph, const ContextRing& ring, FeatureSink& sink) {
  unsigned doubles = 0, triples = 0, stray_aromatic = 0, exocyclic = 0, substituents = 0, elements = 0;
  for (const std::uint32_t k : ring.bonds) {
    doubles += graph.bonds[k].order == 2;
    triples += graph.bonds[k].order == 3;
    stray_aromatic += graph.bonds[k].order == aromatic_order;
  }
  if (ring.aromatic) stray_aromatic = 0;
  std::vector<unsigned> hetero;
  for (const std::uint32_t i : ring.atoms) {
    if (graph.atoms[i].kind != Kind::C) {
      hetero.push_back(code(graph.atoms[i].kind));
      elements |= 1u << code(graph.atoms[i].kind);
    }
    for (const auto& next : around(graph, i)) {
      if (holds(ring.atoms, next.atom)) continue;
      ++substituents;
      exocyclic += graph.bonds[next.bond].order == 2;
    }
  }
  std::sort(hetero.begin(), hetero.end());
  const unsigned size = shown_size(ring);
  sink.add(FeatureCode(FeatureClass::R0).byte(grouped_size(ring)).byte(ring.aromatic), 1);
  if (substituents != 0)
    sink.add(FeatureCode(FeatureClass::RS).byte(grouped_size(ring)).byte(ring.aromatic), substituents);
  const auto detail = [&](FeatureClass family) {
    FeatureCode feature(family);
    feature.byte(size)
        .byte(ring.aromatic)
        .byte(doubles & 255)
        .byte(triples & 255)
        .byte(stray_aromatic & 255)
        .byte(exocyclic & 255);
    return feature;
  };
  sink.add(detail(FeatureClass::R1), 1);
  FeatureCode full = detail(FeatureClass::R2c), by_hetero(FeatureClass::R1h);
  full.names_all(elements);
  by_hetero.byte(size).byte(ring.aromatic);
  for (const unsigned element : hetero) {
    full.byte(element);
    by_hetero.byte(element);
  }
  sink.add(full, 1);
  if (!hetero.empty()) sink.add(by_hetero, 1);
}

/// Fused and free bonds around a ring, the same whichever atom and direction one starts with.
void count_fusion_pattern(const ContextGraph& graph, const ContextRing& ring, FeatureSink& sink) {
  const std::size_t size = ring.bonds.size();
  std::vector<char> pattern(size);
  for (std::size_t x = 0; x < size; ++x) pattern[x] = graph.bonds[ring.bonds[x]].rings > 1 ? 1 : 0;
  if (std::count(pattern.begin(), pattern.end(), 1) < 2) return;
  std::vector<char> best = pattern, turned = pattern;
  for (int direction = 0; direction < 2; ++direction) {
    for (std::size_t x = 0; x < size; ++x) {
      std::rotate(turned.begin(), turned.begin() + 1, turned.end());
      best = std::min(best, turned);
    }
    std::reverse(turned.begin(), turned.end());
  }
  FeatureCode feature(FeatureClass::RP);
  feature.byte(shown_size(ring)).byte(ring.aromatic);
  for (const char fused : best) feature.byte(static_cast<unsigned>(fused));
  sink.add(feature, 1);
}

/// Positions of substituents and hetero atoms on an aromatic ring.
void count_positions(const ContextGraph& graph, const ContextRing& ring, FeatureSink& sink) {
  if (!ring.aromatic) return;
  const unsigned size = shown_size(ring);
  const auto distance = [&](std::size_t x, std::size_t y) {
    const std::size_t d = x > y ? x - y : y - x;
    return static_cast<unsigned>(std::min(d, ring.atoms.size() - d));
  };
  std::vector<std::pair<std::size_t, std::uint32_t>> substituents;  // place, atom outside
  for (std::size_t x = 0; x < ring.atoms.size(); ++x) {
    const ContextGraph::Neighbour* outside = nullptr;
    for (const auto& next : around(graph, ring.atoms[x])) {
      if (graph.bonds[next.bond].order != aromatic_order && !holds(ring.atoms, next.atom)) outside = &next;
    }
    if (outside != nullptr) substituents.emplace_back(x, outside->atom);
  }
  for (std::size_t m = 0; m < substituents.size(); ++m) {
    const ContextAtom& a = graph.atoms[substituents[m].second];
    for (std::size_t n = m + 1; n < substituents.size(); ++n) {
      const ContextAtom& b = graph.atoms[substituents[n].second];
      const unsigned d = distance(substituents[m].first, substituents[n].first);
      sink.add(FeatureCode(FeatureClass::OMP0).byte(d), 1);
      FeatureCode typed(FeatureClass::OMP);
      typed.byte(d == 3 ? 3 : 0);
      if (d != 3) typed.byte(d);
      sink.add(typed.sorted(a.type(), b.type()), 1);
      if (d == 1) sink.add(FeatureCode(FeatureClass::OMP2).sorted_pairs(a.full(), b.full()), 1);
    }
  }
  for (std::size_t x = 0; x < ring.atoms.size(); ++x) {
    const Kind hetero = graph.atoms[ring.atoms[x]].kind;
    if (hetero == Kind::C) continue;
    for (const auto& substituent : substituents) {
      sink.add(FeatureCode(FeatureClass::OMP)
                   .byte(1)
                   .byte(size)
                   .byte(code(hetero))
                   .byte(distance(x, substituent.first))
                   .byte(graph.atoms[substituent.second].type()),
               1);
    }
    for (std::size_t y = x + 1; y < ring.atoms.size(); ++y) {
      const Kind other = graph.atoms[ring.atoms[y]].kind;
      if (other == Kind::C) continue;
      sink.add(FeatureCode(FeatureClass::OMP)
                   .byte(2)
                   .byte(size)
                   .sorted(code(hetero), code(other))
                   .byte(distance(x, y)),
               1);
    }
  }
}

/// Hash of a ring system: its atoms, exocyclic double bonds and bond orders, by repeated refinement.
std::uint64_t ring_system_hash(const ContextGraph& graph, const std::vector<std::uint32_t>& atoms) {
  std::vector<std::uint64_t> colour(graph.atoms.size(), 0), next(graph.atoms.size(), 0);
  std::vector<char> inside(graph.atoms.size(), 0);
  for (const std::uint32_t i : atoms) inside[i] = 1;
  for (const std::uint32_t i : atoms) {
    bool exocyclic = false;
    for (const auto& neighbour : around(graph, i)) {
      exocyclic = exocyclic || (inside[neighbour.atom] == 0 && graph.bonds[neighbour.bond].order == 2);
    }
    colour[i] = mix(code(graph.atoms[i].kind), exocyclic ? 2 : 1);
  }
  for (std::size_t round = 0; round < atoms.size() / 2 + 1; ++round) {
    for (const std::uint32_t i : atoms) {
      std::uint64_t sum = 0;
      for (const auto& neighbour : around(graph, i)) {
        if (inside[neighbour.atom] != 0)
          sum += mix(colour[neighbour.atom], graph.bonds[neighbour.bond].order);
      }
      next[i] = mix(colour[i], sum);
    }
    for (const std::uint32_t i : atoms) colour[i] = next[i];
  }
  std::uint64_t sum = 0;
  for (const std::uint32_t i : atoms) sum += mix(colour[i], 5);
  return mix(sum, atoms.size());
}

/// Rings joined into systems by shared atoms: gives each ring the number of its system.
std::vector<std::size_t> ring_systems(const ContextGraph& graph) {
  std::vector<std::size_t> system(graph.rings.size());
  for (std::size_t r = 0; r < system.size(); ++r) system[r] = r;
  for (std::size_t r = 0; r < system.size(); ++r) {
    for (std::size_t q = 0; q < r; ++q) {
      if (system[r] == system[q] || shared(graph.rings[r].atoms, graph.rings[q].atoms) == 0) continue;
      const std::size_t from = std::max(system[r], system[q]), to = std::min(system[r], system[q]);
      std::replace(system.begin(), system.begin() + static_cast<std::ptrdiff_t>(r) + 1, from, to);
    }
  }
  return system;
}

void count_ring_systems(const ContextGraph& graph, FeatureSink& sink) {
  const std::vector<std::size_t> system = ring_systems(graph);
  for (std::size_t s = 0; s < system.size(); ++s) {
    if (system[s] != s) continue;
    std::vector<std::uint32_t> atoms;
    double weight = 0;
    std::size_t members = 0;
    for (std::size_t r = s; r < system.size(); ++r) {
      if (system[r] != s) continue;
      ++members;
      const ContextRing& ring = graph.rings[r];
      atoms.insert(atoms.end(), ring.atoms.begin(), ring.atoms.end());
      if (ring.atoms.size() <= 4) weight += 1;
      for (std::size_t q = s; q < r; ++q) {
        if (system[q] != s || shared(ring.atoms, graph.rings[q].atoms) == 0) continue;
        weight += shared(ring.bonds, graph.rings[q].bonds) == 1 ? 0.5 : 1.0;
      }
    }
    std::sort(atoms.begin(), atoms.end());
    atoms.erase(std::unique(atoms.begin(), atoms.end()), atoms.end());
    if (members == 1 && weight == 0) {
      const bool aromatic =
          std::all_of(atoms.begin(), atoms.end(), [&](std::uint32_t i) { return graph.atoms[i].aromatic; });
      weight = aromatic ? 0.25 : 0.5;
    }
    sink.add(FeatureCode(FeatureClass::SC).word(ring_system_hash(graph, atoms)), std::sqrt(weight));
  }
}

void count_ring_pairs(const ContextGraph& graph, FeatureSink& sink, DeviationMeasures& measures) {
  for (std::size_t r = 0; r < graph.rings.size(); ++r) {
    for (std::size_t q = 0; q < r; ++q) {
      const ContextRing &a = graph.rings[r], &b = graph.rings[q];
      if (shared(a.atoms, b.atoms) == 0) continue;
      const std::size_t bonds = shared(a.bonds, b.bonds);
      measures.ring += bonds == 1 ? 0.5 : 1.0;
      const unsigned x = shown_size(a) << 8 | (a.aromatic ? 1u : 0u),
                     y = shown_size(b) << 8 | (b.aromatic ? 1u : 0u);
      sink.add(FeatureCode(FeatureClass::RF).byte(static_cast<unsigned>(bonds) & 255).sorted_pairs(x, y), 1);
    }
  }
}

}  // namespace

void count_ring_features(const ContextGraph& graph, FeatureSink& sink, DeviationMeasures& measures) {
  for (const ContextRing& ring : graph.rings) {
    count_ring(graph, ring, sink);
    count_fusion_pattern(graph, ring, sink);
    count_positions(graph, ring, sink);
    // The measure counts small saturated rings only: no aromatic ring has four atoms.
    if (ring.atoms.size() <= 4) measures.ring += 1;
  }
  count_ring_pairs(graph, sink, measures);
  count_ring_systems(graph, sink);
}

}  // namespace heatledger::estimate
