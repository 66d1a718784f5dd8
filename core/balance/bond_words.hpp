// Bonds and figures in words for ledger lines and working.
#pragma once

#include <string>

#include "core/molecule/bonds.hpp"
#include "core/uncertainty/quantity.hpp"

namespace heatledger::balance {

/// A bond as engineers write it: "C–H", "O–H", "C≡N", "C=O of CO₂", "C–C in aromatic ring".
std::string bond_label(const molecule::BondType& type);

/// [J] as kJ for a ledger: whole where it is whole to 0.05, else one decimal ("6 225", "−518.3").
std::string ledger_kj(double joules);
/// [J] as kJ with two digits behind the point, signed: formation enthalpies and corrections.
std::string fine_kj(double joules);
/// "−518 ± 62 kJ": value and ± to the same decimal, as the ± allows.
std::string kj_with_u95(const uncertainty::Quantity& quantity, const std::string& unit);
/// A coefficient: "3", "0.5".
std::string times_text(double coefficient);

}  // namespace heatledger::balance
