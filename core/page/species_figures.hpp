// The figures of one compound as `species` states them: the best that tables or an estimate give, each with
// its route and source, or the reason why there is none.
#pragma once

#include <memory>
#include <optional>
#include <string>
#include <vector>

#include "core/facts/resolve.hpp"
#include "core/uncertainty/quantity.hpp"

namespace heatledger::page {

/// One figure, SI; empty with the reason.
struct StatedFigure {
  std::optional<uncertainty::Figure> figure;
  std::string route;  ///< "table", "average", "context"
  std::string source;
  std::string reason;  ///< why there is no figure
};

struct HeatCapacityAt {
  double temperature = 0;  ///< [K]
  StatedFigure figure;     ///< [J/(mol K)]
};

struct SpeciesFigures {
  std::shared_ptr<const facts::Species> species;
  StatedFigure gas_formation, vaporisation_298, liquid_formation;  ///< [J/mol]
  StatedFigure solid_formation;                                    ///< [J/mol]
  std::vector<HeatCapacityAt> cp_gas;  ///< at 298.15, 400, 500, 600, 800, 1000, 1500 K
  StatedFigure cp_liquid_298;          ///< [J/(mol K)]
  std::optional<StatedFigure>
      average_gas_formation;  ///< by the average bond set, beside what a table says [J/mol]
  std::vector<std::string> notes, cautions;
};

/// @param estimate_only  every tabulated value of this very compound is left aside
SpeciesFigures species_figures(std::shared_ptr<const facts::Species> species, bool estimate_only);

}  // namespace heatledger::page
