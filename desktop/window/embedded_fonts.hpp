// Typefaces compiled in: zlib streams made at build time by embed_font.cpp from a Debian package.
#pragma once

#include <cstddef>
#include <cstdint>

namespace heatledger::window {

struct EmbeddedFont {
  const std::uint64_t* words;
  std::size_t bytes;
};

extern const EmbeddedFont kRegularFont, kBoldFont;

}  // namespace heatledger::window
