#include "core/molecule/normalise.hpp"

#include <algorithm>
#include <optional>
#include <tuple>
#include <vector>

#include "core/molecule/kekule_choice.hpp"
#include "core/molecule/octet_form.hpp"

namespace heatledger::molecule {
namespace {

// Which of several neighbours takes part first; equal elements give equal bonds, so their order does not
// matter.
int partner_class(int element) {
  switch (element) {
    case 8:
      return 0;
    case 16:
    case 34:
    case 52:
      return 1;
    case 9:
    case 17:
    case 35:
    case 53:
      return 2;
    case 7:
      return 3;
    default:
      return 4;
  }
}
constexpr int partner_classes = 5;

bool opposite(const Atom& a, const Atom& b) {
  return (a.charge > 0 && b.charge < 0) || (a.charge < 0 && b.charge > 0);
}

// Charges that a bond can take up: beyond them (oxygen at -2 with a bond) the text means no such group.
bool can_give_pair(const Atom& minus, int excess) {
  const int kind = partner_class(minus.element);
  return excess == 0 && minus.charge >= (kind == 0 || kind == 2 ? -1 : -2);
}

bool any_charge(const Graph& graph) {
  for (const Atom& atom : graph.atoms) {
    if (atom.charge != 0) return true;
  }
  return false;
}

bool keeps_octet(const Atom& atom) {
  return atom.element == 7 || atom.element == 8;
}

int octet_bonds(const Atom& atom) {
  return atom.element == 7 ? 3 : atom.element == 8 ? 2 : 1000;
}

// By how many bonds each atom stands above its octet; 0 for elements that may expand it.
std::vector<int> octet_excess(const Graph& graph) {
  std::vector<int> excess(graph.atoms.size(), 0);
  for (const Bond& bond : graph.bonds) {
    excess[bond.a] += static_cast<int>(bond.order);
    excess[bond.b] += static_cast<int>(bond.order);
  }
  for (std::size_t i = 0; i < excess.size(); ++i) {
    const Atom& atom = graph.atoms[i];
    excess[i] = std::max(0, excess[i] + atom.hydrogens - octet_bonds(atom) - atom.charge);
  }
  return excess;
}

bool terminal(const Graph& graph, const Adjacency& adjacency, std::uint32_t atom) {
  return adjacency.first[atom + 1] - adjacency.first[atom] == 1 && graph.atoms[atom].hydrogens == 0;
}

// Lower is preferred; negative: the bond cannot give an order back.
int giving_class(const Graph& graph, const Adjacency& adjacency, const Adjacency::Entry& entry) {
  const Bond& bond = graph.bonds[entry.bond];
  const int element = graph.atoms[entry.atom].element;
  if (bond.order != Order::Double && bond.order != Order::Triple) return -1;
  const bool end = terminal(graph, adjacency, entry.atom);
  // Of two bonds to the same element the double one gives.
  const int triple = bond.order == Order::Triple ? 1 : 0;
  if (end && element == 8 && bond.order == Order::Double) return 0;
  if (end && partner_class(element) == 1) return 2 + triple;
  if (end && element == 7) return 5 - triple;  // azides: N=N=N, also where the other end is charged already
  return 6 + 2 * partner_class(element) + triple;
}

// CO and isocyanides keep their triple bond; only the charges come back. Empty where this is no such atom.
std::optional<std::uint32_t> carbon_of_triple_bond(const Graph& graph, const Adjacency& adjacency,
                                                   std::uint32_t atom) {
  for (std::uint32_t e = adjacency.first[atom]; e < adjacency.first[atom + 1]; ++e) {
    const Adjacency::Entry& entry = adjacency.entries[e];
    if (graph.bonds[entry.bond].order == Order::Triple && graph.atoms[entry.atom].element == 6 &&
        terminal(graph, adjacency, entry.atom)) {
      return entry.atom;
    }
  }
  return std::nullopt;
}

// `ranks`: what decides between equal bonds; null where only the number of bonds matters. @return whether an
// order or a charge moved
bool return_to_octet(Graph& graph, const Adjacency& adjacency, const std::vector<int>& excess,
                     const std::vector<std::uint32_t>* ranks, std::uint32_t atom) {
  if (excess[atom] < 1 || excess[atom] > 2) return false;
  Atom& centre = graph.atoms[atom];
  if (const std::optional<std::uint32_t> carbon = carbon_of_triple_bond(graph, adjacency, atom)) {
    ++centre.charge;
    --graph.atoms[*carbon].charge;
    return true;
  }
  const Adjacency::Entry* best = nullptr;
  struct Preference {  // lower first; the element decides where a class holds several, as bonds differ by it
    int kind;
    int element;
    std::uint32_t rank;
    bool operator<(const Preference& other) const {
      return std::tie(kind, element, rank) < std::tie(other.kind, other.element, other.rank);
    }
  } best_preference{};
  for (std::uint32_t e = adjacency.first[atom]; e < adjacency.first[atom + 1]; ++e) {
    const Adjacency::Entry& entry = adjacency.entries[e];
    const int kind = giving_class(graph, adjacency, entry);
    if (kind < 0 || excess[entry.atom] > 0) continue;
    const int element = graph.atoms[entry.atom].element;
    const Preference preference{kind, element == 6 ? -1 : element,
                                ranks == nullptr ? 0 : (*ranks)[entry.atom]};
    if (best != nullptr && !(preference < best_preference)) continue;
    best = &entry;
    best_preference = preference;
  }
  if (best == nullptr) return false;
  Bond& bond = graph.bonds[best->bond];
  bond.order = static_cast<Order>(static_cast<int>(bond.order) - 1);
  ++centre.charge;
  --graph.atoms[best->atom].charge;
  return true;
}

// One pass over the atoms above their octet. Two of them side by side need another: what the first hands back
// may put the second within reach. @return whether an order was handed back; each lowers one, so passes come
// to an end
bool hand_back_orders(Graph& graph, const TieBreaker* ties) {
  const std::vector<int> excess = octet_excess(graph);
  std::vector<std::uint32_t> over;
  for (std::uint32_t i = 0; i < graph.atoms.size(); ++i) {
    if (excess[i] > 0) over.push_back(i);
  }
  if (over.empty()) return false;
  Adjacency adjacency;
  build_adjacency(graph, adjacency);
  std::vector<std::uint32_t> ranks;
  if (ties != nullptr) {
    ranks = (*ties)(graph);
    std::sort(over.begin(), over.end(),
              [&](std::uint32_t a, std::uint32_t b) { return ranks[a] < ranks[b]; });
  }
  bool changed = false;
  for (const std::uint32_t atom : over) {
    changed |= return_to_octet(graph, adjacency, excess, ties != nullptr ? &ranks : nullptr, atom);
  }
  return changed;
}

// What join_charges leaves as it is.
struct Joining {
  bool keep_adducts = false;      // a borate or aluminate beside a cation has its octet by its charge
  bool keep_octet_atoms = false;  // a positive nitrogen or oxygen
};

// One round over the bonds whose positive end keeps its octet or does not. @return whether a pair was joined
bool join_pairs(Graph& graph, const Joining& joining, const std::vector<int>& excess, bool octet_ends) {
  bool changed = false;
  for (int turn = 0; turn < partner_classes; ++turn) {
    for (Bond& bond : graph.bonds) {
      Atom& a = graph.atoms[bond.a];
      Atom& b = graph.atoms[bond.b];
      if (!opposite(a, b)) continue;
      Atom& plus = a.charge > 0 ? a : b;
      Atom& minus = a.charge > 0 ? b : a;
      if (keeps_octet(plus) != octet_ends) continue;
      const auto minus_at = static_cast<std::size_t>(&minus - graph.atoms.data());
      if (partner_class(minus.element) != turn || !can_give_pair(minus, excess[minus_at])) continue;
      if (joining.keep_adducts && (minus.element == 5 || minus.element == 13)) continue;
      --plus.charge;
      ++minus.charge;
      if (!bond.aromatic && bond.order < Order::Triple) {
        bond.order = static_cast<Order>(static_cast<int>(bond.order) + 1);
      }
      changed = true;
    }
  }
  return changed;
}

// Positive ends that may go beyond an octet come first: a nitrogen would only hand the order back.
void join_charges(Graph& graph, const Joining& joining) {
  if (!any_charge(graph)) return;
  const std::vector<int> excess = octet_excess(graph);
  while (join_pairs(graph, joining, excess, false)) continue;
  while (!joining.keep_octet_atoms && join_pairs(graph, joining, excess, true)) continue;
}

}  // namespace

void neutralise_charges(Graph& graph) {
  join_charges(graph, {});
}

void take_octet_form(Graph& graph, const TieBreaker* ties) {
  for (Bond& bond : graph.bonds) bond.aromatic = false;
  join_charges(graph, {.keep_adducts = true});
  bool moved = false;
  while (hand_back_orders(graph, ties)) moved = true;
  // A charge handed back beside a metal cation is taken up there, as it would be from the text of this form.
  if (moved) join_charges(graph, {.keep_adducts = true, .keep_octet_atoms = true});
  choose_kekule_bonds(graph);
}

void take_octet_form(Graph& graph) {
  take_octet_form(graph, nullptr);
}

}  // namespace heatledger::molecule
