#include "core/balance/figures.hpp"

namespace heatledger::balance {
namespace {

using molecule::Phase;
using uncertainty::Quantity;

std::optional<Quantity> value_of(const Result<thermo::Sourced>& result) {
  if (!result.ok()) return std::nullopt;
  return result->value;
}

void add_to(std::optional<Quantity>& sum, const std::optional<Quantity>& part, double factor) {
  if (!sum) return;
  if (part) {
    sum->add(*part, factor);
  } else {
    sum.reset();
  }
}

}  // namespace

SpeciesFigures species_figures(const facts::Species& species, const molecule::Term& written, const estimate::BondSet& set) {
  SpeciesFigures figures;
  figures.priced = price_species(species, written, set);
  const Phase phase = figures.priced.phase;
  figures.formation = value_of(thermo::tabulated_formation(species, phase, written.strength));
  const bool by_bonds = figures.priced.route == RowRoute::Bonds || !figures.priced.missing.empty();
  figures.corrected = by_bonds && phase != Phase::Gas;
  if (!figures.corrected) {
    figures.formation_row = figures.formation;
    return figures;
  }
  figures.to_phase = value_of(thermo::gas_to_phase(species, phase, written.strength));
  figures.formation_row = value_of(thermo::tabulated_formation(species, Phase::Gas));
  return figures;
}

EquationFigures add_up(const std::vector<Entry>& entries) {
  EquationFigures sums;
  sums.broken.emplace();
  sums.formed.emplace();
  sums.formation_gas_298.emplace();
  sums.formation_as_written.emplace();
  for (const Entry& entry : entries) {
    add_to(entry.product ? sums.formed : sums.broken, entry.figures->priced.per_mole, entry.coefficient);
    add_to(sums.formation_gas_298, entry.figures->formation_row, entry.signed_coefficient());
    add_to(sums.formation_as_written, entry.figures->formation, entry.signed_coefficient());
  }
  if (!sums.broken || !sums.formed) return sums;
  sums.gas_298 = sums.broken;
  sums.gas_298->add(*sums.formed, -1);
  sums.as_written = sums.gas_298;
  for (const Entry& entry : entries) {
    if (entry.figures->corrected) add_to(sums.as_written, entry.figures->to_phase, entry.signed_coefficient());
  }
  return sums;
}

}  // namespace heatledger::balance
