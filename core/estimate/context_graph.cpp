#include "core/estimate/context_graph.hpp"

#include <algorithm>

#include "core/molecule/aromaticity.hpp"
#include "core/molecule/elements.hpp"
#include "core/molecule/kekule_choice.hpp"
#include "core/molecule/normalise.hpp"
#include "core/molecule/ranking.hpp"
#include "core/molecule/rings.hpp"

namespace heatledger::estimate {
namespace {

constexpr unsigned kMostNeighbours = 8;
constexpr std::uint32_t kHydrogen = 0xffffffffU;  ///< marks an explicit hydrogen in the index map

Error refusal(const char* code, std::string message, std::size_t atom, const char* hint) {
  return Error{code, std::move(message), "atom " + std::to_string(atom + 1), hint};
}

/// What the model does not cover is refused by name before anything is counted.
Status check_atoms(const molecule::Graph& graph) {
  if (graph.atoms.empty()) {
    return Error{"estimate.empty", "There is no structure to estimate from.", "",
                 "Give the species a structure."};
  }
  int charge = 0;
  for (std::size_t i = 0; i < graph.atoms.size(); ++i) {
    const molecule::Atom& atom = graph.atoms[i];
    const std::string symbol(molecule::symbol(atom.element));
    if (!kind_of(atom.element)) {
      return refusal("estimate.element", "The model of bonds in context has no data for " + symbol + ".", i,
                     "Give a measured or published formation enthalpy.");
    }
    if (atom.unpaired != 0) {
      return refusal("estimate.radical",
                     "The " + symbol + " atom has an unpaired electron: radicals are outside the model.", i,
                     "Give a measured or published formation enthalpy.");
    }
    charge += atom.charge;
  }
  if (charge != 0) {
    return Error{"estimate.charged", "The species carries a charge: ions are outside the model.", "",
                 "Ions go by their formation enthalpies in water."};
  }
  return success();
}

Status check_one_fragment(const molecule::Graph& graph) {
  molecule::Adjacency adjacency;
  build_adjacency(graph, adjacency);
  std::vector<char> reached(graph.atoms.size(), 0);
  std::vector<std::uint32_t> open{0};
  reached[0] = 1;
  std::size_t count = 1;
  while (!open.empty()) {
    const std::uint32_t atom = open.back();
    open.pop_back();
    for (std::uint32_t e = adjacency.first[atom]; e < adjacency.first[atom + 1]; ++e) {
      const std::uint32_t next = adjacency.entries[e].atom;
      if (reached[next] != 0) continue;
      reached[next] = 1;
      ++count;
      open.push_back(next);
    }
  }
  if (count == graph.atoms.size()) return success();
  return Error{
      "estimate.fragments",
      "The structure has several parts that no bond joins: salts and mixtures are outside the model.", "",
      "Estimate each part as a species of its own."};
}

/// Explicit hydrogens become counts of their neighbour; only H2 keeps its bond.
Status fill_atoms(const molecule::Graph& graph, ContextGraph& out) {
  std::vector<std::uint32_t> index(graph.atoms.size(), kHydrogen);
  for (std::size_t i = 0; i < graph.atoms.size(); ++i) {
    const molecule::Atom& atom = graph.atoms[i];
    out.elements[0] += atom.hydrogens;
    const Kind kind = *kind_of(atom.element);
    ++out.elements[static_cast<std::size_t>(kind)];
    if (kind == Kind::H) {
      out.hydrogen_bonds += atom.hydrogens;
      continue;
    }
    index[i] = static_cast<std::uint32_t>(out.atoms.size());
    ContextAtom heavy;
    heavy.kind = kind;
    heavy.sign = atom.charge > 0 ? 1 : atom.charge < 0 ? 2 : 0;
    heavy.hydrogens = atom.hydrogens;
    heavy.aromatic = atom.aromatic;
    heavy.chirality = atom.chirality;
    heavy.source = static_cast<std::uint32_t>(i);
    out.atoms.push_back(heavy);
  }
  std::vector<std::uint8_t> hydrogen_degree(graph.atoms.size(), 0);
  for (std::size_t k = 0; k < graph.bonds.size(); ++k) {
    const molecule::Bond& bond = graph.bonds[k];
    const std::uint32_t a = index[bond.a], b = index[bond.b];
    for (const std::uint32_t end : {bond.a, bond.b}) {
      if (index[end] == kHydrogen && ++hydrogen_degree[end] > 1) {
        return refusal("estimate.valence",
                       "A hydrogen atom has two bonds: three-centre bonds are outside the model.", end,
                       "Give a measured or published formation enthalpy.");
      }
    }
    if (a == kHydrogen && b == kHydrogen) {
      ++out.hydrogen_bonds;
    } else if (a == kHydrogen || b == kHydrogen) {
      ++out.atoms[a == kHydrogen ? b : a].hydrogens;
    } else {
      ContextBond heavy;
      heavy.a = a;
      heavy.b = b;
      heavy.order = bond.aromatic ? aromatic_order : static_cast<std::uint8_t>(bond.order);
      heavy.side_of_b = bond.mark == molecule::BondMark::Up     ? 1
                        : bond.mark == molecule::BondMark::Down ? -1
                                                                : 0;
      heavy.source = static_cast<std::uint32_t>(k);
      if (heavy.order == 0 || heavy.order > aromatic_order || bond.order == molecule::Order::Quadruple) {
        return refusal("estimate.valence", "A bond of this order is outside the model.", bond.a,
                       "Bonds are single, double, triple or aromatic.");
      }
      out.bonds.push_back(heavy);
    }
  }
  return success();
}

void fill_neighbours(ContextGraph& out) {
  out.first.assign(out.atoms.size() + 1, 0);
  for (const ContextBond& bond : out.bonds) {
    ++out.first[bond.a + 1];
    ++out.first[bond.b + 1];
  }
  for (std::size_t i = 1; i < out.first.size(); ++i) out.first[i] += out.first[i - 1];
  out.neighbours.resize(out.bonds.size() * 2);
  std::vector<std::uint32_t> next(out.first.begin(), out.first.end() - 1);
  for (std::uint32_t k = 0; k < out.bonds.size(); ++k) {
    out.neighbours[next[out.bonds[k].a]++] = {out.bonds[k].b, k};
    out.neighbours[next[out.bonds[k].b]++] = {out.bonds[k].a, k};
  }
}

Status fill_types(ContextGraph& out) {
  for (std::uint32_t i = 0; i < out.atoms.size(); ++i) {
    ContextAtom& atom = out.atoms[i];
    const unsigned heavy = out.first[i + 1] - out.first[i];
    if (heavy + atom.hydrogens > kMostNeighbours) {
      return refusal(
          "estimate.valence",
          std::string("The ") + kind_symbol(atom.kind) + " atom has more bonds than the model covers.",
          atom.source, "Check the structure.");
    }
    atom.heavy = static_cast<std::uint8_t>(heavy);
    atom.degree = static_cast<std::uint8_t>(heavy + atom.hydrogens);
    unsigned doubles = 0, triples = 0;
    for (const auto& next : around(out, i)) {
      doubles += out.bonds[next.bond].order == 2;
      triples += out.bonds[next.bond].order == 3;
    }
    atom.unsaturation = atom.aromatic                                            ? Unsaturation::Aromatic
                        : triples != 0 || (doubles >= 2 && atom.kind == Kind::C) ? Unsaturation::Triple
                        : doubles != 0                                           ? Unsaturation::Double
                                                                                 : Unsaturation::None;
  }
  return success();
}

void fill_rings(const molecule::Graph& graph, ContextGraph& out) {
  if (out.bonds.size() < out.atoms.size()) return;  // a tree
  std::vector<std::uint32_t> index(graph.atoms.size(), kHydrogen);
  for (std::uint32_t i = 0; i < out.atoms.size(); ++i) index[out.atoms[i].source] = i;
  for (const molecule::Ring& ring : molecule::relevant_cycles(graph)) {
    ContextRing cycle;
    cycle.aromatic = true;
    for (std::size_t x = 0; x < ring.size(); ++x) {
      const std::uint32_t atom = index[ring[x]], following = index[ring[(x + 1) % ring.size()]];
      cycle.atoms.push_back(atom);
      out.atoms[atom].in_ring = true;
      for (const auto& next : around(out, atom)) {
        if (next.atom != following) continue;
        cycle.bonds.push_back(next.bond);
        ++out.bonds[next.bond].rings;
        cycle.aromatic = cycle.aromatic && out.bonds[next.bond].order == aromatic_order;
        break;
      }
    }
    out.rings.push_back(std::move(cycle));
  }
}

/// Refines the colours of the atoms by their neighbours' colours until every path that a molecule of this
/// size can hold has been walked (or 64 steps, beyond which chains are not told apart).
void refine_colours(ContextGraph& graph) {
  const std::size_t rounds = std::min<std::size_t>(graph.atoms.size() / 2 + 1, 64);
  std::vector<std::uint64_t> next(graph.atoms.size());
  for (std::size_t round = 0; round < rounds; ++round) {
    for (std::uint32_t i = 0; i < graph.atoms.size(); ++i) {
      std::uint64_t sum = 0;  // order of the neighbours must not matter: a sum of well mixed words
      for (const auto& neighbour : around(graph, i)) {
        const ContextBond& bond = graph.bonds[neighbour.bond];
        sum += mix(graph.atoms[neighbour.atom].colour, bond.order + 8U * bond.rings);
      }
      next[i] = mix(graph.atoms[i].colour, sum);
    }
    for (std::uint32_t i = 0; i < graph.atoms.size(); ++i) graph.atoms[i].colour = next[i];
  }
}

std::uint64_t sum_of_colours(const ContextGraph& graph) {
  std::uint64_t sum = mix(graph.atoms.size(), graph.hydrogen_bonds);
  for (const ContextAtom& atom : graph.atoms) sum += mix(atom.colour, 1);
  return sum;
}

void fill_colours(ContextGraph& graph) {
  for (std::uint32_t i = 0; i < graph.atoms.size(); ++i)
    graph.atoms[i].colour = mix(graph.atoms[i].full(), 7);
  std::vector<std::uint64_t> rings(graph.atoms.size(), 0);
  for (const ContextRing& ring : graph.rings) {
    for (const std::uint32_t atom : ring.atoms) rings[atom] += mix(ring.atoms.size(), ring.aromatic ? 3 : 2);
  }
  for (std::uint32_t i = 0; i < graph.atoms.size(); ++i)
    graph.atoms[i].colour = mix(graph.atoms[i].colour, rings[i]);
  refine_colours(graph);
  graph.constitution = mix(sum_of_colours(graph), graph.rings.size());
}

/// Reference neighbour of a double bond's end: the one with the greatest colour.
std::uint32_t reference_neighbour(const ContextGraph& graph, std::uint32_t end, std::uint32_t bond) {
  std::uint32_t best = kHydrogen;
  for (const auto& next : around(graph, end)) {
    if (next.bond == bond) continue;
    if (best == kHydrogen || graph.atoms[next.atom].colour > graph.atoms[best].colour) best = next.atom;
  }
  return best;
}

/// Double bonds that could be drawn elsewhere outside aromatic rings (azulene) are drawn in one canonical
/// way.
void settle_kekule_bonds(molecule::Graph& graph) {
  std::vector<std::uint8_t> labels;
  molecule::find_mobile_bonds(graph, labels);
  bool settled = true;
  for (std::size_t k = 0; k < graph.bonds.size(); ++k) {
    settled = settled && (labels[k] == 0 || graph.bonds[k].aromatic);
    labels[k] = labels[k] != 0 ? 100 : static_cast<std::uint8_t>(graph.bonds[k].order);
  }
  if (!settled) molecule::choose_kekule_bonds(graph, molecule::canonical_ranks(graph, labels));
}

void fill_stereo(const molecule::Graph& source, ContextGraph& graph);

}  // namespace

int side_of(const ContextGraph& graph, std::uint32_t end, std::uint32_t neighbour,
            std::uint32_t double_bond) {
  int given = 0;
  for (const auto& next : around(graph, end)) {
    const ContextBond& bond = graph.bonds[next.bond];
    if (next.bond == double_bond || bond.side_of_b == 0) continue;
    const int side = bond.a == end ? bond.side_of_b : -bond.side_of_b;
    given = next.atom == neighbour ? side : -side;
    if (next.atom == neighbour) return given;
  }
  return given;
}

bool has_stereo(const ContextGraph& graph, std::uint32_t double_bond) {
  const ContextBond& bond = graph.bonds[double_bond];
  for (const std::uint32_t end : {bond.a, bond.b}) {
    if (graph.atoms[end].hydrogens > 1) return false;
    const ContextGraph::Neighbour* others[2] = {nullptr, nullptr};
    unsigned count = 0;
    for (const auto& next : around(graph, end)) {
      if (next.bond == double_bond) continue;
      if (count == 2) return false;
      others[count++] = &next;
    }
    if (count == 0 || side_of(graph, end, others[0]->atom, double_bond) == 0) return false;
    if (count == 2 && graph.atoms[others[0]->atom].colour == graph.atoms[others[1]->atom].colour)
      return false;
  }
  return true;
}

Result<ContextGraph> context_graph(const molecule::Graph& graph, KekuleForm form) {
  if (Status status = check_atoms(graph); !status) return status.error();
  if (Status status = check_one_fragment(graph); !status) return status.error();
  molecule::Graph settled = graph;
  molecule::perceive_aromaticity(settled);
  if (form == KekuleForm::Canonical) settle_kekule_bonds(settled);
  molecule::neutralise_charges(settled);
  ContextGraph out;
  if (Status status = fill_atoms(settled, out); !status) return status.error();
  fill_neighbours(out);
  if (Status status = fill_types(out); !status) return status.error();
  fill_rings(settled, out);
  fill_colours(out);
  fill_stereo(settled, out);
  return out;
}

namespace {

/// Neighbours of a stereocentre in the order of writing: predecessor, ring closures, branches; empty when the
/// graph does not tell it (two ring closures opened at one atom, or one opened and one closed).
std::vector<std::uint32_t> written_order(const molecule::Graph& source, std::uint32_t centre) {
  std::vector<std::uint32_t> predecessor, closing, opening, branches;
  std::vector<char> placed(source.atoms.size(), 0);  // an atom's first bond to an earlier one is its branch
  for (const molecule::Bond& bond : source.bonds) {
    const std::uint32_t earlier = std::min(bond.a, bond.b), later = std::max(bond.a, bond.b);
    const bool branch = placed[later] == 0;
    placed[later] = 1;
    if (later == centre) (branch ? predecessor : closing).push_back(earlier);
    if (earlier == centre) (branch ? branches : opening).push_back(later);
  }
  if (opening.size() > 1 || (!opening.empty() && !closing.empty())) return {};
  std::vector<std::uint32_t> order = predecessor;
  order.insert(order.end(), closing.begin(), closing.end());
  order.insert(order.end(), opening.begin(), opening.end());
  order.insert(order.end(), branches.begin(), branches.end());
  return order;
}

/// Parity of a stereocentre's neighbours, sorted by colour, against the order of writing: +1, -1, or 0 when
/// two neighbours have one colour or the order is not known.
int parity(const molecule::Graph& source, const ContextGraph& graph, std::uint32_t atom,
           const std::vector<std::uint32_t>& index) {
  const ContextAtom& centre = graph.atoms[atom];
  std::vector<std::uint64_t> colours;
  const std::vector<std::uint32_t> order = written_order(source, centre.source);
  for (const std::uint32_t other : order)
    colours.push_back(index[other] == kHydrogen ? 0 : graph.atoms[index[other]].colour);
  if (source.atoms[centre.source].hydrogens != 0) {
    // A hydrogen inside the brackets counts as written right behind the predecessor, or first of all.
    const bool preceded = !order.empty() && order.front() < centre.source;
    colours.insert(colours.begin() + (preceded ? 1 : 0), 0);
  }
  int sign = centre.chirality == 1 ? 1 : -1;
  for (std::size_t i = 0; i < colours.size(); ++i) {
    for (std::size_t j = i + 1; j < colours.size(); ++j) {
      if (colours[i] == colours[j]) return 0;
      if (colours[i] > colours[j]) sign = -sign;
    }
  }
  return sign;
}

bool can_turn(const ContextGraph& graph, std::uint32_t bond) {
  constexpr std::size_t kSmallestRingWithTrans = 8;
  return std::none_of(graph.rings.begin(), graph.rings.end(), [&](const ContextRing& ring) {
    return ring.bonds.size() < kSmallestRingWithTrans &&
           std::find(ring.bonds.begin(), ring.bonds.end(), bond) != ring.bonds.end();
  });
}

/// Cis or trans of every double bond that says so, as marks on its two ends.
bool mark_double_bonds(const ContextGraph& graph, std::vector<std::uint64_t>& marks) {
  bool any = false;
  for (std::uint32_t k = 0; k < graph.bonds.size(); ++k) {
    const ContextBond& bond = graph.bonds[k];
    if (bond.order != 2 || !has_stereo(graph, k) || !can_turn(graph, k)) continue;
    const int a = side_of(graph, bond.a, reference_neighbour(graph, bond.a, k), k);
    const int b = side_of(graph, bond.b, reference_neighbour(graph, bond.b, k), k);
    marks[bond.a] = marks[bond.b] = a == b ? 11 : 12;
    any = true;
  }
  return any;
}

std::vector<std::uint64_t> colours_of(const ContextGraph& graph) {
  std::vector<std::uint64_t> colours;
  for (const ContextAtom& atom : graph.atoms) colours.push_back(atom.colour);
  return colours;
}

void set_colours(ContextGraph& graph, const std::vector<std::uint64_t>& colours) {
  for (std::uint32_t i = 0; i < graph.atoms.size(); ++i) graph.atoms[i].colour = colours[i];
}

/// Colourings to judge stereocentres by: the plain one, or, where a centre has two neighbours alike (opposite
/// sides of a ring), one for each way to tell them apart.
std::vector<std::vector<std::uint64_t>> told_apart(ContextGraph& graph) {
  const std::vector<std::uint64_t> plain = colours_of(graph);
  std::vector<std::vector<std::uint64_t>> out;
  for (std::uint32_t i = 0; i < graph.atoms.size(); ++i) {
    if (graph.atoms[i].chirality != 1 && graph.atoms[i].chirality != 2) continue;
    for (const auto& x : around(graph, i)) {
      for (const auto& y : around(graph, i)) {
        if (&x == &y || plain[x.atom] != plain[y.atom]) continue;
        graph.atoms[x.atom].colour = mix(plain[x.atom], 77);
        refine_colours(graph);
        out.push_back(colours_of(graph));
        set_colours(graph, plain);
        break;
      }
    }
  }
  if (out.empty()) out.push_back(plain);
  return out;
}

/// Key of the stereo given: colours once more with the marks mixed in. Mirror images get one common key, so
/// both signs are taken and added, and so are all ways to tell like neighbours apart.
void fill_stereo(const molecule::Graph& source, ContextGraph& graph) {
  std::vector<std::uint64_t> marks(graph.atoms.size(), 0);
  bool any = mark_double_bonds(graph, marks);
  const bool centres = std::any_of(graph.atoms.begin(), graph.atoms.end(), [](const ContextAtom& atom) {
    return atom.chirality == 1 || atom.chirality == 2;
  });
  if (!any && !centres) return;
  const std::vector<std::uint64_t> plain = colours_of(graph);
  std::vector<std::uint32_t> index(source.atoms.size(), kHydrogen);
  for (std::uint32_t i = 0; i < graph.atoms.size(); ++i) index[graph.atoms[i].source] = i;
  std::uint64_t key = 0;
  for (const std::vector<std::uint64_t>& colours : told_apart(graph)) {
    set_colours(graph, colours);
    std::vector<int> signs(graph.atoms.size(), 0);
    for (std::uint32_t i = 0; i < graph.atoms.size(); ++i) {
      if (graph.atoms[i].chirality == 1 || graph.atoms[i].chirality == 2)
        signs[i] = parity(source, graph, i, index);
      any = any || signs[i] != 0;
    }
    for (const int hand : {1, -1}) {
      for (std::uint32_t i = 0; i < graph.atoms.size(); ++i) {
        graph.atoms[i].colour = mix(colours[i], marks[i] + (signs[i] == 0      ? 0
                                                            : signs[i] == hand ? 101
                                                                               : 102));
      }
      refine_colours(graph);
      key += mix(sum_of_colours(graph), 9);
    }
  }
  set_colours(graph, plain);
  if (any) graph.stereo = key;
}

}  // namespace
}  // namespace heatledger::estimate
