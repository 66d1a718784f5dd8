// The arithmetic of a ledger without its texts: shared by make_ledger and by the quick tally, so that both
// give the same digits.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "core/balance/rows.hpp"

namespace heatledger::balance {

/// Figures of one species in one phase that depend neither on the reaction it stands in nor on the bond set;
/// per mole.
struct SpeciesFigures {
  molecule::Phase phase = molecule::Phase::Gas;  ///< phase reckoned with
  bool by_bonds = false;                         ///< its structure can be taken apart bond by bond
  bool corrected = false;                        ///< the phase written is not the one its bond sum belongs to
  std::optional<uncertainty::Quantity> to_phase;   ///< gas to the phase written [J/mol]; empty: no data
  std::optional<uncertainty::Quantity> formation;  ///< ΔfH in the phase taken [J/mol]
  std::optional<uncertainty::Quantity>
      formation_row;                 ///< ΔfH in the phase that the bond sum belongs to [J/mol]
  std::string formation_source;      ///< of `formation`; why there is none where it is empty
  bool formation_estimated = false;  ///< no table has `formation`: bonds in context
  std::optional<uncertainty::Quantity> context,
      context_row;  ///< as `formation`, by bonds in context (ContextUse::Always)
  std::optional<uncertainty::Quantity>
      context_sum;          ///< gas atoms minus `context_row`: the row of a ledger in context
  bool in_context = false;  ///< `context_row` is an estimate; else a table or the zero of an element
};

/// @param observations  measurements that sharpen the estimates; null: none
SpeciesFigures species_figures(const facts::Species& species, const molecule::Term& written,
                               ContextUse context, const estimate::Observations* observations = nullptr);

/// One species of an equation with its figures.
struct Entry {
  double coefficient = 1;
  bool product = false;
  const SpeciesFigures* figures = nullptr;
  const PricedSpecies* priced = nullptr;  ///< by the bond set of the ledger

  double signed_coefficient() const { return product ? coefficient : -coefficient; }
};

/// Sums over an equation as written [J] by average bonds; each empty as soon as one species lacks its figure.
struct BondSums {
  std::optional<uncertainty::Quantity> broken, formed, gas_298, as_written;
};
BondSums bond_sums(const std::vector<Entry>& entries);

/// The sums that no bond set changes.
struct OtherSums {
  std::optional<uncertainty::Quantity> formation_gas_298, formation_as_written;
  std::optional<uncertainty::Quantity> context_broken, context_formed;
  std::optional<uncertainty::Quantity> context_gas_298, context_as_written;
};
OtherSums other_sums(const std::vector<Entry>& entries);

}  // namespace heatledger::balance
