// --site: a site table beside one equation and beside a worksheet.
#include <gtest/gtest.h>

#include <nlohmann/json.hpp>

#include "core/page/session.hpp"
#include "run.hpp"

namespace heatledger::test {
namespace {

using nlohmann::json;

constexpr const char* kHydrogenation = "nitrobenzene(l) + 3 H2(g) -> aniline(l) + 2 H2O(l)";
constexpr const char* kTable = R"json({
  "format": "heatledger-site-table", "version": 1, "name": "Harbour Works",
  "species": [{"species": "aniline", "figure": "formation_liquid", "value": "33 ± 1 kJ/mol"}],
  "bonds": [{"bond": "H-H", "value": "440 ± 1 kJ/mol"}],
  "heats": [{"equation": "6 H2(g) + 2 C6H5NO2(l) -> 4 water(l) + 2 aniline(l)", "value": "-1090 ± 8 kJ"}]
})json";

TEST(Site, ItsFiguresGoBeforeThePublishedOnesInATally) {
  const TemporaryFolder folder;
  write_whole(folder / "site.json", kTable);
  const auto answer = [&](bool site) {
    std::vector<std::string> arguments{"tally", kHydrogenation, "--json"};
    if (site) arguments.insert(arguments.end(), {"--site", folder / "site.json"});
    const Ran ran = heatledger(arguments);
    EXPECT_EQ(ran.status, 0) << ran.err;
    return json::parse(ran.out, nullptr, false);
  };
  const json published = answer(false), of_site = answer(true);
  const auto formation = [](const json& one) { return one["routes"]["formation"]["value"].get<double>(); };
  // Aniline(l) of the CRC Handbook is 31.6 kJ/mol: 1.4 kJ less exothermic with 33.
  EXPECT_NEAR(formation(of_site) - formation(published), 1.4, 0.05);
  // Three H–H at 440 instead of 432 kJ/mol (Zumdahl).
  EXPECT_NEAR(of_site["gas_298"]["value"].get<double>() - published["gas_298"]["value"].get<double>(), 24,
              1e-6);
}

TEST(Site, ItsRowsAreCopiedIntoAWorksheet) {
  const TemporaryFolder folder;
  write_whole(folder / "site.json", kTable);
  page::Session session;
  ASSERT_TRUE(session.edit("r1.equation", kHydrogenation).ok());
  write_whole(folder / "s.heatledger.json", session.save());
  const Ran ran = heatledger({"work", folder / "s.heatledger.json", "--site", folder / "site.json"});
  const Ran report = heatledger(
      {"work", folder / "s.heatledger.json", "--site", folder / "site.json", "--html", folder / "r.html"});
  ASSERT_EQ(ran.status, 0) << ran.err;
  EXPECT_NE(ran.out.find("Taken here, by the measured heat"), std::string::npos);
  EXPECT_NE(ran.out.find("−545"),
            std::string::npos);  // half of the site's −1090, its equation written twofold
  ASSERT_EQ(report.status, 0) << report.err;
  EXPECT_NE(read_whole(folder / "r.html").find("site table Harbour Works"), std::string::npos);
}

TEST(Site, WhatCannotBeReadIsNamedWithItsFile) {
  const TemporaryFolder folder;
  page::Session session;
  ASSERT_TRUE(session.edit("r1.equation", kHydrogenation).ok());
  write_whole(folder / "s.heatledger.json", session.save());
  write_whole(folder / "bad.json", "{\"format\": ");
  for (const std::vector<std::string>& command :
       {std::vector<std::string>{"tally", kHydrogenation}, {"work", folder / "s.heatledger.json"}}) {
    std::vector<std::string> bad = command, missing = command;
    bad.insert(bad.end(), {"--site", folder / "bad.json"});
    missing.insert(missing.end(), {"--site", folder / "none.json"});
    const Ran unread = heatledger(bad), absent = heatledger(missing);
    EXPECT_EQ(unread.status, 1) << command[0];
    EXPECT_NE(unread.err.find("cut short"), std::string::npos) << unread.err;
    EXPECT_EQ(absent.status, 1) << command[0];
    EXPECT_NE(absent.err.find("none.json"), std::string::npos) << absent.err;
  }
}

}  // namespace
}  // namespace heatledger::test
