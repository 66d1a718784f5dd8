#include "core/estimate/structure_figure.hpp"

#include <algorithm>
#include <array>
#include <span>
#include <unordered_map>
#include <utility>

#include "core/estimate/feature_code.hpp"

namespace heatledger::estimate {
namespace {

constexpr std::size_t kProperties = static_cast<std::size_t>(Property::LiquidHeatCapacity298) + 1;
/// Structures kept in each half of the memory; a figure of a larger molecule takes some 16 kB.
constexpr std::size_t kCapacity = 256;

struct Known {
  molecule::Graph graph;
  ContextMolecule counted;
  std::array<std::shared_ptr<const ContextFigure>, kProperties> figures;
};

std::uint64_t hash(const molecule::Graph& graph) {
  std::uint64_t state = graph.atoms.size();
  for (const molecule::Atom& atom : graph.atoms) {
    state = mix(state, atom.element | static_cast<std::uint64_t>(atom.hydrogens) << 8 |
                           static_cast<std::uint64_t>(static_cast<std::uint8_t>(atom.charge)) << 16);
  }
  for (const molecule::Bond& bond : graph.bonds)
    state = mix(state, bond.a | static_cast<std::uint64_t>(bond.b) << 32);
  return state;
}

/// Everything that counting looks at.
bool same(const molecule::Graph& a, const molecule::Graph& b) {
  const auto same_atom = [](const molecule::Atom& x, const molecule::Atom& y) {
    return x.element == y.element && x.charge == y.charge && x.hydrogens == y.hydrogens &&
           x.aromatic == y.aromatic && x.chirality == y.chirality && x.unpaired == y.unpaired &&
           x.isotope == y.isotope;
  };
  const auto same_bond = [](const molecule::Bond& x, const molecule::Bond& y) {
    return x.a == y.a && x.b == y.b && x.order == y.order && x.aromatic == y.aromatic && x.mark == y.mark;
  };
  return std::equal(a.atoms.begin(), a.atoms.end(), b.atoms.begin(), b.atoms.end(), same_atom) &&
         std::equal(a.bonds.begin(), a.bonds.end(), b.bonds.begin(), b.bonds.end(), same_bond);
}

using Half = std::unordered_map<std::uint64_t, std::shared_ptr<Known>>;

struct Memory {
  Half newer, older;

  std::shared_ptr<Known> find(std::uint64_t key, const molecule::Graph& graph) {
    for (Half* half : {&newer, &older}) {
      const auto found = half->find(key);
      if (found == half->end() || !same(found->second->graph, graph)) continue;
      std::shared_ptr<Known> known = found->second;
      if (half == &older) keep(key, known);
      return known;
    }
    return nullptr;
  }

  void keep(std::uint64_t key, std::shared_ptr<Known> known) {
    if (newer.size() >= kCapacity) {
      older = std::move(newer);
      newer.clear();
    }
    newer.insert_or_assign(key, std::move(known));
  }
};

}  // namespace

Result<std::shared_ptr<const ContextFigure>> structure_figure(Property property,
                                                              const molecule::Graph& graph) {
  static Memory memory;
  const std::uint64_t key = hash(graph);
  std::shared_ptr<Known> known = memory.find(key, graph);
  if (known == nullptr) {
    Result<ContextMolecule> counted = context_molecule(graph);
    if (!counted.ok()) return counted.error();
    known = std::make_shared<Known>();
    known->graph = graph;
    known->counted = std::move(counted).value();
    memory.keep(key, known);
  }
  std::shared_ptr<const ContextFigure>& figure = known->figures[static_cast<std::size_t>(property)];
  if (figure == nullptr) {
    const ContextTerm one{1, &known->counted};
    Result<ContextFigure> made =
        ContextModel::embedded().figure(property, std::span<const ContextTerm>(&one, 1));
    if (!made.ok()) return made.error();
    figure = std::make_shared<const ContextFigure>(std::move(made).value());
  }
  return figure;
}

}  // namespace heatledger::estimate
