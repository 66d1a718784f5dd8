// One compound of the library and its published figures. Finding one stands in library.hpp.
#pragma once

#include <cstdint>
#include <optional>
#include <span>
#include <string_view>
#include <vector>

namespace heatledger::facts {

/// Another table's figure for the same quantity, kept in sight because it lies outside the ± of the one
/// taken.
struct Rival {
  double value = 0;         ///< in the unit of the figure it stands beside
  std::string_view source;  ///< as Datum::source
};

/// A published figure: value, half width of its 95 % interval (never empty: the table's default where the
/// source gives none, and then `u95_is_default`), source text. Where published tables disagree: `spread` is
/// the largest less the smallest of all tables seen, `rivals` are the figures that were not taken,
/// `why_taken` is one sentence in plain words.
struct Datum {
  double value = 0;
  double u95 = 0;
  bool u95_is_default = false;
  double spread = 0;        ///< 0: one table only, or all agree
  std::string_view source;  ///< short name; source_reference() in sources.hpp spells it out
  std::string_view
      remark;  ///< why a row is an exception, a temperature other than 298.15 K; empty: nothing to say
  bool typed = false;          ///< on a sheet or in a site table: goes before whatever is published or fitted
  std::string_view why_taken;  ///< empty unless tables disagree beyond their ±, or a typed figure covers one
  std::span<const Rival> rivals;
};

/// Figures of one phase at 298.15 K and 100 kPa.
struct PhaseFacts {
  std::optional<Datum> formation_enthalpy;  ///< [J/mol]
  std::optional<Datum> entropy;             ///< [J/(mol K)]
  std::optional<Datum> heat_capacity;       ///< [J/(mol K)]
};

/// What the `smiles` of a compound is.
enum class Structure : std::uint8_t {
  None,      ///< empty: minerals, solid solutions, cages that no valence structure describes
  Molecule,  ///< bonds can be counted
  Formal,    ///< ions or bare atoms written one after the other; good for finding the compound, not for
             ///< counting bonds
};

/// All text views point into the embedded tables (or the site table that the record came from).
struct Compound {
  std::uint32_t id = 0;  ///< row number, stable within one build only; files store the CAS number or the name
  std::string_view name;
  std::string_view cas;      ///< "64-17-5"; empty when none
  std::string_view formula;  ///< Hill; a hydrate counts its water
  std::string_view smiles;   ///< see `structure`
  Structure structure = Structure::None;
  std::vector<std::string_view> synonyms;
  PhaseFacts gas, liquid, solid;
  std::optional<Datum> melting_point;                  ///< [K]
  std::optional<Datum> boiling_point;                  ///< [K] at 101.325 kPa
  std::optional<Datum> fusion_enthalpy;                ///< [J/mol] at the melting point
  std::optional<Datum> vaporisation_enthalpy_boiling;  ///< [J/mol] at the boiling point
  std::optional<Datum> vaporisation_enthalpy_298;      ///< [J/mol]
  std::optional<Datum> liquid_density;                 ///< [kg/m3] near 298 K
  std::optional<Datum> critical_temperature;           ///< [K]
  std::optional<Datum> critical_pressure;              ///< [Pa]
  /// Of one mole of the pure species in the solvent of the sheet, written `(diss)` [J/mol]; typed only.
  std::optional<Datum> dissolving_enthalpy;
  bool reference_element = false;  ///< an element, formation enthalpy zero in `reference_phase` by definition
  char reference_phase = 0;        ///< 'g', 'l' or 's'
  bool vapour_associates =
      false;  ///< carboxylic acids, HF: the vaporisation enthalpy is not that of single molecules
  bool usual_of_formula =
      false;  ///< what a bare formula means in practice although rarer isomers exist (C6H6 is benzene)
  std::string_view remark;  ///< about the row as a whole: why two phases do not differ by the phase change, …
};

}  // namespace heatledger::facts
