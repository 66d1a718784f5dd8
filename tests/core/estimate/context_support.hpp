// Shorthand of the suites of this room: molecules from SMILES, text of counted features.
#pragma once

#include <gtest/gtest.h>

#include <map>
#include <string>

#include "core/estimate/context_features.hpp"
#include "core/estimate/context_model.hpp"
#include "core/molecule/smiles.hpp"

namespace heatledger::estimate {

inline molecule::Graph graph_of(const std::string& smiles) {
  Result<molecule::Graph> graph = molecule::parse_smiles(smiles);
  EXPECT_TRUE(graph.ok()) << smiles;
  return graph.ok() ? *graph : molecule::Graph{};
}

inline ContextMolecule molecule_of(const std::string& smiles) {
  Result<ContextMolecule> molecule = context_molecule(graph_of(smiles));
  EXPECT_TRUE(molecule.ok()) << smiles << (molecule.ok() ? "" : ": " + molecule.error().message);
  return molecule.ok() ? *molecule : ContextMolecule{};
}

/// "B2o C4h3|1|O2h1" to count; ring systems numbered in the order of their keys.
inline std::map<std::string, double> counts_of(const ContextGraph& graph) {
  FeatureSink sink;
  std::vector<FeatureInstance> instances;
  sink.keep_instances(&instances);
  molecule_from(graph, sink);
  std::map<std::string, double> counts;
  for (const FeatureInstance& instance : instances) {
    // The data were counted before bonds of other elements became a class of their own.
    const FeatureClass family = instance.family == FeatureClass::Bx ? FeatureClass::B : instance.family;
    std::string name = std::string(class_name(family)) + " " + instance.code.text();
    if (instance.family == FeatureClass::SC) name += " #" + std::to_string(instance.key);
    counts[name] += instance.amount;
  }
  return counts;
}

}  // namespace heatledger::estimate
