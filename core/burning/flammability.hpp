// Lower flammability limit of a gas from its heat of combustion, mixed and carried to its temperature.
#pragma once

#include "core/burning/burn.hpp"

namespace heatledger::burning {

/// Of one gas in air at 25 °C, as a share of the volume.
/// @param net  heat of combustion [J/mol] > 0
/// @source M. J. Burgess, R. V. Wheeler, J. Chem. Soc. Trans. 99 (1911) 2013: LFL in per cent times the net
/// heat
///         in kcal/mol is about 1050
double burgess_wheeler(double net);

/// Fills lfl, lfl_at and lfl_typed of a gaseous stream: limits of its burnable gases by Le Chatelier's rule,
/// or the typed figure, then the correction to its temperature. Inerts and oxygen of the stream itself count
/// in its concentration only.
/// @param typed  of what burns in it, 25 °C, 0 .. 1
/// @source H. Le Chatelier, Ann. Mines 19 (1891) 388; temperature: M. G. Zabetakis, Bulletin 627, US Bureau
/// of
///         Mines, 1965: LFL(T) = LFL(25 °C) (1 − 0.000721 (T − 25 °C))
void flammability(const Stream& stream, const step::Blank& typed, FuelNumbers& fuel);

}  // namespace heatledger::burning
