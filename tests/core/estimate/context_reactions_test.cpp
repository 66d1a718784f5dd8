// Published process reactions by estimate alone: no row of any organic species of three or more heavy atoms
// takes part.
#include <algorithm>
#include <cmath>
#include <cstdio>
#include <sstream>

#include "core/base/number_text.hpp"
#include "tests/core/estimate/context_support.hpp"
#include "tests/core/support/test_files.hpp"

namespace heatledger::estimate {
namespace {

struct Outcome {
  double error = 0, u95 = 0;
  bool left_out = false;  ///< a species is estimated without its own rows
};

Outcome estimate(const std::string& terms, double known, double value) {
  std::vector<ContextMolecule> molecules;
  std::vector<double> coefficients;
  std::vector<bool> liquid;
  std::istringstream cells(terms);
  for (std::string cell; std::getline(cells, cell, ';');) {
    std::istringstream parts(cell);
    std::string coefficient, smiles, phase;
    parts >> coefficient >> smiles >> phase;
    molecules.push_back(molecule_of(smiles));
    coefficients.push_back(*parse_number(coefficient));
    liquid.push_back(phase == "l");
  }
  std::vector<ContextTerm> gas, vaporised;
  std::vector<const ContextMolecule*> leave;
  for (std::size_t i = 0; i < molecules.size(); ++i) {
    gas.push_back({coefficients[i], &molecules[i]});
    if (molecules[i].heavy_atoms >= 3) leave.push_back(&molecules[i]);
    if (liquid[i]) vaporised.push_back({-coefficients[i], &molecules[i]});
  }
  const ContextOptions options{.leave_out = leave};
  const Prediction formation = *ContextModel::embedded().predict(Property::GasFormation, gas, options);
  Prediction vaporisation;
  if (!vaporised.empty())
    vaporisation = *ContextModel::embedded().predict(Property::Vaporisation298, vaporised, options);
  return {(known + (formation.value + vaporisation.value) / 1000) - value,
          std::hypot(formation.u95, vaporisation.u95) / 1000, !leave.empty()};
}

/// The figures to reach, for a set of outcomes.
void judge(const char* set, const std::vector<Outcome>& outcomes) {
  std::vector<double> errors;
  double sum = 0;
  int covered = 0;
  for (const Outcome& outcome : outcomes) {
    errors.push_back(std::fabs(outcome.error));
    sum += errors.back();
    covered += errors.back() <= outcome.u95;
  }
  const double n = static_cast<double>(errors.size());
  std::sort(errors.begin(), errors.end());
  const double median = (errors[(errors.size() - 1) / 2] + errors[errors.size() / 2]) / 2;
  std::printf("%s, %zu reactions: mean %.2f, median %.2f kJ, 95 %% interval covers %.1f %%\n", set,
              errors.size(), sum / n, median, 100 * covered / n);
  EXPECT_LE(sum / n, 4.7) << set;
  EXPECT_LE(median, 2.3) << set;
  EXPECT_GE(covered / n, 0.92) << set;
  EXPECT_LE(covered / n, 0.98) << set;
}

TEST(ContextReactions, MeetTheirFiguresByEstimateAlone) {
  const test::Table table = test::read_table("tests/data/estimate/reactions.tsv");
  std::vector<Outcome> all, left_out;
  for (const auto& row : table.rows) {
    all.push_back(estimate(row[4], *parse_number(row[3]), *parse_number(row[2])));
    if (all.back().left_out) left_out.push_back(all.back());
    if (std::fabs(all.back().error) > all.back().u95)
      std::printf("outside: %s, error %.1f ± %.1f\n", row[0].c_str(), all.back().error, all.back().u95);
  }
  EXPECT_EQ(all.size(), 68u);
  EXPECT_EQ(left_out.size(), 55u);
  judge("all", all);
  judge("with a species left out", left_out);
}

}  // namespace
}  // namespace heatledger::estimate
