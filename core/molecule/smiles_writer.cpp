#include "core/molecule/smiles_writer.hpp"

#include <algorithm>
#include <cstddef>
#include <utility>

#include "core/molecule/elements.hpp"
#include "core/molecule/valence.hpp"

namespace heatledger::molecule {
namespace {

constexpr std::uint32_t none = 0xFFFFFFFF;

bool in_organic_subset(int element) {
  switch (element) {
    case 5:
    case 6:
    case 7:
    case 8:
    case 9:
    case 15:
    case 16:
    case 17:
    case 35:
    case 53:
      return true;
    default:
      return false;
  }
}

void append_charge(std::string& text, int charge) {
  if (charge == 0) return;
  text += charge > 0 ? '+' : '-';
  const int size = charge > 0 ? charge : -charge;
  if (size > 1) text += std::to_string(size);
}

class Writer {
 public:
  Writer(const Graph& graph, const std::vector<std::uint32_t>& ranks)
      : graph_(graph),
        ranks_(ranks),
        children_(graph.atoms.size()),
        opens_(graph.atoms.size()),
        closes_(graph.atoms.size()),
        parent_bond_(graph.atoms.size(), none),
        size_(graph.atoms.size(), 1),
        bonded_(graph.atoms.size(), 0) {
    build_adjacency(graph, adjacency_);
    for (std::uint32_t i = 0; i < graph.atoms.size(); ++i) {
      const auto begin = adjacency_.entries.begin() + adjacency_.first[i];
      const auto end = adjacency_.entries.begin() + adjacency_.first[i + 1];
      std::sort(begin, end, [&](const Adjacency::Entry& a, const Adjacency::Entry& b) {
        return ranks_[a.atom] < ranks_[b.atom];
      });
    }
    for (const Bond& bond : graph.bonds) {
      bonded_[bond.a] += static_cast<int>(bond.order);
      bonded_[bond.b] += static_cast<int>(bond.order);
    }
  }

  std::string write() {
    std::vector<std::uint32_t> by_rank(graph_.atoms.size());
    for (std::uint32_t i = 0; i < by_rank.size(); ++i) by_rank[i] = i;
    std::sort(by_rank.begin(), by_rank.end(),
              [&](std::uint32_t a, std::uint32_t b) { return ranks_[a] < ranks_[b]; });
    std::vector<std::uint8_t> seen(graph_.atoms.size(), 0);
    for (const std::uint32_t start : by_rank) {
      if (seen[start]) continue;
      span(start, seen);
      if (!text_.empty()) text_ += '.';
      emit(start);
    }
    return std::move(text_);
  }

 private:
  // Depth-first tree of one fragment; a bond back to an atom on the way opens a ring there and closes it
  // here.
  void span(std::uint32_t start, std::vector<std::uint8_t>& seen) {
    std::vector<std::uint32_t> order, stack{start};
    std::vector<std::uint32_t>& next = next_;
    next.resize(graph_.atoms.size());
    next[start] = adjacency_.first[start];
    seen[start] = 1;
    order.push_back(start);
    while (!stack.empty()) {
      const std::uint32_t at = stack.back();
      if (next[at] == adjacency_.first[at + 1]) {
        stack.pop_back();
        continue;
      }
      const Adjacency::Entry entry = adjacency_.entries[next[at]++];
      if (entry.bond == parent_bond_[at]) continue;
      if (!seen[entry.atom]) {
        seen[entry.atom] = 1;
        parent_bond_[entry.atom] = entry.bond;
        next[entry.atom] = adjacency_.first[entry.atom];
        children_[at].push_back(entry.atom);
        order.push_back(entry.atom);
        stack.push_back(entry.atom);
      } else if (!opened_at(at, entry.bond)) {
        opens_[entry.atom].push_back(entry.bond);
        closes_[at].push_back(entry.bond);
      }
    }
    for (std::size_t i = order.size(); i-- > 1;) {
      const Bond& bond = graph_.bonds[parent_bond_[order[i]]];
      size_[bond.a == order[i] ? bond.b : bond.a] += size_[order[i]];
    }
    for (const std::uint32_t atom : order) {
      std::stable_sort(children_[atom].begin(), children_[atom].end(),
                       [&](std::uint32_t a, std::uint32_t b) { return size_[a] < size_[b]; });
    }
  }

  // A ring bond is met twice; the second time from the atom that opens it.
  bool opened_at(std::uint32_t atom, std::uint32_t bond) const {
    return std::find(opens_[atom].begin(), opens_[atom].end(), bond) != opens_[atom].end();
  }

  void emit(std::uint32_t start) {
    struct Step {
      std::uint32_t atom;
      std::size_t child;
    };
    std::vector<Step> stack{{start, 0}};
    emit_atom(start);
    while (!stack.empty()) {
      Step& step = stack.back();
      const std::vector<std::uint32_t>& children = children_[step.atom];
      if (step.child == children.size()) {
        stack.pop_back();
        if (!stack.empty() && stack.back().child < children_[stack.back().atom].size()) text_ += ')';
        continue;
      }
      const std::uint32_t child = children[step.child++];
      if (step.child < children.size()) text_ += '(';
      emit_order(parent_bond_[child]);
      emit_atom(child);
      stack.push_back({child, 0});
    }
  }

  void emit_order(std::uint32_t bond) {
    switch (graph_.bonds[bond].order) {
      case Order::Double:
        text_ += '=';
        break;
      case Order::Triple:
        text_ += '#';
        break;
      case Order::Quadruple:
        text_ += '$';
        break;
      default:
        break;
    }
  }

  void emit_atom(std::uint32_t index) {
    const Atom& atom = graph_.atoms[index];
    const int bonded = bonded_[index];
    const bool plain =
        atom.charge == 0 && atom.isotope == 0 &&
        (atom.element == 0 ? atom.hydrogens == 0
                           : in_organic_subset(atom.element) &&
                                 organic_valence(atom.element, bonded) - bonded == atom.hydrogens);
    if (plain) {
      text_ += symbol(atom.element);
    } else {
      text_ += '[';
      if (atom.isotope != 0) text_ += std::to_string(atom.isotope);
      text_ += symbol(atom.element);
      if (atom.hydrogens > 0) text_ += 'H';
      if (atom.hydrogens > 1) text_ += std::to_string(atom.hydrogens);
      append_charge(text_, atom.charge);
      text_ += ']';
    }
    for (const std::uint32_t bond : closes_[index]) emit_ring(number_of(bond));
    for (const std::uint32_t bond : opens_[index]) {
      const std::size_t number = number_of(none);
      ring_numbers_[number] = bond;
      emit_order(bond);
      emit_ring(number);
    }
    // A number is free again after the atom that closes it, so that no atom shows one number twice.
    for (const std::uint32_t bond : closes_[index]) ring_numbers_[number_of(bond)] = none;
  }

  // Where the bond stands in the list of numbers; with `none` the first free place, made if there is none.
  std::size_t number_of(std::uint32_t bond) {
    const auto at = std::find(ring_numbers_.begin(), ring_numbers_.end(), bond);
    const auto number = static_cast<std::size_t>(at - ring_numbers_.begin());
    if (at == ring_numbers_.end()) ring_numbers_.push_back(none);
    return number;
  }

  void emit_ring(std::size_t number) {
    if (number + 1 > 9) text_ += '%';
    text_ += std::to_string(number + 1);
  }

  const Graph& graph_;
  const std::vector<std::uint32_t>& ranks_;
  Adjacency adjacency_;  // sorted by rank
  std::vector<std::vector<std::uint32_t>> children_, opens_, closes_;
  std::vector<std::uint32_t> parent_bond_, size_, next_;
  std::vector<int> bonded_;
  std::vector<std::uint32_t> ring_numbers_;  // bond that each number stands for now, or none
  std::string text_;
};

}  // namespace

std::string write_smiles(const Graph& graph, const std::vector<std::uint32_t>& ranks) {
  return Writer(graph, ranks).write();
}

}  // namespace heatledger::molecule
