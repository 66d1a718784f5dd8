// Rows of a ledger by bonds in context: every bond with its surroundings, rings and neighbours on lines of
// their own, so that the lines add up to the estimate.
#pragma once

#include "core/balance/figures.hpp"

namespace heatledger::balance {

/// Formation enthalpy of the free gas atoms of one mole [J/mol], as every row of a ledger in context takes
/// it: the model's own value of an element where it has one. Empty without a composition or an atom's figure.
std::optional<double> gas_atoms_in_context(const facts::Species& species);

/// An estimate taken apart, with the compounds of the table that carry it.
/// @param observations  null: none
/// @errors those of estimate::explain, thermo.no_estimate without a structure
Result<estimate::Explanation> explain_in_context(const facts::Species& species,
                                                 const estimate::Observations* observations);

/// One row of a ledger in context. What the model does not cover enters by its formation enthalpy and says
/// so.
LedgerRow describe_context_row(const ReactionSpecies& entry, std::size_t index, const SpeciesFigures& figures,
                               const estimate::Observations* observations);

/// "C–O bonds", the element pair of a line; empty for a line that stands on no bond.
std::string element_pair(const estimate::ContextLine& line);
std::string element_pair(const molecule::BondType& type);

}  // namespace heatledger::balance
