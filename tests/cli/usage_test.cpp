#include <gtest/gtest.h>

#include "run.hpp"

namespace heatledger::test {
namespace {

TEST(Usage, HelpNamesEveryCommandAndIsNoError) {
  const Ran ran = heatledger({"--help"});
  EXPECT_EQ(ran.status, 0);
  for (const char* command : {"tally", "species", "work", "bulk", "window"}) {
    EXPECT_NE(ran.out.find(command), std::string::npos) << command;
    const Ran of_command = heatledger({command, "--help"});
    EXPECT_EQ(of_command.status, 0) << command;
    EXPECT_NE(of_command.out.find("--help"), std::string::npos) << command;
  }
}

TEST(Usage, VersionIsOneLine) {
  const Ran ran = heatledger({"--version"});
  EXPECT_EQ(ran.status, 0);
  EXPECT_EQ(ran.out.substr(0, 11), "heatledger ");
  EXPECT_EQ(ran.out.find('\n'), ran.out.size() - 1);
}

TEST(Usage, AnythingElseIsStatusTwoAndSaysSoOnStandardError) {
  const std::vector<std::vector<std::string>> wrong{{},
                                                    {"ladder"},
                                                    {"tally"},
                                                    {"tally", "H2 -> H2", "--set", "best"},
                                                    {"species", "water", "--frob"},
                                                    {"bulk", "file.jsonl"}};
  for (const auto& arguments : wrong) {
    const Ran ran = heatledger(arguments);
    EXPECT_EQ(ran.status, 2) << (arguments.empty() ? "(none)" : arguments[0]);
    EXPECT_TRUE(ran.out.empty());
    EXPECT_FALSE(ran.err.empty());
  }
}

TEST(Usage, AReaderThatGoesAwayIsNoComplaint) {
  // head takes one line and leaves; the run must end without a word on standard error.
  const Ran ran = run({"sh", "-c",
                       "yes '{\"equation\":\"H2 + Cl2 -> 2 HCl\"}' | head -20000 | \"" HEATLEDGER_PROGRAM
                       "\" bulk | head -1"});
  EXPECT_EQ(ran.err, "");
  EXPECT_NE(ran.out.find("\"balanced\":true"), std::string::npos);
}

TEST(Usage, AFullDiskIsReported) {
  const Ran ran = run({"sh", "-c", "\"" HEATLEDGER_PROGRAM "\" species water > /dev/full"});
  EXPECT_EQ(ran.status, 1);
  EXPECT_NE(ran.err.find("cannot be written"), std::string::npos) << ran.err;
}

}  // namespace
}  // namespace heatledger::test
