// Settings of the model of bonds in context: prior spreads per class, the parts of a molecule's own
// deviation, interval factors, prior bond enthalpies. Read from tables/context_settings.tsv and
// tables/context_prior.tsv.
#pragma once

#include <array>
#include <optional>

#include "core/estimate/context_molecule.hpp"
#include "core/estimate/feature_code.hpp"

namespace heatledger::estimate {

/// One fitted figure: kJ/mol or J/(mol K).
enum class FitKind : std::uint8_t { Formation, Vaporisation, Gas298, GasAbove, Liquid };
constexpr std::size_t fit_kind_count = 5;

struct ContextSettings {
  std::array<double, feature_class_count> spread{};  ///< prior standard deviation; 0: the class takes no part
  DeviationMeasures own{};   ///< standard deviation that one unit of each measure adds
  double single_source = 0;  ///< extra standard deviation of a row that only one source gives
  double k68 = 0, k95 = 0;   ///< interval half width / standard deviation
};

const ContextSettings& context_settings(FitKind kind);

/// Variance of a molecule's own deviation.
double own_variance(const ContextSettings& settings, const DeviationMeasures& measures);

/// Prior mean of a base bond [kJ/mol], order as in the features (aromatic_order for aromatic).
double prior_bond(Kind a, Kind b, unsigned order);
/// Gas atom formation enthalpy as the model takes it [kJ/mol].
double model_gas_atom(Kind kind);
/// The same by atomic number [J/mol]; empty for elements that the model does not cover.
std::optional<double> model_gas_atom_of(int atomic_number);

/// Part of a property that is not fitted but added [kJ/mol or J/(mol K)].
/// @param temperature  [K] for the gas heat capacity
double offset(FitKind kind, const ContextMolecule& molecule, double temperature);

}  // namespace heatledger::estimate
