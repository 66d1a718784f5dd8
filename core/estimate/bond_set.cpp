#include "core/estimate/bond_set.hpp"

#include <algorithm>

#include "core/estimate/bond_table.hpp"

namespace heatledger::estimate {
namespace {

using molecule::BondType;
using molecule::Order;
using molecule::Setting;

template <typename Values>
auto lower(Values& values, const BondType& type) {
  return std::lower_bound(values.begin(), values.end(), type,
                          [](const BondValue& value, const BondType& wanted) { return value.type < wanted; });
}

const BondValue* exact(const std::vector<BondValue>& values, const BondType& type) {
  const auto at = lower(values, type);
  return at != values.end() && at->type == type ? &*at : nullptr;
}

BondType plain(BondType type) {
  type.setting = Setting::Plain;
  return type;
}

/// Which column prices this row in a set: its own, else the molecule's own figure for a molecule-specific
/// row.
std::optional<BondColumn> pricing_column(const BondTableRow& row, std::size_t set) {
  if (row.value[set]) return static_cast<BondColumn>(set);
  const bool of_one_molecule =
      row.type.setting != Setting::Plain && row.type.setting != Setting::AromaticRing;
  const auto molecule = static_cast<std::size_t>(BondColumn::Molecule);
  if (of_one_molecule && row.value[molecule]) return BondColumn::Molecule;
  return std::nullopt;
}

bool is_specific(const BondType& type) {
  const bool diatomic_element =
      type.first == type.second &&
      (type.order == Order::Triple || type.first == 1 || (type.first == 8 && type.order == Order::Double));
  return (type.setting != Setting::Plain && type.setting != Setting::AromaticRing) ||
         (diatomic_element && type.first != 6);
}

std::optional<std::size_t> set_index(std::string_view name) {
  if (name.empty()) return 0;
  for (std::size_t i = 0; i < kBondTables; ++i) {
    if (bond_table_info(static_cast<BondColumn>(i)).id == name) return i;
  }
  return std::nullopt;
}

const BondTableRow* table_row(const BondType& type) {
  const std::vector<BondTableRow>& rows = bond_table();
  const auto at =
      std::lower_bound(rows.begin(), rows.end(), type,
                       [](const BondTableRow& row, const BondType& wanted) { return row.type < wanted; });
  return at != rows.end() && at->type == type ? &*at : nullptr;
}

}  // namespace

BondType priced_type(const BondType& type) {
  BondType result = type;
  switch (type.setting) {
    case Setting::Nitro:
      result.setting = Setting::Plain;
      break;
    case Setting::AromaticRing:
      result.order = Order::Single;
      break;
    case Setting::NitrogenDioxide:
    case Setting::Ozone:
    case Setting::NitricOxide:
    case Setting::CarbonDioxide:
      result.order = Order::Double;
      break;
    case Setting::CarbonMonoxide:
      result.order = Order::Triple;
      break;
    default:
      break;
  }
  return result;
}

const std::vector<std::string>& BondSet::names() {
  static const std::vector<std::string> ids = [] {
    std::vector<std::string> list;
    for (std::size_t i = 0; i < kBondTables; ++i)
      list.emplace_back(bond_table_info(static_cast<BondColumn>(i)).id);
    return list;
  }();
  return ids;
}

Result<BondSet> BondSet::published(std::string_view name) {
  const std::optional<std::size_t> index = set_index(name);
  if (!index) {
    std::string known;
    for (const std::string& id : names()) known += (known.empty() ? "" : ", ") + id;
    return Error{"bond_set.unknown", "There is no bond set \"" + std::string(name) + "\".", "",
                 "Choose one of: " + known + "."};
  }
  BondSet set;
  const BondTableInfo& info = bond_table_info(static_cast<BondColumn>(*index));
  set.name_ = info.id;
  set.title_ = info.title;
  for (const BondTableRow& row : bond_table()) {
    const std::optional<BondColumn> column = pricing_column(row, *index);
    if (!column) continue;
    const auto at = static_cast<std::size_t>(*column);
    BondValue value;
    value.type = row.type;
    value.value = *row.value[at];
    value.u95 = row.spread_u95 * row.factor[*index];
    value.origin = is_specific(row.type) ? BondOrigin::TableSpecific : BondOrigin::TableMean;
    value.source = std::string(bond_table_info(*column).source);
    if (row.from_memory[at]) value.source += " (from memory)";
    value.remark = row.remark;
    set.values_.push_back(value);
  }
  return set;
}

void BondSet::lay_over(BondValue typed) {
  typed.origin = BondOrigin::User;
  const auto at = lower(values_, typed.type);
  if (at == values_.end() || !(at->type == typed.type)) {
    values_.insert(at, std::move(typed));
    return;
  }
  if (at->origin != BondOrigin::User) covered_.insert(lower(covered_, at->type), *at);
  *at = std::move(typed);
}

const BondValue* BondSet::find(const BondType& type) const {
  // A value typed for exactly this setting ("N-O (nitro)") goes before what the tables know.
  if (const BondValue* own = exact(values_, type)) return own;
  const BondType priced = priced_type(type);
  if (const BondValue* own = exact(values_, priced)) return own;
  return exact(values_, plain(type));
}

const BondValue* BondSet::published_value(const BondType& type) const {
  const BondType priced = priced_type(type);
  if (const BondValue* covered = exact(covered_, priced)) return covered;
  for (const BondType& wanted : {priced, plain(type)}) {
    if (const BondValue* value = exact(covered_, wanted)) return value;
    const BondValue* value = exact(values_, wanted);
    if (value != nullptr && value->origin != BondOrigin::User) return value;
  }
  return nullptr;
}

std::optional<double> BondSet::value_in(std::string_view set, const BondType& type) {
  const std::optional<std::size_t> index = set_index(set);
  if (!index) return std::nullopt;
  for (const BondType& wanted : {priced_type(type), plain(type)}) {
    const BondTableRow* row = table_row(wanted);
    if (row == nullptr) continue;
    if (const std::optional<BondColumn> column = pricing_column(*row, *index))
      return row->value[static_cast<std::size_t>(*column)];
  }
  return std::nullopt;
}

std::vector<std::string> BondSet::sets_with(const BondType& type) {
  std::vector<std::string> result;
  for (const std::string& id : names()) {
    if (value_in(id, type)) result.push_back(id);
  }
  return result;
}

std::string_view BondSet::spread_remark() {
  return "The ± of the average set is a 95 % half width, one for each bond type, fitted to compounds with "
         "evaluated formation "
         "enthalpies: 95 of 100 bond sums of molecules left out of that fit lie within it.";
}

}  // namespace heatledger::estimate
