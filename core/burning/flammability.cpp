#include "core/burning/flammability.hpp"

#include <algorithm>

#include "core/burning/calorific.hpp"
#include "core/units/constants.hpp"

namespace heatledger::burning {

double burgess_wheeler(double net) {
  return 1050 / (net / 1000 / units::kCalorie) / 100;
}

void flammability(const Stream& stream, const step::Blank& typed, FuelNumbers& fuel) {
  if (!fuel.gas || fuel.by_mass) return;
  if (typed) {
    fuel.lfl = typed->value;
    fuel.lfl_typed = true;
  } else {
    double burning = 0, sum = 0;
    for (const Part& part : stream.parts) {
      if (oxygen_demand(part.atoms) <= 0) continue;
      Stream alone;
      alone.parts = {part};
      alone.parts.front().moles = 1;
      const double net = heat_of_burning(alone, units::kReferenceTemperature, ProductOffsets{}).net;
      if (net <= 0) return;
      burning += part.moles;
      sum += part.moles / burgess_wheeler(net);
    }
    if (sum <= 0) return;
    fuel.lfl = burning / sum;
  }
  // The line reaches zero at 1400 °C, far above what it was drawn for.
  fuel.lfl_at =
      fuel.lfl * std::max(1 - 0.000721 * (stream.temperature.value - units::kReferenceTemperature), 0.1);
}

}  // namespace heatledger::burning
