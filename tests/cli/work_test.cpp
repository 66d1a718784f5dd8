#include <gtest/gtest.h>

#include <filesystem>
#include <nlohmann/json.hpp>

#include "core/page/session.hpp"
#include "run.hpp"

namespace heatledger::test {
namespace {

/// A sheet with one reaction, written by the core itself.
std::string sheet_text(const std::string& equation) {
  page::Session session;
  EXPECT_TRUE(session.edit("r1.equation", equation).ok());
  EXPECT_TRUE(session.edit("header.title", "Hydrogenation of nitrobenzene").ok());
  EXPECT_TRUE(session.command("show_profile", {{"reaction", "r1"}, {"state", "on"}}).ok());
  return session.save();
}

constexpr const char* kHydrogenation = "nitrobenzene(l) + 3 H2 -> aniline(l) + 2 H2O(l)";

TEST(Work, PrintsTheSheet) {
  const TemporaryFolder folder;
  write_whole(folder / "s.heatledger.json", sheet_text(kHydrogenation));
  const Ran ran = heatledger({"work", folder / "s.heatledger.json"});
  EXPECT_EQ(ran.status, 0) << ran.err;
  for (const char* piece : {"Hydrogenation of nitrobenzene", "Sum of bonds", "As written"}) {
    EXPECT_NE(ran.out.find(piece), std::string::npos) << piece;
  }
  EXPECT_EQ(heatledger({"work", "-"}, read_whole(folder / "s.heatledger.json")).out, ran.out);
}

TEST(Work, WritesReportTablesAndDrawings) {
  const TemporaryFolder folder;
  write_whole(folder / "s.heatledger.json", sheet_text(kHydrogenation));
  const Ran ran = heatledger({"work", folder / "s.heatledger.json", "--html", folder / "r.html", "--csv",
                              folder / "t.csv", "--svg", folder / "drawings/new"});
  ASSERT_EQ(ran.status, 0) << ran.err;
  EXPECT_NE(read_whole(folder / "r.html").find("<html"), std::string::npos);
  EXPECT_NE(read_whole(folder / "t.csv").find("nitrobenzene"), std::string::npos);
  int drawings = 0;
  for (const auto& entry : std::filesystem::directory_iterator(folder / "drawings/new")) {
    EXPECT_EQ(entry.path().extension(), ".svg");
    EXPECT_NE(read_whole(entry.path().string()).find("<svg"), std::string::npos);
    ++drawings;
  }
  EXPECT_EQ(drawings, 2);  // profile and routes
  // Nothing half-written is left beside the files.
  for (const auto& entry : std::filesystem::directory_iterator(folder.path())) {
    const std::string name = entry.path().filename().string();
    EXPECT_TRUE(name == "s.heatledger.json" || name == "r.html" || name == "t.csv" || name == "drawings")
        << name;
  }
}

TEST(Work, WritesTheSheetAsMarkdown) {
  const TemporaryFolder folder;
  write_whole(folder / "s.heatledger.json", sheet_text(kHydrogenation));
  const Ran ran = heatledger({"work", folder / "s.heatledger.json", "--markdown", "-"});
  ASSERT_EQ(ran.status, 0) << ran.err;
  EXPECT_EQ(ran.out.compare(0, 31, "# Hydrogenation of nitrobenzene"), 0) << ran.out.substr(0, 80);
  EXPECT_NE(ran.out.find("| --- |"), std::string::npos);
}

TEST(Compare, NamesWhatWasTypedAndWhatItMoves) {
  const TemporaryFolder folder;
  write_whole(folder / "a.heatledger.json", sheet_text(kHydrogenation));
  write_whole(folder / "b.heatledger.json", sheet_text("nitrobenzene(l) + 3 H2 -> aniline(l) + 2 H2O(g)"));
  const Ran ran = heatledger({"compare", folder / "a.heatledger.json", folder / "b.heatledger.json"});
  ASSERT_EQ(ran.status, 0) << ran.err;
  EXPECT_NE(ran.out.find("What was typed differently"), std::string::npos);
  // Two moles of water stay vapour: 2 × 44.0 kJ (CODATA) less heat is set free.
  EXPECT_NE(ran.out.find("+88.0 kJ"), std::string::npos) << ran.out;
  const Ran same = heatledger({"compare", folder / "a.heatledger.json", folder / "a.heatledger.json"});
  EXPECT_NE(same.out.find("The two sheets say the same."), std::string::npos);
  const Ran missing = heatledger({"compare", folder / "a.heatledger.json", folder / "none.json"});
  EXPECT_EQ(missing.status, 1);
}

TEST(Work, JsonIsThePageItself) {
  const TemporaryFolder folder;
  write_whole(folder / "s.heatledger.json", sheet_text(kHydrogenation));
  const Ran ran = heatledger({"work", folder / "s.heatledger.json", "--json"});
  EXPECT_EQ(ran.status, 0);
  EXPECT_TRUE(nlohmann::json::parse(ran.out).contains("blocks"));
}

TEST(Work, AFileThatIsNoSheetNamesFileAndPlace) {
  const TemporaryFolder folder;
  EXPECT_EQ(heatledger({"work", folder / "missing.json"}).status, 1);
  write_whole(folder / "bad.json", "{\"format\": ");
  const Ran ran = heatledger({"work", folder / "bad.json"});
  EXPECT_EQ(ran.status, 1);
  EXPECT_NE(ran.err.find("bad.json"), std::string::npos) << ran.err;
  EXPECT_NE(ran.err.find("offset"), std::string::npos) << ran.err;
}

TEST(Work, ASheetWithAnErrorIsPrintedAndEndsWithStatusOne) {
  const TemporaryFolder folder;
  write_whole(folder / "s.heatledger.json", sheet_text("nitrobenzene + H2 -> unobtainium"));
  const Ran ran = heatledger({"work", folder / "s.heatledger.json"});
  EXPECT_EQ(ran.status, 1);
  EXPECT_NE(ran.out.find("unobtainium"), std::string::npos);
  EXPECT_FALSE(ran.err.empty());
}

TEST(Work, AFileThatCannotBeWrittenIsReported) {
  const TemporaryFolder folder;
  write_whole(folder / "s.heatledger.json", sheet_text(kHydrogenation));
  const Ran ran =
      heatledger({"work", folder / "s.heatledger.json", "--html", folder / "no/such/folder/r.html"});
  EXPECT_EQ(ran.status, 1);
  EXPECT_NE(ran.err.find("r.html"), std::string::npos) << ran.err;
}

}  // namespace
}  // namespace heatledger::test
