#include "core/file/json.hpp"

#include <gtest/gtest.h>

namespace heatledger::file {
namespace {

TEST(Json, KeepsOrderOfKeysAndSpellingOfNumbers) {
  const Result<Json> json =
      read_json(R"({"z": 12.50, "a": [1, 2.0e3, true, null], "empty": {}, "list": []})");
  ASSERT_TRUE(json.ok());
  EXPECT_EQ(write_json_text(*json),
            "{\n  \"z\": 12.50,\n  \"a\": [1, 2.0e3, true, null],\n  \"empty\": {},\n  \"list\": []\n}");
}

TEST(Json, RefusesDuplicateKeysWithTheirPlace) {
  const Result<Json> json = read_json(R"({"outer": [{"a": 1}, {"b": 1, "b": 2}]})");
  ASSERT_FALSE(json.ok());
  EXPECT_EQ(json.error().code, "file.duplicate_key");
  EXPECT_EQ(json.error().where, "outer[1]");
}

TEST(Json, RefusesMoreThanSixtyFourLevels) {
  const std::string fits = std::string(64, '[') + std::string(64, ']');
  EXPECT_TRUE(read_json(fits).ok());
  const std::string deep = std::string(65, '[') + std::string(65, ']');
  EXPECT_EQ(read_json(deep).error().code, "file.too_deep");
  // Must not reach the parser's stack: two hundred thousand brackets.
  EXPECT_EQ(read_json(std::string(200000, '[')).error().code, "file.too_deep");
}

TEST(Json, NamesOffsetAndLineOfWhatIsNoJson) {
  EXPECT_EQ(read_json("{\n \"a\": nope}").error().where, "offset 9, line 2");
  EXPECT_EQ(read_json("").error().code, "file.not_json");
  EXPECT_EQ(read_json("{\"a\": 1").error().message, "The text ends before its last bracket is closed.");
  EXPECT_EQ(read_json("{} {}").error().code, "file.not_json");
  EXPECT_EQ(read_json("{\"a\": 1e999}").error().code, "file.not_json");
}

TEST(Json, SkipsAByteOrderMark) {
  EXPECT_TRUE(read_json("\xef\xbb\xbf{}").ok());
}

TEST(Json, RefusesTextThatIsNoUtf8) {
  EXPECT_EQ(read_json("{\"a\": \"\xff\"}").error().code, "file.not_json");
}

TEST(Json, WritesValidTextWhateverTheBytes) {
  std::string out;
  append_json_string(out, "tab\t quote\" back\\ line\n bell\x07 bad\xff half\xe2\x82 good\u2082");
  EXPECT_EQ(out, "\"tab\\t quote\\\" back\\\\ line\\n bell\\u0007 bad\ufffd half\ufffd\ufffd good\u2082\"");
  EXPECT_TRUE(read_json(out).ok());
}

}  // namespace
}  // namespace heatledger::file
