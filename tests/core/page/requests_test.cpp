#include "core/page/requests.hpp"

#include <gtest/gtest.h>

#include "core/file/json.hpp"
#include "tests/core/support/test_files.hpp"

namespace heatledger::page {
namespace {

file::Json ask(const std::string& request) {
  const Result<file::Json> answer = file::read_json(handle_request(request));
  EXPECT_TRUE(answer.ok()) << request;
  return answer.ok() ? *answer : file::Json();
}

bool is_ok(const file::Json& answer) {
  return answer.find("ok") != nullptr && answer.find("ok")->is_true();
}

std::string code_of(const file::Json& answer) {
  const file::Json* error = answer.find("error");
  return error == nullptr ? "(no error)" : error->string_or("code", "");
}

/// Opens a new sheet for one test and closes it after.
class Requests : public ::testing::Test {
 protected:
  void SetUp() override { number_ = ask(R"({"do":"new"})").find("value")->find("sheet")->text(); }
  void TearDown() override { ask("{\"do\":\"close\",\"sheet\":" + number_ + "}"); }

  /// {"do": verb, "sheet": this one, more}
  file::Json about(const std::string& verb, const std::string& more = "") {
    return ask("{\"do\":\"" + verb + "\",\"sheet\":" + number_ + (more.empty() ? "" : "," + more) + "}");
  }

  std::string number_;
};

TEST_F(Requests, EditAnswersThePage) {
  const file::Json answer = about("edit", R"("cell":"r1.equation","text":"H2 + Cl2 -> 2 HCl")");
  ASSERT_TRUE(is_ok(answer));
  EXPECT_NE(answer.find("value")->find("blocks"), nullptr);
  EXPECT_NE(answer.find("value")->find("commands"), nullptr);
  EXPECT_EQ(answer.find("value")->string_or("title", ""), "Untitled sheet");
}

TEST_F(Requests, EditSinceARevisionAnswersTheChanges) {
  const std::string revision = about("page").find("value")->find("revision")->text();
  const file::Json answer = about("edit", R"("cell":"header.title","text":"T","since":)" + revision);
  ASSERT_TRUE(is_ok(answer));
  const file::Json& value = *answer.find("value");
  EXPECT_EQ(value.find("since")->text(), revision);
  EXPECT_EQ(value.find("order"), nullptr);
  ASSERT_EQ(value.find("blocks")->items().size(), 1U);
  EXPECT_EQ(value.find("blocks")->items()[0].string_or("id", ""), "sheet");
  // A revision from the future can only be another sheet's: the whole page comes.
  EXPECT_EQ(about("page", R"("since":999999)").find("value")->find("since"), nullptr);
}

TEST_F(Requests, SaveAndOpenGiveTheSameSheet) {
  about("edit", R"("cell":"r1.equation","text":"H2 + Cl2 -> 2 HCl")");
  EXPECT_TRUE(about("state").find("value")->find("changed")->is_true());
  std::string quoted;
  file::append_json_string(quoted, about("export").find("value")->text());
  EXPECT_TRUE(about("state").find("value")->find("changed")->is_true()) << "a recovery copy is no save";
  const file::Json saved = about("save");
  EXPECT_FALSE(about("state").find("value")->find("changed")->is_true());
  const file::Json opened = ask("{\"do\":\"open\",\"text\":" + quoted + "}");
  ASSERT_TRUE(is_ok(opened));
  const std::string other = opened.find("value")->find("sheet")->text();
  EXPECT_NE(other, number_);
  EXPECT_EQ(ask("{\"do\":\"save\",\"sheet\":" + other + "}").find("value")->text(),
            saved.find("value")->text());
  EXPECT_TRUE(is_ok(ask("{\"do\":\"close\",\"sheet\":" + other + "}")));
  EXPECT_EQ(code_of(ask("{\"do\":\"page\",\"sheet\":" + other + "}")), "request.no_such_sheet");
}

TEST_F(Requests, CommandsTakeArguments) {
  EXPECT_TRUE(
      is_ok(about("command", R"("name":"add_reaction","arguments":{"equation":"H2 + Cl2 -> 2 HCl"})")));
  EXPECT_TRUE(is_ok(about("command", R"("name":"undo")")));
  EXPECT_EQ(code_of(about("command", R"("name":"undo")")), "command.nothing_to_undo");
}

TEST_F(Requests, MarginAndSuggestions) {
  about("edit", R"j("cell":"r1.equation","text":"H2(g) + Cl2(g) -> 2 HCl(g)")j");
  const file::Json margin = about("margin", R"("cell":"r1.gas_298")");
  ASSERT_TRUE(is_ok(margin));
  EXPECT_FALSE(margin.find("value")->find("steps")->items().empty());
  EXPECT_EQ(code_of(about("margin", R"("cell":"nowhere")")), "edit.no_such_cell");
  const file::Json list = about("suggest", R"("text":"nitrob","limit":3)");
  ASSERT_TRUE(is_ok(list));
  ASSERT_FALSE(list.find("value")->items().empty());
  EXPECT_LE(list.find("value")->items().size(), 3U);
  EXPECT_EQ(list.find("value")->items()[0].string_or("text", ""), "nitrobenzene");
}

TEST_F(Requests, ReportsInEveryForm) {
  about("edit", R"j("cell":"r1.equation","text":"H2(g) + Cl2(g) -> 2 HCl(g)")j");
  for (const char* verb : {"report", "text", "csv"}) {
    const file::Json answer = about(verb);
    ASSERT_TRUE(is_ok(answer)) << verb;
    EXPECT_GT(answer.find("value")->text().size(), 100U) << verb;
  }
  EXPECT_EQ(about("svg", R"("drawing":"r1.routes.drawing")").find("value")->text().substr(0, 5), "<?xml");
  EXPECT_EQ(code_of(about("svg", R"("drawing":"none")")), "request.not_understood");
}

TEST_F(Requests, BadOnesGetTheOneErrorShape) {
  const std::vector<std::pair<std::string, std::string>> cases{
      {"", "request.not_understood"},
      {"{", "request.not_understood"},
      {"[]", "request.not_understood"},
      {"\"page\"", "request.not_understood"},
      {"{}", "request.not_understood"},
      {"{\"do\":5}", "request.not_understood"},
      {"{\"do\":\"page\"}", "request.no_such_sheet"},
      {"{\"do\":\"page\",\"sheet\":\"1\"}", "request.no_such_sheet"},
      {"{\"do\":\"page\",\"sheet\":-1}", "request.no_such_sheet"},
      {"{\"do\":\"page\",\"sheet\":0.5}", "request.no_such_sheet"},
      {"{\"do\":\"page\",\"sheet\":1e300}", "request.no_such_sheet"},
      {"{\"do\":\"open\"}", "request.not_understood"},
      {"{\"do\":\"open\",\"text\":\"{\"}", "file.not_json"},
      {"{\"do\":\"open\",\"text\":7}", "request.not_understood"},
      {"{\"do\":\"dance\",\"sheet\":" + number_ + "}", "request.not_understood"},
      {"{\"do\":\"edit\",\"sheet\":" + number_ + "}", "request.not_understood"},
      {"{\"do\":\"edit\",\"sheet\":" + number_ + ",\"cell\":\"r1.equation\"}", "request.not_understood"},
      {"{\"do\":\"edit\",\"sheet\":" + number_ + ",\"cell\":[],\"text\":\"\"}", "request.not_understood"},
      {"{\"do\":\"command\",\"sheet\":" + number_ + ",\"name\":\"undo\",\"arguments\":3}",
       "request.not_understood"},
      {"{\"do\":\"command\",\"sheet\":" + number_ + ",\"name\":\"fold\",\"arguments\":{\"row\":3}}",
       "request.not_understood"},
      {std::string(100000, '['), "request.not_understood"},
      {"{\"do\":\"new\",\"do\":\"new\"}", "request.not_understood"},
      {"{\"do\":\"\xff\"}", "request.not_understood"}};
  for (const auto& one : cases) {
    const file::Json answer = ask(one.first);
    EXPECT_FALSE(is_ok(answer)) << one.first.substr(0, 80);
    EXPECT_EQ(code_of(answer), one.second) << one.first.substr(0, 80);
    for (const char* key : {"code", "message", "where", "hint"}) {
      ASSERT_NE(answer.find("error")->find(key), nullptr);
      EXPECT_TRUE(answer.find("error")->find(key)->is_string());
    }
  }
}

TEST(RequestsLimit, RefusesSheetsWithoutEnd) {
  std::vector<std::string> open;
  std::string refused;
  for (int i = 0; i < 200 && refused.empty(); ++i) {
    const file::Json answer = ask(R"({"do":"new"})");
    if (is_ok(answer)) {
      open.push_back(answer.find("value")->find("sheet")->text());
    } else {
      refused = code_of(answer);
    }
  }
  EXPECT_EQ(refused, "request.too_many_sheets");
  for (const std::string& number : open)
    EXPECT_TRUE(is_ok(ask("{\"do\":\"close\",\"sheet\":" + number + "}")));
}

}  // namespace
}  // namespace heatledger::page
