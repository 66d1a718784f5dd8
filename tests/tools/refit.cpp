// heatledger_refit: the development command of the model of bonds in context. Run without arguments for its
// uses.
#include <cstdio>
#include <cstdlib>
#include <cstring>
#include <string>

#include "core/base/number_text.hpp"
#include "core/estimate/bond_calibration.hpp"
#include "core/estimate/context_accuracy.hpp"
#include "core/estimate/context_report.hpp"
#include "core/estimate/context_robust.hpp"

namespace {

using namespace heatledger::estimate;

int usage() {
  std::fputs(
      "heatledger_refit accuracy        fit all properties, leave each compound out, print the tables of "
      "accuracy.txt\n"
      "heatledger_refit folds N         the same by N folds with a refit each\n"
      "heatledger_refit bonds           ± of average bonds: prints "
      "core/estimate/tables/bond_spread_factors.tsv\n"
      "heatledger_refit weights         row weights iterated anew: compound, property, weight\n"
      "heatledger_refit worst N         the N rows furthest from their prediction, in units of its spread\n"
      "All read the tables that are compiled in: change core/estimate/tables/, build, run again.\n",
      stderr);
  return 2;
}

int print_weights() {
  const struct {
    FitKind kind;
    const char* name;
  } fits[] = {{FitKind::Formation, "formation"},
              {FitKind::Vaporisation, "vaporisation"},
              {FitKind::Liquid, "liquid"},
              {FitKind::Gas298, "gas at 298.15 K"},
              {FitKind::GasAbove, "gas above"}};
  for (const auto& fit : fits) {
    const FittedProperty& fitted = embedded_fit(fit.kind);
    const std::vector<double> weights = robust_weights(fit.kind, fitted.figures, fitted.temperatures, 6);
    for (std::size_t i = 0; i < weights.size(); ++i) {
      const TrainingCompound& compound = training_compounds()[fitted.figures[i].compound];
      std::printf("%.*s\t%s\t%s\n", static_cast<int>(compound.smiles.size()), compound.smiles.data(),
                  fit.name, heatledger::machine_number(weights[i], 3).c_str());
    }
  }
  return 0;
}

}  // namespace

int main(int argc, char** argv) {
  const std::string what = argc > 1 ? argv[1] : "";
  const int number = argc > 2 ? std::atoi(argv[2]) : 0;
  if (what == "accuracy") {
    std::fputs(accuracy_report().c_str(), stdout);
  } else if (what == "folds" && number >= 2) {
    std::fputs(folds_report(static_cast<unsigned>(number)).c_str(), stdout);
  } else if (what == "bonds") {
    std::fputs(bond_spread_table().c_str(), stdout);
  } else if (what == "weights") {
    return print_weights();
  } else if (what == "worst" && number > 0) {
    std::fputs(worst_report(static_cast<std::size_t>(number)).c_str(), stdout);
  } else {
    return usage();
  }
  return 0;
}
