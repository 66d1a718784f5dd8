#include "core/estimate/bond_calibration.hpp"

#include <algorithm>
#include <cmath>
#include <map>

#include "core/base/check.hpp"
#include "core/base/number_text.hpp"
#include "core/estimate/bond_set.hpp"
#include "core/estimate/bond_table.hpp"
#include "core/estimate/context_table.hpp"
#include "core/molecule/elements.hpp"
#include "core/molecule/smiles.hpp"

namespace heatledger::estimate {
namespace {

using molecule::BondType;

constexpr std::size_t kFewest = 5;  // compounds that a spread of its own rests on

/// Counts of one molecule by price; empty when a bond has none.
std::vector<std::pair<BondType, int>> priced_bonds(const molecule::Graph& graph, const BondSet& set,
                                                   double& sum) {
  std::map<BondType, int> counts;
  sum = 0;
  for (const molecule::BondCount& bond : molecule::count_bonds(graph)) {
    const BondValue* value = set.find(bond.type);
    if (value == nullptr) return {};
    sum += bond.count * value->value;
    counts[value->type] += bond.count;
  }
  return {counts.begin(), counts.end()};
}

double table_half_width(const BondType& type) {
  for (const BondTableRow& row : bond_table()) {
    if (row.type == type) return row.spread_u95;
  }
  return 0;
}

using Spreads = std::map<BondType, double>;  ///< variance of each bond type's error

double variance_of(const PricedCompound& compound, const Spreads& spreads) {
  double sum = 0;
  for (const auto& [type, count] : compound.bonds) sum += spreads.at(type) * count * count;
  return sum;
}

double quantile(std::vector<double> values, double share) {
  std::sort(values.begin(), values.end());
  return values[static_cast<std::size_t>(std::ceil(share * static_cast<double>(values.size()))) - 1];
}

/// Variances by multiplicative updates of the likelihood; misses far outside count less (Student's t, 4
/// degrees).
Spreads fit_variances(const std::vector<PricedCompound>& compounds) {
  Spreads spreads;
  for (const PricedCompound& compound : compounds) {
    for (const auto& [type, count] : compound.bonds) spreads.emplace(type, 1e8);
  }
  constexpr double kFreedom = 4, kSmallest = 1e6;  // (1 kJ/mol)²
  for (int round = 0; round < 200; ++round) {
    std::map<BondType, std::pair<double, double>> sums;
    for (const PricedCompound& compound : compounds) {
      const double variance = variance_of(compound, spreads), squared = compound.miss * compound.miss;
      const double weight = (kFreedom + 1) / (kFreedom + squared / variance);
      for (const auto& [type, count] : compound.bonds) {
        auto& [above, below] = sums[type];
        above += count * count * weight * squared / (variance * variance);
        below += count * count / variance;
      }
    }
    for (auto& [type, variance] : spreads) {
      variance = std::max(kSmallest, variance * std::sqrt(sums[type].first / sums[type].second));
    }
  }
  return spreads;
}

/// "C<tab>=<tab>O<tab>co2<tab>", as bond_averages.tsv spells a type.
std::string table_cells(const BondType& type) {
  const char* order = type.order == molecule::Order::Single   ? "-"
                      : type.order == molecule::Order::Double ? "="
                                                              : "#";
  const char* setting = "";
  switch (type.setting) {
    case molecule::Setting::CarbonDioxide:
      setting = "co2";
      break;
    case molecule::Setting::CarbonMonoxide:
      setting = "co";
      break;
    case molecule::Setting::NitricOxide:
      setting = "no";
      break;
    case molecule::Setting::NitrogenDioxide:
      setting = "no2";
      break;
    case molecule::Setting::Ozone:
      setting = "o3";
      break;
    case molecule::Setting::AromaticRing:
      setting = "aromatic";
      break;
    default:
      break;
  }
  return std::string(molecule::symbol(type.first)) + "\t" + order + "\t" +
         std::string(molecule::symbol(type.second)) + "\t" + setting + "\t";
}

unsigned fold_of(const PricedCompound& compound, unsigned folds) {
  return static_cast<unsigned>(training_molecule(compound.compound).constitution % folds);
}

}  // namespace

std::vector<PricedCompound> priced_compounds(std::string_view name) {
  Result<BondSet> set = BondSet::published(name);
  CHECK(set.ok(), "a published bond set");
  std::vector<PricedCompound> compounds;
  for (const TrainingFigure& figure : training_figures(FitKind::Formation, TrainingRows::Original)) {
    if (!figure.trusted) continue;
    Result<molecule::Graph> graph = molecule::parse_smiles(training_compounds()[figure.compound].smiles);
    CHECK(graph.ok(), "a readable structure in the training table");
    PricedCompound compound;
    double sum = 0;
    compound.compound = figure.compound;
    compound.bonds = priced_bonds(*graph, *set, sum);
    if (compound.bonds.empty()) continue;
    compound.miss = sum - (training_molecule(figure.compound).gas_atoms - 1000 * figure.value[0]);
    compounds.push_back(std::move(compound));
  }
  return compounds;
}

std::vector<BondSpread> fit_bond_spreads(const std::vector<PricedCompound>& compounds) {
  Spreads variances = fit_variances(compounds);
  std::map<BondType, int> seen;
  for (const PricedCompound& compound : compounds) {
    for (const auto& bond : compound.bonds) ++seen[bond.first];
  }
  std::vector<double> ratios;
  for (const auto& [type, variance] : variances) {
    if (seen[type] >= static_cast<int>(kFewest))
      ratios.push_back(std::sqrt(variance) / table_half_width(type));
  }
  const double common = ratios.empty() ? 1 : quantile(ratios, 0.5);
  for (auto& [type, variance] : variances) {
    if (seen[type] >= static_cast<int>(kFewest)) continue;
    const double s = common * table_half_width(type);
    variance = s * s;
  }
  std::vector<double> reach;
  for (const PricedCompound& compound : compounds)
    reach.push_back(std::fabs(compound.miss) / std::sqrt(variance_of(compound, variances)));
  const double factor = quantile(reach, 0.95);
  std::vector<BondSpread> out;
  for (const BondTableRow& row : bond_table()) {
    BondSpread spread;
    spread.type = row.type;
    spread.table_u95 = row.spread_u95;
    const auto known = variances.find(row.type);
    spread.u95 = factor * (known != variances.end() ? std::sqrt(known->second) : common * row.spread_u95);
    const auto count = seen.find(row.type);
    spread.compounds = count == seen.end() ? 0 : count->second;
    out.push_back(spread);
  }
  return out;
}

double bond_coverage(const std::vector<PricedCompound>& compounds, const std::vector<BondSpread>& spreads) {
  Spreads squared;
  for (const BondSpread& spread : spreads) squared[spread.type] = spread.u95 * spread.u95;
  std::size_t covered = 0;
  for (const PricedCompound& compound : compounds) {
    covered += compound.miss * compound.miss <= variance_of(compound, squared) * (1 + 1e-12);
  }
  return compounds.empty() ? 0 : static_cast<double>(covered) / static_cast<double>(compounds.size());
}

double bond_coverage_left_out(const std::vector<PricedCompound>& compounds, unsigned folds) {
  double covered = 0;
  for (unsigned fold = 0; fold < folds; ++fold) {
    std::vector<PricedCompound> kept, left;
    for (const PricedCompound& compound : compounds)
      (fold_of(compound, folds) == fold ? left : kept).push_back(compound);
    covered += bond_coverage(left, fit_bond_spreads(kept)) * static_cast<double>(left.size());
  }
  return covered / static_cast<double>(compounds.size());
}

std::string bond_spread_table() {
  const auto percent = [](double share) { return machine_number(100 * share, 3) + " %"; };
  std::string text =
      "# How many times the spread of the tables a bond's ± has to be, so that the stated 95 % interval of a "
      "molecule covers\n"
      "# 95 % of the molecules left out of the fit; one pair of columns a set. Printed by `heatledger_refit "
      "bonds`; a test compares it.\n"
      "# Compounds whose formation enthalpy two sources share, priced by each set:\n";
  std::vector<std::vector<BondSpread>> sets;
  std::string heading = "first\tbond\tsecond\tsetting";
  for (const std::string& name : BondSet::names()) {
    const std::vector<PricedCompound> compounds = priced_compounds(name);
    std::vector<BondSpread> spreads = fit_bond_spreads(compounds), bare = spreads;
    for (BondSpread& spread : bare) spread.u95 = spread.table_u95;
    text += "#   " + name + ": " + std::to_string(compounds.size()) + " compounds, bare spread covers " +
            percent(bond_coverage(compounds, bare)) + ", with the factors " +
            percent(bond_coverage(compounds, spreads)) + ", left out in ten parts " +
            percent(bond_coverage_left_out(compounds, 10)) + "\n";
    heading += "\t" + name + "\tn_" + name;
    sets.push_back(std::move(spreads));
  }
  text +=
      "# setting as in bond_averages.tsv; n: molecules that the factor rests on; below 5 it is the median of "
      "the others\n" +
      heading + "\n";
  for (std::size_t row = 0; row < sets.front().size(); ++row) {
    std::string cells = table_cells(sets.front()[row].type);
    for (const std::vector<BondSpread>& spreads : sets) {
      cells += machine_number(spreads[row].u95 / spreads[row].table_u95, 3) + "\t" +
               std::to_string(spreads[row].compounds) + "\t";
    }
    cells.back() = '\n';
    text += cells;
  }
  return text;
}

}  // namespace heatledger::estimate
