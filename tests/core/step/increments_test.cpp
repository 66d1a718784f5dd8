// Published enthalpy increments and heat capacities, asked of a whole step: one stream warmed or cooled.
#include <gtest/gtest.h>

#include "core/base/number_text.hpp"
#include "tests/core/step/steps.hpp"
#include "tests/core/support/test_files.hpp"

namespace heatledger::step {
namespace {

using molecule::Phase;

/// One mole a second of a gas from one temperature to another.
Result<StepResult> warmed(const std::string& name, const std::string& smiles, double from, double to) {
  Result<std::shared_ptr<const facts::Species>> species =
      facts::resolve_species(smiles.empty() ? name : smiles, !smiles.empty());
  if (!species.ok()) return species.error();
  StepInput input;
  SubstanceInput substance;
  substance.name = name;
  substance.species = *species;
  input.substances.push_back(substance);
  Feed feed;
  feed.name = "feed";
  feed.temperature = Typed{from, 0};
  FeedPart part;
  part.state.phase = Phase::Gas;
  part.figure = Typed{1, 0};
  feed.parts.push_back(part);
  input.feeds.push_back(feed);
  input.outlet.temperature = Typed{to, 0};
  return solve_step(std::move(input), test_steps::lookups());
}

TEST(Increments, AStepAsksForWhatTheTablesPrint) {
  const test::Table table = test::read_table("tests/data/checks/enthalpy_increments.tsv");
  int checked = 0;
  for (const auto& row : table.rows) {
    if (row[2] != "g") continue;
    const double t = *parse_number(row[3]), increment = *parse_number(row[4]),
                 tolerance = *parse_number(row[5]);
    const Result<StepResult> up = warmed(row[0], row[1], 298.15, t);
    ASSERT_TRUE(up.ok()) << row[0] << ": " << up.error().message;
    EXPECT_NEAR(up->duty / 1000, increment, tolerance) << row[0] << " to " << row[3] << " K, " << row[8];
    const Result<StepResult> down = warmed(row[0], row[1], t, 298.15);
    ASSERT_TRUE(down.ok());
    // The way back is the same sum with its sign turned: nothing but rounding.
    EXPECT_NEAR(down->duty, -up->duty, 1e-9 * up->duty);
    // Over two kelvin around t: the heat capacity of the same source, half a per cent of rounding on the way.
    const Result<StepResult> around = warmed(row[0], row[1], t - 1, t + 1);
    ASSERT_TRUE(around.ok());
    EXPECT_NEAR(around->duty / 2, *parse_number(row[6]), 0.005 * *parse_number(row[6])) << row[0];
    ++checked;
  }
  EXPECT_GE(checked, 100);
}

}  // namespace
}  // namespace heatledger::step
