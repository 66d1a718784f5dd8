#include <cstdint>
#include <vector>

#include "core/molecule/kekule_choice.hpp"
#include "core/molecule/octet_form.hpp"
#include "core/molecule/ranking.hpp"
#include "core/molecule/smiles.hpp"
#include "core/molecule/smiles_writer.hpp"

namespace heatledger::molecule {
namespace {

// Label of a bond that may be single or double, depending on who drew the ring.
constexpr std::uint8_t mobile_label = 5;

bool is_plain_hydrogen(const Atom& atom) {
  return atom.element == 1 && atom.charge == 0 && atom.isotope == 0;
}

// Hydrogens written as atoms become counts; [H][H], ions, isotopes and bridging hydrogens stay atoms.
Graph with_hydrogens_counted(const Graph& graph) {
  std::vector<std::uint8_t> degree(graph.atoms.size(), 0);
  for (const Bond& bond : graph.bonds) {
    for (const std::uint32_t end : {bond.a, bond.b}) degree[end] = degree[end] < 2 ? degree[end] + 1 : 2;
  }
  const auto folds = [&](std::uint32_t hydrogen, const Atom& other, Order order) {
    return is_plain_hydrogen(graph.atoms[hydrogen]) && degree[hydrogen] == 1 && order == Order::Single &&
           graph.atoms[hydrogen].hydrogens == 0 && other.element > 1 && other.hydrogens < 9;
  };
  Graph out = graph;
  std::vector<std::uint8_t> gone(graph.atoms.size(), 0);
  for (const Bond& bond : graph.bonds) {
    if (folds(bond.a, out.atoms[bond.b], bond.order)) {
      gone[bond.a] = 1;
      ++out.atoms[bond.b].hydrogens;
    } else if (folds(bond.b, out.atoms[bond.a], bond.order)) {
      gone[bond.b] = 1;
      ++out.atoms[bond.a].hydrogens;
    }
  }
  std::vector<std::uint32_t> place(graph.atoms.size(), 0);
  std::uint32_t kept = 0;
  for (std::uint32_t i = 0; i < graph.atoms.size(); ++i) {
    if (gone[i]) continue;
    place[i] = kept;
    out.atoms[kept++] = out.atoms[i];
  }
  out.atoms.resize(kept);
  std::size_t bonds = 0;
  for (const Bond& bond : graph.bonds) {
    if (gone[bond.a] || gone[bond.b]) continue;
    out.bonds[bonds] = bond;
    out.bonds[bonds].a = place[bond.a];
    out.bonds[bonds].b = place[bond.b];
    ++bonds;
  }
  out.bonds.resize(bonds);
  return out;
}

std::vector<std::uint32_t> ranks_of(const Graph& graph) {
  std::vector<std::uint8_t> labels;
  find_mobile_bonds(graph, labels);
  for (std::size_t i = 0; i < labels.size(); ++i) {
    labels[i] = labels[i] ? mobile_label : static_cast<std::uint8_t>(graph.bonds[i].order);
  }
  return canonical_ranks(graph, labels);
}

}  // namespace

std::string canonical_smiles(const Graph& graph) {
  Graph form = with_hydrogens_counted(graph);
  const TieBreaker ties = ranks_of;
  take_octet_form(form, &ties);
  const std::vector<std::uint32_t> ranks = ranks_of(form);
  choose_kekule_bonds(form, ranks);
  return write_smiles(form, ranks);
}

}  // namespace heatledger::molecule
