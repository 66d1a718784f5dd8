// UTF-8: blanks, validity, code points, width on a terminal. No locale, no tables beyond what the sheet
// prints.
#pragma once

#include <cstddef>
#include <cstdint>
#include <string>
#include <string_view>

namespace heatledger::utf8 {

/// One code point and its length; `bytes` is 0 where no well-formed sequence begins (overlong forms,
/// surrogates and values past U+10FFFF are not well formed).
/// @source RFC 3629, section 4
struct CodePoint {
  std::uint32_t value = 0;
  std::size_t bytes = 0;
};
CodePoint code_point_at(std::string_view text, std::size_t at);

/// Appends one code point. @param code  up to 0x10FFFF, no surrogate
void append(std::string& out, std::uint32_t code);

/// Byte offset of the first malformed sequence; text.size() when the whole text is well formed.
std::size_t first_malformed(std::string_view text);

/// Bytes of the blank that begins at `at`: space, tab, line ends, no-break, thin, narrow and ideographic
/// space; 0 when there is none.
std::size_t blank_at(std::string_view text, std::size_t at);
/// Bytes of the blank that ends just before `at`; 0 when there is none.
std::size_t blank_before(std::string_view text, std::size_t at);
/// First offset at or after `at` that is not a blank.
std::size_t skip_blanks(std::string_view text, std::size_t at);
/// The text without blanks at its ends.
std::string_view trim(std::string_view text);

/// Columns on a terminal: combining marks take none, East Asian wide characters two; malformed bytes one
/// each.
std::size_t display_width(std::string_view text);

}  // namespace heatledger::utf8
