// What the steps of a sheet have looked up in tables and estimate, kept between recomputations.
#pragma once

#include <map>
#include <memory>
#include <string>
#include <vector>

#include "core/step/curve.hpp"
#include "core/step/step_input.hpp"
#include "core/thermo/species_enthalpy.hpp"

namespace heatledger::step {

/// One species in one state, without what is typed on the sheet.
struct StateFacts {
  Result<Curve> curve;
  Result<thermo::Sourced> from_gas;   ///< h(25 °C) less that of the ideal gas [J/mol]
  Result<thermo::Sourced> formation;  ///< ΔfH(25 °C) [J/mol]
};

class Lookups {
 public:
  std::shared_ptr<const StateFacts> state(const std::shared_ptr<const facts::Species>& species,
                                          const State& state);
  std::shared_ptr<const Result<SaturationCurve>> saturation(
      const std::shared_ptr<const facts::Species>& species);

 private:
  template <typename T>
  struct Held {
    std::shared_ptr<const facts::Species> species;  ///< keeps the key's address from being used again
    std::shared_ptr<const T> facts;
  };
  std::map<std::string, Held<StateFacts>> states_;
  std::map<const facts::Species*, Held<Result<SaturationCurve>>> saturations_;
};

}  // namespace heatledger::step
