#include "core/document/dosed_reading.hpp"

#include <gtest/gtest.h>

#include <cmath>

#include "core/balance/ledger.hpp"
#include "core/document/step_kinds.hpp"
#include "core/document/typed_species.hpp"

namespace heatledger::document {
namespace {

/// A dosed charge whose heat is typed, worked out from its texts.
class DosedReadingTest : public testing::Test {
 protected:
  DosedReadingTest() {
    sheet_.id = "s1";
    sheet_.kind = "dosed charge";
    feed("vessel", "", "40 °C", {{"methanol(l)", "400 kg"}});
    feed("anhydride", "dosed", "20 °C", {{"acetic anhydride(l)", "500 kg"}});
    ProgressSheet progress;
    progress.reaction = "r1";
    progress.heat = "-62 ± 3 kJ/mol";
    progress.rate_constant = "3e-5 L/(mol s)";
    progress.rate_at = "40 °C";
    progress.activation = "70 kJ/mol";
    sheet_.reactions.push_back(progress);
    sheet_.blanks["dosing.time"] = "2 h";
    sheet_.blanks["density"] = "920 kg/m3";
    Result<balance::Reaction> reaction = balance::read_reaction(
        "acetic anhydride(l) + methanol(l) -> methyl acetate(l) + acetic acid(l)", library_);
    EXPECT_TRUE(reaction.ok());
    auto ledger = std::make_shared<balance::Ledger>();
    ledger->reaction = std::make_shared<const balance::Reaction>(std::move(reaction).value());
    ledger_ = ledger;
  }

  void feed(const char* name, const char* role, const char* at,
            const std::vector<std::pair<const char*, const char*>>& rows) {
    FeedSheet one;
    one.name = name;
    one.role = role;
    one.at = at;
    for (const auto& row : rows) {
      FeedRow typed;
      typed.species = row.first;
      typed.amount = row.second;
      one.rows.push_back(typed);
    }
    sheet_.feeds.push_back(one);
  }

  StepOutcome computed() {
    StepContext c;
    c.species = &library_;
    c.names = &names_;
    c.ledger = [this](const std::string& id) {
      return id == "r1" ? ledger_ : std::shared_ptr<const balance::Ledger>();
    };
    c.above = [](const std::string&) -> const step::StepResult* { return nullptr; };
    StepOutcome outcome;
    compute_dosed(sheet_, c, lookups_, outcome);
    return outcome;
  }
  /// Code and place of the first error.
  std::string refused() {
    const StepOutcome outcome = computed();
    EXPECT_EQ(outcome.findings, nullptr);
    return outcome.errors.empty() ? "nothing"
                                  : outcome.errors[0].code + " " +
                                        outcome.errors[0].where.substr(0, outcome.errors[0].where.find(','));
  }
  static const step::Finding* finding(const StepOutcome& outcome, const std::string& id) {
    for (const step::FindingGroup& group : outcome.findings->groups) {
      for (const step::Finding& each : group.findings) {
        if (each.id == id) return &each;
      }
    }
    return nullptr;
  }
  double value(const StepOutcome& outcome, const std::string& id) {
    const step::Finding* found = finding(outcome, id);
    EXPECT_NE(found, nullptr) << id;
    return found == nullptr ? 0 : found->value.value();
  }

  TypedFigures typed_;
  units::NamedFigures names_;
  SheetLibrary library_{typed_};
  std::shared_ptr<const balance::Ledger> ledger_;
  step::Lookups lookups_;
  StepSheet sheet_;
};

TEST_F(DosedReadingTest, BalanceOverTheCourseClosesWithTheCoolingThatWasAskedFor) {
  const StepOutcome outcome = computed();
  for (const Error& error : outcome.errors) ADD_FAILURE() << error.where << ": " << error.message;
  ASSERT_NE(outcome.findings, nullptr);
  ASSERT_NE(outcome.result, nullptr);
  EXPECT_TRUE(outcome.findings->closes);
  EXPECT_TRUE(outcome.result->closure.heat_closes);
  EXPECT_TRUE(outcome.result->closure.elements_close);
  // Two ways to one figure: the balance of streams at the extents reached, and the course in time.
  const double by_time = -value(outcome, "heat") + value(outcome, "cold_feed");
  EXPECT_NEAR(outcome.result->duty, by_time, 1e-7 * std::fabs(by_time));
}

TEST_F(DosedReadingTest, OrdersDecideTheUnitOfTheRateConstant) {
  const double first = value(computed(), "accumulation");
  sheet_.reactions[0].orders = "1 in methanol, 1 in acetic anhydride";
  EXPECT_NEAR(value(computed(), "accumulation"), first, 1e-9);  // the factors in another order
  // The same rate constant in other units.
  sheet_.reactions[0].rate_constant = "1.8e-3 L/(mol min)";
  EXPECT_NEAR(value(computed(), "accumulation"), first, 1e-6);
  sheet_.reactions[0].orders = "1 in acetic anhydride";
  EXPECT_EQ(refused(), "unit.dimension reactions[0].rate_constant");
  sheet_.reactions[0].rate_constant = "4 1/h";
  EXPECT_GT(value(computed(), "accumulation"), 0);
  sheet_.reactions[0].orders = "0.5 in methanol, 1 in acetic anhydride";
  EXPECT_EQ(refused(), "unit.dimension reactions[0].rate_constant");
  sheet_.reactions[0].rate_constant = "1e-4 mol/(L s)";
  EXPECT_GT(value(computed(), "accumulation"), 0);
  sheet_.reactions[0].orders = "1 in toluene";
  EXPECT_EQ(refused(), "dosing.orders reactions[0].orders");
  sheet_.reactions[0].orders = "quick";
  EXPECT_EQ(refused(), "dosing.orders reactions[0].orders");
}

TEST_F(DosedReadingTest, KineticsDecideWhatIsSaidOfAFailure) {
  sheet_.reactions[0].rate_constant = "as fast as dosed";
  const StepOutcome fast = computed();
  EXPECT_NEAR(value(fast, "accumulation"), 0, 1e-12);  // what rounding leaves
  EXPECT_NEAR(value(fast, "mtsr"), 313.15, 1e-9);
  sheet_.reactions[0].rate_constant = "";
  const StepOutcome unknown = computed();
  EXPECT_EQ(finding(unknown, "mtsr"), nullptr);
  EXPECT_FALSE(finding(unknown, "peak_cooling")->why_missing.empty());
  EXPECT_GT(value(unknown, "all_at_once"), 330);
}

TEST_F(DosedReadingTest, ClassOfTheFailureNeedsBothLimits) {
  EXPECT_EQ(finding(computed(), "criticality")->text, "class needs T_D24");
  sheet_.blanks["td24"] = "210 °C";
  sheet_.blanks["td24_source"] = "calorimetry, 3 g";
  sheet_.blanks["technical_limit"] = "190 °C";
  const StepOutcome outcome = computed();
  EXPECT_EQ(finding(outcome, "criticality")->text, "class 1");
  EXPECT_EQ(finding(outcome, "td24")->sources.front(), "calorimetry, 3 g");
}

TEST_F(DosedReadingTest, DilutionThatTheCourseLeavesOutIsCautioned) {
  const auto cautioned = [this] {
    const StepOutcome outcome = computed();
    EXPECT_NE(outcome.findings, nullptr);
    if (outcome.findings == nullptr) return false;
    bool found = false;
    for (const std::string& caution : outcome.findings->cautions)
      found = found || caution.find("Mixing and dilution set free") == 0;
    return found;
  };
  EXPECT_FALSE(cautioned());
  FeedRow water, acid;
  water.species = "water(l)";
  water.amount = "500 kg";
  acid.species = "H2SO4(aq, 96 wt%)";
  acid.amount = "200 kg";
  sheet_.feeds[0].rows.push_back(water);
  sheet_.feeds[1].rows.push_back(acid);
  sheet_.reactions[0].includes = "no";
  EXPECT_TRUE(cautioned());
  sheet_.reactions[0].includes = "yes";
  EXPECT_FALSE(cautioned());
}

TEST_F(DosedReadingTest, ProfileGoesBeforeTheDosingTime) {
  sheet_.reactions[0].rate_constant = "as fast as dosed";
  const double even = value(computed(), "peak_heat");
  // Half of it in a quarter of the time: twice the rate.
  sheet_.profile = {{"30 min", "50 %", ""}, {"2 h", "100 %", ""}};
  EXPECT_NEAR(value(computed(), "peak_heat"), 2 * even, 1e-6 * even);
  sheet_.profile[1].amount = "40 %";
  EXPECT_EQ(refused(), "dosing.profile profile[0].time");
  sheet_.profile[1].amount = "";
  EXPECT_EQ(refused(), "step.blank profile[1].amount");
}

TEST_F(DosedReadingTest, RefusesWhatIsNotUnderstood) {
  sheet_.blanks["thermal"] = "in the snow";
  EXPECT_EQ(refused(), "dosing.thermal blanks.thermal");
  sheet_.blanks["thermal"] = "jacket";
  EXPECT_EQ(refused(), "dosing.no_jacket blanks.jacket.temperature");
  sheet_.blanks["jacket.temperature"] = "5 °C";
  EXPECT_EQ(refused(), "dosing.no_jacket jacket.ua_start");
  sheet_.blanks["jacket.ua_start"] = "-2 kW/K";
  EXPECT_EQ(refused(), "step.out_of_range blanks.jacket.ua_start");
  sheet_.blanks.erase("thermal");
  sheet_.blanks.erase("jacket.temperature");
  sheet_.blanks.erase("jacket.ua_start");
  sheet_.blanks.erase("dosing.time");
  EXPECT_EQ(refused(), "dosing.no_time dosing.time");
  sheet_.blanks["dosing.time"] = "2 kg";
  EXPECT_EQ(refused(), "unit.dimension blanks.dosing.time");
  sheet_.blanks["dosing.time"] = "2 h";
  sheet_.feeds[1].role.clear();
  EXPECT_EQ(refused(), "dosing.nothing_dosed feeds");
  sheet_.feeds[1].role = "dosed";
  sheet_.feeds[1].at.clear();
  EXPECT_EQ(refused(), "step.blank feed.1.temperature");
}

}  // namespace
}  // namespace heatledger::document
