#include "desktop/window/fonts.hpp"

#include <imgui/imgui.h>
#include <stb/stb_image.h>

#include <cmath>
#include <cstdlib>
#include <utility>

#include "core/base/check.hpp"
#include "desktop/window/embedded_fonts.hpp"

namespace heatledger::window {
namespace {

struct Style {
  bool bold;
  float em;  ///< [points]
};

constexpr std::array<Style, kTypes> kStyles{{{false, 14},
                                             {false, 13},
                                             {false, 12},
                                             {false, 11},
                                             {true, 14},
                                             {true, 12},
                                             {true, 12},
                                             {false, 18},
                                             {true, 18},
                                             {true, 20}}};

// ImGui sizes a font by ascent + descent; for DejaVu that is 0.928 + 0.236 of the em.
constexpr float kHeightOfEm = 1.1640625f;

// Latin, Greek, Cyrillic, punctuation and thin space, super- and subscripts, letterlike, fractions, arrows,
// operators, box drawing left out, geometric shapes, ticks.
constexpr std::array<ImWchar, 29> kRanges{0x0020, 0x024F, 0x0370, 0x03FF, 0x0400, 0x045F, 0x1D49, 0x1D49,
                                          0x2000, 0x206F, 0x2070, 0x209F, 0x2100, 0x214F, 0x2150, 0x218F,
                                          0x2190, 0x21FF, 0x2200, 0x22FF, 0x25A0, 0x25FF, 0x2713, 0x2717,
                                          0x27F6, 0x27F6, 0xFFFD, 0xFFFD, 0};

/// The typeface inflated once; ImGui reads it again at every change of scale.
std::pair<void*, int> inflated(const EmbeddedFont& font) {
  int length = 0;
  char* bytes = stbi_zlib_decode_malloc(reinterpret_cast<const char*>(font.words),
                                        static_cast<int>(font.bytes), &length);
  CHECK(bytes != nullptr, "an embedded font inflates");
  return {bytes, length};
}

}  // namespace

float Fonts::size(Type type) {
  return kStyles[static_cast<std::size_t>(type)].em;
}

void Fonts::load(float scale) {
  static const std::pair<void*, int> kRegular = inflated(kRegularFont);
  static const std::pair<void*, int> kBold = inflated(kBoldFont);
  scale_ = scale;
  ImFontAtlas& atlas = *ImGui::GetIO().Fonts;
  atlas.Clear();
  atlas.Flags |= ImFontAtlasFlags_NoMouseCursors;
  ImFontConfig config;
  config.FontDataOwnedByAtlas = false;
  config.OversampleH = 2;
  config.PixelSnapH = true;
  config.GlyphRanges = kRanges.data();
  for (std::size_t i = 0; i < kTypes; ++i) {
    // Equal styles share one font.
    fonts_[i] = nullptr;
    for (std::size_t j = 0; j < i && fonts_[i] == nullptr; ++j) {
      if (kStyles[j].bold == kStyles[i].bold && kStyles[j].em == kStyles[i].em) fonts_[i] = fonts_[j];
    }
    if (fonts_[i] != nullptr) continue;
    const auto& [bytes, length] = kStyles[i].bold ? kBold : kRegular;
    fonts_[i] =
        atlas.AddFontFromMemoryTTF(bytes, length, std::round(kStyles[i].em * scale * kHeightOfEm), &config);
    CHECK(fonts_[i] != nullptr, "an embedded font loads");
  }
  atlas.Build();
}

}  // namespace heatledger::window
