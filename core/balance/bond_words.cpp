#include "core/balance/bond_words.hpp"

#include <algorithm>
#include <cmath>
#include <iterator>

#include "core/base/number_text.hpp"
#include "core/molecule/elements.hpp"

namespace heatledger::balance {
namespace {

using molecule::BondType;
using molecule::Order;
using molecule::Setting;

constexpr double kJ = 1000.0;

/// Place of an element in a bond as it is spoken: C first, H after the elements that bear it, halogens last.
int spoken_place(int element) {
  constexpr int kSequence[] = {6, 14, 32, 50, 82, 5, 51, 33, 15, 7, 52, 34, 16, 8, 1, 53, 35, 17, 9};
  const auto at = std::find(std::begin(kSequence), std::end(kSequence), element);
  return at == std::end(kSequence) ? -1 : static_cast<int>(at - std::begin(kSequence));
}

}  // namespace

std::string bond_label(const BondType& type) {
  switch (type.setting) {
    case Setting::CarbonDioxide:
      return "C=O of CO₂";
    case Setting::CarbonMonoxide:
      return "C≡O of CO";
    case Setting::NitricOxide:
      return "NO, order 2.5";
    case Setting::NitrogenDioxide:
      return "each bond of NO₂";
    case Setting::Ozone:
      return "each bond of O₃";
    case Setting::AromaticRing:
      return type.first == 6 && type.second == 6 ? "C–C in aromatic ring" : "C–N in aromatic ring";
    default:
      break;
  }
  int left = type.first, right = type.second;
  if (spoken_place(right) < spoken_place(left)) std::swap(left, right);
  std::string label(molecule::symbol(left));
  switch (type.order) {
    case Order::Double:
      label += "=";
      break;
    case Order::Triple:
      label += "≡";
      break;
    case Order::Quadruple:
      label += "≣";
      break;
    default:
      label += "–";
      break;
  }
  label += molecule::symbol(right);
  return label;
}

std::string ledger_kj(double joules) {
  const double value = joules / kJ;
  const bool whole = std::fabs(value - std::round(value)) < 0.05;
  return display_number(value, whole ? 0 : 1);
}

std::string fine_kj(double joules) {
  return display_signed(joules / kJ, 2);
}

std::string kj_with_u95(const uncertainty::Quantity& quantity, const std::string& unit) {
  const double u95 = quantity.u95() / kJ;
  const int decimals = u95 == 0 || u95 >= 9.5 ? (u95 == 0 ? 1 : 0) : u95 >= 0.95 ? 1 : 2;
  std::string text = display_number(quantity.value() / kJ, decimals);
  if (u95 > 0) text += " ± " + display_number(u95, decimals);
  return text + " " + unit;
}

std::string times_text(double coefficient) {
  return machine_number(coefficient, 6);
}

}  // namespace heatledger::balance
