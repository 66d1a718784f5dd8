// Measurements of the user laid over the fitted model: each is one more observation, sharpens every related
// estimate at once and leaves no trace when taken out.
#pragma once

#include <cstdint>
#include <memory>
#include <span>
#include <string>
#include <vector>

#include "core/base/result.hpp"
#include "core/estimate/context_model.hpp"
#include "core/estimate/context_settings.hpp"

namespace heatledger::estimate {

/// A measured property of a species, or of a whole reaction: Σ coefficient × property = value ± u95.
struct Measurement {
  Property property = Property::GasFormation;
  struct Term {
    double coefficient = 1;
    std::shared_ptr<const ContextMolecule> molecule;
  };
  std::vector<Term> terms;
  double value = 0;   ///< [J/mol] or [J/(mol K)]; for a reaction per mole as its coefficients say
  double u95 = 0;     ///< > 0, half width of the 95 % interval of the measurement itself
  std::string label;  ///< what the sheet calls it
};

/// A value: copies are independent, equal lists give equal digits whatever came and went before.
class Observations {
 public:
  Observations();
  Observations(const Observations& other);
  Observations& operator=(const Observations& other);
  ~Observations();

  /// @errors estimate.measurement: no term, a value or ± that is not finite, ± of zero or less, or a gas heat
  /// capacity
  ///         (those have one figure per temperature and are typed on the sheet instead)
  Status add(Measurement measurement);
  /// @param index  < list().size()
  void remove(std::size_t index);
  const std::vector<Measurement>& list() const { return list_; }

 private:
  struct Prepared;
  friend const class Conditioning* observed_conditioning(const Observations&, FitKind);
  friend std::vector<struct MeasuredDirection> observed_directions(const Observations&, FitKind);
  std::vector<Measurement> list_;
  mutable std::unique_ptr<Prepared> prepared_;  ///< small factors, made when first needed
};

}  // namespace heatledger::estimate
