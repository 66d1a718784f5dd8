#include "core/page/species_figures.hpp"

#include <array>
#include <cmath>
#include <utility>

#include "core/base/number_text.hpp"
#include "core/estimate/bond_set.hpp"
#include "core/estimate/context_model.hpp"
#include "core/facts/atoms.hpp"
#include "core/facts/polynomials.hpp"
#include "core/thermo/estimated.hpp"
#include "core/thermo/species_enthalpy.hpp"
#include "core/units/constants.hpp"

namespace heatledger::page {
namespace {

constexpr std::array kGasTemperatures{
    units::kReferenceTemperature, 400.0, 500.0, 600.0, 800.0, 1000.0, 1500.0};

StatedFigure none(std::string reason) {
  return {std::nullopt, {}, {}, std::move(reason)};
}

StatedFigure from_table(const std::optional<facts::Datum>& datum, std::string reason) {
  if (!datum) return none(std::move(reason));
  return {uncertainty::Figure{datum->value, datum->u95}, "table", std::string(datum->source), {}};
}

StatedFigure stated(const Result<thermo::Sourced>& answer, double sign, std::vector<std::string>& cautions) {
  if (!answer.ok()) return none(answer.error().message);
  for (const std::string& caution : answer->cautions) cautions.push_back(caution);
  const uncertainty::Figure figure = answer->value.figure();
  return {uncertainty::Figure{sign * figure.value, figure.u95}, answer->route, answer->source, {}};
}

/// Formation enthalpy of the gas from the average bond set: free atoms minus the sum of bonds.
StatedFigure average_formation(const facts::Species& species) {
  if (!species.graph || !species.composition) return none("no structure, so no bonds to count");
  const Result<estimate::BondSet> set = estimate::BondSet::published(estimate::BondSet::names().front());
  if (!set.ok()) return none(set.error().message);
  uncertainty::Quantity sum;
  for (const molecule::BondCount& bond : species.bonds) {
    const estimate::BondValue* price = set->find(bond.type);
    if (price == nullptr) return none("the bond set has no value for " + molecule::spelling(bond.type));
    sum.add(uncertainty::Quantity(
                price->value, price->u95,
                uncertainty::source_key(uncertainty::SourceKind::BondValue, price->type.packed())),
            -bond.count);
  }
  if (species.bonds.empty()) return none("no bonds in it");
  if (species.composition->charge != 0) return none("an ion: bond sums do not reach charges");
  for (const auto& [key, count] : species.composition->atoms) {
    const std::optional<facts::Datum> atom = facts::gas_atom_formation(key % 1000);
    if (!atom) return none("no formation enthalpy of its gaseous atoms in the table");
    sum.add(uncertainty::Quantity(
                atom->value, atom->u95,
                uncertainty::source_key(uncertainty::SourceKind::Atom, static_cast<std::uint64_t>(key))),
            count);
  }
  return {sum.figure(), "average", set->title(), {}};
}

/// The estimates by bonds in context of one molecule, each made when it is asked for.
class ContextEstimates {
 public:
  ContextEstimates(const facts::Species& species, bool estimate_only) : estimate_only_(estimate_only) {
    if (!species.graph) {
      reason_ = "no structure to estimate from";
      return;
    }
    Result<estimate::ContextMolecule> molecule = estimate::context_molecule(*species.graph);
    if (molecule.ok()) {
      molecule_ = std::move(molecule.value());
    } else {
      reason_ = molecule.error().message;
    }
  }

  StatedFigure operator()(estimate::Property property,
                          double temperature = units::kReferenceTemperature) const {
    if (!molecule_) return none(reason_);
    estimate::ContextOptions options;
    options.temperature = temperature;
    options.estimate_only = estimate_only_;
    const Result<estimate::Prediction> made =
        estimate::ContextModel::embedded().predict(property, *molecule_, options);
    if (!made.ok()) return none(made.error().message);
    if (made->reading == estimate::Reading::None) {
      return none("structure alone gives no reliable figure here (± " +
                  machine_number(std::round(made->u95 / 1000), 3) + " kJ/mol): measure it, or compute it");
    }
    return {uncertainty::Figure{made->value, made->u95},
            "context",
            "bonds in context, fitted to published values",
            {}};
  }

 private:
  std::optional<estimate::ContextMolecule> molecule_;
  std::string reason_;
  bool estimate_only_;
};

/// The temperature polynomial of a gas, found by the compound's own names; nullptr when it has none.
const facts::Polynomial* gas_polynomial(const facts::Compound& compound) {
  if (const facts::Polynomial* found = facts::find_polynomial(compound.name, 'g')) return found;
  for (const std::string_view synonym : compound.synonyms) {
    if (const facts::Polynomial* found = facts::find_polynomial(synonym, 'g')) return found;
  }
  return nullptr;
}

StatedFigure from_polynomial(const facts::Polynomial& polynomial, double temperature) {
  const Result<facts::PolynomialValue> value = facts::evaluate(polynomial, temperature);
  if (!value.ok()) return none(value.error().message);
  // 1 per cent: the default of that table for gases.
  return {uncertainty::Figure{value->cp, 0.01 * value->cp}, "table", "NASA TM-4513 (1993), polynomial", {}};
}

/// What a table says, else the estimate; where both fail, both reasons.
StatedFigure table_or(StatedFigure table, const StatedFigure& estimate) {
  if (table.figure) return table;
  if (estimate.figure) return estimate;
  return none(table.reason == estimate.reason ? table.reason : table.reason + "; " + estimate.reason);
}

/// Liquid from gas: minus the enthalpy of vaporisation; the two errors taken as independent.
StatedFigure liquid_from(const StatedFigure& gas, const StatedFigure& vaporisation) {
  if (!gas.figure) return none(gas.reason);
  if (!vaporisation.figure) return none(vaporisation.reason);
  const uncertainty::Figure figure{
      gas.figure->value - vaporisation.figure->value,
      std::sqrt(gas.figure->u95 * gas.figure->u95 + vaporisation.figure->u95 * vaporisation.figure->u95)};
  const bool same = gas.route == vaporisation.route;
  return {figure, same ? gas.route : gas.route + " and " + vaporisation.route, "gas minus vaporisation", {}};
}

}  // namespace

SpeciesFigures species_figures(std::shared_ptr<const facts::Species> species, bool estimate_only) {
  using estimate::Property;
  SpeciesFigures figures;
  const facts::Species& it = *species;
  const facts::Compound* compound = estimate_only ? nullptr : it.compound;
  const ContextEstimates in_context(it, estimate_only);
  const std::string not_tabulated = estimate_only ? "tabulated values are left aside" : "no tabulated value";
  const StatedFigure nothing = none(not_tabulated);

  const facts::Polynomial* polynomial = compound != nullptr ? gas_polynomial(*compound) : nullptr;
  StatedFigure gas = nothing, liquid = nothing, vaporisation = nothing, cp_liquid = nothing, cp_gas = nothing;
  figures.solid_formation = nothing;
  if (compound != nullptr) {
    gas = stated(thermo::tabulated_formation(it, molecule::Phase::Gas), 1, figures.cautions);
    liquid = stated(thermo::tabulated_formation(it, molecule::Phase::Liquid), 1, figures.cautions);
    figures.solid_formation =
        stated(thermo::tabulated_formation(it, molecule::Phase::Solid), 1, figures.cautions);
    // Gas to liquid gives heat off; the enthalpy of vaporisation is its opposite.
    vaporisation = stated(thermo::gas_to_phase(it, molecule::Phase::Liquid), -1, figures.cautions);
    cp_liquid = from_table(compound->liquid.heat_capacity, not_tabulated);
    cp_gas = from_table(compound->gas.heat_capacity, not_tabulated);
  }
  // Nothing is estimated of a liquid that cannot be there.
  const bool no_liquid = it.compound != nullptr && it.compound->critical_temperature &&
                         it.compound->critical_temperature->value < units::kReferenceTemperature;
  const StatedFigure above_critical = none("no liquid at 298.15 K: that is above its critical temperature");
  const auto of_liquid = [&](Property property) { return no_liquid ? above_critical : in_context(property); };
  const StatedFigure average = average_formation(it);
  figures.gas_formation = table_or(table_or(gas, in_context(Property::GasFormation)), average);
  if (average.figure && figures.gas_formation.route != "average") figures.average_gas_formation = average;
  figures.vaporisation_298 = table_or(vaporisation, of_liquid(Property::Vaporisation298));
  figures.liquid_formation = table_or(liquid, liquid_from(figures.gas_formation, figures.vaporisation_298));
  figures.cp_liquid_298 = table_or(cp_liquid, of_liquid(Property::LiquidHeatCapacity298));
  for (const double temperature : kGasTemperatures) {
    StatedFigure table = temperature == units::kReferenceTemperature ? cp_gas : nothing;
    if (!table.figure && polynomial != nullptr) table = from_polynomial(*polynomial, temperature);
    figures.cp_gas.push_back(
        {temperature, table_or(table, in_context(Property::GasHeatCapacity, temperature))});
  }
  if (!it.note.empty()) figures.notes.push_back(it.note);
  if (std::optional<std::string> caution = thermo::crowded_chain_caution(it))
    figures.cautions.push_back(*std::move(caution));
  if (compound != nullptr && compound->vapour_associates) {
    figures.cautions.push_back(
        "The real vapour is partly associated; the figures for the gas are for single molecules.");
  }
  figures.species = std::move(species);
  return figures;
}

}  // namespace heatledger::page
