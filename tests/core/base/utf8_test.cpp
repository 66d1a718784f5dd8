#include "core/base/utf8.hpp"

#include <gtest/gtest.h>

#include <string>

namespace heatledger::utf8 {
namespace {

TEST(Utf8, TellsWhereTextIsMalformed) {
  EXPECT_EQ(first_malformed(""), 0u);
  EXPECT_EQ(first_malformed("H\u2082O \u2192 \U0001F525"), std::string("H\u2082O \u2192 \U0001F525").size());
  // Overlong, surrogate, beyond the last code point, cut short, lone continuation (RFC 3629, sections 3 and
  // 10).
  for (const char* bad : {"ab\xC0\xAF", "ab\xE0\x80\xAF", "ab\xED\xA0\x80", "ab\xF4\x90\x80\x80",
                          "ab\xE2\x82", "ab\x80", "ab\xFF"}) {
    EXPECT_EQ(first_malformed(bad), 2u) << bad;
  }
}

TEST(Utf8, WritesWhatItReads) {
  // First and last code point of each length (RFC 3629, section 3).
  for (const std::uint32_t code : {0x0u, 0x7Fu, 0x80u, 0x7FFu, 0x800u, 0xFFFFu, 0x10000u, 0x10FFFFu}) {
    std::string text;
    append(text, code);
    EXPECT_EQ(code_point_at(text, 0).value, code);
    EXPECT_EQ(code_point_at(text, 0).bytes, text.size()) << code;
  }
}

TEST(Utf8, TrimsBlanksOfEveryKind) {
  EXPECT_EQ(trim(" \t\u00A0a b\u2009\r\n"), "a b");
  EXPECT_EQ(trim("  "), "");
  EXPECT_EQ(blank_before("a\u202F", 4), 3u);
}

TEST(Utf8, CountsColumns) {
  EXPECT_EQ(display_width("CO\u2082 \u2192 \u0394H"), 8u);
  EXPECT_EQ(display_width("e\u0301"), 1u);
  EXPECT_EQ(display_width("\u6C34"), 2u);
  EXPECT_EQ(display_width("a\xFF"), 2u);
}

}  // namespace
}  // namespace heatledger::utf8
