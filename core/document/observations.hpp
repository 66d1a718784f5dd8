// What was measured on a sheet as observations of the estimating model: they sharpen every related estimate.
#pragma once

#include <memory>
#include <string>
#include <vector>

#include "core/balance/ledger.hpp"
#include "core/document/typed_species.hpp"

namespace heatledger::document {

/// Observations of species whose figures are typed with a ±, in the order of the sheet.
std::vector<estimate::Measurement> observations_of(SheetLibrary& library);

/// Makes the observations of a sheet, the same object for the same measurements, so that results can be told
/// apart by it and what was taken out and put back costs nothing.
class ObservationStore {
 public:
  /// @return null when the list is empty
  std::shared_ptr<const estimate::Observations> of(const std::vector<estimate::Measurement>& list);

 private:
  struct Kept {
    std::string signature;
    std::shared_ptr<const estimate::Observations> observations;
  };
  std::vector<Kept> kept_;  ///< latest last
};

}  // namespace heatledger::document
