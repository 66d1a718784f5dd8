#include "core/molecule/line_fragment.hpp"

#include <algorithm>
#include <array>

#include "core/base/check.hpp"

namespace heatledger::molecule {

int chain_valence(int element) {
  switch (element) {
    case 6:
    case 14:
      return 4;
    case 7:
    case 15:
      return 3;
    case 8:
    case 16:
      return 2;
    case 1:
    case 9:
    case 17:
    case 35:
    case 53:
      return 1;
    default:
      return 0;
  }
}

std::uint32_t LineFragment::add_atom(int element, int valences) {
  Atom atom;
  atom.element = static_cast<std::uint8_t>(element);
  graph.atoms.push_back(atom);
  free.push_back(valences);
  parent.push_back(kNoAtom);
  return static_cast<std::uint32_t>(graph.atoms.size() - 1);
}

bool LineFragment::bind(std::uint32_t a, std::uint32_t b, int order, bool is_fixed) {
  if (free[a] < order || free[b] < order) return false;
  Bond bond;
  bond.a = a;
  bond.b = b;
  bond.order = static_cast<Order>(order);
  graph.bonds.push_back(bond);
  fixed.push_back(is_fixed);
  free[a] -= order;
  free[b] -= order;
  return true;
}

bool LineFragment::add_hydrogens(std::uint32_t atom, int count) {
  if (count < 0 || free[atom] < count) return false;
  free[atom] -= count;
  graph.atoms[atom].hydrogens = static_cast<std::uint8_t>(graph.atoms[atom].hydrogens + count);
  return true;
}

int LineFragment::total_free() const {
  int total = 0;
  for (const int one : free) total += one;
  return total;
}

bool LineFragment::is_link() const {
  if (total_free() != 2 || first == kNoAtom || current == kNoAtom) return false;
  return first == current ? free[first] == 2 : free[first] == 1 && free[current] == 1;
}

std::uint32_t LineFragment::append(const LineFragment& other) {
  const auto base = static_cast<std::uint32_t>(graph.atoms.size());
  graph.atoms.insert(graph.atoms.end(), other.graph.atoms.begin(), other.graph.atoms.end());
  for (Bond bond : other.graph.bonds) {
    bond.a += base;
    bond.b += base;
    graph.bonds.push_back(bond);
  }
  free.insert(free.end(), other.free.begin(), other.free.end());
  fixed.insert(fixed.end(), other.fixed.begin(), other.fixed.end());
  for (const std::uint32_t one : other.parent) parent.push_back(one == kNoAtom ? kNoAtom : one + base);
  return base;
}

std::uint32_t LineFragment::free_end() const {
  if (current != kNoAtom && free[current] > 0) return current;
  if (spare != kNoAtom && free[spare] > 0) return spare;
  return kNoAtom;
}

void LineFragment::step_back() {
  if (current == kNoAtom || free[current] > 0 || graph.atoms[current].element == 6) return;
  const std::uint32_t carrier = parent[current];
  if (carrier != kNoAtom && free[carrier] > 0) current = carrier;
}

bool LineFragment::close_valences() {
  // The bonds that may grow form a forest, so an atom with one open neighbour fixes that bond.
  Adjacency neighbours;
  build_adjacency(graph, neighbours);
  auto partner = [&](std::uint32_t atom, std::size_t& open) {
    Adjacency::Entry found{kNoAtom, 0};
    open = 0;
    for (std::uint32_t i = neighbours.first[atom]; i < neighbours.first[atom + 1]; ++i) {
      const Adjacency::Entry& entry = neighbours.entries[i];
      if (fixed[entry.bond] || free[entry.atom] == 0) continue;
      found = entry;
      ++open;
    }
    return found;
  };
  std::vector<std::uint32_t> waiting;
  for (std::uint32_t i = 0; i < graph.atoms.size(); ++i) waiting.push_back(i);
  while (!waiting.empty()) {
    const std::uint32_t atom = waiting.back();
    waiting.pop_back();
    if (free[atom] == 0) continue;
    std::size_t open = 0;
    const Adjacency::Entry next = partner(atom, open);
    if (open != 1) continue;
    const int more = free[atom];
    const int order = static_cast<int>(graph.bonds[next.bond].order) + more;
    if (order > 3 || free[next.atom] < more) return false;
    graph.bonds[next.bond].order = static_cast<Order>(order);
    fixed[next.bond] = true;
    free[atom] = 0;
    free[next.atom] -= more;
    // The neighbour may have one open neighbour left now, or those around it may.
    waiting.push_back(next.atom);
    for (std::uint32_t i = neighbours.first[next.atom]; i < neighbours.first[next.atom + 1]; ++i) {
      waiting.push_back(neighbours.entries[i].atom);
    }
  }
  return total_free() == 0;
}

namespace {

std::array<std::uint32_t, 6> add_ring(LineFragment& piece) {
  std::array<std::uint32_t, 6> ring{};
  for (std::uint32_t& atom : ring) atom = piece.add_atom(6, 4);
  for (std::size_t i = 0; i < 6; ++i) piece.bind(ring[i], ring[(i + 1) % 6], i % 2 == 0 ? 2 : 1, true);
  return ring;
}

}  // namespace

LineFragment phenyl_piece() {
  LineFragment piece;
  const std::array<std::uint32_t, 6> ring = add_ring(piece);
  for (std::size_t i = 1; i < 6; ++i) piece.add_hydrogens(ring[i], 1);
  piece.first = piece.current = ring[0];
  return piece;
}

LineFragment phenylene_piece(int apart) {
  LineFragment piece;
  const std::array<std::uint32_t, 6> ring = add_ring(piece);
  for (int i = 1; i < 6; ++i) {
    if (i != apart) piece.add_hydrogens(ring[static_cast<std::size_t>(i)], 1);
  }
  piece.first = ring[0];
  piece.current = ring[static_cast<std::size_t>(apart)];
  return piece;
}

LineFragment vinyl_piece() {
  LineFragment piece;
  piece.first = piece.current = piece.add_atom(6, 4);
  const std::uint32_t outer = piece.add_atom(6, 4);
  piece.bind(piece.first, outer, 2, true);
  piece.add_hydrogens(piece.first, 1);
  piece.add_hydrogens(outer, 2);
  return piece;
}

LineFragment nitro_piece() {
  LineFragment piece;
  piece.first = piece.current = piece.add_atom(7, 4);
  piece.graph.atoms[piece.first].charge = 1;
  piece.bind(piece.first, piece.add_atom(8, 2), 2, true);
  const std::uint32_t minus = piece.add_atom(8, 1);
  piece.graph.atoms[minus].charge = -1;
  piece.bind(piece.first, minus, 1, true);
  return piece;
}

LineFragment azide_piece() {
  LineFragment piece;
  piece.first = piece.current = piece.add_atom(7, 3);
  const std::uint32_t middle = piece.add_atom(7, 4), end = piece.add_atom(7, 2);
  piece.graph.atoms[middle].charge = 1;
  piece.graph.atoms[end].charge = -1;
  piece.bind(piece.first, middle, 2, true);
  piece.bind(middle, end, 2, true);
  return piece;
}

LineFragment diazo_piece() {
  LineFragment piece;
  piece.first = piece.current = piece.add_atom(7, 4);
  const std::uint32_t end = piece.add_atom(7, 2);
  piece.graph.atoms[piece.first].charge = 1;
  piece.graph.atoms[end].charge = -1;
  piece.bind(piece.first, end, 2, true);
  return piece;
}

LineFragment carboxyl_piece() {
  LineFragment piece;
  piece.first = piece.current = piece.add_atom(6, 4);
  piece.bind(piece.first, piece.add_atom(8, 2), 2, true);
  const std::uint32_t hydroxyl = piece.add_atom(8, 2);
  piece.bind(piece.first, hydroxyl, 1, true);
  piece.add_hydrogens(hydroxyl, 1);
  return piece;
}

LineFragment alkyl_piece(int carbons, char kind) {
  CHECK(carbons >= 2 && carbons <= 100, "an alkyl group of 2 to 100 carbons");
  LineFragment piece;
  piece.first = piece.current = piece.add_atom(6, 4);
  auto grow = [&](std::uint32_t from) {
    const std::uint32_t atom = piece.add_atom(6, 4);
    piece.bind(from, atom, 1, true);
    return atom;
  };
  std::uint32_t end = piece.first;
  switch (kind) {
    case 't':
      for (int i = 1; i < carbons; ++i) grow(piece.first);
      break;
    case 's':
      grow(piece.first);
      grow(grow(piece.first));
      break;
    case 'i':
      if (carbons == 4) end = grow(end);
      grow(end);
      grow(end);
      break;
    default:
      for (int i = 1; i < carbons; ++i) end = grow(end);
  }
  for (std::uint32_t i = 0; i < piece.graph.atoms.size(); ++i)
    piece.add_hydrogens(i, piece.free[i] - (i == piece.first ? 1 : 0));
  return piece;
}

}  // namespace heatledger::molecule
