#include "core/page/species_figures.hpp"

#include <array>
#include <utility>

#include "core/estimate/bond_set.hpp"
#include "core/facts/atoms.hpp"
#include "core/thermo/species_enthalpy.hpp"
#include "core/units/constants.hpp"

namespace heatledger::page {
namespace {

constexpr std::array kGasTemperatures{units::kReferenceTemperature, 400.0, 500.0, 600.0, 800.0, 1000.0, 1500.0};

StatedFigure none(std::string reason) { return {std::nullopt, {}, {}, std::move(reason)}; }

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
    sum.add(uncertainty::Quantity(price->value, price->u95,
                                  uncertainty::source_key(uncertainty::SourceKind::BondValue, price->type.packed())),
            -bond.count);
  }
  if (species.bonds.empty()) return none("no bonds in it");
  if (species.composition->charge != 0) return none("an ion: bond sums do not reach charges");
  for (const auto& [key, count] : species.composition->atoms) {
    const std::optional<facts::Datum> atom = facts::gas_atom_formation(key % 1000);
    if (!atom) return none("no formation enthalpy of its gaseous atoms in the table");
    sum.add(uncertainty::Quantity(atom->value, atom->u95,
                                  uncertainty::source_key(uncertainty::SourceKind::Atom, static_cast<std::uint64_t>(key))),
            count);
  }
  return {sum.figure(), "average", set->title(), {}};
}

}  // namespace

SpeciesFigures species_figures(std::shared_ptr<const facts::Species> species, bool estimate_only) {
  SpeciesFigures figures;
  const facts::Species& it = *species;
  const facts::Compound* compound = estimate_only ? nullptr : it.compound;
  const StatedFigure average = average_formation(it);
  const std::string not_tabulated = estimate_only ? "tabulated values are left aside" : "no tabulated value";

  if (compound != nullptr) {
    figures.gas_formation = stated(thermo::tabulated_formation(it, molecule::Phase::Gas), 1, figures.cautions);
    figures.liquid_formation = stated(thermo::tabulated_formation(it, molecule::Phase::Liquid), 1, figures.cautions);
    figures.solid_formation = stated(thermo::tabulated_formation(it, molecule::Phase::Solid), 1, figures.cautions);
    // Gas to liquid gives heat off; the enthalpy of vaporisation is its opposite.
    figures.vaporisation_298 = stated(thermo::gas_to_phase(it, molecule::Phase::Liquid), -1, figures.cautions);
    figures.cp_liquid_298 = from_table(compound->liquid.heat_capacity, not_tabulated);
  } else {
    figures.gas_formation = figures.liquid_formation = figures.solid_formation = none(not_tabulated);
    figures.vaporisation_298 = figures.cp_liquid_298 = none(not_tabulated);
  }
  if (!figures.gas_formation.figure) {
    const std::string reason = figures.gas_formation.reason;
    figures.gas_formation = average;
    if (!average.figure) figures.gas_formation.reason = reason + "; " + average.reason;
  } else if (average.figure) {
    figures.average_gas_formation = average;
  }
  for (const double temperature : kGasTemperatures) {
    const bool reference = temperature == units::kReferenceTemperature;
    figures.cp_gas.push_back({temperature, reference && compound != nullptr
                                               ? from_table(compound->gas.heat_capacity, not_tabulated)
                                               : none(not_tabulated)});
  }
  if (!it.note.empty()) figures.notes.push_back(it.note);
  if (compound != nullptr && compound->vapour_associates) {
    figures.cautions.push_back("The real vapour is partly associated; the figures for the gas are for single molecules.");
  }
  figures.species = std::move(species);
  return figures;
}

}  // namespace heatledger::page
