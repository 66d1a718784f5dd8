#include "core/balance/measured.hpp"

#include <cmath>

#include "core/balance/bond_words.hpp"
#include "core/base/number_text.hpp"
#include "core/estimate/context_molecule.hpp"
#include "core/units/constants.hpp"

namespace heatledger::balance {
namespace {

using uncertainty::Quantity;
using uncertainty::source_key;
using uncertainty::SourceKind;

Error no_observation(const std::string& why) {
  return Error{"estimate.measurement", "This measured heat sharpens no estimate: " + why, "measured",
               "It still stands as a route of its own."};
}

/// ΔH(25 °C) = ΔH(T) − Σ ν Δh(25 °C to T), every species kept in its phase.
/// @return  why it cannot be done; empty when it was
std::string bring_to_reference(const Ledger& ledger, double temperature, Quantity& heat,
                               std::vector<std::string>& working) {
  for (std::size_t i = 0; i < ledger.rows.size(); ++i) {
    const ReactionSpecies& entry = ledger.reaction->species[i];
    const Result<thermo::Sourced> change =
        thermo::enthalpy_increment(*entry.species, ledger.rows[i].phase, temperature);
    if (!change.ok()) return change.error().message;
    const double times = entry.product ? -entry.coefficient() : entry.coefficient();
    heat.add(change->value, times);
    working.push_back(display_species(entry) + ", " + fine_kj(times * change->value.value()) +
                      " kJ from the temperature of measurement to 25 °C");
  }
  return {};
}

}  // namespace

Result<Route> measured_route(const Ledger& ledger, const MeasuredHeat& heat) {
  Route route;
  route.name = kMeasuredRoute;
  double times = 1;
  std::string per = "for the coefficients written";
  if (!heat.per.empty()) {
    const Result<Basis> basis = find_basis(*ledger.reaction, heat.per);
    if (!basis.ok() || basis->kind != Basis::Kind::MoleOf) {
      return Error{"ledger.measured_per",
                   "The measured heat is stated per mole of \"" + heat.per +
                       "\", which is no species of this equation.",
                   "measured.per",
                   "Name a reactant or product as the equation writes it, or leave it empty."};
    }
    times = 1 / basis->factor;
    per = basis->text;
  }
  Quantity value =
      Quantity(heat.value, heat.u95, source_key(SourceKind::Measurement, heat.key)).scaled(times);
  const std::string typed = heat.u95 > 0 ? kj_with_u95(Quantity(heat.value, heat.u95, 1), "kJ")
                                         : ledger_kj(heat.value) + " kJ, taken as exact";
  route.working.push_back("measured: " + typed + " " + per + (heat.source.empty() ? "" : "; " + heat.source));
  if (times != 1) {
    route.working.push_back(times_text(times) + " × " + ledger_kj(heat.value) + " = " +
                            ledger_kj(value.value()) + " kJ for the coefficients written");
  }
  if (!heat.remark.empty()) route.working.push_back(heat.remark);
  if (heat.at && *heat.at != units::kReferenceTemperature) {
    const std::string why = bring_to_reference(ledger, *heat.at, value, route.working);
    if (!why.empty())
      route.working.push_back("not corrected to 25 °C: " + why + " The figure stands as measured.");
  }
  route.as_written = value;
  route.working.push_back("as written, 25 °C: " + kj_with_u95(value, "kJ"));
  Quantity gas = value;
  for (const Correction& correction : ledger.corrections) {
    if (!correction.value) return route;
    gas.add(*correction.value, -1);
  }
  for (const LedgerRow& row : ledger.rows) {
    // A row in its own phase (salts, solutions) leaves no figure that is of the gas throughout.
    if (row.route == RowRoute::Missing) return route;
  }
  route.gas_298 = std::move(gas);
  return route;
}

Result<estimate::Measurement> observation_of(const Ledger& ledger) {
  const Route* route = find_route(ledger, kMeasuredRoute);
  if (route == nullptr || !route->gas_298) return no_observation("it cannot be brought to the gas.");
  estimate::Measurement measurement;
  measurement.property = estimate::Property::GasFormation;
  double known = 0, variance = route->gas_298->u95() * route->gas_298->u95();
  for (std::size_t i = 0; i < ledger.rows.size(); ++i) {
    const ReactionSpecies& entry = ledger.reaction->species[i];
    const facts::Species& species = *entry.species;
    const double times = entry.product ? entry.coefficient() : -entry.coefficient();
    const bool element = species.compound != nullptr && species.compound->reference_element;
    if (species.graph && !element) {
      Result<estimate::ContextMolecule> molecule = estimate::context_molecule(*species.graph);
      if (molecule.ok()) {
        measurement.terms.push_back(
            {times, std::make_shared<const estimate::ContextMolecule>(std::move(molecule).value())});
        continue;
      }
    }
    // What stands outside the model is taken off with its own figure, in the phase that its row counts.
    const bool corrected = ledger.rows[i].route == RowRoute::Bonds;
    const Result<thermo::Sourced> figure = thermo::tabulated_formation(
        species, corrected ? molecule::Phase::Gas : ledger.rows[i].phase, entry.term.strength);
    if (!figure.ok()) return no_observation(figure.error().message);
    known += times * figure->value.value();
    variance += times * times * figure->value.u95() * figure->value.u95();
  }
  if (measurement.terms.empty()) return no_observation("no species of it is estimated from its bonds.");
  if (route->as_written->u95() <= 0 || !(variance > 0)) return no_observation("it has no ±.");
  measurement.value = route->gas_298->value() - known;
  measurement.u95 = std::sqrt(variance);
  measurement.label = display_equation(*ledger.reaction);
  return measurement;
}

}  // namespace heatledger::balance
