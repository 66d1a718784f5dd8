// The ledger of one reaction: bonds broken and formed, corrections to the phases written, totals with ±, routes.
#pragma once

#include <cstdint>
#include <memory>
#include <optional>
#include <string>
#include <vector>

#include "core/balance/reaction.hpp"
#include "core/estimate/bond_set.hpp"
#include "core/thermo/species_enthalpy.hpp"
#include "core/uncertainty/quantity.hpp"

namespace heatledger::balance {

/// One kind of bond in one species row.
struct BondLine {
  molecule::BondType type;
  int count = 0;                        ///< per molecule
  const estimate::BondValue* price = nullptr;  ///< null: the set has no value; the row has no sum and says which is missing
  double per_mole = 0;                  ///< count × price [J/mol]
  std::string label;                    ///< in words where that is clearer than the spelling: "N–O and N=O of nitro"
  std::string remark;
};

/// How a row's bond sum came about.
enum class RowRoute : std::uint8_t {
  Bonds,             ///< sum over bonds
  AtomsFromElement,  ///< element in its reference state (graphite, sulfur, metals): atoms from the element
  Formation,         ///< atoms minus formation enthalpy (ions, salts): gas atoms that the structure cannot reach
  Missing            ///< no sum: a bond without value, or no structure and no formation enthalpy
};

struct LedgerRow {
  std::size_t species = 0;   ///< index into Reaction::species
  RowRoute route = RowRoute::Bonds;
  std::vector<BondLine> lines;
  std::optional<uncertainty::Quantity> per_mole;    ///< bond sum of one mole [J/mol]
  std::optional<uncertainty::Quantity> in_equation; ///< times the coefficient [J]
  std::vector<molecule::BondType> missing;          ///< bond types without a value
  std::optional<uncertainty::Quantity> table;       ///< bond sum that the tabulated formation enthalpy implies [J/mol]
  std::string table_source;
  std::string remark;
};

/// One correction line under the totals.
struct Correction {
  std::string what;  ///< "nitrobenzene, liquid to gas"
  std::size_t species = 0;
  double times = 1;
  std::optional<uncertainty::Quantity> value;  ///< for the written coefficients [J]; empty: `why_not` says why
  std::string source;
  std::string why_not;
  std::vector<std::string> working;
};

/// A reaction enthalpy by one route for the written coefficients [J]; empty with the reason when the route ends early.
struct Route {
  std::string name;  ///< "average", "context", "formation", "measured"
  std::optional<uncertainty::Quantity> gas_298;
  std::optional<uncertainty::Quantity> as_written;
  std::string why_not;
  std::vector<std::string> working;
};

/// What the figures are stated per.
struct Basis {
  enum class Kind : std::uint8_t { AsWritten, MoleOf, KilogramOf, KilogramOfReactants } kind = Kind::AsWritten;
  std::size_t species = 0;
  double factor = 1;   ///< figure as written × factor = figure on this basis
  std::string text;    ///< "per mol nitrobenzene"
  std::string unit;    ///< "kJ/mol", "kJ/kg"
};

struct Ledger {
  std::shared_ptr<const Reaction> reaction;
  std::shared_ptr<const estimate::BondSet> set;
  std::vector<LedgerRow> rows;
  std::optional<uncertainty::Quantity> broken, formed;  ///< sums of the two columns [J]
  std::optional<uncertainty::Quantity> gas_298;         ///< broken − formed by the chosen bond set [J]
  std::vector<Correction> corrections;
  std::optional<uncertainty::Quantity> as_written;      ///< phases as written, 25 °C [J], by bonds
  std::vector<Route> routes;
  std::string taken;  ///< name of the route whose figure goes on
  Basis basis;
  std::vector<std::string> notes, cautions;
};

struct LedgerOptions {
  std::shared_ptr<const estimate::BondSet> set;  ///< required
  std::string basis;  ///< "" as written, "NAME" per mole of a species, "kg NAME", "kg reactants"
  std::string pinned_route;  ///< empty: the best
};

/// @errors ledger.not_balanced (message lists proposals), ledger.basis_unknown
Result<Ledger> make_ledger(std::shared_ptr<const Reaction> reaction, const LedgerOptions& options);

}  // namespace heatledger::balance
