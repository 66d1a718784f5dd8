// One compound of the library and its published figures. Finding one stands in library.hpp.
#pragma once

#include <array>
#include <cstdint>
#include <optional>
#include <string_view>
#include <vector>

namespace heatledger::facts {

/// A published figure: value, half width of its 95 % interval (never empty: the table's default where the source
/// gives none, and then `u95_is_default`), source text.
struct Datum {
  double value = 0;
  double u95 = 0;
  bool u95_is_default = false;
  std::string_view source;
  std::string_view remark;  ///< why tables disagree, or why a row is an exception; empty when there is nothing to say
};

/// Figures of one phase at 298.15 K and 100 kPa.
struct PhaseFacts {
  std::optional<Datum> formation_enthalpy;  ///< [J/mol]
  std::optional<Datum> entropy;             ///< [J/(mol K)]
  std::optional<Datum> heat_capacity;       ///< [J/(mol K)]
};

/// All text views point into the embedded tables and live as long as the program.
struct Compound {
  std::uint32_t id = 0;  ///< row number, stable within one build only; files store the CAS number or the name
  std::string_view name;
  std::string_view cas;      ///< "64-17-5"; empty when none
  std::string_view formula;  ///< Hill
  std::string_view smiles;   ///< empty for salts, metals and minerals without a molecular structure
  std::vector<std::string_view> synonyms;
  PhaseFacts gas, liquid, solid;
  std::optional<Datum> melting_point;        ///< [K]
  std::optional<Datum> boiling_point;        ///< [K] at 101.325 kPa
  std::optional<Datum> fusion_enthalpy;      ///< [J/mol] at the melting point
  std::optional<Datum> vaporisation_enthalpy_boiling;  ///< [J/mol] at the boiling point
  std::optional<Datum> vaporisation_enthalpy_298;      ///< [J/mol]
  std::optional<Datum> liquid_density;       ///< [kg/m3] near 298 K
  std::optional<Datum> critical_temperature; ///< [K]
  std::optional<Datum> critical_pressure;    ///< [Pa]
  bool reference_element = false;  ///< an element, formation enthalpy zero in `reference_phase` by definition
  char reference_phase = 0;        ///< 'g', 'l' or 's'
  bool vapour_associates = false;  ///< carboxylic acids, HF: the vaporisation enthalpy is not that of single molecules
};

}  // namespace heatledger::facts
