#include "core/balance/measured.hpp"

#include <cmath>
#include <utility>

#include "core/balance/bond_words.hpp"
#include "core/base/number_text.hpp"
#include "core/estimate/context_molecule.hpp"
#include "core/thermo/estimated.hpp"
#include "core/thermo/solvent_heat.hpp"
#include "core/units/constants.hpp"

namespace heatledger::balance {
namespace {

using molecule::Phase;
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

/// The heat as typed, for the coefficients written, at 25 °C.
Result<Route> as_measured(const Ledger& ledger, const MeasuredHeat& heat) {
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
  return route;
}

/// Last lines of a reading: the figure as written, and as gas.
void finish(const Ledger& ledger, Route& route) {
  route.working.push_back("as written, 25 °C: " + kj_with_u95(*route.as_written, "kJ"));
  Quantity gas = *route.as_written;
  for (const Correction& correction : ledger.corrections) {
    if (!correction.value) return;
    gas.add(*correction.value, -1);
  }
  for (const LedgerRow& row : ledger.rows) {
    // A row in its own phase (salts, solutions) leaves no figure that is of the gas throughout.
    if (row.route == RowRoute::Missing) return;
  }
  route.gas_298 = std::move(gas);
}

constexpr const char* kInIt = "mixing and evaporation in it";
constexpr const char* kAdded = "mixing and evaporation added to it";

bool from_something_condensed(const Ledger& ledger) {
  for (const LedgerRow& row : ledger.rows) {
    if (!ledger.reaction->species[row.species].product && row.phase != Phase::Gas) return true;
  }
  return false;
}

std::optional<Correction> line_it_may_hold(const Ledger& ledger, std::size_t index, double temperature,
                                           bool condensed) {
  const ReactionSpecies& entry = ledger.reaction->species[index];
  const Phase written = entry.term.phase;
  const std::optional<molecule::Strength>& strength = entry.term.strength;
  const bool mixed =
      written == Phase::Dissolved ||
      (written == Phase::Aqueous && strength && strength->kind != molecule::Strength::Kind::InfiniteDilution);
  if (!mixed && !(written == Phase::Gas && entry.product && condensed)) return std::nullopt;
  const std::optional<Phase> pure = thermo::stable_phase(*entry.species, temperature);
  if (!mixed && (!pure || *pure != Phase::Liquid)) return std::nullopt;
  Correction line;
  line.species = index;
  line.times = entry.coefficient();
  const std::string from = pure ? std::string(thermo::phase_word(*pure)) : "pure",
                    to(thermo::phase_word(written));
  line.what = display_species(entry) + ", " + (entry.product ? from + " to " + to : to + " to " + from);
  if (line.times != 1) line.what += ", " + times_text(line.times) + " ×";
  if (!pure) {
    line.why_not = "no table has " + display_species(entry) + " undissolved";
    return line;
  }
  const Result<thermo::Sourced> start = thermo::best_formation(*entry.species, *pure, {}),
                                end = thermo::best_formation(*entry.species, written, strength);
  if (!start.ok() || !end.ok()) {
    line.why_not = (start.ok() ? end : start).error().message;
    return line;
  }
  Quantity change = end->value;
  change.add(start->value, -1);
  line.value = change.scaled(entry.product ? line.times : -line.times);
  line.source = end->source;
  line.working = start->working;
  line.working.insert(line.working.end(), end->working.begin(), end->working.end());
  line.working.push_back(times_text(line.times) + " × " + fine_kj((entry.product ? 1 : -1) * change.value()) +
                         " = " + fine_kj(line.value->value()) + " kJ");
  return line;
}

std::vector<Correction> lines_it_may_hold(const Ledger& ledger, const MeasuredHeat& heat) {
  std::vector<Correction> lines;
  const bool condensed = from_something_condensed(ledger);
  for (std::size_t i = 0; i < ledger.rows.size(); ++i) {
    std::optional<Correction> line =
        line_it_may_hold(ledger, i, heat.at.value_or(units::kReferenceTemperature), condensed);
    if (line) lines.push_back(std::move(*line));
  }
  return lines;
}

std::string first_reason(const std::vector<Correction>& lines) {
  for (const Correction& line : lines) {
    if (!line.value) return line.why_not;
  }
  return {};
}

/// Of two readings of one heat the one to be prepared for: the larger, and heat released before heat taken
/// up.
bool larger_heat(double candidate, double other) {
  if (candidate < 0 || other < 0) return candidate < other;
  return candidate > other;
}

}  // namespace

Status add_measured_routes(Ledger& ledger, const MeasuredHeat& heat) {
  Result<Route> read = as_measured(ledger, heat);
  if (!read.ok()) return read.error();
  Route measured = std::move(read).value();
  ledger.measured_lines = lines_it_may_hold(ledger, heat);
  if (ledger.measured_lines.empty()) {
    finish(ledger, measured);
    ledger.routes.push_back(std::move(measured));
    return success();
  }
  const std::string lacking = first_reason(ledger.measured_lines);
  if (heat.includes == Includes::Yes || !lacking.empty()) {
    measured.remark = heat.includes == Includes::Yes ? kInIt : "";
    if (heat.includes != Includes::Yes) {
      ledger.cautions.push_back(
          "The measured heat " +
          std::string(heat.includes == Includes::No ? "does not hold" : "does not say whether it holds") +
          " mixing and evaporation, and no figure of them is known, so it stands as typed: " + lacking);
    }
    finish(ledger, measured);
    ledger.routes.push_back(std::move(measured));
    return success();
  }
  Route added = measured;
  for (const Correction& line : ledger.measured_lines) {
    added.as_written->add(*line.value);
    added.working.push_back(line.what + "  " + fine_kj(line.value->value()) +
                            " kJ, not in the measured figure");
  }
  added.remark = kAdded;
  measured.remark = kInIt;
  if (heat.includes == Includes::No) {
    finish(ledger, added);
    ledger.routes.push_back(std::move(added));
    return success();
  }
  finish(ledger, measured);
  finish(ledger, added);
  if (larger_heat(added.as_written->value(), measured.as_written->value())) std::swap(measured, added);
  ledger.cautions.push_back("The measured heat does not say whether it holds mixing and evaporation: " +
                            kj_with_u95(*measured.as_written, "kJ") + " with " + measured.remark + ", " +
                            kj_with_u95(*added.as_written, "kJ") + " with " + added.remark +
                            ". The larger heat is used.");
  measured.remark += "; the larger heat is used";
  added.name = kOtherMeasuredRoute;
  ledger.routes.push_back(std::move(measured));
  ledger.routes.push_back(std::move(added));
  return success();
}

Result<estimate::Measurement> observation_of(const Ledger& ledger) {
  const Route* route = find_route(ledger, kMeasuredRoute);
  if (route == nullptr || !route->gas_298) return no_observation("it cannot be brought to the gas.");
  if (find_route(ledger, kOtherMeasuredRoute) != nullptr)
    return no_observation("nobody says whether it holds mixing and evaporation.");
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
