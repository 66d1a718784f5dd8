#include "core/estimate/context_explain.hpp"

#include <algorithm>
#include <cmath>
#include <map>
#include <tuple>

#include "core/base/check.hpp"
#include "core/estimate/context_features.hpp"
#include "core/estimate/context_query.hpp"
#include "core/estimate/context_words.hpp"
#include "core/estimate/repeat_unit.hpp"

namespace heatledger::estimate {
namespace {

using Where = FeatureSite::Where;

LineKind line_of(FeatureClass family) {
  switch (family) {
    case FeatureClass::R0:
    case FeatureClass::R1:
    case FeatureClass::R1h:
    case FeatureClass::R2c:
    case FeatureClass::R2o:
    case FeatureClass::R2x:
    case FeatureClass::RS:
    case FeatureClass::RF:
    case FeatureClass::RP:
    case FeatureClass::SC:
      return LineKind::Ring;
    case FeatureClass::GA:
    case FeatureClass::P5:
    case FeatureClass::P5m:
    case FeatureClass::BAY:
    case FeatureClass::CT0:
    case FeatureClass::CT:
      return LineKind::Crowding;
    case FeatureClass::OMP0:
    case FeatureClass::OMP:
    case FeatureClass::OMP2:
      return LineKind::RingPositions;
    case FeatureClass::HB0:
    case FeatureClass::HB:
      return LineKind::HydrogenBond;
    case FeatureClass::P4h:
      return LineKind::FarPolar;
    case FeatureClass::VX:
      return LineKind::Liquid;
    case FeatureClass::K0:
      return LineKind::Constant;
    default:
      return LineKind::Bond;
  }
}

std::string words_for(LineKind kind, double total, bool aromatic) {
  switch (kind) {
    case LineKind::Ring:
      return aromatic && total > 0 ? "rings: resonance"
             : total < 0           ? "rings: strain"
                                   : "rings: closing and shape";
    case LineKind::Crowding:
      return "crowding of groups";
    case LineKind::RingPositions:
      return "neighbours on aromatic rings";
    case LineKind::HydrogenBond:
      return "hydrogen bond inside the molecule";
    case LineKind::FarPolar:
      return "polar atoms four bonds apart";
    case LineKind::Liquid:
      return "size and hydrogen bonding of the liquid";
    case LineKind::Constant:
      return "the same for every molecule";
    case LineKind::Start:
      return "start: so much an atom";
    default:
      return "the molecule's own deviation";
  }
}

/// Shares that fall on the bonds of one place; summed in the order of feature keys, so that bonds alike by
/// symmetry get the same digits.
struct Place {
  struct Share {
    std::uint64_t key;
    double value;
    bool base;
  };
  std::vector<Share> shares;
  int unseen = 0;

  void add(std::uint64_t key, double value, bool base) { shares.push_back({key, value, base}); }
  double sum(bool base) {
    std::sort(shares.begin(), shares.end(), [](const Share& a, const Share& b) {
      return a.key != b.key ? a.key < b.key : a.value < b.value;
    });
    double total = 0;
    for (const Share& share : shares) {
      if (share.base == base) total += share.value;
    }
    return total;
  }
};

/// The graph that is taken apart: a molecule, or one unit in the middle of a chain.
struct Subject {
  ContextGraph graph;
  std::vector<FeatureInstance> instances;
  ContextMolecule molecule;
  std::size_t unit_atoms = 0;  ///< atoms of one repeat unit in the chain; 0: a molecule
  static constexpr std::size_t middle = 4, units = 9;

  bool holds_atom(std::uint32_t atom) const {
    return unit_atoms == 0 || graph.atoms[atom].source / unit_atoms == middle;
  }
  /// A bond between two units belongs to the later one: every linking bond counts once.
  bool holds_bond(std::uint32_t bond) const {
    const std::uint32_t later =
        std::max(graph.atoms[graph.bonds[bond].a].source, graph.atoms[graph.bonds[bond].b].source);
    return unit_atoms == 0 || later / unit_atoms == middle;
  }
};

Result<Subject> subject_of(const molecule::Graph& source) {
  Subject out;
  molecule::Graph graph = source;
  if (has_open_ends(source)) {
    Result<molecule::Graph> chain = chain_of(source, Subject::units);
    if (!chain) return chain.error();
    graph = std::move(chain).value();
    out.unit_atoms = source.atoms.size() - 2;
  }
  Result<ContextGraph> prepared = context_graph(graph);
  if (!prepared) return prepared.error();
  out.graph = std::move(prepared).value();
  FeatureSink sink;
  sink.keep_instances(&out.instances);
  out.molecule = molecule_from(out.graph, sink);
  if (out.unit_atoms != 0) {
    Result<ContextMolecule> unit = context_molecule(source);
    if (!unit) return unit.error();
    out.molecule = std::move(unit).value();
  }
  return out;
}

/// Lines of all bonds: shares put on places, equal places joined.
class BondLines {
 public:
  BondLines(const Subject& subject, const FeatureValues& values, bool formation)
      : subject_(subject), bonds_(subject.graph.bonds.size()), hydrogens_(subject.graph.atoms.size()) {
    for (const FeatureInstance& instance : subject.instances) place(instance, values);
    if (formation) place_priors();
  }

  std::vector<ContextLine> lines() {
    // Text first, then figures: the order of the page does not depend on the order of the atoms.
    std::map<std::tuple<std::string, std::string, double, double, int>, double> joined;
    const ContextGraph& graph = subject_.graph;
    for (std::uint32_t k = 0; k < bonds_.size(); ++k) {
      if (!subject_.holds_bond(k)) continue;
      const ContextBond& bond = graph.bonds[k];
      const std::string name = bond_words(graph.atoms[bond.a].kind, graph.atoms[bond.b].kind, bond.order);
      joined[{name, ends_words(graph, k), bonds_[k].sum(true), bonds_[k].sum(false), bonds_[k].unseen}] += 1;
    }
    for (std::uint32_t i = 0; i < hydrogens_.size(); ++i) {
      const ContextAtom& atom = graph.atoms[i];
      if (atom.hydrogens == 0 || !subject_.holds_atom(i)) continue;
      const std::string name = bond_words(atom.kind, Kind::H, 1);
      joined[{name, hydrogens_words(graph, i), hydrogens_[i].sum(true) / atom.hydrogens,
              hydrogens_[i].sum(false) / atom.hydrogens, hydrogens_[i].unseen}] += atom.hydrogens;
    }
    if (graph.hydrogen_bonds != 0) joined[{"H–H", "", dihydrogen_.sum(true), dihydrogen_.sum(false), 0}] += 1;
    std::vector<ContextLine> out;
    for (const auto& [at, count] : joined) {
      ContextLine line;
      std::tie(line.bond, line.text, line.base, line.surroundings, line.unseen) = at;
      line.count = count;
      line.total = count * (line.base + line.surroundings);
      out.push_back(std::move(line));
    }
    return out;
  }

 private:
  void place(const FeatureInstance& instance, const FeatureValues& values) {
    const bool base = instance.family == FeatureClass::B || instance.family == FeatureClass::Bx;
    const FeatureValues::Value found = values.of(instance.key);
    const double value = found.value * instance.amount;
    const FeatureSite& site = instance.site;
    const ContextGraph& graph = subject_.graph;
    const auto put = [&](Place& on, double share) {
      on.add(instance.key, share, base);
      on.unseen += found.unseen ? 1 : 0;
    };
    switch (site.where) {
      case Where::Bond:
        return put(bonds_[site.first], value);
      case Where::Hydrogens:
        return put(hydrogens_[site.first], value);
      case Where::TwoBonds:
        put(bonds_[site.first], value / 2);
        return put(bonds_[site.second], value / 2);
      case Where::Atom: {
        const ContextAtom& atom = graph.atoms[site.first];
        for (const auto& next : around(graph, site.first)) put(bonds_[next.bond], value / atom.degree);
        if (atom.hydrogens != 0) put(hydrogens_[site.first], value * atom.hydrogens / atom.degree);
        return;
      }
      case Where::Nowhere:
        if (base) put(dihydrogen_, value);
        return;
    }
  }

  void place_priors() {
    const ContextGraph& graph = subject_.graph;
    for (std::uint32_t k = 0; k < graph.bonds.size(); ++k) {
      const ContextBond& bond = graph.bonds[k];
      bonds_[k].add(0, prior_bond(graph.atoms[bond.a].kind, graph.atoms[bond.b].kind, bond.order), true);
    }
    for (std::uint32_t i = 0; i < graph.atoms.size(); ++i) {
      const ContextAtom& atom = graph.atoms[i];
      if (atom.hydrogens != 0) hydrogens_[i].add(0, atom.hydrogens * prior_bond(atom.kind, Kind::H, 1), true);
    }
    if (graph.hydrogen_bonds != 0) dihydrogen_.add(0, prior_bond(Kind::H, Kind::H, 1), true);
  }

  const Subject& subject_;
  std::vector<Place> bonds_, hydrogens_;
  Place dihydrogen_;
};

/// Everything that stands on no bond, by kind, in the order of LineKind. Counts come from the molecule, so
/// that a repeat unit gets its increments.
std::vector<ContextLine> other_lines(const Subject& subject, const FeatureValues& values) {
  std::map<LineKind, ContextLine> lines;
  for (const FeatureCount& feature : subject.molecule.features) {
    const LineKind kind = line_of(feature.family);
    if (kind == LineKind::Bond) continue;
    const FeatureValues::Value found = values.of(feature.key);
    ContextLine& line = lines[kind];
    line.surroundings += found.value * feature.count;
    line.unseen += found.unseen ? 1 : 0;
  }
  const bool aromatic = std::any_of(subject.graph.rings.begin(), subject.graph.rings.end(),
                                    [](const ContextRing& ring) { return ring.aromatic; });
  std::vector<ContextLine> out;
  for (auto& [kind, line] : lines) {
    if (line.surroundings == 0 && line.unseen == 0) continue;
    line.kind = kind;
    line.total = line.surroundings;
    line.text = words_for(kind, line.total, aromatic);
    out.push_back(std::move(line));
  }
  return out;
}

void scale(std::vector<ContextLine>& lines, double factor) {
  for (ContextLine& line : lines) {
    line.base *= factor;
    line.surroundings *= factor;
    line.total *= factor;
  }
}

}  // namespace

Result<Explanation> explain(Property property, const molecule::Graph& graph, const ContextOptions& options) {
  if (property == Property::GasHeatCapacity && options.temperature != gas_nodes[0]) {
    return Error{"estimate.temperature", "A gas heat capacity is explained at 298.15 K only.", "temperature",
                 "Ask for 298.15 K."};
  }
  Result<Subject> found = subject_of(graph);
  if (!found) return found.error();
  const Subject& subject = *found;
  const ContextTerm term{1, &subject.molecule};
  const std::span<const ContextTerm> terms(&term, 1);
  Result<Prediction> prediction = ContextModel::embedded().predict(property, terms, options);
  if (!prediction) return prediction.error();

  const FitKind kind = fit_kind_of(property);
  const bool formation = property == Property::GasFormation;
  const double unit = unit_of(kind);
  const Query query(kind, terms, options);
  const FeatureValues values(query, subject.molecule);
  Explanation out;
  out.prediction = *prediction;
  out.gas_atoms = formation ? subject.molecule.gas_atoms : 0;
  out.sum = formation ? subject.molecule.gas_atoms - prediction->value : prediction->value;
  out.lines = BondLines(subject, values, formation).lines();
  for (ContextLine& line : other_lines(subject, values)) out.lines.push_back(std::move(line));
  scale(out.lines, unit);
  if (!formation) {
    ContextLine start;
    start.kind = LineKind::Start;
    start.surroundings = start.total = unit * offset(kind, subject.molecule, gas_nodes[0]);
    start.text = words_for(start.kind, 0, false);
    out.lines.push_back(std::move(start));
  }
  ContextLine own;
  own.kind = LineKind::OwnDeviation;
  own.total = out.sum;
  for (const ContextLine& line : out.lines) own.total -= line.total;
  // Without a row or a measurement of this very molecule what is left is rounding, far below any printed
  // digit.
  if (std::fabs(own.total) > 1e-6 * unit) {
    own.surroundings = own.total;
    own.text = words_for(own.kind, 0, false);
    out.lines.push_back(std::move(own));
  }
  out.rows = query.reference_rows(10);
  for (const FeatureInstance& instance : subject.instances) {
    if (!values.of(instance.key).unseen) continue;
    const std::string name = std::string(class_name(instance.family)) + " " + instance.code.text();
    if (std::find(out.unseen.begin(), out.unseen.end(), name) == out.unseen.end()) out.unseen.push_back(name);
  }
  std::sort(out.unseen.begin(), out.unseen.end());
  return out;
}

}  // namespace heatledger::estimate
