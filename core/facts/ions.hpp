// Substances dissolved in water at infinite dilution: ions, and some neutral ones. Never mix with another ion
// table in one reaction.
#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <utility>
#include <vector>

#include "core/facts/compound.hpp"

namespace heatledger::facts {

/// One row of tables/ions.tsv; 298.15 K, 100 kPa, ideal solution of 1 mol/kg, ions on the scale H+ = 0.
struct AqueousSubstance {
  std::string_view name;     ///< "sulfate ion", "ammonia"
  std::string_view formula;  ///< as typed in an equation: "SO4^2-"
  std::string hill;          ///< as molecule::hill_formula writes it
  std::vector<std::string_view> synonyms;
  std::optional<Datum> formation_enthalpy;  ///< [J/mol]
  std::optional<Datum> gibbs_energy;        ///< of formation [J/mol]
  std::optional<Datum> entropy;             ///< [J/(mol K)]
  std::optional<Datum> heat_capacity;       ///< partial molar [J/(mol K)]; no bulk heat capacity
};

/// All rows, read at first use.
const std::vector<AqueousSubstance>& aqueous_substances();
/// By name, with or without the word "ion"; forgiving as Library::find_name. nullptr when there is none.
const AqueousSubstance* find_aqueous_name(std::string_view name);
/// By composition and charge. @param hill  as molecule::hill_formula writes it
const AqueousSubstance* find_aqueous_formula(std::string_view hill);
/// The ions that a salt is drawn of and how many of each; empty for anything else and where the table lacks
/// one.
std::vector<std::pair<const AqueousSubstance*, int>> ions_of(const Compound& compound);

}  // namespace heatledger::facts
