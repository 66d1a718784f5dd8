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

Correction to_temperature(const Ledger& ledger, std::size_t index, double temperature,
                          std::vector<std::string>& cautions) {
  const ReactionSpecies& entry = ledger.reaction->species[index];
  Correction correction;
  correction.species = index;
  correction.times = entry.coefficient();
  correction.what = display_species(entry) + (entry.product ? ", 25 °C to " + celsius(temperature)
                                                            : ", " + celsius(temperature) + " to 25 °C");
  if (correction.times != 1) correction.what += ", " + times_text(correction.times) + " ×";
  const Result<thermo::Sourced> change =
      thermo::enthalpy_increment(*entry.species, ledger.rows[index].phase, temperature);
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

void run_at_temperatures(Ledger& ledger, const LedgerOptions& options) {
  const Route* taken = find_route(ledger, ledger.taken);
  if (taken != nullptr) ledger.as_run = taken->as_written;
  for (std::size_t i = 0; i < ledger.rows.size(); ++i) {
    const std::optional<double>& at =
        ledger.reaction->species[i].product ? options.products_at : options.reactants_at;
    if (!at || *at == units::kReferenceTemperature) continue;
    Correction correction = to_temperature(ledger, i, *at, ledger.cautions);
    if (!correction.value) {
      ledger.as_run.reset();
      ledger.notes.push_back("Not corrected to temperature: " + correction.why_not);
    } else if (ledger.as_run) {
      ledger.as_run->add(*correction.value);
    }
    ledger.to_temperature.push_back(std::move(correction));
  }
}

}  // namespace heatledger::balance
