#include "core/estimate/context_molecule.hpp"

#include <algorithm>
#include <cmath>

#include "core/estimate/context_features.hpp"
#include "core/estimate/context_settings.hpp"
#include "core/estimate/repeat_unit.hpp"

namespace heatledger::estimate {
namespace {

double base_bonds(const ContextGraph& graph) {
  double sum = graph.hydrogen_bonds * prior_bond(Kind::H, Kind::H, 1);
  for (const ContextAtom& atom : graph.atoms) sum += atom.hydrogens * prior_bond(atom.kind, Kind::H, 1);
  for (const ContextBond& bond : graph.bonds) {
    sum += prior_bond(graph.atoms[bond.a].kind, graph.atoms[bond.b].kind, bond.order);
  }
  return 1000 * sum;
}

/// The liquid properties see how many O-H and N-H bonds there are, not only that there are some.
void count_donors(const ContextGraph& graph, double donors, FeatureSink& sink) {
  const double more = std::max(0.0, donors - 1);
  const double values[4] = {std::sqrt(static_cast<double>(graph.atoms.size())), donors > 0 ? 1.0 : 0.0, more,
                            more * more};
  for (unsigned i = 0; i < 4; ++i) {
    if (values[i] != 0) sink.add(FeatureCode(FeatureClass::VX).byte(i), values[i]);
  }
}

}  // namespace

ContextMolecule molecule_from(const ContextGraph& graph, FeatureSink& sink) {
  ContextMolecule out;
  count_features(graph, sink, out.measures);
  count_donors(graph, out.measures.donors, sink);
  out.features = sink.take();
  out.heavy_atoms = static_cast<double>(graph.atoms.size());
  for (std::size_t k = 0; k < kind_count; ++k) {
    out.atoms += graph.elements[k];
    out.gas_atoms += 1000 * model_gas_atom(static_cast<Kind>(k)) * graph.elements[k];
  }
  out.base_bonds = base_bonds(graph);
  out.constitution = graph.constitution;
  out.stereo = graph.stereo;
  return out;
}

Result<ContextMolecule> context_molecule(const molecule::Graph& graph, KekuleForm form) {
  if (has_open_ends(graph)) return repeat_unit(graph);
  Result<ContextGraph> prepared = context_graph(graph, form);
  if (!prepared) return prepared.error();
  FeatureSink sink;
  return molecule_from(*prepared, sink);
}

}  // namespace heatledger::estimate
