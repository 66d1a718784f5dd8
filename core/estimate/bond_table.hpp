// The embedded side-by-side tables of average bond enthalpies, as rows. Sets to price with stand in
// bond_set.hpp.
#pragma once

#include <array>
#include <cstddef>
#include <optional>
#include <string_view>
#include <vector>

#include "core/molecule/bonds.hpp"

namespace heatledger::estimate {

/// Published tables, the primary one first; the last column is no table but the mean bond of one molecule.
enum class BondColumn : std::size_t { Zumdahl, Atkins, Huheey, Reusch, Molecule };
constexpr std::size_t kBondTables = 4;  ///< columns that are tables to choose from
constexpr std::size_t kBondColumns = 5;

struct BondTableInfo {
  std::string_view id, title, source;
};
const BondTableInfo& bond_table_info(BondColumn column);

/// One bond type across the tables.
struct BondTableRow {
  molecule::BondType type;
  std::array<std::optional<double>, kBondColumns> value;  ///< [J/mol]
  std::array<bool, kBondColumns> from_memory{};
  std::string_view remark;
  double spread_u95 = 0;  ///< [J/mol] 95 % half width that the spread of the columns gives, floor included
  /// Calibrated multiple of the spread, one for each table to choose from (bond_spread_factors.tsv); 1 where
  /// none is known.
  std::array<double, kBondTables> factor = {1, 1, 1, 1};
};

/// All rows, read once from the embedded table; sorted by type.
const std::vector<BondTableRow>& bond_table();

/// 95 % half width from the spread of published values of one bond [J/mol].
/// The tables are taken as draws from one normal distribution: standard deviation = range / d2(n), half
/// width 1.96 times that, at least 4 kJ/mol (tables are rounded and copy from each other); 3 % of the value
/// and at least 10 kJ/mol where a single column has the bond.
/// @source d2: expected range of n standard normal draws (1.128, 1.693, 2.059, 2.326), Tippett, Biometrika 17
/// (1925) 364
double spread_half_width(const std::array<std::optional<double>, kBondColumns>& value);

}  // namespace heatledger::estimate
