// The reader of bulk lines against the letter of RFC 8259, with nlohmann_json as the second opinion.
#include "core/page/json_line.hpp"

#include <gtest/gtest.h>

#include <nlohmann/json.hpp>
#include <random>

#include "core/page/json_text.hpp"

namespace heatledger::page {
namespace {

LineQuestion read(const std::string& line, Status* status = nullptr) {
  LineQuestion question;
  const Status result = read_question(line, question);
  if (status != nullptr) {
    *status = result;
  } else {
    EXPECT_TRUE(result.ok()) << line << ": " << (result.ok() ? "" : result.error().message);
  }
  return question;
}

std::string code_of(const std::string& line) {
  LineQuestion question;
  const Status result = read_question(line, question);
  return result.ok() ? "ok" : result.error().code;
}

TEST(JsonLine, TakesKeysInAnyOrderAndHandsTheIdBackAsItCame) {
  const std::string line =
      R"( { "estimate_only" : true , "note":[1,{"a":null}], "smiles" : "CCO", "id" : 1.50e+2 } )";
  const LineQuestion question = read(line);
  EXPECT_EQ(question.id, "1.50e+2");
  EXPECT_EQ(question.smiles.value_or(""), "CCO");
  EXPECT_TRUE(question.estimate_only);
  EXPECT_FALSE(question.equation.has_value());
}

TEST(JsonLine, UndoesEveryEscape) {
  const std::string line = R"({"equation":"\"\\\/\b\f\n\r\t\u00e9\u2192\ud83d\ude00"})";
  const LineQuestion question = read(line);
  EXPECT_EQ(question.equation.value_or(""), "\"\\/\b\f\n\r\té→😀");
}

TEST(JsonLine, RefusesWhatIsNotJson) {
  for (const char* line : {"{",
                           "{\"id\":}",
                           "{\"id\":1,}",
                           "{'id':1}",
                           "{\"id\":01}",
                           "{\"id\":1.}",
                           "{\"id\":1e}",
                           "{\"id\":+1}",
                           "{\"id\":nul}",
                           "{\"id\":1} x",
                           "{\"equation\":\"a",
                           "{\"equation\":\"\\x\"}",
                           "{\"equation\":\"\\u12g4\"}",
                           "{\"equation\":\"\\ud800\"}",
                           "{\"equation\":\"\\udc00\"}",
                           "{\"equation\":\"\\ud800\\u0041\"}",
                           "{\"equation\":\"a\tb\"}",
                           "{\"equation\":\"\xff\"}",
                           "{\"equation\":\"\xc0\xaf\"}",
                           "{\"equation\":\"\xed\xa0\x80\"}",
                           "{\"a\":[1,]}",
                           "{\"a\":[}",
                           "{\"a\" 1}",
                           "{1:2}"}) {
    EXPECT_EQ(code_of(line), "bulk.not_json") << line;
  }
  EXPECT_EQ(code_of("[1]"), "bulk.not_an_object");
  EXPECT_EQ(code_of("17"), "bulk.not_an_object");
  EXPECT_EQ(code_of("{\"a\":" + std::string(200000, '[')), "bulk.too_deep");
}

TEST(JsonLine, AKeyTwiceIsRefusedAndTheIdStillFound) {
  Status status = success();
  const std::string line = R"({"equation":"a","equation":"b","id":9})";
  const LineQuestion question = read(line, &status);
  ASSERT_FALSE(status.ok());
  EXPECT_EQ(status.error().code, "bulk.duplicate_key");
  EXPECT_EQ(status.error().where, "offset 16");
  EXPECT_EQ(question.id, "9");
  EXPECT_EQ(code_of(R"({"x":1,"x":2})"), "bulk.duplicate_key");
}

TEST(JsonLine, AgreesWithASecondReaderOnMangledLines) {
  constexpr unsigned kSeed = 4711;
  SCOPED_TRACE("seed " + std::to_string(kSeed));
  std::mt19937 random(kSeed);
  const std::string sound =
      R"({"id":-12.5e3,"equation":"H2 + Cl2 \u2192 2 HCl\n","other":[true,false,null,{"k":"v"}],"n":0.5})";
  const std::string alphabet = "{}[]\",:\\u0123eE+-. tfn\x01\xc3\xa9";
  int accepted = 0;
  for (int round = 0; round < 20000; ++round) {
    std::string line = sound;
    const int changes = 1 + static_cast<int>(random() % 3);
    for (int i = 0; i < changes; ++i) {
      const std::size_t at = random() % line.size();
      const char c = alphabet[random() % alphabet.size()];
      switch (random() % 3) {
        case 0:
          line[at] = c;
          break;
        case 1:
          line.erase(at, 1);
          break;
        default:
          line.insert(at, 1, c);
      }
    }
    const nlohmann::json second = nlohmann::json::parse(line, nullptr, false);
    const std::string code = code_of(line);
    const bool ours = code != "bulk.not_json" && code != "bulk.not_an_object";
    const bool theirs = !second.is_discarded() && second.is_object();
    ASSERT_EQ(ours, theirs) << line;
    accepted += ours ? 1 : 0;
  }
  // Both verdicts must occur often, or the comparison says little.
  EXPECT_GT(accepted, 1000);
  EXPECT_LT(accepted, 19000);
}

TEST(JsonText, WhatIsWrittenReadsBack) {
  std::string out;
  JsonText json(out);
  const std::string odd = "quote \" back \\ tab \t line \n bell \x07 umlaut ü arrow → bad \xff end";
  json.open_object().key("a").open_array().number(-552.6).integer(3).boolean(true).null().close_array();
  json.key("b").string(odd).key("c").open_object().close_object().key("d").raw("1e2").close_object();
  const nlohmann::json read = nlohmann::json::parse(out, nullptr, false);
  ASSERT_FALSE(read.is_discarded()) << out;
  EXPECT_EQ(read["a"].dump(), "[-552.6,3,true,null]");
  EXPECT_EQ(read["b"], "quote \" back \\ tab \t line \n bell \x07 umlaut ü arrow → bad \uFFFD end");
  EXPECT_EQ(read["d"].get<double>(), 100);
}

}  // namespace
}  // namespace heatledger::page
