// How far average bonds can be trusted: the ± of each bond type, fitted to what the sums of average bonds
// miss on compounds with evaluated formation enthalpies. For development; the result ships as
// tables/bond_spread_factors.tsv.
#pragma once

#include <cstddef>
#include <string>
#include <string_view>
#include <vector>

#include "core/molecule/bonds.hpp"

namespace heatledger::estimate {

/// One trusted compound of the training table, priced with one bond set.
struct PricedCompound {
  std::size_t compound = 0;                               ///< index into training_compounds()
  std::vector<std::pair<molecule::BondType, int>> bonds;  ///< as priced, each type once, sorted
  double miss = 0;  ///< sum of average bonds minus tabulated atomisation [J/mol]
};

/// Compounds whose every bond a set prices.
/// @param set  an id of BondSet::names(); empty: the primary set
std::vector<PricedCompound> priced_compounds(std::string_view set = {});

/// ± of one bond type.
struct BondSpread {
  molecule::BondType type;
  double u95 = 0;        ///< [J/mol] calibrated
  double table_u95 = 0;  ///< [J/mol] from the spread of the tables alone
  int compounds = 0;     ///< that have the bond
};

/// Spreads so that u95² of a molecule = Σ (count × u95 of the bond)² covers 95 % of the compounds given:
/// likelihood with heavy tails for their ratios, then one common factor for the coverage. Bonds of fewer than
/// five compounds take the median ratio of the others.
std::vector<BondSpread> fit_bond_spreads(const std::vector<PricedCompound>& compounds);

/// Share of compounds whose miss lies within their stated 95 % interval.
double bond_coverage(const std::vector<PricedCompound>& compounds, const std::vector<BondSpread>& spreads);

/// The same with each of `folds` parts judged by spreads fitted to the other parts.
double bond_coverage_left_out(const std::vector<PricedCompound>& compounds, unsigned folds);

/// Every set has factors of its own: tables/bond_spread_factors.tsv as it should be, with the coverages in
/// its comment lines.
std::string bond_spread_table();

}  // namespace heatledger::estimate
