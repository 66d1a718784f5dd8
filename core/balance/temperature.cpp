#include "core/balance/temperature.hpp"

#include "core/balance/bond_words.hpp"
#include "core/base/number_text.hpp"
#include "core/units/constants.hpp"

namespace heatledger::balance {
namespace {

std::string celsius(double kelvin) {
  return display_number(kelvin - 273.15, kelvin - 273.15 == static_cast<int>(kelvin - 273.15) ? 0 : 1) +
         " °C";
}

Correction to_temperature(const Background& background, std::size_t index, double temperature,
                          std::vector<std::string>& cautions) {
  const ReactionSpecies& entry = background.reaction->species[index];
  Correction correction;
  correction.species = index;
  correction.times = entry.coefficient();
  correction.what = display_species(entry) + (entry.product ? ", 25 °C to " + celsius(temperature)
                                                            : ", " + celsius(temperature) + " to 25 °C");
  if (correction.times != 1) correction.what += ", " + times_text(correction.times) + " ×";
  const Result<thermo::Sourced> change =
      thermo::enthalpy_increment(*entry.species, background.figures[index].phase, temperature);
  if (!change.ok()) {
    correction.why_not = change.error().message;
    return correction;
  }
  correction.value = change->value.scaled(entry.product ? correction.times : -correction.times);
  correction.source = change->source;
  correction.working = change->working;
  cautions.insert(cautions.end(), change->cautions.begin(), change->cautions.end());
  return correction;
}

}  // namespace

void bring_to_temperatures(Background& background) {
  for (std::size_t i = 0; i < background.figures.size(); ++i) {
    const ReactionSpecies& entry = background.reaction->species[i];
    const std::optional<double>& at = entry.product ? background.products_at : background.reactants_at;
    if (!at || *at == units::kReferenceTemperature) continue;
    Correction correction = to_temperature(background, i, *at, background.temperature_cautions);
    if (!correction.value)
      background.temperature_notes.push_back("Not corrected to temperature: " + correction.why_not);
    background.to_temperature.push_back(std::move(correction));
    const std::optional<molecule::Strength>& strength = entry.term.strength;
    if (strength && strength->kind != molecule::Strength::Kind::InfiniteDilution)
      background.temperature_cautions.push_back(
          display_species(entry) +
          ": the water of this solution is not in the correction to temperature; its "
          "warming or cooling is a stream of a step.");
  }
}

void run_at_temperatures(Ledger& ledger) {
  const Background& background = *ledger.background;
  const Route* taken = find_route(ledger, ledger.taken);
  if (taken != nullptr) ledger.as_run = taken->as_written;
  ledger.to_temperature = background.to_temperature;
  for (const Correction& correction : ledger.to_temperature) {
    if (!correction.value) {
      ledger.as_run.reset();
    } else if (ledger.as_run) {
      ledger.as_run->add(*correction.value);
    }
  }
  ledger.notes.insert(ledger.notes.end(), background.temperature_notes.begin(),
                      background.temperature_notes.end());
  ledger.cautions.insert(ledger.cautions.end(), background.temperature_cautions.begin(),
                         background.temperature_cautions.end());
}

void note_pressure(Ledger& ledger, double pressure) {
  constexpr double kShareOfCritical = 0.1;  // below it gas enthalpies depart by some 1 % of RT at most
  constexpr double kHighestUnknown = 1e6;
  std::string near, unknown;
  for (const LedgerRow& row : ledger.rows) {
    if (row.phase != molecule::Phase::Gas) continue;
    const ReactionSpecies& entry = ledger.reaction->species[row.species];
    const facts::Compound* compound = entry.species->compound;
    if (compound != nullptr && compound->critical_pressure) {
      const double critical = compound->critical_pressure->value;
      if (pressure <= kShareOfCritical * critical) continue;
      near += (near.empty() ? "" : ", ") + display_species(entry) + " (p/pc " +
              display_number(pressure / critical, 2) + ")";
    } else if (pressure > kHighestUnknown) {
      unknown += (unknown.empty() ? "" : ", ") + display_species(entry);
    }
  }
  if (near.empty() && unknown.empty()) return;
  std::string text =
      "Gases are taken as ideal. At " + display_number(pressure / 1e5, 1) + " bar that is in doubt for ";
  text += near;
  if (!unknown.empty()) text += (near.empty() ? "" : "; ") + unknown + " (critical pressure not known)";
  ledger.cautions.push_back(text +
                            ": the departure of their enthalpy from the ideal gas is not in the figure.");
}

}  // namespace heatledger::balance
