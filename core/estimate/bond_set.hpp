// Published tables of average bond enthalpies: one coherent set is used at a time.
#pragma once

#include <cstdint>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "core/base/result.hpp"
#include "core/molecule/bonds.hpp"
#include "core/uncertainty/quantity.hpp"

namespace heatledger::estimate {

/// How a bond's figure was come by.
enum class BondOrigin : std::uint8_t {
  TableMean,      ///< mean over many molecules, from the set's own table
  TableSpecific,  ///< the value of one molecule (CO2, CO, N2, O2, NO)
  OtherTable,     ///< the set has no value: taken from the named other table, and said so
  User            ///< typed on the sheet
};

struct BondValue {
  molecule::BondType type;
  double value = 0;  ///< [J/mol]
  double u95 = 0;    ///< [J/mol]
  BondOrigin origin = BondOrigin::TableMean;
  std::string source;
  std::string remark;
};

/// One table with the user's own values laid over it.
class BondSet {
 public:
  static const std::vector<std::string>& names();  ///< ids, the primary set first
  /// @param name  an id of names(); empty: the primary set
  /// @errors bond_set.unknown
  static Result<BondSet> published(std::string_view name);

  const std::string& name() const { return name_; }
  const std::string& title() const { return title_; }

  /// Lays a typed value over the table; the published one stays reachable through `published_value`. Its
  /// origin becomes User. A second value for the same type replaces the first.
  void lay_over(BondValue typed);
  /// Price of one bond: the type with its setting, else the plain type; empty when the set has neither.
  /// Tables are never mixed silently: a value of another table gets in only through lay_over (see sets_with).
  const BondValue* find(const molecule::BondType& type) const;
  const BondValue* published_value(const molecule::BondType& type) const;
  const std::vector<BondValue>& values() const { return values_; }

  /// Ids of the published sets that price this bond: what to offer when the present set does not.
  static std::vector<std::string> sets_with(const molecule::BondType& type);
  /// The value of one published table, for comparison with what stands on another sheet; empty when it has
  /// none.
  static std::optional<double> value_in(std::string_view set, const molecule::BondType& type);

  /// The sentence that stands beside every ± of a bond set.
  static std::string_view spread_remark();

 private:
  std::string name_, title_;
  std::vector<BondValue> values_, covered_;  ///< sorted by type
};

/// The type under which the tables keep a price: one order for the bonds of molecules and rings that have one
/// value for all their bonds; the nitro group's bonds are plain N-O and N=O.
molecule::BondType priced_type(const molecule::BondType& type);

}  // namespace heatledger::estimate
