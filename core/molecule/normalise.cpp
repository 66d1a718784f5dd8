#include "core/molecule/normalise.hpp"

#include <optional>

#include "core/molecule/kekule_choice.hpp"

namespace heatledger::molecule {
namespace {

// Which of several neighbours takes part first; equal elements give equal bonds, so their order does not matter.
int partner_class(int element) {
  switch (element) {
    case 8: return 0;
    case 16: case 34: case 52: return 1;
    case 9: case 17: case 35: case 53: return 2;
    case 7: return 3;
    default: return 4;
  }
}
constexpr int partner_classes = 5;

bool opposite(const Atom& a, const Atom& b) {
  return (a.charge > 0 && b.charge < 0) || (a.charge < 0 && b.charge > 0);
}

bool any_charge(const Graph& graph) {
  for (const Atom& atom : graph.atoms) {
    if (atom.charge != 0) return true;
  }
  return false;
}

int octet_bonds(const Atom& atom) { return atom.element == 7 ? 3 : atom.element == 8 ? 2 : 255; }

bool terminal(const Graph& graph, const Adjacency& adjacency, std::uint32_t atom) {
  return adjacency.first[atom + 1] - adjacency.first[atom] == 1 && graph.atoms[atom].hydrogens == 0;
}

// Lower is preferred; negative: the bond cannot give an order back.
int giving_class(const Graph& graph, const Adjacency& adjacency, const Adjacency::Entry& entry) {
  const Bond& bond = graph.bonds[entry.bond];
  const int element = graph.atoms[entry.atom].element;
  if (bond.order < Order::Double) return -1;
  const bool end = terminal(graph, adjacency, entry.atom);
  if (end && element == 8 && bond.order == Order::Double) return 0;
  if (end && partner_class(element) == 1) return 1;
  if (end && element == 7) return 2;
  return 3 + partner_class(element);
}

// CO and isocyanides keep their triple bond; only the charges come back. Empty where this is no such atom.
std::optional<std::uint32_t> carbon_of_triple_bond(const Graph& graph, const Adjacency& adjacency, std::uint32_t atom) {
  for (std::uint32_t e = adjacency.first[atom]; e < adjacency.first[atom + 1]; ++e) {
    const Adjacency::Entry& entry = adjacency.entries[e];
    if (graph.bonds[entry.bond].order == Order::Triple && graph.atoms[entry.atom].element == 6 &&
        terminal(graph, adjacency, entry.atom)) {
      return entry.atom;
    }
  }
  return std::nullopt;
}

void return_to_octet(Graph& graph, const Adjacency& adjacency, std::uint32_t atom) {
  Atom& centre = graph.atoms[atom];
  int bonded = centre.hydrogens;
  for (std::uint32_t e = adjacency.first[atom]; e < adjacency.first[atom + 1]; ++e) {
    bonded += static_cast<int>(graph.bonds[adjacency.entries[e].bond].order);
  }
  if (bonded <= octet_bonds(centre) + centre.charge) return;
  if (const std::optional<std::uint32_t> carbon = carbon_of_triple_bond(graph, adjacency, atom)) {
    ++centre.charge;
    --graph.atoms[*carbon].charge;
    return;
  }
  const Adjacency::Entry* best = nullptr;
  int best_class = 0;
  for (std::uint32_t e = adjacency.first[atom]; e < adjacency.first[atom + 1]; ++e) {
    const Adjacency::Entry& entry = adjacency.entries[e];
    const int kind = giving_class(graph, adjacency, entry);
    if (kind < 0 || (best != nullptr && kind >= best_class)) continue;
    best = &entry;
    best_class = kind;
  }
  if (best == nullptr) return;
  Bond& bond = graph.bonds[best->bond];
  bond.order = static_cast<Order>(static_cast<int>(bond.order) - 1);
  ++centre.charge;
  --graph.atoms[best->atom].charge;
}

// `keep_adducts`: a borate or aluminate beside a cation has its octet by its charge and keeps it.
void join_charges(Graph& graph, bool keep_adducts) {
  if (!any_charge(graph)) return;
  for (bool changed = true; changed;) {
    changed = false;
    for (int turn = 0; turn < partner_classes; ++turn) {
      for (Bond& bond : graph.bonds) {
        Atom& a = graph.atoms[bond.a];
        Atom& b = graph.atoms[bond.b];
        if (!opposite(a, b)) continue;
        Atom& plus = a.charge > 0 ? a : b;
        Atom& minus = a.charge > 0 ? b : a;
        if (partner_class(minus.element) != turn) continue;
        if (keep_adducts && (minus.element == 5 || minus.element == 13)) continue;
        --plus.charge;
        ++minus.charge;
        if (!bond.aromatic && bond.order < Order::Triple) {
          bond.order = static_cast<Order>(static_cast<int>(bond.order) + 1);
        }
        changed = true;
      }
    }
  }
}

}  // namespace

void neutralise_charges(Graph& graph) { join_charges(graph, false); }

void take_octet_form(Graph& graph) {
  for (Bond& bond : graph.bonds) bond.aromatic = false;
  join_charges(graph, true);
  Adjacency adjacency;
  build_adjacency(graph, adjacency);
  for (std::uint32_t i = 0; i < graph.atoms.size(); ++i) {
    const int element = graph.atoms[i].element;
    if (element == 7 || element == 8) return_to_octet(graph, adjacency, i);
  }
  choose_kekule_bonds(graph);
}

}  // namespace heatledger::molecule
