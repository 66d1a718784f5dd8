// The kept accuracy.txt against the model as shipped. Formation, liquid and gas are recomputed in full;
// vaporisation, the longest, too: all of it takes some seconds.
#include "core/estimate/context_report.hpp"

#include <gtest/gtest.h>

#include "core/estimate/context_accuracy.hpp"
#include "tests/core/support/test_files.hpp"

namespace heatledger::estimate {
namespace {

TEST(ContextAccuracy, IsWhatTheKeptTextSays) {
  EXPECT_EQ(accuracy_report(), test::read_source_file("core/estimate/accuracy.txt"))
      << "Run `heatledger_refit accuracy > core/estimate/accuracy.txt` after a change of model or table and "
         "look at it.";
}

TEST(ContextAccuracy, MeetsItsFigures) {
  const FittedProperty& fitted = embedded_fit(FitKind::Formation);
  const std::vector<AccuracyLine> lines =
      accuracy_table(fitted, FitKind::Formation, leave_each_out(fitted, FitKind::Formation, 0));
  const AccuracyLine& organic = lines.at(2);
  ASSERT_EQ(organic.set, "trusted, organic");
  EXPECT_LE(organic.median, 2.3);
  EXPECT_LE(organic.mean, 6.3);
  EXPECT_GE(organic.cover95, 0.93);
  EXPECT_LE(organic.cover95, 0.97);
}

}  // namespace
}  // namespace heatledger::estimate
