// Enthalpy of one mole against temperature, quick enough to be asked millions of times in one integration.
#pragma once

#include <functional>
#include <vector>

namespace heatledger::dosing {

/// Enthalpy from 25 °C [J/mol] and its slope. Either a constant heat capacity, or values and slopes on an
/// even grid with a cubic between (the error is below a millionth of a joule on a smooth curve); beyond the
/// grid the heat capacity at its end goes on.
class Enthalpy {
 public:
  /// @param at_25  [J/mol] at 25 °C: 0 in the reference state; @param cp [J/(mol K)] > 0
  static Enthalpy constant(double at_25, double cp);
  /// @param value  enthalpy [J/mol] at a temperature [K]
  /// @param slope  its heat capacity [J/(mol K)] there
  static Enthalpy tabulated(const std::function<double(double)>& value,
                            const std::function<double(double)>& slope);

  double at(double temperature) const;             ///< [J/mol]
  double heat_capacity(double temperature) const;  ///< [J/(mol K)]

 private:
  struct Node {
    double value, slope;
  };
  std::vector<Node> nodes_;  ///< empty: constant
  double at_25_ = 0, cp_ = 0;
};

}  // namespace heatledger::dosing
