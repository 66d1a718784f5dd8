#include "core/balance/figures.hpp"

#include <utility>

#include "core/balance/context_rows.hpp"
#include "core/thermo/estimated.hpp"

namespace heatledger::balance {
namespace {

using molecule::Phase;
using uncertainty::Quantity;

std::optional<Quantity> value_of(Result<thermo::Sourced> result) {
  if (!result.ok()) return std::nullopt;
  return std::move(result->value);
}

void add_to(std::optional<Quantity>& sum, const std::optional<Quantity>& part, double factor) {
  if (!sum) return;
  if (part) {
    sum->add(*part, factor);
  } else {
    sum.reset();
  }
}

/// Elements and what the model does not cover keep their table value; the rest is estimated as gas and
/// brought into its phase.
void add_context(const facts::Species& species, const estimate::Observations* observations,
                 SpeciesFigures& figures) {
  const bool element = species.compound != nullptr && species.compound->reference_element;
  if (!element && figures.by_bonds) {
    const Result<thermo::Sourced> gas = thermo::estimated_formation(species, Phase::Gas, observations);
    figures.in_context = gas.ok();
    figures.context_row = figures.context = value_of(gas);
  }
  if (!figures.in_context) {
    figures.context = figures.formation;
    figures.context_row = figures.formation_row;
  } else if (figures.corrected) {
    add_to(figures.context, figures.to_phase, 1);
  }
  if (!figures.context_row) return;
  const std::optional<double> atoms = gas_atoms_in_context(species);
  if (!atoms) return;
  figures.context_sum.emplace(*atoms);
  figures.context_sum->add(*figures.context_row, -1);
}

}  // namespace

SpeciesFigures species_figures(const facts::Species& species, const molecule::Term& written,
                               ContextUse context, const estimate::Observations* observations) {
  const bool may_estimate = context != ContextUse::Never;
  const auto formation_of = [&](Phase phase) {
    return may_estimate ? thermo::best_formation(species, phase, written.strength, observations)
                        : thermo::tabulated_formation(species, phase, written.strength);
  };
  SpeciesFigures figures;
  const Phase phase = figures.phase = thermo::phase_taken(species, written.phase).phase;
  Result<thermo::Sourced> formation = formation_of(phase);
  figures.formation_estimated = formation.ok() && formation->route == "estimate";
  figures.formation_source = formation.ok() ? std::move(formation->source) : formation.error().message;
  figures.formation = value_of(std::move(formation));
  figures.by_bonds = reachable_by_bonds(species, phase);
  figures.corrected = figures.by_bonds && phase != Phase::Gas;
  if (figures.corrected) {
    figures.to_phase =
        value_of(may_estimate ? thermo::best_gas_to_phase(species, phase, written.strength, observations)
                              : thermo::gas_to_phase(species, phase, written.strength));
    figures.formation_row = value_of(formation_of(Phase::Gas));
  } else {
    figures.formation_row = figures.formation;
  }
  if (context == ContextUse::Always) add_context(species, observations, figures);
  return figures;
}

BondSums bond_sums(const std::vector<Entry>& entries) {
  BondSums sums;
  sums.broken.emplace();
  sums.formed.emplace();
  for (const Entry& entry : entries)
    add_to(entry.product ? sums.formed : sums.broken, entry.priced->per_mole, entry.coefficient);
  if (!sums.broken || !sums.formed) return sums;
  sums.gas_298 = sums.broken;
  sums.gas_298->add(*sums.formed, -1);
  sums.as_written = sums.gas_298;
  for (const Entry& entry : entries) {
    if (entry.figures->corrected)
      add_to(sums.as_written, entry.figures->to_phase, entry.signed_coefficient());
  }
  return sums;
}

OtherSums other_sums(const std::vector<Entry>& entries) {
  OtherSums sums;
  sums.formation_gas_298.emplace();
  sums.formation_as_written.emplace();
  sums.context_broken.emplace();
  sums.context_formed.emplace();
  sums.context_gas_298.emplace();
  sums.context_as_written.emplace();
  for (const Entry& entry : entries) {
    add_to(sums.formation_gas_298, entry.figures->formation_row, entry.signed_coefficient());
    add_to(sums.formation_as_written, entry.figures->formation, entry.signed_coefficient());
    add_to(entry.product ? sums.context_formed : sums.context_broken, entry.figures->context_sum,
           entry.coefficient);
    add_to(sums.context_gas_298, entry.figures->context_row, entry.signed_coefficient());
    add_to(sums.context_as_written, entry.figures->context, entry.signed_coefficient());
  }
  return sums;
}

}  // namespace heatledger::balance
