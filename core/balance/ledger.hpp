// The ledger of one reaction: bonds broken and formed, corrections to the phases written, totals with ±,
// routes.
#pragma once

#include <cstdint>
#include <memory>
#include <optional>
#include <string>
#include <vector>

#include "core/balance/reaction.hpp"
#include "core/estimate/bond_set.hpp"
#include "core/estimate/context_explain.hpp"
#include "core/estimate/context_observations.hpp"
#include "core/thermo/species_enthalpy.hpp"
#include "core/uncertainty/quantity.hpp"

namespace heatledger::balance {

/// One kind of bond in one species row. The bonds of nitro groups share one line: `type` is the N-O, `second`
/// the N=O.
struct BondLine {
  /// The other half of a line that joins two types of bond.
  struct Half {
    molecule::BondType type;
    int count = 0;
    const estimate::BondValue* price = nullptr;
  };

  molecule::BondType type;
  int count = 0;  ///< per molecule
  const estimate::BondValue* price =
      nullptr;  ///< null: the set has no value; the row has no sum and says which is missing
  std::optional<Half> second;
  double per_mole = 0;     ///< Σ count × price [J/mol]; 0 without price
  std::string label;       ///< in words where that is clearer than the spelling: "N–O and N=O of nitro"
  std::string count_text;  ///< "5", "1 + 1"
  std::string price_text;  ///< kJ/mol: "413", "201, 607"; "no value"
  std::string source;
  std::string remark;  ///< a typed value in use, Kekulé counting, one molecule's own value

  bool priced() const { return price != nullptr && (!second || second->price != nullptr); }
};

/// How a row's bond sum came about.
enum class RowRoute : std::uint8_t {
  Bonds,             ///< sum over bonds
  AtomsFromElement,  ///< element in its reference state (graphite, sulfur, metals): atoms from the element
  Formation,  ///< atoms minus formation enthalpy (ions, salts): gas atoms that the structure cannot reach
  Missing     ///< no sum: a bond without value, or no structure and no formation enthalpy
};

struct LedgerRow {
  std::size_t species = 0;  ///< index into Reaction::species
  RowRoute route = RowRoute::Bonds;
  std::vector<BondLine> lines;
  /// In a ledger by bonds in context: the lines of the species, in place of `lines`; null where its sum is
  /// not an estimate.
  std::shared_ptr<const estimate::Explanation> context;
  std::optional<uncertainty::Quantity> per_mole;     ///< bond sum of one mole [J/mol]
  std::optional<uncertainty::Quantity> in_equation;  ///< times the coefficient [J]
  std::vector<molecule::BondType> missing;           ///< bond types without a value
  molecule::Phase phase = molecule::Phase::Gas;      ///< the phase reckoned with; bonds are always of the gas
  std::optional<uncertainty::Quantity>
      table;  ///< bond sum that the tabulated formation enthalpy implies [J/mol]
  std::string table_source;
  std::string remark;  ///< how a row without bonds came about, which bond is missing and which set has it
  std::vector<std::string>
      strains;  ///< what average bonds do not hold in this structure: "aromatic ring", "nitro group"
  std::vector<std::string> working;

  bool unfolds() const { return !lines.empty() || context != nullptr; }
};

/// One correction line under the totals.
struct Correction {
  std::string what;  ///< "nitrobenzene, liquid to gas"
  std::size_t species = 0;
  double times = 1;
  std::optional<uncertainty::Quantity>
      value;  ///< for the written coefficients [J]; empty: `why_not` says why
  std::string source;
  std::string why_not;
  std::vector<std::string> working;
};

/// A reaction enthalpy by one route for the written coefficients [J]; empty with the reason when the route
/// ends early.
struct Route {
  std::string name;  ///< see the names of the routes below
  std::optional<uncertainty::Quantity> gas_298;
  std::optional<uncertainty::Quantity> as_written;
  std::string why_not;
  std::vector<std::string> working;
  std::vector<std::size_t> estimated;  ///< indices of species whose figure no table has
  std::string remark;                  ///< how a measured heat was read; empty where there is one way only
};

/// Whether a measured heat holds mixing, dilution, evaporation and loss of gas.
enum class Includes : std::uint8_t { No, Yes, Unknown };

/// The measured enthalpy of this very reaction, as typed on the sheet.
struct MeasuredHeat {
  double value = 0;          ///< [J/mol of `per`], or [J] for the coefficients written
  double u95 = 0;            ///< half width of the 95 % interval; 0: taken as exact
  std::string per;           ///< species as for "per mole of" (see find_basis); empty: for the coefficients
  std::optional<double> at;  ///< [K] at which it was measured; empty: 298.15 K
  std::string source;        ///< who measured it with what and when
  std::string remark;        ///< medium
  Includes includes = Includes::Unknown;
  std::uint64_t key = 0;  ///< equal for the same measurement wherever it acts
};

/// What the figures are stated per.
struct Basis {
  enum class Kind : std::uint8_t {
    AsWritten,
    MoleOf,
    KilogramOf,
    KilogramOfReactants
  } kind = Kind::AsWritten;
  std::size_t species = 0;
  double factor = 1;  ///< figure as written × factor = figure on this basis
  std::string text;   ///< "per mol nitrobenzene"
  std::string unit;   ///< "kJ", "kJ/mol", "kJ/kg"
};

/// A basis that a reaction can be stated on: what to type, and how it reads.
struct BasisChoice {
  std::string name;  ///< for LedgerOptions::basis
  std::string text;
};
std::vector<BasisChoice> basis_choices(const Reaction& reaction);

/// @param name  see LedgerOptions::basis; a species by its text on the sheet or its library name, case
/// forgiven
/// @errors ledger.basis_unknown, ledger.no_molar_mass
Result<Basis> find_basis(const Reaction& reaction, std::string_view name);

struct Background;

struct Ledger {
  std::shared_ptr<const Reaction> reaction;
  std::shared_ptr<const estimate::BondSet> set;
  std::vector<LedgerRow> rows;
  std::optional<uncertainty::Quantity> broken, formed;  ///< sums of the two columns [J]
  std::optional<uncertainty::Quantity> gas_298;         ///< broken − formed by the chosen bond set [J]
  std::vector<Correction> corrections;
  std::optional<uncertainty::Quantity>
      as_written;           ///< phases as written, 25 °C [J], by the bonds of the rows
  bool in_context = false;  ///< rows and sums are those of bonds in context
  std::vector<Route> routes;
  std::string taken;  ///< name of the route whose figure goes on
  /// Mixing and evaporation that the measured heat may hold: added to it, in it, or both results shown.
  std::vector<Correction> measured_lines;
  /// Species brought from 25 °C to their real temperature; empty when none was given.
  std::vector<Correction> to_temperature;
  std::optional<uncertainty::Quantity>
      as_run;  ///< the figure taken plus these [J]; empty without temperatures or data
  Basis basis;
  std::optional<double> reactants_at, products_at;             ///< [K] as asked for; empty: 298.15 K
  std::shared_ptr<const estimate::Observations> observations;  ///< that sharpened the estimates; or null
  std::vector<std::string> notes, cautions;
  std::shared_ptr<const Background> background;  ///< see LedgerOptions::background
};

/// When bonds in context are asked. The first question of a program run fits the model, which takes part of a
/// second.
enum class ContextUse : std::uint8_t {
  Never,
  WhereNeeded,  ///< for species that no table has
  Always        ///< and as a route of its own for every reaction
};

struct LedgerOptions {
  std::shared_ptr<const estimate::BondSet> set;  ///< required
  std::string basis;         ///< "" as written, "NAME" per mole of a species, "kg NAME", "kg reactants"
  std::string pinned_route;  ///< empty: the best
  ContextUse context = ContextUse::WhereNeeded;
  bool context_rows = false;  ///< rows and sums by bonds in context; takes ContextUse::Always
  std::optional<double> reactants_at, products_at;  ///< [K] > 0; empty: 298.15 K
  std::optional<double> pressure;                   ///< [Pa] of the gases, for cautions; empty: not asked
  std::optional<MeasuredHeat> measured;
  std::shared_ptr<const estimate::Observations> observations;  ///< sharpen every estimate; null: none
  /// Of an earlier ledger: where it is of the same reaction with the same options but for bond set, basis,
  /// pinned route, pressure and measured heat, what these do not change is taken over with all its digits;
  /// where not, or null, everything is computed.
  std::shared_ptr<const Background> background;
};

/// Names of the routes.
inline constexpr std::string_view kAverageRoute = "average", kFormationRoute = "formation",
                                  kContextRoute = "context", kMeasuredRoute = "measured";
/// The reading of a measured heat that is not used: where nobody said what it holds, the larger heat is.
inline constexpr std::string_view kOtherMeasuredRoute = "measured_other";

/// A figure on the chosen basis [J, J/mol or J/kg].
uncertainty::Quantity on_basis(const uncertainty::Quantity& quantity, const Basis& basis);

/// The route of that name; null when the ledger has none.
const Route* find_route(const Ledger& ledger, std::string_view name);

/// The measured route, where there is one, is taken before all others unless another is pinned.
/// @errors ledger.not_balanced (hint lists proposals), ledger.basis_unknown, ledger.no_molar_mass,
/// ledger.route_unknown, ledger.measured_per (the species a measured heat is stated for is not in the
/// equation)
Result<Ledger> make_ledger(std::shared_ptr<const Reaction> reaction, const LedgerOptions& options);

/// The rows alone, without totals, corrections or routes: what a sheet keeps in view while the coefficients
/// of an equation that does not balance are being mended. No figure follows from such an equation.
Ledger ledger_rows(std::shared_ptr<const Reaction> reaction, const LedgerOptions& options);

}  // namespace heatledger::balance
