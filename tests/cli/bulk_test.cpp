#include <gtest/gtest.h>

#include <algorithm>
#include <nlohmann/json.hpp>
#include <random>
#include <sstream>

#include "run.hpp"

namespace heatledger::test {
namespace {

using nlohmann::json;

std::vector<std::string> lines_of(const std::string& text) {
  std::vector<std::string> lines;
  std::istringstream in(text);
  for (std::string line; std::getline(in, line);) lines.push_back(line);
  return lines;
}

const std::vector<std::string>& equations() {
  static const std::vector<std::string> list{"nitrobenzene(l) + 3 H2 -> aniline(l) + 2 H2O(l)",
                                             "CH4 + 2 O2 -> CO2 + 2 H2O",
                                             "acetic acid(l) + ethanol(l) -> ethyl acetate(l) + water(l)",
                                             "benzene(l) + Cl2 -> chlorobenzene(l) + HCl",
                                             "\"CC(=O)O\"(l) + \"CCO\"(l) -> \"CCOC(C)=O\"(l) + water(l)",
                                             "N2 + 3 H2 <=> 2 NH3",
                                             "toluene(l) + 9 O2 -> 7 CO2 + 4 H2O(l)",
                                             "C(s) + O2 -> CO2"};
  return list;
}

/// Walks the short answer; every number in it must stand in the whole answer with the same digits.
void expect_same_digits(const json& brief, const json& whole, const std::string& path) {
  if (brief.is_object()) {
    for (const auto& [key, value] : brief.items()) {
      if (key == "id") continue;
      ASSERT_TRUE(whole.contains(key)) << path << "/" << key;
      expect_same_digits(value, whole[key], path + "/" + key);
    }
    return;
  }
  EXPECT_EQ(brief.dump(), whole.dump()) << path;
}

TEST(Bulk, ShortAnswersEqualTallyDigitForDigit) {
  std::string input;
  for (const std::string& equation : equations()) input += json{{"equation", equation}}.dump() + "\n";
  const Ran ran = heatledger({"bulk"}, input);
  ASSERT_EQ(ran.status, 0) << ran.err;
  const std::vector<std::string> answers = lines_of(ran.out);
  ASSERT_EQ(answers.size(), equations().size());
  for (std::size_t i = 0; i < answers.size(); ++i) {
    const json brief = json::parse(answers[i]);
    ASSERT_TRUE(brief.contains("gas_298")) << answers[i];
    const Ran tally = heatledger({"tally", equations()[i], "--json"});
    json whole = json::parse(tally.out);
    // The short answer writes null where the whole one has a null with its reason.
    for (const char* key : {"gas_298", "as_written"}) {
      if (whole[key]["value"].is_null()) whole[key] = nullptr;
    }
    // By the average set the short answer leaves the context route out.
    EXPECT_TRUE(brief["routes"]["context"].is_null());
    whole["routes"]["context"] = nullptr;
    expect_same_digits(brief, whole, equations()[i]);
  }
}

TEST(Bulk, ShortAnswersInContextEqualTallyDigitForDigit) {
  std::string input;
  for (const std::string& equation : equations()) input += json{{"equation", equation}}.dump() + "\n";
  const std::vector<std::string> answers = lines_of(heatledger({"bulk", "--set", "context"}, input).out);
  ASSERT_EQ(answers.size(), equations().size());
  int given = 0;
  for (std::size_t i = 0; i < answers.size(); ++i) {
    json whole = json::parse(heatledger({"tally", equations()[i], "--json", "--set", "context"}).out);
    for (const char* key : {"gas_298", "as_written"}) {
      if (whole[key]["value"].is_null()) whole[key] = nullptr;
    }
    const json brief = json::parse(answers[i]);
    expect_same_digits(brief, whole, equations()[i]);
    given += brief["gas_298"].is_null() ? 0 : 1;
  }
  EXPECT_GT(given, 3);
}

TEST(Bulk, FullAnswersEqualTally) {
  std::string input;
  for (const std::string& equation : equations())
    input += json{{"id", "x"}, {"equation", equation}}.dump() + "\n";
  const std::vector<std::string> answers = lines_of(heatledger({"bulk", "--full"}, input).out);
  ASSERT_EQ(answers.size(), equations().size());
  for (std::size_t i = 0; i < answers.size(); ++i) {
    json whole = json::parse(answers[i]);
    EXPECT_EQ(whole["id"], "x");
    whole.erase("id");
    EXPECT_EQ(whole, json::parse(heatledger({"tally", equations()[i], "--json"}).out));
  }
}

TEST(Bulk, SpeciesLinesEqualTheSpeciesCommand) {
  const std::vector<std::string> answers =
      lines_of(heatledger({"bulk"},
                          "{\"id\":1,\"species\":\"ethyl acetate\"}\n"
                          "{\"id\":2,\"smiles\":\"CO\"}\n"
                          "{\"id\":3,\"species\":\"aniline\",\"estimate_only\":true}\n")
                   .out);
  ASSERT_EQ(answers.size(), 3u);
  const auto without_id = [](const std::string& line) {
    json answer = json::parse(line);
    answer.erase("id");
    return answer;
  };
  EXPECT_EQ(without_id(answers[0]), json::parse(heatledger({"species", "ethyl acetate", "--json"}).out));
  EXPECT_EQ(without_id(answers[1]), json::parse(heatledger({"species", "CO", "--smiles", "--json"}).out));
  EXPECT_EQ(without_id(answers[2]),
            json::parse(heatledger({"species", "aniline", "--estimate-only", "--json"}).out));
}

TEST(Bulk, ABadLineGivesAnErrorInItsPlaceAndTheRunGoesOn) {
  const std::string input =
      "{\"id\":1,\"equation\":\"H2 + Cl2 -> 2 HCl\"}\n"
      "not json\n"
      "{\"id\":3,\"equation\":\"H2 + unobtainium -> water\"}\n"
      "\n"
      "{\"id\":4,\"equation\":\"CH4 + O2 -> CO2 + H2O\"}\n"
      "{\"equation\":17,\"id\":\"five\"}\n"
      "{\"id\":6,\"equatoin\":\"H2 + Cl2 -> 2 HCl\"}\n"
      "{\"id\":7,\"equation\":\"H2 + Cl2 -> 2 HCl\"}";  // no newline at the end
  const Ran ran = heatledger({"bulk"}, input);
  EXPECT_EQ(ran.status, 0);
  const std::vector<std::string> answers = lines_of(ran.out);
  ASSERT_EQ(answers.size(), 7u);
  EXPECT_FALSE(json::parse(answers[0]).contains("error"));
  EXPECT_EQ(json::parse(answers[1])["error"]["code"], "bulk.not_json");
  EXPECT_TRUE(json::parse(answers[1])["id"].is_null());
  EXPECT_EQ(json::parse(answers[2])["id"], 3);
  EXPECT_EQ(json::parse(answers[2])["error"]["where"], "offset 5");
  EXPECT_EQ(json::parse(answers[3])["error"]["code"], "ledger.not_balanced");
  EXPECT_EQ(json::parse(answers[4])["id"], "five");
  EXPECT_EQ(json::parse(answers[4])["error"]["code"], "bulk.wrong_type");
  EXPECT_NE(json::parse(answers[5])["error"]["message"].get<std::string>().find("equatoin"),
            std::string::npos);
  EXPECT_EQ(json::parse(answers[6])["id"], 7);
}

TEST(Bulk, ALineThatIsTooLongIsSkippedToItsEnd) {
  const std::string input = "{\"id\":1,\"equation\":\"" + std::string(3u << 20, 'C') +
                            "\"}\n{\"id\":2,\"equation\":\"H2 + Cl2 -> 2 HCl\"}\n";
  const std::vector<std::string> answers = lines_of(heatledger({"bulk"}, input).out);
  ASSERT_EQ(answers.size(), 2u);
  EXPECT_EQ(json::parse(answers[0])["error"]["code"], "bulk.line_too_long");
  EXPECT_EQ(json::parse(answers[0])["id"], 1);
  EXPECT_EQ(json::parse(answers[1])["id"], 2);
}

TEST(Bulk, OrderIsKeptOverManyLines) {
  constexpr unsigned kSeed = 20211;
  SCOPED_TRACE("seed " + std::to_string(kSeed));
  std::mt19937 random(kSeed);
  std::string input;
  constexpr int kLines = 5000;
  for (int i = 0; i < kLines; ++i) {
    input += json{{"id", i}, {"equation", equations()[random() % equations().size()]}}.dump() + "\n";
  }
  const std::vector<std::string> answers = lines_of(heatledger({"bulk"}, input).out);
  ASSERT_EQ(answers.size(), static_cast<std::size_t>(kLines));
  for (int i = 0; i < kLines; ++i) ASSERT_EQ(json::parse(answers[static_cast<std::size_t>(i)])["id"], i);
}

// The README's way to use every core: chunks of lines to several programs at once, answers in order.
TEST(Bulk, IsAFilterUnderGnuParallel) {
  std::string lines;
  constexpr int kLines = 500;
  for (int i = 0; i < kLines; ++i)
    lines += "{\"id\":" + std::to_string(i) + ",\"equation\":\"CH4 + 2 O2 -> CO2 + 2 H2O\"}\n";
  const Ran one = heatledger({"bulk"}, lines);
  const Ran many = run(
      {"parallel", "--pipe", "--keep-order", "--block", "4k", "-j", "2", HEATLEDGER_PROGRAM, "bulk"}, lines);
  ASSERT_EQ(many.status, 0) << many.err;
  EXPECT_EQ(many.out, one.out);
  EXPECT_EQ(std::count(one.out.begin(), one.out.end(), '\n'), kLines);
}

TEST(Bulk, AnswersBeforeItWaitsForMore) {
  // A program on the other side of two pipes asks, waits for the answer, asks again.
  const Ran ran = run({"bash", "-c",
                       "coproc \"" HEATLEDGER_PROGRAM
                       "\" bulk; echo '{\"id\":1,\"equation\":\"H2 + Cl2 -> 2 HCl\"}' >&${COPROC[1]}; "
                       "read -t 20 -u ${COPROC[0]} line && echo \"$line\"; exec {COPROC[1]}>&-; wait"});
  EXPECT_NE(ran.out.find("\"id\":1"), std::string::npos) << ran.err;
}

/// Most memory the program ever held while it answered `lines` lines [kB].
long peak_kilobytes(int lines) {
  const std::string line = "{\"id\":123456,\"equation\":\"nitrobenzene(l) + 3 H2 -> aniline(l) + 2 H2O(l)\"}";
  // The program's own record is read while it waits for more input: /proc/PID/status, VmHWM.
  const Ran ran =
      run({"bash", "-c",
           "coproc \"" HEATLEDGER_PROGRAM "\" bulk > /dev/null; "
           "yes \"$1\" | head -" +
               std::to_string(lines) +
               " >&${COPROC[1]}; "
               "while [ \"$(awk '{print $3}' /proc/$COPROC_PID/stat)\" != S ]; do sleep 0.05; done; "
               "awk '/VmHWM/ {print $2}' /proc/$COPROC_PID/status; exec {COPROC[1]}>&-; wait",
           "bash", line});
  return std::atol(ran.out.c_str());
}

TEST(Bulk, MemoryDoesNotGrowWithTheNumberOfLines) {
  const long few = peak_kilobytes(1000), many = peak_kilobytes(100000);
  ASSERT_GT(few, 0);
  // A hundred times the lines; half a megabyte is the allocator's own play.
  EXPECT_LT(many, few + 512);
}

}  // namespace
}  // namespace heatledger::test
